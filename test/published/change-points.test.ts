/** Change points against published data and against a plain enumeration of every segmentation. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lastStep } from '../../src/assess/statistics/change-points.ts';

/** Annual flow of the Nile at Aswan 1871 to 1970, 10⁸ m³ (Cobb 1978, and every statistics package; here from memory, held by the two means known of it). */
const NILE = [
  1120, 1160, 963, 1210, 1160, 1160, 813, 1230, 1370, 1140, 995, 935, 1110, 994, 1020, 960, 1180, 799, 958, 1140, 1100, 1210, 1150, 1250,
  1260, 1220, 1030, 1100, 774, 840, 874, 694, 940, 833, 701, 916, 692, 1020, 1050, 969, 831, 726, 456, 824, 702, 1120, 1100, 832, 764, 821,
  768, 845, 864, 862, 698, 845, 744, 796, 1040, 759, 781, 865, 845, 944, 984, 897, 822, 1010, 771, 676, 649, 846, 812, 742, 801, 1040, 860,
  874, 848, 890, 744, 749, 838, 1050, 918, 986, 797, 923, 975, 815, 1020, 906, 901, 1170, 912, 746, 919, 718, 714, 740,
];
const range = (n: number): number[] => Array.from({ length: n }, (_, i) => i);

describe('the last step', () => {
  it('of the Nile is between 1898 and 1899 (Cobb, Biometrika 65, 1978), from a mean of 1097.75 to 849.97', () => {
    expect(NILE.length).toBe(100);
    const step = lastStep(range(100), NILE, 0);
    expect(step?.at).toBe(1899 - 1871);
    expect(step?.before).toBeCloseTo(1097.75, 2);
    expect(step?.after).toBeCloseTo(849.97, 2);
  });

  it('is none on one level, on a line, and where one value alone stands out', () => {
    const wave = [0.05, -0.03, 0.02, -0.05, 0.04, -0.01, 0.03, -0.04, 0.01, -0.02, 0.05, -0.04];
    expect(lastStep(range(12), wave, 0.1)).toBeNull();
    expect(
      lastStep(
        range(12),
        wave.map((w, i) => w + 0.05 * i),
        0.1,
      ),
    ).toBeNull();
    expect(
      lastStep(
        range(12),
        wave.map((w, i) => w + (i === 6 ? 0.25 : 0)),
        0.1,
      ),
    ).toBeNull();
  });

  it('of a step and of two steps is the last one, with the levels beside it', () => {
    const step = lastStep(range(12), [0, 0.02, 0, 0.01, 1, 1.02, 1.01, 0.99, 1.8, 1.82, 1.79, 1.81], 0.1);
    expect(step?.at).toBe(8);
    expect(step?.before).toBeCloseTo(1.005, 6);
    expect(step?.after).toBeCloseTo(1.805, 6);
  });

  it('is that of the cheapest of all segmentations, listed one by one', () => {
    const value = fc.integer({ min: 0, max: 12 }).map((k) => k / 10);
    fc.assert(
      fc.property(fc.array(value, { minLength: 4, maxLength: 9 }), fc.constantFrom(0.05, 0.1, 0.3), (values, scatter) => {
        const found = lastStep(range(values.length), values, scatter);
        const sd = Math.max(scatter, robust(values));
        const all = segmentations(values.length).map((ends) => ({ ends, cost: costOf(values, ends, sd) }));
        const least = Math.min(...all.map((s) => s.cost));
        const best = all.filter((s) => s.cost < least + 1e-9);
        if (found === null) {
          expect(best.some((s) => s.ends.length === 1) || lineCost(values, sd) <= least + 1e-9).toBe(true);
        } else expect(best.map((s) => s.ends[s.ends.length - 2])).toContain(found.at);
      }),
      { numRuns: 500 },
    );
  });
});

/** Every way to cut n values into runs of two or more, as the ends of the runs. */
function segmentations(n: number): number[][] {
  const out: number[][] = n >= 2 ? [[n]] : [];
  for (let end = 2; end <= n - 2; end += 1) for (const rest of segmentations(n - end)) out.push([end, ...rest.map((e) => e + end)]);
  return out;
}

function costOf(values: readonly number[], ends: readonly number[], sd: number): number {
  let squares = 0;
  ends.forEach((end, k) => {
    const run = values.slice(ends[k - 1] ?? 0, end);
    const mean = run.reduce((a, b) => a + b, 0) / run.length;
    for (const v of run) squares += (v - mean) * (v - mean);
  });
  return squares / (sd * sd) + (ends.length - 1) * 2 * Math.log(values.length);
}

function lineCost(values: readonly number[], sd: number): number {
  const n = values.length;
  const [mx, my] = [(n - 1) / 2, values.reduce((a, b) => a + b, 0) / n];
  const slope = values.reduce((sum, v, i) => sum + (i - mx) * (v - my), 0) / values.reduce((sum, _, i) => sum + (i - mx) * (i - mx), 0);
  return values.reduce((sum, v, i) => sum + (v - my - slope * (i - mx)) ** 2, 0) / (sd * sd) + Math.log(n);
}

function robust(values: readonly number[]): number {
  const d = values
    .slice(1)
    .map((v, i) => Math.abs(v - (values[i] as number)))
    .sort((a, b) => a - b);
  const half = d.length >> 1;
  const middle = d.length % 2 === 1 ? (d[half] as number) : ((d[half - 1] as number) + (d[half] as number)) / 2;
  return (1.4826 * middle) / Math.SQRT2;
}
