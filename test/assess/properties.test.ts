/** Properties of the whole assessment: monotony of levels, order of rows, names of machines. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { URGENCIES } from '../../src/plant/types.ts';
import type { SwayfolioRecord } from '../../src/record/types.ts';
import { type Files, folder, GROUPS, type MachineInput, machineOf, measurementOf, QUARTERS, recordOf, type SeriesInput } from './folder.ts';

const weight = (urgency: string | null): number =>
  urgency === null ? 0 : URGENCIES.length - (URGENCIES as readonly string[]).indexOf(urgency);

const value = fc.integer({ min: 20, max: 900 }).map((n) => n / 100);
const history = fc.array(value, { minLength: 1, maxLength: 9 });
const group = fc.constantFrom(...(Object.keys(GROUPS) as (keyof typeof GROUPS)[]));
const criticality = fc.constantFrom('critical', 'essential', 'general');

/** Record of one machine with histories at points of its own. */
function judged(g: keyof typeof GROUPS, c: string, histories: readonly (readonly number[])[], acceleration: boolean): SwayfolioRecord {
  const series: SeriesInput[] = histories.map((values, i) => ({
    point: `P${i}`,
    values,
    ...(acceleration && i === 0 ? { quantity: 'acceleration', unit: 'm/s²' } : {}),
  }));
  return recordOf(folder([{ machine: 'M', columns: { ...GROUPS[g], criticality: c, interval_days: '91' }, series }]));
}

const isDoubtedLow = (record: SwayfolioRecord): boolean => record.measurements.some((m) => m.doubts.some((d) => d.effect === 'held'));

describe('monotone', () => {
  it('raising the last reading never lowers the level', () => {
    fc.assert(
      fc.property(group, criticality, history, fc.integer({ min: 1, max: 400 }), fc.boolean(), (g, c, values, percent, acceleration) => {
        const last = values[values.length - 1] as number;
        const raised = [...values.slice(0, -1), last * (1 + percent / 100)];
        const [low, high] = [judged(g, c, [values], acceleration), judged(g, c, [raised], acceleration)];
        if (isDoubtedLow(low) || isDoubtedLow(high)) return;
        expect(weight(machineOf(high, 'M').urgency)).toBeGreaterThanOrEqual(weight(machineOf(low, 'M').urgency));
      }),
      { numRuns: 800, seed: 7 },
    );
  });

  it('raising all last readings never lowers the level', () => {
    fc.assert(
      fc.property(
        group,
        criticality,
        fc.integer({ min: 1, max: 7 }),
        fc.array(fc.array(value, { minLength: 8, maxLength: 8 }), { minLength: 2, maxLength: 3 }),
        fc.integer({ min: 1, max: 300 }),
        (g, c, length, all, percent) => {
          const histories = all.map((values) => values.slice(0, length));
          const raised = histories.map((values) => [...values.slice(0, -1), (values[values.length - 1] as number) * (1 + percent / 100)]);
          const [low, high] = [judged(g, c, histories, false), judged(g, c, raised, false)];
          if (isDoubtedLow(low) || isDoubtedLow(high)) return;
          expect(weight(machineOf(high, 'M').urgency)).toBeGreaterThanOrEqual(weight(machineOf(low, 'M').urgency));
        },
      ),
      { numRuns: 300, seed: 11 },
    );
  });
});

