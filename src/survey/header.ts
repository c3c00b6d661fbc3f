/** Units that stand in a column's name or beside it. In: text such as `Vel (mm/s RMS)`. Out: unit, detection and quantity. Never: a part it does not know taken for known. */
import { parseDetection } from '../measure/detection.ts';
import { parseUnit } from '../measure/units.ts';

export interface Typed {
  readonly unit: string | null;
  /** As typed: whether it says which peak is asked where it is used. */
  readonly detection: string | null;
  readonly quantity: string | null;
}

export const NOTHING: Typed = { unit: null, detection: null, quantity: null };

/** `mm/s RMS`, `mm/s`, `rms mm/s`, `g pk`: the whole text must be understood. */
export function unitText(text: string): Typed | null {
  const words = text
    .normalize('NFC')
    .trim()
    .split(/[\s,;]+/)
    .filter((w) => w !== '');
  if (words.length === 0 || words.length > 6) return null;
  for (let cut = words.length; cut >= 0; cut -= 1) {
    for (const [a, b] of [
      [words.slice(0, cut), words.slice(cut)],
      [words.slice(cut), words.slice(0, cut)],
    ] as const) {
      const [unit, detection] = [a.join(' '), b.join(' ')];
      const known = unit === '' ? null : parseUnit(unit);
      if (unit !== '' && known === null) continue;
      if (detection !== '' && parseDetection(detection, null) === null) continue;
      return { unit: known?.symbol ?? null, detection: detection === '' ? null : detection, quantity: known?.quantity ?? null };
    }
  }
  return null;
}

/** Units of a column's name: in brackets, behind a comma, or its last words. */
export function headerUnits(name: string): Typed {
  const bracket = /[([]([^()[\]]{1,60})[)\]]\s*$/.exec(name);
  if (bracket !== null) return unitText(bracket[1] as string) ?? NOTHING;
  const comma = name.lastIndexOf(',');
  if (comma >= 0) return unitText(name.slice(comma + 1)) ?? NOTHING;
  const words = name.split(/[\s_]+/);
  for (let from = 1; from < words.length; from += 1) {
    const found = unitText(words.slice(from).join(' '));
    if (found?.unit != null) return found;
  }
  return NOTHING;
}
