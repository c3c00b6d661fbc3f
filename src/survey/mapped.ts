/**
 * A file as it comes, by its mapping, as a table of readings in the plain form. In: rows of cells, a mapping. Out: a Table whose
 * cells know the column they came from. Never: a value changed; a date in an order that was not stated or proved.
 */
import { parseDetection } from '../measure/detection.ts';
import { nearestWord } from '../measure/nearest.ts';
import type { Table } from './csv.ts';
import { columnOrder, plainDate } from './dates.ts';
import { type Grid, type GridRow, gridOf } from './grid.ts';
import { headerUnits, NOTHING, type Typed, unitText } from './header.ts';
import type { Column, MappedFile } from './mapping.ts';
import type { Problems } from './problems.ts';
import { READINGS_COLUMNS } from './readings.ts';
import { cellText } from './text.ts';

/** Rows at the top among which the column names are looked for. */
const TOP = 50;
const PART = /\{([^{}]{1,100})\}/g;
const DATES: readonly Column[] = ['survey_date', 'taken_at', 'last_date'];

/** null with the problems told where a column is missing, or a date reads two ways. */
export function mappedTable(file: string, bytes: Uint8Array, mapping: MappedFile, dated: boolean, problems: Problems): Table | null {
  const grid = gridOf(file, bytes, mapping, (rows) => countOf(headOf(rows, mapping), mapping), problems);
  if (grid === null) return null;
  const head = headOf(grid.rows, mapping);
  if (head === null || !allThere(file, head, mapping, problems)) return null;
  const layout = layoutOf(head, grid, mapping);
  if (!isWhole(file, head, layout, dated, problems)) return null;
  return tableOf(file, grid, head, layout, mapping, problems);
}

interface Head {
  readonly at: number;
  readonly line: number;
  readonly names: readonly string[];
}

/** Names of the file's columns that a mapping speaks of. */
function wanted(mapping: MappedFile): string[] {
  const texts = [
    ...Object.values(mapping.columns).map((text) => (text.includes('{') ? text : `{${text}}`)),
    ...Object.values(mapping.wide).flatMap((own) => Object.values(own)),
  ];
  return [
    ...new Set([...texts.flatMap((text) => [...text.matchAll(PART)].map((m) => (m[1] as string).trim())), ...Object.keys(mapping.wide)]),
  ];
}

/** Index of a column by its name, or by its place as #3; −1 where it is not there. */
function indexOf(names: readonly string[], name: string): number {
  const place = /^#(\d{1,5})$/.exec(name);
  return place === null ? names.indexOf(name) : Number(place[1]) <= names.length ? Number(place[1]) - 1 : -1;
}

const countOf = (head: Head | null, mapping: MappedFile): number =>
  head === null ? -1 : [...wanted(mapping), 'machine', 'point', 'value'].filter((name) => indexOf(head.names, name) >= 0).length;

/** The line of the column names: as stated, else the first of the top that has the most of the columns asked for. */
function headOf(rows: readonly GridRow[], mapping: MappedFile): Head | null {
  let best: Head | null = null;
  for (let at = 0; at < rows.length && (mapping.header !== null || at < TOP); at += 1) {
    const row = rows[at] as GridRow;
    if (mapping.header !== null && row.line !== mapping.header) continue;
    const head = { at, line: row.line, names: row.cells.map((cell) => (cellText(cell) ?? '').replace(/\s+/g, ' ')) };
    if (best === null || countOf(head, mapping) > countOf(best, mapping)) best = head;
  }
  return best;
}

function allThere(file: string, head: Head, mapping: MappedFile, problems: Problems): boolean {
  let sound = true;
  for (const name of wanted(mapping)) {
    const place = { file, line: head.line };
    const again = head.names.indexOf(name, head.names.indexOf(name) + 1);
    if (indexOf(head.names, name) < 0) {
      const near = nearestWord(name, head.names);
      problems.error(
        'import-column',
        place,
        `The mapping speaks of the column "${name}", which this file has not.`,
        near === null || near === ''
          ? `Its columns: ${head.names
              .filter((n) => n !== '')
              .slice(0, 30)
              .join(', ')}.`
          : `The nearest is "${near}".`,
      );
      sound = false;
    } else if (again >= 0 && !name.startsWith('#') && name !== '') {
      problems.error(
        'import-column',
        { ...place, column: again + 1 },
        `The column "${name}" is there twice.`,
        `Name them in the mapping by their places, #${head.names.indexOf(name) + 1} and #${again + 1}.`,
      );
      sound = false;
    }
  }
  return sound;
}

