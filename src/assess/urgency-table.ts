/**
 * The urgency table, a project rule. In: zone (or ratio class) and travel, criticality, whether a proven spare stands by.
 * Out: urgency and rule id. Never: anything that lowers a level when a reading rises.
 */
import { type Criticality, URGENCIES, type Urgency } from '../plant/types.ts';
import type { RatioClass, Travel, Zone } from '../record/types.ts';

const N = 'now';
const W = 'within a week';
const M = 'within a month';
const S = 'next planned stop';
const O = 'watch';

type Row = readonly [Urgency | null, Urgency | null, Urgency | null, Urgency | null, Urgency | null, Urgency | null];

/** Columns: critical, essential, general, then the same with a proven spare. */
const TABLE: Readonly<Record<string, Row>> = {
  D1: [N, N, N, N, N, N],
  D2: [N, N, W, W, W, M],
  D3: [N, W, W, W, M, M],
  D4: [N, W, M, W, M, M],
  D5: [W, W, M, M, M, M],
  C1: [N, W, W, W, M, M],
  C2: [W, M, M, M, S, S],
  C3: [M, M, S, S, S, S],
  C4: [M, S, S, S, S, S],
  C5: [S, S, S, S, S, S],
  B1: [W, M, M, M, S, S],
  B2: [M, S, O, S, O, O],
  B3: [S, O, O, O, O, O],
  A1: [M, S, O, S, O, O],
  A2: [S, O, O, O, O, O],
  A3: [O, O, O, O, O, O],
};

const ROW_OF: Readonly<Record<Travel, number>> = { fast: 1, rising: 2, step: 3, steady: 4, falling: 5, held: 4 };
const COLUMN: Readonly<Record<Criticality, number>> = { critical: 0, essential: 1, general: 2 };

export interface Level {
  readonly urgency: Urgency | null;
  /** null where there is no level. */
  readonly rule: string | null;
}

export const NO_LEVEL: Level = { urgency: null, rule: null };

const letterOf = (condition: Zone | RatioClass): string => condition.slice(-1);

/** Level of one zone or class and travel. Never relieved by a spare: D1. */
export function tableLevel(condition: Zone | RatioClass, travel: Travel, criticality: Criticality, spare: boolean): Level {
  const rule = `${letterOf(condition)}${ROW_OF[travel]}`;
  const urgency = TABLE[rule]?.[COLUMN[criticality] + (spare ? 3 : 0)] ?? null;
  return urgency === null ? NO_LEVEL : { urgency, rule };
}

/** Every row of the table with its zone and travel, for print: critical, essential, general, then the same with a proven spare. */
export const tableRows = (): {
  readonly rule: string;
  readonly zone: string;
  readonly travel: Travel;
  readonly levels: readonly (Urgency | null)[];
}[] =>
  Object.entries(TABLE).map(([rule, levels]) => {
    const travel = (Object.keys(ROW_OF) as Travel[]).find((t) => t !== 'held' && ROW_OF[t] === Number(rule[1])) as Travel;
    return { rule, zone: rule[0] as string, travel, levels };
  });

/** Order of urgency, larger is more urgent; null is 0. */
export const weight = (urgency: Urgency | null): number => (urgency === null ? 0 : URGENCIES.length - URGENCIES.indexOf(urgency));

/** The more urgent of two levels; the first where they are equal. */
export const worse = (a: Level, b: Level): Level => (weight(b.urgency) > weight(a.urgency) ? b : a);

/** The less urgent of two levels. */
export const milder = (a: Level, b: Level): Level => (weight(b.urgency) < weight(a.urgency) ? b : a);

/** One order of badness for zones and ratio classes (section 2): D, r-D, C, r-C, B, r-B, A, r-A. */
const BADNESS: readonly (Zone | RatioClass)[] = ['r-A', 'A', 'r-B', 'B', 'r-C', 'C', 'r-D', 'D'];
export const badness = (condition: Zone | RatioClass | null): number => (condition === null ? -1 : BADNESS.indexOf(condition));
