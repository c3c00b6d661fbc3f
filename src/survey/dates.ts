/**
 * Dates of a column. In: all cells of a column, an order where it is stated. Out: the order of day, month and year, or both
 * readings. Never: a guess where each cell reads both ways; a year of two digits read without its century.
 */
import { dayOf, dayText, parseDay } from '../plant/day.ts';
import type { DateOrder } from './mapping.ts';

const NUMBERS = /^(\d{1,4})([-/. ])(\d{1,2})\2(\d{1,4})(.*)$/;
const NAMED = /^(\d{1,2})[-/. ]{1,2}(\p{L}{3,10})\.?[-/. ]{1,2}(\d{4})(.*)$/u;
const TIME = /^[T ,]*(\d{1,2})[:.](\d{2})(?:[:.](\d{2})(?:[.,]\d{1,6})?)?\s*([ap])?\.?(?:m\.?)?$/i;
/** First letters of the months in English, German, Spanish and French. */
const MONTHS: readonly (readonly string[])[] = [
  ['jan', 'jän', 'ene'],
  ['feb', 'fév', 'fev'],
  ['mar', 'mär', 'mrz'],
  ['apr', 'abr', 'avr'],
  ['may', 'mai'],
  ['jun', 'juin'],
  ['jul', 'juil'],
  ['aug', 'ago', 'aoû', 'aou'],
  ['sep'],
  ['oct', 'okt'],
  ['nov'],
  ['dec', 'dez', 'dic', 'déc'],
];

/** A date in the plain form, with its time where it has one; null where the text is no date in that order. */
export function plainDate(text: string, order: DateOrder): string | null {
  const typed = text.trim();
  if (parseDay(typed) !== null) return typed;
  const named = NAMED.exec(typed);
  if (named !== null) return dated(Number(named[3]), monthOf(named[2] as string), Number(named[1]), named[4] as string);
  const m = NUMBERS.exec(typed);
  if (m === null) return null;
  const [a, b, c] = [m[1] as string, m[3] as string, m[4] as string];
  const [year, month, day] = order === 'ymd' ? [a, b, c] : order === 'dmy' ? [c, b, a] : [c, a, b];
  if (year.length !== 4 || month.length > 2 || day.length > 2) return null;
  return dated(Number(year), Number(month), Number(day), m[5] as string);
}

function monthOf(word: string): number {
  const folded = word.normalize('NFC').toLowerCase();
  const found = MONTHS.findIndex((names) => names.some((name) => name.length > 3 && folded.startsWith(name)));
  return (found >= 0 ? found : MONTHS.findIndex((names) => names.some((name) => folded.startsWith(name)))) + 1;
}

function dated(year: number, month: number, day: number, rest: string): string | null {
  const found = dayOf(year, month, day);
  if (found === null) return null;
  if (rest.trim() === '') return dayText(found);
  const time = TIME.exec(rest);
  if (time === null) return null;
  const half = time[4]?.toLowerCase();
  const hour = half === undefined ? Number(time[1]) : (Number(time[1]) % 12) + (half === 'p' ? 12 : 0);
  const two = (n: number): string => String(n).padStart(2, '0');
  const plain = `${dayText(found)} ${two(hour)}:${time[2]}${time[3] === undefined ? '' : `:${time[3]}`}`;
  return parseDay(plain) === null ? null : plain;
}

export type ColumnOrder =
  | { readonly order: DateOrder }
  | { readonly row: number; readonly text: string; readonly readings: readonly string[] };

/** The one order in which each cell is a date. A cell that is one in none is passed over: it is told at its own place. */
export function columnOrder(cells: readonly string[]): ColumnOrder {
  const filled = cells
    .map((text, row) => ({ text, row }))
    .filter(({ text }) => text.trim() !== '' && (['ymd', 'dmy', 'mdy'] as const).some((order) => plainDate(text, order) !== null));
  const fitting = (['ymd', 'dmy', 'mdy'] as const).filter((order) => filled.every(({ text }) => plainDate(text, order) !== null));
  const different = filled.find(({ text }) => new Set(fitting.map((order) => plainDate(text, order))).size > 1);
  if (different === undefined) return { order: fitting[0] ?? 'ymd' };
  return { ...different, readings: fitting.map((order) => `${plainDate(different.text, order)} by ${order}`) };
}
