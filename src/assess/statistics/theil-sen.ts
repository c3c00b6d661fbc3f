import { median } from './median.ts';

/**
 * Theil–Sen slope (Theil 1950, Sen 1968): the median of the slopes between all pairs with different x.
 * null when no two x differ.
 */
export function theilSenSlope(x: readonly number[], y: readonly number[]): number | null {
  const slopes: number[] = [];
  for (let i = 0; i < x.length; i += 1) {
    for (let j = i + 1; j < x.length; j += 1) {
      const dx = (x[j] as number) - (x[i] as number);
      if (dx !== 0) slopes.push(((y[j] as number) - (y[i] as number)) / dx);
    }
  }
  return slopes.length === 0 ? null : median(slopes);
}
