/** Stories of the power house. */
import type { Story } from './story.ts';

export const POWER: readonly Story[] = [
  {
    machine: 'TG-01',
    at: { point: 'T1X', quantity: 'displacement' },
    reading: { zone: 'A', travel: 'step' },
    says: { urgency: 'watch', rule: 'A3' },
    boundaries: { ab: 53.666, bc: 100.623, cd: 147.58 },
    because:
      'shaft limits 4800, 9000, 13200/√8000 [std]; level 33 is A; the vector 32∠40° to 31∠115° is √(32² + 31² − 2·32·31·cos 75°) = 38.4 µm above q = 25.2: step [5]; A3 critical: watch',
  },
  {
    machine: 'ID-01',
    at: { point: '3H' },
    reading: { zone: 'A', travel: 'falling' },
    says: { condition: 'A', previous_condition: 'D', urgency: null, rule: null },
    hollow: { '2024-11-20': 'speed' },
    action: { status: 'done', result: 'verified' },
    because:
      '7.9 is above C/D 7.1 of G1R: D; 1.9 after the balance of 2025-12-03 ≤ 7.9/1.6 with a closing event: falling; below 0.9 × 4.5: verified [8]; 720 r/min is not within 5 % of 985 [3]',
  },
  {
    machine: 'ID-01',
    survey: '2025-11-19',
    at: { point: '3H' },
    reading: { zone: 'D', travel: 'fast' },
    says: { urgency: 'now', rule: 'D1' },
    because: '7.9 − 4.6 = 3.3 above 2q = 2.25: D fast, now',
  },
  {
    machine: 'FD-01',
    at: { point: '3H' },
    reading: { zone: 'B', travel: 'step' },
    says: { condition: 'B', urgency: 'watch', rule: 'B3' },
    because:
      '2.9 in G1R (315 kW fan) is B; two before it stand 2 dB above the three before them and it is no higher: plateau, so step by 2.9 − 1.2 > q = 1.125 and no rise; B3 essential: watch',
  },
  {
    machine: 'BFP-A',
    at: { point: '4H', quantity: 'acceleration' },
    reading: { zone: null, ratio_class: 'r-C', travel: 'rising' },
    says: { condition: 'r-C', urgency: 'within a week', rule: 'C2' },
    action: { origin: 'analyst', due: '2026-01-21' },
    because:
      '14/4.0 = 3.5: above 2.5, below 6.3: r-C; 14/9 = 1.56 below 1.6, so rising by the trend (ten readings, one pair out of order); C2 critical: within a week; its spare was not measured for three surveys: not proven',
  },
  {
    machine: 'BFP-A',
    at: { point: '4H' },
    reading: { zone: 'A', travel: 'steady' },
    boundaries: { ab: 3.5, bc: 5.0, cd: 7.6 },
    because: 'ISO 10816-7 category I above 200 kW; velocity has not moved',
  },
  {
    machine: 'BFP-B',
    says: { urgency: 'within a month', rule: 'M2', measured_of: [0, 10] },
    because: 'missed at three surveys in a row, no excuse: essential 3: within a month',
  },
  {
    machine: 'DG-01',
    at: { point: '1H' },
    reading: { travel: 'held', status: 'stopped', limit_set: 'diesel-set' },
    says: { urgency: null },
    because: 'stopped at nine surveys of ten; its interval is a year and it ran on 2025-01-15: not due, the zone is held',
  },
  {
    machine: 'CW-1',
    at: { point: '2H' },
    reading: { zone: 'B', travel: 'steady' },
    boundaries: { ab: 2.3, bc: 4.5, cd: 7.1 },
    says: { condition: 'B', urgency: null },
    because: 'H 315 is group 1 although the power is below 300 kW: 3.1 is B, where group 2 would say C',
  },
  {
    machine: 'LK-01',
    at: { point: '3H' },
    reading: { zone: 'C', travel: 'steady' },
    boundaries: { bc: 2.8, cd: 4.5 },
    says: { condition: 'C', urgency: 'within a month', rule: 'C4' },
    action: { times_reported: 3 },
    because:
      'fan of 160 kW: G2R by power; 3.4 is C, steady, critical: C4 within a month; carried unconfirmed and unchanged for three surveys',
  },
];
