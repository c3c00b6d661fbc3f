/**
 * Writing the record. In: a Record. Out: the text of record.json. The one place that rounds: computed figures to 12
 * significant digits; a key a line at the top, an item a line in its lists, so that differences read well.
 */
import { MAP_VALUES, MAPS, ORDERS, type Order, RECORD } from './order.ts';
import type { SwayfolioRecord } from './types.ts';

const SIGNIFICANT = 12;

/** Throws an Error that names the path for NaN, an infinity, or a key that no order lists. */
export function writeRecord(record: SwayfolioRecord): string {
  checkKeys(record as unknown as Fields, RECORD, 'record');
  const fields = record as unknown as Fields;
  // What may be absent stays so: an old record written again is the old bytes.
  const lines = RECORD.filter((key) => fields[key] !== undefined).map((key) => `${JSON.stringify(key)}: ${topText(key, fields[key])}`);
  return `{\n${lines.join(',\n')}\n}\n`;
}

type Fields = Readonly<Record<string, unknown>>;

/** Lists at the top have an item a line; everything else stands on one line. */
function topText(key: string, value: unknown): string {
  if (!Array.isArray(value) || value.length === 0) return text(value, key, key);
  return `[\n${value.map((item, i) => text(item, key, `${key}[${i}]`)).join(',\n')}\n]`;
}

function text(value: unknown, key: string, path: string): string {
  if (value === null || value === undefined) return 'null';
  if (typeof value === 'number') return numberText(value, path, key);
  if (typeof value !== 'object') return JSON.stringify(value);
  if (Array.isArray(value)) return `[${value.map((item) => text(item, key, path)).join(',')}]`;
  return MAPS.has(key) ? mapText(value as Fields, key, path) : objectText(value as Fields, key, path);
}

function numberText(value: number, path: string, key: string): string {
  if (!Number.isFinite(value)) throw new Error(`${path === key ? path : `${path} ${key}`} is ${value}, which no record can hold.`);
  if (Number.isInteger(value)) return String(value);
  return String(Number(value.toPrecision(SIGNIFICANT)));
}

function mapText(value: Fields, key: string, path: string): string {
  const order = MAP_VALUES[key];
  const item = (v: unknown, name: string): string =>
    order !== undefined && v !== null && typeof v === 'object'
      ? fieldsText(v as Fields, order, `${path}.${name}`)
      : text(v, name, `${path}.${name}`);
  const keys = Object.keys(value).sort((a, b) => (a < b ? -1 : 1));
  return `{${keys.map((name) => `${JSON.stringify(name)}:${item(value[name], name)}`).join(',')}}`;
}

function objectText(value: Fields, key: string, path: string): string {
  const order = ORDERS[key];
  if (order === undefined) throw new Error(`No order of keys for ${path}.`);
  return fieldsText(value, order, path);
}

function fieldsText(value: Fields, order: Order, path: string): string {
  const parts: string[] = [];
  let known = 0;
  for (const key of order) {
    const field = value[key];
    if (field === undefined) continue;
    known += 1;
    parts.push(`"${key}":${text(field, key, typeof field === 'object' ? `${path}.${key}` : path)}`);
  }
  if (known !== Object.keys(value).length) checkKeys(value, order, path);
  return `{${parts.join(',')}}`;
}

/** A key outside the order, or one of the order that the object lacks altogether. */
function checkKeys(value: Fields, order: Order, path: string): void {
  for (const key of Object.keys(value)) {
    if (!order.includes(key) && value[key] !== undefined) throw new Error(`${path}.${key} is not in the order of keys.`);
  }
}
