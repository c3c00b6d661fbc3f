/**
 * CSV out. In: rows of text. Out: RFC 4180 with CRLF and a byte order mark. Never: a cell that a spreadsheet takes for a
 * formula; the one safe-cell rule stands here.
 */
const RISKY = /^[=+\-@\t\r\uff1d\uff0b\uff0d\uff20]/;
const PLAIN_NUMBER = /^[+-]?\d+(?:\.\d+)?(?:[eE][+-]?\d+)?$/;

/** A cell that begins like a formula gets an apostrophe before it; a plain number stays one. */
export function safeCell(text: string): string {
  const safe = RISKY.test(text) && !PLAIN_NUMBER.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

export const csvText = (rows: readonly (readonly string[])[]): string =>
  `\ufeff${rows.map((row) => row.map(safeCell).join(',')).join('\r\n')}\r\n`;
