import type { Ink, PathShape, TextShape } from './drawing.ts';
import { circle, round } from './path.ts';

/** A stroked path. */
export const stroke = (d: string, ink: Ink, width: number, dash: readonly number[] = []): PathShape => ({
  kind: 'path',
  d,
  fill: null,
  stroke: ink,
  strokeWidth: width,
  dash,
});
/** A filled path. */
export const fill = (d: string, ink: Ink): PathShape => ({ kind: 'path', d, fill: ink, stroke: null, strokeWidth: 0, dash: [] });

/** A filled dot. */
export const dot = (cx: number, cy: number, r: number, ink: Ink): PathShape => ({
  ...fill(circle(cx, cy, r), ink),
  circle: [round(cx), round(cy), round(r)],
});
/** A hollow ring. */
export const ring = (cx: number, cy: number, r: number, ink: Ink, width: number): PathShape => ({
  ...stroke(circle(cx, cy, r), ink, width),
  circle: [round(cx), round(cy), round(r)],
});

export const label = (
  x: number,
  y: number,
  text: string,
  size: number,
  anchor: TextShape['anchor'] = 'start',
  ink: Ink = 'quiet',
  bold = false,
): TextShape => ({
  kind: 'text',
  x: Math.round(x * 100) / 100,
  y: Math.round(y * 100) / 100,
  text,
  size,
  anchor,
  fill: ink,
  bold,
});
