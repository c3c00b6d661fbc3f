/**
 * Rows at the end of a CSV file that is the user's. In: its bytes, or null where there is no file. Out: the same bytes with rows
 * after them, in the file's own columns, separator and line ends. Never: a byte changed of what stood there.
 */
import { parse } from 'csv-parse/sync';

export interface Appended {
  readonly bytes: Uint8Array;
  /** Columns with text in some row that the file does not have. */
  readonly lacking: readonly string[];
}

const SEPARATORS = [',', ';', '\t', '|'] as const;

/** `columns` is the head of a new file; `nameOf` tells what the columns of a file mean, in their order. Throws a TypeError for a file that is not UTF-8. */
export function appendRows(
  existing: Uint8Array | null,
  columns: readonly string[],
  rows: readonly Readonly<Record<string, string>>[],
  nameOf: (head: readonly string[]) => readonly string[],
): Appended {
  const text = existing === null ? '' : new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(existing);
  const isBlank = text.replace(/^\ufeff/, '').trim() === '';
  const separator = isBlank ? ',' : separatorOf(text);
  const head = isBlank ? columns : headOf(text, separator);
  const names = nameOf(head);
  const end = text.includes('\r\n') ? '\r\n' : '\n';
  const lines = rows.map((row) => names.map((name) => cell(row[name] ?? '', separator)).join(separator));
  if (isBlank) lines.unshift(head.map((name) => cell(name, separator)).join(separator));
  const gap = isBlank || /[\r\n]$/.test(text) ? '' : end;
  const lacking = [...new Set(rows.flatMap((row) => Object.keys(row).filter((name) => row[name] !== '' && !names.includes(name))))];
  const added = new TextEncoder().encode(lines.length === 0 ? '' : `${gap}${lines.join(end)}${end}`);
  const before = existing ?? new Uint8Array();
  const bytes = new Uint8Array(before.length + added.length);
  bytes.set(before);
  bytes.set(added, before.length);
  return { bytes, lacking };
}

/** The sign that the first line has most of, outside quotes. */
function separatorOf(text: string): string {
  const line = (/^[^\r\n]*/.exec(text)?.[0] ?? '').replace(/"[^"]*"/g, '');
  const counts = SEPARATORS.map((s) => line.split(s).length);
  return SEPARATORS[counts.indexOf(Math.max(...counts))] ?? ',';
}

function headOf(text: string, delimiter: string): string[] {
  const [head = []] = parse(text, { bom: true, delimiter, to: 1, relax_column_count: true, trim: true }) as string[][];
  return head.map((name) => name.trim());
}

const cell = (text: string, separator: string): string =>
  text.includes(separator) || /["\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
