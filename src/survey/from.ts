/**
 * A plant folder from exports. In: files as they come. Out: plant.yaml with the mapping that is sure, the files under surveys/,
 * and a question for each thing that is not. Never: a unit, a detection, a date order or a decimal sign guessed.
 */
import { parseDetection } from '../measure/detection.ts';
import { parseDay } from '../plant/day.ts';
import type { OutputFile } from '../shell/types.ts';
import { columnOfName, directionOfName, quantityOfWord } from './column-words.ts';
import { columnOrder } from './dates.ts';
import { type GridRow, gridOf } from './grid.ts';
import { headerUnits, type Typed, unitText } from './header.ts';
import { type Column, importSchema, type MappedFile } from './mapping.ts';
import { Problems } from './problems.ts';
import { plantJsonSchema } from './schema.ts';
import { bothReadings, columnSign } from './signs.ts';
import { cellText } from './text.ts';

export interface Export {
  /** Without its folders. */
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** A mapping as lines of YAML, and what it leaves open. */
interface Sketch {
  readonly lines: string[];
  readonly questions: string[];
}

export const SCHEMA_FILE = 'plant.schema.json';
export const SCHEMA_LINE = `# yaml-language-server: $schema=./${SCHEMA_FILE}\n`;
export const schemaFile = (): OutputFile => ({ path: SCHEMA_FILE, bytes: `${JSON.stringify(plantJsonSchema(), null, 2)}\n` });

export function plantFrom(
  exports: readonly Export[],
  name: string,
): { readonly files: OutputFile[]; readonly questions: readonly string[] } {
  const sketches = exports.map((file) => ({ file, ...sketchOf(file) }));
  const questions = sketches.flatMap(({ file, questions: asked }) => asked.map((question) => `surveys/${file.name}: ${question}`));
  const lines = [`plant: ${scalar(name)}`, 'import:', '  files:'];
  for (const { file, lines: own, questions: asked } of sketches) {
    lines.push(
      `    - file: ${scalar(`surveys/${file.name}`)}`,
      ...asked.map((question) => `      # QUESTION: ${question.replace(/\s+/g, ' ')}`),
      ...own.map((line) => `      ${line}`),
    );
  }
  const yaml = { path: 'plant.yaml', bytes: `${SCHEMA_LINE}${lines.join('\n')}\n` };
  return { files: [yaml, schemaFile(), ...exports.map((file) => ({ path: `surveys/${file.name}`, bytes: file.bytes }))], questions };
}

/** A YAML scalar: plain where no sign in it means anything, else in double quotes. */
const scalar = (text: string): string =>
  /^[\p{L}\p{N}][\p{L}\p{N} ./_-]*$/u.test(text) && text.trim() === text ? text : JSON.stringify(text);
const flow = (pairs: readonly (readonly [string, string])[]): string =>
  `{ ${pairs.map(([key, value]) => `${scalar(key)}: ${scalar(value)}`).join(', ')} }`;

function emptyMapping(path: string, encoding: string | null): MappedFile {
  const [file] = importSchema.parse({ files: [{ file: path, encoding }] }).files;
  if (file === undefined) throw new Error('A mapping of one file is one file.');
  return file;
}

interface Sheet {
  readonly at: number;
  readonly names: readonly string[];
  readonly rows: readonly GridRow[];
  readonly unitsRow: readonly string[] | null;
}

const known = (row: GridRow): number =>
  row.cells.filter((cell) => columnOfName(cell) !== null || directionOfName(cell) !== null || headerUnits(cell).unit !== null).length;
const best = (rows: readonly GridRow[]): number => Math.max(-1, ...rows.slice(0, 50).map(known));

function sketchOf({ name, bytes }: Export): Sketch {
  const path = `surveys/${name}`;
  const problems = new Problems();
  const grid = gridOf(path, bytes, emptyMapping(path, null), best, problems);
  if (grid === null) return { lines: [], questions: problems.sorted().map((problem) => `${problem.message} ${problem.hint ?? ''}`.trim()) };
  const most = best(grid.rows);
  const at = grid.rows.findIndex((row) => known(row) === most);
  if (most < 1 || at < 0)
    return {
      lines: [],
      questions: ['No line of column names was found. State header: its line, and columns: { machine: …, point: …, value: … }.'],
    };
  const names = (grid.rows[at] as GridRow).cells.map((cell) => (cellText(cell) ?? '').replace(/\s+/g, ' '));
  const below = grid.rows[at + 1]?.cells ?? [];
  const hasUnits =
    below.some((cell) => unitText(cell)?.unit != null) &&
    below.every((cell, i) => cell.trim() === '' || unitText(cell) !== null || columnOfName(`rpm (${cell})`) !== null || names[i] === '');
  const rows = grid.rows.slice(at + (hasUnits ? 2 : 1)).filter((row) => row.cells.some((cell) => cell.trim() !== ''));
  return new Sketcher({ at, names, rows, unitsRow: hasUnits ? below : null }, name).sketch();
}

class Sketcher {
  readonly #sheet: Sheet;
  readonly #name: string;
  readonly #lines: string[] = [];
  readonly #questions: string[] = [];
  readonly #columns = new Map<Column, number>();
  #rows: readonly GridRow[];

