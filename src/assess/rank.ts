/**
 * The ranking: stable, with its reason. In: draft actions. Out: RecordActions in order, each saying why it stands above
 * the next. Inside a level: overdue, closeness to C/D in bands of 10 %, absolute before ratio, travel, criticality, id.
 */
import { shownFacts } from '../measure/display.ts';
import { type Day, dayText } from '../plant/day.ts';
import { CRITICALITIES } from '../plant/types.ts';
import type { RecordAction, Travel } from '../record/types.ts';
import { naturalOrder } from '../words/natural.ts';
import { say } from '../words/say.ts';
import type { DraftAction } from './actions.ts';
import { alarmTrip } from './alarm.ts';
import { closenessOf } from './closeness.ts';
import { dateOrNull } from './cut.ts';
import { dueOf } from './due.ts';
import { reasonOf, unitWords } from './reason.ts';
import { type Context, dayAt, doubtedHigh, type Look } from './track.ts';
import { weight } from './urgency-table.ts';
import { targetOf } from './verification.ts';

const TRAVELS: readonly Travel[] = ['fast', 'rising', 'step', 'steady', 'falling', 'held'];

/** What the order is made from; larger stands first, except in `name`. */
interface RankKey {
  readonly urgency: number;
  readonly overdue: number;
  readonly band: number;
  readonly absolute: number;
  readonly travel: number;
  readonly criticality: number;
}

const CRITERIA = ['urgency', 'overdue', 'band', 'absolute', 'travel', 'criticality'] as const;

export function rankedActions(context: Context, drafts: readonly DraftAction[]): RecordAction[] {
  const keyed = drafts.map((draft) => ({ draft, key: rankKey(context, draft), settled: isSettled(draft) }));
  keyed.sort((a, b) => Number(a.settled) - Number(b.settled) || compareKeys(a.key, b.key) || byName(a.draft, b.draft));
  const live = keyed.filter((k) => !k.settled).length;
  return keyed.map((item, i) => {
    const next = i + 1 < live ? keyed[i + 1] : undefined;
    const above = next === undefined || item.settled ? null : aboveBecause(context, item.key, next.key, next.draft);
    return actionLine(context, item.draft, item.settled ? 0 : i + 1, above);
  });
}

/** Settled actions (verified, or done and not yet measured without a level) stand at the end with rank 0. */
const isSettled = (draft: DraftAction): boolean => draft.status === 'done' && draft.computed.urgency === null;

const byName = (a: DraftAction, b: DraftAction): number =>
  naturalOrder(a.assessed.machine.id, b.assessed.machine.id) || naturalOrder(a.id, b.id);

function compareKeys(a: RankKey, b: RankKey): number {
  for (const criterion of CRITERIA) if (a[criterion] !== b[criterion]) return b[criterion] - a[criterion];
  return 0;
}

const urgencyOf = (draft: DraftAction): RecordAction['urgency'] =>
  draft.override?.urgency ?? draft.computed.urgency ?? (draft.origin === 'drafted' ? draft.assessed.urgency : null);

const statedDue = (draft: DraftAction): Day | null => draft.ledger?.due ?? draft.finding?.due ?? null;

/**
 * Day an action is due: as stated, else by its level from the reading, or from the day it was first raised where that is
 * earlier: an action carried from survey to survey does not win a new month each time. A held reading counts from today.
 */
function dueDay(context: Context, draft: DraftAction): Day | null {
  const stated = statedDue(draft);
  const urgency = urgencyOf(draft);
  if (stated !== null || urgency === null || draft.status === 'done') return stated;
  const today = dayAt(context, context.current);
  const { machine } = draft.assessed;
  const fresh = dueOf(context, machine, urgency, draft.verdict?.look?.reading.day ?? today);
  if (fresh === null || urgency === 'watch' || draft.raised >= today) return fresh;
  return Math.min(fresh, dueOf(context, machine, urgency, draft.raised) ?? fresh);
}

function overdueDays(context: Context, draft: DraftAction): number | null {
  const due = dueDay(context, draft);
  const days = due === null ? 0 : dayAt(context, context.current) - due;
  return days > 0 && (draft.status === 'open' || draft.status === 'ordered') ? days : null;
}

function rankKey(context: Context, draft: DraftAction): RankKey {
  const { verdict, assessed } = draft;
  const close = verdict === null ? { share: null, absolute: false } : closenessOf(context, verdict.track, verdict.look ?? verdict.heldFrom);
  const band = context.policy['9.rank.band'];
  return {
    urgency: weight(urgencyOf(draft)),
    overdue: overdueDays(context, draft) === null ? 0 : 1,
    band: close.share === null || !Number.isFinite(close.share) ? -1 : Math.floor(close.share / band + 1e-9),
    absolute: Number(close.absolute),
    travel: -TRAVELS.indexOf(verdict?.movement?.travel ?? 'held'),
    criticality: -CRITICALITIES.indexOf(assessed.standing.criticality),
  };
}

function aboveBecause(context: Context, key: RankKey, next: RankKey, below: DraftAction): string {
  const criterion = CRITERIA.find((c) => key[c] !== next[c]) ?? 'name';
  return say(context.plant.settings.language, `assess.rank.${criterion}`, { machine: below.assessed.machine.id });
}

