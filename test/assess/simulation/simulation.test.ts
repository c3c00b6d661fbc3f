/**
 * The figures of the simulation keep the bounds of the assessment rules (section 5 there: 1.4 % of quiet machines flagged, 96 %
 * of ramps and steps found at 4000 machines), and the kept table is what they are now: `npm run simulate` makes it again.
 */
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { figures, tableText } from './figures.ts';

it('every figure lies within its bounds, and the kept table is theirs', () => {
  const rows = figures();
  for (const { name, share, series, bounds } of rows) {
    expect(series, name).toBeGreaterThanOrEqual(2000);
    expect(share, name).toBeGreaterThanOrEqual(bounds[0]);
    expect(share, name).toBeLessThanOrEqual(bounds[1]);
  }
  expect(tableText(rows)).toBe(readFileSync(new URL('table.txt', import.meta.url), 'utf8'));
}, 180_000);
