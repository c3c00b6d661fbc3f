/**
 * Paths of drawings. In: points. Out: path text of absolute M, L, C and Z with at most two decimals, the one place that
 * rounds coordinates.
 */
export const round = (value: number): number => Math.round(value * 100) / 100;

const pair = (x: number, y: number): string => `${round(x)} ${round(y)}`;

/** Receives what d3-shape draws and keeps it as our path text; arcs become cubic curves. */
export class PathPen {
  #text = '';

  moveTo(x: number, y: number): void {
    this.#text += `M${pair(x, y)}`;
  }

  lineTo(x: number, y: number): void {
    this.#text += `L${pair(x, y)}`;
  }

  bezierCurveTo(x1: number, y1: number, x2: number, y2: number, x: number, y: number): void {
    this.#text += `C${pair(x1, y1)} ${pair(x2, y2)} ${pair(x, y)}`;
  }

  closePath(): void {
    this.#text += 'Z';
  }

  toString(): string {
    return this.#text;
  }
}

export const line = (x1: number, y1: number, x2: number, y2: number): string => `M${pair(x1, y1)}L${pair(x2, y2)}`;

export const rectangle = (x: number, y: number, width: number, height: number): string =>
  `M${pair(x, y)}L${pair(x + width, y)}L${pair(x + width, y + height)}L${pair(x, y + height)}Z`;

/** How far the handles of a quarter circle stand out (4/3 (√2 − 1)). */
const HANDLE = (4 / 3) * (Math.SQRT2 - 1);

export function circle(cx: number, cy: number, r: number): string {
  const h = r * HANDLE;
  const pen = new PathPen();
  pen.moveTo(cx + r, cy);
  pen.bezierCurveTo(cx + r, cy + h, cx + h, cy + r, cx, cy + r);
  pen.bezierCurveTo(cx - h, cy + r, cx - r, cy + h, cx - r, cy);
  pen.bezierCurveTo(cx - r, cy - h, cx - h, cy - r, cx, cy - r);
  pen.bezierCurveTo(cx + h, cy - r, cx + r, cy - h, cx + r, cy);
  pen.closePath();
  return pen.toString();
}

/** The lower half of a circle, closed. */
export function lowerHalf(cx: number, cy: number, r: number): string {
  const h = r * HANDLE;
  const pen = new PathPen();
  pen.moveTo(cx + r, cy);
  pen.bezierCurveTo(cx + r, cy + h, cx + h, cy + r, cx, cy + r);
  pen.bezierCurveTo(cx - h, cy + r, cx - r, cy + h, cx - r, cy);
  pen.closePath();
  return pen.toString();
}
