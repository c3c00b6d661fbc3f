/** ISO 20816-2, large turbine and generator sets, bearing housing; the edition of the numbers is not known. */
import { type Standard, velocitySet } from './published-set.ts';
import type { LimitSet } from './types.ts';

const standard: Standard = {
  source: 'ISO 20816-2 (quoted second-hand)',
  edition: 'not known',
  table: 'bearing housing',
  confidence: 'one source',
  lowHz: 10,
  highHz: 1000,
};

export const LARGE_TURBINE_SETS: readonly LimitSet[] = [
  velocitySet(standard, 'iso20816-2-3000', 'Large turbine and generator sets, 3000 or 3600 r/min', [3.8, 7.5, 11.8]),
  velocitySet(standard, 'iso20816-2-1500', 'Large turbine and generator sets, 1500 or 1800 r/min', [2.8, 5.3, 8.5], 'recalled'),
];
