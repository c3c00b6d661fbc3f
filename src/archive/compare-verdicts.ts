/**
 * Verdicts as issued beside those of today. In: records, the record that holds today's limits and policy. Out: each machine at each survey,
 * both conditions, and why they differ. A reading is judged again by today's limits of its series alone; history is not.
 */
import { unitFactor } from '../measure/units.ts';
import type { ComparedVerdict } from '../record/comparison.ts';
import type { Condition, RecordMachine, RecordMeasurement, SwayfolioRecord, Zone } from '../record/types.ts';
import { type Ids, type Named, placeOf } from './compared.ts';

/** True above the boundary by the rules' tolerance. */
export type Exceeds = (value: number, boundary: number) => boolean;

/** Best first. */
const BADNESS: readonly Condition[] = ['not assessed', 'A', 'B', 'C', 'D'];

export function verdictsOf(records: readonly Named[], today: SwayfolioRecord, ids: Ids, exceeds: Exceeds): ComparedVerdict[] {
  const now = ids.bySeries(today);
  return records.flatMap((named) => {
    const readings = new Map<string, RecordMeasurement[]>();
    for (const m of named.record.measurements) readings.set(m.machine, [...(readings.get(m.machine) ?? []), m]);
    return named.record.machines.map((machine) =>
      verdictOf(named, machine, readings.get(machine.machine) ?? [], (m) =>
        classToday(m, now.get(ids.series(m)), today, named.record, exceeds),
      ),
    );
  });
}

function verdictOf(
  { name, record }: Named,
  machine: RecordMachine,
  readings: readonly RecordMeasurement[],
  again: (m: RecordMeasurement) => Judged,
): ComparedVerdict {
  const judged = readings.map((m) => ({ m, issued: classOf(m), ...again(m) }));
  const different = judged.filter((j) => j.today !== j.issued);
  const governing =
    readings.find(
      (m) =>
        m.point === machine.governed_by?.point &&
        m.quantity === machine.governed_by.quantity &&
        m.detection === machine.governed_by.detection,
    ) ?? null;
  const worst = judged.map((j) => j.today).reduce(worse, 'not assessed');
  const why = different
    .map(
      ({ m, issued, today, because }) => `${m.point} ${m.quantity} ${m.value} ${m.unit}: ${issued} as issued, ${today} today: ${because}`,
    )
    .join('; ');
  return {
    machine: machine.machine,
    name: machine.name,
    criticality: machine.criticality,
    survey: record.survey.id,
    issued: machine.condition,
    today: different.length === 0 ? machine.condition : worst,
    why: why === '' ? null : why,
    point: governing?.point ?? null,
    quantity: governing?.quantity ?? null,
    value: governing?.value ?? null,
    unit: governing?.unit ?? null,
    limit_set: governing?.limit_set ?? null,
    ...placeOf(name, record, governing),
  };
}

const classOf = (m: RecordMeasurement): Condition => m.zone ?? m.ratio_class ?? m.held?.zone ?? 'not assessed';
/** D, r-D, C, r-C …: of one letter the zone is the worse. */
const badness = (condition: Condition): number =>
  condition.startsWith('r-') ? BADNESS.indexOf(condition.slice(2) as Condition) * 2 - 1 : BADNESS.indexOf(condition) * 2;
const worse = (a: Condition, b: Condition): Condition => (badness(b) > badness(a) ? b : a);

interface Judged {
  readonly today: Condition;
  readonly because: string;
}

/** A reading without number, one that no limit judges today, and one whose boundaries are the same, keep their class. */
function classToday(
  m: RecordMeasurement,
  now: RecordMeasurement | undefined,
  today: SwayfolioRecord,
  then: SwayfolioRecord,
  exceeds: Exceeds,
): Judged {
  const kept = { today: classOf(m), because: '' };
  if (m.value === null || m.bound !== null || (m.zone === null && m.ratio_class === null)) return kept;
  if (m.zone !== null) {
    const limits = now?.limits ?? null;
    const factor = now === undefined ? null : now.unit === m.unit ? 1 : unitFactor(now.unit, m.unit);
    if (now === undefined || limits === null || factor === null) return kept;
    const boundaries = [limits.ab, limits.bc, limits.cd].map((b) => (b === null ? null : b * factor));
    const before = [m.limits?.ab ?? null, m.limits?.bc ?? null, m.limits?.cd ?? null];
    if (boundaries.every((b, i) => same(b, before[i] ?? null))) return kept;
    return {
      today: zoneOf(m.value, boundaries, exceeds),
      because: `limits ${limitText(before)} (${m.limit_set ?? 'none'}) then, ${limitText(boundaries)} (${now.limit_set ?? 'none'}) today`,
    };
  }
  const [before, after] = [ratios(then), ratios(today)];
  if (before.join() === after.join() || m.baseline === null || m.unit === 'dB') return kept;
  const { value: baseline } = m.baseline;
  const letters = [before, after].map((steps) =>
    zoneOf(
      m.value ?? 0,
      steps.map((step) => step * baseline),
      exceeds,
    ),
  );
  // A value below its floor is r-A whatever its ratio; the record has no floor, so such a class stands.
  if (`r-${letters[0]}` !== m.ratio_class) return kept;
  return { today: `r-${letters[1] as Zone}`, because: `policy 2.ratio ×${before.join(', ×')} then, ×${after.join(', ×')} today` };
}

const same = (a: number | null, b: number | null): boolean =>
  a === b || (a !== null && b !== null && Math.abs(a - b) <= 1e-9 * Math.abs(a));
const limitText = (boundaries: readonly (number | null)[]): string =>
  boundaries.map((b) => (b === null ? '–' : String(Number(b.toPrecision(6))))).join('/');
const ratios = (record: SwayfolioRecord): number[] =>
  ['2.ratio.b', '2.ratio.c', '2.ratio.d'].map((id) => record.policy.find((line) => line.id === id)?.value ?? 0);

function zoneOf(value: number, [ab, bc, cd]: readonly (number | null)[], exceeds: Exceeds): Zone {
  const above = (boundary: number | null | undefined): boolean => boundary !== null && boundary !== undefined && exceeds(value, boundary);
  return above(cd) ? 'D' : above(bc) ? 'C' : above(ab) ? 'B' : 'A';
}