/** How a cell of ours is made: from which column (where it is one), and its text. */
interface Part {
  readonly from: number | null;
  readonly text: (cells: readonly string[]) => string;
}

/** What one row of the file gives: one reading, or one for each column of values. */
interface Layout {
  readonly base: ReadonlyMap<Column, Part>;
  readonly wide: readonly { readonly at: number; readonly own: ReadonlyMap<Column, Part>; readonly typed: Typed }[];
  readonly valueUnits: Typed;
}

function partOf(names: readonly string[], text: string): Part {
  const at = indexOf(names, text);
  if (!text.includes('{')) return { from: at + 1, text: (cells) => cells[at] ?? '' };
  const pieces = text.split(PART).map((piece, i) => (i % 2 === 0 ? piece : indexOf(names, piece.trim())));
  const first = pieces.find((piece) => typeof piece === 'number');
  return {
    from: typeof first === 'number' ? first + 1 : null,
    text: (cells) => pieces.map((piece) => (typeof piece === 'number' ? (cells[piece] ?? '').trim() : piece)).join(''),
  };
}

const literal = (names: readonly string[], text: string): Part =>
  text.includes('{') ? partOf(names, text) : { from: null, text: () => text };

function layoutOf(head: Head, grid: Grid, mapping: MappedFile): Layout {
  const base = new Map<Column, Part>();
  const isWide = Object.keys(mapping.wide).length > 0;
  for (const name of READINGS_COLUMNS)
    if (head.names.includes(name) && !(isWide && name === 'value')) base.set(name, partOf(head.names, name));
  for (const [name, text] of Object.entries(mapping.columns)) base.set(name as Column, partOf(head.names, text));
  for (const [name, text] of Object.entries(mapping.constants)) base.set(name as Column, { from: null, text: () => text });
  const below = mapping.units_row === 'yes' ? (grid.rows[head.at + 1]?.cells ?? []) : null;
  const typedAt = (at: number): Typed =>
    at < 0
      ? NOTHING
      : below === null
        ? headerUnits(head.names[at] ?? '')
        : (unitText(below[at] ?? '') ?? headerUnits(head.names[at] ?? ''));
  const wide = Object.entries(mapping.wide).map(([name, own]) => {
    const at = indexOf(head.names, name);
    return {
      at,
      typed: typedAt(at),
      own: new Map(Object.entries(own).map(([column, text]) => [column as Column, literal(head.names, text)])),
    };
  });
  const value = base.get('value');
  return { base, wide, valueUnits: value?.from == null ? NOTHING : typedAt(value.from - 1) };
}

/** The least that a reading needs: machine, point, value; and a survey where none is stated. */
function isWhole(file: string, head: Head, layout: Layout, dated: boolean, problems: Problems): boolean {
  const has = (name: Column): boolean => layout.base.has(name) || (layout.wide.length > 0 && layout.wide.every(({ own }) => own.has(name)));
  const missing = (
    [
      ['machine', has('machine')],
      ['point', has('point')],
      ['value', layout.wide.length > 0 || layout.base.has('value')],
      ['survey_date', dated || has('survey_date') || has('taken_at')],
    ] as const
  ).filter(([, there]) => !there);
  for (const [name] of missing) {
    const near = nearestWord(name, head.names);
    const columns = head.names
      .filter((n) => n !== '')
      .slice(0, 30)
      .join(', ');
    problems.error(
      'import-column',
      { file, line: head.line },
      `The mapping does not say where "${name}" stands.`,
      `${near === null || near === '' ? `Name its column under columns, or give it under constants${name === 'survey_date' ? ', or state survey' : ''}.` : `Is it "${near}"?`} The columns here: ${columns}.`,
    );
  }
  return missing.length === 0;
}

/** Rows between the names and the footer, without blank ones and repeated lines of names. */
function* bodyOf(grid: Grid, head: Head, mapping: MappedFile): Generator<GridRow> {
  for (let i = head.at + (mapping.units_row === 'yes' ? 2 : 1); i < grid.rows.length; i += 1) {
    const row = grid.rows[i] as GridRow;
    const first = row.cells.find((cell) => cell.trim() !== '');
    if (first === undefined) continue;
    if (mapping.footer !== null && first.trim().startsWith(mapping.footer)) return;
    if (
      row.cells.length === head.names.length &&
      row.cells.every((cell, c) => (cellText(cell) ?? '').replace(/\s+/g, ' ') === head.names[c])
    )
      continue;
    yield row;
  }
}

