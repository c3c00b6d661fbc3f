import { type Phasor, vectorChange } from '../measure/phasor.ts';
import type { Reading } from '../plant/types.ts';
import type { Change } from '../record/types.ts';
import { whyNotComparable } from './comparable.ts';
import { exceeds, risesBy } from './exceeds.ts';
import { decibelChange, type Scale } from './rise.ts';
import type { Context, Look, Track } from './track.ts';

/** Change from `reference` to `value`, in the unit of the series; significant by criterion II where there is B/C. */
export function changeOf(value: number, reference: number, look: Look, scale: Scale, vector: Change['vector']): Change {
  const { bc, q } = look.limits;
  const absolute = value - reference;
  return {
    absolute,
    percent: reference > 0 && scale !== 'dB' ? (100 * absolute) / reference : null,
    db: decibelChange(value, reference, scale),
    of_bc: bc === null ? null : absolute / bc,
    significant:
      q === null ? null : risesBy(value, reference, q) || risesBy(reference, value, q) || (vector !== null && exceeds(vector.amplitude, q)),
    vector,
  };
}

const phasorOf = (reading: Reading): Phasor | null =>
  reading.phase === null || reading.phase.amplitude === null ? null : { amplitude: reading.phase.amplitude, lagDeg: reading.phase.lagDeg };

/** 1× vector change since the previous reading: both with amplitude and phase to one reference, speeds within 2 %. */
export function vectorSince(context: Context, track: Track, look: Look): Change['vector'] {
  const { previous, reading } = look;
  if (previous === null || reading.phase === null || previous.phase === null) return null;
  if (previous.phase.reference !== reading.phase.reference) return null;
  const options = { speedShare: context.policy['3.speed.vector'], acrossNewBaseline: false };
  if (whyNotComparable(context, track, previous, reading, options) !== null) return null;
  const [from, to] = [phasorOf(previous), phasorOf(reading)];
  if (from === null || to === null) return null;
  const change = vectorChange(from, to);
  return { amplitude: change.amplitude, lag_deg: change.lagDeg };
}
