/**
 * Sisters (section 11): machines of one family, read at the same place. In: the looks of the current survey. Out: how far
 * each stands from the median of its sisters; an outlier from six on. Never: a verdict from fewer than six.
 */
import { exceeds, reaches } from './exceeds.ts';
import { dbOfLog, logAmplitude } from './rise.ts';
import type { Sisterhood } from './sisterhood.ts';
import { median } from './statistics/median.ts';
import { type Context, componentRow, doubtedLow, type Look, machineRow, pointRow, type Track } from './track.ts';

/** Makes the median absolute deviation of a normal scatter its standard deviation. */
const MAD_TO_SD = 1.4826;

/** Family, kind, place, direction, state, support, quantity: what must be alike. null without a family. */
function sisterKey(track: Track, look: Look): string | null {
  const { day, state } = look.reading;
  const { family } = machineRow(track.machine, day);
  if (family === null) return null;
  const point = pointRow(track, day);
  const component = componentRow(track, day);
  const { series } = track;
  return [
    family,
    component.kind,
    point.location ?? series.point,
    point.direction,
    state,
    point.support ?? component.support,
    series.quantity,
    series.unit,
    series.detection,
  ].join('\u0000');
}

export function sistersOf(context: Context): Map<Track, Sisterhood> {
  const groups = new Map<string, { readonly track: Track; readonly db: number }[]>();
  for (const track of context.tracks) {
    const look = track.looks[context.current] ?? null;
    if (look === null || doubtedLow(look)) continue;
    const key = sisterKey(track, look);
    const log = key === null ? null : logAmplitude(look.value, pointRow(track, look.reading.day).scale);
    if (key === null || log === null) continue;
    const member = { track, db: dbOfLog(log) };
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [member]);
    else group.push(member);
  }
  const found = new Map<Track, Sisterhood>();
  for (const group of groups.values()) if (group.length > 1) judge(context, group, found);
  return found;
}

function judge(context: Context, group: readonly { readonly track: Track; readonly db: number }[], found: Map<Track, Sisterhood>): void {
  const { policy } = context;
  const middle = median(group.map((g) => g.db));
  const sd = MAD_TO_SD * median(group.map((g) => Math.abs(g.db - middle)));
  for (const { track, db } of group) {
    const above = db - middle;
    const isFar = reaches(above, policy['11.sisters.db']) && exceeds(above, policy['11.sisters.sd'] * sd);
    const place = 1 + group.filter((g) => g.db > db).length;
    found.set(track, { n: group.length, place, dbAboveMedian: above, outlier: group.length >= policy['11.sisters.count'] && isFar });
  }
}
