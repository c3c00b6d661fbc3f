/**
 * Display units. In: what a plant wants each quantity shown in. Out: factor, unit and detection for a reading of another.
 * Never: a true peak made from an r.m.s. or the other way; what nothing converts to is shown as it was read.
 */
import type { Detection } from './detection.ts';
import { type Graduation, limitFactor } from './limit-factor.ts';
import { parseUnit } from './units.ts';

/** By quantity; null leaves unit or detection as they are. */
export type DisplayUnits = { readonly [quantity: string]: { readonly unit: string | null; readonly detection: Detection | null } };

export interface Shown extends Graduation {
  readonly factor: number;
}

/** How a reading in `from` is shown: between r.m.s. and the calculated figures by the sine's factor, whose name tells so. */
export function shownAs(units: DisplayUnits, from: Graduation): Shown {
  const wanted = units[parseUnit(from.unit)?.quantity ?? ''];
  if (wanted === undefined) return { ...from, factor: 1 };
  const unit = wanted.unit ?? from.unit;
  const whole = { unit, detection: from.detection === null ? null : (wanted.detection ?? from.detection) };
  const converted = limitFactor(from, whole);
  if (converted !== null) return { ...whole, factor: converted.factor };
  const unitAlone = limitFactor(from, { unit, detection: from.detection });
  return unitAlone === null ? { ...from, factor: 1 } : { unit, detection: from.detection, factor: unitAlone.factor };
}

const SPOKEN: readonly Detection[] = ['calculated peak-to-peak', 'true peak-to-peak', 'calculated peak', 'true peak', 'rms', 'mean'];

/** A unit with or without its detection behind it, as facts and targets hold it: `mm/s rms`. */
export function graduationOf(text: string): Graduation {
  const detection = SPOKEN.find((d) => text.endsWith(` ${d}`)) ?? null;
  return { unit: detection === null ? text : text.slice(0, -detection.length - 1), detection };
}

/** Its text again. */
export const graduationText = (graduation: Graduation): string =>
  graduation.detection === null ? graduation.unit : `${graduation.unit} ${graduation.detection}`;

/** Facts whose number is in the unit that stands beside them as `unit`. */
const IN_UNIT: ReadonlySet<string> = new Set([
  'value',
  'previous',
  'rise',
  'baseline',
  'rise_baseline',
  'vector',
  'ab',
  'bc',
  'cd',
  'q',
  'limit',
  'alarm',
  'background',
  'least',
  'most',
  'other',
  'axial',
  'radial',
  'vertical',
  'horizontal',
  'change',
]);

/** Facts as they are said: the numbers that stand in `unit`, and `unit`, in display units. The facts on record stay. */
export function shownFacts<T>(
  units: DisplayUnits,
  facts: { readonly [name: string]: T },
): { readonly [name: string]: T | number | string } {
  const { unit } = facts;
  if (typeof unit !== 'string') return facts;
  const shown = shownAs(units, graduationOf(unit));
  if (shown.factor === 1) return facts;
  const told: Record<string, T | number | string> = {};
  for (const [name, value] of Object.entries(facts))
    told[name] = typeof value === 'number' && IN_UNIT.has(name) ? value * shown.factor : value;
  return { ...told, unit: graduationText(shown) };
}
