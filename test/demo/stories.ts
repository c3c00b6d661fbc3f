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
  readonly says?: { readonly condition?: string; readonly previous_condition?: string; readonly urgency?: string | null; readonly computed_urgency?: string; readonly rule?: string | null; readonly measured_of?: readonly [number, number] };
  readonly at?: { readonly point: string; readonly quantity?: string; readonly detection?: string };
  readonly reading?: { readonly zone?: string | null; readonly ratio_class?: string | null; readonly travel?: string | null; readonly limit_set?: string | null; readonly status?: string };
  readonly boundaries?: { readonly ab?: number; readonly bc?: number; readonly cd?: number };
  /** Effect blank where the rules leave it open. */
  readonly doubts?: readonly (readonly [kind: string, effect?: string])[];
  /** Surveys whose reading takes no part, with a word of the reason. */
  readonly hollow?: { readonly [survey: string]: string };
  readonly action?: { readonly status?: string; readonly overdue_days?: number; readonly times_reported?: number; readonly result?: string; readonly origin?: string; readonly due?: string };
}

const POWER: readonly Story[] = [
  {
    machine: 'TG-01', at: { point: 'T1X', quantity: 'displacement' }, reading: { zone: 'A', travel: 'step' }, says: { urgency: 'watch', rule: 'A3' }, boundaries: { ab: 53.666, bc: 100.623, cd: 147.58 },
    because: 'shaft limits 4800, 9000, 13200/√8000 [std]; level 33 is A; the vector 32∠40° to 31∠115° is √(32² + 31² − 2·32·31·cos 75°) = 38.4 µm above q = 25.2: step [5]; A3 critical: watch',
  },
  {
    machine: 'ID-01', at: { point: '3H' }, reading: { zone: 'A', travel: 'falling' }, says: { condition: 'A', previous_condition: 'D', urgency: null, rule: null }, hollow: { '2024-11-20': 'speed' }, action: { status: 'done', result: 'verified' },
    because: '7.9 is above C/D 7.1 of G1R: D; 1.9 after the balance of 2025-12-03 ≤ 7.9/1.6 with a closing event: falling; below 0.9 × 4.5: verified [8]; 720 r/min is not within 5 % of 985 [3]',
  },
  { machine: 'ID-01', survey: '2025-11-19', at: { point: '3H' }, reading: { zone: 'D', travel: 'fast' }, says: { urgency: 'now', rule: 'D1' }, because: '7.9 − 4.6 = 3.3 above 2q = 2.25: D fast, now' },
  { machine: 'FD-01', at: { point: '3H' }, reading: { zone: 'B', travel: 'step' }, says: { condition: 'B', urgency: 'watch', rule: 'B3' }, because: '2.9 in G1R (315 kW fan) is B; two before it stand 2 dB above the three before them and it is no higher: plateau, so step by 2.9 − 1.2 > q = 1.125 and no rise; B3 essential: watch' },
  {
    machine: 'BFP-A', at: { point: '4H', quantity: 'acceleration' }, reading: { zone: null, ratio_class: 'r-C', travel: 'rising' }, says: { condition: 'r-C', urgency: 'within a week', rule: 'C2' }, action: { origin: 'analyst', due: '2026-01-21' },
    because: '14/4.0 = 3.5: above 2.5, below 6.3: r-C; 14/9 = 1.56 below 1.6, so rising by the trend (ten readings, one pair out of order); C2 critical: within a week; its spare was not measured for three surveys: not proven',
  },
  { machine: 'BFP-A', at: { point: '4H' }, reading: { zone: 'A', travel: 'steady' }, boundaries: { ab: 3.5, bc: 5.0, cd: 7.6 }, because: 'ISO 10816-7 category I above 200 kW; velocity has not moved' },
  { machine: 'BFP-B', says: { urgency: 'within a month', rule: 'M2', measured_of: [0, 10] }, because: 'missed at three surveys in a row, no excuse: essential 3: within a month' },
  { machine: 'DG-01', at: { point: '1H' }, reading: { travel: 'held', status: 'stopped', limit_set: 'diesel-set' }, says: { urgency: null }, because: 'stopped at nine surveys of ten; its interval is a year and it ran on 2025-01-15: not due, the zone is held' },
  { machine: 'CW-1', at: { point: '2H' }, reading: { zone: 'B', travel: 'steady' }, boundaries: { ab: 2.3, bc: 4.5, cd: 7.1 }, says: { condition: 'B', urgency: null }, because: 'H 315 is group 1 although the power is below 300 kW: 3.1 is B, where group 2 would say C' },
  { machine: 'LK-01', at: { point: '3H' }, reading: { zone: 'C', travel: 'steady' }, boundaries: { bc: 2.8, cd: 4.5 }, says: { condition: 'C', urgency: 'within a month', rule: 'C4' }, action: { times_reported: 3 }, because: 'fan of 160 kW: G2R by power; 3.4 is C, steady, critical: C4 within a month; carried unconfirmed and unchanged for three surveys' },
];

