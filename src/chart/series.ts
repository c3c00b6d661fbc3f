/**
 * What the charts of one series share. In: values by survey. Out: scales, zone bands, runs of the line between gaps. Never:
 * a line through a reading that does not compare, or across a new baseline.
 */
import { scaleLinear } from 'd3-scale';
import { line as d3line } from 'd3-shape';
import type { Language } from '../words/sentences.ts';
import type { Shape } from './drawing.ts';
import { PathPen, rectangle } from './path.ts';
import { dot, fill, stroke } from './shapes.ts';

export interface SeriesInput {
  /** By survey, in the unit of the series; null where there is none. */
  readonly values: readonly (number | null)[];
  /** Whether each takes part in the comparison with the last. */
  readonly comparable: readonly boolean[];
  /** The last reading is held: nothing confirmed it at the last survey. */
  readonly held: boolean;
  /** Indices at which a new baseline begins. */
  readonly newBaselineAt: readonly number[];
  readonly ab: number | null;
  readonly bc: number | null;
  readonly cd: number | null;
}

export interface HistoryInput extends Omit<SeriesInput, 'newBaselineAt'> {
  /** `YYYY-MM-DD` by survey, ascending. */
  readonly dates: readonly string[];
  readonly alarm: number | null;
  readonly baseline: number | null;
  readonly events: readonly { readonly date: string; readonly label: string; readonly newBaseline?: boolean }[];
  /** When the line is likely to reach `value`, which the boundary names; a null end is beyond the horizon. */
  readonly forecast?: {
    readonly boundary: string;
    readonly value: number;
    readonly earliest: string;
    readonly latest: string | null;
  } | null;
  readonly unit: string;
  readonly language?: Language;
  readonly width: number;
  readonly height: number;
  /** What series it is; the drawing adds what lines it shows. */
  readonly alt: string;
}

export interface Point {
  readonly x: number;
  readonly y: number;
  readonly index: number;
}

export interface Frame {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** Top of the value axis: above every reading, and above the boundary next over the highest. */
export function topValue(input: SeriesInput, more: readonly (number | null)[] = []): number {
  const values = [...input.values, ...more].filter((v): v is number => v !== null && Number.isFinite(v));
  const most = Math.max(0, ...values);
  const limits = [input.ab, input.bc, input.cd].filter((v): v is number => v !== null);
  const next = limits.filter((v) => v > most)[0];
  const top = next !== undefined && next < most * 2.2 ? Math.max(most * 1.08, next * 1.04) : most * 1.12;
  return top > 0 ? top : (limits[0] ?? 1);
}

export const valueScale = (top: number, frame: Frame): ((value: number) => number) => {
  const scale = scaleLinear().domain([0, top]).range([frame.bottom, frame.top]).clamp(true);
  return (value) => scale(value);
};

/** Faint bands of the zones that the axis shows. */
export function bands(input: SeriesInput, y: (value: number) => number, frame: Frame, top: number): Shape[] {
  const edges = [0, input.ab, input.bc, input.cd];
  const inks = ['band-a', 'band-b', 'band-c', 'band-d'] as const;
  if (input.bc === null && input.cd === null && input.ab === null) return [];
  const shapes: Shape[] = [];
  inks.forEach((ink, i) => {
    const from = edges[i];
    if (from === null || from === undefined || from >= top) return;
    const to = edges.slice(i + 1).find((v): v is number => v !== null && v !== undefined) ?? top;
    const [low, high] = [y(from), y(Math.min(to, top))];
    if (low - high > 0.05) shapes.push(fill(rectangle(frame.left, high, frame.right - frame.left, low - high), ink));
  });
  return shapes;
}

export interface Runs {
  readonly runs: Point[][];
  readonly hollow: Point[];
  readonly last: Point | null;
}

/** Runs of comparable readings, parted at new baselines; and the readings that stand apart. */
export function runsOf(input: SeriesInput, x: (index: number) => number, y: (value: number) => number): Runs {
  const runs: Point[][] = [];
  const hollow: Point[] = [];
  let run: Point[] = [];
  let last: Point | null = null;
  input.values.forEach((value, index) => {
    if (input.newBaselineAt.includes(index) && run.length > 0) {
      runs.push(run);
      run = [];
    }
    if (value === null || !Number.isFinite(value)) return;
    const point = { x: x(index), y: y(value), index };
    last = point;
    if (input.comparable[index] === true) run.push(point);
    else hollow.push(point);
  });
  if (run.length > 0) runs.push(run);
  return { runs, hollow, last };
}

const path = d3line<Point>()
  .x((p) => p.x)
  .y((p) => p.y);

/** The line of each run; a run of one is a dot. */
export function runShapes(runs: readonly (readonly Point[])[], width: number, radius: number): Shape[] {
  return runs.map((run) => {
    const only = run[0];
    if (run.length === 1 && only !== undefined) return dot(only.x, only.y, radius, 'ink');
    const pen = new PathPen();
    path.context(pen as unknown as CanvasRenderingContext2D)([...run]);
    return stroke(pen.toString(), 'ink', width);
  });
}
