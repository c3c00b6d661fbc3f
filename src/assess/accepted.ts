import type { Day } from '../plant/day.ts';
import type { Accepted } from '../plant/types.ts';
import { exceeds } from './exceeds.ts';
import type { Track } from './track.ts';

/** True where an accepted deviation speaks of this series. */
export const concernsSeries = (accepted: Accepted, track: Track): boolean =>
  accepted.machine === track.machine.id &&
  (accepted.point === null || accepted.point === track.series.point) &&
  (accepted.quantity === null || accepted.quantity === track.series.quantity);

/** True while it is in force for a value: not above the accepted one, and not past its date. */
export const accepts = (accepted: Accepted, track: Track, value: number, day: Day): boolean =>
  concernsSeries(accepted, track) && (accepted.until === null || day <= accepted.until) && !exceeds(value, accepted.upTo);