const PROCESS: readonly Story[] = [
  { machine: 'JP-1A', at: { point: '3H' }, reading: { zone: 'C', travel: 'steady' }, boundaries: { ab: 3.2, bc: 5.1, cd: 8.5 }, says: { condition: 'C', urgency: 'next planned stop', rule: 'C4' }, action: { due: '2026-03-02' }, because: 'category II to 200 kW: 6.0 is C; steady, essential: next planned stop, with and without the spare' },
  { machine: 'JP-1C', at: { point: '3H' }, reading: { zone: 'D', travel: 'fast' }, says: { condition: 'D', urgency: 'now', rule: 'D1' }, because: '9.1 > 8.5; 9.1 − 2.1 > 2q = 2.55: fast; a spare never relieves D1' },
  { machine: 'PW-02', at: { point: '3H' }, reading: { zone: 'C', travel: 'rising' }, says: { condition: 'C', previous_condition: 'B', urgency: 'within a month', rule: 'C2' }, because: '4.2 × 1.4 = 5.88 > 5.1; the rise of 1.68 is above q = 1.275 and not above 2q: rising; C2 essential' },
  { machine: 'CP-03', at: { point: '3H' }, reading: { zone: 'A', travel: 'held' }, doubts: [['unexplained-fall', 'held']], says: { urgency: 'next planned stop' }, because: '1.9 ≤ 5.7/1.6 and nothing was done: zone as read, the level of the last reading (C4 essential) is held [7, case 14]' },
  { machine: 'EV-02', at: { point: '2H' }, reading: { status: 'no access', travel: 'held' }, says: { urgency: 'within a month', rule: 'M1', previous_condition: 'C' }, because: 'last C4 critical within a month; one miss gives M2 watch: the worse is M1 [case 13]' },
  { machine: 'KB-01', at: { point: '3H' }, reading: { zone: 'B', limit_set: 'blower' }, boundaries: { bc: 9, cd: 14 }, says: { condition: 'B', urgency: null }, because: 'no published zone for a lobe blower; own limits 9 and 14, no A/B: 7.5 is B' },
  { machine: 'KB-01', at: { point: '4H' }, reading: { travel: 'steady' }, says: {}, because: 'the point was DE until 2025: one series by the rename' },
  { machine: 'VP-01', at: { point: '1H' }, reading: { zone: null }, boundaries: { bc: 5.0 }, says: { condition: 'not assessed', urgency: null }, because: 'a band from 10 Hz cannot see 590 r/min where the limits need 2 Hz [1]; B/C is 5.0 since 2025-12-01, approved' },
  { machine: 'VP-01', survey: '2025-11-19', at: { point: '1H' }, reading: { zone: 'A' }, boundaries: { bc: 4.5 }, because: 'before 2025-12-01 the limit was 4.5: the past is judged by the row then in force' },
  { machine: 'AC-01', at: { point: '1H' }, reading: { zone: null, ratio_class: 'r-B', travel: 'step' }, says: { condition: 'r-B', urgency: 'watch', rule: 'B3' }, because: '3.6/2.0 = 1.8: r-B; plateau of the last three: step; B3 essential: watch' },
  { machine: 'GP-01', at: { point: '2H' }, doubts: [['retake-differs', 'note']], reading: { zone: 'B' }, because: '2.60 against 1.95 is a third apart; the last take counts' },
  { machine: 'GP-01', at: { point: '3H', quantity: 'acceleration', detection: 'true peak' }, reading: { ratio_class: 'r-B', travel: 'rising' }, says: { urgency: 'next planned stop', rule: 'B2' }, because: '34/18.2 = 1.87: r-B, and 34/19.2 = 1.77 since last time is above 1.6: rising; B2 essential' },
  { machine: 'CR-01', at: { point: '2A' }, reading: { zone: 'B', travel: 'rising' }, says: { condition: 'B', urgency: 'next planned stop', rule: 'B2' }, action: { status: 'ordered', overdue_days: 61, times_reported: 3 }, because: '3.6 lies between 3.2 and 5.1; real trend: rising; B2 essential; due 2025-11-14 is 61 days before; told at three surveys in three wordings' },
  { machine: 'CR-01', at: { point: '1V' }, doubts: [['date', 'note']], because: 'taken on 2026-01-12, two days before its survey' },
  { machine: 'SB-02', at: { point: '1H' }, reading: { zone: 'D', travel: 'step' }, says: { condition: 'D', urgency: 'within a week', rule: 'D3' }, action: { status: 'rejected' }, because: '5.1 > 4.5 of G2R; plateau since 4.8: step; D3 general; the rejected recommendation stays on the list' },
  { machine: 'DR-01', at: { point: '2V' }, reading: { zone: 'C', travel: 'step' }, says: { condition: 'C', urgency: 'within a month', rule: 'C3' }, because: '3.3 is C of G2R; 3.3 − 2.0 > q = 0.7 over the baseline, nothing since last time: step; C3 essential' },
  { machine: 'MA-01', at: { point: '1H' }, reading: { zone: 'B', travel: 'fast' }, says: { condition: 'B', urgency: 'next planned stop', computed_urgency: 'within a month', rule: 'B1' }, because: '2.5 − 1.0 = 1.5 > 2q = 1.4: fast; B1 essential: within a month; overridden by name, with reason and expiry' },
  { machine: 'SN-03', at: { point: '3H' }, reading: { zone: 'D', travel: 'steady' }, says: { condition: 'D', urgency: 'within a month', rule: 'D4' }, because: '9.0 > 8.5, steady, general: D4 within a month' },
];

