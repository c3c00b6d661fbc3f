/** Dates of a workbook: numbers of days, known for dates by the format of their cell alone (ECMA-376 part 1, 18.8.30 and 18.17.4). */
import { dayText } from '../plant/day.ts';

/** 1970-01-01 in the 1900 system, which counts a 29 February 1900 that never was. */
const EPOCH_1900 = 25_569;
const GHOST_DAY = 60;
/** Days from 1900-01-00 to 1904-01-01, where the other system begins. */
const TO_1904 = 1_462;
const SECONDS = 86_400;

/** Built-in formats of dates and times; else a code of its own with a letter of day, month, year, hour or second outside quotes and brackets. */
export function isDateFormat(id: number, code: string | undefined): boolean {
  if (code === undefined) return (id >= 14 && id <= 22) || (id >= 27 && id <= 36) || (id >= 45 && id <= 47) || (id >= 50 && id <= 58);
  const bare = code
    .replace(/"[^"]*"/g, '')
    .replace(/\\./g, '')
    .replace(/\[[^\]]*\]/g, '');
  return /[dmyhs]/i.test(bare) && !/general/i.test(bare);
}

/** YYYY-MM-DD, with THH:MM where the number has a part of a day (to the second where it is not a whole minute); a part alone is HH:MM. The number itself where it is no date. */
export function serialText(serial: number, from1904: boolean): string {
  let days = Math.floor(serial);
  let seconds = Math.round((serial - days) * SECONDS);
  if (seconds === SECONDS) [days, seconds] = [days + 1, 0];
  const time = seconds === 0 ? '' : clock(seconds);
  if (days === 0 && time !== '' && !from1904) return time;
  if (days < 0 || (!from1904 && (days === 0 || days === GHOST_DAY))) return String(serial);
  const day = (from1904 ? days + TO_1904 : days < GHOST_DAY ? days + 1 : days) - EPOCH_1900;
  return `${dayText(day)}${time === '' ? '' : `T${time}`}`;
}

function clock(seconds: number): string {
  const two = (n: number): string => String(n).padStart(2, '0');
  const [h, m, s] = [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60, seconds % 60];
  return `${two(h)}:${two(m)}${s === 0 ? '' : `:${two(s)}`}`;
}
