/**
 * Files as rows of cells, before anything is said of their columns. In: bytes. Out: rows with the line each begins on. A
 * workbook's sheet comes in by the same shape.
 */
import { linesOf, recordsOf } from './csv.ts';
import { DELIMITERS, type MappedFile } from './mapping.ts';
import { Problems } from './problems.ts';
import { textOf } from './text.ts';
import { isWorkbook, workbookGrid } from './workbook.ts';

export interface GridRow {
  readonly line: number;
  readonly cells: readonly string[];
}

export interface Grid {
  readonly rows: readonly GridRow[];
  /** Numbers and dates are in the plain form already, as a workbook holds them. */
  readonly plain: boolean;
}

/** How many letters are looked at to find which sign parts the columns. */
const LOOK = 65_536;

/** `fits` counts how many of the columns asked for a grid has in one of its first rows. */
export function gridOf(
  file: string,
  bytes: Uint8Array,
  mapping: MappedFile,
  fits: (rows: readonly GridRow[]) => number,
  problems: Problems,
): Grid | null {
  if (isWorkbook(file)) return workbookGrid(file, bytes, mapping.sheet, problems);
  const text = textOf(file, bytes, problems, mapping.encoding);
  if (text === null) return null;
  if (text.trim() === '') {
    problems.error(
      'empty-file',
      { file, line: null },
      'The file is empty.',
      'Export it again, or remove it and its entry in the import section of plant.yaml.',
    );
    return null;
  }
  const delimiter = mapping.delimiter === null ? likeliest(file, text, fits) : DELIMITERS[mapping.delimiter];
  const rows = rowsBy(file, text, delimiter, problems);
  return rows === null ? null : { rows, plain: false };
}

/** The delimiter by which most of the columns asked for are there; a comma where none does better. */
function likeliest(file: string, text: string, fits: (rows: readonly GridRow[]) => number): string {
  const end = text.length > LOOK ? text.lastIndexOf('\n', LOOK) : -1;
  const head = end < 0 ? text : text.slice(0, end);
  let [best, most] = [',', -1];
  for (const sign of Object.values(DELIMITERS)) {
    const found = fits(rowsBy(file, head, sign, new Problems()) ?? []);
    if (found > most) [best, most] = [sign, found];
  }
  return best;
}

function rowsBy(file: string, text: string, delimiter: string, problems: Problems): GridRow[] | null {
  const records = recordsOf(file, text, delimiter, problems);
  if (records === null) return null;
  const lines = linesOf(text, records);
  return records.map((cells, i) => ({ line: lines === null ? i + 1 : (lines[i] as number), cells }));
}
