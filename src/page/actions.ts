import type { RecordAction } from '../record/types.ts';
import { slugOf } from './file-name.ts';
import { type ConditionView, type Format, urgencyShort, urgencyText } from './format.ts';

export interface ActionView {
  readonly rank: string;
  readonly id: string;
  readonly anchor: string;
  readonly machine: string;
  readonly name: string;
  readonly machinePage: string;
  readonly machineAnchor: string;
  readonly condition: ConditionView;
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

const ORIGIN: Readonly<Record<RecordAction['origin'], string>> = { analyst: 'found by the analyst', ledger: 'from the ledger', drafted: 'drafted by rule, no words of the analyst yet' };

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
    urgency: urgencyShort(action.urgency),
    urgencyFull: urgencyText(action.urgency),
    isNow: action.urgency === 'now',
    isRejected: action.status === 'rejected',
    due: format.date(action.due),
    overdue: action.overdue_days === null ? '' : `overdue by ${action.overdue_days} ${action.overdue_days === 1 ? 'day' : 'days'}`,
    work: action.recommendation ?? '',
    reason: action.reason,
    rule: action.rule ?? '',
    checkFirst: action.check_first ?? '',
    above: action.above_next_because ?? '',
    owner: action.owner ?? '',
    workOrder: action.work_order ?? '',
    status: action.status,
    origin: ORIGIN[action.origin],
    raised: format.date(action.raised),
    carried: carriedText(format, action),
    override: overrideText(format, action),
    verification: verificationText(format, action),
    observation: action.observation ?? '',
    cause: causeText(action),
    consequence: action.consequence ?? '',
    practical: practicalText(format, action),
    points: action.points.join(', '),
  };
}

function carriedText(format: Format, action: RecordAction): string {
  if (action.carried_from === null) return action.times_reported > 1 ? `reported ${action.times_reported} times` : '';
  const confirmed = action.confirmed === null ? 'not confirmed since' : `confirmed ${format.date(action.confirmed)}`;
  const stale = action.confirmed === null && action.times_reported >= 3 ? `, unchanged for ${action.times_reported} surveys` : '';
  return `carried from ${action.carried_from}, ${confirmed}${stale}`;
}

export function overrideText(format: Format, action: { readonly override: RecordAction['override']; readonly computed_urgency: RecordAction['computed_urgency'] }): string {
  const o = action.override;
  if (o === null) return '';
  const until = o.until === null ? 'no expiry given' : `until ${format.date(o.until)}`;
  return `Set to “${urgencyShort(o.urgency)}” by ${o.by} (${until}): ${o.reason}${/[.!?]$/.test(o.reason) ? '' : '.'} The rules say “${urgencyShort(action.computed_urgency)}”.`;
}

const RESULT = { verified: 'Verified', 'not verified': 'Not verified, open again', 'not yet measured': 'To verify' } as const;

function verificationText(format: Format, action: RecordAction): string {
  const v = action.verification;
  if (v === null) return '';
  const target = v.target === null ? '' : ` ${v.target.point} ${v.target.quantity} at or below ${format.number(v.target.value)} ${v.target.unit}`;
  const before = v.before === null ? '' : `; was ${format.number(v.before.value)} on ${format.date(v.before.date)}`;
  const after = v.after === null ? '' : `, now ${format.number(v.after.value)} on ${format.date(v.after.date)}`;
  return `${RESULT[v.result]}:${target}${before}${after}.`;
}

function causeText(action: RecordAction): string {
  if (action.likely_cause === null) return '';
  const less = action.less_likely === null ? '' : ` Less likely: ${action.less_likely}.`;
  const sure = action.confidence === null ? '' : ` (confidence ${action.confidence})`;
  return `Consistent with ${action.likely_cause}${sure}.${less}`;
}

function practicalText(format: Format, action: RecordAction): string {
  const parts: string[] = [];
  if (action.needs_stop !== null) parts.push(action.needs_stop ? 'needs a stop' : 'needs no stop');
  if (action.downtime_h !== null) parts.push(`${format.number(action.downtime_h)} h`);
  if (action.parts !== null) parts.push(`parts: ${action.parts}`);
  return parts.join('; ');
}

/** Ranked ones in order. */
export const rankedViews = (format: Format): ActionView[] => format.record.actions.filter((a) => a.rank > 0).map((a) => actionView(format, a));
