/** Spellings of units; conversions there and back. That a spelling is in use at all is common practice, no single source. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KNOWN_QUANTITIES } from '../../src/measure/detection.ts';
import {
  fromHz,
  fromOrders,
  nearestUnit,
  parseFrequencyUnit,
  parseUnit,
  toHz,
  toOrders,
  type UnitSymbol,
  unitFactor,
  unitsOf,
} from '../../src/measure/units.ts';

const TYPED: Readonly<Record<UnitSymbol, readonly string[]>> = {
  'mm/s': ['mm/s', 'MM/S', ' mm / s ', 'mm/sec', 'mm/Sec', 'mms-1', 'mm s-1', 'mm·s⁻¹', 'mm s^-1', 'mm.s-1', 'mm per s', 'mm per second'],
  'in/s': ['in/s', 'in/sec', 'ips', 'IPS', 'inch/s', 'inches/sec', 'in s-1', 'in·s⁻¹', '"/s'],
  'm/s': ['m/s', 'm/sec', 'm s-1', 'm·s⁻¹', 'metres per second'],
  µm: ['um', 'UM', '\u00b5m', '\u03bcm', 'micron', 'Microns', 'micrometre', 'micrometers'],
  mm: ['mm', 'MM', 'millimetre'],
  mil: ['mil', 'mils', 'Mils', 'thou'],
  in: ['in', 'inch', 'Inches', '"', '″'],
  m: ['m', 'metre', 'meters'],
  g: ['g', 'G', 'gs', "g's", 'g’s'],
  'm/s²': ['m/s2', 'm/s²', 'm/s^2', 'm s-2', 'm s⁻²', 'm·s⁻²', 'm.s-2', 'm/s/s', 'm/sec²', 'ms-2', 'M/S2'],
  'mm/s²': ['mm/s2', 'mm/s²', 'mm s-2', 'mm·s⁻²', 'mm*s-2', 'mm/s/s'],
  'in/s²': ['in/s2', 'in/s²', 'in/sec^2', 'in s-2', 'inch/s²'],
};

const ALL = KNOWN_QUANTITIES.flatMap(unitsOf);

describe('spellings', () => {
  for (const [symbol, spellings] of Object.entries(TYPED)) {
    it(`${symbol} is read from ${spellings.length} spellings`, () => {
      for (const typed of spellings) expect([typed, parseUnit(typed)?.symbol]).toEqual([typed, symbol]);
    });
  }

  it('each canonical symbol is read as itself, with its quantity', () => {
    expect(ALL).toHaveLength(12);
    for (const quantity of KNOWN_QUANTITIES)
      for (const symbol of unitsOf(quantity)) expect(parseUnit(symbol)).toEqual({ symbol, quantity });
  });

  it('a text with a detection in it is not read as the unit', () => {
    for (const typed of ['mm/s rms', 'mm/s (rms)', 'in/s pk', 'mil pk-pk', 'µm p-p', 'g true peak', 'grms', 'm/s2_rms'])
      expect([typed, parseUnit(typed)]).toEqual([typed, null]);
  });

  it('what could be two units, is none, or is a property of every object, is not read', () => {
    for (const typed of ['', ' ', 'mms', 'gE', 'm/h', 'dB', '%', '1', 'constructor', '__proto__', 'toString'])
      expect([typed, parseUnit(typed)]).toEqual([typed, null]);
    expect(nearestUnit('mms', 'velocity')).toBe('mm/s');
    expect(nearestUnit('mm/z')).toBe('mm/s');
    expect(nearestUnit('micorn')).toBe('µm');
    expect(nearestUnit('temperature of the bearing')).toBeNull();
  });

  it('frequency units', () => {
    for (const typed of ['Hz', 'hz', 'HZ', '1/s', 's⁻¹', 'cps']) expect([typed, parseFrequencyUnit(typed)]).toEqual([typed, 'Hz']);
    for (const typed of ['CPM', 'cpm', 'cycles per minute', 'cycles/min'])
      expect([typed, parseFrequencyUnit(typed)]).toEqual([typed, 'CPM']);
    for (const typed of ['r/min', 'rpm', 'RPM', '1/min', 'min⁻¹', 'min-1', 'rev/min', 'U/min'])
      expect([typed, parseFrequencyUnit(typed)]).toEqual([typed, 'r/min']);
    for (const typed of ['', 'orders', 'mm/s', 'constructor', '__proto__'])
      expect([typed, parseFrequencyUnit(typed)]).toEqual([typed, null]);
  });
});

describe('conversion', () => {
  it('the defined ones are exact: 1 mil = 25.4 µm, 1 in/s = 25.4 mm/s, 1 g = 9.80665 m/s² (CGPM 1901)', () => {
    for (const [from, to, factor] of [
      ['mil', 'µm', 25.4],
      ['in/s', 'mm/s', 25.4],
      ['g', 'm/s²', 9.80665],
      ['g', 'mm/s²', 9806.65],
      ['mm', 'µm', 1000],
      ['in', 'mil', 1000],
      ['m', 'µm', 1e6],
    ] as const) {
      expect([from, to, unitFactor(from, to)]).toEqual([from, to, factor]);
    }
  });

  it('there and back is the same to 1e-15, by way of a third unit to 1e-14', () => {
    const symbols = fc.constantFrom(...KNOWN_QUANTITIES).chain((q) => fc.tuple(...[0, 1, 2].map(() => fc.constantFrom(...unitsOf(q)))));
    fc.assert(
      fc.property(symbols, ([a, b, c]) => {
        const [ab, ba, bc, ac] = [
          unitFactor(a ?? '', b ?? ''),
          unitFactor(b ?? '', a ?? ''),
          unitFactor(b ?? '', c ?? ''),
          unitFactor(a ?? '', c ?? ''),
        ].map((f) => f ?? Number.NaN) as [number, number, number, number];
        expect(Math.abs(ab * ba - 1)).toBeLessThan(1e-15);
        expect(Math.abs((ab * bc) / ac - 1)).toBeLessThan(1e-14);
      }),
    );
  });

  it('units of two quantities, and unknown ones, convert to nothing', () => {
    for (const a of ALL)
      for (const b of ALL) expect([a, b, unitFactor(a, b) === null]).toEqual([a, b, parseUnit(a)?.quantity !== parseUnit(b)?.quantity]);
    expect(unitFactor('mm/s', 'bar')).toBeNull();
    expect(unitFactor('toString', 'mm/s')).toBeNull();
    expect(unitFactor('bar', 'bar')).toBe(1);
  });

  it('frequency and orders come back', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 20_000, noNaN: true }),
        fc.double({ min: 1, max: 30_000, noNaN: true }),
        fc.constantFrom('Hz' as const, 'CPM' as const, 'r/min' as const),
        (hz, rpm, unit) => {
          expect(toHz(fromHz(hz, unit), unit) / hz).toBeCloseTo(1, 12);
          expect(fromOrders(toOrders(hz, rpm), rpm) / hz).toBeCloseTo(1, 12);
        },
      ),
    );
  });
});
