/** Machines of Marrow Fen Sugar Works and their stories: what each is typical of stands in its comment. All invented. */
import type { DemoMachine, DemoSeries, Row } from './types.ts';

const HOUSING = { measured_on: 'bearing housing', low_hz: 10, high_hz: 1000 };

/** Velocity, mm/s r.m.s., at a bearing. */
const v = (point: string, level: number | readonly (number | string | null)[], more: Partial<DemoSeries> & { readonly columns?: Row } = {}): DemoSeries => ({
  ...more,
  point,
  columns: { ...HOUSING, location: `bearing ${point[0]}`, direction: point.endsWith('A') ? 'axial' : point.endsWith('V') ? 'vertical' : 'horizontal', ...more.columns },
  ...(typeof level === 'number' ? { level } : { values: level }),
});

/** Acceleration, m/s² r.m.s., at a bearing. */
const a = (point: string, level: number | readonly (number | string | null)[], more: Partial<DemoSeries> = {}): DemoSeries => ({ ...v(point, level, { ...more, columns: { high_hz: 10000 } }), quantity: 'acceleration', unit: 'm/s²' });

const motor = (kw: number, shaftHeight: number, rpm: number, more: Row = {}) => ({ component: 'motor', kind: 'motor', power_kw: kw, speed_rpm: rpm, drive: 'fixed', support: 'rigid', shaft_height_mm: shaftHeight, bearings: 'rolling', ...more });
const pump = (kw: number, rpm: number, category: string, more: Row = {}) => ({ component: 'pump', kind: 'pump', power_kw: kw, speed_rpm: rpm, drive: 'fixed', support: 'rigid', bearings: 'rolling', pump_category: category, ...more });
const fan = (kw: number, rpm: number, more: Row = {}) => ({ component: 'fan', kind: 'fan', power_kw: kw, speed_rpm: rpm, drive: 'fixed', support: 'rigid', bearings: 'rolling', ...more });

const train = (component: string, points: readonly (readonly [string, number])[]): DemoSeries[] => points.map(([point, level]) => v(point, level, { component }));

