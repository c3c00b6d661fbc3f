/**
 * Floors: below them a ratio raises nothing, for on a very smooth machine ×2.5 of almost nothing is nothing.
 * In: a series and policy. Out: the floor in the series' unit and detection, or null where there is none.
 */
import type { Detection } from '../measure/detection.ts';
import { unitFactor } from '../measure/units.ts';
import type { Policy } from '../plant/policy.ts';
import type { PointRow, Series } from '../plant/types.ts';

/** By how much a sine's calculated figure stands above its r.m.s. value. */
const OF_RMS: Readonly<Record<string, number>> = { rms: 1, 'calculated peak': Math.SQRT2, 'calculated peak-to-peak': 2 * Math.SQRT2 };
/** True figures refer to a true peak: peak-to-peak is twice of it by our own rule. */
const OF_TRUE_PEAK: Readonly<Record<string, number>> = { 'true peak': 1, 'true peak-to-peak': 2 };

/** Floor with its unit by quantity, detection and place, before conversion to the series' unit. */
function floorOf(
  quantity: string,
  detection: Detection,
  shaft: boolean,
  policy: Policy,
): { readonly value: number; readonly unit: string } | null {
  const ofRms = OF_RMS[detection];
  const ofPeak = OF_TRUE_PEAK[detection];
  if (quantity === 'velocity') return ofRms === undefined ? null : { value: policy['2.floor.velocity.rms'] * ofRms, unit: 'mm/s' };
  if (quantity === 'displacement' && shaft) {
    const ofPeakToPeak = ofRms === undefined ? (ofPeak ?? 0) / 2 : ofRms / (2 * Math.SQRT2);
    return ofPeakToPeak === 0 ? null : { value: policy['2.floor.shaft.pkpk'] * ofPeakToPeak, unit: 'µm' };
  }
  if (quantity === 'displacement') return ofRms === undefined ? null : { value: policy['2.floor.displacement.rms'] * ofRms, unit: 'µm' };
  if (quantity !== 'acceleration') return null;
  if (ofRms !== undefined) return { value: policy['2.floor.acceleration.rms'] * ofRms, unit: 'm/s²' };
  return ofPeak === undefined ? null : { value: policy['2.floor.acceleration.peak'] * ofPeak, unit: 'm/s²' };
}

/** Floor of a series in its own unit and detection: the point's own, else the default of the rules, else null. */
export function floorFor(series: Series, row: PointRow, policy: Policy): number | null {
  if (row.floor !== null) return row.floor;
  if (series.detection === null) return null;
  const shaft = row.measuredOn === 'shaft relative' || row.measuredOn === 'shaft absolute';
  const floor = floorOf(series.quantity, series.detection, shaft, policy);
  const factor = floor === null ? null : unitFactor(floor.unit, series.unit);
  return floor === null || factor === null ? null : floor.value * factor;
}
