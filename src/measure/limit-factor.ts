import type { Detection } from './detection.ts';
import { unitFactor } from './units.ts';

export interface Graduation {
  readonly unit: string;
  readonly detection: Detection | null;
}

/** Calculated figures are r.m.s. times these by definition: they are labelled calculated because they are no more than that. */
const OF_RMS: Partial<Readonly<Record<Detection, number>>> = {
  rms: 1,
  'calculated peak': Math.SQRT2,
  'calculated peak-to-peak': 2 * Math.SQRT2,
};

/**
 * What a limit in `from` is multiplied by to stand in `to`. exact: unit conversion only; sine: also between r.m.s. and the
 * calculated figures. null: units of two quantities, or a true or mean value that nothing can be computed from.
 */
export function limitFactor(from: Graduation, to: Graduation): { readonly factor: number; readonly by: 'exact' | 'sine' } | null {
  const units = unitFactor(from.unit, to.unit);
  if (units === null) return null;
  if (from.detection === to.detection) return { factor: units, by: 'exact' };
  const [a, b] = [from.detection === null ? undefined : OF_RMS[from.detection], to.detection === null ? undefined : OF_RMS[to.detection]];
  return a === undefined || b === undefined ? null : { factor: (units * b) / a, by: 'sine' };
}
