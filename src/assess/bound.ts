import { unitFactor } from '../measure/units.ts';

/** The number of a bound as typed (`<0.2`), in the unit of the series; null when there is none or its unit does not convert. */
export function boundNumber(typed: string | null, typedUnit: string | null, unit: string): number | null {
  const digits = (typed ?? '').replace(/^[<>]\s*/, '').trim();
  const value = Number(digits);
  if (digits === '' || !Number.isFinite(value)) return null;
  const factor = typedUnit === null ? 1 : unitFactor(typedUnit, unit);
  return factor === null ? null : value * factor;
}
