import { ACCEPTANCE_SETS } from './acceptance.ts';
import { CLASS_SETS } from './iso10816-1.ts';
import { PUMP_SETS } from './iso10816-7.ts';
import { FAN_SETS } from './iso14694.ts';
import { LARGE_TURBINE_SETS } from './iso20816-2.ts';
import { INDUSTRIAL_SETS, SHAFT_FORMULAS } from './iso20816-3.ts';
import { GEAR_SETS } from './iso20816-9.ts';
import type { LimitSet } from './types.ts';

const ALL: readonly LimitSet[] = [
  ...INDUSTRIAL_SETS,
  ...LARGE_TURBINE_SETS,
  ...PUMP_SETS,
  ...CLASS_SETS,
  ...FAN_SETS,
  ...GEAR_SETS,
  ...ACCEPTANCE_SETS,
];

const BY_ID = new Map<string, LimitSet[]>();
for (const set of ALL) {
  const rows = BY_ID.get(set.id);
  if (rows === undefined) BY_ID.set(set.id, [set]);
  else rows.push(set);
}

const LISTED: readonly LimitSet[] = [...ALL, SHAFT_FORMULAS];

/** Every built-in set, one row a quantity; the shaft formulas stand among them without numbers, for those need a rated speed. */
export const publishedSets = (): readonly LimitSet[] => LISTED;

/** Rows of a built-in set by its id, one a quantity; empty for an unknown id. */
export const publishedById = (id: string): readonly LimitSet[] => BY_ID.get(id) ?? [];

export const publishedIds = (): string[] => [...BY_ID.keys()];
