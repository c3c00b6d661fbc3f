/** ISO 20816-9:2020, gear units: ratings on a ladder, boundaries one rung below, at, and above the rating. One source. */
import { publishedSet, type Standard, velocitySet } from './published-set.ts';
import type { LimitSet } from './types.ts';

const standard: Standard = {
  source: 'ISO 20816-9 (quoted second-hand)',
  edition: '2020',
  table: 'rating ladder',
  confidence: 'one source',
  lowHz: 10,
  highHz: 1000,
};
/** No band is at hand for acceleration and shaft displacement. */
const unbanded: Standard = { ...standard, table: 'rating ladder', lowHz: null, highHz: null };

export const RATING_LADDER = [2, 3.15, 5, 8, 12.5, 20, 31.5, 50, 80, 125, 200, 315] as const;

/** The rungs about a rating; null for a number that is no rating, or has no rung below or above it. */
function rungs(rating: number): readonly [number, number, number] | null {
  const i = (RATING_LADDER as readonly number[]).indexOf(rating);
  const [below, above] = [RATING_LADDER[i - 1], RATING_LADDER[i + 1]];
  return i < 1 || below === undefined || above === undefined ? null : [below, rating, above];
}

/** Housing velocity by VR rating, mm/s r.m.s. */
export function gearSet(ratingVr: number): LimitSet | null {
  const triple = rungs(ratingVr);
  return triple === null ? null : velocitySet(standard, `iso20816-9-vr${ratingVr}`, `Gear units, rating VR ${ratingVr}`, triple);
}

/** Housing acceleration by AR rating, m/s² peak; by name only. */
function accelerationSet(ratingAr: number): LimitSet | null {
  const triple = rungs(ratingAr);
  if (triple === null) return null;
  const [ab, bc, cd] = triple;
  return publishedSet(unbanded, {
    id: `iso20816-9-ar${ratingAr}`,
    title: `Gear units, rating AR ${ratingAr}`,
    quantity: 'acceleration',
    unit: 'm/s²',
    detection: 'true peak',
    ab,
    bc,
    cd,
  });
}

/** Shaft displacement by DR rating, µm peak-to-peak; by name only. */
function displacementRatingSet(ratingDr: number): LimitSet | null {
  const triple = rungs(ratingDr);
  if (triple === null) return null;
  const [ab, bc, cd] = triple;
  return publishedSet(unbanded, {
    id: `iso20816-9-dr${ratingDr}`,
    title: `Gear units, rating DR ${ratingDr}`,
    quantity: 'displacement',
    unit: 'µm',
    detection: 'true peak-to-peak',
    measuredOn: 'shaft relative',
    ab,
    bc,
    cd,
  });
}

export const GEAR_SETS: readonly LimitSet[] = RATING_LADDER.flatMap((rating) => [
  gearSet(rating),
  accelerationSet(rating),
  displacementRatingSet(rating),
]).filter((set) => set !== null);
