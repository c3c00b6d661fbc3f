/**
 * Limit sets. In: published numbers and the plant's own rows. Out: for each quantity one set of boundaries with where it
 * comes from. Never: a number without standard, edition, table and how sure it is.
 */
import type { Detection } from '../measure/detection.ts';
import type { Day } from '../plant/day.ts';
import type { Component, Machine, MeasuredOn, Plant, Series, SurveyKind } from '../plant/types.ts';
import type { Facts } from '../words/facts.ts';

export type LimitBasis = 'maker' | 'contract' | 'statistics' | 'owner' | 'standard';

/** Boundaries of one quantity, in `unit` and `detection`. A standard's set has one of these for each of its quantities. */
export interface LimitSet {
  readonly id: string;
  readonly title: string;
  readonly basis: LimitBasis;
  readonly source: string | null;
  readonly edition: string | null;
  readonly table: string | null;
  /** confirmed: two or more public sources or arithmetic; one source; recalled: from memory; null for the plant's own. */
  readonly confidence: 'confirmed' | 'one source' | 'recalled' | null;
  readonly quantity: string;
  readonly unit: string;
  readonly detection: Detection | null;
  readonly measuredOn: MeasuredOn | null;
  readonly lowHz: number | null;
  readonly highHz: number | null;
  readonly ab: number | null;
  readonly bc: number | null;
  readonly cd: number | null;
  readonly alarm: number | null;
  readonly trip: number | null;
  readonly validFrom: Day | null;
  readonly approvedBy: string | null;
  readonly approvedOn: Day | null;
  readonly published: boolean;
  /** An acceptance limit: one number for a new machine, never chosen by rule. */
  readonly acceptance: boolean;
}

export interface LimitQuestion {
  readonly plant: Plant;
  readonly machine: Machine;
  readonly component: Component;
  readonly series: Series;
  readonly day: Day;
  readonly surveyKind: SurveyKind;
  readonly own: OwnLimits;
}

export interface LimitChoice {
  readonly set: LimitSet | null;
  /** Key of the sentence why this set, or why none, and its facts. */
  readonly rule: string;
  readonly facts: Facts;
  /** Two sets in force at one rank, or a name that no set bears; then `set` is null. */
  readonly conflict: string | null;
  /** Axial reading on a bearing that may carry no thrust: the limits are applied by our choice. */
  readonly byOurChoice: boolean;
}

/** The plant's own rows, indexed once. */
export interface OwnLimits {
  readonly byName: ReadonlyMap<string, readonly LimitSet[]>;
  readonly applied: readonly AppliedSet[];
}

/** A set of the plant's own and what it applies to. */
export interface AppliedSet {
  readonly set: LimitSet;
  readonly machine: string | null;
  readonly component: string | null;
  readonly point: string | null;
  readonly kind: string | null;
}
