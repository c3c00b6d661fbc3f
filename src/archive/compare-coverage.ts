/**
 * Coverage through the years. In: records in order. Out: for each machine what was measured at each survey, the longest time without a reading, and
 * the quarters that had none. Never: a survey outside the records, unless a later record tells of it.
 */
import { parseDay } from '../plant/day.ts';
import type { ComparedCoverage } from '../record/comparison.ts';
import { naturalOrder } from '../words/natural.ts';
import { byCodeUnit, dateOf, type Ids, type Named } from './compared.ts';

export function coverageOf(records: readonly Named[], ids: Ids): ComparedCoverage[] {
  const machines = new Map<string, ComparedCoverage['surveys']>();
  for (const { name, record } of records) {
    for (const line of record.coverage) {
      const id = ids.machine(line.machine);
      const cell = {
        record: name,
        survey: record.survey.id,
        date: dateOf(record),
        status: line.status,
        measured: line.measured,
        of: line.of,
        why: line.why,
      };
      machines.set(id, [...(machines.get(id) ?? []), cell]);
    }
  }
  const last = new Map(records.flatMap(({ record }) => record.machines.map((m) => [ids.machine(m.machine), m] as const)));
  const told = toldDates(records, ids);
  return [...machines]
    .sort(([a], [b]) => naturalOrder(a, b))
    .map(([machine, surveys]) => {
      const measured = [...new Set([...surveys.filter((s) => s.measured > 0).map((s) => s.date), ...(told.get(machine) ?? [])])].sort(
        byCodeUnit,
      );
      const end = surveys.at(-1)?.date ?? '';
      const { name = null, criticality = 'essential' } = last.get(machine) ?? {};
      return {
        machine,
        name,
        criticality,
        surveys,
        ...longestGap(measured, end),
        quarters_missed: quartersMissed(measured, surveys[0]?.date ?? end, end),
      };
    });
}

/** Days of surveys that no record is of, such as a re-measurement: the last record tells what was measured then. */
function toldDates(records: readonly Named[], ids: Ids): Map<string, string[]> {
  const found = new Map<string, string[]>();
  const last = records.at(-1)?.record;
  const from = records[0] === undefined ? '' : dateOf(records[0].record);
  const own = new Set(records.map(({ record }) => record.survey.id));
  for (const line of last?.surveys ?? []) {
    if (line.date < from || own.has(line.id)) continue;
    for (const machine of Object.keys(line.conditions))
      found.set(ids.machine(machine), [...(found.get(ids.machine(machine)) ?? []), line.date]);
  }
  return found;
}

const days = (from: string, to: string): number => (parseDay(to) ?? 0) - (parseDay(from) ?? 0);

function longestGap(measured: readonly string[], end: string): { longest_days: number | null; from: string | null; to: string | null } {
  let longest: { longest_days: number | null; from: string | null; to: string | null } = { longest_days: null, from: null, to: null };
  for (const [i, from] of measured.entries()) {
    const to = measured[i + 1] ?? end;
    const length = days(from, to);
    if (length > (longest.longest_days ?? 0)) longest = { longest_days: length, from, to };
  }
  return longest;
}

const quarterOf = (date: string): number => Number(date.slice(0, 4)) * 4 + Math.floor((Number(date.slice(5, 7)) - 1) / 3);

function quartersMissed(measured: readonly string[], from: string, to: string): string[] {
  const there = new Set(measured.map(quarterOf));
  const missed: string[] = [];
  for (let quarter = quarterOf(from); quarter <= quarterOf(to); quarter += 1)
    if (!there.has(quarter)) missed.push(`${Math.floor(quarter / 4)} Q${(quarter % 4) + 1}`);
  return missed;
}
