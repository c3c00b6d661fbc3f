/**
 * Units of vibration. In: what a person typed. Out: a canonical symbol with its quantity, and exact factors between units
 * of one quantity. Never: a guess; an unknown spelling is null, with the nearest known one as a hint.
 */
import type { KnownQuantity } from './detection.ts';
import { nearestWord } from './nearest.ts';

/** Standard gravity, m/s² (CGPM 1901), exact. */
export const STANDARD_GRAVITY = 9.80665;

/** Factor to the SI unit of each quantity (m, m/s, m/s²) as a fraction of whole numbers, so that a conversion rounds once. */
const UNITS = {
  'mm/s': { quantity: 'velocity', si: [1, 1000] },
  'in/s': { quantity: 'velocity', si: [254, 10_000] },
  'm/s': { quantity: 'velocity', si: [1, 1] },
  µm: { quantity: 'displacement', si: [1, 1_000_000] },
  mm: { quantity: 'displacement', si: [1, 1000] },
  mil: { quantity: 'displacement', si: [254, 10_000_000] },
  in: { quantity: 'displacement', si: [254, 10_000] },
  m: { quantity: 'displacement', si: [1, 1] },
  g: { quantity: 'acceleration', si: [980_665, 100_000] },
  'm/s²': { quantity: 'acceleration', si: [1, 1] },
  'mm/s²': { quantity: 'acceleration', si: [1, 1000] },
  'in/s²': { quantity: 'acceleration', si: [254, 10_000] },
} as const satisfies Record<string, { readonly quantity: KnownQuantity; readonly si: readonly [number, number] }>;

export type UnitSymbol = keyof typeof UNITS;

export interface Unit {
  readonly symbol: UnitSymbol;
  readonly quantity: KnownQuantity;
}

const MILLIMETRE = ['mm', 'millimeter', 'millimetre', 'millimeters', 'millimetres'];
const INCH = ['in', 'inch', 'inches', '"'];
const METRE = ['m', 'meter', 'metre', 'meters', 'metres'];
const PER_SECOND = ['/s', '/sec', '/second', 's-1', 's^-1', '*s-1', '*s^-1', '.s-1'];
const PER_SECOND_SQUARED = [
  '/s2',
  '/s^2',
  '/s**2',
  '/s/s',
  '/sec2',
  '/sec^2',
  '/sec/sec',
  '/second2',
  's-2',
  's^-2',
  '*s-2',
  '*s^-2',
  '.s-2',
];
const joined = (lengths: readonly string[], rates: readonly string[]): string[] =>
  lengths.flatMap((length) => rates.map((rate) => length + rate));

/** Spellings by canonical symbol, folded as by `fold`. `mms` is none: it is typed for mm and for mm/s. */
const SPELLINGS: Readonly<Record<UnitSymbol, readonly string[]>> = {
  'mm/s': [...joined(MILLIMETRE, PER_SECOND), 'mmps'],
  'in/s': [...joined(INCH, PER_SECOND), 'ips'],
  'm/s': [...joined(METRE, PER_SECOND), 'mps'],
  µm: ['µm', 'um', 'micron', 'microns', 'micrometer', 'micrometre', 'micrometers', 'micrometres', 'mkm'],
  mm: MILLIMETRE,
  mil: ['mil', 'mils', 'thou', 'thous'],
  in: INCH,
  m: METRE,
  g: ['g', 'gs', "g's", 'gn', 'g0'],
  'm/s²': [...joined(METRE, PER_SECOND_SQUARED), 'mps2'],
  'mm/s²': joined(MILLIMETRE, PER_SECOND_SQUARED),
  'in/s²': joined(INCH, PER_SECOND_SQUARED),
};

const BY_SPELLING = new Map<string, UnitSymbol>();
for (const [symbol, spellings] of Object.entries(SPELLINGS))
  for (const spelling of spellings) BY_SPELLING.set(spelling, symbol as UnitSymbol);

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
    .replace(/[\u2019\u02bc]/g, "'")
    .replace(/\u2033/g, '"')
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
  const near = nearestWord(
    fold(text),
    spellings.map(([spelling]) => spelling),
  );
  return near === null ? null : (BY_SPELLING.get(near) ?? null);
}

const isSymbol = (text: string): text is UnitSymbol => Object.hasOwn(UNITS, text);

/** Number by which a value in `from` is multiplied to stand in `to`; null when they are not two units of one quantity. */
export function unitFactor(from: string, to: string): number | null {
  if (from === to) return 1;
  if (!isSymbol(from) || !isSymbol(to) || UNITS[from].quantity !== UNITS[to].quantity) return null;
  const [a, b] = [UNITS[from].si, UNITS[to].si];
  return (a[0] * b[1]) / (a[1] * b[0]);
}

/** Canonical symbols of a quantity, for hints. */
export const unitsOf = (quantity: KnownQuantity): UnitSymbol[] =>
  (Object.keys(UNITS) as UnitSymbol[]).filter((s) => UNITS[s].quantity === quantity);

export type FrequencyUnit = 'Hz' | 'CPM' | 'r/min';

const FREQUENCIES: ReadonlyMap<string, FrequencyUnit> = new Map([
  ...['hz', 'hertz', '1/s', 's-1', 's^-1', 'cps'].map((spelling) => [spelling, 'Hz'] as const),
  ...['cpm', 'c/min', 'cycles/min', 'cycles/minute'].map((spelling) => [spelling, 'CPM'] as const),
  ...['r/min', 'rpm', 'r.p.m.', 'rev/min', 'revs/min', 'u/min', '1/min', 'min-1', 'min^-1'].map((spelling) => [spelling, 'r/min'] as const),
]);

/** Hz, CPM or r/min of a spelling, or null. */
export const parseFrequencyUnit = (text: string): FrequencyUnit | null => FREQUENCIES.get(fold(text)) ?? null;

const PER_MINUTE = 60;

/** A frequency in Hz: CPM and r/min are sixtieths of it. */
export const toHz = (value: number, unit: FrequencyUnit): number => (unit === 'Hz' ? value : value / PER_MINUTE);
export const fromHz = (hz: number, unit: FrequencyUnit): number => (unit === 'Hz' ? hz : hz * PER_MINUTE);
/** Orders: multiples of the running speed in r/min. */
export const toOrders = (hz: number, speedRpm: number): number => (hz * PER_MINUTE) / speedRpm;
export const fromOrders = (orders: number, speedRpm: number): number => (orders * speedRpm) / PER_MINUTE;