const YARD: readonly Story[] = [
  { machine: 'CT-01', at: { point: '3H' }, reading: { zone: null }, says: { urgency: null }, because: 'the fan at 165 r/min needs 2 Hz, the band begins at 10 Hz: never A or B' },
  { machine: 'RF-01', at: { point: '1H' }, reading: { zone: 'A', travel: 'rising' }, boundaries: { ab: 6.3, bc: 11.8, cd: 12.5 }, says: { condition: 'A', urgency: 'watch', rule: 'A2' }, because: 'BV-3 flexible: 2.1 is A, but it trebled (real trend): A2 general: watch, not missed' },
  { machine: 'MX-02', at: { point: '1H' }, reading: { zone: 'B', limit_set: 'contract-small' }, boundaries: { ab: 0.71, bc: 1.8, cd: 4.5 }, says: { urgency: null }, because: '11 kW: no part applies; contract limits of class I' },
  { machine: 'SF-01', at: { point: '1H' }, reading: { zone: 'B', limit_set: 'contract-small' }, says: { urgency: null }, because: 'as MX-02' },
  { machine: 'AF-03', at: { point: '1H' }, reading: { zone: 'D', travel: 'steady' }, says: { condition: 'D', urgency: 'watch', rule: 'K1' }, because: '6.1 > 4.5 of G2R, accepted to 6.5 until 2026-12-31: K1' },
  { machine: 'EL-02', at: { point: '1H' }, reading: { zone: 'A', travel: 'steady' }, says: { condition: 'A', urgency: null }, because: 'new: no earlier reading; steady in A' },
  { machine: 'PK-F1', at: { point: '1H' }, reading: { zone: 'B', travel: 'steady' }, boundaries: { ab: 0.128058, bc: 0.250549, cd: 0.395307 }, doubts: [['calibration', 'note'], ['qualification', 'note']], because: 'G2F × √2/25.4 in in/s calculated peak: 0.16 is B; instrument due 2026-01-02, certificate ended 2025-12-31' },
  { machine: 'PK-F1', at: { point: '1H', quantity: 'displacement' }, reading: { zone: 'A' }, because: '37 µm r.m.s. × 2√2/25.4 = 4.12 mil peak-to-peak: 1.7 is A' },
  { machine: 'PK-P1', at: { point: '1H' }, reading: { zone: 'A', travel: 'steady' }, boundaries: { ab: 0.178168 }, says: { condition: 'A', urgency: null }, because: 'category II × √2/25.4' },
  { machine: 'PK-C1', at: { point: '1H' }, reading: { zone: null, ratio_class: 'r-A', travel: 'steady' }, hollow: { '2025-11-19': 'doubt' }, says: { urgency: null }, because: 'screw compressor: ratio only; the doubted file takes no part' },
];

