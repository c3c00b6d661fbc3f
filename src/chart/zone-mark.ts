/**
 * The mark of a condition. In: A to D, r-A to r-D, or not assessed. Out: a small ring (zones) or square (ratio classes),
 * empty, dotted, half or full, or a dash. Told by fill, not by colour alone: greyscale loses nothing.
 */
import type { Drawing, Ink, PathShape } from './drawing.ts';
import { circle, line, lowerHalf, rectangle } from './path.ts';

const shape = (d: string, fill: Ink | null, stroke: Ink | null, strokeWidth: number): PathShape => ({
  kind: 'path',
  d,
  fill,
  stroke,
  strokeWidth,
  dash: [],
});

const INKS: Readonly<Record<string, Ink>> = { A: 'zone-a', B: 'zone-b', C: 'zone-c', D: 'zone-d' };

export function zoneMark(condition: string, size: number): Drawing {
  const letter = condition.slice(-1);
  const ink = INKS[letter];
  if (ink === undefined || !/^(r-)?[A-D]$/.test(condition)) {
    return {
      width: size,
      height: size,
      alt: 'not assessed',
      shapes: [shape(line(size * 0.15, size / 2, size * 0.85, size / 2), null, 'quiet', size * 0.12)],
    };
  }
  const byRatio = condition.startsWith('r-');
  const stroke = size * 0.12;
  const middle = size / 2;
  const r = middle - stroke / 2;
  const outline = byRatio ? rectangle(stroke / 2, stroke / 2, size - stroke, size - stroke) : circle(middle, middle, r);
  const shapes: PathShape[] = [];
  if (letter === 'D') shapes.push(shape(outline, ink, ink, stroke));
  else {
    if (letter === 'C')
      shapes.push(
        shape(byRatio ? rectangle(stroke / 2, middle, size - stroke, middle - stroke / 2) : lowerHalf(middle, middle, r), ink, null, 0),
      );
    if (letter === 'B') {
      const dot = size * 0.085;
      for (const [x, y] of [
        [0.35, 0.37],
        [0.65, 0.37],
        [0.5, 0.63],
      ] as const)
        shapes.push(shape(circle(x * size, y * size, dot), ink, null, 0));
    }
    shapes.push(shape(outline, null, ink, stroke));
  }
  return { width: size, height: size, alt: condition, shapes };
}
