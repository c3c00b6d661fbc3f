/**
 * Travel: which way a point is going. In: a look. Out: fast, rising, step, steady, falling or held, the first that fits
 * (section 5), and what made it so. Never: a ratio from a baseline of one reading.
 */
import type { Change, Travel, Trend } from '../record/types.ts';
import { carriesRatio } from './baseline.ts';
import { vectorSince } from './change.ts';
import { exceeds, reaches, risesBy } from './exceeds.ts';
import { floorFor } from './floor.ts';
import { crossesSoon, type Outlook, outlookOf } from './forecast.ts';
import { ratio, ratioOfDb, type Scale } from './rise.ts';
import { type Context, doubtedLow, type Look, pointRow, type Track } from './track.ts';
import { lastThreeOverBaseline, trendOf } from './trend.ts';

/** What decided: the last part of the sentence `assess.travel.<travel>.<by>`. */
export type TravelBy =
  | 'forecast'
  | 'change'
  | 'ratio'
  | 'trend'
  | 'baseline'
  | 'baseline ratio'
  | 'last three'
  | 'level'
  | 'vector'
  | 'event'
  | 'second reading'
  | 'doubt'
  | 'first'
  | 'none';

export interface Movement {
  readonly travel: Travel | null;
  readonly by: TravelBy;
  readonly trend: Trend | null;
  readonly vector: Change['vector'];
  readonly outlook: Outlook | null;
  /** Travel without the forecast, where that made it fast (rule F1). */
  readonly without: Travel | null;
}

interface Compared {
  readonly x: number;
  readonly p: number;
  readonly q: number | null;
  readonly scale: Scale;
  /** x is at or above its floor; without a floor no ratio counts. */
  readonly loud: boolean;
  /** x is not below a floor: what a change in units of q asks for. */
  readonly heard: boolean;
  /** The history is long enough to carry a ratio. */
  readonly ratios: boolean;
}

/** Movement of a look as of its survey; travel null for what is only shown (own quantity with neither floor nor limits). */
export function movementOf(context: Context, track: Track, look: Look): Movement {
  const row = pointRow(track, look.reading.day);
  const floor = floorFor(track.series, row, context.policy);
  const vector = vectorSince(context, track, look);
  const readings = [...look.comparable, look.reading] as (typeof look.reading & { value: number })[];
  const last3 = look.baseline === null ? null : lastThreeOverBaseline(readings, look.baseline.value, row.scale);
  const loud = floor !== null && reaches(look.value, floor);
  // After work that brought the reading down, the median of the last three still speaks of what was mended.
  const standsOff = last3 !== null && loud && look.explainedFall === null && reaches(last3, context.policy['5.step.median']);
  const trend = trendOf(readings, row.scale, floor, standsOff, context.policy);
  const outlook = doubtedLow(look) ? null : outlookOf(context, track, look, trend);
  const done = (travel: Travel | null, by: TravelBy): Movement => ({ travel, by, trend, vector, outlook, without: travel });
  if (doubtedLow(look)) return done('held', 'doubt');
  if (look.zone === null && look.ratioClass === null && (floor === null || row.scale === 'none') && look.limits.q === null)
    return done(null, 'none');
  if (look.previous === null) return done(isBad(look) ? 'step' : 'steady', 'first');
  const c: Compared = {
    x: look.value,
    p: look.previous.value as number,
    q: look.limits.q,
    scale: row.scale,
    loud,
    heard: floor === null || loud,
    ratios: row.scale !== 'none' && carriesRatio(look.baseline),
  };
  const up = fast(context, c) ?? rising(context, c, trend) ?? step(context, c, look, standsOff, vector) ?? level(context, c, trend);
  const plain =
    up !== null ? done(up.travel, up.by) : look.explainedFall === null ? done('steady', 'none') : done('falling', look.explainedFall);
  const isNear = plain.travel !== 'fast' && outlook !== null && crossesSoon(context, track, look, outlook);
  return isNear ? { ...plain, travel: 'fast', by: 'forecast' } : plain;
}

const isBad = (look: Look): boolean => look.zone === 'C' || look.zone === 'D' || look.ratioClass === 'r-C' || look.ratioClass === 'r-D';

type Up = { readonly travel: Travel; readonly by: TravelBy } | null;

function fast(context: Context, { x, p, q, scale, loud, ratios }: Compared): Up {
  const { policy } = context;
  const jumped = loud && reaches(ratio(x, p, scale), policy['5.fast.factor']);
  if (q === null) return jumped && ratios ? { travel: 'fast', by: 'ratio' } : null;
  if (risesBy(x, p, policy['5.fast.steps'] * q)) return { travel: 'fast', by: 'change' };
  return jumped && risesBy(x, p, q) ? { travel: 'fast', by: 'ratio' } : null;
}

function rising(context: Context, { x, p, q, scale, loud, ratios }: Compared, trend: Trend | null): Up {
  const { policy } = context;
  if (q !== null && risesBy(x, p, q)) return { travel: 'rising', by: 'change' };
  if (q === null && loud && ratios && reaches(ratio(x, p, scale), policy['5.rising.factor'])) return { travel: 'rising', by: 'ratio' };
  return trend?.kind === 'ramp' && !sagged(context, { x, p, scale }) ? { travel: 'rising', by: 'trend' } : null;
}

/** Too far below the last reading to be part of a rise. */
const sagged = (context: Context, { x, p, scale }: Pick<Compared, 'x' | 'p' | 'scale'>): boolean =>
  exceeds(ratioOfDb(-context.policy['5.rising.sag']), ratio(x, p, scale));

/** A real rise that was one step: the level it reached is carried, though the baseline does not tell it. */
const level = (context: Context, compared: Compared, trend: Trend | null): Up =>
  trend?.kind === 'plateau' && trend.changed_on != null && !sagged(context, compared) ? { travel: 'step', by: 'level' } : null;

function step(
  context: Context,
  { x, q, scale, loud, heard, ratios }: Compared,
  look: Look,
  standsOff: boolean,
  vector: Change['vector'],
): Up {
  const { policy } = context;
  const baseline = look.baseline;
  if (baseline !== null && q !== null && heard && risesBy(x, baseline.value, q)) return { travel: 'step', by: 'baseline' };
  if (baseline !== null && loud && ratios) {
    if (reaches(ratio(x, baseline.value, scale), policy['5.step.factor'])) return { travel: 'step', by: 'baseline ratio' };
    if (standsOff) return { travel: 'step', by: 'last three' };
  }
  return vector !== null && q !== null && exceeds(vector.amplitude, q) ? { travel: 'step', by: 'vector' } : null;
}
