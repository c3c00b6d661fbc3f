/** Every story of the demo plant, the indications it shows, and the machines that stay quiet. */
import { POWER } from './stories-power.ts';
import { PROCESS } from './stories-process.ts';
import type { Story } from './story.ts';

export type { Story };

const YARD: readonly Story[] = [
  {
    machine: 'CT-01',
    at: { point: '3H' },
    reading: { zone: null },
    says: { urgency: null },
    because: 'the fan at 165 r/min needs 2 Hz, the band begins at 10 Hz: never A or B',
  },
  {
    machine: 'RF-01',
    at: { point: '1H' },
    reading: { zone: 'A', travel: 'rising' },
    boundaries: { ab: 6.3, bc: 11.8, cd: 12.5 },
    says: { condition: 'A', urgency: 'watch', rule: 'A2' },
    because: 'BV-3 flexible: 2.1 is A, but it trebled (real trend): A2 general: watch, not missed',
  },
  {
    machine: 'MX-02',
    at: { point: '1H' },
    reading: { zone: 'B', limit_set: 'contract-small' },
    boundaries: { ab: 0.71, bc: 1.8, cd: 4.5 },
    says: { urgency: null },
    because: '11 kW: no part applies; contract limits of class I',
  },
  {
    machine: 'SF-01',
    at: { point: '1H' },
    reading: { zone: 'B', limit_set: 'contract-small' },
    says: { urgency: null },
    because: 'as MX-02',
  },
  {
    machine: 'AF-03',
    at: { point: '1H' },
    reading: { zone: 'D', travel: 'steady' },
    says: { condition: 'D', urgency: 'watch', rule: 'K1' },
    because: '6.1 > 4.5 of G2R, accepted to 6.5 until 2026-12-31: K1',
  },
  {
    machine: 'EL-02',
    at: { point: '1H' },
    reading: { zone: 'A', travel: 'steady' },
    says: { condition: 'A', urgency: null },
    because: 'new: no earlier reading; steady in A',
  },
  {
    machine: 'PK-F1',
    at: { point: '1H' },
    reading: { zone: 'B', travel: 'steady' },
    boundaries: { ab: 0.128058, bc: 0.250549, cd: 0.395307 },
    doubts: [
      ['calibration', 'note'],
      ['qualification', 'note'],
    ],
    because: 'G2F × √2/25.4 in in/s calculated peak: 0.16 is B; instrument due 2026-01-02, certificate ended 2025-12-31',
  },
  {
    machine: 'PK-F1',
    at: { point: '1H', quantity: 'displacement' },
    reading: { zone: 'A' },
    because: '37 µm r.m.s. × 2√2/25.4 = 4.12 mil peak-to-peak: 1.7 is A',
  },
  {
    machine: 'PK-P1',
    at: { point: '1H' },
    reading: { zone: 'A', travel: 'steady' },
    boundaries: { ab: 0.178168 },
    says: { condition: 'A', urgency: null },
    because: 'category II × √2/25.4',
  },
  {
    machine: 'PK-C1',
    at: { point: '1H' },
    reading: { zone: null, ratio_class: 'r-A', travel: 'steady' },
    hollow: { '2025-11-19': 'doubt' },
    says: { urgency: null },
    because: 'screw compressor: ratio only; the doubted file takes no part',
  },
];

/** Sisters of section 11: the spread of the other five is about 0.2 mm/s. */
const SISTERS: readonly Story[] = [
  {
    machine: 'CF-4',
    at: { point: '1H' },
    reading: { zone: null, ratio_class: 'r-A', travel: 'steady' },
    says: { condition: 'r-A', urgency: 'watch', rule: 'S1' },
    because: '5.6 among six sisters of 2.2 to 2.7: over 3.5 robust standard deviations and 20 lg (5.6/2.5) = 7 dB: outlier, at least watch',
  },
  { machine: 'CF-1', says: { condition: 'r-A', urgency: null }, because: 'one of the five that are alike' },
];

/** Slips of earlier surveys: each a case of a doubt of section 7. */
const SLIPS: readonly Story[] = [
  ...[
    ['PK-F1', '2H'],
    ['PK-P1', '1V'],
    ['PK-C1', '2H'],
  ].map(
    ([machine = '', point = '']): Story => ({
      machine,
      survey: '2025-11-19',
      at: { point },
      doubts: [['unit-factor', 'held']],
      reading: { travel: 'held' },
      because: 'the whole file is low by √2: more than 8 readings on 2 machines within 15 % of one another',
    }),
  ),
  {
    machine: 'KB-01',
    survey: '2024-11-20',
    at: { point: '3H' },
    doubts: [['all-down', 'held']],
    reading: { travel: 'held' },
    says: { urgency: null },
    because: '99 % down at every point: stopped, not improved; no level to hold',
  },
  {
    machine: 'SF-01',
    survey: '2025-01-15',
    at: { point: '2H' },
    doubts: [['near-zero', 'held']],
    because: 'about a hundredth of its baseline, speed unknown counts as running',
  },
  {
    machine: 'CF-4',
    survey: '2024-11-20',
    at: { point: '1H' },
    doubts: [['unexplained-fall', 'held'], ['swapped-machines']],
    because: 'CF-2 and CF-4 changed places: exchanged they save about 8 dB each',
  },
  {
    machine: 'JP-1B',
    survey: '2025-01-15',
    at: { point: '3H' },
    doubts: [['swapped-points']],
    because: '3H and 3A changed places, 1.8 against 0.76: 7 dB each way',
  },
  {
    machine: 'FD-01',
    survey: '2024-10-16',
    doubts: [['identical']],
    because: 'all points of the machine equal to those of January to three figures: a copied sheet',
  },
  {
    machine: 'CW-1',
    survey: '2025-02-19',
    at: { point: '2H', quantity: 'displacement' },
    doubts: [['impossible']],
    because: 'displacement at half its size: v/2πd = 66 Hz above a/2πv = 33 Hz',
  },
];

export const STORIES: readonly Story[] = [...POWER, ...PROCESS, ...YARD, ...SISTERS, ...SLIPS];

/** Indications of section 10: one case of each, by machine; survey blank: the last. The numbers behind them stand in cases.test.ts. */
export const INDICATIONS: readonly { readonly rule: string; readonly machine: string; readonly survey?: string }[] = [
  { rule: 'I1', machine: 'LK-01' },
  { rule: 'I2', machine: 'CW-1' },
  { rule: 'I3', machine: 'AF-03' },
  { rule: 'I4', machine: 'BFP-A' },
  { rule: 'I5', machine: 'CR-01' },
  { rule: 'I6', machine: 'DR-01', survey: '2025-11-19' },
  { rule: 'I6', machine: 'DR-01' },
  { rule: 'I7', machine: 'MA-01' },
  { rule: 'I8', machine: 'PW-02' },
  { rule: 'I9', machine: 'LK-01' },
  { rule: 'I10', machine: 'TG-01' },
  { rule: 'I11', machine: 'GP-01' },
];

/** Nothing is wrong with these, and the record must leave them alone. */
export const QUIET = [
  'BFP-B',
  'CF-1',
  'CF-2',
  'CF-3',
  'CF-5',
  'CF-6',
  'CT-01',
  'DG-01',
  'EL-02',
  'JP-1B',
  'KB-01',
  'MX-02',
  'PK-C1',
  'PK-F1',
  'PK-P1',
  'SF-01',
  'VP-01',
] as const;
