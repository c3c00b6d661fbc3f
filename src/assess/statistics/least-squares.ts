import { mean } from './median.ts';
import { studentQuantile } from './student.ts';

/** Straight line by least squares; `residualSd` with n − 2 degrees of freedom. */
export interface Line {
  readonly slope: number;
  readonly intercept: number;
  readonly residualSd: number;
  readonly n: number;
  readonly meanX: number;
  readonly sumXX: number;
}

/** null for fewer than three points or when all x are equal. */
export function leastSquares(x: readonly number[], y: readonly number[]): Line | null {
  const n = x.length;
  if (n < 3) return null;
  const meanX = mean(x);
  const meanY = mean(y);
  let sumXX = 0;
  let sumXY = 0;
  for (let i = 0; i < n; i += 1) {
    const dx = (x[i] as number) - meanX;
    sumXX += dx * dx;
    sumXY += dx * ((y[i] as number) - meanY);
  }
  if (sumXX === 0) return null;
  const slope = sumXY / sumXX;
  const intercept = meanY - slope * meanX;
  let squares = 0;
  for (let i = 0; i < n; i += 1) {
    const residual = (y[i] as number) - intercept - slope * (x[i] as number);
    squares += residual * residual;
  }
  return { slope, intercept, residualSd: Math.sqrt(squares / (n - 2)), n, meanX, sumXX };
}

/** Prediction interval of one new value at `x`: ŷ ± t(1 − α/2, n − 2)·s·√(1 + 1/n + (x − x̄)²/Sxx). */
export function predictionInterval(line: Line, x: number, probability: number): readonly [number, number] {
  const centre = line.intercept + line.slope * x;
  const t = studentQuantile(1 - (1 - probability) / 2, line.n - 2);
  const half = t * line.residualSd * Math.sqrt(1 + 1 / line.n + ((x - line.meanX) * (x - line.meanX)) / line.sumXX);
  return [centre - half, centre + half];
}
