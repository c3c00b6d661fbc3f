/**
 * Trend over the comparable readings. In: earlier ones and the current. Out: Theil–Sen on the logarithm, Mann–Kendall, and
 * what kind of trend they make together. Never: a rise called real because it is significant alone (the rules say why).
 */
import { dayText } from '../plant/day.ts';
import type { Policy } from '../plant/policy.ts';
import type { Reading } from '../plant/types.ts';
import type { Trend } from '../record/types.ts';
import { exceeds, reaches } from './exceeds.ts';
import { dbOfLog, logAmplitude, ratio, type Scale } from './rise.ts';
import { lastStep, type Step } from './statistics/change-points.ts';
import { mannKendall } from './statistics/mann-kendall.ts';
import { median } from './statistics/median.ts';
import { theilSenSlope } from './statistics/theil-sen.ts';

const DAYS_PER_YEAR = 365.25;
const HOURS_PER_DAY = 24;

/** `fromBaseline`: the last three stand clear of the baseline; it makes a trend that is not real a step. */
export function trendOf(
  readings: readonly (Reading & { value: number })[],
  scale: Scale,
  floor: number | null,
  stepped: boolean,
  policy: Policy,
): Trend | null {
  const n = readings.length;
  if (n < policy['5.trend.count'] || scale === 'none') return null;
  const logs = readings.map((r) => logAmplitude(r.value, scale));
  if (logs.some((v) => v === null)) return null;
  const times = timesInDays(readings);
  const slope = theilSenSlope(times, logs as number[]);
  if (slope === null) return null;
  const { twoSidedP } = mannKendall(readings.map((r) => r.value));
  const rise = Math.exp(slope * ((times[n - 1] as number) - (times[0] as number)));
  const last = (readings[n - 1] as { value: number }).value;
  const significant = !exceeds(twoSidedP, policy['5.trend.p']) && slope > 0;
  const real = significant && reaches(rise, policy['5.trend.rise']) && floor !== null && reaches(last, floor);
  const step = significant || stepped ? stepBefore(times, logs as number[], policy) : null;
  const plateau =
    isPlateau(readings, scale, policy) ||
    (step !== null && !exceeds(dbOfLog((logs[n - 1] as number) - step.after), policy['5.plateau.top']));
  const kind = real ? (plateau ? 'plateau' : 'ramp') : significant ? 'small' : stepped ? 'step' : 'none';
  // A rise that goes on is no step, though its readings may lie in two heaps with a gap between.
  const told = kind === 'ramp' ? null : step;
  return {
    kind,
    db_per_year: dbOfLog(slope) * DAYS_PER_YEAR,
    slope_per_year:
      (theilSenSlope(
        times,
        readings.map((r) => r.value),
      ) ?? 0) * DAYS_PER_YEAR,
    rise,
    p: twoSidedP,
    n,
    changed_on: told === null ? null : dayText((readings[told.at] as Reading).day),
    changed_by: told === null ? null : Math.exp(told.after - told.before),
  };
}

/**
 * The last step up among the readings before the current one, where the level has held since. The current one takes no part
 * in it, so that a higher reading never turns a rise into a step (monotony); it may stand 1 dB over the level and no more.
 */
function stepBefore(times: readonly number[], logs: readonly number[], policy: Policy): Step | null {
  const step = lastStep(times.slice(0, -1), logs.slice(0, -1), policy['5.step.scatter']);
  return step !== null && reaches(Math.exp(step.after - step.before), policy['5.trend.rise']) ? step : null;
}

/** Days of each reading, or running days where every one has its running hours. */
function timesInDays(readings: readonly Reading[]): number[] {
  const hours = readings.map((r) => r.runningHours);
  const first = hours[0];
  const last = hours[hours.length - 1];
  const onHours =
    hours.every((h) => h !== null) && first !== undefined && first !== null && last !== undefined && last !== null && last > first;
  return onHours ? hours.map((h) => (h as number) / HOURS_PER_DAY) : readings.map((r) => r.day);
}

/**
 * Plateau: the two before the last stand 2 dB or more over the three before them, and the last at most 1 dB over those two.
 * One-sided on purpose: a last reading that falls off a plateau does not make it a ramp again. Levels are averaged in dB.
 */
export function isPlateau(readings: readonly { readonly value: number }[], scale: Scale, policy: Policy): boolean {
  if (readings.length < policy['5.plateau.count']) return false;
  const logs = readings.slice(-6).map((r) => logAmplitude(r.value, scale));
  if (logs.some((v) => v === null)) return false;
  const [a, b, c, d, e, last] = logs as [number, number, number, number, number, number];
  const before = (a + b + c) / 3;
  const top = (d + e) / 2;
  return reaches(dbOfLog(top - before), policy['5.plateau.rise']) && !exceeds(dbOfLog(last - top), policy['5.plateau.top']);
}

/** Median of the last three, the current one among them, over the baseline; null with fewer than four readings. */
export function lastThreeOverBaseline(readings: readonly { readonly value: number }[], baseline: number, scale: Scale): number | null {
  return readings.length < 4 ? null : ratio(median(readings.slice(-3).map((r) => r.value)), baseline, scale);
}
