/**
 * Figures of the assessment by simulation, each from at least 2000 series: how often quiet machines are raised, how often what
 * is planted is found, how well a forecast's range holds. In: nothing. Out: name, share and the bounds that the rules set.
 */
import { parseDay } from '../../../src/plant/day.ts';
import { DOUBT_KINDS } from '../../../src/record/terms.ts';
import { folder, GROUPS, type MachineInput, QUARTERS, recordOf } from '../folder.ts';
import { BC, chance, SCATTER, shown } from './normals.ts';
import { doubtedClean, found } from './slips.ts';

export interface Figure {
  readonly name: string;
  readonly series: number;
  readonly share: number;
  /** The share lies between these. */
  readonly bounds: readonly [number, number];
}

const SURVEYS = 12;

/** Share of machines with an urgency when the level of the first point follows `shape` (1 = its own level), between 0.3 and 0.6 of B/C. */
function raised(seed: number, count: number, points: number, shape: (survey: number) => number): number {
  const { normal } = chance(seed);
  const machines: MachineInput[] = Array.from({ length: count }, (_, i) => ({
    machine: `M${i}`,
    columns: { ...GROUPS.G2R, criticality: 'critical', interval_days: '91' },
    series: Array.from({ length: points }, (__, p) => {
      const level = BC * (0.3 + (0.3 * ((i * 7 + p * 13) % 100)) / 100);
      return {
        point: `P${p}`,
        values: Array.from({ length: SURVEYS }, (___, s) => shown(level * (p === 0 ? shape(s) : 1) * Math.exp(SCATTER * normal()))),
      };
    }),
  }));
  const record = recordOf(folder(machines));
  return record.machines.filter((m) => m.urgency !== null).length / count;
}

const day = (date: string): number => parseDay(date) ?? Number.NaN;

/**
 * Share of forecasts whose range holds the day on which the level (without scatter) crosses B/C: rises of 15 to 75 % a year
 * (neper), crossing up to a year after the last reading.
 */
function covered(seed: number, surveys: number, count: number): { readonly held: number; readonly issued: number } {
  const { uniform, normal } = chance(seed);
  const dates = QUARTERS.slice(0, surveys);
  const last = day(dates[surveys - 1] as string);
  const crossings: number[] = [];
  const machines: MachineInput[] = Array.from({ length: count }, (_, i) => {
    const [growth, crossing] = [0.15 + 0.6 * uniform(), last + 20 + 340 * uniform()];
    crossings.push(crossing);
    const values = dates.map((date) => shown(BC * Math.exp((growth * (day(date) - crossing)) / 365.25 + SCATTER * normal())));
    return { machine: `M${i}`, columns: { ...GROUPS.G2R, interval_days: '91' }, series: [{ point: 'P', values }] };
  });
  let [held, issued] = [0, 0];
  for (const m of recordOf(folder(machines, {}, dates)).measurements) {
    if (m.forecast === null || 'none' in m.forecast || m.forecast.boundary !== 'B/C') continue;
    issued += 1;
    const crossing = crossings[Number(m.machine.slice(1))] as number;
    const latest = m.forecast.latest === null ? Number.POSITIVE_INFINITY : day(m.forecast.latest);
    if (crossing >= day(m.forecast.earliest) && crossing <= latest) held += 1;
  }
  return { held, issued };
}

function coverage(): Figure {
  const runs = [7, 8, 9, 10, 11, 12].map((surveys) => covered(40 + surveys, surveys, 800));
  const issued = runs.reduce((sum, r) => sum + r.issued, 0);
  return {
    name: 'forecasts whose 80 % range holds the crossing',
    series: issued,
    share: runs.reduce((sum, r) => sum + r.held, 0) / issued,
    bounds: [0.75, 0.85],
  };
}

export function figures(): Figure[] {
  const PAIRS = 150;
  return [
    { name: 'quiet machines with an urgency', series: 16000, share: raised(1, 2000, 8, () => 1), bounds: [0, 0.02] },
    { name: 'ramps of 60 % found', series: 4000, share: raised(2, 4000, 1, (s) => 1 + (0.6 * s) / (SURVEYS - 1)), bounds: [0.95, 1] },
    {
      name: 'steps of 60 %, three surveys old, found',
      series: 4000,
      share: raised(3, 4000, 1, (s) => (s >= SURVEYS - 3 ? 1.6 : 1)),
      bounds: [0.95, 1],
    },
    coverage(),
    ...DOUBT_KINDS.map(
      (kind, i): Figure => ({ name: `slips found: ${kind}`, series: PAIRS * 20, share: found(kind, 60 + i, PAIRS), bounds: [0.95, 1] }),
    ),
    { name: 'clean machines with any doubt', series: 10000, share: doubtedClean(90, 500), bounds: [0, 0.01] },
  ];
}

export const tableText = (rows: readonly Figure[]): string =>
  `${rows.map((f) => `${f.name.padEnd(48)}${(100 * f.share).toFixed(2).padStart(7)} %  of ${String(f.series).padStart(5)} series, bounds ${100 * f.bounds[0]} to ${100 * f.bounds[1]} %`).join('\n')}\n`;