function actionLine(context: Context, draft: DraftAction, rank: number, above: string | null): RecordAction {
  const { finding, ledger, assessed, verdict } = draft;
  const urgency = urgencyOf(draft);
  const told =
    verdict === null || (draft.computed.rule === 'M2' && assessed.urgencyBy === null)
      ? { reason: assessed.reason, facts: assessed.facts }
      : reasonOf(context, verdict);
  const due = dueDay(context, draft);
  return {
    rank,
    action: draft.id,
    finding: finding?.id ?? ledger?.finding ?? null,
    machine: assessed.machine.id,
    component: finding?.component ?? (verdict === null || verdict.track.component.implicit ? null : verdict.track.component.id),
    points: finding !== null && finding.points.length > 0 ? finding.points : verdict === null ? [] : [verdict.track.series.point],
    urgency,
    computed_urgency: draft.computed.urgency,
    rule: draft.computed.rule,
    reason: told.reason,
    facts: told.facts,
    above_next_because: above,
    observation: finding?.finding ?? null,
    likely_cause: finding?.likelyCause ?? null,
    less_likely: finding?.lessLikely ?? null,
    confidence: finding?.confidence ?? null,
    downtime_h: finding?.downtimeH ?? null,
    parts: finding?.parts ?? null,
    recommendation: finding?.recommendation ?? ledger?.recommendation ?? draftedWork(context, draft),
    check_first: finding?.checkFirst ?? draftedCheck(context, draft),
    needs_stop: finding?.needsStop ?? null,
    consequence: finding?.consequence ?? null,
    due: dateOrNull(due),
    owner: finding?.owner ?? ledger?.owner ?? null,
    work_order: ledger?.workOrder ?? null,
    status: draft.status,
    origin: draft.origin,
    raised: dayText(draft.raised),
    closed: dateOrNull(ledger?.closed ?? null),
    closed_by: ledger?.closedBy ?? null,
    as_found: ledger?.asFound ?? null,
    times_reported: draft.timesReported,
    overdue_days: overdueDays(context, draft),
    carried_from: draft.carriedFrom,
    confirmed: dateOrNull(finding?.confirmed ?? null),
    override: draft.override,
    verification: draft.verification ?? verificationToCome(context, draft),
    ...readingOf(context, draft),
    notes: ledger?.notes ?? null,
  };
}

function readingOf(context: Context, draft: DraftAction): Pick<RecordAction, 'value' | 'unit' | 'limit'> {
  const look = tellingLook(draft);
  if (look === null || draft.verdict === null) return { value: null, unit: null, limit: null };
  const { limits, zone } = look;
  const limit = zone === 'D' ? (limits.cd ?? limits.bc) : zone === 'C' ? limits.bc : alarmTrip(limits, look.baseline, context.policy).alarm;
  return { value: look.value, unit: unitWords(draft.verdict.track), limit };
}

/** The reading an action speaks of: the one whose level it bears, which for a held point is the last sound one. */
function tellingLook({ verdict, computed }: DraftAction): Look | null {
  if (verdict === null) return null;
  return computed.rule === 'M1' ? (verdict.heldFrom ?? verdict.look) : (verdict.look ?? verdict.heldFrom);
}

/** The target that a new action is to be held to, fixed by today's reading. */
function verificationToCome(context: Context, draft: DraftAction): RecordAction['verification'] {
  const { verdict } = draft;
  const look = tellingLook(draft);
  if (verdict === null || look === null || draft.computed.urgency === 'watch') return null;
  const value = targetOf(context, look);
  if (value === null) return null;
  const { point, quantity } = verdict.track.series;
  return {
    target: { point, quantity, value, unit: unitWords(verdict.track) },
    before: { value: look.value, date: dayText(look.reading.day) },
    after: null,
    result: 'not yet measured',
  };
}

/** In C and D the work is to find the cause and plan the repair; in A and B to re-measure and find why. */
function draftedWork(context: Context, draft: DraftAction): string {
  const { language } = context.plant.settings;
  const { rule } = draft.computed;
  const condition = draft.verdict?.condition ?? null;
  const point = draft.verdict?.track.series.point ?? '';
  const alarm =
    draft.verdict?.look == null ? null : alarmTrip(draft.verdict.look.limits, draft.verdict.look.baseline, context.policy).alarm;
  const unit = draft.verdict === null ? '' : unitWords(draft.verdict.track);
  if (rule === 'M1' && draft.verdict?.look != null) return say(language, 'assess.work.repeat', { point });
  if (rule === 'M2' || rule === 'M1') return say(language, 'assess.work.measure', {});
  if (rule === 'M3') return say(language, 'assess.work.limits', {});
  if (draft.computed.urgency === 'watch')
    return alarm === null
      ? say(language, 'assess.work.watch', { point })
      : say(language, 'assess.work.watch.alarm', shownFacts(context.plant.settings.units, { point, alarm, unit }));
  if (draft.computed.urgency === 'now') return say(language, 'assess.work.now', {});
  return say(language, condition !== null && 'CD'.includes(condition.slice(-1)) ? 'assess.work.repair' : 'assess.work.find', { point });
}

function draftedCheck(context: Context, draft: DraftAction): string | null {
  const { language } = context.plant.settings;
  const look = draft.verdict?.look ?? null;
  if (look !== null && doubtedHigh(look)) return say(language, 'assess.check.doubt', {});
  if (draft.computed.rule === 'R1') return say(language, 'assess.check.mount', {});
  if (draft.computed.urgency === 'watch') return null;
  if (draft.computed.rule === 'M2') return say(language, 'assess.check.access', {});
  if (draft.verdict === null) return null;
  return say(language, look === null ? 'assess.check.access' : 'assess.check.repeat', {});
}