/** Sisters of section 11: the spread of the other five is about 0.2 mm/s. */
const SISTERS: readonly Story[] = [
  { machine: 'CF-4', at: { point: '1H' }, reading: { zone: null, ratio_class: 'r-A', travel: 'steady' }, says: { condition: 'r-A', urgency: 'watch', rule: 'S1' }, because: '5.6 among six sisters of 2.2 to 2.7: over 3.5 robust standard deviations and 20 lg (5.6/2.5) = 7 dB: outlier, at least watch' },
  { machine: 'CF-1', says: { condition: 'r-A', urgency: null }, because: 'one of the five that are alike' },
];

/** Slips of earlier surveys: each a case of a doubt of section 7. */
const SLIPS: readonly Story[] = [
  ...[['PK-F1', '2H'], ['PK-P1', '1V'], ['PK-C1', '2H']].map(([machine = '', point = '']): Story => ({ machine, survey: '2025-11-19', at: { point }, doubts: [['unit-factor', 'held']], reading: { travel: 'held' }, because: 'the whole file is low by √2: more than 8 readings on 2 machines within 15 % of one another' })),
  { machine: 'KB-01', survey: '2024-11-20', at: { point: '3H' }, doubts: [['all-down', 'held']], reading: { travel: 'held' }, says: { urgency: null }, because: '99 % down at every point: stopped, not improved; no level to hold' },
  { machine: 'SF-01', survey: '2025-01-15', at: { point: '2H' }, doubts: [['near-zero', 'held']], because: 'about a hundredth of its baseline, speed unknown counts as running' },
  { machine: 'CF-4', survey: '2024-11-20', at: { point: '1H' }, doubts: [['unexplained-fall', 'held'], ['swapped-machines']], because: 'CF-2 and CF-4 changed places: exchanged they save about 8 dB each' },
  { machine: 'JP-1B', survey: '2025-01-15', at: { point: '3H' }, doubts: [['swapped-points']], because: '3H and 3A changed places, 1.8 against 0.76: 7 dB each way' },
  { machine: 'FD-01', survey: '2024-10-16', doubts: [['identical']], because: 'all points of the machine equal to those of January to three figures: a copied sheet' },
  { machine: 'CW-1', survey: '2025-02-19', at: { point: '2H', quantity: 'displacement' }, doubts: [['impossible']], because: 'displacement at half its size: v/2πd = 66 Hz above a/2πv = 33 Hz' },
];

export const STORIES: readonly Story[] = [...POWER, ...PROCESS, ...YARD, ...SISTERS, ...SLIPS];

/** Indications of section 10: one case of each, by machine; survey blank: the last. The numbers behind them stand in cases.test.ts. */
export const INDICATIONS: readonly { readonly rule: string; readonly machine: string; readonly survey?: string }[] = [
  { rule: 'I1', machine: 'LK-01' }, { rule: 'I2', machine: 'CW-1' }, { rule: 'I3', machine: 'AF-03' }, { rule: 'I4', machine: 'BFP-A' }, { rule: 'I5', machine: 'CR-01' },
  { rule: 'I6', machine: 'DR-01', survey: '2025-11-19' }, { rule: 'I6', machine: 'DR-01' }, { rule: 'I7', machine: 'MA-01' }, { rule: 'I8', machine: 'PW-02' }, { rule: 'I9', machine: 'LK-01' }, { rule: 'I10', machine: 'TG-01' }, { rule: 'I11', machine: 'GP-01' },
];

/** Nothing is wrong with these, and the record must leave them alone. */
export const QUIET = ['BFP-B', 'CF-1', 'CF-2', 'CF-3', 'CF-5', 'CF-6', 'CT-01', 'DG-01', 'EL-02', 'JP-1B', 'KB-01', 'MX-02', 'PK-C1', 'PK-F1', 'PK-P1', 'SF-01', 'VP-01'] as const;
