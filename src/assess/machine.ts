/**
 * Machines and their components. In: the verdicts of all series. Out: condition, level with rule and reason, spare,
 * override, doubts. A machine is the worst of its components, a component the worst of its points.
 */
import type { Urgency } from '../plant/types.ts';
import type { Condition, Doubt, Facts, Override, RatioClass, RecordComponent, RecordMachine, SeriesKey, Zone } from '../record/types.ts';
import { naturalOrder } from '../words/natural.ts';
import { say } from '../words/say.ts';
import { concernsSeries } from './accepted.ts';
import { cannotSee } from './cannot-see.ts';
import { closenessOf } from './closeness.ts';
import { measuredOf, missesInARow, whyNot } from './coverage.ts';
import { dateOrNull } from './cut.ts';
import { exceeds } from './exceeds.ts';
import { indicationsOf } from './indications.ts';
import { heldConditionAt, type Standing, type Verdict } from './level.ts';
import { unitWords } from './reason.ts';
import { reasonOf } from './reason.ts';
import { type Context, dayAt, machineRow, type Track } from './track.ts';
import { badness, type Level, NO_LEVEL, weight } from './urgency-table.ts';
import type { Machine } from '../plant/types.ts';

/** One machine as assessed, before it is written. */
export interface Assessed {
  readonly machine: Machine;
  readonly standing: Standing;
  readonly spare: RecordMachine['spare'];
  readonly verdicts: readonly Verdict[];
  /** The verdict that governs the level; null where coverage does, or nothing. */
  readonly urgencyBy: Verdict | null;
  readonly computed: Level;
  readonly override: Override | null;
  readonly urgency: Urgency | null;
  readonly reason: string;
  readonly facts: Facts;
}

export const keyOf = (track: Track): SeriesKey => ({
  component: track.component.id,
  point: track.series.point,
  quantity: track.series.quantity,
  detection: track.series.detection,
});

/** Order in which verdicts govern a condition: worse first, then the nearer to C/D, then by name. */
function byBadness(context: Context): (a: Verdict, b: Verdict) => number {
  return (a, b) => badness(b.condition) - badness(a.condition) || closer(context, a, b) || byName(a.track, b.track);
}

/** Order in which verdicts govern a level: more urgent first, then as conditions. */
export function byUrgency(context: Context): (a: Verdict, b: Verdict) => number {
  const rest = byBadness(context);
  return (a, b) => weight(b.level.urgency) - weight(a.level.urgency) || rest(a, b);
}

function closer(context: Context, a: Verdict, b: Verdict): number {
  const share = (v: Verdict): number => closenessOf(context, v.track, v.look ?? v.heldFrom).share ?? -1;
  const [x, y] = [share(a), share(b)];
  return exceeds(x, y) ? -1 : exceeds(y, x) ? 1 : 0;
}

const byName = (a: Track, b: Track): number =>
  naturalOrder(a.series.point, b.series.point) ||
  naturalOrder(a.series.quantity, b.series.quantity) ||
  naturalOrder(a.series.detection ?? '', b.series.detection ?? '');

/** The verdict that governs a condition, or null when nothing is assessed. */
export function governing(context: Context, verdicts: readonly Verdict[]): Verdict | null {
  const known = verdicts.filter((v) => v.condition !== null);
  return known.length === 0 ? null : ([...known].sort(byBadness(context))[0] as Verdict);
}

/** Condition of a set of tracks at a survey, each with its own or the one it holds; null where nothing is known. */
export function conditionAt(tracks: readonly Track[], survey: number): Zone | RatioClass | null {
  let worst: Zone | RatioClass | null = null;
  for (const track of tracks) {
    const condition = heldConditionAt(track, survey);
    if (badness(condition) > badness(worst)) worst = condition;
  }
  return worst;
}

