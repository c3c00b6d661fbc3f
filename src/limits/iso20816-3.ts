/** ISO 20816-3:2022, industrial machines; the numbers are those of ISO 10816-3:2009. Quoted second-hand, confirmed by arithmetic. */
import { displacementSet, publishedSet, type Standard, velocitySet } from './published-set.ts';
import type { LimitSet } from './types.ts';

const tables: Standard = {
  source: 'ISO 20816-3 (quoted second-hand)',
  edition: '2022',
  table: 'Tables A.1 and A.2',
  confidence: 'confirmed',
  lowHz: 10,
  highHz: 1000,
};

const GROUPS = [
  { group: 1, support: 'rigid', velocity: [2.3, 4.5, 7.1], displacement: [29, 57, 90] },
  { group: 1, support: 'flexible', velocity: [3.5, 7.1, 11.0], displacement: [45, 90, 140] },
  { group: 2, support: 'rigid', velocity: [1.4, 2.8, 4.5], displacement: [22, 45, 71] },
  { group: 2, support: 'flexible', velocity: [2.3, 4.5, 7.1], displacement: [37, 71, 113] },
] as const;

export const groupSetId = (group: 1 | 2, support: 'rigid' | 'flexible'): string => `iso20816-3-group${group}-${support}`;

export const INDUSTRIAL_SETS: readonly LimitSet[] = GROUPS.flatMap(({ group, support, velocity, displacement }) => {
  const title = `Industrial machines, group ${group}, ${support} support`;
  const id = groupSetId(group, support);
  return [velocitySet(tables, id, title, velocity), displacementSet(tables, id, title, displacement)];
});

const annexB: Standard = {
  source: 'ISO 20816-3, from ISO 7919-3 (quoted second-hand)',
  edition: '2022',
  table: 'Annex B',
  confidence: 'one source',
  lowHz: null,
  highHz: null,
};

export const SHAFT_SPEED_RANGE_RPM = [1000, 30000] as const;

export const SHAFT_SET_ID = 'iso20816-3-shaft';

const SHAFT_ROW = {
  id: SHAFT_SET_ID,
  title: 'Shaft relative vibration, by rated speed',
  quantity: 'displacement',
  unit: 'µm',
  detection: 'true peak-to-peak',
  measuredOn: 'shaft relative',
} as const;

/** The formulas as they stand in the list of sets: their boundaries are numbers only at a rated speed. */
export const SHAFT_FORMULAS: LimitSet = publishedSet(annexB, {
  ...SHAFT_ROW,
  title: 'Shaft relative vibration: A/B 4800/√n, B/C 9000/√n, C/D 13200/√n, n the rated speed in r/min (1000 to 30 000, recalled)',
});

/** Shaft-relative displacement, µm peak-to-peak: 4800, 9000 and 13200 by √n, n the rated speed in r/min. */
export function shaftSet(speedRpm: number): LimitSet {
  const root = Math.sqrt(speedRpm);
  return publishedSet(annexB, {
    ...SHAFT_ROW,
    ab: 4800 / root,
    bc: 9000 / root,
    cd: 13200 / root,
  });
}
