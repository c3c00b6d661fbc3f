/** Purification, evaporation, crystallisation and slicing of Marrow Fen: the story of each machine in its comment. All invented. */
import { a, about, bearing, motor, pair, part, pump, v, withSeries } from './parts.ts';
import { type DemoMachine, type DemoSeries, LAST, type Row } from './types.ts';

const JUICE = [...pair('motor', 1, 1.3, 1.2), ...bearing('pump', 3, 1.8, true), a('motor', '2H', 1.8), a('pump', '3H', 2.4)];
const juicePump = (letter: string, ...own: readonly DemoSeries[]): DemoMachine => ({
  machine: `JP-1${letter}`,
  columns: about(`Juice pump ${letter}`, 'Purification', 'R2', 'essential', { spare_group: 'JP-1' }),
  components: [motor(75, 250, 1480), pump(75, 1480, 'II')],
  series: withSeries(JUICE, ...own),
});

/** Sisters at 2.2 to 2.7 mm/s, number 4 at 5.6. Kind other: no published zone, so only their likeness tells. */
const centrifugal = (n: number): DemoMachine => {
  const level = n === 4 ? 5.6 : 2.1 + n * 0.1;
  const spin = { taken: () => ({ state: 'spin', speed_rpm: 1200 }) };
  return {
    machine: `CF-${n}`,
    columns: about(`Batch centrifugal ${n}`, 'Crystallisation', 'R2', 'general', {
      family: 'CF',
      kind: 'other',
      power_kw: 160,
      speed_rpm: 1200,
      drive: 'variable',
      support: 'flexible',
      bearings: 'rolling',
    }),
    series: [v('', '1H', level, spin), v('', '1V', Math.round(level * 70) / 100, spin)],
  };
};

/** A steady level over ten surveys. */
const CAMPAIGNS = [1, 1.03, 0.98, 1.02, 0.99, 1.04, 1.01, 0.97, 1.02, 1];

