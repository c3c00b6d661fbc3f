/**
 * Student's t. The distribution for whole degrees of freedom is the finite series of Abramowitz & Stegun 26.7.3 and
 * 26.7.4; the quantile is found from it by Newton's method on a bracketed root.
 */

/** Probability that |t| ≤ `t` for `df` degrees of freedom (a whole number from 1). */
function central(t: number, df: number): number {
  const theta = Math.atan(t / Math.sqrt(df));
  const cosine = Math.cos(theta);
  const square = cosine * cosine;
  let term = df % 2 === 1 ? cosine : 1;
  let sum = df === 1 ? 0 : term;
  for (let k = df % 2 === 1 ? 3 : 2; k <= df - 2; k += 2) {
    term *= (square * (k - 1)) / k;
    sum += term;
  }
  return df % 2 === 1 ? (2 / Math.PI) * (theta + Math.sin(theta) * sum) : Math.sin(theta) * sum;
}

/** Natural logarithm of Γ(k/2) for a whole k ≥ 1, exact by recurrence from Γ(1/2) and Γ(1). */
function logGammaHalf(k: number): number {
  let sum = k % 2 === 1 ? Math.log(Math.PI) / 2 : 0;
  for (let j = k % 2 === 1 ? 1 : 2; j < k; j += 2) sum += Math.log(j / 2);
  return sum;
}

function density(t: number, df: number): number {
  const log = logGammaHalf(df + 1) - logGammaHalf(df) - Math.log(df * Math.PI) / 2 - ((df + 1) / 2) * Math.log1p((t * t) / df);
  return Math.exp(log);
}

/** The t below which a share `p` (0.5 ≤ p < 1) of the distribution lies. */
export function studentQuantile(p: number, df: number): number {
  const target = 2 * p - 1;
  let low = 0;
  let high = 1;
  while (central(high, df) < target) high *= 2;
  let t = (low + high) / 2;
  for (let round = 0; round < 200; round += 1) {
    const error = central(t, df) - target;
    if (error > 0) high = t;
    else low = t;
    const newton = t - error / (2 * density(t, df));
    const next = newton > low && newton < high ? newton : (low + high) / 2;
    if (Math.abs(next - t) <= 1e-15 * next) return next;
    t = next;
  }
  return t;
}
