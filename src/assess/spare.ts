/**
 * Spares: another machine that can stand in. In: the group. Out: whether one is proven (in A or B, measured within its
 * interval, not under work) and why not. Never: a spare that was not measured lately, taken on trust.
 */
import { dayText } from '../plant/day.ts';
import type { Machine } from '../plant/types.ts';
import type { Facts, RecordMachine } from '../record/types.ts';
import { say } from '../words/say.ts';
import { graceDays, intervalOf, lastMeasured, twinsOf, whyNot } from './coverage.ts';
import { conditionOf } from './level.ts';
import { type Context, dayAt, doubtedLow, machineRow } from './track.ts';
import { badness } from './urgency-table.ts';

interface Proof {
  readonly proven: boolean;
  readonly key: string;
  readonly facts: Facts;
}

function proofOf(context: Context, twin: Machine): Proof {
  const tracks = context.byMachine.get(twin.id) ?? [];
  const last = lastMeasured(tracks, context.current);
  if (last < 0) return { proven: false, key: 'assess.spare.never', facts: { machine: twin.id } };
  const date = dayText(dayAt(context, last));
  if (last < context.current && whyNot(tracks, context.current) === 'under work')
    return { proven: false, key: 'assess.spare.work', facts: { machine: twin.id } };
  const interval = intervalOf(context, twin);
  const age = dayAt(context, context.current) - dayAt(context, last);
  if (interval === null ? last < context.current : age > interval + graceDays(context, interval)) {
    return { proven: false, key: 'assess.spare.stale', facts: { machine: twin.id, date, days: age } };
  }
  const looks = tracks.map((t) => t.looks[last] ?? null).filter((l) => l !== null);
  const conditions = looks.map(conditionOf).filter((c) => c !== null);
  const worst = conditions.reduce((a, b) => (badness(b) > badness(a) ? b : a), conditions[0] ?? null);
  if (worst === null) return { proven: false, key: 'assess.spare.unknown', facts: { machine: twin.id, date } };
  if (looks.some(doubtedLow)) return { proven: false, key: 'assess.spare.doubted', facts: { machine: twin.id, date } };
  const good = badness(worst) <= badness('B');
  return { proven: good, key: good ? 'assess.spare.proven' : 'assess.spare.bad', facts: { machine: twin.id, date, condition: worst } };
}

/** null for a machine without a group; else its best spare, with the reason in words. */
export function spareOf(context: Context, machine: Machine): RecordMachine['spare'] {
  const twins = twinsOf(context, machine, context.current);
  if (twins.length === 0) return null;
  const { language } = context.plant.settings;
  if (!machineRow(machine, dayAt(context, context.current)).relief) {
    const facts = { machine: (twins[0] as Machine).id };
    return { machine: facts.machine, proven: false, reason: say(language, 'assess.spare.relief', facts), facts };
  }
  const proofs = twins.map((twin) => ({ twin, proof: proofOf(context, twin) }));
  const best = proofs.find((p) => p.proof.proven) ?? (proofs[0] as (typeof proofs)[number]);
  return {
    machine: best.twin.id,
    proven: best.proof.proven,
    reason: say(language, best.proof.key, best.proof.facts),
    facts: best.proof.facts,
  };
}
