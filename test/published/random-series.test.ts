/**
 * The statistics on a thousand random series with irregular dates, ties and gaps, against general-purpose libraries: Theil–Sen
 * by ml-regression-theil-sen, t quantile, normal distribution and correlation by @stdlib/stats. For Mann–Kendall the registry
 * has no library: S, its variance with ties and the null distribution are written again here from their definitions (Mann 1945;
 * Kendall 1975), the distribution by listing every arrangement.
 */
import normalCdf from '@stdlib/stats/base/dists/normal/cdf';
import quantile from '@stdlib/stats/base/dists/t/quantile';
import correlation from '@stdlib/stats/pcorrtest';
import fc from 'fast-check';
import { TheilSenRegression } from 'ml-regression-theil-sen';
import { describe, expect, it } from 'vitest';
import { leastSquares, predictionInterval } from '../../src/assess/statistics/least-squares.ts';
import { mannKendall } from '../../src/assess/statistics/mann-kendall.ts';
import { mean, standardDeviation } from '../../src/assess/statistics/median.ts';
import { studentQuantile } from '../../src/assess/statistics/student.ts';
import { theilSenSlope } from '../../src/assess/statistics/theil-sen.ts';

const RUNS = { numRuns: 1000, seed: 20 };

/** Irregular days, ascending, with gaps of up to two years; readings rounded so that many are tied. */
const series = fc
  .array(
    fc.record({
      gap: fc.oneof(fc.integer({ min: 20, max: 130 }), fc.integer({ min: 300, max: 730 })),
      value: fc.integer({ min: 5, max: 40 }),
    }),
    { minLength: 5, maxLength: 24 },
  )
  .map((steps) => {
    let day = 0;
    return {
      days: steps.map(({ gap }) => {
        day += gap;
        return day;
      }),
      values: steps.map(({ value }) => value / 10),
    };
  });

describe('a thousand random series', () => {
  it('Theil–Sen slope', () => {
    // Of an even number of slopes the library takes the lower middle one, Hollander and Wolfe (and we) the mean of the two.
    const odd = series.filter(({ days }) => (days.length * (days.length - 1)) % 4 === 2);
    fc.assert(
      fc.property(odd, ({ days, values }) => {
        expect(theilSenSlope(days, values)).toBeCloseTo(new TheilSenRegression(days, values).slope, 12);
      }),
      RUNS,
    );
  });

  it('Mann–Kendall: S, variance, Z and the two-sided probability', () => {
    fc.assert(
      fc.property(series, ({ values }) => {
        const n = values.length;
        const found = mannKendall(values);
        const s = statistic(values);
        const variance = (n * (n - 1) * (2 * n + 5) - ties(values).reduce((sum, t) => sum + t * (t - 1) * (2 * t + 5), 0)) / 18;
        expect(found.s).toBe(s);
        expect(found.variance).toBeCloseTo(variance, 9);
        const z = s === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(variance);
        expect(found.z).toBeCloseTo(variance === 0 ? 0 : z, 12);
        const p = n < 10 ? exact(values, Math.abs(s)) : Math.min(1, 2 * (1 - normalCdf(Math.abs(z), 0, 1)));
        expect(found.twoSidedP).toBeCloseTo(p, 9);
      }),
      RUNS,
    );
  });

  it('t quantile', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 200 }), fc.double({ min: 0.501, max: 0.9995, noNaN: true }), (df, p) => {
        expect(Math.abs(studentQuantile(p, df) / quantile(p, df) - 1)).toBeLessThan(1e-8);
      }),
      RUNS,
    );
  });

  it('prediction interval', () => {
    fc.assert(
      fc.property(series, fc.integer({ min: 0, max: 9000 }), ({ days, values }, at) => {
        const line = leastSquares(days, values);
        if (line === null || standardDeviation(values) === 0) return;
        const n = days.length;
        const r: number = correlation(days, values).pcorr;
        const slope = (r * standardDeviation(values)) / standardDeviation(days);
        const sd = standardDeviation(values) * Math.sqrt(Math.max(0, 1 - r * r) * ((n - 1) / (n - 2)));
        const sumXX = standardDeviation(days) ** 2 * (n - 1);
        const half = quantile(0.9, n - 2) * sd * Math.sqrt(1 + 1 / n + (at - mean(days)) ** 2 / sumXX);
        const centre = mean(values) + slope * (at - mean(days));
        const [low, high] = predictionInterval(line, at, 0.8);
        expect(low).toBeCloseTo(centre - half, 7);
        expect(high).toBeCloseTo(centre + half, 7);
      }),
      RUNS,
    );
  });
});

function statistic(values: readonly number[]): number {
  let s = 0;
  for (const [i, a] of values.entries()) for (const b of values.slice(i + 1)) s += Math.sign(b - a);
  return s;
}

/** Sizes of the groups of equal values, largest first. */
function ties(values: readonly number[]): number[] {
  const counts = new Map<number, number>();
  for (const v of values) counts.set(v, (counts.get(v) ?? 0) + 1);
  return [...counts.values()].sort((a, b) => b - a);
}

const listed = new Map<string, Map<number, number>>();

/** Share of all arrangements whose |S| reaches the one observed. */
function exact(values: readonly number[], reached: number): number {
  const sizes = ties(values);
  const key = sizes.join(' ');
  let ways = listed.get(key);
  if (ways === undefined) {
    ways = new Map();
    list([...sizes], [], 0, ways);
    listed.set(key, ways);
  }
  const [all, extreme] = [...ways].reduce(([a, e], [s, count]) => [a + count, e + (Math.abs(s) >= reached ? count : 0)], [0, 0]);
  return extreme / all;
}

/** Takes a value of each group in turn; S grows by those taken before that are lower, less those that are higher. */
function list(left: number[], taken: number[], s: number, ways: Map<number, number>): void {
  if (left.every((count) => count === 0)) {
    ways.set(s, (ways.get(s) ?? 0) + 1);
    return;
  }
  left.forEach((count, group) => {
    if (count === 0) return;
    left[group] = count - 1;
    const gain = taken.reduce((sum, before) => sum + Math.sign(group - before), 0);
    taken.push(group);
    list(left, taken, s + gain, ways);
    taken.pop();
    left[group] = count;
  });
}
