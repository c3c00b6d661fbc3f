/**
 * What later records say of earlier readings. In: records in order. Out: restated values with both places, points that vanished, and readings taken
 * past the end of a calibration or a qualification. Never: a judgement on which value is right.
 */
import { unitFactor } from '../measure/units.ts';
import type { PastDue, Restated, Vanished } from '../record/comparison.ts';
import type { RecordMeasurement, SwayfolioRecord } from '../record/types.ts';
import { dateOf, type Ids, type Named, pairs, placeOf } from './compared.ts';

interface Told {
  readonly value: number | null;
  readonly typed: string | null;
  readonly unit: string;
  readonly record: string;
  readonly file: string | null;
  readonly line: number | null;
}

/** Each past reading against what the record before it that spoke of it had: a value that changed once is told once. */
export function restatedOf(records: readonly Named[], ids: Ids): Restated[] {
  const known = new Map<string, Told>();
  return records.flatMap(({ name, record }) => {
    const index = new Map(record.surveys.map((line, i) => [line.id, i]));
    const seen = new Set<string>();
    const found: Restated[] = [];
    for (const m of record.measurements) {
      const series = ids.series(m);
      for (const [survey, i] of index) {
        const key = `${series} ${survey}`;
        const now = toldAt(m, record, i, name);
        const was = known.get(key);
        seen.add(key);
        if (was !== undefined && !isSame(was, now))
          found.push(restatement(m, survey, was, now, placeOf(name, record, null), record.surveys[i]));
        if (was !== undefined || now.value !== null || now.typed !== null) known.set(key, now);
      }
    }
    const current = new Set(record.measurements.map((m) => ids.series(m)));
    for (const [key, was] of known) {
      // A survey that is gone from a series that still stands; series that went are told as vanished.
      const at = key.indexOf('] ') + 2;
      const survey = key.slice(at);
      if (seen.has(key) || !current.has(key.slice(0, at - 1)) || survey > record.survey.id || (was.value === null && was.typed === null))
        continue;
      const m = record.measurements.find((each) => ids.series(each) === key.slice(0, at - 1));
      if (m !== undefined)
        found.push(
          restatement(
            m,
            survey,
            was,
            { ...was, value: null, typed: null, record: name, file: null, line: null },
            placeOf(name, record, null),
            undefined,
          ),
        );
      known.delete(key);
    }
    return found;
  });
}

function toldAt(m: RecordMeasurement, record: SwayfolioRecord, i: number, name: string): Told {
  const line = m.history.line[i] ?? null;
  return {
    value: m.history.value[i] ?? null,
    typed: m.history.typed?.[i] ?? null,
    unit: m.unit,
    record: name,
    line,
    file: line === null ? null : (m.history.file?.[i] ?? record.surveys[i]?.file ?? null),
  };
}

function isSame(a: Told, b: Told): boolean {
  if (a.value === null || b.value === null) return a.value === b.value && (a.typed === b.typed || a.unit !== b.unit);
  if (a.unit === b.unit) return a.value === b.value;
  const factor = unitFactor(a.unit, b.unit);
  return factor !== null && Math.abs(a.value * factor - b.value) <= 1e-9 * Math.abs(b.value);
}

const shown = ({ value, typed, unit }: Told): string | null => (value === null ? typed : `${value} ${unit}`);

function restatement(
  m: RecordMeasurement,
  survey: string,
  was: Told,
  now: Told,
  place: ReturnType<typeof placeOf>,
  line: SwayfolioRecord['surveys'][number] | undefined,
): Restated {
  const people = line?.people.map((p) => p.name).join(', ') ?? '';
  const instruments = line?.instruments.map((i) => i.id).join(', ') ?? '';
  return {
    machine: m.machine,
    point: m.point,
    quantity: m.quantity,
    detection: m.detection,
    survey,
    unit: m.unit,
    before: shown(was),
    after: shown(now),
    before_record: was.record,
    before_file: was.file,
    before_line: was.line,
    ...place,
    file: now.file,
    line: now.line,
    date: line?.date ?? survey,
    instrument: instruments === '' ? null : instruments,
    person: people === '' ? null : people,
  };
}

export function vanishedOf(records: readonly Named[], ids: Ids): Vanished[] {
  return pairs(records).flatMap(([before, now]) => {
    const there = ids.bySeries(now.record);
    return before.record.measurements
      .filter((m) => !there.has(ids.series(m)))
      .map((m) => ({
        machine: m.machine,
        point: m.point,
        quantity: m.quantity,
        detection: m.detection,
        last_record: before.name,
        since: dateOf(now.record),
        record: now.name,
      }));
  });
}

/** A line for each instrument and each person whose paper had ended when readings were taken. */
export function pastDueOf(records: readonly Named[]): PastDue[] {
  return records.flatMap(({ name, record }) => {
    const { instruments, people } = record.survey;
    const measured = record.measurements
      .filter((m) => m.status === 'measured' && m.source !== null)
      .map((m) => ({ m, at: placeOf(name, record, m) }));
    const line = (
      kind: PastDue['kind'],
      of: string,
      ended: string | null,
      isTheirs: (at: ReturnType<typeof placeOf>) => boolean,
    ): PastDue[] => {
      const late = ended === null ? [] : measured.filter(({ at }) => isTheirs(at) && (at.date ?? '') > ended);
      const first = late[0];
      return first === undefined || ended === null
        ? []
        : [{ kind, of, ended, survey: record.survey.id, readings: late.length, ...first.at }];
    };
    return [
      ...instruments.flatMap((i) => line('calibration', i.id, i.calibration_due, (at) => at.instrument === i.id)),
      ...people.flatMap((p) => line('qualification', p.name, p.expires, (at) => (at.person ?? '').split(', ').includes(p.name))),
    ];
  });
}
