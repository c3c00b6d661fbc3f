import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { recordFault } from '../../src/record/check.ts';
import { FIELDS, OBJECTS, WORDS } from '../../src/record/fields.ts';
import { MAPS } from '../../src/record/order.ts';
import { recordJsonSchema } from '../../src/record/schema.ts';
import { sampleText } from './sample.ts';

type Part = Record<string, unknown>;
const validate = new Ajv2020({ allErrors: true, strict: true, strictTypes: false }).compile(recordJsonSchema());
const sample = (): Part => JSON.parse(sampleText(1)) as Part;

/** Every place of an object in a value: the object, and how to put another there. */
function objects(value: unknown, found: Part[] = []): Part[] {
  if (Array.isArray(value)) for (const item of value) objects(item, found);
  else if (value !== null && typeof value === 'object') {
    found.push(value as Part);
    for (const item of Object.values(value)) objects(item, found);
  }
  return found;
}

/** ajv is the outside check: draft 2020-12, https://json-schema.org. */
describe('the schema of a record', () => {
  it('the sample is valid by ajv', () => {
    validate(sample());
    expect(validate.errors).toBeNull();
  });

  it('refuses each field at the top when it is gone', () => {
    for (const key of Object.keys(sample())) {
      const record = sample();
      delete record[key];
      expect(validate(record), key).toBe(false);
    }
  });

  it.each<[string, (r: Part) => void]>([
    ['another format', (r) => Object.assign(r, { format: 2 })],
    ['an unknown key', (r) => Object.assign(r, { more: 1 })],
    ['no caution', (r) => Object.assign(r, { cautions: [] })],
    ['a hash that is none', (r) => Object.assign(r, { policy_hash: 'abc' })],
    ['a condition that is none', (r) => Object.assign((r['machines'] as Part[])[0] ?? {}, { condition: 'E' })],
    ['a forecast of neither form', (r) => Object.assign((r['measurements'] as Part[])[0] ?? {}, { forecast: { boundary: 'C/D' } })],
    ['a text for a number', (r) => Object.assign((r['measurements'] as Part[])[0] ?? {}, { value: '2.1' })],
    ['a date that is none', (r) => Object.assign((r['surveys'] as Part[])[0] ?? {}, { date: '14.01.2026' })],
  ])('refuses %s', (_, change) => {
    const record = sample();
    change(record);
    expect(validate(record)).toBe(false);
  });

  it.each([
    { boundary: 'C/D', earliest: '2026-05-01', likely: '2026-09-01', latest: null, range: 0.8 },
    { none: 'too few readings' },
    null,
  ])('takes the forecast %j', (forecast) => {
    const record = sample();
    Object.assign((record['measurements'] as Part[])[0] ?? {}, { forecast });
    validate(record);
    expect(validate.errors).toBeNull();
    expect(recordFault(record)).toBeNull();
  });

  it('schema and the check at reading agree: any one value put out of shape is refused by both', () => {
    const count = objects(sample()).length;
    let broken = 0;
    for (let at = 0; at < count; at += 7) {
      const record = sample();
      const part = objects(record)[at];
      const key = Object.keys(part ?? {})[at % Math.max(1, Object.keys(part ?? {}).length)];
      if (part === undefined || key === undefined) continue;
      part[key] = { out: { of: 'shape' } };
      broken += 1;
      expect(validate(record), `${at} ${key}`).toBe(false);
      expect(recordFault(record), `${at} ${key}`).not.toBeNull();
    }
    expect(broken).toBeGreaterThan(30);
  });

  it('every list of words and every object that a field names is there; no object is idle', () => {
    const named = new Set([
      'tool',
      'issue',
      'plant',
      'survey',
      'surveys',
      'policy',
      'rules',
      'limit_sets',
      'machines',
      'components',
      'measurements',
      'actions',
      'coverage',
      'plant_over_time',
      'problems',
      'inputs',
    ]);
    for (const fields of Object.values(OBJECTS)) {
      for (const field of fields) {
        if (field.kind === 'w') expect(Object.keys(WORDS)).toContain(field.of);
        if (field.kind === 'o' || field.kind === 'l') named.add(field.of);
        // The writer finds an order by the key's own name.
        if (field.kind === 'o' || field.kind === 'l') expect(field.of).toBe(field.name);
        if ('FCIWU'.includes(field.kind)) expect(MAPS.has(field.name), field.name).toBe(true);
      }
    }
    expect([...named].sort()).toEqual(Object.keys(FIELDS).sort());
  });
});
