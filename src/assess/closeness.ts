import { ratioSteps } from './look.ts';
import { ratio } from './rise.ts';
import { type Context, type Look, pointRow, type Track } from './track.ts';

/**
 * How near a reading is to the worst: its share of C/D (of B/C × 1.25 where there is no C/D), or of the step to r-D.
 * Absolute tells which of the two it is; null share where there is neither.
 */
export interface Closeness {
  readonly share: number | null;
  readonly absolute: boolean;
}

export function closenessOf(context: Context, track: Track, look: Look | null): Closeness {
  if (look === null) return { share: null, absolute: false };
  const { cd, bc } = look.limits;
  if (look.zone !== null && (cd !== null || bc !== null)) {
    return { share: look.value / (cd ?? (bc as number) * context.policy['4.trip.cap']), absolute: true };
  }
  const row = pointRow(track, look.reading.day);
  if (look.ratioClass === null || look.baseline === null || row.scale === 'none') return { share: null, absolute: false };
  return { share: ratio(look.value, look.baseline.value, row.scale) / ratioSteps(context, row.scale)[2], absolute: false };
}
