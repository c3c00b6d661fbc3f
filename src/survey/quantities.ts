/**
 * Quantity, unit and detection as typed in a row, read together. In: three cells. Out: canonical names. Never: a guess.
 */
import { DETECTIONS, type Detection, isKnownQuantity, parseDetection } from '../measure/detection.ts';
import { nearestWord } from '../measure/nearest.ts';
import { nearestUnit, parseUnit, unitsOf } from '../measure/units.ts';
import type { Cells } from './cells.ts';

export type PeakMeans = 'calculated' | 'true' | null;

/** Known quantities in any case; the plant's own word as typed. */
export function quantityOf(text: string): string {
  const folded = text.toLowerCase();
  return isKnownQuantity(folded) ? folded : text;
}

/** Canonical unit of a known quantity, the text itself for a plant's own; null with the problem told. */
export function unitOf(cells: Cells, column: string, text: string, quantity: string): string | null {
  if (!isKnownQuantity(quantity)) return text;
  const unit = parseUnit(text);
  if (unit !== null && unit.quantity === quantity) return unit.symbol;
  const near = nearestUnit(text, quantity);
  const known = `Units of ${quantity}: ${unitsOf(quantity).join(', ')}.`;
  const what = unit === null ? `The unit "${text}" is not known.` : `The unit "${text}" is one of ${unit.quantity}, not of ${quantity}.`;
  cells.error(
    unit === null ? 'unknown-unit' : 'wrong-unit',
    column,
    what,
    near === null || unit !== null ? known : `The nearest is ${near}. ${known}`,
  );
  return null;
}

/** Detection of a row; undefined with the problem told, null where the cell is blank. */
export function detectionOf(cells: Cells, column: string, quantity: string, peakMeans: PeakMeans): Detection | null | undefined {
  const text = cells.text(column);
  if (text === null) return null;
  const parsed = parseDetection(text, peakMeans);
  if (parsed === null) {
    const near = nearestWord(text, DETECTIONS);
    cells.error(
      'unknown-word',
      column,
      `"${column}" is "${text}", which is none of: ${DETECTIONS.join(', ')}.`,
      near === null ? null : `The nearest is "${near}".`,
    );
    return undefined;
  }
  if ('ambiguous' in parsed) {
    cells.error(
      'which-peak',
      column,
      `"${text}" does not say whether the peak was calculated from r.m.s. or truly detected.`,
      'Write "calculated" or "true" before it, or set peak_means in plant.yaml.',
    );
    return undefined;
  }
  if (parsed.detection === 'mean' && (quantity === 'velocity' || quantity === 'acceleration')) {
    cells.error(
      'wrong-detection',
      column,
      `A ${quantity} has no detection "mean": over a cycle it is nothing.`,
      'Give rms, or a peak that says whether it is calculated or true.',
    );
    return undefined;
  }
  return parsed.detection;
}