/** M2: misses in a row that are not excused. */
function missLevel(misses: number, standing: Standing): Level {
  const ladder: Readonly<Record<string, readonly (Urgency | null)[]>> = {
    critical: ['watch', 'within a month', 'within a week'],
    essential: [null, 'next planned stop', 'within a month'],
    general: [null, null, 'watch'],
  };
  const urgency = misses === 0 ? null : (ladder[standing.criticality]?.[Math.min(misses, 3) - 1] ?? null);
  return urgency === null ? NO_LEVEL : { urgency, rule: 'M2' };
}

/** True where a machine has been measured and neither a limit nor a baseline says anything about it. */
const nothingToJudgeBy = (verdicts: readonly Verdict[]): boolean =>
  verdicts.some((v) => v.look !== null) &&
  verdicts.every((v) => v.condition === null && (v.look === null || (v.look.baseline === null && v.look.limits.set === null)));

/** Level of a machine: the worst rule over its points, then misses, then M3. */
export function assessMachine(
  context: Context,
  machine: Machine,
  verdicts: readonly Verdict[],
  standing: Standing,
  spare: RecordMachine['spare'],
): Assessed {
  const { language } = context.plant.settings;
  const leading = [...verdicts].sort(byUrgency(context))[0] ?? null;
  let computed = leading?.level ?? NO_LEVEL;
  let urgencyBy = computed.urgency === null ? null : leading;
  const misses = missesInARow(context, machine);
  const missed = context.usualIntervalDays === null ? NO_LEVEL : missLevel(misses, standing);
  let told: { reason: string; facts: Facts };
  if (weight(missed.urgency) > weight(computed.urgency)) {
    computed = missed;
    urgencyBy = null;
    told = { reason: say(language, 'assess.reason.M2', { misses }), facts: { misses, rule: 'M2' } };
  } else if (urgencyBy !== null) told = reasonOf(context, urgencyBy);
  else if (nothingToJudgeBy(verdicts)) {
    computed = { urgency: standing.criticality === 'critical' ? 'watch' : null, rule: 'M3' };
    told = { reason: say(language, 'assess.reason.M3', {}), facts: { rule: 'M3' } };
  } else told = quietReason(context, verdicts);
  const override = overrideOf(context, machine, computed);
  return { machine, standing, spare, verdicts, urgencyBy, computed, override, urgency: override?.urgency ?? computed.urgency, ...told };
}

/** Why a machine has no level: its governing reading in a sentence, or that nothing was assessed. */
function quietReason(context: Context, verdicts: readonly Verdict[]): { reason: string; facts: Facts } {
  const worst = governing(context, verdicts);
  if (worst !== null && worst.look !== null) return reasonOf(context, worst);
  const { language } = context.plant.settings;
  const unseen = verdicts.find((v) => v.look !== null && v.look.noZone !== null)?.look?.noZone ?? null;
  if (worst === null && unseen !== null) return { reason: say(language, unseen.key, unseen.facts), facts: unseen.facts };
  if (worst === null || worst.heldFrom === null) {
    const status = whyNot(
      verdicts.map((v) => v.track),
      context.current,
    );
    return { reason: say(language, status === null ? 'assess.reason.none' : 'assess.reason.not_measured', { status }), facts: { status } };
  }
  return reasonOf(context, { ...worst, level: { urgency: null, rule: 'M1' } });
}

/** O1: the analyst's override of the current survey, with name, reason and expiry; past its date it is none. */
function overrideOf(context: Context, machine: Machine, computed: Level): Override | null {
  const day = dayAt(context, context.current);
  for (const finding of context.plant.surveys[context.current]?.findings ?? []) {
    if (finding.machine !== machine.id || finding.urgency === null || finding.overrideBy === null || finding.overrideReason === null)
      continue;
    if (finding.closed !== null || (finding.overrideUntil !== null && finding.overrideUntil < day)) continue;
    return {
      urgency: finding.urgency,
      by: finding.overrideBy,
      reason: finding.overrideReason,
      until: dateOrNull(finding.overrideUntil),
      lowers_now: computed.urgency === 'now' && finding.urgency !== 'now',
    };
  }
  return null;
}

