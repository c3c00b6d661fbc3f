/** ISO 10816-7:2009, rotodynamic pumps above 1 kW, any support. Quoted second-hand from one source. */
import { type Standard, velocitySet } from './published-set.ts';
import type { LimitSet } from './types.ts';

const standard: Standard = {
  source: 'ISO 10816-7 (quoted second-hand)',
  edition: '2009',
  table: 'zones by category and power',
  confidence: 'one source',
  lowHz: 10,
  highHz: 1000,
};

export const pumpSetId = (category: 'I' | 'II', above200kW: boolean): string =>
  `iso10816-7-category${category === 'I' ? 1 : 2}-${above200kW ? 'above' : 'to'}-200kW`;

export const PUMP_SETS: readonly LimitSet[] = [
  velocitySet(standard, pumpSetId('I', false), 'Rotodynamic pumps, category I, up to 200 kW', [2.5, 4.0, 6.6]),
  velocitySet(standard, pumpSetId('I', true), 'Rotodynamic pumps, category I, above 200 kW', [3.5, 5.0, 7.6]),
  velocitySet(standard, pumpSetId('II', false), 'Rotodynamic pumps, category II, up to 200 kW', [3.2, 5.1, 8.5]),
  velocitySet(standard, pumpSetId('II', true), 'Rotodynamic pumps, category II, above 200 kW', [4.2, 6.1, 9.5]),
];
