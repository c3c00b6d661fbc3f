/**
 * Level of a point. In: what the current survey says of it, or the last that did. Out: urgency with rule: table, R1 for an
 * unsupported r-D, H1 when the zone improved, M1 for held points, K1 for accepted deviations.
 */
import type { Criticality, Reading } from '../plant/types.ts';
import type { RatioClass, Zone } from '../record/types.ts';
import { accepts } from './accepted.ts';
import { exceeds, reaches } from './exceeds.ts';
import { floorFor } from './floor.ts';
import { ratioSteps } from './look.ts';
import { decibelChange } from './rise.ts';
import { type Context, dayAt, doubtedLow, type Look, pointRow, type Track } from './track.ts';
import { type Movement, movementOf } from './travel.ts';
import { badness, type Level, milder, NO_LEVEL, tableLevel, weight, worse } from './urgency-table.ts';

/** What a machine's level is read with. */
export interface Standing {
  readonly criticality: Criticality;
  /** A proven spare stands by and may relieve. */
  readonly spare: boolean;
  /** An action on this machine was verified at this survey: the hysteresis ends with it. */
  readonly verified: boolean;
}

/** Everything the current survey says of one series. */
export interface Verdict {
  readonly track: Track;
  readonly look: Look | null;
  readonly movement: Movement | null;
  /** The last look that holds its zone and level here; null where the point was measured and is not doubted low. */
  readonly heldFrom: Look | null;
  readonly condition: Zone | RatioClass | null;
  readonly level: Level;
}

export const conditionOf = (look: Look | null): Zone | RatioClass | null => (look === null ? null : (look.zone ?? look.ratioClass));

/** The last look before `survey` whose reading was measured and not doubted low in its own time. */
export function lastSound(track: Track, survey: number): Look | null {
  for (let s = survey - 1; s >= 0; s -= 1) {
    const look = track.looks[s] ?? null;
    if (look !== null && !doubtedLow(look) && !isBlind(look)) return look;
  }
  return null;
}

/** Condition of a series at a survey: its own, else the last one it holds. */
export function heldConditionAt(track: Track, survey: number): Zone | RatioClass | null {
  const look = track.looks[survey] ?? null;
  return look !== null ? conditionOf(look) : conditionOf(lastSound(track, survey));
}

/** Verdict of one series at the current survey. */
export function verdictOf(context: Context, track: Track, standing: Standing): Verdict {
  const look = track.looks[context.current] ?? null;
  const movement = look === null ? null : movementOf(context, track, look);
  const isHeld = look === null || doubtedLow(look) || isBlind(look);
  const heldFrom = isHeld ? lastSound(track, context.current) : null;
  let level = look === null || movement === null ? NO_LEVEL : withHysteresis(context, track, look, movement, standing);
  if (heldFrom !== null) {
    const held = plainLevel(context, track, heldFrom, movementOf(context, track, heldFrom), standing);
    if (weight(held.urgency) > weight(level.urgency) || (held.urgency !== null && look === null))
      level = { urgency: held.urgency, rule: 'M1' };
  }
  if (level.urgency === null && look !== null && context.sisters.get(track)?.outlier === true) level = { urgency: 'watch', rule: 'S1' };
  if (level.urgency !== null && level.urgency !== 'watch' && isAccepted(context, track, look ?? heldFrom))
    level = { urgency: 'watch', rule: 'K1' };
  return { track, look, movement, heldFrom, condition: conditionOf(look) ?? (look === null ? conditionOf(heldFrom) : null), level };
}

/** Read in a band that cannot tell its zone: limits are there, the verdict is not, so the last level stands. */
const isBlind = (look: Look): boolean =>
  look.zone === null && look.ratioClass === null && look.limits.set !== null && look.limits.bc !== null;

const isAccepted = (context: Context, track: Track, look: Look | null): boolean =>
  look !== null && context.plant.accepted.some((a) => accepts(a, track, look.value, dayAt(context, context.current)));

/** Level by the table on the history up to a look, without hysteresis (record.md, decision 8). */
export function plainLevel(context: Context, track: Track, look: Look, movement: Movement, standing: Standing): Level {
  return levelOf(context, track, look, conditionOf(look), movement, standing);
}

function levelOf(
  context: Context,
  track: Track,
  look: Look,
  condition: Zone | RatioClass | null,
  movement: Movement,
  standing: Standing,
): Level {
  if (condition === null || movement.travel === null) return NO_LEVEL;
  const level = byForecast(condition, movement, standing) ?? tableLevel(condition, movement.travel, standing.criticality, standing.spare);
  // The rules name r-D alone; held there it would let an unsupported r-C of a critical machine stand above an r-D, so both are held.
  const byRatioAlone = condition === 'r-D' || condition === 'r-C';
  if (!byRatioAlone || weight(level.urgency) <= weight('within a week') || isSupported(context, track, look)) return level;
  return { urgency: 'within a week', rule: 'R1' };
}

