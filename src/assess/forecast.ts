/**
 * Forecast (section 6): when a real trend would cross its next boundary. In: the comparable readings. Out: a range of
 * dates, or why there is none. Range: residuals of Theil–Sen on logarithms, each reading left out in turn, their 10 % and
 * 90 % quantiles widened by Student's t. Never: a date beyond the history's own length; a failure date.
 */
import { type Day, dayText } from '../plant/day.ts';
import type { Facts, Forecast, Trend } from '../record/types.ts';
import { say } from '../words/say.ts';
import { carriesRatio } from './baseline.ts';
import { intervalOf } from './coverage.ts';
import { nextStopOf } from './due.ts';
import { exceeds } from './exceeds.ts';
import { ratioSteps } from './look.ts';
import { logAmplitude } from './rise.ts';
import { median } from './statistics/median.ts';
import { studentQuantile } from './statistics/student.ts';
import { theilSenSlope } from './statistics/theil-sen.ts';
import { type Context, type Look, pointRow, type Track } from './track.ts';

/** Days of the crossing; `likely` decides travel, rule F1. */
export interface Crossing {
  readonly boundary: string;
  readonly earliest: Day;
  readonly likely: Day | null;
  readonly latest: Day | null;
}

export type Outlook = Crossing | { readonly none: string; readonly facts: Facts };

/** 90 % point of the normal distribution, what Student's t is widened against. */
const NORMAL_90 = 1.2815515655446004;

interface Target {
  readonly name: string;
  readonly value: number;
}

/** The boundary ahead: B/C from A or B, C/D from C; by ratio ×2.5, then ×6.3, where the baseline is not provisional. */
function boundaryAhead(context: Context, track: Track, look: Look): Target | null {
  const { bc, cd } = look.limits;
  if (look.zone !== null) {
    if (look.zone === 'D') return null;
    const [name, value] = look.zone === 'C' ? (['C/D', cd] as const) : (['B/C', bc] as const);
    return value === null ? null : { name, value };
  }
  const row = pointRow(track, look.reading.day);
  if (
    look.ratioClass === null ||
    look.ratioClass === 'r-D' ||
    row.scale !== 'linear' ||
    !carriesRatio(look.baseline) ||
    look.baseline.provisional
  )
    return null;
  const steps = ratioSteps(context, row.scale);
  const factor = look.ratioClass === 'r-C' ? steps[2] : steps[1];
  return { name: look.ratioClass === 'r-C' ? 'r-C/r-D' : 'r-B/r-C', value: factor * look.baseline.value };
}

interface Segment {
  readonly days: readonly number[];
  readonly logs: readonly number[];
}

/** Readings since the last gap over two intervals, in days and logarithms; null where a repair lies among them. */
function segmentOf(context: Context, track: Track, look: Look): Segment | 'repair' {
  const { scale } = pointRow(track, look.reading.day);
  const readings = [...look.comparable, look.reading];
  const interval = intervalOf(context, track.machine);
  let from = 0;
  readings.forEach((reading, i) => {
    const before = readings[i - 1];
    if (before !== undefined && interval !== null && exceeds(reading.day - before.day, context.policy['5.trend.gap'] * interval)) from = i;
  });
  const kept = readings.slice(from);
  const first = kept[0]?.day ?? 0;
  const isRepaired = track.events.some((e) => e.event !== 'other' && e.event !== 'greasing' && e.day > first && e.day <= look.reading.day);
  if (isRepaired) return 'repair';
  return { days: kept.map((r) => r.day), logs: kept.map((r) => logAmplitude(r.value as number, scale) ?? 0) };
}

