import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatNumber, formatQuantity, limitNumber, MINUS, plainNumber } from '../../src/words/numbers.ts';

const NARROW = '\u202f';

/** record.md, decision 13: three significant digits, never fewer decimals than the limit beside, one more where the two would look equal. */
describe('numbers in print', () => {
  it.each<[number, number | null, string]>([
    [4.4996, 4.5, '4.4996'],
    [4.496, 4.5, '4.496'],
    [4.5, 4.5, '4.50'],
    [4.504, 4.5, '4.504'],
    [4.51, 4.5, '4.51'],
    [2.7999, 2.8, '2.7999'],
    [7.1, 7.1, '7.10'],
    [7.0999999, 7.1, '7.0999999'],
    [11.23, 4.5, '11.2'],
    [112.4, 4.5, '112.4'],
    [45, 4.5, '45.0'],
    [80, 90, '80.0'],
    [89.97, 90, '89.97'],
    [0.21, 1.4, '0.210'],
    [0.0021, null, '0.00210'],
    [9.996, null, '10.0'],
    [99.96, null, '100'],
    [0, null, '0'],
    [0, 4.5, '0.0'],
    [1480, null, '1480'],
    [12345, null, `12${NARROW}345`],
    [1234567.8, null, `1${NARROW}234${NARROW}568`],
  ])('%d beside %s is %s', (value, limit, text) => {
    expect(formatNumber('en', value, { limit })).toBe(text);
  });

  it('signs: U+2212, a plus where asked, none on a zero that rounding made', () => {
    expect(formatNumber('en', -0.25)).toBe('\u22120.250');
    expect(formatNumber('en', 1.5, { sign: true })).toBe('+1.50');
    expect(formatNumber('en', -0.001, { decimals: 1, sign: true })).toBe('0.0');
    expect(MINUS).toBe('\u2212');
  });

  it('each language has its own decimal sign; the unit is glued by a no-break blank', () => {
    expect(['en', 'de', 'es', 'fr'].map((l) => formatNumber(l as 'en', 4.5))).toEqual(['4.50', '4,50', '4,50', '4,50']);
    expect(formatQuantity('de', 4.5, 'mm/s r.m.s.')).toBe('4,50\u00a0mm/s\u00a0r.m.s.');
  });

  it('plain numbers keep the decimals they were given with', () => {
    expect([8, 1.5, 0.25, 2970, 0.12345, 0.1 + 0.2].map((v) => plainNumber('en', v))).toEqual(['8', '1.5', '0.25', '2970', '0.123', '0.3']);
  });

  it('boundaries print as they were set, three digits at most', () => {
    expect([4.5, 90, 3.075, 0.17716535, 6.3750001, 8].map((v) => limitNumber('en', v))).toEqual([
      '4.5',
      '90',
      '3.08',
      '0.177',
      '6.38',
      '8',
    ]);
  });

  /** `Number.prototype.toPrecision` of the language is the outside check of three significant digits. */
  it('property: three significant digits at least, and never equal to a limit it is not', () => {
    const values = fc.double({ min: 0.001, max: 9000, noNaN: true });
    const limits = fc.constantFrom(0.71, 1.12, 1.4, 1.8, 2.3, 2.8, 4.5, 7.1, 11.2, 80, 90, 120, 132, 185);
    fc.assert(
      fc.property(values, limits, (value, limit) => {
        const text = formatNumber('en', value, { limit });
        const printed = Number(text.replaceAll(NARROW, ''));
        if (Math.abs(value - limit) > 1e-8) expect(printed).not.toBe(limit);
        expect(Math.abs(printed - value)).toBeLessThanOrEqual(Math.max(Math.abs(Number(value.toPrecision(3)) - value), 5e-10) + 1e-12);
        if (value < limit && limit - value > 1e-8) expect(printed).toBeLessThan(limit);
      }),
    );
  });

  it('property: nothing but digits, one decimal sign, narrow blanks and a sign', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e15, max: 1e15 }), (v) => {
        expect(formatNumber('en', v)).toMatch(/^\u2212?\d{1,4}(?:\u202f?\d{3})*(?:\.\d+)?$/);
      }),
    );
  });
});