function tableOf(file: string, grid: Grid, head: Head, layout: Layout, mapping: MappedFile, problems: Problems): Table | null {
  const header: Column[] = [
    ...new Set<Column>([
      'value',
      'quantity',
      'detection',
      'unit',
      'taken_at',
      ...layout.base.keys(),
      ...layout.wide.flatMap(({ own }) => [...own.keys()]),
    ]),
  ];
  if (layout.base.has('taken_at') && !layout.base.has('survey_date')) header.push('survey_date');
  const index = new Map(header.map((name, i) => [name, i]));
  const rows: string[][] = [];
  const lines: number[] = [];
  const places: (number | null)[][] = [];
  const add = (row: GridRow, own: ReadonlyMap<Column, Part>, value: { at: number; typed: Typed } | null): void => {
    const cells = new Array<string>(header.length).fill('');
    const from = new Array<number | null>(header.length).fill(null);
    const put = (name: Column, part: Part): void => {
      const at = index.get(name) as number;
      cells[at] = part.text(row.cells).trim();
      from[at] = part.from;
    };
    for (const [name, part] of layout.base) put(name, part);
    if (value !== null) put('value', { from: value.at + 1, text: (c) => c[value.at] ?? '' });
    for (const [name, part] of own) put(name, part);
    fillIn(cells, index, value?.typed ?? layout.valueUnits, mapping);
    rows.push(cells);
    lines.push(row.line);
    places.push(from);
  };
  for (const row of bodyOf(grid, head, mapping)) {
    if (layout.wide.length === 0) add(row, new Map(), null);
    // A blank cell of a wide row is a place that was not read, or that this machine has not: coverage tells which.
    for (const column of layout.wide) if ((row.cells[column.at] ?? '').trim() !== '') add(row, column.own, column);
  }
  const column = (name: string): number => header.indexOf(name as Column);
  const table: Table = {
    file,
    header,
    rows,
    lines,
    column,
    decimal: mapping.decimal ?? (grid.plain ? 'dot' : null),
    foreign: true,
    from: (row, name) => places[row]?.[column(name)] ?? places[row]?.[column(name === 'survey_date' ? 'taken_at' : 'value')] ?? null,
  };
  return datesIn(table, rows, mapping, problems) ? table : null;
}

/** Unit and detection from the header or out of one cell, a peak by what the mapping says of it, and names by their table. */
function fillIn(cells: string[], index: ReadonlyMap<Column, number>, header: Typed, mapping: MappedFile): void {
  const [unit, detection, quantity] = [index.get('unit') as number, index.get('detection') as number, index.get('quantity') as number];
  const typed = cells[unit] === '' ? header : unitText(cells[unit] as string);
  if (typed !== null) {
    if (typed.unit !== null) cells[unit] = typed.unit;
    if (cells[detection] === '') cells[detection] = typed.detection ?? header.detection ?? '';
    if (cells[quantity] === '') cells[quantity] = typed.quantity ?? '';
  }
  for (const [name, table] of Object.entries(mapping.names)) {
    const at = index.get(name as Column);
    const text = at === undefined ? null : cellText(cells[at]);
    if (at !== undefined && text !== null && Object.hasOwn(table ?? {}, text)) cells[at] = table?.[text] as string;
  }
  if (mapping.peak_means === null) return;
  const parsed = parseDetection(cells[detection] as string, null);
  if (parsed !== null && 'ambiguous' in parsed) cells[detection] = `${mapping.peak_means} ${parsed.ambiguous}`;
}

/** Dates in the plain form, and the survey's day from when a reading was taken. */
function datesIn(table: Table, rows: readonly string[][], mapping: MappedFile, problems: Problems): boolean {
  let sound = true;
  for (const name of DATES) {
    const at = table.column(name);
    if (at < 0) continue;
    const found = mapping.dates === null ? columnOrder(rows.map((row) => row[at] as string)) : { order: mapping.dates };
    if ('order' in found) {
      for (const row of rows) row[at] = plainDate(row[at] as string, found.order) ?? (row[at] as string);
      continue;
    }
    const place = { file: table.file, line: table.lines?.[found.row] ?? null, column: table.from?.(found.row, name) ?? null };
    problems.error(
      'date-order',
      place,
      `The dates of this column read in more than one way: "${found.text}" is ${found.readings.join(', or ')}.`,
      'State dates: dmy, mdy or ymd for this file in the import section of plant.yaml.',
    );
    sound = false;
  }
  const [survey, taken] = [table.column('survey_date'), table.column('taken_at')];
  if (survey >= 0) {
    for (const row of rows) {
      if (row[taken] === '') row[taken] = row[survey] as string;
      row[survey] = ((row[survey] as string) || (row[taken] as string)).slice(0, 10);
    }
  }
  return sound;
}
