/**
 * Calendar days. Text is `YYYY-MM-DD`; inside, a day is the number of UTC days since 1970-01-01.
 * Never a Date object: its time zone would leak into results.
 */

/** UTC days since 1970-01-01. */
export type Day = number;

/** Days from civil date (proleptic Gregorian); the usual era arithmetic on a year that starts in March. */
function daysFromCivil(year: number, month: number, dayOfMonth: number): Day {
  const y = month <= 2 ? year - 1 : year;
  const era = Math.floor(y / 400);
  const yearOfEra = y - era * 400;
  const dayOfYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + dayOfMonth - 1;
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear;
  return era * 146097 + dayOfEra - 719468;
}

/** Days of a month, leap years counted. */
export function daysInMonth(year: number, month: number): number {
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  return [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1] ?? 0;
}

/** Day of a calendar date, or null when there is no such date (2025-02-30). */
export function dayOf(year: number, month: number, dayOfMonth: number): Day | null {
  if (month < 1 || month > 12 || dayOfMonth < 1 || dayOfMonth > daysInMonth(year, month)) return null;
  return daysFromCivil(year, month, dayOfMonth);
}

const ISO_DATE = /^(\d{4})-(\d{2})-(\d{2})(?:[T ](\d{2}):(\d{2})(?::(\d{2}))?)?$/;

/** Reads `YYYY-MM-DD`, also with ` hh:mm[:ss]` or `Thh:mm[:ss]` behind it; null when it is neither or no such date or time. */
export function parseDay(text: string): Day | null {
  const m = ISO_DATE.exec(text);
  if (m === null) return null;
  if (Number(m[4] ?? 0) > 23 || Number(m[5] ?? 0) > 59 || Number(m[6] ?? 0) > 59) return null;
  return dayOf(Number(m[1]), Number(m[2]), Number(m[3]));
}

/** `YYYY-MM-DD` of a day. */
export function dayText(day: Day): string {
  const z = day + 719468;
  const era = Math.floor(z / 146097);
  const doe = z - era * 146097;
  const yoe = Math.floor((doe - Math.floor(doe / 1460) + Math.floor(doe / 36524) - Math.floor(doe / 146096)) / 365);
  const doy = doe - (365 * yoe + Math.floor(yoe / 4) - Math.floor(yoe / 100));
  const mp = Math.floor((5 * doy + 2) / 153);
  const d = doy - Math.floor((153 * mp + 2) / 5) + 1;
  const m = mp < 10 ? mp + 3 : mp - 9;
  const y = yoe + era * 400 + (m <= 2 ? 1 : 0);
  return `${String(y).padStart(4, '0')}-${String(m).padStart(2, '0')}-${String(d).padStart(2, '0')}`;
}
