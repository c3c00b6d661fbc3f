/** A series in one line of a table: faint zone bands, a thin line, the last reading marked. */
import { scaleLinear } from 'd3-scale';
import type { Drawing, Shape } from './drawing.ts';
import { line, round } from './path.ts';
import { bands, runShapes, runsOf, type SeriesInput, topValue, valueScale } from './series.ts';
import { dot, ring, stroke } from './shapes.ts';

export interface SparklineInput extends SeriesInput {
  readonly width?: number;
  readonly height?: number;
  readonly alt: string;
}

const INSET = 2.4;
const TAIL = 7;

export function sparkline(input: SparklineInput): Drawing {
  const { width = 96, height = 18, alt } = input;
  const frame = { left: 0, top: 0, right: width, bottom: height };
  const top = topValue(input);
  const inner = valueScale(top, { left: INSET, top: INSET, right: width, bottom: height - INSET });
  const count = input.values.length;
  const right = width - INSET - (input.held ? TAIL : 0);
  const x = scaleLinear()
    .domain([0, Math.max(1, count - 1)])
    .range([INSET, right]);
  const { runs, hollow, last } = runsOf(input, (i) => (count === 1 ? width / 2 : x(i)), inner);
  const shapes: Shape[] = [...bands(input, valueScale(top, frame), frame, top), ...runShapes(runs, 0.8, 0.9)];
  for (const point of hollow) if (point !== last) shapes.push(ring(point.x, point.y, 1.1, 'quiet', 0.6));
  if (last !== null) {
    const isHollow = hollow.includes(last) && !input.held;
    if (input.held)
      shapes.push(
        stroke(line(last.x, last.y, Math.min(width - 0.5, last.x + TAIL), last.y), 'quiet', 0.7, [1.4, 1.4]),
        ring(last.x, last.y, 1.5, 'teal', 0.8),
      );
    else shapes.push(isHollow ? ring(last.x, last.y, 1.5, 'teal', 0.8) : dot(last.x, last.y, 1.7, 'teal'));
  }
  return { width: round(width), height: round(height), alt, shapes };
}
