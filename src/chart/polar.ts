/**
 * 1× vectors of a point. In: the vector before and now, amplitude and phase lag in degrees. Out: both from the centre, 0° up
 * and lag clockwise, the way from one to the other, and the circle of q about the one before. Never: a cause.
 */
import { scaleLinear } from 'd3-scale';
import { plainNumber } from '../words/numbers.ts';
import { say } from '../words/say.ts';
import type { Language } from '../words/sentences.ts';
import type { Drawing, Shape } from './drawing.ts';
import { circle, line, PathPen, round } from './path.ts';
import { dot, fill, label, ring, stroke } from './shapes.ts';

interface Vector {
  readonly amplitude: number;
  readonly lagDeg: number;
}

export interface PolarInput {
  readonly from: Vector | null;
  readonly to: Vector | null;
  /** A quarter of B/C in the unit of the vectors; null without limits. */
  readonly q: number | null;
  readonly unit: string;
  readonly language?: Language;
  readonly size: number;
  readonly alt: string;
}

const TEXT = 7;
/** Room for degrees above and below, and for the line of words at the foot. */
const MARGIN = 24;
const DEGREES = Math.PI / 180;

interface Plane {
  readonly middle: number;
  readonly radius: number;
  /** Amplitude of the outer ring. */
  readonly most: number;
}

export function polarPlot(input: PolarInput): Drawing {
  const { from, to, q, size } = input;
  const reach = Math.max(from?.amplitude ?? 0, to?.amplitude ?? 0, (from?.amplitude ?? 0) + (q ?? 0) * 0.9);
  const plane: Plane = { middle: size / 2, radius: size / 2 - MARGIN, most: ringValue(reach) };
  const place = (v: Vector): { x: number; y: number } => {
    const r = (v.amplitude / plane.most) * plane.radius;
    return { x: plane.middle + r * Math.sin(v.lagDeg * DEGREES), y: plane.middle - r * Math.cos(v.lagDeg * DEGREES) };
  };
  const shapes = grid(input, plane);
  const start = from === null ? null : place(from);
  if (start !== null && q !== null && q > 0)
    shapes.push(stroke(circle(start.x, start.y, (q / plane.most) * plane.radius), 'quiet', 0.6, [2, 2]));
  if (start !== null)
    shapes.push(
      stroke(line(plane.middle, plane.middle, start.x, start.y), 'quiet', 0.9),
      dot(start.x, start.y, 2, 'paper'),
      ring(start.x, start.y, 2, 'quiet', 0.9),
    );
  if (to !== null) {
    const end = place(to);
    shapes.push(stroke(line(plane.middle, plane.middle, end.x, end.y), 'ink', 1.1));
    if (start !== null) shapes.push(...arrow(start.x, start.y, end.x, end.y));
    shapes.push(dot(end.x, end.y, 2.6, 'teal'));
  }
  return { width: round(size), height: round(size), alt: input.alt, shapes };
}

/** A round number over the largest amplitude. */
export function ringValue(reach: number): number {
  if (!Number.isFinite(reach) || reach <= 0) return 1;
  return (
    scaleLinear()
      .domain([0, reach * 1.06])
      .nice(4)
      .domain()[1] ?? reach
  );
}

function grid(input: PolarInput, { middle, radius, most }: Plane): Shape[] {
  const language = input.language ?? 'en';
  const { size } = input;
  const scale = say(language, 'chart.ring', { value: plainNumber(language, most), unit: input.unit });
  return [
    ring(middle, middle, radius, 'rule', 0.6),
    ring(middle, middle, radius / 2, 'rule', 0.4),
    stroke(line(middle - radius, middle, middle + radius, middle), 'rule', 0.4),
    stroke(line(middle, middle - radius, middle, middle + radius), 'rule', 0.4),
    label(middle, middle - radius - 4, '0°', TEXT, 'middle'),
    label(middle + radius + 4, middle + TEXT * 0.35, '90°', TEXT),
    label(middle, middle + radius + TEXT + 2, '180°', TEXT, 'middle'),
    label(middle - radius - 4, middle + TEXT * 0.35, '270°', TEXT, 'end'),
    label(0, size - 2, say(language, 'chart.lag'), TEXT - 0.5),
    label(size, size - 2, scale, TEXT - 0.5, 'end'),
  ];
}

/** From the one before to the one now, with a small head. */
function arrow(x1: number, y1: number, x2: number, y2: number): Shape[] {
  const length = Math.hypot(x2 - x1, y2 - y1);
  if (length < 9) return [];
  const [ux, uy] = [(x2 - x1) / length, (y2 - y1) / length];
  const [tipX, tipY] = [x2 - ux * 3.4, y2 - uy * 3.4];
  const pen = new PathPen();
  pen.moveTo(tipX, tipY);
  pen.lineTo(tipX - ux * 4 - uy * 1.8, tipY - uy * 4 + ux * 1.8);
  pen.lineTo(tipX - ux * 4 + uy * 1.8, tipY - uy * 4 - ux * 1.8);
  pen.closePath();
  return [stroke(line(x1 + ux * 2.5, y1 + uy * 2.5, tipX - ux * 3, tipY - uy * 3), 'teal', 0.7, [2, 1.5]), fill(pen.toString(), 'teal')];
}
