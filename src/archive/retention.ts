/**
 * Retention. In: the plant's words for it, such as "10 years", and the issues that stand. Out: those whose time has ended on a day.
 * Never: anything deleted.
 */
import type { Issued } from './chain.ts';

const YEARS = /^(\S+)\s+(?:years?|Jahre?n?|años?|ans?|années?)\b/iu;
const NUMBERS: Readonly<Record<string, number>> = {
  one: 1,
  two: 2,
  three: 3,
  four: 4,
  five: 5,
  six: 6,
  seven: 7,
  eight: 8,
  nine: 9,
  ten: 10,
  twelve: 12,
  fifteen: 15,
  twenty: 20,
  thirty: 30,
  zwei: 2,
  drei: 3,
  vier: 4,
  fünf: 5,
  sechs: 6,
  sieben: 7,
  acht: 8,
  neun: 9,
  zehn: 10,
  zwölf: 12,
  fünfzehn: 15,
  zwanzig: 20,
  dreißig: 30,
  dos: 2,
  tres: 3,
  cuatro: 4,
  cinco: 5,
  diez: 10,
  quince: 15,
  veinte: 20,
  treinta: 30,
  deux: 2,
  trois: 3,
  quatre: 4,
  cinq: 5,
  dix: 10,
  quinze: 15,
  vingt: 20,
  trente: 30,
};

/** Whole years at the head of the text; null where it names none. */
export function retentionYears(text: string): number | null {
  const word = YEARS.exec(text.trim())?.[1]?.toLowerCase();
  if (word === undefined) return null;
  const years = /^\d{1,3}$/.test(word) ? Number(word) : Object.hasOwn(NUMBERS, word) ? NUMBERS[word] : undefined;
  return years ?? null;
}

/** Names of the issues that were to be kept until before `day`; null where the retention names no number of years. */
export function dueFor(issues: readonly Issued[], retention: string, day: string): readonly string[] | null {
  const years = retentionYears(retention);
  if (years === null) return null;
  return issues.filter(({ file }) => keptUntil(file.issued_on, years) < day).map(({ name }) => name);
}

const keptUntil = (issued: string, years: number): string =>
  `${String(Number(issued.slice(0, 4)) + years).padStart(4, '0')}${issued.slice(4)}`;
