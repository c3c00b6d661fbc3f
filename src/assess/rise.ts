/**
 * How far one reading stands above another, on the scale of the quantity: as a ratio (linear) or in dB differences (dB scale).
 */
export type Scale = 'linear' | 'dB' | 'none';

const DB_PER_NEPER = 20 / Math.LN10;

/** Ratio of two readings; on a dB scale the ratio that their difference stands for. A reference of zero gives ∞ for anything above it. */
export function ratio(value: number, reference: number, scale: Scale): number {
  if (scale === 'dB') return Math.exp((value - reference) / DB_PER_NEPER);
  if (reference === 0) return value === 0 ? 1 : Number.POSITIVE_INFINITY;
  return value / reference;
}

/** Change in dB (20 lg of the ratio); null where a ratio means nothing. */
export function decibelChange(value: number, reference: number, scale: Scale): number | null {
  if (scale === 'dB') return value - reference;
  if (scale === 'none' || value <= 0 || reference <= 0) return null;
  return DB_PER_NEPER * Math.log(value / reference);
}

/** The ratio that a number of dB stands for. */
export const ratioOfDb = (db: number): number => Math.exp(db / DB_PER_NEPER);

/** Natural logarithm of the amplitude, whatever the scale: what trends are computed on. null where there is none. */
export function logAmplitude(value: number, scale: Scale): number | null {
  if (scale === 'dB') return value / DB_PER_NEPER;
  return value > 0 ? Math.log(value) : null;
}

export const dbOfLog = (neper: number): number => neper * DB_PER_NEPER;
