/**
 * The baseline: what a reading is held against. In: the comparable readings before it. Out: the stated value, else the
 * median of the first three; provisional where it does not deserve trust yet.
 */
import { dayText, parseDay } from '../plant/day.ts';
import type { Policy } from '../plant/policy.ts';
import type { Reading } from '../plant/types.ts';
import { lastNewBaseline } from './comparable.ts';
import { exceeds } from './exceeds.ts';
import { ratio } from './rise.ts';
import { median } from './statistics/median.ts';
import { type Baseline, pointRow, type Track } from './track.ts';
import { type Boundaries, zoneOf } from './zone.ts';

/** Null when the plant states none and no earlier reading compares. */
export function baselineFor(
  track: Track,
  current: Reading,
  comparable: readonly (Reading & { value: number })[],
  limits: Boundaries,
  policy: Policy,
): Baseline | null {
  const row = pointRow(track, current.day);
  if (row.baseline !== null && !isStale(track, current, row.baselineFrom)) {
    return { value: row.baseline, from: row.baselineFrom ?? 'stated', n: 0, provisional: false };
  }
  const first = comparable.slice(0, policy['4.baseline.count']);
  if (first.length === 0) return null;
  const values = first.map((r) => r.value);
  const value = median(values);
  const zone = zoneOf(value, limits);
  const wide = exceeds(ratio(Math.max(...values), Math.min(...values), row.scale), policy['4.baseline.spread']);
  return {
    value,
    from: dayText((first[0] as Reading).day),
    n: first.length,
    provisional: first.length < policy['4.baseline.count'] || wide || zone === 'C' || zone === 'D',
  };
}

/** A stated baseline from before the last new baseline says nothing about the machine as it is now. */
function isStale(track: Track, current: Reading, from: string | null): boolean {
  const renewed = lastNewBaseline(track, current.day);
  const stated = from === null ? null : parseDay(from);
  return renewed !== null && stated !== null && stated < renewed;
}

/** True where the baseline may carry a ratio: stated, or from two readings on. */
export const carriesRatio = (baseline: Baseline | null): baseline is Baseline => baseline !== null && baseline.n !== 1;
