/**
 * The import section of plant.yaml. In: text values. Out: which file holds what where. Never: a default that changes a number;
 * what is not given is left to the whole column.
 */
import { z } from 'zod';
import { READINGS_COLUMNS } from './readings.ts';
import { foldState, STATES, type State } from './states.ts';
import { ENCODINGS } from './text.ts';

export const DELIMITERS = { comma: ',', semicolon: ';', tab: '\t', pipe: '|' } as const;
export const DATE_ORDERS = ['ymd', 'dmy', 'mdy'] as const;
export type DateOrder = (typeof DATE_ORDERS)[number];
export type Column = (typeof READINGS_COLUMNS)[number];

const words = <const W extends readonly [string, ...string[]]>(list: W) =>
  z
    .enum(list, { error: `is none of: ${list.join(', ')}` })
    .nullable()
    .default(null);
const text = z
  .string()
  .transform((v) => v.normalize('NFC').trim() || null)
  .nullable()
  .default(null);
const whole = z
  .string()
  .regex(/^\d{1,4}$/, { error: 'is no whole number' })
  .transform(Number)
  .nullable()
  .default(null);
const filled = z.string().transform((v) => v.normalize('NFC').trim());
const column = z.enum(READINGS_COLUMNS, { error: `is none of: ${READINGS_COLUMNS.join(', ')}` });
const byColumn = z.partialRecord(column, filled).default({});

const mappedFile = z.strictObject({
  file: filled,
  sheet: text,
  survey: text,
  encoding: words(ENCODINGS),
  delimiter: words(['comma', 'semicolon', 'tab', 'pipe']),
  decimal: words(['dot', 'comma']),
  dates: words(DATE_ORDERS),
  peak_means: words(['calculated', 'true']),
  header: whole,
  units_row: words(['yes', 'no']),
  footer: text,
  columns: byColumn,
  constants: byColumn,
  wide: z.record(filled, byColumn).default({}),
  names: z.partialRecord(column, z.record(z.string(), filled)).default({}),
});

export type MappedFile = z.output<typeof mappedFile>;

export const importSchema = z.strictObject({
  span_days: whole,
  states: z
    .record(z.string().transform(foldState), z.enum(STATES as [State, ...State[]], { error: `is none of: ${STATES.join(', ')}` }))
    .default({}),
  files: z.array(mappedFile).default([]),
});

export type Imports = z.output<typeof importSchema>;
export const NO_IMPORTS: Imports = { span_days: null, states: {}, files: [] };

/** The mapping that a file falls under: the first whose `file` fits, where `*` stands for any part of a name. */
export const mappingOf = (imports: Imports, path: string): MappedFile | null => imports.files.find((file) => fits(file.file, path)) ?? null;

export function fits(pattern: string, path: string): boolean {
  const [patterns, names] = [pattern.split('/'), path.split('/')];
  return patterns.length === names.length && patterns.every((p, i) => fitsName(p, names[i] as string));
}

/** Parts between the stars, each looked for behind the one before: no backtracking. */
function fitsName(pattern: string, name: string): boolean {
  const parts = pattern.split('*');
  const [first, last] = [parts[0] as string, parts[parts.length - 1] as string];
  if (parts.length === 1) return pattern === name;
  if (!name.startsWith(first) || !name.endsWith(last) || name.length < first.length + last.length) return false;
  let at = first.length;
  for (const part of parts.slice(1, -1)) {
    const found = name.indexOf(part, at);
    if (found < 0) return false;
    at = found + part.length;
  }
  return at <= name.length - last.length;
}

/** JSON Schema of the section, part of plant.yaml's. */
export function importJsonSchema(): object {
  const string = { type: ['string', 'number'] };
  const of = (list: readonly string[]): object => ({ enum: [...list] });
  const columns = {
    type: 'object',
    properties: Object.fromEntries(READINGS_COLUMNS.map((name) => [name, string])),
    additionalProperties: false,
  };
  const file = {
    file: { type: 'string', description: 'path in the plant folder; * stands for any part of a name' },
    sheet: { ...string, description: 'sheet of a workbook' },
    survey: {
      ...string,
      description: 'survey that every row belongs to; else survey_date, the folder of the file, or the day of taken_at',
    },
    encoding: of(ENCODINGS),
    delimiter: of(Object.keys(DELIMITERS)),
    decimal: of(['dot', 'comma']),
    dates: of(DATE_ORDERS),
    peak_means: of(['calculated', 'true']),
    header: { ...string, description: 'line of the column names; else the first line that has them all' },
    units_row: { enum: ['yes', 'no', true, false], description: 'the line below the column names holds their units' },
    footer: { ...string, description: 'the rows from the one that begins so are left out' },
    columns: { ...columns, description: 'our column: the column of the file, #3 for the third, or a text with {columns} in it' },
    constants: { ...columns, description: 'our column: the same text in each row' },
    wide: { type: 'object', additionalProperties: columns, description: 'each column of values by its name, with what its values are' },
    names: {
      type: 'object',
      properties: Object.fromEntries(READINGS_COLUMNS.map((name) => [name, { type: 'object', additionalProperties: string }])),
      additionalProperties: false,
      description: 'our column: text in the file: text in the plant',
    },
  };
  return {
    type: ['object', 'null'],
    properties: {
      span_days: { ...string, description: 'days of one round, counted from its first, become one survey' },
      states: { type: 'object', additionalProperties: { enum: [...STATES] }, description: 'word in a value: status' },
      files: { type: 'array', items: { type: 'object', properties: file, required: ['file'], additionalProperties: false } },
    },
    additionalProperties: false,
  };
}
