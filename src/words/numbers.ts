/**
 * Numbers in print (record.md, decision 13). In: a number and the limit beside it. Out: text by our own table of each
 * language, not by the runtime's. Never: fewer digits than it takes for reading and limit to differ.
 */
import type { Language } from './sentences.ts';

const DECIMAL: Readonly<Record<Language, string>> = { en: '.', de: ',', es: ',', fr: ',' };
const GROUP: Readonly<Record<Language, string>> = { en: '\u202f', de: '\u202f', es: '\u202f', fr: '\u202f' };
export const MINUS = '\u2212';
export const NO_BREAK = '\u00a0';

const SIGNIFICANT = 3;
const MOST_DECIMALS = 9;

export interface NumberOptions {
  /** The boundary printed beside it: never fewer decimals than that has, and one more while the two would look equal. */
  readonly limit?: number | null;
  /** Fixed decimals instead of three significant digits. */
  readonly decimals?: number;
  /** `+` before a positive number. */
  readonly sign?: boolean;
}

/** Power of ten of a value once it is rounded to three digits: 9.996 is 10.0, so 1. */
function exponentOf(value: number): number {
  let exponent = 0;
  let scaled = value;
  while (scaled >= 10) {
    scaled /= 10;
    exponent += 1;
  }
  while (scaled < 1) {
    scaled *= 10;
    exponent -= 1;
  }
  // Only a value about to round up to the next power needs the exact way, which is slow.
  return scaled < 9.99 && scaled > 1.001 ? exponent : Number(value.toExponential(SIGNIFICANT - 1).split('e')[1]);
}

/** Decimals that three significant digits take. */
function significantDecimals(value: number): number {
  if (value === 0) return 0;
  const exponent = exponentOf(Math.abs(value));
  return Math.min(MOST_DECIMALS, Math.max(0, SIGNIFICANT - 1 - exponent));
}

/** Decimals a number was given with, up to nine; what lies beyond twelve digits is the computer's, not the giver's. */
function ownDecimals(number: number): number {
  const kept = decimalsOf.get(number);
  if (kept !== undefined) return kept;
  const value = Number(number.toPrecision(12));
  let decimals = 0;
  while (decimals < MOST_DECIMALS && Number(value.toFixed(decimals)) !== value) decimals += 1;
  if (decimalsOf.size > MOST_KEPT) decimalsOf.clear();
  decimalsOf.set(number, decimals);
  return decimals;
}

/** Limits are asked for at each of their readings. */
const decimalsOf = new Map<number, number>();
const MOST_KEPT = 4096;

/** Decimals for a value beside a limit. */
export function decimalsFor(value: number, limit: number | null | undefined): number {
  let decimals = significantDecimals(value);
  if (limit === null || limit === undefined) return decimals;
  decimals = Math.max(decimals, Math.min(ownDecimals(limit), significantDecimals(limit)));
  while (decimals < MOST_DECIMALS && value !== limit && Number(value.toFixed(decimals)) === limit) decimals += 1;
  return decimals;
}

export function formatNumber(language: Language, value: number, options: NumberOptions = {}): string {
  if (!Number.isFinite(value)) return value > 0 ? '∞' : Number.isNaN(value) ? '–' : `${MINUS}∞`;
  const fixed = Math.abs(value).toFixed(options.decimals ?? decimalsFor(value, options.limit));
  const [whole = '0', fraction] = fixed.split('.');
  const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, GROUP[language]) : whole;
  const text = fraction === undefined ? grouped : `${grouped}${DECIMAL[language]}${fraction}`;
  const isZero = Number(fixed) === 0;
  const sign = value < 0 && !isZero ? MINUS : options.sign === true && !isZero ? '+' : '';
  return `${sign}${text}`;
}

/** A number with the decimals it was given with, three at most: counts, ratings, speeds. */
export const plainNumber = (language: Language, value: number): string =>
  formatNumber(language, value, { decimals: Math.min(ownDecimals(value), SIGNIFICANT) });

/** A boundary as it was set, in three significant digits at most: 4.5 stays 4.5, a computed 3.075 is 3.08 as in the tables. */
export const limitNumber = (language: Language, value: number): string =>
  formatNumber(language, value, { decimals: Math.min(ownDecimals(value), significantDecimals(value)) });

/** A number with its unit, glued by a no-break blank. */
export const formatQuantity = (language: Language, value: number, unit: string, options: NumberOptions = {}): string =>
  `${formatNumber(language, value, options)}${NO_BREAK}${unit.replaceAll(' ', NO_BREAK)}`;
