import { closingBetween } from '../closing.ts';
import { isOnlyUnexplained, standsDoubted, whyNotComparable } from '../comparable.ts';
import { exceeds, reaches } from '../exceeds.ts';
import { floorFor } from '../floor.ts';
import { ratio } from '../rise.ts';
import { type Context, doubtedLow, isMeasured, type Look, pointRow, type Track } from '../track.ts';
import { doubt, lastTime } from './doubt.ts';

/** near-zero: below 5 % of the baseline while running (an unknown speed counts as running), or a reading at speed 0. */
export function nearZeroDoubts(context: Context, survey: number): void {
  const share = context.policy['7.near_zero.share'];
  const { settings } = context.plant;
  for (const track of context.tracks) {
    const look = track.looks[survey];
    if (look === null || look === undefined || pointRow(track, look.reading.day).scale !== 'linear') continue;
    if (look.reading.speedRpm === 0) {
      look.doubts.push(doubt(settings, 'near-zero', 'held', { value: look.value, unit: track.series.unit }, '.standing'));
    } else if (look.baseline !== null && exceeds(share * look.baseline.value, look.value)) {
      const facts = {
        value: look.value,
        unit: track.series.unit,
        baseline: look.baseline.value,
        percent: (100 * look.value) / look.baseline.value,
      };
      look.doubts.push(doubt(settings, 'near-zero', 'held', facts));
    }
  }
}

/** all-down: three points of a machine or more fallen by 95 % or more: it stood still, it did not improve. */
export function allDownDoubts(context: Context, survey: number): void {
  const { policy, plant } = context;
  for (const tracks of context.byMachine.values()) {
    let down: Look[] | null = null;
    let points: Set<string> | null = null;
    for (const track of tracks) {
      const look = track.looks[survey];
      if (look === null || look === undefined || pointRow(track, look.reading.day).scale !== 'linear') continue;
      // Against the last reading or the median of those before, whichever stands higher: after a rise the fall is from the top.
      const before = look.previous === null ? null : Math.max(lastTime(look) ?? 0, look.previous.value as number);
      if (before === null || exceeds(look.value, (1 - policy['7.all_down.share']) * before)) continue;
      down = [...(down ?? []), look];
      points = (points ?? new Set()).add(track.series.point);
    }
    if (down === null || points === null || points.size < policy['7.all_down.points']) continue;
    for (const look of down)
      look.doubts.push(doubt(plant.settings, 'all-down', 'held', { points: points.size, percent: 100 * policy['7.all_down.share'] }));
  }
}

/**
 * unexplained-fall: down to p/1.6 or less without a closing event between; a second low reading explains itself and lifts
 * the doubt of the first for those who look later. Falls from below the floor are noise and doubt nothing.
 */
export function unexplainedFalls(context: Context, survey: number): void {
  for (const track of context.tracks) {
    const look = track.looks[survey];
    if (look === null || look === undefined || look.previous === null || doubtedLow(look)) continue;
    judgeFall(context, track, look, look.previous.value as number);
  }
}

function judgeFall(context: Context, track: Track, look: Look, before: number): void {
  const row = pointRow(track, look.reading.day);
  const floor = floorFor(track.series, row, context.policy);
  if (row.scale === 'none' || floor === null || !reaches(before, floor)) return;
  const isLow = (value: number): boolean => reaches(ratio(before, value, row.scale), context.policy['5.falling.factor']);
  if (!isLow(look.value)) return;
  const previous = look.previous as NonNullable<Look['previous']>;
  const closing = closingBetween(context, track, previous.day, look.reading.day);
  if (closing !== null) {
    look.explainedFall = 'event';
    return;
  }
  let second = false;
  for (let s = previous.survey + 1; s < look.survey; s += 1) {
    const earlier = track.readings[s] ?? null;
    if (!isMeasured(earlier) || !isLow(earlier.value) || !standsDoubted(context, track, earlier, look.reading)) continue;
    const options = { speedShare: context.policy['3.speed.overall'], acrossNewBaseline: false };
    if (whyNotComparable(context, track, earlier, look.reading, options) !== 'doubted low' || !isOnlyUnexplained(track.looks[s] as Look))
      continue;
    second = true;
    track.lifted[s] = look.survey + 1;
  }
  if (second) look.explainedFall = 'second reading';
  else {
    const facts = { value: look.value, unit: track.series.unit, previous: before, percent: 100 * (1 - look.value / before) };
    look.doubts.push(doubt(context.plant.settings, 'unexplained-fall', 'held', facts));
  }
}
