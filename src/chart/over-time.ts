/**
 * The plant over the surveys. In: machines by condition at each survey. Out: columns, worst on top; each part is told by its
 * letter, by its place and by its filling after the marks: A empty, B dotted, C filled in part, D full.
 */
import { scaleBand, scaleLinear } from 'd3-scale';
import type { Drawing, Ink, Shape } from './drawing.ts';
import { apart } from './history.ts';
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

interface Part {
  readonly letter: string;
  readonly conditions: readonly string[];
  readonly band: Ink;
  readonly edge: Ink;
}

const PARTS: readonly Part[] = [
  { letter: '–', conditions: ['not assessed'], band: 'paper', edge: 'rule' },
  { letter: 'A', conditions: ['A', 'r-A'], band: 'paper', edge: 'zone-a' },
  { letter: 'B', conditions: ['B', 'r-B'], band: 'band-b', edge: 'zone-b' },
  { letter: 'C', conditions: ['C', 'r-C'], band: 'band-c', edge: 'zone-c' },
  { letter: 'D', conditions: ['D', 'r-D'], band: 'zone-d', edge: 'zone-d' },
];

const SIZE = 6.6;
const WIDEST = 40;
/** From the middle of a date to the middle of the next. */
const DATE_ROOM = 38;
/** A part as tall and wide as this has its letter and count inside. */
const ROOM = { height: 9, width: 17 };

interface Column {
  readonly left: number;
  readonly width: number;
  readonly counts: Readonly<Record<string, number>>;
}

export function plantOverTime(input: OverTimeInput): Drawing {
  const { width, height, dates } = input;
  const [left, right, top, bottom] = [26, width - 26, 6, height - 18];
  const totals = input.counts.map((c) => Object.values(c).reduce((a, b) => a + b, 0));
  const y = scaleLinear()
    .domain([0, Math.max(1, ...totals)])
    .range([bottom, top]);
  const x = scaleBand<number>()
    .domain(dates.map((_, i) => i))
    .range([left, right])
    .paddingInner(0.28)
    .paddingOuter(0.2);
  const columnWidth = Math.min(x.bandwidth(), WIDEST);
  const shapes: Shape[] = [];
  const columns = input.counts.map(
    (counts, i): Column => ({ left: (x(i) ?? left) + (x.bandwidth() - columnWidth) / 2, width: columnWidth, counts }),
  );
  for (const column of columns) shapes.push(...columnShapes(column, y));
  const last = columns[columns.length - 1];
  if (last !== undefined) shapes.push(...lettersBeside(last, y, top));
  const middles = columns.map((column) => column.left + column.width / 2);
  for (const i of labelled(middles)) shapes.push(label(middles[i] ?? 0, height - 6, dates[i] ?? '', SIZE - 0.2, 'middle'));
  shapes.push(stroke(line(left, bottom, right, bottom), 'rule', 0.6));
  for (const tick of y.ticks(3).filter(Number.isInteger)) shapes.push(label(left - 5, y(tick) + 2.4, String(tick), SIZE, 'end'));
  return { width: round(width), height: round(height), alt: input.alt, shapes };
}

/** Columns whose date is printed: the last one always, those before it where they have room. */
function labelled(middles: readonly number[]): number[] {
  const out: number[] = [];
  const last = middles.length - 1;
  for (const [i, at] of middles.entries()) {
    const before = middles[out[out.length - 1] ?? -1] ?? Number.NEGATIVE_INFINITY;
    if (i === last || (at - before >= DATE_ROOM && (middles[last] ?? at) - at >= DATE_ROOM)) out.push(i);
  }
  return out;
}

interface Drawn {
  readonly part: Part;
  readonly count: number;
  /** Edges of the part, y downwards. */
  readonly low: number;
  readonly high: number;
}

function partsOf(counts: Column['counts'], y: (value: number) => number): Drawn[] {
  let below = 0;
  return PARTS.flatMap((part) => {
    const count = part.conditions.reduce((sum, c) => sum + (counts[c] ?? 0), 0);
    if (count === 0) return [];
    const drawn = { part, count, low: y(below), high: y(below + count) };
    below += count;
    return [drawn];
  });
}

function columnShapes({ left, width, counts }: Column, y: (value: number) => number): Shape[] {
  return partsOf(counts, y).flatMap((drawn) => {
    const { part, count, low, high } = drawn;
    const d = rectangle(left, high, width, low - high);
    const shapes: Shape[] = [fill(d, part.band), ...filling(part, left, width, low, high), stroke(d, part.edge, 0.6)];
    if (!hasRoom(drawn, width)) return shapes;
    const middle = part.letter === 'C' ? left + width * 0.61 : left + width / 2;
    if (part.letter === 'B') shapes.push(fill(rectangle(middle - 9, (low + high) / 2 - 4.2, 18, 8.4), part.band));
    return [
      ...shapes,
      label(middle, (low + high) / 2 + 2.4, `${part.letter} ${count}`, SIZE, 'middle', part.letter === 'D' ? 'paper' : 'ink'),
    ];
  });
}

/** Dots of B as rows of short dashes; the filled side of C. */
function filling(part: Part, left: number, width: number, low: number, high: number): Shape[] {
  if (part.letter === 'C') return [fill(rectangle(left, high, width * 0.22, low - high), 'zone-c')];
  if (part.letter !== 'B') return [];
  const rows: Shape[] = [];
  for (let at = low - 2.5; at > high + 1.5; at -= 4) rows.push(stroke(line(left + 2, at, left + width - 1, at), 'zone-b', 0.8, [0.8, 3.4]));
  return rows;
}

const hasRoom = ({ low, high }: Drawn, width: number): boolean => low - high >= ROOM.height && width >= ROOM.width;

/** Letters at the right of the last column for its parts that have no room inside, so that the thinnest has one. */
function lettersBeside(column: Column, y: (value: number) => number, top: number): Shape[] {
  const parts = partsOf(column.counts, y).filter((drawn) => !hasRoom(drawn, column.width));
  const at = apart(
    parts.map(({ low, high }) => (low + high) / 2 + 2.4),
    SIZE,
    top + 2,
  );
  return parts.map(({ part, count }, i) => label(column.left + column.width + 4, at[i] ?? 0, `${part.letter} ${count}`, SIZE));
}
