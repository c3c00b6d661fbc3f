/**
 * The lives of actions. In: records in order. Out: each action from raised to verified, with what is missing to it, and what was found against what was
 * said. An id is given once, so that an action is one through all records.
 */
import { parseDay } from '../plant/day.ts';
import type { ActionLife, AsFound } from '../record/comparison.ts';
import type { RecordAction } from '../record/types.ts';
import { dateOf, type Ids, type Named } from './compared.ts';

interface Report {
  readonly at: Named;
  readonly action: RecordAction;
}

/** What is only watched is no action. */
const isAction = (action: RecordAction): boolean => action.origin !== 'drafted' || (action.urgency !== null && action.urgency !== 'watch');

function reportsOf(records: readonly Named[]): Map<string, Report[]> {
  const found = new Map<string, Report[]>();
  for (const at of records)
    for (const action of at.record.actions)
      if (isAction(action)) found.set(action.action, [...(found.get(action.action) ?? []), { at, action }]);
  return found;
}

export function actionsOf(records: readonly Named[], ids: Ids): ActionLife[] {
  const lives: ActionLife[] = [];
  for (const reports of reportsOf(records).values()) lives.push(lifeOf(reports, records, lives, ids));
  return lives;
}

function lifeOf(reports: readonly Report[], records: readonly Named[], earlier: readonly ActionLife[], ids: Ids): ActionLife {
  const [first, last] = [reports[0] as Report, reports.at(-1) as Report];
  const { action } = last;
  const raised = action.raised ?? dateOf(first.at.record);
  const end = records.at(-1) as Named;
  const machine = ids.machine(action.machine);
  const ended = action.closed ?? dateOf(end.record);
  const recurs =
    [...earlier]
      .reverse()
      .find(
        (life) => ids.machine(life.machine) === machine && life.closed !== null && life.closed <= raised && sharesPoint(life, action, ids),
      ) ?? null;
  const side = (reading: { readonly value: number; readonly date: string } | null | undefined): string | null =>
    reading == null ? null : `${reading.value} ${action.verification?.target?.unit ?? action.unit ?? ''} on ${reading.date}`;
  return {
    action: action.action,
    machine: action.machine,
    points: [...action.points],
    recommendation: action.recommendation,
    raised,
    first_record: first.at.name,
    last_record: last.at.name,
    times_reported: new Set(reports.map(({ at }) => at.record.survey.id)).size,
    ordered: orderedOn(reports),
    work_order: action.work_order,
    closed: action.closed,
    closed_by: action.closed_by,
    status: action.status,
    verification: action.verification?.result ?? null,
    before: side(action.verification?.before),
    after: side(action.verification?.after),
    days_open: (parseDay(ended) ?? 0) - (parseDay(raised) ?? 0),
    flags: flagsOf(last, end, recurs),
    recurs: recurs?.action ?? null,
  };
}

const orderedOn = (reports: readonly Report[]): string | null => {
  const ordered = reports.find(({ action }) => action.status === 'ordered');
  return ordered === undefined ? null : dateOf(ordered.at.record);
};

function sharesPoint(life: ActionLife, action: RecordAction, ids: Ids): boolean {
  const points = new Set(life.points.map((point) => ids.point(life.machine, point)));
  return points.size === 0 || action.points.length === 0 || action.points.some((point) => points.has(ids.point(action.machine, point)));
}

function flagsOf({ at, action }: Report, end: Named, recurs: ActionLife | null): string[] {
  const flags: string[] = [];
  const result = action.verification?.result ?? null;
  if (action.status === 'done' && (result === null || result === 'not yet measured')) flags.push('closed without a reading after');
  if (action.status === 'done' && result === 'not verified') flags.push('closed, not verified by the reading after');
  if (action.status === 'rejected') flags.push(`rejected by ${action.closed_by ?? 'nobody named'}`);
  const isOpen = action.status === 'open' || action.status === 'ordered';
  if (isOpen && at.name === end.name) flags.push('never closed');
  if (isOpen && at.name !== end.name) flags.push(`no longer reported after ${at.name}, never closed`);
  if (recurs !== null) flags.push(`recurs: ${recurs.action} was closed on ${recurs.closed}`);
  return flags;
}

/** Each note of what was found, once, from the last record that has it. */
export function asFoundOf(records: readonly Named[]): AsFound[] {
  return [...reportsOf(records).values()].flatMap((reports) => {
    const found = [...reports].reverse().find(({ action }) => action.as_found !== null);
    if (found === undefined || found.action.as_found === null) return [];
    const said = [...reports].reverse().map(({ action }) => action);
    const { action } = found;
    return [
      {
        action: action.action,
        machine: action.machine,
        said: said.find((a) => a.observation !== null)?.observation ?? said.find((a) => a.recommendation !== null)?.recommendation ?? null,
        cause: said.find((a) => a.likely_cause !== null)?.likely_cause ?? null,
        as_found: found.action.as_found,
        closed: action.closed,
        closed_by: action.closed_by,
        record: found.at.name,
      },
    ];
  });
}
