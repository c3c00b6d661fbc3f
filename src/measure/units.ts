/**
 * Units of vibration. In: what a person typed. Out: a canonical symbol with its quantity, and exact factors between units
 * of one quantity. Never: a guess; an unknown spelling is null, with the nearest known one as a hint.
 */
import type { KnownQuantity } from './detection.ts';
import { nearestWord } from './nearest.ts';

/** Standard gravity, m/s² (CGPM 1901), exact. */
export const STANDARD_GRAVITY = 9.80665;
const INCH = 0.0254;

/** Factor to the SI unit of each quantity: m, m/s, m/s². */
const UNITS = {
  'mm/s': { quantity: 'velocity', si: 1e-3 },
  'in/s': { quantity: 'velocity', si: INCH },
  'm/s': { quantity: 'velocity', si: 1 },
  µm: { quantity: 'displacement', si: 1e-6 },
  mm: { quantity: 'displacement', si: 1e-3 },
  mil: { quantity: 'displacement', si: INCH / 1000 },
  in: { quantity: 'displacement', si: INCH },
  m: { quantity: 'displacement', si: 1 },
  g: { quantity: 'acceleration', si: STANDARD_GRAVITY },
  'm/s²': { quantity: 'acceleration', si: 1 },
  'mm/s²': { quantity: 'acceleration', si: 1e-3 },
  'in/s²': { quantity: 'acceleration', si: INCH },
} as const satisfies Record<string, { readonly quantity: KnownQuantity; readonly si: number }>;

export type UnitSymbol = keyof typeof UNITS;

export interface Unit {
  readonly symbol: UnitSymbol;
  readonly quantity: KnownQuantity;
}

/** Spellings by canonical symbol, folded as by `fold`. */
const SPELLINGS: Readonly<Record<UnitSymbol, readonly string[]>> = {
  'mm/s': ['mm/s', 'mm/sec', 'mm/second', 'mms-1', 'mms^-1', 'mm*s-1', 'mm.s-1', 'mms', 'mmps'],
  'in/s': ['in/s', 'in/sec', 'ips', 'inch/s', 'inch/sec', 'inches/s', 'inches/sec', 'ins-1', 'in*s-1', '"/s'],
  'm/s': ['m/s', 'm/sec', 'ms-1', 'm*s-1', 'ms^-1', 'mps'],
  µm: ['µm', 'um', 'micron', 'microns', 'micrometer', 'micrometre', 'micrometers', 'micrometres', 'mkm'],
  mm: ['mm', 'millimeter', 'millimetre', 'millimeters', 'millimetres'],
  mil: ['mil', 'mils', 'thou'],
  in: ['in', 'inch', 'inches', '"'],
  m: ['m', 'meter', 'metre', 'meters', 'metres'],
  g: ['g', 'gs', "g's", 'gn', 'g0'],
  'm/s²': ['m/s2', 'm/s^2', 'm/s/s', 'm/sec2', 'm/sec^2', 'ms-2', 'ms^-2', 'm*s-2', 'mps2'],
  'mm/s²': ['mm/s2', 'mm/s^2', 'mm/sec2', 'mm/sec^2', 'mms-2', 'mms^-2'],
  'in/s²': ['in/s2', 'in/s^2', 'in/sec2', 'in/sec^2', 'ins-2', 'inch/s2'],
};

const BY_SPELLING = new Map<string, UnitSymbol>();
for (const [symbol, spellings] of Object.entries(SPELLINGS)) for (const spelling of spellings) BY_SPELLING.set(spelling, symbol as UnitSymbol);

/**
 * One form for all ways to type a unit: both code points of µ, raised digits and minus signs, middle dots, blanks and case
 * (no unit here differs by case alone: M and m, G and g mean one thing on a vibration sheet; MM is not read as mega).
 */
function fold(text: string): string {
  return text
    .normalize('NFC')
    .trim()
    .toLowerCase()
    .replace(/[\u00b5\u03bc]/g, 'µ')
    .replace(/\u207b\u00b9/g, '-1')
    .replace(/\u207b\u00b2/g, '-2')
    .replace(/\u00b2/g, '2')
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/[\u00b7\u22c5]/g, '*')
    .replace(/\bper\b/g, '/')
    .replace(/[\s\u00a0\u202f]+/g, '');
}

/** The unit of a spelling, or null when it is not known (also when a detection is mixed into it, as in `mm/s rms`). */
export function parseUnit(text: string): Unit | null {
  const symbol = BY_SPELLING.get(fold(text));
  return symbol === undefined ? null : { symbol, quantity: UNITS[symbol].quantity };
}

/** The known symbol nearest to an unknown spelling, of one quantity where given; null when nothing is near. */
export function nearestUnit(text: string, quantity?: string): string | null {
  const spellings = [...BY_SPELLING.entries()].filter(([, symbol]) => quantity === undefined || UNITS[symbol].quantity === quantity);
  const near = nearestWord(fold(text), spellings.map(([spelling]) => spelling));
  return near === null ? null : (BY_SPELLING.get(near) ?? null);
}

const isSymbol = (text: string): text is UnitSymbol => Object.hasOwn(UNITS, text);

/** Number by which a value in `from` is multiplied to stand in `to`; null when they are not two units of one quantity. */
export function unitFactor(from: string, to: string): number | null {
  if (from === to) return 1;
  if (!isSymbol(from) || !isSymbol(to) || UNITS[from].quantity !== UNITS[to].quantity) return null;
  return UNITS[from].si / UNITS[to].si;
}

/** Canonical symbols of a quantity, for hints. */
export const unitsOf = (quantity: KnownQuantity): UnitSymbol[] => (Object.keys(UNITS) as UnitSymbol[]).filter((s) => UNITS[s].quantity === quantity);

export type FrequencyUnit = 'Hz' | 'CPM' | 'r/min';

const FREQUENCIES: Readonly<Record<string, FrequencyUnit>> = {
  hz: 'Hz', hertz: 'Hz', '1/s': 'Hz', 's-1': 'Hz', cps: 'Hz', cpm: 'CPM', 'cycles/min': 'CPM', 'r/min': 'r/min', rpm: 'r/min', 'rev/min': 'r/min', '1/min': 'r/min', 'min-1': 'r/min',
};

/** Hz, CPM or r/min of a spelling, or null. */
export const parseFrequencyUnit = (text: string): FrequencyUnit | null => FREQUENCIES[fold(text)] ?? null;

const PER_MINUTE = 60;

/** A frequency in Hz: CPM and r/min are sixtieths of it. */
export const toHz = (value: number, unit: FrequencyUnit): number => (unit === 'Hz' ? value : value / PER_MINUTE);
export const fromHz = (hz: number, unit: FrequencyUnit): number => (unit === 'Hz' ? hz : hz * PER_MINUTE);
/** Orders: multiples of the running speed in r/min. */
export const toOrders = (hz: number, speedRpm: number): number => (hz * PER_MINUTE) / speedRpm;
