/**
 * A series over the years. In: readings by survey, limits, events, a forecast. Out: zone bands with their letters, limit lines
 * with their values, events, dates. Never: a judgement; zones are told by the record.
 */
import { scaleLinear } from 'd3-scale';
import { dayText, parseDay } from '../plant/day.ts';
import { formatNumber, limitNumber, plainNumber } from '../words/numbers.ts';
import { say } from '../words/say.ts';
import type { Language } from '../words/sentences.ts';
import { formatDate } from '../words/terms.ts';
import type { Drawing, Ink, Shape } from './drawing.ts';
import { historyAlt } from './history-alt.ts';
import { line, rectangle, round } from './path.ts';
import { bands, type Frame, type HistoryInput, type Runs, runShapes, runsOf, topValue, valueScale } from './series.ts';
import { dot, fill, label, ring, stroke } from './shapes.ts';

export type { HistoryInput };

const SIZE = 7;
/** Width of a letter of the chart's face at size 1, generous: room is kept by it. */
const LETTER = 0.52;

type Scale = (value: number) => number;

export function historyChart(input: HistoryInput): Drawing {
  const { width, height } = input;
  const days = input.dates.map((d) => parseDay(d) ?? 0);
  const newBaselineAt = input.events.filter((e) => e.newBaseline === true).map((e) => days.findIndex((d) => d >= (parseDay(e.date) ?? 0)));
  const series = { ...input, newBaselineAt };
  const top = topValue(series, [input.baseline]);
  const ticks = ticksOf(input, top);
  const lines = limitLines(input, top);
  const frame: Frame = {
    left: Math.max(30, roomOf(ticks.map((t) => t.text)) + 9),
    top: 22,
    right: width - Math.max(46, roomOf(lines.map((l) => l.text)) + 6),
    bottom: height - 18,
  };
  const first = days[0] ?? 0;
  const last = Math.max(days[days.length - 1] ?? first, forecastEnd(input) ?? first);
  const time = scaleLinear()
    .domain([first, Math.max(last, first + 1)])
    .range([frame.left + 16, frame.right - 8]);
  const x: Scale = (index) => (first === last ? (frame.left + frame.right) / 2 : time(days[index] ?? first));
  const y = valueScale(top, frame);
  const shapes: Shape[] = [
    ...bands(series, y, frame, top),
    ...zoneLetters(input, y, frame, top),
    label(2, SIZE, input.unit, SIZE),
    ...ticks.map((t) => label(frame.left - 5, y(t.value) + SIZE * 0.35, t.text, SIZE, 'end')),
    stroke(line(frame.left, frame.bottom, frame.right, frame.bottom), 'rule', 0.6),
    ...lineShapes(lines, y, frame),
    ...dateAxis(days, x, frame, input.language ?? 'en'),
    ...eventTicks(input, first, last, time, frame),
    ...forecastRange(input, time, y, frame, top),
    ...readings(runsOf(series, x, y), input.held, frame),
  ];
  return { width: round(width), height: round(height), alt: historyAlt(input, newBaselineAt), shapes };
}

/** Room that the longest of the texts takes at the chart's size. */
const roomOf = (texts: readonly string[]): number => Math.max(0, ...texts.map((t) => t.length)) * SIZE * LETTER;

function readings({ runs, hollow, last }: Runs, held: boolean, frame: Frame): Shape[] {
  const shapes = runShapes(runs, 1.1, 1.5);
  for (const run of runs) if (run.length > 1) for (const p of run) if (p !== last) shapes.push(dot(p.x, p.y, 1.5, 'ink'));
  for (const p of hollow) if (p !== last) shapes.push(dot(p.x, p.y, 1.9, 'paper'), ring(p.x, p.y, 1.9, 'quiet', 0.8));
  if (last === null) return shapes;
  if (held) shapes.push(stroke(line(last.x, last.y, Math.min(frame.right, last.x + 24), last.y), 'quiet', 0.9, [2, 2]));
  const open = held || hollow.includes(last);
  shapes.push(dot(last.x, last.y, 2.7, open ? 'paper' : 'teal'));
  if (open) shapes.push(ring(last.x, last.y, 2.6, 'teal', 1.1));
  return shapes;
}

/** A to D at the left, at the foot of their bands if no line crosses there, where a letter has room; a boundary that is not stated leaves none to name. */
function zoneLetters(input: HistoryInput, y: Scale, frame: Frame, top: number): Shape[] {
  const edges = [0, input.ab, input.bc, input.cd, Number.POSITIVE_INFINITY];
  const crossing = [input.alarm, input.baseline].flatMap((v) => (v === null ? [] : [y(v)]));
  const shapes: Shape[] = [];
  ['A', 'B', 'C', 'D'].forEach((letter, i) => {
    const [from, to] = [edges[i], edges[i + 1]];
    if (from === null || from === undefined || to === null || to === undefined || from >= top) return;
    if (i === 0 && !Number.isFinite(to)) return;
    const [low, high] = [y(from), y(Math.min(to, top))];
    const places = [low - 2.5, (low + high) / 2 + SIZE * 0.35, high + SIZE].filter((at) => at <= low - 1 && at >= high + SIZE - 0.5);
    const at = places.find((place) => crossing.every((level) => level < place - SIZE || level > place + 1)) ?? places[0];
    if (at !== undefined) shapes.push(label(frame.left + 3.5, at, letter, SIZE, 'start', 'quiet', true));
  });
  return shapes;
}

const ticksOf = (input: HistoryInput, top: number): { readonly value: number; readonly text: string }[] =>
  scaleLinear()
    .domain([0, top])
    .ticks(4)
    .map((value) => ({ value, text: plainNumber(input.language ?? 'en', value) }));

