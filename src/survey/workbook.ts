/**
 * Excel workbooks (Office Open XML, ECMA-376), one sheet as rows of cells. In: the bytes of an .xlsx. Out: a Grid whose numbers and
 * dates are in the plain form. Never: a formula computed (its last value is taken, and said so), a document type read, more
 * unpacked than the limits below.
 */
import type { Grid, GridRow } from './grid.ts';
import type { Problems } from './problems.ts';
import { isDateFormat, serialText } from './workbook-dates.ts';
import { elementsOf, unpacked, WorkbookFault } from './workbook-parts.ts';

const HINT = 'Save it again as a workbook (.xlsx) or as CSV; a password or an older format (.xls) cannot be read.';
/** Cells of a sheet, blanks between them included. */
const MOST_CELLS = 8_000_000;
const MOST_COLUMNS = 16_384;

export const isWorkbook = (file: string): boolean => /\.xlsx$/i.test(file);

/** `sheet` null: the one visible sheet. null with the problem told where it cannot be read. */
export function workbookGrid(file: string, bytes: Uint8Array, sheet: string | null, problems: Problems): Grid | null {
  try {
    const parts = unpacked(bytes);
    const book = bookOf(parts);
    return sheetGrid(file, parts, book, sheetNamed(book, sheet), problems);
  } catch (error) {
    if (!(error instanceof WorkbookFault)) throw error;
    problems.error(error.code, { file, line: null }, `The workbook cannot be read: ${error.message}.`, error.hint ?? HINT);
    return null;
  }
}

type Parts = ReadonlyMap<string, Uint8Array>;

interface Sheet {
  readonly name: string;
  readonly path: string;
  readonly visible: boolean;
}

interface Book {
  readonly sheets: readonly Sheet[];
  readonly from1904: boolean;
  readonly strings: readonly string[];
  /** By the index of a cell's style: whether its number is a date. */
  readonly dates: readonly boolean[];
}

function bookOf(parts: Parts): Book {
  const targets = new Map<string, string>();
  elementsOf(parts, 'xl/_rels/workbook.xml.rels', (name, a) => {
    if (name === 'Relationship') targets.set(a['Id'] ?? '', pathOf(a['Target'] ?? ''));
  });
  const sheets: Sheet[] = [];
  let from1904 = false;
  elementsOf(parts, 'xl/workbook.xml', (name, a) => {
    if (name === 'workbookPr') from1904 = a['date1904'] === '1' || a['date1904'] === 'true';
    if (name === 'sheet')
      sheets.push({ name: a['name'] ?? '', path: targets.get(a['r:id'] ?? '') ?? '', visible: (a['state'] ?? 'visible') === 'visible' });
  });
  return { sheets, from1904, strings: stringsOf(parts), dates: dateStyles(parts) };
}

/** A target counts from xl/, or from the root where it begins with a slash. */
const pathOf = (target: string): string => (target.startsWith('/') ? target.slice(1) : `xl/${target.replace(/^\.\//, '')}`);

/** Shared strings: the runs of rich text joined, readings of East Asian text (rPh) left out. */
function stringsOf(parts: Parts): string[] {
  const strings: string[] = [];
  if (!parts.has('xl/sharedStrings.xml')) return strings;
  let text = '';
  let phonetic = 0;
  let inText = false;
  elementsOf(
    parts,
    'xl/sharedStrings.xml',
    (name) => {
      if (name === 'si') text = '';
      if (name === 'rPh') phonetic += 1;
      inText = name === 't' && phonetic === 0;
    },
    (name) => {
      if (name === 'rPh') phonetic -= 1;
      if (name === 't') inText = false;
      if (name === 'si') strings.push(text);
    },
    (piece) => {
      if (inText) text += piece;
    },
  );
  return strings;
}

function dateStyles(parts: Parts): boolean[] {
  const dates: boolean[] = [];
  if (!parts.has('xl/styles.xml')) return dates;
  const codes = new Map<number, string>();
  let inCellFormats = false;
  elementsOf(
    parts,
    'xl/styles.xml',
    (name, a) => {
      if (name === 'numFmt') codes.set(Number(a['numFmtId']), a['formatCode'] ?? '');
      if (name === 'cellXfs') inCellFormats = true;
      if (name === 'xf' && inCellFormats) dates.push(isDateFormat(Number(a['numFmtId'] ?? 0), codes.get(Number(a['numFmtId']))));
    },
    (name) => {
      if (name === 'cellXfs') inCellFormats = false;
    },
  );
  return dates;
}

function sheetNamed({ sheets }: Book, name: string | null): Sheet {
  const visible = sheets.filter((s) => s.visible);
  const names = visible.map((s) => `"${s.name}"`).join(', ');
  const found = name === null ? visible[0] : sheets.find((s) => s.name.trim() === name);
  if (found === undefined)
    throw new WorkbookFault(
      'workbook-no-sheet',
      name === null ? 'it has no visible sheet' : `it has no sheet "${name}"`,
      `Name one of its sheets in the import section: ${names}.`,
    );
  if (name === null && visible.length > 1)
    throw new WorkbookFault(
      'workbook-which-sheet',
      `it has ${visible.length} sheets, ${names}`,
      'Name the one with the readings in the import section of plant.yaml: sheet: …',
    );
  return found;
}

