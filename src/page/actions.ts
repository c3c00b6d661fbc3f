import type { RecordAction } from '../record/types.ts';
import { slugOf } from './file-name.ts';
import type { ConditionView, Format } from './format.ts';

export interface ActionView {
  readonly rank: string;
  readonly id: string;
  readonly anchor: string;
  readonly machine: string;
  readonly name: string;
  readonly machinePage: string;
  readonly machineAnchor: string;
  readonly condition: ConditionView;
  /** Code of the urgency, empty where there is none. */
  readonly level: string;
  readonly urgency: string;
  readonly urgencyFull: string;
  readonly isNow: boolean;
  readonly isRejected: boolean;
  readonly due: string;
  readonly overdue: string;
  readonly work: string;
  readonly reason: string;
  readonly rule: string;
  readonly checkFirst: string;
  readonly above: string;
  readonly owner: string;
  readonly workOrder: string;
  readonly status: string;
  readonly origin: string;
  readonly raised: string;
  readonly carried: string;
  readonly override: string;
  readonly verification: string;
  readonly observation: string;
  readonly cause: string;
  readonly consequence: string;
  readonly practical: string;
  readonly points: string;
}

export function actionView(format: Format, action: RecordAction): ActionView {
  const machine = format.record.machines.find((m) => m.machine === action.machine);
  return {
    rank: action.rank === 0 ? '–' : String(action.rank),
    id: action.action,
    anchor: `action-${slugOf(action.action)}`,
    machine: action.machine,
    name: machine?.name ?? '',
    machinePage: `machines/${slugOf(action.machine)}.html`,
    machineAnchor: `machine-${slugOf(action.machine)}`,
    condition: machine === undefined ? format.condition(null) : format.machineCondition(machine),
    level: action.urgency ?? '',
    urgency: format.urgency(action.urgency),
    urgencyFull: format.urgencyFull(action.urgency),
    isNow: action.urgency === 'now',
    isRejected: action.status === 'rejected',
    due: format.date(action.due),
    overdue: action.overdue_days === null ? '' : format.say('view.overdue', { days: action.overdue_days }),
    work: action.recommendation ?? '',
    reason: action.reason,
    rule: action.rule ?? '',
    checkFirst: action.check_first ?? '',
    above: action.above_next_because ?? '',
    owner: action.owner ?? '',
    workOrder: action.work_order ?? '',
    status: format.term(action.status),
    origin: format.say(`view.origin.${action.origin}`),
    raised: format.date(action.raised),
    carried: carriedText(format, action),
    override: overrideText(format, action),
    verification: verificationText(format, action),
    observation: action.observation ?? '',
    cause: causeText(format, action),
    consequence: action.consequence ?? '',
    practical: practicalText(format, action),
    points: action.points.join(', '),
  };
}

function carriedText(format: Format, action: RecordAction): string {
  if (action.carried_from === null) return action.times_reported > 1 ? format.say('view.reported', { times: action.times_reported }) : '';
  const confirmed =
    action.confirmed === null
      ? format.say('view.carried.unconfirmed')
      : format.say('view.carried.confirmed', { date: format.date(action.confirmed) });
  const stale =
    action.confirmed === null && action.times_reported >= 3 ? format.say('view.carried.stale', { times: action.times_reported }) : '';
  return format.say('view.carried', { from: action.carried_from, confirmed, stale });
}

export function overrideText(
  format: Format,
  action: { readonly override: RecordAction['override']; readonly computed_urgency: RecordAction['computed_urgency'] },
): string {
  const o = action.override;
  if (o === null) return '';
  const until =
    o.until === null ? format.say('view.override.no_expiry') : format.say('view.override.until', { date: format.date(o.until) });
  const reason = `${o.reason}${/[.!?]$/.test(o.reason) ? '' : '.'}`;
  return format.say('view.override', {
    urgency: format.urgency(o.urgency),
    by: o.by,
    until,
    reason,
    computed: format.urgency(action.computed_urgency),
  });
}

function verificationText(format: Format, action: RecordAction): string {
  const v = action.verification;
  if (v === null) return '';
  const result = format.say(`view.result.${v.result}`);
  const target =
    v.target === null
      ? `${result}:`
      : format.say('view.verify.target', {
          result,
          point: v.target.point,
          quantity: v.target.quantity,
          value: v.target.value,
          unit: v.target.unit,
        });
  const before = v.before === null ? '' : format.say('view.verify.before', { value: v.before.value, date: format.date(v.before.date) });
  const after = v.after === null ? '' : format.say('view.verify.after', { value: v.after.value, date: format.date(v.after.date) });
  return `${target}${before}${after}.`;
}

function causeText(format: Format, action: RecordAction): string {
  if (action.likely_cause === null) return '';
  const cause = action.likely_cause;
  const told =
    action.confidence === null
      ? format.say('view.cause', { cause })
      : format.say('view.cause.sure', { cause, confidence: format.term(action.confidence) });
  return action.less_likely === null ? told : `${told} ${format.say('view.cause.less', { less: action.less_likely })}`;
}

function practicalText(format: Format, action: RecordAction): string {
  const parts: string[] = [];
  if (action.needs_stop !== null) parts.push(format.say(action.needs_stop ? 'view.needs_stop' : 'view.needs_no_stop'));
  if (action.downtime_h !== null) parts.push(`${format.number(action.downtime_h)} h`);
  if (action.parts !== null) parts.push(format.say('view.parts', { parts: action.parts }));
  return parts.join('; ');
}

/** Ranked ones in order. */
export const rankedViews = (format: Format): ActionView[] =>
  format.record.actions.filter((a) => a.rank > 0).map((a) => actionView(format, a));
