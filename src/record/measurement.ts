/** One series at the survey, with its history: the record's largest list. */
import type { Detection } from '../measure/detection.ts';
import type { Direction, MeasuredOn, Urgency } from '../plant/types.ts';
import type { Facts } from '../words/facts.ts';
import type { Condition, DateText, Doubt, RatioClass, Status, Travel, Zone } from './terms.ts';

export interface Limits {
  readonly ab: number | null;
  readonly bc: number | null;
  readonly cd: number | null;
  readonly alarm: number | null;
  readonly trip: number | null;
  /** The set's own numbers. */
  readonly of: {
    readonly ab: number | null;
    readonly bc: number | null;
    readonly cd: number | null;
    readonly unit: string;
    readonly detection: Detection | null;
  };
  /** exact: unit conversion only; sine: an r.m.s. set on a calculated peak. */
  readonly by: 'exact' | 'sine';
}

export interface Change {
  readonly absolute: number;
  readonly percent: number | null;
  readonly db: number | null;
  /** Fraction of B/C, signed. */
  readonly of_bc: number | null;
  /** By criterion II; null where there is no B/C. */
  readonly significant: boolean | null;
  readonly vector: { readonly amplitude: number; readonly lag_deg: number } | null;
}

export interface Trend {
  readonly kind: 'none' | 'small' | 'ramp' | 'plateau' | 'step';
  readonly db_per_year: number | null;
  readonly slope_per_year: number | null;
  /** Ratio of the line's end to its start. */
  readonly rise: number | null;
  readonly p: number | null;
  readonly n: number;
  /** First reading of the level that a step reached, and the ratio of that level to the one before it; null where no step was found. */
  readonly changed_on?: DateText | null;
  readonly changed_by?: number | null;
}

export type Forecast =
  | {
      readonly boundary: string;
      readonly earliest: DateText;
      readonly likely: DateText | null;
      readonly latest: DateText | null;
      readonly range: number;
    }
  | { readonly none: string };

/** Columns aligned to `surveys[]`; a null value is no number at that survey. `why` tells, by index, why a reading is not comparable or absent. */
export interface History {
  readonly value: readonly (number | null)[];
  readonly typed?: readonly (string | null)[];
  readonly why: { readonly [index: string]: string };
  readonly line: readonly (number | null)[];
  /** Only where a reading came from another file than its survey's. */
  readonly file?: readonly (string | null)[];
}

export interface RecordMeasurement {
  readonly machine: string;
  readonly component: string;
  readonly point: string;
  readonly location: string | null;
  readonly direction: Direction | null;
  readonly quantity: string;
  readonly unit: string;
  readonly detection: Detection | null;
  readonly measured_on: MeasuredOn | null;
  readonly low_hz: number | null;
  readonly high_hz: number | null;
  readonly state: string | null;
  readonly speed_rpm: number | null;
  readonly load_pct: number | null;
  readonly instrument: string | null;
  readonly measured_by: string | null;
  readonly taken_at: string | null;
  readonly remark: string | null;
  readonly phase: { readonly amplitude: number | null; readonly lag_deg: number; readonly reference: string | null } | null;
  readonly status: Status;
  readonly value: number | null;
  readonly typed: string | null;
  readonly typed_unit: string | null;
  readonly bound: '<' | '>' | null;
  readonly source: { readonly file: string; readonly line: number } | null;
  readonly zone: Zone | null;
  readonly ratio_class: RatioClass | null;
  readonly zone_basis: 'standard' | 'own' | 'ratio' | null;
  readonly no_zone_because: string | null;
  /** e.g. `B/C`; null where no boundary is near. */
  readonly near_boundary: string | null;
  readonly held: { readonly zone: Condition; readonly date: DateText } | null;
  readonly limit_set: string | null;
  readonly limit_reason: string;
  readonly limits: Limits | null;
  readonly baseline: { readonly value: number; readonly from: string; readonly n: number; readonly provisional: boolean } | null;
  readonly previous: { readonly value: number; readonly date: DateText } | null;
  readonly change: Change | null;
  readonly from_baseline: Change | null;
  readonly travel: Travel | null;
  readonly urgency: Urgency | null;
  readonly rule: string | null;
  readonly trend: Trend | null;
  readonly forecast: Forecast | null;
  readonly sisters: Facts | null;
  readonly doubts: readonly Doubt[];
  /** Remarks of the assessment that are no doubt: at most (band), background, band unknown, axial limits by our choice … sentences. */
  readonly notes: readonly string[];
  readonly history: History;
}