interface Cell {
  column: number;
  type: string;
  style: number;
  value: string;
  isFormula: boolean;
  hasValue: boolean;
}

/** What a walk over a sheet has come across beside its cells. */
interface Seen {
  formulas: number;
  firstFormula: string;
  merged: number;
}

function sheetGrid(file: string, parts: Parts, book: Book, sheet: Sheet, problems: Problems): Grid {
  const rows: GridRow[] = [];
  const seen: Seen = { formulas: 0, firstFormula: '', merged: 0 };
  const place = (line: number, column: number | null) => ({ file, line, column });
  let [cells, total, line]: [string[], number, number] = [[], 0, 0];
  let cell: Cell | null = null;
  let inValue = false;
  elementsOf(
    parts,
    sheet.path,
    (name, a) => {
      if (name === 'row') [cells, line] = [[], rowOf(a['r'], line + 1)];
      else if (name === 'c')
        cell = {
          column: a['r'] === undefined ? cells.length : columnOf(a['r']),
          type: a['t'] ?? 'n',
          style: Number(a['s'] ?? 0),
          value: '',
          isFormula: false,
          hasValue: false,
        };
      else if (name === 'f' && cell !== null) cell.isFormula = true;
      else if (name === 'mergeCell') seen.merged += 1;
      inValue = cell !== null && (name === 'v' || (name === 't' && cell.type === 'inlineStr'));
      if (inValue && cell !== null) cell.hasValue = true;
    },
    (name) => {
      if (name === 'v' || name === 't') inValue = false;
      if (name === 'c' && cell !== null) {
        total += Math.max(1, cell.column - cells.length + 1);
        if (cell.column >= MOST_COLUMNS || total > MOST_CELLS)
          throw new WorkbookFault(
            'workbook-too-large',
            `the sheet "${sheet.name}" has more than ${MOST_CELLS} cells or a column past ${MOST_COLUMNS}`,
            'Leave only the readings in the sheet.',
          );
        while (cells.length < cell.column) cells.push('');
        cells[cell.column] = cellText(cell, book);
        if (cell.isFormula)
          noteFormula(cell, seen, line, (message, hint) =>
            problems.error('formula-without-value', place(line, (cell?.column ?? 0) + 1), message, hint),
          );
        cell = null;
      }
      if (name === 'row' && cells.some((text) => text !== '')) rows.push({ line, cells });
    },
    (piece) => {
      if (inValue && cell !== null) cell.value += piece;
    },
  );
  tellSeen(file, sheet, seen, problems);
  return { rows, plain: true };
}

function noteFormula(cell: Cell, seen: Seen, line: number, error: (message: string, hint: string) => void): void {
  seen.formulas += 1;
  if (seen.formulas === 1) seen.firstFormula = `row ${line}, column ${cell.column + 1}`;
  if (!cell.hasValue)
    error(
      'The cell is a formula whose value the file does not hold.',
      'Open the workbook, let it compute, and save it; or put the value itself into the cell.',
    );
}

function tellSeen(file: string, sheet: Sheet, seen: Seen, problems: Problems): void {
  if (seen.formulas > 0) {
    problems.add(
      'warning',
      'formula-cells',
      { file, line: null },
      `${seen.formulas} cells of sheet "${sheet.name}" are formulas, the first at ${seen.firstFormula}: the values they had when it was saved are taken.`,
      'Put the values themselves into the cells where they are readings.',
    );
  }
  if (seen.merged > 0)
    problems.add(
      'note',
      'merged-cells',
      { file, line: null },
      `${seen.merged} ranges of sheet "${sheet.name}" are merged: only the first cell of each has the text.`,
      null,
    );
}

/** A row's number as it states it; the one that follows where it states none. */
function rowOf(stated: string | undefined, next: number): number {
  const row = stated === undefined ? next : Number(stated);
  if (!Number.isSafeInteger(row) || row < 1) throw new WorkbookFault('workbook-broken', `"${stated}" is no row`, null);
  return row;
}

/** Letters of a cell's reference, A = 0. */
function columnOf(reference: string): number {
  let column = 0;
  for (let i = 0; i < reference.length && i < 4; i += 1) {
    const letter = reference.charCodeAt(i) - 64;
    if (letter < 1 || letter > 26) break;
    column = column * 26 + letter;
  }
  if (column === 0) throw new WorkbookFault('workbook-broken', `"${reference}" is no cell`, null);
  return column - 1;
}

function cellText({ type, style, value }: Cell, book: Book): string {
  if (value === '') return '';
  if (type === 's') return book.strings[Number(value)] ?? '';
  if (type === 'b') return value === '1' ? 'TRUE' : 'FALSE';
  if (type !== 'n') return value;
  const number = Number(value);
  if (!Number.isFinite(number)) return value;
  return book.dates[style] === true ? serialText(number, book.from1904) : String(number);
}