describe('monotone with held points, long trends and forecasts', () => {
  const long = fc.array(value, { minLength: 8, maxLength: 8 });
  /** A rise with scatter, so that trends, plateaus and forecasts come about often. */
  const ramp = fc
    .tuple(
      fc.integer({ min: 30, max: 250 }),
      fc.integer({ min: 0, max: 30 }),
      fc.array(fc.integer({ min: -8, max: 8 }), { minLength: 9, maxLength: 9 }),
    )
    .map(([level, growth, noise]) => noise.map((e, i) => (level / 100) * (1 + growth / 100) ** i * (1 + e / 100)));

  function expectNoLower(low: SwayfolioRecord, high: SwayfolioRecord): void {
    if (isDoubtedLow(low) || isDoubtedLow(high)) return;
    expect(weight(machineOf(high, 'M').urgency)).toBeGreaterThanOrEqual(weight(machineOf(low, 'M').urgency));
  }

  /** Each point read at all surveys but the last, where some could not be reached; `factor` raises the last reading of each. */
  const withHeld = (
    g: keyof typeof GROUPS,
    c: string,
    histories: readonly (readonly number[])[],
    held: readonly boolean[],
    factor: number,
  ): Files =>
    folder([
      {
        machine: 'M',
        columns: { ...GROUPS[g], criticality: c, interval_days: '91' },
        series: histories.map((values, i) => {
          const raised = [...values.slice(0, -1), (values[values.length - 1] as number) * factor];
          return { point: `P${i}`, values: held[i] === true ? [...raised, 'no access'] : [values[0] as number, ...raised] };
        }),
      },
    ]);
  /** A held point counts as its last reading: one that was doubted low in its own time is left out, as a measured one is. */
  const wasDoubtedLow = (files: Files): boolean => isDoubtedLow(recordOf(files, QUARTERS[7]));

  it('raising the last reading of held points and of measured ones', () => {
    fc.assert(
      fc.property(
        group,
        criticality,
        fc.array(fc.tuple(fc.oneof(long, ramp), fc.boolean()), { minLength: 1, maxLength: 3 }),
        fc.integer({ min: 101, max: 400 }),
        (g, c, points, percent) => {
          const [histories, held] = [points.map(([values]) => values.slice(0, 8)), points.map(([, h]) => h)];
          const [low, high] = [1, percent / 100].map((factor) => withHeld(g, c, histories, held, factor)) as [Files, Files];
          if (wasDoubtedLow(low) || wasDoubtedLow(high)) return;
          expectNoLower(recordOf(low), recordOf(high));
        },
      ),
      { numRuns: 400, seed: 17 },
    );
  });

  it('raising the last reading of a rise', () => {
    let [trends, forecasts] = [0, 0];
    fc.assert(
      fc.property(group, criticality, ramp, fc.integer({ min: 1, max: 120 }), (g, c, values, percent) => {
        const last = values[values.length - 1] as number;
        const low = judged(g, c, [values], false);
        const m = low.measurements[0];
        trends += Number(m?.trend?.kind === 'ramp' || m?.trend?.kind === 'plateau');
        forecasts += Number(m?.forecast != null && !('none' in m.forecast));
        expectNoLower(low, judged(g, c, [[...values.slice(0, -1), last * (1 + percent / 100)]], false));
      }),
      { numRuns: 600, seed: 19 },
    );
    expect(trends).toBeGreaterThan(200);
    expect(forecasts).toBeGreaterThan(50);
  });

  it('raising every reading of a machine by one factor', () => {
    fc.assert(
      fc.property(group, criticality, fc.oneof(long, ramp), fc.integer({ min: 101, max: 300 }), (g, c, values, percent) => {
        expectNoLower(judged(g, c, [values], false), judged(g, c, [values.map((v) => (v * percent) / 100)], false));
      }),
      { numRuns: 400, seed: 23 },
    );
  });
});

/** A plant of three machines with a little of everything. */
const plant: readonly MachineInput[] = [
  {
    machine: 'FAN-2',
    columns: { ...GROUPS.G2R, criticality: 'critical', interval_days: '91' },
    series: [
      { point: '1H', values: [1.2, 1.3, 1.2, 2.4] },
      { point: '2H', values: [1, 'stopped', 1.1, 1.2] },
    ],
  },
  { machine: 'FAN-10', columns: { ...GROUPS.G1F, interval_days: '91' }, series: [{ point: '1H', values: [7.5, 7.4, 7.6, 7.5] }] },
  {
    machine: 'PUMP',
    columns: { ...GROUPS.G2F, criticality: 'general', interval_days: '91' },
    series: [
      { point: '1H', values: [2, 2.1, 2, 5.1] },
      { point: '1H', quantity: 'acceleration', unit: 'm/s²', values: [4, 4, 4, 12] },
    ],
  },
];

function shuffled(files: Files, name: string, seed: number): Files {
  const [head = '', ...rows] = (files[name] ?? '').trim().split('\n');
  const order = rows.map((row, i) => ({ row, key: ((i + 1) * 7919 * (seed + 3)) % 104729 })).sort((a, b) => a.key - b.key);
  return { ...files, [name]: `${[head, ...order.map((o) => o.row)].join('\n')}\n` };
}

