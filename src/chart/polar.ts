/** 1× vectors: before and now, angles as lag in degrees, and a circle of q about the one before. */
import type { Drawing, Shape } from './drawing.ts';
import { circle, line, PathPen, round } from './path.ts';
import { fill, label, stroke } from './shapes.ts';

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
  readonly size: number;
  readonly alt: string;
}

const TEXT = 7;

export function polarPlot(input: PolarInput): Drawing {
  const { from, to, q, size } = input;
  const middle = size / 2;
  const radius = middle - 20;
  // The circle of q about the vector before stays inside the plot.
  const most = Math.max((from?.amplitude ?? 0) + (from === null ? 0 : (q ?? 0)), to?.amplitude ?? 0) * 1.1 || 1;
  const place = (v: Vector): { x: number; y: number } => {
    const angle = (v.lagDeg * Math.PI) / 180;
    const r = (v.amplitude / most) * radius;
    return { x: middle + r * Math.sin(angle), y: middle - r * Math.cos(angle) };
  };
  const shapes: Shape[] = [stroke(circle(middle, middle, radius), 'rule', 0.6), stroke(circle(middle, middle, radius / 2), 'rule', 0.4)];
  shapes.push(stroke(line(middle - radius, middle, middle + radius, middle), 'rule', 0.4), stroke(line(middle, middle - radius, middle, middle + radius), 'rule', 0.4));
  shapes.push(label(middle, 14, '0°', TEXT, 'middle'), label(size - 16, middle + 2.5, '90°', TEXT), label(middle, size - 8, '180°', TEXT, 'middle'), label(16, middle + 2.5, '270°', TEXT, 'end'));
  const scale = `${round(most)} ${input.unit}`;
  shapes.push(label(size - 2, size - 2, scale, TEXT - 0.5, 'end'));
  const start = from === null ? null : place(from);
  if (start !== null && q !== null) shapes.push(stroke(circle(start.x, start.y, (q / most) * radius), 'quiet', 0.6, [2, 2]));
  if (start !== null) shapes.push(stroke(line(middle, middle, start.x, start.y), 'quiet', 0.9), stroke(circle(start.x, start.y, 2), 'quiet', 0.9));
  if (to !== null) {
    const end = place(to);
    shapes.push(stroke(line(middle, middle, end.x, end.y), 'ink', 1.1), fill(circle(end.x, end.y, 2.6), 'teal'));
    if (start !== null) shapes.push(...arrow(start.x, start.y, end.x, end.y));
  }
  return { width: round(size), height: round(size), alt: input.alt, shapes };
}

/** From the one before to the one now, with a small head. */
function arrow(x1: number, y1: number, x2: number, y2: number): Shape[] {
  const length = Math.hypot(x2 - x1, y2 - y1);
  if (length < 6) return [];
  const [ux, uy] = [(x2 - x1) / length, (y2 - y1) / length];
  const [tipX, tipY] = [x2 - ux * 3.4, y2 - uy * 3.4];
  const pen = new PathPen();
  pen.moveTo(tipX, tipY);
  pen.lineTo(tipX - ux * 4 - uy * 1.8, tipY - uy * 4 + ux * 1.8);
  pen.lineTo(tipX - ux * 4 + uy * 1.8, tipY - uy * 4 - ux * 1.8);
  pen.closePath();
  return [stroke(line(x1 + ux * 2.5, y1 + uy * 2.5, tipX - ux * 3, tipY - uy * 3), 'teal', 0.7, [2, 1.5]), fill(pen.toString(), 'teal')];
}
