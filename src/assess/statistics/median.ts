/** Median of a non-empty list (mean of the middle two for an even count); the list is left as it is. */
export function median(values: readonly number[]): number {
  const sorted = Float64Array.from(values).sort();
  const half = sorted.length >> 1;
  const upper = sorted[half] ?? Number.NaN;
  return sorted.length % 2 === 1 ? upper : ((sorted[half - 1] ?? Number.NaN) + upper) / 2;
}

/** Arithmetic mean, by a second pass over the residuals so that large offsets lose no digits. */
export function mean(values: readonly number[]): number {
  let sum = 0;
  for (const v of values) sum += v;
  const first = sum / values.length;
  let rest = 0;
  for (const v of values) rest += v - first;
  return first + rest / values.length;
}

/** Sample standard deviation (n − 1), two passes with the corrected sum of Chan, Golub and LeVeque (1983). */
export function standardDeviation(values: readonly number[]): number {
  const m = mean(values);
  let squares = 0;
  let residual = 0;
  for (const v of values) {
    squares += (v - m) * (v - m);
    residual += v - m;
  }
  return Math.sqrt((squares - (residual * residual) / values.length) / (values.length - 1));
}
