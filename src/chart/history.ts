/** A series over the years: zone bands with letters, ALARM, baseline, events, dates. */
import { scaleLinear } from 'd3-scale';
import { dayText, parseDay } from '../plant/day.ts';
import type { Drawing, Shape } from './drawing.ts';
import { circle, line, round } from './path.ts';
import { bands, type Frame, runShapes, runsOf, type SeriesInput, topValue, valueScale } from './series.ts';
import { fill, label, stroke } from './shapes.ts';

export interface HistoryInput extends Omit<SeriesInput, 'newBaselineAt'> {
  /** `YYYY-MM-DD` by survey. */
  readonly dates: readonly string[];
  readonly alarm: number | null;
  readonly baseline: number | null;
  readonly events: readonly { readonly date: string; readonly label: string; readonly newBaseline?: boolean }[];
  readonly unit: string;
  readonly width: number;
  readonly height: number;
  readonly alt: string;
}

const SIZE = 7;

export function historyChart(input: HistoryInput): Drawing {
  const { width, height } = input;
  const frame: Frame = { left: 30, top: 16, right: width - 46, bottom: height - 28 };
  const days = input.dates.map((d) => parseDay(d) ?? 0);
  const first = Math.min(...days);
  const last = Math.max(...days);
  const time = scaleLinear().domain([first, Math.max(last, first + 1)]).range([frame.left + 8, frame.right - 8]);
  const x = (index: number): number => (first === last ? (frame.left + frame.right) / 2 : time(days[index] ?? first));
  const top = topValue({ ...input, newBaselineAt: [] }, [input.baseline]);
  const y = valueScale(top, frame);
  const newBaselineAt = input.events.filter((e) => e.newBaseline === true).map((e) => days.findIndex((d) => d >= (parseDay(e.date) ?? 0)));
  const { runs, hollow, last: end } = runsOf({ ...input, newBaselineAt }, x, y);
  const shapes: Shape[] = [
    ...bands({ ...input, newBaselineAt: [] }, y, frame, top),
    ...valueAxis(top, y, frame, input.unit),
    ...limitLines(input, y, frame, top),
    ...dateAxis(days, x, frame),
    ...eventTicks(input, first, last, (day) => time(day), frame),
    ...runShapes(runs, 1.1, 1.4),
  ];
  for (const run of runs) for (const p of run) if (p !== end) shapes.push(fill(circle(p.x, p.y, 1.5), 'ink'));
  for (const p of hollow) if (p !== end) shapes.push(stroke(circle(p.x, p.y, 2), 'quiet', 0.8));
  if (end !== null) {
    if (input.held) shapes.push(stroke(line(end.x, end.y, Math.min(frame.right, end.x + 24), end.y), 'quiet', 0.9, [2, 2]));
    shapes.push(input.held || hollow.includes(end) ? stroke(circle(end.x, end.y, 2.6), 'teal', 1.1) : fill(circle(end.x, end.y, 2.7), 'teal'));
  }
  return { width: round(width), height: round(height), alt: input.alt, shapes };
}

const plain = (value: number): string => String(Math.round(value * 1000) / 1000);

function valueAxis(top: number, y: (v: number) => number, frame: Frame, unit: string): Shape[] {
  const ticks = scaleLinear().domain([0, top]).ticks(4);
  return [
    label(2, 9, unit, SIZE),
    ...ticks.map((tick) => label(frame.left - 5, y(tick) + SIZE * 0.35, plain(tick), SIZE, 'end')),
    stroke(line(frame.left, frame.bottom, frame.right, frame.bottom), 'rule', 0.6),
  ];
}

/** Boundaries and ALARM are named at the right; labels that would collide move apart. */
function limitLines(input: HistoryInput, y: (v: number) => number, frame: Frame, top: number): Shape[] {
  const marks = [
    { name: 'A/B', value: input.ab, dash: [] as number[], ink: 'rule' as const, width: 0.6 },
    { name: 'B/C', value: input.bc, dash: [], ink: 'zone-c' as const, width: 0.7 },
    { name: 'C/D', value: input.cd, dash: [], ink: 'zone-d' as const, width: 0.7 },
    { name: 'ALARM', value: input.alarm, dash: [3, 2], ink: 'ink' as const, width: 0.7 },
    { name: 'baseline', value: input.baseline, dash: [0.8, 1.8], ink: 'quiet' as const, width: 0.7 },
  ].filter((m): m is typeof m & { value: number } => m.value !== null && m.value <= top);
  const shapes: Shape[] = marks.map((m) => stroke(line(frame.left, y(m.value), frame.right, y(m.value)), m.ink, m.width, m.dash));
  const placed: number[] = [];
  for (const m of [...marks].sort((a, b) => a.value - b.value)) {
    let at = y(m.value) + SIZE * 0.35;
    const below = placed[placed.length - 1];
    if (below !== undefined && below - at < SIZE) at = below - SIZE;
    placed.push(at);
    shapes.push(label(frame.right + 4, at, m.name, SIZE, 'start', m.name === 'ALARM' ? 'ink' : 'quiet'));
  }
  return shapes;
}

/** A tick a survey; dates where they have room. */
function dateAxis(days: readonly number[], x: (i: number) => number, frame: Frame): Shape[] {
  const shapes: Shape[] = [];
  let free = -Infinity;
  const lastX = days.length === 0 ? 0 : x(days.length - 1);
  days.forEach((day, i) => {
    const at = x(i);
    shapes.push(stroke(line(at, frame.bottom, at, frame.bottom + 2.5), 'rule', 0.6));
    const isLast = i === days.length - 1;
    if (!isLast && (at < free || lastX - at < 42)) return;
    shapes.push(label(at, frame.bottom + 11, dayText(day), SIZE - 0.5, 'middle'));
    free = at + 44;
  });
  return shapes;
}

/** Events between the first and last survey, as ticks from above; their words stand where they do not collide. */
function eventTicks(input: HistoryInput, first: number, last: number, x: (day: number) => number, frame: Frame): Shape[] {
  const shapes: Shape[] = [];
  let free = -Infinity;
  for (const event of [...input.events].sort((a, b) => (a.date < b.date ? -1 : 1))) {
    const day = parseDay(event.date);
    if (day === null || day < first || day > last) continue;
    const at = x(day);
    shapes.push(stroke(line(at, frame.top, at, frame.bottom), 'quiet', 0.5, [1, 1.6]));
    if (at < free) continue;
    shapes.push(label(at + 2, frame.top - 2.5, event.label, SIZE - 0.5));
    free = at + 8 + event.label.length * SIZE * 0.5;
  }
  return shapes;
}
