/** The plant over the surveys: machines by condition, stacked, worst on top, each part told by its letter and its mark. */
import { scaleBand, scaleLinear } from 'd3-scale';
import type { Drawing, Ink, Shape } from './drawing.ts';
import { line, rectangle, round } from './path.ts';
import { fill, label, stroke } from './shapes.ts';

export interface OverTimeInput {
  readonly dates: readonly string[];
  /** By survey: machines in each condition. */
  readonly counts: readonly Readonly<Record<string, number>>[];
  readonly width: number;
  readonly height: number;
  readonly alt: string;
}

const PARTS: readonly { readonly letter: string; readonly conditions: readonly string[]; readonly band: Ink; readonly edge: Ink }[] = [
  { letter: '–', conditions: ['not assessed'], band: 'paper', edge: 'rule' },
  { letter: 'A', conditions: ['A', 'r-A'], band: 'band-a', edge: 'zone-a' },
  { letter: 'B', conditions: ['B', 'r-B'], band: 'band-b', edge: 'zone-b' },
  { letter: 'C', conditions: ['C', 'r-C'], band: 'band-c', edge: 'zone-c' },
  { letter: 'D', conditions: ['D', 'r-D'], band: 'zone-d', edge: 'zone-d' },
];

export function plantOverTime(input: OverTimeInput): Drawing {
  const { width, height, dates } = input;
  const [left, right, top, bottom] = [26, width - 6, 8, height - 18];
  const totals = input.counts.map((c) => Object.values(c).reduce((a, b) => a + b, 0));
  const y = scaleLinear().domain([0, Math.max(1, ...totals)]).range([bottom, top]);
  const x = scaleBand<number>().domain(dates.map((_, i) => i)).range([left, right]).paddingInner(0.28).paddingOuter(0.2);
  const shapes: Shape[] = [];
  const columnWidth = Math.min(x.bandwidth(), 46);
  input.counts.forEach((counts, i) => {
    const at = (x(i) ?? left) + (x.bandwidth() - columnWidth) / 2;
    let below = 0;
    for (const part of PARTS) {
      const count = part.conditions.reduce((sum, c) => sum + (counts[c] ?? 0), 0);
      if (count === 0) continue;
      const [low, high] = [y(below), y(below + count)];
      const d = rectangle(at, high, columnWidth, low - high);
      shapes.push(fill(d, part.band), stroke(d, part.edge, 0.6));
      if (low - high > 7.5 && columnWidth > 14) shapes.push(label(at + columnWidth / 2, (low + high) / 2 + 2.4, `${part.letter} ${count}`, 6.6, 'middle', part.letter === 'D' ? 'paper' : 'ink'));
      below += count;
    }
  });
  let free = -Infinity;
  dates.forEach((date, i) => {
    const at = (x(i) ?? left) + x.bandwidth() / 2;
    if (at - 18 < free) return;
    shapes.push(label(at, height - 6, date, 6.4, 'middle'));
    free = at + 20;
  });
  shapes.push(stroke(line(left, bottom, right, bottom), 'rule', 0.6));
  for (const tick of y.ticks(3).filter((t) => Number.isInteger(t))) shapes.push(label(left - 5, y(tick) + 2.4, String(tick), 6.6, 'end'));
  return { width: round(width), height: round(height), alt: input.alt, shapes };
}
