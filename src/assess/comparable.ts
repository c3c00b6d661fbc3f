/**
 * Like for like. In: an earlier reading and the current one of a series. Out: null when they compare, else the reason.
 * Never: averaging over unlike runs.
 */
import type { Day } from '../plant/day.ts';
import { inForce, type PlantEvent, type Reading, type Survey } from '../plant/types.ts';
import { closingBetween } from './closing.ts';
import { exceeds } from './exceeds.ts';
import { type Context, componentRow, doubtedLow, isMeasured, type Look, pointRow, type Track } from './track.ts';

/** Why a reading takes no part; each is a sentence `assess.why.<code>`. */
export type NotComparable =
  | 'not measured'
  | 'bound'
  | 'other state'
  | 'other speed'
  | 'speed unknown'
  | 'other load'
  | 'other band'
  | 'other mounting'
  | 'other instrument'
  | 'sensor moved'
  | 'before new baseline'
  | 'doubted low';

/** An event renews the baseline of this series; balancing does not renew that of acceleration unless it says so. */
export function renewsBaseline(event: PlantEvent, quantity: string): boolean {
  return event.newBaseline && !(event.event === 'balance' && event.quantity === null && quantity === 'acceleration');
}

/** Day of the last new baseline up to `day`; null where there is none. A reading of that same day counts as after it. */
export function lastNewBaseline(track: Track, day: Day): Day | null {
  let found: Day | null = null;
  for (const event of track.events) if (event.day <= day && renewsBaseline(event, track.series.quantity)) found = event.day;
  return found;
}

function lastSensorMove(track: Track, day: Day): Day | null {
  let found: Day | null = null;
  for (const event of track.events) if (event.day <= day && event.event === 'sensor moved') found = event.day;
  return found;
}

const mountingOf = (survey: Survey | undefined, reading: Reading): string | null =>
  reading.sensor === null ? null : (survey?.sensors.find((s) => s.id === reading.sensor)?.mounting ?? null);

const modelOf = (survey: Survey | undefined, reading: Reading): string | null =>
  reading.instrument === null ? null : (survey?.instruments.find((i) => i.id === reading.instrument)?.model ?? null);

const differ = <T>(a: T | null, b: T | null): boolean => a !== null && b !== null && a !== b;

/** Band that a reading was taken in: its own override, else its point's of the day. */
export function bandOf(track: Track, reading: Reading): { readonly lowHz: number | null; readonly highHz: number | null } {
  const row = pointRow(track, reading.day);
  return { lowHz: reading.lowHz ?? row.lowHz, highHz: reading.highHz ?? row.highHz };
}

/**
 * True while the low-side doubt of an earlier reading stands for the one who looks at `current`. A second low reading or a
 * closing event since lifts the doubt of an unexplained fall; what a sensor or a unit got wrong stays out.
 */
export function standsDoubted(context: Context, track: Track, earlier: Reading, current: Reading): boolean {
  const look = track.looks[earlier.survey];
  if (look === null || look === undefined || look.doubts.length === 0 || !doubtedLow(look)) return false;
  const lifted = track.lifted[earlier.survey] ?? null;
  if (lifted !== null && current.survey >= lifted) return false;
  return !isOnlyUnexplained(look) || closingBetween(context, track, earlier.day, current.day) === null;
}

/** The only low-side doubt of this reading is that nothing explains its fall. */
export const isOnlyUnexplained = (look: Look): boolean => look.doubts.every((d) => d.effect !== 'held' || d.kind === 'unexplained-fall');

function otherSpeed(track: Track, earlier: Reading, current: Reading, share: number): NotComparable | null {
  if (earlier.speedRpm !== null && current.speedRpm !== null) {
    const apart = Math.abs(earlier.speedRpm - current.speedRpm);
    return exceeds(apart, share * current.speedRpm) ? 'other speed' : null;
  }
  return componentRow(track, current.day).drive === 'variable' ? 'speed unknown' : null;
}

function otherTaking(context: Context, track: Track, earlier: Reading, current: Reading): NotComparable | null {
  const { plant, policy } = context;
  if (
    earlier.lowHz !== null ||
    current.lowHz !== null ||
    earlier.highHz !== null ||
    current.highHz !== null ||
    track.series.rows.length > 1
  ) {
    const [a, b] = [bandOf(track, earlier), bandOf(track, current)];
    if (a.lowHz !== b.lowHz || a.highHz !== b.highHz) return 'other band';
  }
  if (earlier.sensor === null && earlier.instrument === null) return null;
  const [then, now] = [plant.surveys[earlier.survey], plant.surveys[current.survey]];
  if (differ(mountingOf(then, earlier), mountingOf(now, current))) return 'other mounting';
  const high = bandOf(track, current).highHz;
  if (high !== null && exceeds(high, policy['3.mounting.above']) && differ(modelOf(then, earlier), modelOf(now, current)))
    return 'other instrument';
  return null;
}

export interface ComparableOptions {
  /** Share of the current speed; the rules' 5 % for overalls, 2 % for vectors. */
  readonly speedShare: number;
  /** Verification looks across a new baseline. */
  readonly acrossNewBaseline: boolean;
}

/** null when `earlier` compares with `current`, else why not (section 3 of the rules, in its order). */
export function whyNotComparable(
  context: Context,
  track: Track,
  earlier: Reading,
  current: Reading,
  options: ComparableOptions,
): NotComparable | null {
  if (earlier.bound !== null) return 'bound';
  if (!isMeasured(earlier)) return 'not measured';
  if (earlier.state !== current.state) return 'other state';
  const speed = otherSpeed(track, earlier, current, options.speedShare);
  if (speed !== null) return speed;
  if (
    earlier.loadPct !== null &&
    current.loadPct !== null &&
    exceeds(Math.abs(earlier.loadPct - current.loadPct), context.policy['3.load'])
  )
    return 'other load';
  const taking = otherTaking(context, track, earlier, current);
  if (taking !== null) return taking;
  if (track.events.length > 0) {
    const moved = lastSensorMove(track, current.day);
    if (moved !== null && earlier.day < moved) return 'sensor moved';
    const renewed = options.acrossNewBaseline ? null : lastNewBaseline(track, current.day);
    if (renewed !== null && earlier.day < renewed) return 'before new baseline';
  }
  return standsDoubted(context, track, earlier, current) ? 'doubted low' : null;
}

/** Earlier readings that compare with the reading of `current`, oldest first. */
export function comparableBefore(
  context: Context,
  track: Track,
  current: Reading,
  acrossNewBaseline = false,
): (Reading & { value: number })[] {
  const options = { speedShare: context.policy['3.speed.overall'], acrossNewBaseline };
  const found: (Reading & { value: number })[] = [];
  for (const reading of track.series.readings) {
    if (reading.survey >= current.survey) break;
    if (!isMeasured(reading)) continue;
    const compares = track.uniform
      ? !standsDoubted(context, track, reading, current)
      : whyNotComparable(context, track, reading, current, options) === null;
    if (compares) found.push(reading);
  }
  return found;
}

/** True where the speed was taken as unchanged because it is not known on a fixed-speed drive: said so in the report. */
export const speedTakenAsFixed = (track: Track, earlier: Reading, current: Reading): boolean =>
  (earlier.speedRpm === null || current.speedRpm === null) && inForce(track.component.rows, current.day).drive !== 'variable';
