/**
 * Records side by side. In: records under the names they are found by. Out: them in order of their surveys, and one name for each machine and
 * point through all renames. Never: a record changed.
 */
import type { RecordMeasurement, SwayfolioRecord } from '../record/types.ts';

export interface Named {
  /** The issued folder, or the path of the record. */
  readonly name: string;
  readonly record: SwayfolioRecord;
}

export const byCodeUnit = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

export const dateOf = (record: SwayfolioRecord): string =>
  record.surveys.find((line) => line.id === record.survey.id)?.date ?? record.survey.to;

/** By survey, then revision: a re-issue stands after what it replaced. */
export const inOrder = (records: readonly Named[]): Named[] =>
  [...records].sort(
    (a, b) =>
      byCodeUnit(dateOf(a.record), dateOf(b.record)) ||
      byCodeUnit(a.record.survey.id, b.record.survey.id) ||
      (a.record.issue?.revision ?? -1) - (b.record.issue?.revision ?? -1) ||
      byCodeUnit(a.name, b.name),
  );

export const pairs = (records: readonly Named[]): (readonly [Named, Named])[] =>
  records.slice(1).map((now, i) => [records[i] as Named, now]);

/** Today's ids of machines and points. */
export class Ids {
  readonly #machines = new Map<string, string>();
  readonly #points: { readonly machine: string | null; readonly old: string; readonly new: string }[] = [];

  constructor(renames: SwayfolioRecord['plant']['renames'] = []) {
    for (const rename of renames) {
      if (rename.kind === 'machine') this.#machines.set(rename.old, rename.new);
      if (rename.kind === 'point') this.#points.push(rename);
    }
  }

  machine(id: string): string {
    return last(id, (name) => this.#machines.get(name));
  }

  point(machine: string, id: string): string {
    const today = this.machine(machine);
    return last(
      id,
      (name) =>
        this.#points.find((rename) => rename.old === name && (rename.machine === null || this.machine(rename.machine) === today))?.new,
    );
  }

  series(m: RecordMeasurement): string {
    return JSON.stringify([this.machine(m.machine), this.point(m.machine, m.point), m.quantity, m.detection]);
  }

  bySeries(record: SwayfolioRecord): Map<string, RecordMeasurement> {
    return new Map(record.measurements.map((m) => [this.series(m), m]));
  }
}

/** Follows a chain of names; one that comes back to itself ends there. */
function last(id: string, next: (name: string) => string | undefined): string {
  const seen = new Set([id]);
  let name = id;
  for (let then = next(name); then !== undefined && !seen.has(then); then = next(name)) {
    seen.add(then);
    name = then;
  }
  return name;
}

/** File, line, date, instrument and person of a reading. */
export function placeOf(
  name: string,
  record: SwayfolioRecord,
  m: RecordMeasurement | null,
): { record: string; file: string | null; line: number | null; date: string | null; instrument: string | null; person: string | null } {
  const people = record.survey.people.map((person) => person.name).join(', ');
  const only = record.survey.instruments.length === 1 ? (record.survey.instruments[0]?.id ?? null) : null;
  return {
    record: name,
    file: m?.source?.file ?? null,
    line: m?.source?.line ?? null,
    date: m?.taken_at?.slice(0, 10) ?? dateOf(record),
    instrument: m?.instrument ?? only,
    person: m?.measured_by ?? (people === '' ? null : people),
  };
}

export const seriesText = (m: Pick<RecordMeasurement, 'machine' | 'point' | 'quantity' | 'detection'>): string =>
  `${m.machine} ${m.point} ${m.quantity}${m.detection === null ? '' : ` ${m.detection}`}`;
