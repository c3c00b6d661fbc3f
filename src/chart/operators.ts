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

/** Colour, width and dash are set where they change; the caller has saved the state and restores it. Throws for an ink without a colour. */
export function toPdfOperators(drawing: Drawing, inks: Readonly<Record<string, string>>): string {
  let out = '';
  let [fillSet, strokeSet] = ['', ''];
  const colour = (ink: string): string => {
    const hex = inks[ink];
    if (hex === undefined) throw new Error(`The palette has no ink "${ink}".`);
    return rgb(hex);
  };
  for (const shape of drawing.shapes) {
    if (shape.kind !== 'path' || (shape.fill === null && shape.stroke === null) || shape.d === '') continue;
    if (shape.fill !== null) {
      const set = `${colour(shape.fill)} rg `;
      if (set !== fillSet) out += set;
      fillSet = set;
    }
    if (shape.stroke !== null) {
      const set = `${colour(shape.stroke)} RG ${Math.round(shape.strokeWidth * 100) / 100} w [${shape.dash.join(' ')}] 0 d `;
      if (set !== strokeSet) out += set;
      strokeSet = set;
    }
    out += `${pathOperators(shape.d)}${paint(shape)}\n`;
  }
  return out;
}
