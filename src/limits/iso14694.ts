/**
 * ISO 14694:2003, fans in situ, recalled from memory except BV-3 rigid. Start-up, ALARM and SHUTDOWN stand for A/B, B/C and
 * C/D: our own mapping. The standard prints its own peak values beside these; they are not exactly √2 times and never converted.
 */
import { publishedSet, type Standard } from './published-set.ts';
import type { LimitSet } from './types.ts';

const standard: Standard = {
  source: 'ISO 14694 (recalled; start-up, ALARM, SHUTDOWN mapped by our own choice)',
  edition: '2003',
  table: 'in situ',
  confidence: 'recalled',
  lowHz: 10,
  highHz: 1000,
};

const ROWS = [
  { category: 'BV-2', rigid: [5.6, 9.0, null], flexible: [9.0, 14.0, null] },
  { category: 'BV-3', rigid: [4.5, 7.1, 9.0], flexible: [6.3, 11.8, 12.5] },
  { category: 'BV-4', rigid: [2.8, 4.5, 7.1], flexible: [4.5, 7.1, 11.2] },
  { category: 'BV-5', rigid: [1.8, 4.0, 5.6], flexible: [2.8, 5.6, 7.1] },
] as const;

export const fanSetId = (category: string, support: 'rigid' | 'flexible'): string =>
  `iso14694-${category.toLowerCase().replace('-', '')}-${support}`;

export const FAN_SETS: readonly LimitSet[] = ROWS.flatMap((row) =>
  (['rigid', 'flexible'] as const).map((support) => {
    const [ab, bc, cd] = row[support];
    return publishedSet(standard, {
      id: fanSetId(row.category, support),
      title: `Fans in situ, ${row.category}, ${support} mounting`,
      quantity: 'velocity',
      unit: 'mm/s',
      detection: 'rms',
      ab,
      bc,
      cd,
    });
  }),
);
