/**
 * Check values 7 to 17 through the whole program: a plant folder in, the record out. All standards are quoted second-hand,
 * as the reference page says; the sources are named beside each check.
 */
import { describe, expect, it } from 'vitest';
import type { Zone } from '../../src/record/types.ts';
import { folder, GROUPS, measurementOf, recordOf, type SeriesInput } from '../assess/folder.ts';

type Columns = Readonly<Record<string, string>>;

/** Zones of values read at points of one machine. */
function zones(
  columns: Columns,
  values: readonly number[],
  pointColumns: Columns = {},
  quantity = 'velocity',
  unit = 'mm/s',
  detection = 'rms',
): (Zone | null)[] {
  const series: SeriesInput[] = values.map((value, i) => ({ point: `P${i}`, quantity, unit, detection, values: [value], pointColumns }));
  const record = recordOf(folder([{ machine: 'M', columns, series }]));
  return values.map((_, i) => measurementOf(record, 'M', `P${i}`, quantity).zone);
}

const ALL = ['A', 'B', 'C', 'D'];

describe('zones', () => {
  it('check value 7: group 2 rigid, ISO 20816-3:2022 Table A.2 = ISO 10816-3:2009 Table A.2', () => {
    expect(zones(GROUPS.G2R, [1.39, 1.41, 2.81, 4.51])).toEqual(ALL);
    expect(zones(GROUPS.G2R, [1.4, 2.8, 4.5])).toEqual(['A', 'B', 'C']);
  });

  it('check value 8: the other groups, ISO 20816-3:2022 Tables A.1 and A.2', () => {
    expect(zones(GROUPS.G1R, [2.2, 4.4, 7.0, 7.2])).toEqual(ALL);
    expect(zones(GROUPS.G1F, [3.4, 7.0, 10.9, 11.1])).toEqual(ALL);
    expect(zones(GROUPS.G2F, [2.2, 4.4, 7.0, 7.2])).toEqual(ALL);
  });

  it('check value 9: of velocity B and displacement C the worse governs, ISO 10816-3:2009, 5.2.3', () => {
    const series = [
      { point: 'P', values: [1.7] },
      { point: 'P', quantity: 'displacement', unit: 'µm', values: [60] },
    ];
    const record = recordOf(folder([{ machine: 'M', columns: GROUPS.G2R, series }]));
    expect(measurementOf(record, 'M', 'P').zone).toBe('B');
    expect(measurementOf(record, 'M', 'P', 'displacement').zone).toBe('C');
    expect(record.machines[0]?.condition).toBe('C');
    expect(record.machines[0]?.governed_by?.quantity).toBe('displacement');
  });

  it('check value 10: displacement rows are v/(2πf0), f0 12.5 Hz for group 1 and 10 Hz for group 2, within 1 µm', () => {
    for (const [group, f0] of [
      ['G1R', 12.5],
      ['G1F', 12.5],
      ['G2R', 10],
      ['G2F', 10],
    ] as const) {
      const series = [
        { point: 'P', values: [1] },
        { point: 'P', quantity: 'displacement', unit: 'µm', values: [20] },
      ];
      const record = recordOf(folder([{ machine: 'M', columns: GROUPS[group], series }]));
      const velocity = measurementOf(record, 'M', 'P').limits;
      const displacement = measurementOf(record, 'M', 'P', 'displacement').limits;
      for (const key of ['ab', 'bc', 'cd'] as const) {
        const derived = ((velocity?.[key] ?? 0) / 1000 / (2 * Math.PI * f0)) * 1e6;
        expect(Math.abs((displacement?.[key] ?? 0) - derived)).toBeLessThan(1);
      }
    }
  });

  it('check value 11: classes I and IV by name, ISO 10816-1:1995 Annex B', () => {
    expect(zones({ ...GROUPS.G2R, limit_set: 'iso10816-1-class1' }, [0.7, 1.7, 4.4, 4.6])).toEqual(ALL);
    expect(zones({ ...GROUPS.G2R, limit_set: 'iso10816-1-class4' }, [2.7, 7.0, 17.9, 18.1])).toEqual(ALL);
  });

  it('check value 12: pumps, ISO 10816-7:2009', () => {
    const pump = (power: string, category: string): Columns => ({ kind: 'pump', power_kw: power, pump_category: category });
    expect(zones(pump('200', 'I'), [2.4, 3.9, 6.5, 6.7])).toEqual(ALL);
    expect(zones(pump('201', 'II'), [4.1, 6.0, 9.4, 9.6])).toEqual(ALL);
  });

  it('check value 13: shaft relative, ISO 7919-3 formulas at 3600 and 10 000 r/min', () => {
    for (const [rpm, ab, bc, cd] of [
      ['3600', 80, 150, 220],
      ['10000', 48, 90, 132],
    ] as const) {
      const columns = { kind: 'steam turbine', power_kw: '6000', speed_rpm: rpm, support: 'rigid' };
      const series = [
        {
          point: 'X',
          quantity: 'displacement',
          unit: 'µm',
          detection: 'true peak-to-peak',
          values: [40],
          pointColumns: { measured_on: 'shaft relative' },
        },
      ];
      const limits = measurementOf(recordOf(folder([{ machine: 'M', columns, series }])), 'M', 'X', 'displacement').limits;
      expect(limits?.ab).toBeCloseTo(ab, 9);
      expect(limits?.bc).toBeCloseTo(bc, 9);
      expect(limits?.cd).toBeCloseTo(cd, 9);
    }
  });
});