/** The outlook of a look; only a real trend that is no plateau has one. */
export function outlookOf(context: Context, track: Track, look: Look, trend: Trend | null): Outlook {
  const none = (why: string, facts: Facts = {}): Outlook => ({ none: why, facts });
  if (trend === null || trend.kind === 'none' || trend.kind === 'small' || trend.kind === 'step') return none('no_trend');
  if (trend.kind === 'plateau') return none('plateau');
  const target = boundaryAhead(context, track, look);
  if (target === null) return none('no_boundary');
  const segment = segmentOf(context, track, look);
  if (segment === 'repair') return none('repair');
  const count = context.policy['6.forecast.count'];
  if (segment.days.length < count) return none('too_few', { readings: segment.days.length, needed: count });
  return crossingOf(context, track, look, target, segment) ?? none('beyond', { days: horizonDays(context, track, segment) });
}

/** No further ahead than the least of the history's length, a year, and the next planned stop. */
function horizonDays(context: Context, track: Track, { days }: Segment): number {
  const last = days[days.length - 1] as number;
  const stop = nextStopOf(context, track.machine, last);
  return Math.min(last - (days[0] as number), context.policy['6.forecast.horizon'], stop === null ? Number.POSITIVE_INFINITY : stop - last);
}

function crossingOf(context: Context, track: Track, look: Look, target: Target, segment: Segment): Crossing | null {
  const { days, logs } = segment;
  const slope = theilSenSlope(days, logs);
  const wanted = logAmplitude(target.value, pointRow(track, look.reading.day).scale);
  if (slope === null || slope <= 0 || wanted === null) return null;
  const last = days[days.length - 1] as number;
  const level = median(days.slice(-3).map((d, i) => (logs[logs.length - Math.min(3, logs.length) + i] as number) - slope * d));
  const [low, high] = residualRange(days, logs, context.policy['6.forecast.range']);
  const horizon = last + horizonDays(context, track, segment);
  const at = (residual: number): Day => Math.max(last, Math.round((wanted - level - residual) / slope));
  const within = (day: Day): Day | null => (day <= horizon ? day : null);
  const earliest = within(at(high));
  return earliest === null ? null : { boundary: target.name, earliest, likely: within(at(0)), latest: within(at(low)) };
}

/** Quantiles of the residuals of readings left out in turn, widened from the normal to Student's t with n − 2 degrees. */
function residualRange(days: readonly number[], logs: readonly number[], range: number): readonly [number, number] {
  const residuals = days.map((day, i) => {
    const [otherDays, otherLogs] = [days.filter((_, j) => j !== i), logs.filter((_, j) => j !== i)];
    const slope = theilSenSlope(otherDays, otherLogs) ?? 0;
    return (logs[i] as number) - slope * day - median(otherDays.map((d, j) => (otherLogs[j] as number) - slope * d));
  });
  const sorted = residuals.sort((a, b) => a - b);
  const quantile = (p: number): number => {
    const at = p * (sorted.length - 1);
    const [below, above] = [sorted[Math.floor(at)] as number, sorted[Math.ceil(at)] as number];
    return below + (above - below) * (at - Math.floor(at));
  };
  const tail = (1 - range) / 2;
  const wider = studentQuantile(1 - tail, sorted.length - 2) / NORMAL_90;
  return [Math.min(0, quantile(tail)) * wider, Math.max(0, quantile(1 - tail)) * wider];
}

/** Rule F1: the likely crossing lies within one interval, or before the next stop. */
export function crossesSoon(context: Context, track: Track, look: Look, outlook: Outlook): boolean {
  if ('none' in outlook || outlook.likely === null) return false;
  const { day } = look.reading;
  const interval = intervalOf(context, track.machine);
  const stop = nextStopOf(context, track.machine, day);
  return (interval !== null && outlook.likely <= day + interval) || (stop !== null && outlook.likely <= stop);
}

/** As the record has it. */
export function forecastLine(context: Context, outlook: Outlook | null): Forecast | null {
  if (outlook === null) return null;
  const { language } = context.plant.settings;
  if ('none' in outlook) return { none: say(language, `assess.forecast.${outlook.none}`, outlook.facts) };
  const text = (day: Day | null): string | null => (day === null ? null : dayText(day));
  return {
    boundary: outlook.boundary,
    earliest: dayText(outlook.earliest),
    likely: text(outlook.likely),
    latest: text(outlook.latest),
    range: context.policy['6.forecast.range'],
  };
}