export const BOILER_HOUSE: readonly DemoMachine[] = [
  {
    // The 1x vector moves while its level stands still: only the vector tells.
    machine: 'TG-01',
    columns: { name: 'Turbo-generator', area: 'Power house', route: 'R1', criticality: 'critical', interval_days: 60 },
    components: [
      { component: 'turbine', kind: 'steam turbine', power_kw: 6000, speed_rpm: 8000, drive: 'fixed', support: 'rigid', bearings: 'plain' },
      { component: 'gear', kind: 'gearbox', power_kw: 6000, speed_rpm: 8000, drive: 'fixed', support: 'rigid', bearings: 'plain', gear_rating: 8 },
      { component: 'generator', kind: 'generator', power_kw: 6000, speed_rpm: 1500, drive: 'fixed', support: 'rigid', shaft_height_mm: 630, bearings: 'plain' },
    ],
    series: [
      {
        component: 'turbine', point: 'T1X', quantity: 'displacement', unit: 'µm', detection: 'true peak-to-peak', values: [33, 32, 34, 32, 33, 32, 34, 33, 34, 33],
        columns: { measured_on: 'shaft relative', location: 'bearing 1', direction: 'radial', low_hz: 1, high_hz: 1000 },
        taken: (s) => ({ speed_rpm: 8000, phase_deg: s === 9 ? 115 : 40 + (s % 3), amplitude_1x: s === 9 ? 31 : 32, phase_ref: 'keyway', phase_convention: 'lag' }),
      },
      { component: 'turbine', point: 'T2X', quantity: 'displacement', unit: 'µm', detection: 'true peak-to-peak', level: 29, columns: { measured_on: 'shaft relative', location: 'bearing 2', direction: 'radial', low_hz: 1, high_hz: 1000 } },
      ...train('gear', [['3H', 2.9], ['4H', 3.1]]),
      ...train('generator', [['5H', 1.7], ['6H', 1.8], ['6A', 1.2]]),
    ],
  },
  {
    // Rose to D, was cleaned and balanced, and came back verified; one survey at another speed is hollow.
    machine: 'ID-01',
    columns: { name: 'Induced draught fan', area: 'Boiler house', route: 'R1', criticality: 'critical', interval_days: 60 },
    components: [motor(400, 355, 990, { drive: 'variable', speed_min: 600, speed_max: 990, serial: 'M-4471' }), fan(400, 990, { drive: 'variable', speed_min: 600, speed_max: 990, rotor: 'overhung' })],
    series: [
      ...train('motor', [['1H', 1.5], ['2H', 1.7]]).map((s) => ({ ...s, taken: (n: number): Row => ({ speed_rpm: n === 4 ? 720 : 985 }) })),
      v('3H', [2.2, 2.3, 2.2, 2.3, 1.2, 2.4, 3.0, 4.6, 7.9, 1.9], { component: 'fan', taken: (s) => ({ speed_rpm: s === 4 ? 720 : 985 }) }),
      v('3A', 1.1, { component: 'fan', taken: (s) => ({ speed_rpm: s === 4 ? 720 : 985 }) }),
    ],
  },
  {
    // A plateau since relining: a step that goes no further.
    machine: 'FD-01',
    columns: { name: 'Forced draught fan', area: 'Boiler house', route: 'R1', criticality: 'essential', interval_days: 60 },
    components: [motor(315, 315, 990), fan(315, 990)],
    series: [...train('motor', [['1H', 1.3], ['2H', 1.4]]), v('3H', [1.2, 1.25, 1.2, 1.2, 1.25, 2.9, 2.85, 2.95, 2.9, 2.9], { component: 'fan' }), v('3A', 0.9, { component: 'fan' })],
  },
  {
    // The bearing is seen first in acceleration while velocity stays flat; its spare was missed three times, so it is not proven.
    machine: 'BFP-A',
    columns: { name: 'Boiler feed pump A', area: 'Boiler house', route: 'R1', criticality: 'critical', spare_group: 'BFP', interval_days: 60 },
    components: [motor(250, 315, 2980, { serial: 'B-1182' }), pump(250, 2980, 'I')],
    series: [...train('motor', [['1H', 1.9], ['2H', 2.0]]), ...train('pump', [['3H', 2.3], ['4H', 2.4], ['4A', 1.5]]), a('4H', [4.0, 4.1, 4.0, 4.2, 4.1, 4.2, 4.6, 6.2, 9.0, 14], { component: 'pump' }), a('3H', 3.8, { component: 'pump' })],
  },
  {
    machine: 'BFP-B',
    columns: { name: 'Boiler feed pump B', area: 'Boiler house', route: 'R1', criticality: 'essential', spare_group: 'BFP', interval_days: 60 },
    components: [motor(250, 315, 2980), pump(250, 2980, 'I')],
    series: [['motor', '1H', 2.0], ['motor', '2H', 2.0], ['pump', '3H', 2.2], ['pump', '4H', 2.3]].map(([component, point, level]) =>
      v(String(point), [...[0, 1, 2, 3, 4, 5, 6].map((s) => Math.round((Number(level) + (s % 3) * 0.05) * 100) / 100), 'locked out', 'locked out', 'locked out'], { component: String(component) })),
  },
  {
    // Outside the built-in sets; stopped at nine surveys of ten.
    machine: 'DG-01',
    columns: { name: 'Emergency diesel set', area: 'Power house', route: 'R1', criticality: 'essential', interval_days: 365 },
    components: [{ component: 'engine', kind: 'reciprocating', power_kw: 800, speed_rpm: 1500, drive: 'fixed', support: 'flexible' }, { component: 'generator', kind: 'generator', power_kw: 800, speed_rpm: 1500, drive: 'fixed', support: 'flexible', shaft_height_mm: 400 }],
    series: [v('1H', ['stopped', 'stopped', 'stopped', 'stopped', 'stopped', 14.2, 'stopped', 'stopped', 'stopped', 'stopped'], { component: 'engine', columns: { limit_set: 'diesel-set' } })],
  },
  {
    // Group 1 by shaft height although below 300 kW.
    machine: 'CW-1',
    columns: { name: 'Condenser water pump motor «Нева»', area: 'Power house', route: 'R1', criticality: 'essential', interval_days: 60 },
    components: [motor(200, 315, 985)],
    series: train('motor', [['1H', 3.0], ['2H', 3.1]]),
  },
];

