/** ISO 10816-1:1995 Annex B, the classes of ISO 2372:1974; withdrawn, but still met in contracts. By name only: a class is not a group. */
import { type Standard, velocitySet } from './published-set.ts';
import type { LimitSet } from './types.ts';

const standard: Standard = {
  source: 'ISO 10816-1 (withdrawn; quoted second-hand)',
  edition: '1995',
  table: 'Annex B',
  confidence: 'confirmed',
  lowHz: 10,
  highHz: 1000,
};

export const CLASS_SETS: readonly LimitSet[] = [
  velocitySet(standard, 'iso10816-1-class1', 'Class I, small machines, motors to 15 kW', [0.71, 1.8, 4.5]),
  velocitySet(standard, 'iso10816-1-class2', 'Class II, medium machines, 15 to 75 kW, to 300 kW on special foundations', [1.12, 2.8, 7.1]),
  velocitySet(standard, 'iso10816-1-class3', 'Class III, large machines on rigid heavy foundations', [1.8, 4.5, 11.2]),
  velocitySet(standard, 'iso10816-1-class4', 'Class IV, large machines on soft foundations', [2.8, 7.1, 18]),
];
