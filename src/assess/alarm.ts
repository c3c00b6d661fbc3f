import type { Policy } from '../plant/policy.ts';
import { exceeds } from './exceeds.ts';
import type { LimitsInForce } from './limits-in-force.ts';
import type { Baseline } from './track.ts';

/** ALARM and TRIP in the unit and detection of the series. */
export interface AlarmTrip {
  readonly alarm: number | null;
  readonly trip: number | null;
  /** The baseline itself stands above the cap of ALARM. */
  readonly baselineAboveCap: boolean;
}

/**
 * ALARM: the plant's own, else baseline + q and at most 1.25 × B/C; TRIP: the plant's own, else 1.25 × C/D, the most it may
 * be (ISO 10816-3:2009, 5.4.1 and 5.4.2, quoted second-hand).
 */
export function alarmTrip(limits: LimitsInForce, baseline: Baseline | null, policy: Policy): AlarmTrip {
  const cap = limits.bc === null ? null : policy['4.alarm.cap'] * limits.bc;
  const byBaseline = baseline === null || limits.q === null || cap === null ? null : Math.min(baseline.value + limits.q, cap);
  return {
    alarm: limits.alarm ?? byBaseline,
    trip: limits.trip ?? (limits.cd === null ? null : policy['4.trip.cap'] * limits.cd),
    baselineAboveCap: baseline !== null && cap !== null && exceeds(baseline.value, cap),
  };
}
