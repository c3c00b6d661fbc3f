/** The manager's page: what to do first, what is new, worse, verified, overdue, not measured. In: the record. Out: one page's view. */
import { URGENCIES, type Urgency } from '../plant/types.ts';
import type { Condition, RecordMachine } from '../record/types.ts';
import { type ActionView, actionView, overrideText, rankedViews } from './actions.ts';
import type { ConditionView, Format } from './format.ts';

/** Machines in one zone, and in the class by ratio beside it; now and at the survey before. */
export interface CountView {
  readonly condition: ConditionView;
  readonly label: string;
  readonly now: string;
  readonly before: string;
  readonly hasClass: boolean;
  readonly classed: ConditionView;
  readonly classNow: string;
  readonly classBefore: string;
}

export interface ActionGroup {
  readonly title: string;
  readonly actions: readonly ActionView[];
  readonly isEmpty: boolean;
  readonly more: string;
}

export interface ManagerView {
  readonly plant: string;
  readonly survey: string;
  readonly headline: string;
  readonly groups: readonly ActionGroup[];
  readonly counts: readonly CountView[];
  readonly coverage: string;
  readonly lines: readonly { readonly title: string; readonly text: string }[];
}

const ORDER: readonly Condition[] = ['D', 'r-D', 'C', 'r-C', 'B', 'r-B', 'A', 'r-A', 'not assessed'];
const BAD = (condition: Condition | null): number =>
  condition === null || condition === 'not assessed' ? ORDER.length : ORDER.indexOf(condition);

const MOST_NAMES = 6;

const place = (urgency: Urgency | null): number => (urgency === null ? URGENCIES.length : URGENCIES.indexOf(urgency));

/** Longest lists on the page: what does not fit stands in the ranked list. */
const MOST = { A4: { week: 6, month: 4, stop: 2 }, Letter: { week: 5, month: 3, stop: 1 } } as const;

export function managerView(format: Format): ManagerView {
  const { record } = format;
  const views = rankedViews(format);
  const week = views.filter((v) => v.level === 'now' || v.level === 'within a week');
  const month = views.filter((v) => v.level === 'within a month');
  const stop = views.filter((v) => v.level === 'next planned stop');
  const most = MOST[record.plant.paper];
  const overrides = record.machines.filter((m) => m.override !== null && place(m.override.urgency) > place(m.computed_urgency));
  return {
    plant: record.plant.plant,
    survey: record.survey.id,
    headline: headline(format, week.length, month.length, stop.length),
    groups: [
      group(format, 'this_week', week, most.week),
      group(format, 'this_month', month, most.month),
      group(format, 'next_stop', stop, most.stop),
    ],
    counts: countViews(format),
    coverage: coverageText(format),
    lines: changedLines(format, overrides),
  };
}

function headline(format: Format, week: number, month: number, stop: number): string {
  if (week + month + stop === 0) return format.say('view.nothing');
  return format.say(week > 0 ? 'view.headline' : 'view.headline.none', { week, month, stop });
}

function group(format: Format, title: 'this_week' | 'this_month' | 'next_stop', actions: readonly ActionView[], most: number): ActionGroup {
  const left = actions.length - most;
  return {
    title: format.say(`view.${title}`),
    actions: actions.slice(0, most),
    isEmpty: actions.length === 0,
    more: left > 0 ? format.say('view.more', { n: left }) : '',
  };
}

function countViews(format: Format): CountView[] {
  const { plant_over_time: lines, surveys } = format.record;
  const now = lines[lines.length - 1];
  const before = lines
    .slice(0, -1)
    .filter((_, i) => surveys[i]?.kind !== 're-measurement')
    .pop();
  const count = (line: typeof now, condition: Condition): string => (line === undefined ? '–' : String(line.conditions[condition]));
  return (['D', 'C', 'B', 'A', 'not assessed'] as const).map((zone) => {
    const ratio = zone === 'not assessed' ? zone : (`r-${zone}` as const);
    const hasClass = ratio !== zone;
    return {
      condition: format.condition(zone),
      label: format.say(`view.zone.${zone}`),
      now: count(now, zone),
      before: count(before, zone),
      hasClass,
      classed: format.condition(ratio),
      classNow: hasClass ? count(now, ratio) : '',
      classBefore: hasClass ? count(before, ratio) : '',
    };
  });
}

function coverageText(format: Format): string {
  const { coverage } = format.record;
  const due = coverage.filter((c) => c.in_scope && c.due);
  const whole = due.filter((c) => c.status === 'measured').length;
  const partly = due.filter((c) => c.status === 'partly measured').length;
  const missed = due.filter((c) => c.status === 'not measured').length;
  const excused = due.filter((c) => c.status === 'excused').length;
  const parts = [
    ['partly', partly],
    ['excused', excused],
    ['missed', missed],
  ] as const;
  const rest = parts.map(([key, n]) => (n > 0 ? format.say(`view.coverage.${key}`, { n }) : '')).join('');
  return format.say('view.coverage', { whole, due: due.length, rest });
}

const names = (format: Format, list: readonly string[]): string =>
  list.length > MOST_NAMES
    ? format.say('view.and_more', { names: list.slice(0, MOST_NAMES).join(', '), n: list.length - MOST_NAMES })
    : list.join(', ');

function changedLines(format: Format, overrides: readonly RecordMachine[]): { title: string; text: string }[] {
  const { record } = format;
  const worse = record.machines.filter(
    (m) => m.previous_condition !== null && BAD(m.condition) < BAD(m.previous_condition) && m.measured_of[0] > 0,
  );
  const fresh = record.actions.filter((a) => a.rank > 0 && a.urgency !== 'watch' && a.times_reported === 1).map((a) => a.machine);
  const verified = record.actions.filter((a) => a.verification?.result === 'verified').map((a) => a.machine);
  const failed = record.actions.filter((a) => a.verification?.result === 'not verified').map((a) => a.machine);
  const overdue = record.actions
    .filter((a) => a.overdue_days !== null)
    .map((a) => format.say('view.days', { machine: a.machine, days: a.overdue_days }));
  const missed = record.coverage
    .filter((c) => c.status === 'not measured')
    .map((c) => (c.misses_in_a_row > 1 ? format.say('view.in_a_row', { machine: c.machine, times: c.misses_in_a_row }) : c.machine));
  const limits = record.machines.filter((m) => m.rule === 'M3').map((m) => m.machine);
  const step = (m: RecordMachine): string =>
    format.say('view.step', {
      machine: m.machine,
      from: format.term(m.previous_condition ?? 'not assessed'),
      to: format.term(m.condition),
    });
  const lines = [
    ['new', names(format, [...new Set(fresh)])],
    ['worse', names(format, worse.map(step))],
    ['verified', names(format, verified)],
    ['failed', names(format, failed)],
    ['overdue', names(format, overdue)],
    ['missed', names(format, missed)],
    ['limits', names(format, limits)],
    ['lower', overrides.map((m) => `${m.machine}: ${overrideText(format, m)}`).join(' ')],
  ] as const;
  return lines.filter(([, text]) => text !== '').map(([key, text]) => ({ title: format.say(`view.line.${key}`), text }));
}

/** Settled actions, after the ranked ones. */
export const settledViews = (format: Format): ActionView[] =>
  format.record.actions.filter((a) => a.rank === 0).map((a) => actionView(format, a));
