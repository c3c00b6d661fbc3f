/** The record's fixed words and the small objects that several of its lists share. */
import type { Detection } from '../measure/detection.ts';
import type { Mark } from '../plant/policy.ts';
import type { Status as TypedStatus, Urgency } from '../plant/types.ts';
import type { Facts } from '../words/facts.ts';

export type Zone = 'A' | 'B' | 'C' | 'D';
export type RatioClass = 'r-A' | 'r-B' | 'r-C' | 'r-D';
export type Condition = Zone | RatioClass | 'not assessed';
export type Travel = 'fast' | 'rising' | 'step' | 'steady' | 'falling' | 'held';
export type Status = TypedStatus | 'missing';
/** Dates are `YYYY-MM-DD`. */
export type DateText = string;

export const DOUBT_KINDS = [
  'unit-factor',
  'impossible',
  'swapped-points',
  'swapped-machines',
  'identical',
  'near-zero',
  'all-down',
  'unexplained-fall',
  'retake-differs',
  'date',
  'calibration',
  'qualification',
] as const;
export type DoubtKind = (typeof DOUBT_KINDS)[number];

export interface Doubt {
  readonly kind: DoubtKind;
  readonly message: string;
  readonly effect: 'held' | 're-measure' | 'note';
  readonly facts: Facts;
}

export interface Indication {
  readonly rule: string;
  readonly message: string;
  /** What the readings are consistent with, as the message names it; absent in records of older versions. */
  readonly cause?: string;
  readonly confirm: string;
  readonly mark: Mark;
  readonly facts: Facts;
}

export interface SeriesKey {
  readonly component: string;
  readonly point: string;
  readonly quantity: string;
  readonly detection: Detection | null;
}

export interface Override {
  readonly urgency: Urgency;
  readonly by: string;
  readonly reason: string;
  readonly until: DateText | null;
  /** Lowers the level from `now`: listed on the manager's page. */
  readonly lowers_now: boolean;
}
