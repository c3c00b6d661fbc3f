/**
 * CSV files as tables. In: bytes. Out: a header and rows of text with the line each begins on. Never: a value converted,
 * a delimiter guessed where two fit, a row dropped.
 */
import { CsvError, parse } from 'csv-parse/sync';
import { nearestWord } from '../measure/nearest.ts';
import { Problems } from './problems.ts';
import type { DecimalSign } from './signs.ts';
import { textOf } from './text.ts';

export interface Table {
  readonly file: string;
  readonly header: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** 1-based line on which row i begins. */
  readonly lines: readonly number[] | null;
  /** Index of a column by name; −1 where it is not there. */
  column(name: string): number;
  /** The decimal sign where the file's form or its mapping settles it; null: each column tells its own. */
  readonly decimal: DecimalSign | null;
  /** Not in the plain form: a lone dot may part thousands. */
  readonly foreign: boolean;
  /** 1-based column of the file that a cell came from, where columns were mapped. */
  readonly from?: (row: number, name: string) => number | null;
}

/** 1-based column of the file that a cell of row i stands in; null where there is none. */
export function columnAt(table: Table, row: number, name: string): number | null {
  return table.from === undefined ? table.column(name) + 1 || null : table.from(row, name);
}

/** Line of a row: tables without quoted line ends need no list, row i stands on line i + 2. */
export const lineAt = (table: Table, row: number): number => (table.lines === null ? row + 2 : (table.lines[row] as number));

/** null with its problems told when the file is no table in the plain form. */
export function readTable(
  file: string,
  bytes: Uint8Array,
  known: readonly string[],
  required: readonly string[],
  problems: Problems,
  named: (header: readonly string[]) => readonly string[] = (header) => header,
): Table | null {
  const text = textOf(file, bytes, problems);
  if (text === null) return null;
  if (text.trim() === '') {
    problems.error('empty-file', { file, line: null }, 'The file is empty.', `Its first line names the columns: ${required.join(', ')}.`);
    return null;
  }
  const plain = recordsOf(file, text, ',', problems);
  if (plain === null) return null;
  const other = otherDelimiter(file, text, plain[0] ?? [], required);
  const records = other === null ? plain : recordsOf(file, text, other, problems);
  if (records === null) return null;
  const header = named((records[0] ?? []).map((name) => name.normalize('NFC').trim()));
  if (!headerIsSound(file, header, known, required, problems)) return null;
  const lines = linesOf(text, records);
  const at = new Map(header.map((name, i) => [name, i]));
  const { rows, rowLines } = wholeRows(file, records, lines, header.length, problems);
  // Without a quote no cell of a comma separated file can hold a comma: nothing is to be looked for.
  const decimal = other === null && !text.includes('"') ? 'dot' : null;
  return { file, header, rows, lines: rowLines, column: (name) => at.get(name) ?? -1, decimal, foreign: other !== null };
}

/** The sign that parts a first line of one field into every column that must be there; null where none or more than one does. */
function otherDelimiter(file: string, text: string, first: readonly string[], required: readonly string[]): string | null {
  if (first.length !== 1 || required.length === 0) return null;
  const end = /[\r\n]/.exec(text)?.index ?? text.length;
  const fitting = [';', '\t', '|'].filter((sign) => {
    const names = recordsOf(file, text.slice(0, end), sign, new Problems())?.[0]?.map((name) => name.normalize('NFC').trim()) ?? [];
    return names.length > 1 && required.every((name) => names.includes(name));
  });
  return fitting.length === 1 ? (fitting[0] as string) : null;
}

export function recordsOf(file: string, text: string, delimiter: string, problems: Problems): string[][] | null {
  try {
    // A quote inside a field that does not begin with one is an inch sign or a second of arc, not a fault.
    return parse(text, {
      relax_column_count: true,
      relax_quotes: true,
      skip_empty_lines: false,
      delimiter,
      ...(text.includes('\r') ? { record_delimiter: ['\r\n', '\n', '\r'] } : {}),
    }) as string[][];
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error['lines'] === 'number' ? error['lines'] : null;
    const what =
      error.code === 'CSV_QUOTE_NOT_CLOSED' ? 'A quoted field is opened and never closed.' : 'A quote stands where none can stand.';
    problems.error(
      'csv-quotes',
      { file, line, column: null },
      what,
      'Put a field that holds a comma, a quote or a line end in double quotes, and double each quote inside it.',
    );
    return null;
  }
}