export const PROCESS: readonly DemoMachine[] = [
  // In C, steady, with B a proven spare: the next planned stop does.
  juicePump('A', v('pump', '3H', [5.9, 6.1, 6.0, 5.8, 6.1, 5.9, 6.0, 5.9, 6.1, 6.0]), v('pump', '3V', 4.1)),
  juicePump('B'),
  // Jumped into D between two surveys: told before leaving site.
  juicePump(
    'C',
    v('pump', '3H', [1.8, 1.8, 1.9, 1.8, 1.9, 1.9, 1.8, 1.9, 2.1, 9.1]),
    v('pump', '3V', [1.4, 1.5, 1.4, 1.5, 1.4, 1.4, 1.5, 1.4, 1.6, 5.9]),
    v('pump', '3A', [0.8, 0.8, 0.7, 0.8, 0.7, 0.8, 0.8, 0.8, 0.9, 3.4]),
  ),
  {
    // Its pump rose into C, and every point of the train rose by much the same ratio.
    machine: 'PW-02',
    columns: about('Press water pump', 'Pulp house', 'R3', 'essential'),
    components: [motor(37, 200, 1475), pump(37, 1475, 'II')],
    series: withSeries(
      [...pair('motor', 1, 1.2, 1.3), ...pair('pump', 3, 4.2, 3.1)],
      v('pump', '3H', [4.1, 4.2, 4.0, 4.2, 4.3, 4.1, 4.2, 4.1, 4.2, 4.2]),
    ),
  },
  {
    // In C for years, then far down with nothing done to it: the level is held until it is read again.
    machine: 'CP-03',
    columns: about('Condensate pump', 'Evaporation', 'R2', 'essential'),
    components: [motor(30, 200, 1470), pump(30, 1470, 'II')],
    series: withSeries(
      [...pair('motor', 1, 1.2, 1.3), ...bearing('pump', 3, 3.0)],
      v('pump', '3H', [5.5, 5.6, 5.7, 5.6, 5.5, 5.7, 5.6, 5.8, 5.7, 1.9]),
    ),
  },
  {
    // Critical and in C; behind scaffolding this time, so its last level is held.
    machine: 'EV-02',
    columns: about('Evaporator vapour fan', 'Evaporation', 'R2', 'critical'),
    components: [motor(90, 250, 1480)],
    series: pair('motor', 1, 1.2, 3.2).map((s) => ({
      ...s,
      values: CAMPAIGNS.map((share, i) => (i === LAST ? 'no access' : Math.round((s.level ?? 1) * share * 100) / 100)),
    })),
  },
  {
    // General service, in D and steady: within a month, with words from the analyst.
    machine: 'SN-03',
    columns: about('Sand pump', 'Slicing', 'R3', 'general'),
    components: [motor(18.5, 180, 1465), pump(18.5, 1465, 'II')],
    series: withSeries(
      [...pair('motor', 1, 1.2, 1.3), ...bearing('pump', 3, 5.0)],
      v('pump', '3H', [8.8, 9.0, 8.9, 9.1, 8.9, 9.0, 9.1, 8.9, 9.0, 9.0]),
    ),
  },
  {
    // No published zone for a lobe blower: the maker's limits, 9 and 14; at 7.5.
    machine: 'KB-01',
    columns: about('Carbonation gas blower', 'Purification', 'R2', 'essential'),
    components: [motor(160, 280, 1485), part('blower', 'lobe blower', 160, 1485, { limit_set: 'blower' })],
    series: [
      ...pair('motor', 1, 1.2, 1.3),
      v('blower', '3H', [7.4, 7.6, 7.3, 7.5, 7.6, 7.4, 7.7, 7.4, 7.6, 7.5]),
      v('blower', '3V', 5.9),
      v('blower', '4H', 7.1),
      v('blower', '4V', 5.6),
      v('blower', '4A', 3.0),
    ],
  },
  {
    // Taken with a 10 Hz filter this time: the band cannot see 590 r/min, so it is not assessed.
    machine: 'VP-01',
    columns: about('Vacuum pump', 'Evaporation', 'R2', 'essential'),
    components: [part('pump', 'vacuum pump', 200, 590, { limit_set: 'vacuum' })],
    series: [
      ['1H', 2.2],
      ['1V', 1.7],
      ['2H', 2.4],
      ['2V', 1.9],
    ].map(([p, level]) =>
      v('pump', String(p), Number(level), { columns: { low_hz: 2 }, taken: (s): Row => (s === 9 ? { low_hz: 10, high_hz: 1000 } : {}) }),
    ),
  },
  {
    // No published zone and no own limits: told by the ratio to its baseline alone, r-B.
    machine: 'AC-01',
    columns: about('Instrument air compressor', 'Utilities', 'R3', 'essential'),
    components: [part('compressor', 'screw compressor', 132, 2975, { support: 'flexible' })],
    series: [
      v('compressor', '1H', [2.0, 2.05, 2.0, 2.1, 2.1, 2.2, 2.3, 3.4, 3.5, 3.6]),
      v('compressor', '1V', 1.7),
      v('compressor', '2H', 2.3),
      v('compressor', '2V', 1.9),
      a('compressor', '1H', 1.3, 'g'),
      a('compressor', '2H', 1.2, 'g'),
    ],
  },
  ...[1, 2, 3, 4, 5, 6].map(centrifugal),
  {
    // The slow shaft at 3 r/min is seen by displacement and acceleration; true peak over r.m.s. has gone from 3.5 to 6.5: impacting.
    machine: 'GP-01',
    columns: about('Pulp press', 'Pulp house', 'R3', 'essential'),
    components: [
      motor(250, 315, 1485),
      {
        component: 'gearbox',
        kind: 'gearbox',
        power_kw: 250,
        speed_ratio: 0.00202,
        drive: 'fixed',
        support: 'rigid',
        gear_rating: 8,
        bearings: 'rolling',
      },
    ],
    series: [
      ...withSeries(pair('motor', 1, 1.9, 2.0), v('motor', '2H', [2.0, 2.0, 1.9, 2.0, 2.1, 2.0, 1.9, 2.0, 2.0, 1.95])),
      a('gearbox', '3H', [5.2, 5.1, 5.3, 5.2, 5.0, 5.3, 5.2, 5.1, 5.3, 5.2]),
      a('gearbox', '3H', [18.2, 17.9, 18.6, 18.1, 17.6, 18.5, 18.3, 18.0, 19.2, 34.0], 'm/s²', 'true peak'),
      { ...v('gearbox', '5H', 38, { columns: { low_hz: 0.1, high_hz: 100 } }), quantity: 'displacement', unit: 'µm' },
      { ...v('gearbox', '5V', 31, { columns: { low_hz: 0.1, high_hz: 100 } }), quantity: 'displacement', unit: 'µm' },
      a('gearbox', '5H', 1.9),
    ],
  },
  {
    // Axial level trebled since the coupling was changed, radial unmoved: consistent with misalignment.
    machine: 'CR-01',
    columns: about('Circulation pump Café-Ø', 'Evaporation', 'R2', 'essential'),
    components: [motor(55, 225, 1480), pump(55, 1480, 'II')],
    series: [
      ...bearing('motor', 1, 1.2),
      v('pump', '2A', [1.1, 1.1, 1.2, 1.1, 1.2, 1.1, 1.1, 2.2, 2.9, 3.6]),
      v('pump', '2H', [2.4, 2.3, 2.4, 2.5, 2.4, 2.3, 2.4, 2.4, 2.5, 2.4]),
      v('pump', '2V', 1.9),
      ...bearing('pump', 3, 1.7),
    ],
  },
  {
    // The works rejected the recommendation; the reading is still in D. General service, so that D on a plateau asks for a week.
    machine: 'SB-02',
    columns: about('Beet slicer', 'Slicing', 'R3', 'general'),
    components: [motor(110, 280, 990)],
    series: withSeries(
      pair('motor', 1, 4.0, 1.2),
      v('motor', '1H', [2.1, 2.2, 2.1, 2.3, 2.6, 3.4, 4.1, 4.8, 5.0, 5.1]),
      v('motor', '1V', [1.2, 1.2, 1.2, 1.2, 1.3, 1.4, 1.6, 1.8, 1.9, 1.9]),
    ),
  },
  {
    // Vertical overtook horizontal two surveys ago and stays: a step into C, consistent with lost vertical stiffness.
    machine: 'DR-01',
    columns: about('Pulp dryer drum drive', 'Pulp house', 'R3', 'essential'),
    components: [motor(132, 280, 1485)],
    series: withSeries(
      pair('motor', 1, 1.2, 2.2),
      v('motor', '2H', [2.2, 2.1, 2.2, 2.3, 2.2, 2.1, 2.2, 2.2, 2.3, 2.2]),
      v('motor', '2V', [2.0, 2.0, 1.9, 2.0, 2.1, 2.0, 1.9, 2.0, 3.3, 3.3]),
    ),
  },
  {
    // Jumped within B; horizontal four times the vertical.
    machine: 'MA-01',
    columns: about('Massecuite pump', 'Crystallisation', 'R2', 'essential'),
    components: [motor(30, 200, 975), part('pump', 'displacement pump', 30, 140)],
    series: withSeries(
      pair('motor', 1, 0.9, 0.8),
      v('motor', '1H', [0.9, 0.95, 0.9, 0.92, 0.9, 0.95, 0.9, 0.93, 1.0, 2.5]),
      v('motor', '1V', [0.58, 0.6, 0.57, 0.6, 0.59, 0.58, 0.6, 0.59, 0.6, 0.6]),
      { ...v('pump', '3H', 26, { columns: { low_hz: 1, high_hz: 100 } }), quantity: 'displacement', unit: 'µm' },
    ),
  },
];
