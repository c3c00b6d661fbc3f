/**
 * Zones. In: a number, boundaries in its own unit and detection, the band it was read in. Out: zone A to D, or why there
 * is none. Never: a zone for a value that the band cannot have seen.
 */
import type { Facts, RatioClass, Zone } from '../record/types.ts';
import { exceeds } from './exceeds.ts';
import type { LimitsInForce } from './limits-in-force.ts';

export interface Boundaries {
  readonly ab: number | null;
  readonly bc: number | null;
  readonly cd: number | null;
}

/**
 * Zone of an unrounded value; exactly on a boundary is the better zone (our choice). Where boundaries are missing the
 * zone is told from those there are: above one, the zone next above it; below the lowest, the zone next below it. With
 * only C/D, a value below it could be anything: null.
 */
export function zoneOf(value: number, limits: Boundaries): Zone | null {
  if (limits.cd !== null && exceeds(value, limits.cd)) return 'D';
  if (limits.bc !== null && exceeds(value, limits.bc)) return 'C';
  if (limits.ab !== null) return exceeds(value, limits.ab) ? 'B' : 'A';
  return limits.bc !== null ? 'B' : null;
}

/** Name of the boundary within `share` of which the value lies, the nearest one, or null. */
export function nearBoundary(value: number, limits: Boundaries, share: number): string | null {
  let found: string | null = null;
  let nearest = share;
  for (const [name, boundary] of [
    ['A/B', limits.ab],
    ['B/C', limits.bc],
    ['C/D', limits.cd],
  ] as const) {
    if (boundary === null || boundary <= 0) continue;
    const distance = Math.abs(value - boundary) / boundary;
    if (!exceeds(distance, nearest)) {
      found = name;
      nearest = distance;
    }
  }
  return found;
}

/** How a reading's band lies to that of the set: a wider one is "at most", a narrower one sees too little. */
export type BandFit = 'covers' | 'wider' | 'narrow-low' | 'narrow-high' | 'unknown';

export interface Band {
  readonly lowHz: number | null;
  readonly highHz: number | null;
}

/** Lower edge that the set needs at this speed: published sets from 10 Hz need 2 Hz up to 600 r/min (ISO 20816-3). */
export function neededLowHz(
  limits: LimitsInForce,
  rpm: number | null,
  slow: { readonly speedRpm: number; readonly lowHz: number },
): number | null {
  const low = limits.set?.lowHz ?? null;
  if (low === null || limits.set?.published !== true || rpm === null || exceeds(rpm, slow.speedRpm)) return low;
  return Math.min(low, slow.lowHz);
}

export function bandFit(band: Band, set: Band): BandFit {
  if (set.lowHz === null && set.highHz === null) return 'covers';
  if (band.lowHz !== null && set.lowHz !== null && exceeds(band.lowHz, set.lowHz)) return 'narrow-low';
  if (band.highHz !== null && set.highHz !== null && exceeds(set.highHz, band.highHz)) return 'narrow-high';
  const lowUnknown = band.lowHz === null && set.lowHz !== null;
  const highUnknown = band.highHz === null && set.highHz !== null;
  if (lowUnknown || highUnknown) return 'unknown';
  const widerLow = band.lowHz !== null && set.lowHz !== null && exceeds(set.lowHz, band.lowHz);
  const widerHigh = band.highHz !== null && set.highHz !== null && exceeds(band.highHz, set.highHz);
  return widerLow || widerHigh ? 'wider' : 'covers';
}

/** Class by ratio to the baseline (or by dB on a dB scale); below the floor r-A, exactly on a step the better class. */
export function ratioClassOf(rise: number, steps: readonly [number, number, number], atFloor: boolean): RatioClass {
  if (!atFloor) return 'r-A';
  if (exceeds(rise, steps[2])) return 'r-D';
  if (exceeds(rise, steps[1])) return 'r-C';
  return exceeds(rise, steps[0]) ? 'r-B' : 'r-A';
}

/** Zone that a bound settles: `>x` when x is already in D, `<x` when x is still in A; else null. */
export function zoneOfBound(bound: '<' | '>', value: number, limits: Boundaries): Zone | null {
  if (bound === '>') return limits.cd !== null && exceeds(value, limits.cd) ? 'D' : null;
  return limits.ab !== null && !exceeds(value, limits.ab) ? 'A' : null;
}

export interface NoZone {
  readonly key: string;
  readonly facts: Facts;
}
