/**
 * Change points of a short series: levels that hold, parted by steps. Exact least-squares segmentation by dynamic programming
 * (optimal partitioning: Auger & Lawrence 1989; Jackson et al. 2005), the number of steps by Schwarz's criterion (Yao 1988),
 * against a straight line and one level as the other shapes. In: values and their times. Out: the last step, or null.
 */
import { leastSquares } from './least-squares.ts';
import { mean, median } from './median.ts';

export interface Step {
  /** Index of the first value after the step. */
  readonly at: number;
  /** Means of the level before it and of the one after it, in the unit of the values. */
  readonly before: number;
  readonly after: number;
}

/** A level is at least this many values: one alone is a spike. */
const SHORTEST = 2;
/** Median absolute deviation of normal scatter to its standard deviation. */
const MAD_TO_SD = 1.4826;

/** Standard deviation of the scatter, robust: from the differences of neighbours, which a step or a slow rise moves little. */
function scatterOf(values: readonly number[]): number {
  const differences = values.slice(1).map((v, i) => Math.abs(v - (values[i] as number)));
  return (MAD_TO_SD * median(differences)) / Math.SQRT2;
}

/**
 * The last step of the series where levels with steps describe it better than a line or one level do; null where they do not.
 * `leastScatter`: standard deviation that the values have in any case, in their unit.
 */
export function lastStep(times: readonly number[], values: readonly number[], leastScatter: number): Step | null {
  const n = values.length;
  if (n < 2 * SHORTEST) return null;
  const scatter = Math.max(leastScatter, scatterOf(values));
  const [variance, dimension] = [scatter * scatter, Math.log(n)];
  const squares = segmentSquares(values);
  // Two parameters more for each step: its place and its level.
  const { cost, start } = bestLevels((i, j) => squares(i, j) / variance, n, 2 * dimension);
  const line = leastSquares(times, values);
  const lineCost = line === null ? Number.POSITIVE_INFINITY : (line.residualSd * line.residualSd * (line.n - 2)) / variance + dimension;
  if (start === 0 || cost >= lineCost) return null;
  const { start: from } = bestLevels((i, j) => squares(i, j) / variance, start, 2 * dimension);
  return { at: start, before: mean(values.slice(from, start)), after: mean(values.slice(start)) };
}

/** Squares about the mean of the values from i to before j. */
function segmentSquares(values: readonly number[]): (i: number, j: number) => number {
  const [sums, squares] = [[0], [0]];
  // About the first value, so that large levels lose no digits.
  const origin = values[0] as number;
  values.forEach((v, i) => {
    const d = v - origin;
    sums.push((sums[i] as number) + d);
    squares.push((squares[i] as number) + d * d);
  });
  return (i, j) => {
    const sum = (sums[j] as number) - (sums[i] as number);
    return Math.max(0, (squares[j] as number) - (squares[i] as number) - (sum * sum) / (j - i));
  };
}

/** Cost of the best levels of the first n values, and where the last of them begins. */
function bestLevels(cost: (i: number, j: number) => number, n: number, penalty: number): { readonly cost: number; readonly start: number } {
  const best: number[] = [-penalty];
  const starts: number[] = [0];
  for (let j = 1; j <= n; j += 1) {
    let [least, start] = [Number.POSITIVE_INFINITY, 0];
    for (let i = 0; i <= j - SHORTEST; i += 1) {
      const here = (best[i] as number) + cost(i, j) + penalty;
      if (here < least - 1e-12) [least, start] = [here, i];
    }
    best.push(least);
    starts.push(start);
  }
  return { cost: best[n] as number, start: starts[n] as number };
}