const distinctDoubts = (verdicts: readonly Verdict[]): Doubt[] => {
  const byKind = new Map<string, Doubt>();
  for (const verdict of verdicts)
    for (const doubt of verdict.look?.doubts ?? []) if (!byKind.has(doubt.kind)) byKind.set(doubt.kind, doubt);
  return [...byKind.values()];
};

export function machineLine(context: Context, assessed: Assessed, previous: Condition | null): RecordMachine {
  const { machine, verdicts, computed, urgencyBy } = assessed;
  const tracks = context.byMachine.get(machine.id) ?? [];
  const row = machineRow(machine, dayAt(context, context.current));
  const worst = governing(context, verdicts);
  return {
    machine: machine.id,
    name: row.name,
    area: row.area,
    route: row.route,
    family: row.family,
    criticality: assessed.standing.criticality,
    criticality_stated: row.criticality !== null,
    condition: worst?.condition ?? 'not assessed',
    measured_of: measuredOf(context, tracks, context.current),
    previous_condition: previous,
    governed_by: worst === null ? null : keyOf(worst.track),
    urgency: assessed.urgency,
    urgency_by: urgencyBy === null ? null : keyOf(urgencyBy.track),
    rule: computed.rule,
    reason: assessed.reason,
    facts: assessed.facts,
    computed_urgency: computed.urgency,
    override: assessed.override,
    spare: assessed.spare,
    accepted: acceptedLines(context, machine, verdicts),
    indications: indicationsOf(context, verdicts, assessed.urgency !== null || badness(worst?.condition ?? null) >= badness('B')),
    doubts: distinctDoubts(verdicts),
    cannot_see: cannotSee(context, tracks),
    events: context.plant.events
      .filter((e) => e.machine === machine.id)
      .map((e) => ({
        date: dateOrNull(e.day) as string,
        component: e.component,
        point: e.point,
        quantity: e.quantity,
        event: e.event,
        new_baseline: e.newBaseline,
        serial_out: e.serialOut,
        serial_in: e.serialIn,
        notes: e.notes,
      })),
  };
}

function acceptedLines(context: Context, machine: Machine, verdicts: readonly Verdict[]): RecordMachine['accepted'] {
  const day = dayAt(context, context.current);
  return context.plant.accepted
    .filter((a) => a.machine === machine.id)
    .map((a) => {
      const above = verdicts.some((v) => v.look !== null && concernsSeries(a, v.track) && exceeds(v.look.value, a.upTo));
      const unit = verdicts.find((v) => concernsSeries(a, v.track));
      return {
        point: a.point,
        quantity: a.quantity,
        up_to: a.upTo,
        unit: unit === undefined ? null : unitWords(unit.track),
        until: dateOrNull(a.until),
        by: a.by,
        reason: a.reason,
        in_force: !above && (a.until === null || day <= a.until),
      };
    });
}

export function componentLines(context: Context, assessed: Assessed): RecordComponent[] {
  const day = dayAt(context, context.current);
  const { language } = context.plant.settings;
  return assessed.machine.components.map((component) => {
    const own = assessed.verdicts.filter((v) => v.track.component === component);
    const worst = governing(context, own);
    const limits = (worst?.look ?? worst?.heldFrom ?? own.find((v) => v.look !== null)?.look)?.limits ?? null;
    const row = component.rows.reduce(
      (a, b) => (b.validFrom === null || b.validFrom <= day ? b : a),
      component.rows[0] as (typeof component.rows)[number],
    );
    return {
      machine: assessed.machine.id,
      component: component.id,
      implicit: component.implicit,
      kind: row.kind,
      condition: worst?.condition ?? 'not assessed',
      governed_by: worst === null ? null : keyOf(worst.track),
      limit_set: limits?.set?.id ?? null,
      limit_reason:
        limits === null ? say(language, 'assess.nozone.not_measured', {}) : say(language, limits.reason.key, limits.reason.facts),
      power_kw: row.powerKw,
      speed_rpm: limits?.ratedRpm ?? row.speedRpm,
    };
  });
}