/** F1: a forecast may make travel fast, never lower it, and from A or B never by itself above "within a month". */
function byForecast(condition: Zone | RatioClass, movement: Movement, standing: Standing): Level | null {
  if (movement.by !== 'forecast' || movement.without === null) return null;
  const plain = tableLevel(condition, movement.without, standing.criticality, standing.spare);
  const fast = tableLevel(condition, 'fast', standing.criticality, standing.spare);
  const inAOrB = condition.endsWith('A') || condition.endsWith('B');
  const capped = inAOrB ? milder(fast, { urgency: 'within a month', rule: 'F1' }) : fast;
  return worse(plain, capped) === plain ? plain : { urgency: capped.urgency, rule: 'F1' };
}

/**
 * R1: an r-D stands alone unless the previous comparable reading was r-D too, or a second quantity or point of the same
 * bearing (component and location, else the point) stands 4 dB or more over its baseline and above its floor.
 */
function isSupported(context: Context, track: Track, look: Look): boolean {
  const before = look.previous === null ? null : (track.looks[look.previous.survey] ?? null);
  if (before?.ratioClass === 'r-D') return true;
  const bearing = bearingOf(track, look.reading);
  for (const other of context.byMachine.get(track.machine.id) ?? []) {
    if (other === track || (other.series.point === track.series.point && other.series.quantity === track.series.quantity)) continue;
    const twin = other.looks[look.survey] ?? null;
    if (twin === null || twin.baseline === null || doubtedLow(twin) || bearingOf(other, twin.reading) !== bearing) continue;
    const row = pointRow(other, twin.reading.day);
    const floor = floorFor(other.series, row, context.policy);
    const db = decibelChange(twin.value, twin.baseline.value, row.scale);
    if (db !== null && floor !== null && reaches(twin.value, floor) && reaches(db, context.policy['2.r1.support'])) return true;
  }
  return false;
}

export function bearingOf(track: Track, reading: Reading): string {
  const { location } = pointRow(track, reading.day);
  return location === null ? `point ${track.series.point}` : `${track.series.component} ${location}`;
}

/**
 * H1: where the zone improved since the last sound reading, a level is left only at or below 0.9 × the boundary crossed:
 * until then the reading counts as in the zone above that boundary, but never as worse than its level was. Told this way
 * (by zone, with the travel of today) a higher reading never has the lower level.
 */
function withHysteresis(context: Context, track: Track, look: Look, movement: Movement, standing: Standing): Level {
  const own = plainLevel(context, track, look, movement, standing);
  const condition = conditionOf(look);
  const before = lastSound(track, look.survey);
  const earlier = conditionOf(before);
  if (standing.verified || before === null || earlier === null || condition === null || badness(earlier) <= badness(condition)) return own;
  if (doubtedLow(look) || movement.travel === null) return own;
  const counted = notYetLeft(context, track, look, condition, earlier);
  if (counted === condition) return own;
  const asIfThere = levelOf(context, track, look, counted, movement, standing);
  const then = plainLevel(context, track, before, movementOf(context, track, before), standing);
  const kept = milder(then, asIfThere);
  return worse(own, kept) === own ? own : { urgency: kept.urgency, rule: 'H1' };
}

/** The worst zone or class, up to the earlier one, whose lower boundary the reading has not left by the share of the rules. */
function notYetLeft(
  context: Context,
  track: Track,
  look: Look,
  condition: Zone | RatioClass,
  earlier: Zone | RatioClass,
): Zone | RatioClass {
  const byRatio = condition.startsWith('r-');
  if (byRatio !== earlier.startsWith('r-')) return condition;
  const row = pointRow(track, look.reading.day);
  const base = look.baseline?.value ?? null;
  const steps = byRatio && base !== null && row.scale === 'linear' ? ratioSteps(context, row.scale).map((s) => s * base) : [];
  const lower = byRatio ? steps : [look.limits.ab, look.limits.bc, look.limits.cd];
  let counted = condition;
  (['B', 'C', 'D'] as const).forEach((letter, i) => {
    const zone: Zone | RatioClass = byRatio ? `r-${letter}` : letter;
    const boundary = lower[i] ?? null;
    if (boundary === null || badness(zone) <= badness(condition) || badness(zone) > badness(earlier)) return;
    if (exceeds(look.value, context.policy['9.hysteresis'] * boundary)) counted = zone;
  });
  return counted;
}