interface LimitLine {
  readonly text: string;
  readonly value: number;
  readonly dash: readonly number[];
  readonly ink: Ink;
  readonly width: number;
}

/** Boundaries and ALARM as they were set, the baseline in three digits; those above the axis are left out. From low to high. */
function limitLines(input: HistoryInput, top: number): LimitLine[] {
  const language = input.language ?? 'en';
  const marks: readonly (Omit<LimitLine, 'value'> & { readonly value: number | null })[] = [
    { text: 'A/B', value: input.ab, dash: [], ink: 'rule', width: 0.6 },
    { text: 'B/C', value: input.bc, dash: [], ink: 'zone-c', width: 0.7 },
    { text: 'C/D', value: input.cd, dash: [], ink: 'zone-d', width: 0.7 },
    { text: say(language, 'chart.alarm'), value: input.alarm, dash: [3, 2], ink: 'ink', width: 0.7 },
    { text: say(language, 'chart.baseline'), value: input.baseline, dash: [0.8, 1.8], ink: 'quiet', width: 0.7 },
  ];
  return marks
    .flatMap((m) =>
      m.value === null || m.value > top
        ? []
        : [
            {
              ...m,
              value: m.value,
              text: `${m.text} ${m.ink === 'quiet' ? formatNumber(language, m.value) : limitNumber(language, m.value)}`,
            },
          ],
    )
    .sort((a, b) => a.value - b.value);
}

/** Lines with their names at the right; labels that would collide move apart, inside the frame. */
function lineShapes(lines: readonly LimitLine[], y: Scale, frame: Frame): Shape[] {
  const at = apart(
    lines.map((l) => y(l.value) + SIZE * 0.35),
    SIZE + 0.5,
    frame.top + SIZE * 0.7,
  );
  return [
    ...lines.map((l) => stroke(line(frame.left, y(l.value), frame.right, y(l.value)), l.ink, l.width, l.dash)),
    ...lines.map((l, i) => label(frame.right + 4, at[i] ?? 0, l.text, SIZE, 'start', l.ink === 'ink' ? 'ink' : 'quiet')),
  ];
}

/** Places from low (large y) to high, each at least `step` over the one below; pushed down again where the top would be passed. */
export function apart(places: readonly number[], step: number, top: number): number[] {
  const out: number[] = [];
  for (const place of places) out.push(Math.min(place, (out[out.length - 1] ?? Number.POSITIVE_INFINITY) - step));
  let least = top;
  for (let i = out.length - 1; i >= 0; i -= 1) {
    out[i] = Math.max(out[i] ?? top, least);
    least = (out[i] ?? top) + step;
  }
  return out;
}

/** A tick a survey; dates where they have room. */
function dateAxis(days: readonly number[], x: Scale, frame: Frame, language: Language): Shape[] {
  const shapes: Shape[] = [];
  const room = 11 * SIZE * LETTER;
  let free = Number.NEGATIVE_INFINITY;
  const lastX = days.length === 0 ? 0 : x(days.length - 1);
  days.forEach((day, i) => {
    const at = x(i);
    shapes.push(stroke(line(at, frame.bottom, at, frame.bottom + 2.5), 'rule', 0.6));
    const isLast = i === days.length - 1;
    if (!isLast && (at < free || lastX - at < room)) return;
    shapes.push(label(at, frame.bottom + 11, formatDate(language, dayText(day)), SIZE - 0.5, 'middle'));
    free = at + room;
  });
  return shapes;
}

/** Events between the first day and the last, as ticks from above; their words stand where they do not collide, the newest first. */
function eventTicks(input: HistoryInput, first: number, last: number, x: Scale, frame: Frame): Shape[] {
  const shapes: Shape[] = [];
  let free = Number.POSITIVE_INFINITY;
  for (const event of [...input.events].sort((a, b) => (a.date < b.date ? 1 : -1))) {
    const day = parseDay(event.date);
    if (day === null || day < first || day > last) continue;
    const at = x(day);
    shapes.push(stroke(line(at, frame.top - 6, at, frame.bottom), 'quiet', 0.5, [1, 1.6]));
    const long = event.label.length * (SIZE - 0.5) * LETTER;
    const turned = at + 2 + long > frame.right;
    const start = turned ? at - 2 - long : at + 2;
    if (start + long > free) continue;
    shapes.push(label(turned ? at - 2 : at + 2, frame.top - 2.5, event.label, SIZE - 0.5, turned ? 'end' : 'start'));
    free = (turned ? start : at) - 4;
  }
  return shapes;
}

const forecastEnd = (input: HistoryInput): number | null => {
  const { forecast } = input;
  return forecast === null || forecast === undefined ? null : parseDay(forecast.latest ?? forecast.earliest);
};

/** The range of days at the boundary: a bar with ends, the later one open when it is beyond the horizon. */
function forecastRange(input: HistoryInput, x: Scale, y: Scale, frame: Frame, top: number): Shape[] {
  const { forecast } = input;
  if (forecast === null || forecast === undefined || forecast.value > top) return [];
  const earliest = parseDay(forecast.earliest);
  if (earliest === null) return [];
  const latest = forecast.latest === null ? null : parseDay(forecast.latest);
  const [left, right, middle] = [x(earliest), latest === null ? frame.right : x(latest), y(forecast.value)];
  const shapes: Shape[] = [
    fill(rectangle(left, middle - 2, Math.max(1, right - left), 4), 'quiet'),
    stroke(line(left, middle - 4, left, middle + 4), 'ink', 0.8),
  ];
  if (latest !== null) shapes.push(stroke(line(right, middle - 4, right, middle + 4), 'ink', 0.8));
  return shapes;
}
