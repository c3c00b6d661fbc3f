/**
 * Cells of a table by column name. In: a row. Out: text, numbers, days, words of closed lists, each checked, each problem
 * with line and column. A blank cell is null: unknown, never zero.
 */
import { nearestWord } from '../measure/nearest.ts';
import { type Day, parseDay } from '../plant/day.ts';
import type { Place } from '../plant/problem.ts';
import { columnAt, lineAt, type Table } from './csv.ts';
import type { Problems } from './problems.ts';
import { bothReadings, type ColumnSign, columnSign, plainForm } from './signs.ts';
import { cellText } from './text.ts';

const NUMBER = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/;

export type NumberFault = 'comma' | 'infinite' | 'no number';

/** A number in the plain form (digits, a dot, an exponent), or what is wrong with it. */
export function plainNumber(text: string): number | NumberFault {
  if (NUMBER.test(text)) {
    const value = Number(text);
    return Number.isFinite(value) ? value : 'infinite';
  }
  if (/^[+-]?(inf|infinity|∞)$/i.test(text)) return 'infinite';
  return /^[+-]?[\d.]*,[\d,.]*$/.test(text) ? 'comma' : 'no number';
}

const NUMBER_FAULTS: Readonly<Record<NumberFault, readonly [string, string]>> = {
  comma: [
    'is written with a comma',
    'Write the decimal sign as a dot and no thousands sign, or map the file in the import section of plant.yaml.',
  ],
  infinite: ['is not finite', 'Give the number read, or leave it blank and say why in status.'],
  'no number': ['is no number', 'Give a number such as 2.35, or leave it blank.'],
};

export class Cells {
  readonly table: Table;
  readonly #problems: Problems;
  #row: readonly string[] = [];
  #index = -1;
  readonly #signs = new Map<string, ColumnSign>();

  constructor(table: Table, problems: Problems) {
    this.table = table;
    this.#problems = problems;
  }

  /** Moves to the next row; false after the last. */
  next(): boolean {
    this.#index += 1;
    const row = this.table.rows[this.#index];
    this.#row = row ?? [];
    return row !== undefined;
  }

  get place(): Place {
    return { file: this.table.file, line: lineAt(this.table, this.#index) };
  }

  /** An error at a column of this row. */
  error(code: string, column: string, message: string, hint: string | null = null): void {
    this.#problems.error(code, this.at(column), message, hint);
  }

  /** Where a cell of this row stands. */
  at(column: string): Place & { readonly column: number | null } {
    return { ...this.place, column: columnAt(this.table, this.#index, column) };
  }

  warn(code: string, column: string, message: string, hint: string | null = null): void {
    this.#problems.add('warning', code, this.at(column), message, hint);
  }

  text(column: string): string | null {
    const at = this.table.column(column);
    return at < 0 ? null : cellText(this.#row[at]);
  }

  /** Text that must be there. */
  required(column: string): string | null {
    const text = this.text(column);
    if (text === null) this.error('blank', column, `"${column}" is blank.`, 'It must be given in each row.');
    return text;
  }

  number(column: string, least: number | null = null): number | null {
    const text = this.text(column);
    if (text === null) return null;
    const value = this.plain(column, text);
    if (value === 'doubt') return null;
    if (typeof value === 'string') {
      const [what, hint] = NUMBER_FAULTS[value];
      this.error('bad-number', column, `"${column}" ${what}: ${text}.`, hint);
      return null;
    }
    if (least !== null && value < least) {
      this.error('bad-number', column, `"${column}" is ${text}, less than ${least}.`, null);
      return null;
    }
    return value;
  }

  /** The number of a text that stands in a column, by the decimal sign of the whole column; `doubt` where that has two readings, told once. */
  plain(column: string, text: string): number | NumberFault | 'doubt' {
    if (this.table.decimal === 'dot') {
      const value = plainNumber(text);
      return typeof value === 'string' ? plainNumber(plainForm(text, 'dot')) : value;
    }
    const found = this.table.decimal === 'comma' ? { sign: 'comma' as const } : this.#signOf(column);
    if ('sign' in found) return plainNumber(plainForm(text, found.sign));
    if (found.doubt === 'mixed') return plainNumber(text);
    const line = lineAt(this.table, found.row);
    this.#problems.error(
      'decimal-sign',
      { file: this.table.file, line, column: columnAt(this.table, found.row, column) },
      `The column "${column}" reads two ways: ${bothReadings(found.text)}.`,
      'State decimal: comma or decimal: dot for this file in the import section of plant.yaml.',
    );
    return 'doubt';
  }

  /** The text of a number in the plain form, where its column has one reading. */
  plainText(column: string, text: string): string {
    const found = this.table.decimal === null ? this.#signOf(column) : { sign: this.table.decimal };
    return 'sign' in found ? plainForm(text, found.sign) : text;
  }

  #signOf(column: string): ColumnSign {
    const kept = this.#signs.get(column);
    if (kept !== undefined) return kept;
    const at = this.table.column(column);
    const found = columnSign(
      this.table.rows.map((row) => row[at] ?? ''),
      this.table.foreign,
    );
    this.#signs.set(column, found);
    return found;
  }

  day(column: string): Day | null {
    const text = this.text(column);
    if (text === null) return null;
    const day = parseDay(text);
    if (day === null) this.error('bad-date', column, `"${column}" is no date: ${text}.`, 'Write dates as YYYY-MM-DD.');
    return day;
  }

  word<W extends string>(column: string, words: readonly W[]): W | null {
    const text = this.text(column);
    if (text === null) return null;
    const folded = text.toLowerCase();
    const found = words.find((w) => w.toLowerCase() === folded);
    if (found !== undefined) return found;
    const near = nearestWord(text, words);
    this.error(
      'unknown-word',
      column,
      `"${column}" is "${text}", which is none of: ${words.join(', ')}.`,
      near === null ? null : `The nearest is "${near}".`,
    );
    return null;
  }

  yesNo(column: string): boolean | null {
    const word = this.word(column, ['yes', 'no'] as const);
    return word === null ? null : word === 'yes';
  }

  list(column: string): string[] {
    return (this.text(column) ?? '')
      .split(/[;,]/)
      .map((t) => t.trim())
      .filter((t) => t !== '');
  }
}
