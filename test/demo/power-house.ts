/** Power house and boiler house of Marrow Fen: what each machine is typical of stands in its comment. All invented. */
import { a, about, bearing, fan, motor, oneFrequency, pair, part, pump, takenWith, v, withSeries } from './parts.ts';
import type { DemoMachine, DemoSeries, Told } from './types.ts';

/** Shaft-relative displacement by probes, 1× vector beside the level; phase as lag. */
const probe = (point: string, values: readonly number[], vector: (survey: number) => readonly [number, number]): DemoSeries => ({
  component: 'turbine',
  point,
  quantity: 'displacement',
  unit: 'µm',
  detection: 'true peak-to-peak',
  values,
  columns: { measured_on: 'shaft relative', location: `bearing ${point[1]}`, direction: 'radial', low_hz: 1, high_hz: 1000 },
  taken: (s) => ({ speed_rpm: 8000, amplitude_1x: vector(s)[0], phase_deg: vector(s)[1], phase_ref: 'keyway', phase_convention: 'lag' }),
});

const VARIABLE = { drive: 'variable', speed_min: 600, speed_max: 990 };
const idSpeed = (s: number) => ({ speed_rpm: s === 4 ? 720 : 985 });

/** Missed at the last three surveys: behind a locked gate. */
const lockedAfter = (level: number): readonly Told[] =>
  [0, 1, 2, 3, 4, 5, 6]
    .map((s): Told => Math.round(level * (1 + ((s * 5) % 7) * 0.015) * 100) / 100)
    .concat(['locked out', 'locked out', 'locked out']);

const BOILER_FEED = [
  ...pair('motor', 1, 1.9, 2.0),
  ...pair('pump', 3, 2.3, 2.4),
  a('motor', '1H', 2.6),
  a('motor', '2H', 2.8),
  a('pump', '3H', 3.8),
  a('pump', '4H', 4.0),
];

