/**
 * Verification: was the work worth it. In: a ledger action and the readings. Out: target, before, after and one of three
 * answers. Never: "verified" by a reading that does not compare, or by anything but the target fixed when it was raised.
 */
import { type Day, dayText } from '../plant/day.ts';
import type { LedgerAction, Reading } from '../plant/types.ts';
import type { RecordAction } from '../record/types.ts';
import { carriesRatio } from './baseline.ts';
import { whyNotComparable } from './comparable.ts';
import { exceeds } from './exceeds.ts';
import { conditionOf } from './level.ts';
import { unitWords } from './reason.ts';
import { type Context, dayAt, doubtedLow, isMeasured, type Look, type Track } from './track.ts';
import { badness } from './urgency-table.ts';

export type Verification = NonNullable<RecordAction['verification']>;

/** Target in the unit and detection of the series: from C or D 0.9 × B/C, inside A or B baseline + q, by ratio 1.6 × baseline. */
export function targetOf(context: Context, look: Look): number | null {
  const { policy } = context;
  const { bc, q } = look.limits;
  if (look.zone === 'C' || look.zone === 'D') return bc === null ? null : policy['8.target.zone'] * bc;
  if (look.zone !== null) return look.baseline === null || q === null ? null : look.baseline.value + q;
  return look.ratioClass !== null && carriesRatio(look.baseline) ? policy['8.target.ratio'] * look.baseline.value : null;
}

/** The series an action is about, with how it stood when the action was raised: the worst then, at the point it names. */
function subjectOf(context: Context, action: LedgerAction, raised: Day): { readonly track: Track; readonly look: Look } | null {
  let found: { track: Track; look: Look } | null = null;
  for (const track of context.byMachine.get(action.machine) ?? []) {
    if (action.verifyPoint !== null && track.series.point !== action.verifyPoint) continue;
    const look = lookUpTo(context, track, raised);
    if (look === null) continue;
    if (found === null || badness(conditionOf(look)) > badness(conditionOf(found.look))) found = { track, look };
  }
  return found;
}

function lookUpTo(context: Context, track: Track, day: Day): Look | null {
  for (let s = context.current; s >= 0; s -= 1) {
    const look = track.looks[s] ?? null;
    if (look !== null && dayAt(context, s) <= day && !doubtedLow(look)) return look;
  }
  return null;
}

/** Readings after the work that compare with the one before it, across a new baseline, and are not doubted low. */
function readingsAfter(context: Context, track: Track, before: Reading, closed: Day): (Reading & { value: number })[] {
  const options = { speedShare: context.policy['3.speed.overall'], acrossNewBaseline: true };
  return track.series.readings.filter((reading): reading is Reading & { value: number } => {
    if (!isMeasured(reading) || reading.day < closed || reading.survey <= before.survey) return false;
    const look = track.looks[reading.survey] ?? null;
    return look !== null && !doubtedLow(look) && whyNotComparable(context, track, before, reading, options) === null;
  });
}

/** True where the only work between raising and closing was greasing, which needs two readings to be believed. */
function onlyGreased(track: Track, from: Day, to: Day): boolean {
  const work = track.events.filter((e) => e.day >= from && e.day <= to && e.event !== 'other' && e.event !== 'sensor moved');
  return work.length > 0 && work.every((e) => e.event === 'greasing');
}

const pair = (value: number, day: Day): { value: number; date: string } => ({ value, date: dayText(day) });

/** null where nothing can be verified: no such machine or no reading before it was raised. */
export function verify(context: Context, action: LedgerAction): Verification | null {
  const raised = action.raised ?? dayAt(context, 0);
  const subject = subjectOf(context, action, raised);
  if (subject === null) return null;
  const { track, look } = subject;
  const limit = action.verifyBelow ?? targetOf(context, look);
  const target =
    limit === null ? null : { point: track.series.point, quantity: track.series.quantity, value: limit, unit: unitWords(track) };
  const before = pair(look.value, look.reading.day);
  if (action.status !== 'done' || action.closed === null) return { target, before, after: null, result: 'not yet measured' };
  const readings = readingsAfter(context, track, look.reading, action.closed);
  const last = readings[readings.length - 1];
  if (last === undefined || limit === null)
    return { target, before, after: last === undefined ? null : pair(last.value, last.day), result: 'not yet measured' };
  const below = readings.filter((r) => !exceeds(r.value, limit));
  const needed = onlyGreased(track, raised, action.closed) ? 2 : 1;
  const proof = below[needed - 1];
  if (proof !== undefined) return { target, before, after: pair(proof.value, proof.day), result: 'verified' };
  return { target, before, after: pair(last.value, last.day), result: exceeds(last.value, limit) ? 'not verified' : 'not yet measured' };
}

/** Ids of the actions that were verified by a reading of the current survey. */
export function verifiedNow(context: Context, machine: string): boolean {
  const today = context.plant.surveys[context.current];
  return (context.closedActions.get(machine) ?? []).some((action) => {
    const verification = verify(context, action);
    return (
      verification?.result === 'verified' &&
      today !== undefined &&
      verification.after !== null &&
      verification.after.date >= dayText(today.from)
    );
  });
}
