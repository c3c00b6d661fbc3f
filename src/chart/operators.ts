/**
 * Path shapes of a drawing as PDF operators, in the drawing's own coordinates (y down; the caller sets the matrix). Text
 * shapes are left to the writer that has the fonts.
 */
import type { Drawing, PathShape } from './drawing.ts';

const COMMANDS: Readonly<Record<string, string>> = { M: 'm', L: 'l', C: 'c', Z: 'h' };

/** `M1 2L3 4Z` as `1 2 m 3 4 l h`. */
function pathOperators(d: string): string {
  let out = '';
  for (const part of d.matchAll(/([MLCZ])([^MLCZ]*)/g)) {
    const numbers = (part[2] as string).trim();
    out += `${numbers === '' ? '' : `${numbers.replaceAll(',', ' ')} `}${COMMANDS[part[1] as string]} `;
  }
  return out;
}

const component = (hex: string, at: number): string => String(Math.round((Number.parseInt(hex.slice(at, at + 2), 16) / 255) * 100) / 100);
const rgb = (hex: string): string => `${component(hex, 1)} ${component(hex, 3)} ${component(hex, 5)}`;

const paint = (shape: PathShape): string => (shape.fill !== null && shape.stroke !== null ? 'B' : shape.fill !== null ? 'f' : 'S');

export function toPdfOperators(drawing: Drawing, inks: Readonly<Record<string, string>>): string {
  let out = '';
  for (const shape of drawing.shapes) {
    if (shape.kind !== 'path' || (shape.fill === null && shape.stroke === null) || shape.d === '') continue;
    if (shape.fill !== null) out += `${rgb(inks[shape.fill] ?? '#000000')} rg `;
    if (shape.stroke !== null) out += `${rgb(inks[shape.stroke] ?? '#000000')} RG ${Math.round(shape.strokeWidth * 100) / 100} w [${shape.dash.join(' ')}] 0 d `;
    out += `${pathOperators(shape.d)}${paint(shape)}\n`;
  }
  return out;
}
