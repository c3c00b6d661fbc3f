import { describe, expect, it } from 'vitest';
import { readRecord } from '../../src/record/read.ts';
import type { SwayfolioRecord } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { sampleText } from './sample.ts';

const record = readRecord(sampleText(1));
const first = (r: SwayfolioRecord) => {
  const m = r.measurements[0];
  if (m === undefined) throw new Error('the sample has no measurement');
  return m;
};
const withFirst = (change: object): SwayfolioRecord => ({
  ...record,
  measurements: [{ ...first(record), ...change }, ...record.measurements.slice(1)],
});

/** The same value with the keys of every object turned round. */
function turned(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(turned);
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([k, v]) => [k, turned(v)]),
  );
}

describe('writing a record', () => {
  it('the order of keys of the objects changes nothing', () => {
    const other = turned(record) as SwayfolioRecord;
    expect(Object.keys(other)[0]).toBe('inputs');
    expect(writeRecord(other)).toBe(writeRecord(record));
  });

  it('a measurement a line, lines end by \\n, and so does the text', () => {
    const text = writeRecord(record);
    expect(text.endsWith('}\n')).toBe(true);
    expect(text).not.toContain('\r');
    const lines = text.split('\n');
    for (const m of record.measurements)
      expect(
        lines.filter(
          (l) =>
            l.startsWith(
              `{"machine":${JSON.stringify(m.machine)},"component":${JSON.stringify(m.component)},"point":${JSON.stringify(m.point)},"location"`,
            ) && l.includes(`"quantity":${JSON.stringify(m.quantity)},"unit"`),
        ).length,
      ).toBeGreaterThan(0);
    expect(lines.length).toBeGreaterThan(record.measurements.length + record.machines.length);
  });

  it('one changed reading changes one line', () => {
    const a = writeRecord(record).split('\n');
    const b = writeRecord(withFirst({ value: 3.21, typed: '3.21' })).split('\n');
    expect(a.length).toBe(b.length);
    expect(a.filter((line, i) => line !== b[i])).toHaveLength(1);
  });

  it('rounds to twelve significant digits, and minus zero to zero', () => {
    const text = writeRecord(withFirst({ value: 0.1 + 0.2, speed_rpm: -0, load_pct: 1 / 3e9 }));
    expect(text).toContain('"value":0.3,');
    expect(text).toContain('"speed_rpm":0,');
    expect(text).toContain('"load_pct":3.33333333333e-10,');
    expect(writeRecord(withFirst({ value: 123456789.12345679 }))).toContain('"value":123456789.123,');
  });

  it.each([
    [{ value: Number.NaN }, /measurements\[0\] value is NaN/],
    [
      { change: { absolute: 1, percent: Number.POSITIVE_INFINITY, db: null, of_bc: null, significant: null, vector: null } },
      /measurements\[0\]\.change percent is Infinity/,
    ],
    [{ history: { value: [1, Number.NEGATIVE_INFINITY], why: {}, line: [1, 2] } }, /measurements\[0\]\.history.*value is -Infinity/],
    [{ surprise: 1 }, /measurements\[0\]\.surprise is not in the order/],
  ])('%j is a bug that is named', (change, message) => {
    expect(() => writeRecord(withFirst(change))).toThrow(message);
  });

  it('an unknown key at the top is a bug', () => {
    expect(() => writeRecord({ ...record, more: 1 } as SwayfolioRecord)).toThrow(/record\.more/);
  });

  it('maps are written by code unit, whatever order they were made in', () => {
    const text = writeRecord(
      withFirst({ doubts: [{ kind: 'date', message: 'm', effect: 'note', facts: { b: 1, a: [1, 2], B: 'x', 10: null, 9: true } }] }),
    );
    expect(text).toContain('"facts":{"10":null,"9":true,"B":"x","a":[1,2],"b":1}');
  });
});