  constructor(sheet: Sheet, name: string) {
    this.#sheet = sheet;
    this.#name = name;
    this.#rows = sheet.rows;
    sheet.names.forEach((text, at) => {
      const column = columnOfName(text);
      if (column === null) return;
      const before = this.#columns.get(column);
      if (before === undefined) this.#columns.set(column, at);
      else
        this.#questions.push(
          `The columns "${sheet.names[before]}" and "${text}" may both be ${column}; the first is taken. Which one is it?`,
        );
    });
  }

  sketch(): Sketch {
    if (this.#sheet.unitsRow !== null) this.#lines.push('units_row: yes');
    this.#footer();
    const wide = this.#wide();
    if (wide.length > 0) this.#columns.delete('value');
    this.#ids(wide);
    this.#values(wide);
    this.#quantities();
    this.#dates();
    return { lines: this.#lines, questions: this.#questions };
  }

  #cells(at: number): string[] {
    return this.#rows.map((row) => row.cells[at] ?? '');
  }

  #typed(at: number): Typed {
    const name = headerUnits(this.#sheet.names[at] ?? '');
    return this.#sheet.unitsRow === null ? name : (unitText(this.#sheet.unitsRow[at] ?? '') ?? name);
  }

  /** Rows at the end with text in their first column alone, or nothing where machine and value stand, are no readings. */
  #footer(): void {
    const machine = this.#columns.get('machine');
    let end = this.#rows.length;
    while (end > 0) {
      const { cells } = this.#rows[end - 1] as GridRow;
      const filled = cells.filter((cell) => cell.trim() !== '').length;
      if (!(filled <= 1 || (machine !== undefined && (cells[machine] ?? '').trim() === '') || cells.length < this.#sheet.names.length / 2))
        break;
      end -= 1;
    }
    const first = this.#rows[end]?.cells.find((cell) => cell.trim() !== '');
    if (first === undefined || end === 0) return;
    this.#lines.push(`footer: ${scalar(first.trim())}`);
    this.#rows = this.#rows.slice(0, end);
  }

  /** Columns of values by direction, or by unit where there are several. */
  #wide(): number[] {
    const all = this.#sheet.names.map((_, at) => at);
    const directions = all.filter((at) => directionOfName(this.#sheet.names[at] as string) !== null);
    if (directions.length > 0 && !this.#columns.has('value')) return directions;
    const measured = all.filter(
      (at) =>
        this.#typed(at).unit !== null &&
        (columnOfName(this.#sheet.names[at] as string) === null || columnOfName(this.#sheet.names[at] as string) === 'value'),
    );
    if (measured.length === 1 && !this.#columns.has('value')) this.#columns.set('value', measured[0] as number);
    return measured.length > 1 ? measured : [];
  }

  /** Neither points nor values have a column, and there are columns left: they may be the points. */
  #isMatrix(wide: readonly number[]): boolean {
    return wide.length === 0 && !this.#columns.has('point') && !this.#columns.has('value') && this.#unknownColumns().length > 0;
  }

  #unknownColumns(): string[] {
    return this.#sheet.names.filter((own) => own !== '' && columnOfName(own) === null);
  }

  #ids(wide: readonly number[]): void {
    const { names } = this.#sheet;
    const pairs: [string, string][] = [];
    const direction = this.#columns.get('direction');
    for (const [column, at] of this.#columns) {
      if (column === 'direction') continue;
      const own = names[at] as string;
      pairs.push([
        column,
        column === 'point' && direction !== undefined ? `{${own}}{${names[direction]}}` : names.indexOf(own) === at ? own : `#${at + 1}`,
      ]);
    }
    this.#lines.push(`columns: ${flow(pairs)}`);
    for (const column of ['machine', 'point'] as const) {
      if (!this.#columns.has(column) && !(column === 'point' && this.#isMatrix(wide)))
        this.#questions.push(
          `Which column names the ${column}? Add it under columns, as ${column}: name. There are: ${names
            .filter((n) => n !== '')
            .slice(0, 30)
            .join(', ')}.`,
        );
    }
    if (wide.length === 0) return;
    const point = this.#columns.get('point');
    this.#lines.push('wide:');
    for (const at of wide) {
      const word = directionOfName(names[at] as string);
      const own: [string, string][] =
        word === null || point === undefined
          ? []
          : [
              ['point', `{${names[point]}}${(word[0] as string).toUpperCase()}`],
              ['direction', word],
            ];
      this.#lines.push(
        `  ${scalar(names.indexOf(names[at] as string) === at ? (names[at] as string) : `#${at + 1}`)}: ${own.length === 0 ? '{}' : flow(own)}`,
      );
    }
  }

  /** Unit, detection and decimal sign of the values. */
  #values(wide: readonly number[]): void {
    const value = this.#columns.get('value');
    if (this.#isMatrix(wide)) {
      const open = this.#unknownColumns();
      this.#questions.push(
        `Are the columns ${open.slice(0, 30).join(', ')} points, with their values below? If so, write wide: ${`{ ${open
          .slice(0, 30)
          .map((own) => `${scalar(own)}: ${flow([['point', own]])}`)
          .join(', ')} }`} and state constants: { quantity: velocity, unit: mm/s, detection: rms }, as it was measured.`,
      );
      return;
    }
    if (value === undefined && wide.length === 0) {
      this.#questions.push(
        `Which column holds the values? Add it under columns, as value: name, or several under wide. There are: ${this.#sheet.names
          .filter((n) => n !== '')
          .slice(0, 30)
          .join(', ')}.`,
      );
      return;
    }
    const columns = value === undefined ? wide : [value];
    const unitAt = this.#columns.get('unit');
    const units =
      unitAt === undefined
        ? columns.map((at) => this.#typed(at))
        : [...new Set(this.#cells(unitAt))].map((text) => unitText(text) ?? this.#typed(columns[0] as number));
    if (units.some((typed) => typed.unit === null))
      this.#questions.push('In which unit are the values? State it, as constants: { quantity: velocity, unit: mm/s, detection: rms }.');
    if (!this.#columns.has('detection')) {
      if (units.some((typed) => typed.detection === null && typed.unit !== null))
        this.#questions.push('Are the values rms, or a peak? State it, as constants: { detection: rms }.');
      if (units.some((typed) => typed.detection !== null && 'ambiguous' in (parseDetection(typed.detection, null) ?? {})))
        this.#questions.push('Is the peak calculated from r.m.s., or truly detected? State peak_means: calculated, or peak_means: true.');
    }
    const sign = columnSign(
      columns.flatMap((at) => this.#cells(at)),
      true,
    );
    if ('doubt' in sign && sign.doubt === 'either')
      this.#questions.push(`Which is the decimal sign? ${bothReadings(sign.text)}. State decimal: comma, or decimal: dot.`);
  }

  /** Quantities in words of the four languages. */
  #quantities(): void {
    const at = this.#columns.get('quantity');
    if (at === undefined) return;
    const words = [
      ...new Set(
        this.#cells(at)
          .map((cell) => cellText(cell))
          .filter((cell): cell is string => cell !== null),
      ),
    ];
    const pairs = words.flatMap((word): [string, string][] => {
      const quantity = quantityOfWord(word);
      return quantity === null || quantity === word ? [] : [[word, quantity]];
    });
    if (pairs.length > 0) this.#lines.push('names:', `  quantity: ${flow(pairs)}`);
  }

  #dates(): void {
    const at = this.#columns.get('survey_date') ?? this.#columns.get('taken_at');
    if (at === undefined) {
      const day = /\d{4}-\d{2}-\d{2}/.exec(this.#name)?.[0];
      if (day !== undefined && parseDay(day) !== null) this.#lines.push(`survey: ${day}`);
      else this.#questions.push('On which day was this measured? State it, as survey: 2026-01-14.');
      return;
    }
    const order = columnOrder(this.#cells(at));
    if (!('order' in order))
      this.#questions.push(
        `In which order are the dates? "${order.text}" is ${order.readings.join(', or ')}. State dates: dmy, mdy or ymd.`,
      );
  }
}
