/**
 * Ids that a spreadsheet has changed. In: an id that nothing bears, the known ids. Out: the one it was likely made of. Never:
 * an id put in its place; the caller shows it.
 */
const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];
const NUMBER = /^[+-]?\d+(?:\.\d+)?(?:e[+-]?\d+)?$/i;

/** Only where exactly one known id fits: a number that lost its zeros or its E, or two numbers that became a date. */
export function likelyOriginal(id: string, known: readonly string[]): string | null {
  const fits = NUMBER.test(id.trim()) ? sameNumber(Number(id)) : dateOf(id);
  if (fits === null) return null;
  const found = known.filter((k) => k !== id && fits(k));
  return found.length === 1 ? (found[0] as string) : null;
}

const sameNumber =
  (value: number) =>
  (known: string): boolean =>
    NUMBER.test(known) && Number(known) === value;

/** A known id such as 3-2, 3/2, 2.3 or MAR-2 that reads as the date which stands there now. */
function dateOf(id: string): ((known: string) => boolean) | null {
  const date = parts(id);
  if (date === null) return null;
  return (known) => {
    const named = /^([a-z]{3,9})[-. ]?(\d{1,2})$/i.exec(known) ?? /^(\d{1,2})[-. ]?([a-z]{3,9})$/i.exec(known);
    if (named !== null) {
      const made = parts(`${named[1]}-${named[2]}`);
      return made !== null && made.month === date.month && made.day === date.day;
    }
    const numbers = /^(\d{1,2})[-/.](\d{1,2})$/.exec(known);
    if (numbers === null) return false;
    const [a, b] = [Number(numbers[1]), Number(numbers[2])];
    return (a === date.day && b === date.month) || (a === date.month && b === date.day);
  };
}

/** Day and month of `3-Feb`, `Feb-3`, `03.Feb`, `2026-02-03` (also with a time of zeros). */
function parts(text: string): { day: number; month: number } | null {
  const iso = /^\d{4}-(\d{2})-(\d{2})(?:[ T]00:00(?::00)?)?$/.exec(text);
  if (iso !== null) return { month: Number(iso[1]), day: Number(iso[2]) };
  const first = /^(\d{1,2})[-. /]+([a-z]{3,9})\.?$/i.exec(text);
  const last = /^([a-z]{3,9})\.?[-. /]+(\d{1,2})$/i.exec(text);
  const [day, word] = first !== null ? [first[1], first[2]] : [last?.[2], last?.[1]];
  const month = MONTHS.indexOf((word ?? '').slice(0, 3).toLowerCase()) + 1;
  return month === 0 ? null : { day: Number(day), month };
}