/** Line of each record, header included; null when every record is one line. */
export function linesOf(text: string, records: readonly (readonly string[])[]): number[] | null {
  if (!text.includes('"')) return null;
  const lines: number[] = [];
  let line = 1;
  for (const record of records) {
    lines.push(line);
    line += 1;
    for (const field of record) if (/[\r\n]/.test(field)) line += field.split(/\r\n|\n|\r/).length - 1;
  }
  return lines;
}

/** As many as a sheet of a workbook can have; a table of readings has some twenty. */
const MOST_COLUMNS = 16_384;

function headerIsSound(
  file: string,
  header: readonly string[],
  known: readonly string[],
  required: readonly string[],
  problems: Problems,
): boolean {
  const place = { file, line: 1 };
  const lone = header.length === 1 ? (header[0] as string) : '';
  for (const [sign, name] of [
    [';', 'semicolons'],
    ['\t', 'tabs'],
    ['|', 'bars'],
  ] as const) {
    if (!lone.includes(sign)) continue;
    problems.error(
      'delimiter',
      { ...place, column: 1 },
      `The columns are parted by ${name}, not by commas.`,
      'Save the file comma separated, or map it in the import section of plant.yaml.',
    );
    return false;
  }
  if (header.length > MOST_COLUMNS) {
    problems.error(
      'too-many-columns',
      { ...place, column: MOST_COLUMNS + 1 },
      `The first line has ${header.length} columns, more than ${MOST_COLUMNS}.`,
      'Is the table on its side? A column is a kind of value, a row a reading.',
    );
    return false;
  }
  let sound = true;
  const first = new Map<string, number>();
  header.forEach((name, i) => {
    if (!first.has(name)) first.set(name, i);
    if (first.get(name) !== i && name !== '') {
      problems.error('column-twice', { ...place, column: i + 1 }, `The column "${name}" is there twice.`, 'Remove or rename one of them.');
      sound = false;
    }
    if (known.includes(name)) return;
    const near = nearestWord(name, known);
    problems.add(
      'note',
      'unknown-column',
      { ...place, column: i + 1 },
      name === '' ? 'A column has no name; it is left out.' : `The column "${name}" is not known; it is left out.`,
      near === null ? null : `The nearest is "${near}".`,
    );
  });
  for (const name of required) {
    if (header.includes(name)) continue;
    const near = nearestWord(name, header);
    problems.error(
      'missing-column',
      place,
      `The column "${name}" is missing.`,
      near === null ? 'Add it to the first line.' : `Is it the one called "${near}"?`,
    );
    sound = false;
  }
  return sound;
}

/** Rows without blank lines; a row with too many fields is an error, one with too few is filled with blanks and warned of. */
function wholeRows(
  file: string,
  records: readonly (readonly string[])[],
  lines: readonly number[] | null,
  width: number,
  problems: Problems,
): { rows: (readonly string[])[]; rowLines: number[] | null } {
  const rows: (readonly string[])[] = [];
  const rowLines: number[] = [];
  let plain = lines === null;
  for (let i = 1; i < records.length; i += 1) {
    const record = records[i] as readonly string[];
    const line = lines === null ? i + 1 : (lines[i] as number);
    if (record.length === width) {
      rows.push(record);
      rowLines.push(line);
      continue;
    }
    if (record.length === 1 && (record[0] as string).trim() === '') {
      plain = false;
      continue;
    }
    if (record.length > width && record.slice(width).some((field) => field.trim() !== '')) {
      problems.error(
        'too-many-fields',
        { file, line, column: width + 1 },
        `The row has ${record.length} fields, the first line ${width}.`,
        'A field that holds a comma must stand in double quotes.',
      );
      plain = false;
      continue;
    }
    if (record.length < width)
      problems.add(
        'warning',
        'too-few-fields',
        { file, line, column: record.length },
        `The row has ${record.length} fields, the first line ${width}; the rest is taken as blank.`,
        'Add the commas that are missing.',
      );
    rows.push(record.length < width ? [...record, ...new Array<string>(width - record.length).fill('')] : record.slice(0, width));
    rowLines.push(line);
  }
  return { rows, rowLines: plain ? null : rowLines };
}