describe('ALARM, TRIP and change', () => {
  const limitsWith = (group: keyof typeof GROUPS, baseline: string) => {
    const series = [{ point: 'P', values: [1], pointColumns: { baseline, baseline_from: '2022-01-01' } }];
    return measurementOf(recordOf(folder([{ machine: 'M', columns: GROUPS[group], series }])), 'M', 'P').limits;
  };

  it('check value 14: ALARM is baseline + 25 % of B/C and at most 1.25 × B/C, ISO 10816-3:2009, 5.4.1', () => {
    expect(limitsWith('G2R', '1.3')?.alarm).toBeCloseTo(2.0, 9);
    expect(limitsWith('G2R', '3.1')?.alarm).toBeCloseTo(3.5, 9);
    expect(limitsWith('G1R', '2.6')?.alarm).toBeCloseTo(3.725, 9);
  });

  it('check value 15: TRIP at most 1.25 × C/D, ISO 10816-3:2009, 5.4.2', () => {
    expect(limitsWith('G1R', '1')?.trip).toBeCloseTo(8.875, 9);
    expect(limitsWith('G1F', '1')?.trip).toBeCloseTo(13.75, 9);
  });

  it('check value 16: a change of more than 25 % of B/C is significant, ISO 10816-3:2009, 5.3 (equality: our choice)', () => {
    const significant = (from: number, to: number): boolean | null | undefined => {
      const record = recordOf(folder([{ machine: 'M', columns: GROUPS.G1R, series: [{ point: 'P', values: [from, to] }] }]));
      return measurementOf(record, 'M', 'P').change?.significant;
    };
    expect(significant(1.0, 2.13)).toBe(true);
    expect(significant(1.0, 2.12)).toBe(false);
    expect(significant(1.0, 2.125)).toBe(false);
    expect(significant(2.375, 3.5)).toBe(false);
    expect(significant(3.5, 2.3)).toBe(true);
  });

  it('check value 17: vector change, ISO 20816-1:2016 Annex D', () => {
    const files = folder([{ machine: 'M', columns: GROUPS.G1R, series: [{ point: 'P', values: [3, 2.5] }] }]);
    const rows = (files['surveys/history.csv'] ?? '').trim().split('\n');
    const phased = rows
      .map((row, i) => (i === 0 ? `${row},phase_deg,amplitude_1x,phase_ref` : `${row},${i === 1 ? 40 : 180},${i === 1 ? 3 : 2.5},key`))
      .join('\n');
    const vector = measurementOf(recordOf({ ...files, 'surveys/history.csv': `${phased}\n` }), 'M', 'P').change?.vector;
    expect(vector?.amplitude).toBeCloseTo(5.1711, 4);
    expect(vector?.lag_deg).toBeCloseTo(201.9, 2);
  });

  it('25 % of the baseline is not the rule: a small change on a smooth machine is not significant (negative check)', () => {
    const record = recordOf(folder([{ machine: 'M', columns: GROUPS.G1R, series: [{ point: 'P', values: [0.8, 1.2] }] }]));
    expect(measurementOf(record, 'M', 'P').change?.significant).toBe(false);
  });
});

it('the numbers of the reference page are in the program', async () => {
  const { publishedSets } = await import('../../src/limits/published.ts');
  const rows = publishedSets().map((s) => [s.quantity, s.ab, s.bc, s.cd].join(' '));
  const page = [
    'velocity 2.3 4.5 7.1',
    'velocity 3.5 7.1 11',
    'velocity 1.4 2.8 4.5',
    'displacement 29 57 90',
    'displacement 45 90 140',
    'displacement 22 45 71',
    'displacement 37 71 113',
    'velocity 2.5 4 6.6',
    'velocity 3.5 5 7.6',
    'velocity 3.2 5.1 8.5',
    'velocity 4.2 6.1 9.5',
    'velocity 0.71 1.8 4.5',
    'velocity 1.12 2.8 7.1',
    'velocity 1.8 4.5 11.2',
    'velocity 2.8 7.1 18',
    'velocity 3.8 7.5 11.8',
    'velocity 2.8 5.3 8.5',
    'velocity 5 8 12.5',
    'velocity 5.6 9 ',
    'velocity 9 14 ',
    'velocity 4.5 7.1 9',
    'velocity 6.3 11.8 12.5',
    'velocity 2.8 4.5 7.1',
    'velocity 4.5 7.1 11.2',
    'velocity 1.8 4 5.6',
    'velocity 2.8 5.6 7.1',
    'velocity  0.15 ',
    'velocity  0.12 ',
    'velocity  3 ',
    'velocity  3.9 ',
    'velocity  1.6 ',
    'velocity  2.2 ',
    'velocity  2.8 ',
  ];
  for (const row of page) expect(rows).toContain(row);
});
