import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readRecord } from '../../src/record/read.ts';
import { RECORD_FORMAT } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { UserError } from '../../src/shell/types.ts';
import { sampleText } from './sample.ts';

type Json = { [key: string]: Json } & Json[] & string;

/** The text of the sample after a change to its parsed form. */
function changed(change: (record: Json) => void): string {
  const record = JSON.parse(sampleText(1)) as Json;
  change(record);
  return JSON.stringify(record);
}

function fault(text: string): UserError {
  try {
    readRecord(text);
  } catch (error) {
    if (error instanceof UserError) return error;
    throw error;
  }
  throw new Error('it was read');
}

describe('reading a record', () => {
  it('there is a sample of every format so far', () => {
    const names = readdirSync(fileURLToPath(new URL('../records', import.meta.url))).sort();
    expect(names).toEqual(Array.from({ length: RECORD_FORMAT }, (_, i) => `format-${i + 1}.json`));
  });

  it.each(Array.from({ length: RECORD_FORMAT }, (_, i) => i + 1))('the sample of format %i opens', (format) => {
    const record = readRecord(sampleText(format));
    expect(record.format).toBe(RECORD_FORMAT);
    expect(record.machines.map((m) => m.machine)).toEqual(['AF-03', 'BFP-B', 'ID-01', 'JP-1C', 'PK-F1', 'TG-01', 'VP-01']);
  });

  it('written again, the sample of this format is the same bytes, also with a byte order mark', () => {
    expect(writeRecord(readRecord(sampleText(RECORD_FORMAT)))).toBe(sampleText(RECORD_FORMAT));
    expect(writeRecord(readRecord(`\ufeff${sampleText(RECORD_FORMAT)}`))).toBe(sampleText(RECORD_FORMAT));
  });

  it('a future format is refused with what to do', () => {
    const error = fault(changed((r) => Object.assign(r, { format: RECORD_FORMAT + 1 })));
    expect(error.message).toContain(`format ${RECORD_FORMAT + 1}`);
    expect(error.hint).toMatch(/later/);
  });

  it.each(['', 'null', '[]', '{}', '{"format": "1"}', '{"format": 1.5}', '{"format": 0}', '{"format": 1}', 'machine,point\n', '<html>'])(
    '%j is no record',
    (text) => {
      expect(fault(text).hint).not.toBeNull();
    },
  );

  it.each<[string, (r: Json) => void]>([
    [
      'machines[1].condition is "E"; expected A, B, C, D, r-A, r-B, r-C, r-D, not assessed',
      (r) => Object.assign(r['machines']?.[1] ?? {}, { condition: 'E' }),
    ],
    ['measurements[0].value is "2.1"; expected a number or null', (r) => Object.assign(r['measurements']?.[0] ?? {}, { value: '2.1' })],
    [
      'measurements[2].history.line is not there; expected a list of numbers',
      (r) => Object.assign(r['measurements']?.[2]?.['history'] ?? {}, { line: undefined }),
    ],
    ['surveys[0].date is "14.01.2026"; expected a date YYYY-MM-DD', (r) => Object.assign(r['surveys']?.[0] ?? {}, { date: '14.01.2026' })],
    ['actions is null; expected a list', (r) => Object.assign(r, { actions: null })],
    ['components[0] is 7; expected an object', (r) => Object.assign(r['components'] ?? [], { 0: 7 })],
    ['plant.contractor is not there; expected an object', (r) => Object.assign(r['plant'] ?? {}, { contractor: undefined })],
    [
      'plant.units[velocity].detection is "loud"',
      (r) => Object.assign(r['plant'] ?? {}, { units: { velocity: { unit: 'mm/s', detection: 'loud' } } }),
    ],
  ])('tells the place: %s', (message, change) => {
    expect(fault(changed(change)).message).toContain(message);
  });

  it('without cautions it is refused', () => {
    expect(fault(changed((r) => Object.assign(r, { cautions: [] }))).message).toMatch(/cautions/);
  });

  it('a field that a later version added is let be', () => {
    expect(() => readRecord(changed((r) => Object.assign(r['machines']?.[0] ?? {}, { colour: 'grey' })))).not.toThrow();
  });

  it('cut anywhere, or with any field gone, it is a UserError, never another', () => {
    const text = sampleText(1);
    fc.assert(
      fc.property(fc.integer({ min: 0, max: text.length - 3 }), (at) => fault(text.slice(0, at)) instanceof UserError),
      { numRuns: 40 },
    );
  });
});