export const POWER_HOUSE: readonly DemoMachine[] = [
  {
    // The 1x vector moves from 32 at 40° to 31 at 115° (38 µm) while its level stands still: only the vector tells.
    machine: 'TG-01',
    columns: about('Turbo-generator', 'Power house', 'R1', 'critical'),
    components: [
      part('turbine', 'steam turbine', 6000, 8000, { bearings: 'plain' }),
      part('gear', 'gearbox', 6000, 8000, { bearings: 'plain', gear_rating: 8 }),
      part('generator', 'generator', 6000, 1500, { bearings: 'plain', shaft_height_mm: 630 }),
    ],
    series: [
      probe('T1X', [33, 32, 34, 32, 33, 32, 34, 33, 34, 33], (s) => (s === 9 ? [31, 115] : [32, 40])),
      probe('T1Y', [30, 31, 30, 29, 31, 30, 30, 31, 29, 30], (s) => [28, 131 + (s % 3)]),
      probe('T2X', [29, 28, 30, 29, 28, 30, 29, 28, 29, 29], (s) => [26, 65 + (s % 4)]),
      probe('T2Y', [28, 29, 28, 30, 29, 28, 29, 30, 28, 29], (s) => [27, 156 + (s % 3)]),
      ...bearing('gear', 3, 2.9),
      ...bearing('gear', 4, 3.1),
      ...bearing('generator', 5, 1.7),
      ...bearing('generator', 6, 1.8, true),
    ],
  },
  {
    // Rose to D, was cleaned and balanced, and came back verified; one survey at 720 r/min is hollow.
    machine: 'ID-01',
    columns: about('Induced draught fan', 'Boiler house', 'R1', 'critical'),
    components: [motor(400, 355, 990, { ...VARIABLE, serial: 'M-4471' }), fan(400, 990, { ...VARIABLE, rotor: 'overhung' })],
    series: takenWith(
      [
        ...pair('motor', 1, 1.5, 1.7),
        v('fan', '3H', [2.2, 2.3, 2.2, 2.3, 1.2, 2.4, 3.0, 4.6, 7.9, 1.9]),
        v('fan', '3V', [1.7, 1.8, 1.8, 1.7, 0.9, 1.8, 2.3, 3.5, 6.0, 1.5]),
        v('fan', '3A', [1.0, 1.0, 1.1, 1.0, 0.6, 1.0, 1.2, 1.7, 2.9, 0.9]),
        ...bearing('fan', 4, 1.4),
        a('fan', '3H', 1.6),
        a('fan', '4H', 1.5),
      ],
      idSpeed,
    ),
  },
  {
    // A plateau since the casing was relined: a step that goes no further.
    machine: 'FD-01',
    columns: about('Forced draught fan', 'Boiler house', 'R1', 'essential'),
    components: [motor(315, 315, 990), fan(315, 990)],
    series: [
      ...pair('motor', 1, 1.3, 1.4),
      v('fan', '3H', [1.2, 1.25, 1.18, 1.22, 1.25, 2.9, 2.85, 2.95, 2.9, 2.9]),
      v('fan', '3V', 1.1),
      v('fan', '3A', 0.6),
      ...bearing('fan', 4, 1.0),
      a('fan', '3H', 0.21, 'g'),
      a('fan', '4H', 0.19, 'g'),
    ],
  },
  {
    // The outboard bearing is seen first in acceleration, 4 to 14 m/s², while velocity stays flat; the motor was exchanged.
    machine: 'BFP-A',
    columns: about('Boiler feed pump A', 'Boiler house', 'R1', 'critical', { spare_group: 'BFP' }),
    components: [motor(250, 315, 2980, { serial: 'B-1207' }), pump(250, 2980, 'I')],
    series: withSeries(
      BOILER_FEED,
      v('pump', '4H', [2.4, 2.5, 2.3, 2.4, 2.5, 2.4, 2.3, 2.4, 2.5, 2.4]),
      a('pump', '4H', [4.0, 4.1, 4.0, 4.2, 4.1, 4.2, 4.6, 6.2, 9.0, 14.0]),
    ),
  },
  {
    // A's spare, missed at three surveys: not proven, so A is not relieved.
    machine: 'BFP-B',
    columns: about('Boiler feed pump B', 'Boiler house', 'R1', 'essential', { spare_group: 'BFP' }),
    components: [motor(250, 315, 2980), pump(250, 2980, 'I')],
    series: BOILER_FEED.map(({ level, ...s }) => ({ ...s, values: lockedAfter(level ?? 2) })),
  },
  {
    // Outside the built-in sets, own limits; stopped at nine surveys of ten.
    machine: 'DG-01',
    columns: about('Emergency diesel set', 'Power house', 'R1', 'essential', { interval_days: 365 }),
    components: [
      part('engine', 'reciprocating', 800, 1500, { support: 'flexible' }),
      part('generator', 'generator', 800, 1500, { support: 'flexible', shaft_height_mm: 400 }),
    ],
    series: [
      ['engine', '1H', 14.2],
      ['generator', '2H', 11.6],
    ].map(([component, point, value]) =>
      v(
        String(component),
        String(point),
        Array.from({ length: 10 }, (_, s): Told => (s === 5 ? Number(value) : 'stopped')),
        { columns: { limit_set: 'diesel-set' } },
      ),
    ),
  },
  {
    // Group 1 by its shaft height of 315 mm although below 300 kW: 3.1 is B. Displacement, velocity, acceleration tell twice the running speed.
    machine: 'CW-1',
    columns: about('Condenser water pump motor «Нева»', 'Power house', 'R1', 'essential'),
    components: [motor(200, 315, 985)],
    series: withSeries(
      pair('motor', 1, 2.8, 3.1),
      ...oneFrequency('motor', '2H', [3.0, 3.1, 3.2, 3.0, 3.1, 3.1, 3.2, 3.0, 3.2, 3.1], (2 * 985) / 60),
    ),
  },
  {
    // In C for three campaigns, steady, critical. Readings agree with one frequency at running speed; phases a quarter turn apart.
    machine: 'LK-01',
    columns: about('Lime kiln gas fan', 'Lime house', 'R3', 'critical'),
    components: [motor(160, 315, 1480), fan(160, 1480)],
    series: withSeries(
      [...pair('motor', 1, 1.6, 1.8), ...bearing('fan', 3, 3.4, true), ...bearing('fan', 4, 1.1)],
      ...oneFrequency('fan', '3H', [3.3, 3.4, 3.3, 3.5, 3.4, 3.3, 3.4, 3.5, 3.3, 3.4], 1480 / 60, {
        taken: (s) => ({ speed_rpm: 1480, amplitude_1x: 3.1, phase_deg: 29 + (s % 3), phase_ref: 'keyway', phase_convention: 'lag' }),
      }),
      v('fan', '3V', [2.6, 2.7, 2.6, 2.7, 2.6, 2.6, 2.7, 2.7, 2.6, 2.6], {
        taken: (s) => ({ speed_rpm: 1480, amplitude_1x: 2.4, phase_deg: 118 + (s % 4), phase_ref: 'keyway', phase_convention: 'lag' }),
      }),
    ),
  },
];