/** A record without what names lines and hashes of its files. */
function verdicts(record: SwayfolioRecord): object {
  return {
    machines: record.machines,
    actions: record.actions,
    coverage: record.coverage,
    measurements: record.measurements.map((m) => ({ ...m, source: null, history: { ...m.history, line: null } })),
  };
}

describe('order and names', () => {
  it('the order of reading rows changes nothing', () => {
    const files = folder(plant);
    const first = verdicts(recordOf(files));
    for (let seed = 0; seed < 6; seed += 1) expect(verdicts(recordOf(shuffled(files, 'surveys/history.csv', seed)))).toEqual(first);
  });

  it('the order of machine rows changes nothing', () => {
    const files = folder(plant);
    expect(verdicts(recordOf(shuffled(files, 'machines.csv', 1)))).toEqual(verdicts(recordOf(files)));
  });

  it('renaming machines permutes the result', () => {
    const names: Readonly<Record<string, string>> = { 'FAN-2': 'Z', 'FAN-10': 'A', PUMP: 'K' };
    const before = recordOf(folder(plant));
    const after = recordOf(folder(plant.map((m) => ({ ...m, machine: names[m.machine] as string }))));
    for (const [old, now] of Object.entries(names)) {
      const [a, b] = [machineOf(before, old), machineOf(after, now)];
      expect({ ...b, machine: old, governed_by: a.governed_by, urgency_by: a.urgency_by }).toEqual(a);
    }
  });
});

describe('looks', () => {
  it('judges the past by the limits of its day: a dated limit row changes nothing before it', () => {
    const limits =
      'limit_set,basis,quantity,unit,detection,ab,bc,cd,applies_machine,valid_from\nown,owner,velocity,mm/s,rms,1,2,3,M,\nown,owner,velocity,mm/s,rms,4,5,6,M,2023-12-01\n';
    const files = folder([{ machine: 'M', columns: GROUPS.G2R, series: [{ point: 'P', values: [2.5, 2.5, 2.5, 2.5, 2.5] }] }], {
      'limits.csv': limits,
    });
    expect(measurementOf(recordOf(files, QUARTERS[3]), 'M', 'P').zone).toBe('C');
    expect(measurementOf(recordOf(files, QUARTERS[4]), 'M', 'P').zone).toBe('A');
    expect(recordOf(files).surveys.map((s) => s.conditions['M'])).toEqual(['C', 'C', 'C', 'C', 'A']);
  });

  it('a bound has a zone only where it settles it, and takes no part in a trend', () => {
    const at = (typed: string) =>
      measurementOf(recordOf(folder([{ machine: 'M', columns: GROUPS.G2R, series: [{ point: 'P', values: [1, 1, typed] }] }])), 'M', 'P');
    expect(at('<0.2')).toMatchObject({ value: null, bound: '<', zone: 'A' });
    expect(at('<2.0')).toMatchObject({ value: null, bound: '<', zone: null });
    expect(at('>50')).toMatchObject({ value: 50, bound: '>', zone: 'D' });
    expect(at('>2.0')).toMatchObject({ bound: '>', zone: null });
  });

  it('a calculated peak is judged with the limit times √2, a true peak is not judged at all', () => {
    const at = (detection: string, reading: number) =>
      measurementOf(
        recordOf(folder([{ machine: 'M', columns: GROUPS.G2R, series: [{ point: 'P', detection, values: [reading] }] }])),
        'M',
        'P',
      );
    expect(at('calculated peak', 2.8 * Math.SQRT2 + 0.01)).toMatchObject({ zone: 'C', limits: { by: 'sine' } });
    expect(at('calculated peak', 2.8 * Math.SQRT2 - 0.01).zone).toBe('B');
    expect(at('true peak', 9)).toMatchObject({ zone: null, ratio_class: null, limits: null });
  });

  it('a narrow band gives no A or B, but C or D stands', () => {
    const slow = { ...GROUPS.G1R, speed_rpm: '300' };
    const at = (reading: number, low: string) =>
      measurementOf(
        recordOf(folder([{ machine: 'M', columns: slow, series: [{ point: 'P', values: [reading], pointColumns: { low_hz: low } }] }])),
        'M',
        'P',
      );
    expect(at(1, '10').zone).toBeNull();
    expect(at(1, '10').no_zone_because).toContain('cannot see 300 r/min');
    expect(at(1, '2').zone).toBe('A');
    expect(at(8, '10').zone).toBe('D');
  });
});
