/**
 * What the record of Marrow Fen must say, worked out by hand from the rules of the assessment (numbers of its sections in brackets).
 * G1R = 2.3/4.5/7.1, G1F = 3.5/7.1/11, G2R = 1.4/2.8/4.5 and so on: A/B, B/C, C/D of ISO 20816-3 in mm/s r.m.s.; q = a quarter of B/C [2].
 * Survey blank: the last one.
 */
export interface Story {
  readonly machine: string;
  readonly survey?: string;
  /** Why it must come out so. */
  readonly because: string;
  readonly says?: {
    readonly condition?: string;
    readonly previous_condition?: string;
    readonly urgency?: string | null;
    readonly computed_urgency?: string;
    readonly rule?: string | null;
    readonly measured_of?: readonly [number, number];
  };
  readonly at?: { readonly point: string; readonly quantity?: string; readonly detection?: string };
  readonly reading?: {
    readonly zone?: string | null;
    readonly ratio_class?: string | null;
    readonly travel?: string | null;
    readonly limit_set?: string | null;
    readonly status?: string;
  };
  readonly boundaries?: { readonly ab?: number; readonly bc?: number; readonly cd?: number };
  /** Effect blank where the rules leave it open. */
  readonly doubts?: readonly (readonly [kind: string, effect?: string])[];
  /** Surveys whose reading takes no part, with a word of the reason. */
  readonly hollow?: { readonly [survey: string]: string };
  readonly action?: {
    readonly status?: string;
    readonly overdue_days?: number;
    readonly times_reported?: number;
    readonly result?: string;
    readonly origin?: string;
    readonly due?: string;
  };
}