export const PROCESS: readonly DemoMachine[] = [
  {
    machine: 'JP-1A',
    columns: { name: 'Juice pump A', area: 'Purification', route: 'R2', criticality: 'essential', spare_group: 'JP-1', interval_days: 60 },
    components: [motor(75, 250, 1480), pump(75, 1480, 'II')],
    series: [...train('motor', [['1H', 1.4], ['2H', 1.5]]), v('3H', [5.9, 6.1, 6.0, 5.8, 6.1, 5.9, 6.0, 5.9, 6.1, 6.0], { component: 'pump' }), v('3A', 1.4, { component: 'pump' })],
  },
  {
    machine: 'JP-1B',
    columns: { name: 'Juice pump B', area: 'Purification', route: 'R2', criticality: 'essential', spare_group: 'JP-1', interval_days: 60 },
    components: [motor(75, 250, 1480), pump(75, 1480, 'II')],
    series: [...train('motor', [['1H', 1.5], ['2H', 1.5]]), ...train('pump', [['3H', 1.8], ['3A', 1.2]])],
  },
  {
    // A jump into D: act now.
    machine: 'JP-1C',
    columns: { name: 'Juice pump C', area: 'Purification', route: 'R2', criticality: 'essential', spare_group: 'JP-1', interval_days: 60 },
    components: [motor(75, 250, 1480), pump(75, 1480, 'II')],
    series: [...train('motor', [['1H', 1.4], ['2H', 1.6]]), v('3H', [1.8, 1.8, 1.9, 1.8, 1.9, 1.9, 1.8, 1.9, 2.1, 9.1], { component: 'pump' }), v('3A', [1.1, 1.2, 1.1, 1.1, 1.2, 1.2, 1.1, 1.2, 1.2, 3.4], { component: 'pump' })],
  },
  {
    machine: 'KB-01',
    columns: { name: 'Carbonation gas blower', area: 'Purification', route: 'R2', criticality: 'essential', interval_days: 60 },
    components: [motor(160, 280, 1485), { component: 'blower', kind: 'lobe blower', power_kw: 160, speed_rpm: 1485, drive: 'fixed', support: 'rigid', limit_set: 'blower' }],
    series: [...train('motor', [['1H', 1.6], ['2H', 1.7]]), v('3H', 7.4, { component: 'blower' }), v('4H', 7.1, { component: 'blower' })],
  },
  {
    // Taken with a 10 Hz filter this time: the band cannot see 590 r/min.
    machine: 'VP-01',
    columns: { name: 'Vacuum pump', area: 'Evaporation', route: 'R2', criticality: 'essential', interval_days: 60 },
    components: [{ component: 'pump', kind: 'vacuum pump', power_kw: 200, speed_rpm: 590, drive: 'fixed', support: 'rigid', limit_set: 'vacuum' }],
    series: ['1H', '2H'].map((p) => v(p, p === '1H' ? 2.2 : 2.4, { component: 'pump', columns: { low_hz: 2 }, taken: (s): Row => (s === 9 ? { low_hz: 10, high_hz: 1000 } : {}) })),
  },
  {
    // No published zone: told by the ratio to its baseline alone.
    machine: 'AC-01',
    columns: { name: 'Instrument air compressor', area: 'Utilities', route: 'R3', criticality: 'essential', interval_days: 60 },
    components: [{ component: 'compressor', kind: 'screw compressor', power_kw: 132, speed_rpm: 2975, drive: 'fixed', support: 'flexible' }],
    series: [v('1H', [2.0, 2.05, 2.0, 2.1, 2.1, 2.2, 2.3, 3.4, 3.5, 3.6], { component: 'compressor' }), v('2H', 2.3, { component: 'compressor' })],
  },
  ...[1, 2, 3, 4, 5, 6].map(
    (n): DemoMachine => ({
      machine: `CF-${n}`,
      columns: { name: `Batch centrifugal ${n}`, area: 'Crystallisation', route: 'R2', criticality: 'general', interval_days: 60, family: 'CF', kind: 'other', power_kw: 160, speed_rpm: 1200, drive: 'variable', support: 'flexible', bearings: 'rolling' },
      series: [v('1H', n === 4 ? 5.6 : 2.1 + n * 0.1, { taken: () => ({ state: 'spin', speed_rpm: 1200 }) })],
    }),
  ),
  {
    // Slow shaft: seen by displacement and acceleration, not by velocity.
    machine: 'GP-01',
    columns: { name: 'Pulp press', area: 'Pulp house', route: 'R3', criticality: 'essential', interval_days: 60 },
    components: [motor(250, 315, 1485), { component: 'gearbox', kind: 'gearbox', power_kw: 250, speed_ratio: 0.00202, drive: 'fixed', support: 'rigid', gear_rating: 8, bearings: 'rolling' }],
    series: [
      ...train('motor', [['1H', 1.9], ['2H', 2.0]]),
      { component: 'gearbox', point: '5H', quantity: 'displacement', unit: 'µm', detection: 'rms', level: 38, columns: { measured_on: 'bearing housing', location: 'bearing 5', direction: 'horizontal', low_hz: 0.1, high_hz: 100 } },
      a('3H', 5.2, { component: 'gearbox' }),
    ],
  },
  {
    machine: 'CR-01',
    columns: { name: 'Circulation pump Café-Ø', area: 'Evaporation', route: 'R2', criticality: 'essential', interval_days: 60 },
    components: [motor(55, 225, 1480), pump(55, 1480, 'II')],
    series: [...train('motor', [['1H', 1.5]]), v('2A', [1.1, 1.1, 1.2, 1.1, 1.2, 1.1, 1.1, 2.9, 3.4, 3.6], { component: 'pump' }), v('2H', 2.4, { component: 'pump' })],
  },
  {
    // A recommendation that was rejected, and the reading is still in D.
    machine: 'SB-02',
    columns: { name: 'Beet slicer', area: 'Slicing', route: 'R3', criticality: 'essential', interval_days: 60 },
    components: [motor(110, 280, 990)],
    series: [v('1H', [2.1, 2.2, 2.1, 2.3, 2.6, 3.4, 4.1, 4.8, 5.0, 5.1], { component: 'motor' }), v('2H', 2.2, { component: 'motor' })],
  },
];

