/**
 * Whether a parsed record has the shape of its table of fields. In: any JSON value. Out: the first fault, its path in words,
 * or null. Fields that the table does not know are let be: a later version may have added them without a new format.
 */
import { type Field, OBJECTS, RECORD_FIELDS, WORDS } from './fields.ts';
import { UNIT_FIELDS } from './order.ts';

type Fields = Readonly<Record<string, unknown>>;

const DATE = /^\d{4}-\d{2}-\d{2}$/;
const isText = (v: unknown): boolean => typeof v === 'string';
const isNumber = (v: unknown): boolean => typeof v === 'number' && Number.isFinite(v);
const isObject = (v: unknown): v is Fields => typeof v === 'object' && v !== null && !Array.isArray(v);
const isListOf =
  (of: (v: unknown) => boolean) =>
  (v: unknown): boolean =>
    Array.isArray(v) && v.every(of);
const isMapOf =
  (of: (v: unknown) => boolean) =>
  (v: unknown): boolean =>
    isObject(v) && Object.values(v).every(of);
const isFact = (v: unknown): boolean => v === null || typeof v !== 'object' || isListOf((item) => isText(item) || isNumber(item))(v);

/** Test and name of each plain kind. */
const PLAIN: Readonly<Record<string, readonly [(v: unknown) => boolean, string]>> = {
  s: [isText, 'text'],
  n: [isNumber, 'a number'],
  i: [Number.isInteger, 'a whole number'],
  b: [(v) => typeof v === 'boolean', 'true or false'],
  d: [(v) => typeof v === 'string' && DATE.test(v), 'a date YYYY-MM-DD'],
  S: [isListOf(isText), 'a list of texts'],
  V: [isListOf((v) => v === null || isNumber(v)), 'a list of numbers'],
  T: [isListOf((v) => v === null || isText(v)), 'a list of texts'],
  P: [(v) => isListOf(Number.isInteger)(v) && (v as unknown[]).length === 2, 'two whole numbers'],
  F: [isMapOf(isFact), 'facts'],
  C: [isMapOf((v) => (WORDS['condition'] ?? []).includes(v as string)), 'conditions'],
  I: [isMapOf(Number.isInteger), 'whole numbers'],
  W: [isMapOf(isText), 'texts'],
};

/** A forecast is dates, all of them, or the reason why there are none. */
const FORECAST = (OBJECTS['forecast'] ?? []).map((field) => ({ ...field, orAbsent: false }));
const FORECAST_DATES = FORECAST.filter((field) => field.name !== 'none');
const FORECAST_NONE = FORECAST.filter((field) => field.name === 'none');

/** E.g. `machines[2].condition is "E"; expected A, B …`; null where the record has its shape. */
export const recordFault = (record: Fields): string | null => objectFault(record, RECORD_FIELDS, '');

function objectFault(value: unknown, fields: readonly Field[], path: string): string | null {
  if (!isObject(value)) return `${path} is ${shown(value)}; expected an object`;
  for (const field of fields) {
    const item = value[field.name];
    if (item === undefined && field.orAbsent) continue;
    if (item === null && field.orNull) continue;
    const fault = fieldFault(item, field, path);
    if (fault !== null) return fault;
  }
  return null;
}

function fieldFault(value: unknown, field: Field, parent: string): string | null {
  const plain = PLAIN[field.kind];
  if (plain !== undefined) return plain[0](value) ? null : told(value, field, parent, plain[1]);
  const path = parent === '' ? field.name : `${parent}.${field.name}`;
  if (field.kind === 'w') {
    const words = WORDS[field.of] ?? [];
    return words.includes(value as string) ? null : told(value, field, parent, words.join(', '));
  }
  if (field.name === 'forecast' && isObject(value))
    return objectFault(value, value['none'] === undefined ? FORECAST_DATES : FORECAST_NONE, path);
  if (field.kind === 'o')
    return value === undefined ? told(value, field, parent, 'an object') : objectFault(value, OBJECTS[field.of] ?? [], path);
  if (field.kind === 'U')
    return isObject(value) ? firstFault(Object.entries(value), UNIT_FIELDS, path) : told(value, field, parent, 'units by quantity');
  if (!Array.isArray(value)) return told(value, field, parent, 'a list');
  return firstFault(value.entries(), OBJECTS[field.of] ?? [], path);
}

function firstFault(items: Iterable<readonly [string | number, unknown]>, fields: readonly Field[], path: string): string | null {
  for (const [key, item] of items) {
    const fault = objectFault(item, fields, `${path}[${key}]`);
    if (fault !== null) return fault;
  }
  return null;
}

function told(value: unknown, field: Field, parent: string, expected: string): string {
  const path = parent === '' ? field.name : `${parent}.${field.name}`;
  return `${path} is ${shown(value)}; expected ${expected}${field.orNull ? ' or null' : ''}`;
}

function shown(value: unknown): string {
  if (value === undefined) return 'not there';
  const text = JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}
