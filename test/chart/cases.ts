/** Drawings for the tests of this folder: each kind, plain and at its edges. */
import type { Drawing } from '../../src/chart/drawing.ts';
import { historyChart } from '../../src/chart/history.ts';
import { plantOverTime } from '../../src/chart/over-time.ts';
import { polarPlot } from '../../src/chart/polar.ts';
import type { HistoryInput } from '../../src/chart/series.ts';
import { type SparklineInput, sparkline } from '../../src/chart/sparkline.ts';
import { zoneMark } from '../../src/chart/zone-mark.ts';

export const LIMITS = { ab: 1.4, bc: 2.8, cd: 4.5 };
export const RISING = [1.1, 1.2, 1.15, 1.3, 1.4, 1.5, 1.9, 2.2, 2.6, 3.1, 3.9, 5.1];
export const DATES = [
  '2023-01-10',
  '2023-04-11',
  '2023-07-11',
  '2023-10-10',
  '2024-01-09',
  '2024-04-09',
  '2024-07-09',
  '2024-10-08',
  '2025-01-07',
  '2025-04-08',
  '2025-07-08',
  '2025-10-07',
];
export const all = (n: number): boolean[] => Array.from({ length: n }, () => true);

export const spark = (change: Partial<SparklineInput> = {}): Drawing => {
  const values = change.values ?? RISING;
  return sparkline({ values, comparable: all(values.length), held: false, newBaselineAt: [], ...LIMITS, alt: 'DE1H velocity', ...change });
};

export const history = (change: Partial<HistoryInput> = {}): Drawing => {
  const values = change.values ?? RISING;
  return historyChart({
    dates: DATES,
    values,
    comparable: all(values.length),
    held: false,
    ...LIMITS,
    alarm: 3.5,
    baseline: 1.2,
    unit: 'mm/s r.m.s.',
    width: 490,
    height: 170,
    alt: 'DE1H velocity.',
    events: [
      { date: '2024-05-02', label: 'balance' },
      { date: '2024-08-20', label: 'overhaul', newBaseline: true },
    ],
    ...change,
  });
};

export const polar = (from: [number, number] | null, to: [number, number] | null, q: number | null): Drawing =>
  polarPlot({
    from: from && { amplitude: from[0], lagDeg: from[1] },
    to: to && { amplitude: to[0], lagDeg: to[1] },
    q,
    unit: 'mm/s r.m.s.',
    size: 170,
    alt: '1× vector',
  });

export const columns = (counts: readonly Readonly<Record<string, number>>[]): Drawing =>
  plantOverTime({ dates: counts.map((_, i) => DATES[i % 12] as string), counts, width: 490, height: 120, alt: 'Machines by condition' });

const NOWHERE = { ab: null, bc: null, cd: null };

export const CASES: Readonly<Record<string, () => Drawing>> = {
  sparkline: () => spark(),
  'sparkline new baseline': () => spark({ newBaselineAt: [6] }),
  'sparkline hollow': () => spark({ comparable: RISING.map((_, i) => i !== 2 && i !== 5 && i !== 11) }),
  'sparkline held': () => spark({ held: true, values: [...RISING.slice(0, 10), null, null] }),
  'sparkline one reading': () => spark({ values: [2.2] }),
  'sparkline empty': () => spark({ values: [] }),
  'sparkline flat zero': () => spark({ values: [0, 0, 0] }),
  'sparkline no limits': () => spark(NOWHERE),
  'sparkline large range': () => spark({ values: [0.001, 0.1, 300, 2, 4000, 1] }),
  history: () => history(),
  'history held, earlier ones hollow': () =>
    history({ held: true, comparable: RISING.map((_, i) => i > 5), values: [...RISING.slice(0, 11), null] }),
  'history one reading': () => history({ dates: ['2026-01-14'], values: [2.2], events: [] }),
  'history no limits': () => history({ ...NOWHERE, alarm: null, baseline: null, events: [] }),
  'history crowded': () => history({ values: RISING.map((v) => v * 40), events: DATES.map((date) => ({ date, label: 'sensor moved' })) }),
  'history forecast': () =>
    history({
      values: RISING.map((v) => v * 0.7),
      forecast: { boundary: 'C/D', value: 4.5, earliest: '2026-01-20', latest: '2026-08-01' },
    }),
  'history forecast open': () =>
    history({ values: RISING.map((v) => v * 0.7), forecast: { boundary: 'C/D', value: 4.5, earliest: '2026-01-20', latest: null } }),
  'history empty': () => history({ dates: [], values: [], events: [] }),
  polar: () => polar([1.2, 40], [2.1, 110], 0.7),
  'polar now alone': () => polar(null, [1, 355], 0.7),
  'polar none': () => polar(null, null, null),
  'polar q wider than the sheet': () => polar([1, 180], [1, 180], 40),
  'over time': () =>
    columns(Array.from({ length: 8 }, (_, i) => ({ A: 10 - i, B: 12, C: 3 + i, D: i > 5 ? 2 : 0, 'r-A': 4, 'not assessed': 2 }))),
  'over time one machine': () => columns([{ A: 1 }]),
  'over time forty surveys': () => columns(Array.from({ length: 40 }, (_, i) => ({ A: 200 + i, D: 1 }))),
  'over time empty': () => columns([]),
  ...Object.fromEntries(['A', 'B', 'C', 'D', 'r-A', 'r-B', 'r-C', 'r-D', 'not assessed'].map((c) => [`mark ${c}`, () => zoneMark(c, 9)])),
};