export const YARD: readonly DemoMachine[] = [
  {
    machine: 'CT-01',
    columns: { name: 'Cooling tower fan', area: 'Utilities', route: 'R3', criticality: 'general', interval_days: 60 },
    components: [motor(30, 200, 1470), { component: 'gear', kind: 'gearbox', power_kw: 30, speed_rpm: 1470, drive: 'fixed', gear_rating: 8, support: 'rigid' }, fan(30, 165, { support: 'flexible' })],
    series: [...train('motor', [['1H', 1.6]]), v('2H', 2.2, { component: 'gear' }), v('3H', 2.1, { component: 'fan' })],
  },
  {
    // On springs; trebled within zone A: watched, not missed.
    machine: 'RF-01',
    columns: { name: 'Roof fan', area: 'Utilities', route: 'R3', criticality: 'general', interval_days: 60 },
    components: [fan(45, 1470, { support: 'flexible', fan_category: 'BV-3' })],
    series: [v('1H', [0.7, 0.72, 0.7, 0.71, 0.7, 0.73, 0.72, 1.4, 1.9, 2.1], { component: 'fan' })],
  },
  {
    machine: 'MX-02',
    columns: { name: 'Lime agitator', area: 'Purification', route: 'R3', criticality: 'general', interval_days: 60, kind: 'mixer', power_kw: 11, speed_rpm: 1450, drive: 'fixed', support: 'rigid', limit_set: 'contract-small' },
    series: [v('1H', 1.2)],
  },
  {
    machine: 'SF-01',
    columns: { name: 'Seed fan', area: 'Crystallisation', route: 'R3', criticality: 'general', interval_days: 60, kind: 'fan', power_kw: 11, speed_rpm: 2900, drive: 'fixed', support: 'rigid', limit_set: 'contract-small' },
    series: [v('1H', 1.5), v('2H', 1.4)],
  },
  {
    // Accepted by the owner's engineer: in its own list, not on top.
    machine: 'AF-03',
    columns: { name: 'Afterbox fan', area: 'Pulp house', route: 'R3', criticality: 'general', interval_days: 60, kind: 'fan', power_kw: 55, speed_rpm: 1470, drive: 'fixed', support: 'rigid', shaft_height_mm: 225, bearings: 'rolling' },
    series: [v('1H', [5.4, 5.6, 5.8, 5.9, 6.0, 5.9, 6.1, 6.0, 6.1, 6.1])],
  },
  {
    machine: 'EL-02',
    columns: { name: 'Bag elevator', area: 'Packing', route: 'R3', criticality: 'general', interval_days: 60, in_service_from: '2026-01-02', kind: 'motor', power_kw: 22, speed_rpm: 1465, drive: 'fixed', support: 'rigid', shaft_height_mm: 180, bearings: 'rolling' },
    series: [v('1H', [null, null, null, null, null, null, null, null, null, 1.2])],
  },
  {
    machine: 'BC-05',
    columns: { name: 'Beet belt', area: 'Slicing', route: 'R3', criticality: 'general', interval_days: 60, removed_on: '2025-08-01', kind: 'motor', power_kw: 18.5, speed_rpm: 1460, drive: 'fixed', support: 'rigid', shaft_height_mm: 160, bearings: 'rolling' },
    series: [v('1H', [1.8, 1.9, 1.8, 1.9, 2.0, 2.1, 2.0, null, null, null])],
  },
];

