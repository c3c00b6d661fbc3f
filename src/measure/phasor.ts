/** A 1× vector: amplitude in any one unit and detection, angle as a lag in degrees. */
export interface Phasor {
  readonly amplitude: number;
  readonly lagDeg: number;
}

const RAD_PER_DEG = Math.PI / 180;

/** The vector from `from` to `to`: its length in their unit and its angle, 0 ≤ lag < 360 (ISO 20816-1:2016 Annex D). */
export function vectorChange(from: Phasor, to: Phasor): Phasor {
  const x = to.amplitude * Math.cos(to.lagDeg * RAD_PER_DEG) - from.amplitude * Math.cos(from.lagDeg * RAD_PER_DEG);
  const y = to.amplitude * Math.sin(to.lagDeg * RAD_PER_DEG) - from.amplitude * Math.sin(from.lagDeg * RAD_PER_DEG);
  const deg = Math.atan2(y, x) / RAD_PER_DEG;
  const lag = deg < 0 ? deg + 360 : deg;
  // A hair below zero rounds to 360, which is 0.
  return { amplitude: Math.hypot(x, y), lagDeg: lag >= 360 ? 0 : lag };
}
