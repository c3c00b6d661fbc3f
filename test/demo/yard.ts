/** Small machines, the yard, and the packing annex read by its own crew: the story of each in its comment. All invented. */
import { about, bearing, fan, motor, oneFrequency, part, v, withSeries } from './parts.ts';
import type { DemoMachine, DemoSeries, Row } from './types.ts';

const small = (kind: string, kw: number, rpm: number, more: Row = {}): Row => ({
  kind,
  power_kw: kw,
  speed_rpm: rpm,
  drive: 'fixed',
  support: 'rigid',
  bearings: 'rolling',
  ...more,
});

export const YARD: readonly DemoMachine[] = [
  {
    // The fan at 165 r/min needs a band from 2 Hz; its instrument starts at 10 Hz.
    machine: 'CT-01',
    columns: about('Cooling tower fan', 'Utilities', 'R3', 'general'),
    components: [
      motor(30, 200, 1470),
      part('gear', 'gearbox', 30, 1470, { gear_rating: 8 }),
      fan(30, 165, { support: 'flexible', orientation: 'vertical' }),
    ],
    series: [...bearing('motor', 1, 1.2), ...bearing('gear', 2, 2.2), ...bearing('fan', 3, 2.1)],
  },
  {
    // On springs; trebled within zone A: watched, not missed.
    machine: 'RF-01',
    columns: about('Roof fan', 'Utilities', 'R3', 'general'),
    components: [fan(45, 1470, { support: 'flexible', fan_category: 'BV-3' })],
    series: [v('fan', '1H', [0.7, 0.72, 0.7, 0.71, 0.7, 0.73, 0.72, 1.4, 1.9, 2.1]), v('fan', '1V', 1.0), v('fan', '2H', 1.2)],
  },
  {
    // Below 15 kW no part of the standard applies: contract limits.
    machine: 'MX-02',
    columns: about('Lime agitator', 'Purification', 'R3', 'general', small('mixer', 11, 1450, { limit_set: 'contract-small' })),
    series: bearing('', 1, 1.2),
  },
  {
    machine: 'SF-01',
    columns: about('Seed fan', 'Crystallisation', 'R3', 'general', small('fan', 11, 2900, { limit_set: 'contract-small' })),
    series: [...bearing('', 1, 1.4), v('', '2H', 1.3)],
  },
  {
    // In D and accepted by the owner's engineer to 6.5: in its own list, not on top. Its pair of readings tells a frequency below running speed.
    machine: 'AF-03',
    columns: about('Afterbox fan', 'Pulp house', 'R3', 'general', small('fan', 55, 1470)),
    series: withSeries(
      bearing('', 2, 1.2),
      ...oneFrequency('', '1H', [5.8, 5.9, 6.0, 5.9, 6.0, 5.9, 6.1, 6.0, 6.1, 6.1], (0.62 * 1470) / 60),
      v('', '1V', 2.4),
    ),
  },
  {
    // New: nothing to compare with yet.
    machine: 'EL-02',
    columns: about(
      'Bag elevator',
      'Warehouse',
      'R3',
      'general',
      small('motor', 22, 1465, { in_service_from: '2026-01-02', shaft_height_mm: 180 }),
    ),
    series: [
      ['1H', 1.2],
      ['2H', 1.1],
    ].map(([p, x]) => v('', String(p), [null, null, null, null, null, null, null, null, null, Number(x)])),
  },
  {
    // Removed: gone without being missed.
    machine: 'BC-05',
    columns: about('Beet belt', 'Slicing', 'R3', 'general', small('motor', 18.5, 1460, { removed_on: '2025-08-01', shaft_height_mm: 160 })),
    series: [
      ['1H', 1.8],
      ['2H', 1.6],
    ].map(([p, x]) =>
      v(
        '',
        String(p),
        [0, 0.1, 0, 0.1, 0.2, 0.2, 0.1, null, null, null].map((d) => (d === null ? null : Number(x) + d)),
      ),
    ),
  },
];

const MM_PER_IN = 25.4;
const CREW = { instrument: 'VM-2', measured_by: 'Åsa Lindqvist' };
const inches = (s: DemoSeries): DemoSeries => {
  const peak = (x: number): number => (x * Math.SQRT2) / MM_PER_IN;
  return {
    ...s,
    unit: 'in/s',
    detection: 'calculated peak',
    taken: () => CREW,
    ...(s.level === undefined ? {} : { level: peak(s.level) }),
  };
};

/** Read in in/s calculated peak (the levels here are mm/s r.m.s.) and mil peak-to-peak. */
const annex = (machine: string, name: string, columns: Row, series: readonly DemoSeries[]): DemoMachine => ({
  machine,
  columns: about(name, 'Packing annex', 'PK', 'general', columns),
  series,
});
const mils = (point: string, level: number): DemoSeries => ({
  ...v('', point, level),
  quantity: 'displacement',
  unit: 'mil',
  detection: 'calculated peak-to-peak',
  taken: () => CREW,
});
const hp = (power: number): number => Math.round(power * 7.457) / 10;

export const ANNEX: readonly DemoMachine[] = [
  annex('PK-F1', 'Dust fan', small('fan', hp(90), 1770, { support: 'flexible' }), [
    inches(v('', '1H', [0.158, 0.161, 0.157, 0.163, 0.159, 0.16, 0.162, 0.158, 0.16, 0.16])),
    inches(v('', '1V', 2.2)),
    ...bearing('', 2, 2.4, true).map(inches),
    mils('1H', 1.7),
    mils('2H', 1.5),
  ]),
  annex(
    'PK-P1',
    'Hot water pump',
    small('pump', hp(40), 1770, { pump_category: 'II' }),
    [...bearing('', 1, 2.0), ...bearing('', 2, 2.1, true)].map(inches),
  ),
  annex('PK-C1', 'Pallet chiller compressor', small('screw compressor', hp(125), 1770), [
    inches(v('', '1H', [0.308, 0.312, 0.305, 0.315, 0.31, 0.309, 0.314, 0.31, 0.31, 0.31])),
    inches(v('', '1V', 4.4)),
    ...bearing('', 2, 3.7, true).map(inches),
  ]),
];
