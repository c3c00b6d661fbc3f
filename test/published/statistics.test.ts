/** Check values 20 to 25 and 32: statistics against published examples and a general-purpose library. */
import { describe, expect, it } from 'vitest';
import { leastSquares, predictionInterval } from '../../src/assess/statistics/least-squares.ts';
import { mannKendall } from '../../src/assess/statistics/mann-kendall.ts';
import { mean, standardDeviation } from '../../src/assess/statistics/median.ts';
import { studentQuantile } from '../../src/assess/statistics/student.ts';
import { theilSenSlope } from '../../src/assess/statistics/theil-sen.ts';

const oneTo = (n: number): number[] => Array.from({ length: n }, (_, i) => i + 1);

describe('Mann–Kendall', () => {
  it('check value 20: US EPA QA/G-9S (2006), p. 109, second-hand', () => {
    const { s, variance, z } = mannKendall([10, 10, 10, 5, 10, 20, 18, 17, 15, 24, 15]);
    expect(s).toBe(22);
    expect(variance).toBeCloseTo(155.3333, 4);
    expect(z).toBeCloseTo(1.6849, 4);
  });

  it('check value 21: exact one-sided probability by enumeration; the series is an EPA by-hand example, from memory', () => {
    const { s, twoSidedP } = mannKendall([5, 6, 11, 8, 10]);
    expect(s).toBe(6);
    expect(twoSidedP / 2).toBeCloseTo(0.1167, 4);
  });

  it('exact probabilities with ties equal a plain enumeration of all orders', () => {
    for (const values of [
      [1, 1, 2, 3, 3],
      [2, 2, 2, 5, 4, 4],
      [1, 2, 3, 4, 5, 5, 5],
      [3, 1, 2, 2],
    ]) {
      expect(mannKendall(values).twoSidedP).toBeCloseTo(enumerated(values), 12);
    }
  });

  it('check value 32: sulfate series of EPA 530/R-09-007 (2009), Example 17-6, US government work', () => {
    const years = [
      89.6, 89.8, 90.1, 90.3, 90.6, 90.8, 91.1, 91.3, 91.6, 91.8, 92.1, 92.6, 93.1, 93.6, 94.1, 94.6, 95.1, 95.6, 95.8, 96.1, 96.3, 96.6,
      96.8,
    ];
    const ppm = [480, 450, 490, 520, 485, 510, 510, 530, 510, 560, 560, 540, 590, 550, 600, 700, 570, 610, 650, 620, 830, 720, 590];
    const { s, z } = mannKendall(ppm);
    expect(s).toBe(194);
    expect(z).toBeCloseTo(5.1073, 4);
    expect(theilSenSlope(years, ppm)).toBeCloseTo(26.6667, 4);
  });
});

/** Two-sided probability of |S| by listing every order of the values. */
function enumerated(values: readonly number[]): number {
  const observed = Math.abs(mannKendall(values).s);
  let all = 0;
  let extreme = 0;
  const visit = (rest: readonly number[], taken: readonly number[]): void => {
    if (rest.length === 0) {
      all += 1;
      let s = 0;
      taken.forEach((a, i) => {
        for (const b of taken.slice(i + 1)) s += Math.sign(b - a);
      });
      if (Math.abs(s) >= observed) extreme += 1;
    }
    rest.forEach((v, i) => {
      visit([...rest.slice(0, i), ...rest.slice(i + 1)], [...taken, v]);
    });
  };
  visit(values, []);
  return Math.min(1, extreme / all);
}

describe('Theil–Sen', () => {
  it('check value 22: Hollander, Wolfe & Chicken, Nonparametric Statistical Methods, 3rd ed., Example 9.1 data', () => {
    expect(theilSenSlope(oneTo(5), [1.26, 1.27, 1.12, 1.16, 1.03])).toBeCloseTo(-0.05625, 12);
  });

  it('check value 23: after Helsel & Hirsch, Statistical Methods in Water Resources, from memory', () => {
    const y = [1, 2, 3, 4, 5, 16, 7];
    expect(theilSenSlope(oneTo(7), y)).toBeCloseTo(1, 12);
    expect(leastSquares(oneTo(7), y)?.slope).toBeCloseTo(1.7143, 4);
  });
});

it('check value 24: NIST StRD NumAcc1', () => {
  const values = [10000001, 10000003, 10000002];
  expect(mean(values)).toBeCloseTo(10000002, 9);
  expect(standardDeviation(values)).toBeCloseTo(1, 9);
});

describe('check value 25: least squares, prediction interval and t quantile against @stdlib/stats', () => {
  const series = [
    { x: [1, 2, 3, 4, 5, 6], y: [2.1, 2.0, 2.4, 2.3, 2.9, 3.1] },
    { x: [0, 90, 181, 270, 365], y: [0.7, 0.9, 0.8, 1.4, 1.2] },
    { x: [3, 1, 4, 1.5, 9, 2.6, 5], y: [35, 8, 97, 93, 23, 84, 62] },
  ];

  it('t quantiles', async () => {
    const { default: quantile } = await import('@stdlib/stats/base/dists/t/quantile');
    for (const df of [1, 2, 3, 4, 5, 9, 10, 30, 101]) {
      for (const p of [0.6, 0.9, 0.95, 0.975, 0.995]) {
        const expected = quantile(p, df);
        expect(Math.abs(studentQuantile(p, df) / expected - 1)).toBeLessThan(1e-9);
      }
    }
  });

  it('slope by correlation and deviations, interval by the formula with the library’s own pieces', async () => {
    const { default: quantile } = await import('@stdlib/stats/base/dists/t/quantile');
    const { default: correlation } = await import('@stdlib/stats/pcorrtest');
    for (const { x, y } of series) {
      const line = leastSquares(x, y);
      if (line === null) throw new Error('no line');
      const r: number = correlation(x, y).pcorr;
      const slope = (r * standardDeviation(y)) / standardDeviation(x);
      expect(line.slope / slope).toBeCloseTo(1, 9);
      const n = x.length;
      const s = standardDeviation(y) * Math.sqrt((1 - r * r) * ((n - 1) / (n - 2)));
      const sumXX = standardDeviation(x) * standardDeviation(x) * (n - 1);
      const x0 = 7.5;
      const half = quantile(0.9, n - 2) * s * Math.sqrt(1 + 1 / n + ((x0 - mean(x)) * (x0 - mean(x))) / sumXX);
      const centre = mean(y) + slope * (x0 - mean(x));
      const [low, high] = predictionInterval(line, x0, 0.8);
      expect(low).toBeCloseTo(centre - half, 9);
      expect(high).toBeCloseTo(centre + half, 9);
    }
  });
});