const IN_PER_MM = 1 / 25.4;

/** The packing annex, read by its own crew in in/s calculated peak. */
const annex = (machine: string, name: string, kind: string, hp: number, points: readonly (readonly [string, number])[], more: Row = {}): DemoMachine => ({
  machine,
  columns: { name, area: 'Packing annex', route: 'PK', criticality: 'general', interval_days: 60, kind, power_kw: Math.round(hp * 0.7457 * 10) / 10, speed_rpm: 1770, drive: 'fixed', support: 'rigid', bearings: 'rolling', ...more },
  series: points.map(([point, mmsRms]) => ({
    point,
    unit: 'in/s',
    detection: 'calculated peak',
    level: Math.round(mmsRms * Math.SQRT2 * IN_PER_MM * 1000) / 1000,
    columns: { measured_on: 'bearing housing', location: `bearing ${point[0]}`, direction: point.endsWith('A') ? 'axial' : 'horizontal', low_hz: 10, high_hz: 1000 },
    taken: () => ({ instrument: 'VM-2', measured_by: 'Åsa Lindqvist' }),
  })),
});

export const ANNEX: readonly DemoMachine[] = [
  annex('PK-F1', 'Dust fan', 'fan', 90, [['1H', 2.2], ['2H', 2.3], ['2A', 1.2]]),
  annex('PK-P1', 'Hot water pump', 'pump', 40, [['1H', 2.0], ['2H', 2.1], ['2A', 1.1]], { pump_category: 'II' }),
  annex('PK-C1', 'Pallet chiller compressor', 'screw compressor', 125, [['1H', 3.9], ['2H', 3.7], ['2A', 2.0]]),
];

export const MACHINES: readonly DemoMachine[] = [...BOILER_HOUSE, ...PROCESS, ...YARD, ...ANNEX];
