/** One action of the record: what is to be done, why, by when, and whether it worked. */
import type { Urgency } from '../plant/types.ts';
import type { Facts } from '../words/facts.ts';
import type { DateText, Override } from './terms.ts';

export interface RecordAction {
  readonly rank: number;
  readonly action: string;
  readonly finding: string | null;
  readonly machine: string;
  readonly component: string | null;
  readonly points: readonly string[];
  /** null: an analyst's finding that no reading raises. */
  readonly urgency: Urgency | null;
  readonly computed_urgency: Urgency | null;
  readonly rule: string | null;
  readonly reason: string;
  readonly facts: Facts;
  readonly above_next_because: string | null;
  readonly observation: string | null;
  readonly likely_cause: string | null;
  readonly less_likely: string | null;
  readonly confidence: 'low' | 'medium' | 'high' | null;
  readonly downtime_h: number | null;
  readonly parts: string | null;
  readonly recommendation: string | null;
  readonly check_first: string | null;
  readonly needs_stop: boolean | null;
  readonly consequence: string | null;
  readonly due: DateText | null;
  readonly owner: string | null;
  readonly work_order: string | null;
  readonly status: 'open' | 'ordered' | 'done' | 'rejected';
  readonly origin: 'analyst' | 'ledger' | 'drafted';
  readonly raised: DateText | null;
  readonly closed: DateText | null;
  readonly closed_by: string | null;
  readonly as_found: string | null;
  readonly times_reported: number;
  readonly overdue_days: number | null;
  readonly carried_from: string | null;
  readonly confirmed: DateText | null;
  readonly override: Override | null;
  readonly verification: {
    readonly target: { readonly point: string; readonly quantity: string; readonly value: number; readonly unit: string } | null;
    readonly before: { readonly value: number; readonly date: DateText } | null;
    readonly after: { readonly value: number; readonly date: DateText } | null;
    readonly result: 'verified' | 'not verified' | 'not yet measured';
  } | null;
  /** The reading the action is about, for the work list. */
  readonly value: number | null;
  readonly unit: string | null;
  readonly limit: number | null;
  readonly notes: string | null;
}
