/**
 * Slips planted in quiet machines, one kind a plant: how many are found. In: a seed. Out: shares of machines that bear the doubt.
 * A machine has eight points read at eight surveys; the slip lies in the last.
 */
import type { DoubtKind } from '../../../src/record/terms.ts';
import type { SwayfolioRecord } from '../../../src/record/types.ts';
import { type Files, QUARTERS, recordOf } from '../folder.ts';
import { BC, chance, SCATTER, shown } from './normals.ts';

const SURVEYS = 8;
const POINTS = 8;
const DATES = QUARTERS.slice(0, SURVEYS);
const LAST = DATES[SURVEYS - 1] as string;

interface Row {
  survey: number;
  machine: number;
  point: number;
  quantity: 'velocity' | 'acceleration';
  detection: 'rms' | 'true peak';
  value: number;
  takenAt: string;
  retake: string;
}

/** Changes the rows of the last survey of one machine; `twin` is the machine beside it. */
type Slip = (own: Row[], twin: Row[], rows: Row[]) => void;

const atPoint = (rows: readonly Row[], point: number): Row => rows.find((r) => r.point === point && r.quantity === 'velocity') as Row;
const exchange = (a: Row, b: Row): void => {
  [a.value, b.value] = [b.value, a.value];
};
const scale =
  (factor: number) =>
  (row: Row): void => {
    row.value *= factor;
  };

/** Each kind as it comes about in the field. */
export const SLIPS: Readonly<Partial<Record<DoubtKind, Slip>>> = {
  // mm/s noted where the column says in/s.
  'unit-factor': (own) => own.filter((r) => r.quantity === 'velocity').forEach(scale(25.4)),
  // r.m.s. and true peak noted in each other's row.
  impossible: (own) => {
    const [rms, peak] = own.filter((r) => r.quantity === 'acceleration') as [Row, Row];
    exchange(rms, peak);
  },
  'swapped-points': (own) => exchange(atPoint(own, 0), atPoint(own, 7)),
  'swapped-machines': (own, twin) => {
    for (const [i, row] of own.entries()) exchange(row, twin[i] as Row);
  },
  identical: (own, _, rows) =>
    own.forEach((row) => {
      row.value = (
        rows.find(
          (r) =>
            r.survey === SURVEYS - 2 &&
            r.machine === row.machine &&
            r.point === row.point &&
            r.quantity === row.quantity &&
            r.detection === row.detection,
        ) as Row
      ).value;
    }),
  'near-zero': (own) => scale(0.02)(atPoint(own, 3)),
  'all-down': (own) => own.forEach(scale(0.02)),
  'unexplained-fall': (own) => scale(0.45)(atPoint(own, 3)),
  'retake-differs': (own, _, rows) => void rows.push({ ...atPoint(own, 3), value: atPoint(own, 3).value * 1.5, retake: 'yes' }),
  date: (own) => {
    atPoint(own, 3).takenAt = DATES[0] as string;
  },
};

/** Machines in pairs: of each pair the first bears the slip, where there is one; the other stays clean. */
function plantOf(seed: number, pairs: number, slip: Slip | null, people: Files): Files {
  const { uniform, normal } = chance(seed);
  const rows: Row[] = [];
  const machines = 2 * pairs;
  for (let machine = 0; machine < machines; machine += 1) {
    // The points of a machine lie in a ladder of levels, every other machine's the other way round: no two look alike.
    const levels = Array.from({ length: POINTS }, (_, p) => BC * (0.2 + (0.4 * (machine % 2 === 0 ? p : POINTS - 1 - p)) / (POINTS - 1)));
    const g = 3 + 2 * uniform();
    for (let survey = 0; survey < SURVEYS; survey += 1) {
      const row = (point: number, quantity: Row['quantity'], detection: Row['detection'], level: number): void =>
        void rows.push({
          survey,
          machine,
          point,
          quantity,
          detection,
          value: level * Math.exp(SCATTER * normal()),
          takenAt: DATES[survey] as string,
          retake: '',
        });
      for (const [point, level] of levels.entries()) row(point, 'velocity', 'rms', level);
      row(0, 'acceleration', 'rms', g);
      row(0, 'acceleration', 'true peak', 3.5 * g);
    }
  }
  const now = (machine: number): Row[] => rows.filter((r) => r.survey === SURVEYS - 1 && r.machine === machine);
  if (slip !== null) for (let pair = 0; pair < pairs; pair += 1) slip(now(2 * pair), now(2 * pair + 1), rows);
  return { ...filesOf(rows, machines), ...people };
}

function filesOf(rows: readonly Row[], machines: number): Files {
  const unit = { velocity: 'mm/s', acceleration: 'm/s²' };
  const list = Array.from({ length: machines }, (_, m) => m);
  const points = list.flatMap((m) => [
    ...Array.from({ length: POINTS }, (_, p) => `M${m},P${p},bearing housing,velocity,mm/s,rms,10,1000`),
    `M${m},P0,bearing housing,acceleration,m/s²,rms,10,1000`,
    `M${m},P0,bearing housing,acceleration,m/s²,true peak,10,1000`,
  ]);
  return {
    'plant.yaml': 'plant: Simulated works\n',
    'machines.csv': [
      'machine,kind,power_kw,shaft_height_mm,support,speed_rpm,drive,interval_days',
      ...list.map((m) => `M${m},motor,75,225,rigid,1480,fixed,91`),
      '',
    ].join('\n'),
    'points.csv': ['machine,point,measured_on,quantity,unit,detection,low_hz,high_hz', ...points, ''].join('\n'),
    'surveys/history.csv': [
      'survey_date,machine,point,quantity,detection,value,unit,taken_at,retake,instrument,measured_by',
      ...rows.map(
        (r) =>
          `${DATES[r.survey]},M${r.machine},P${r.point},${r.quantity},${r.detection},${shown(r.value)},${unit[r.quantity]},${r.takenAt},${r.retake},${r.survey === SURVEYS - 1 ? 'VM-1,Ada' : ','}`,
      ),
      '',
    ].join('\n'),
  };
}

/** The last survey's papers: an instrument and a person whose dates end before it, or after. */
const papers = (due: string, expires: string): Files => ({
  [`surveys/${LAST}/survey.yaml`]: `people:\n  - name: Ada\n    category: ISO 18436-2 category II\n    expires: ${expires}\ninstruments:\n  - id: VM-1\n    calibration_due: ${due}\n`,
});
const IN_ORDER = papers('2030-01-01', '2030-01-01');

const bears = (record: SwayfolioRecord, machine: number, kind: DoubtKind | null): boolean =>
  record.measurements.some((m) => m.machine === `M${machine}` && m.doubts.some((d) => kind === null || d.kind === kind));

/** Share of slipped machines that bear the doubt. */
export function found(kind: DoubtKind, seed: number, pairs: number): number {
  const people =
    kind === 'calibration' ? papers('2024-01-01', '2030-01-01') : kind === 'qualification' ? papers('2030-01-01', '2024-01-01') : IN_ORDER;
  const record = recordOf(plantOf(seed, pairs, SLIPS[kind] ?? null, people));
  return Array.from({ length: pairs }, (_, pair) => bears(record, 2 * pair, kind)).filter(Boolean).length / pairs;
}

/** Share of clean machines that bear any doubt at all. */
export function doubtedClean(seed: number, pairs: number): number {
  const record = recordOf(plantOf(seed, pairs, null, IN_ORDER));
  return Array.from({ length: 2 * pairs }, (_, machine) => bears(record, machine, null)).filter(Boolean).length / (2 * pairs);
}
