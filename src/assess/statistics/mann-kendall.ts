/**
 * Mann–Kendall test for a monotone trend (Mann 1945, Kendall 1975). In: values in order of time. Out: S, its variance
 * with ties counted, Z with continuity correction, and the two-sided probability: exact by enumeration below ten values, else normal.
 */
export interface MannKendall {
  readonly s: number;
  readonly variance: number;
  readonly z: number;
  readonly twoSidedP: number;
}

const EXACT_BELOW = 10;

/** Sizes of the groups of equal values, ascending; a lone value counts 1. */
function tieSizes(values: readonly number[]): number[] {
  const sorted = Float64Array.from(values).sort();
  const sizes: number[] = [];
  for (let i = 0; i < sorted.length; i += 1) {
    if (i > 0 && sorted[i] === sorted[i - 1]) sizes[sizes.length - 1] = (sizes[sizes.length - 1] as number) + 1;
    else sizes.push(1);
  }
  return sizes.sort((a, b) => a - b);
}

/**
 * Ways to reach each S when groups of the given sizes are shuffled. Built group by group: adding m equal values to n others,
 * every interleaving contributes (pairs in order − pairs out of order) = m·n − 2·inversions, and inversions of an
 * interleaving are counted by the Gaussian binomial coefficient.
 */
function distribution(sizes: readonly number[]): Map<number, number> {
  let ways = new Map<number, number>([[0, 1]]);
  let before = 0;
  for (const size of sizes) {
    const inversions = gaussianBinomial(before + size, size);
    const next = new Map<number, number>();
    for (const [s, count] of ways) {
      inversions.forEach((times, k) => {
        const key = s + before * size - 2 * k;
        next.set(key, (next.get(key) ?? 0) + count * times);
      });
    }
    ways = next;
    before += size;
  }
  return ways;
}

/** Coefficients of the Gaussian binomial [n over m] by q-Pascal's rule. */
function gaussianBinomial(n: number, m: number): number[] {
  if (m === 0 || m === n) return [1];
  const left = gaussianBinomial(n - 1, m - 1);
  const right = gaussianBinomial(n - 1, m);
  const sum = new Array<number>(m * (n - m) + 1).fill(0);
  left.forEach((c, i) => {
    sum[i] = (sum[i] as number) + c;
  });
  right.forEach((c, i) => {
    sum[i + m] = (sum[i + m] as number) + c;
  });
  return sum;
}

/** The null distribution depends on the tie sizes alone, so each is enumerated once: upper tail by S. */
const tails = new Map<string, Map<number, number>>();

function upperTail(sizes: readonly number[], s: number): number {
  const key = sizes.join(' ');
  let tail = tails.get(key);
  if (tail === undefined) {
    const ways = distribution(sizes);
    let total = 0;
    for (const count of ways.values()) total += count;
    tail = new Map();
    let above = 0;
    for (const value of [...ways.keys()].sort((a, b) => b - a)) {
      above += ways.get(value) as number;
      tail.set(value, above / total);
    }
    tails.set(key, tail);
  }
  return tail.get(s) ?? 0;
}

/** Upper tail of the standard normal: Abramowitz & Stegun 26.2 by the continued fraction of erfc, series near zero. */
export function normalUpperTail(z: number): number {
  if (z < 0) return 1 - normalUpperTail(-z);
  const density = Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
  if (z < 3) {
    let term = z;
    let sum = z;
    for (let k = 1; Math.abs(term) > 1e-17 * Math.abs(sum); k += 1) {
      term *= (z * z) / (2 * k + 1);
      sum += term;
    }
    return 0.5 - density * sum;
  }
  let fraction = z;
  for (let k = 200; k >= 1; k -= 1) fraction = z + k / fraction;
  return density / fraction;
}

/** Throws nothing: fewer than two values give S 0 and probability 1. */
export function mannKendall(values: readonly number[]): MannKendall {
  const n = values.length;
  let s = 0;
  for (let i = 0; i < n; i += 1) {
    for (let j = i + 1; j < n; j += 1) s += Math.sign((values[j] as number) - (values[i] as number));
  }
  const sizes = tieSizes(values);
  let ties = 0;
  for (const t of sizes) ties += t * (t - 1) * (2 * t + 5);
  const variance = (n * (n - 1) * (2 * n + 5) - ties) / 18;
  const z = s === 0 || variance === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(variance);
  const oneSided = n < EXACT_BELOW ? upperTail(sizes, Math.abs(s)) : normalUpperTail(Math.abs(z));
  return { s, variance, z, twoSidedP: s === 0 ? 1 : Math.min(1, 2 * oneSided) };
}
