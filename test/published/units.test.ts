/** Check values 1 to 6, 18, 19, 26, 27 and 30: units, relations of a sine, forcing frequencies, decibels. */
import Qty from 'js-quantities';
import { describe, expect, it } from 'vitest';
import { publishedById } from '../../src/limits/published.ts';
import { decibels, DB_REFERENCES } from '../../src/measure/decibel.ts';
import { bearingOrders } from '../../src/measure/forcing.ts';
import { limitFactor } from '../../src/measure/limit-factor.ts';
import {
  accelerationOfVelocity,
  apparentFrequencyHz,
  displacementOfVelocity,
  velocityOfAcceleration,
  velocityOfDisplacement,
} from '../../src/measure/sinusoid.ts';
import { fromHz, parseFrequencyUnit, STANDARD_GRAVITY, toHz, toOrders, unitFactor } from '../../src/measure/units.ts';

const factor = (from: string, to: string): number => {
  const found = unitFactor(from, to);
  if (found === null) throw new Error(`${from} does not convert to ${to}`);
  return found;
};
const MIL = 25.4e-6;

it('check value 1: 1200 cycles a minute are 20 Hz (definition; common practice)', () => {
  expect(toHz(1200, 'CPM')).toBe(20);
  expect(fromHz(20, 'r/min')).toBe(1200);
  expect(toOrders(49.5, 990)).toBeCloseTo(3, 12);
  expect(parseFrequencyUnit('cpm')).toBe('CPM');
});

it('check value 2: 1 g by CGPM 1901 standard gravity', () => {
  expect(factor('g', 'in/s²')).toBeCloseTo(386.0886, 4);
  expect(STANDARD_GRAVITY / 0.3048).toBeCloseTo(32.174, 3);
});

it('check value 3: in/s peak of a sine as mm/s r.m.s. (derived)', () => {
  const back = limitFactor({ unit: 'in/s', detection: 'calculated peak' }, { unit: 'mm/s', detection: 'rms' });
  expect(back?.by).toBe('sine');
  for (const [peak, rms] of [
    [1, 17.9605],
    [0.15, 2.6941],
    [0.3, 5.3882],
  ] as const)
    expect(peak * (back?.factor ?? 0)).toBeCloseTo(rms, 4);
});

it('check value 4: 1 mil pk-pk at 3600 CPM (V = πfD, derived)', () => {
  const f = toHz(3600, 'CPM');
  const velocityPeak = velocityOfDisplacement(MIL / 2, f);
  expect(velocityPeak / 0.0254).toBeCloseTo(0.188496, 5);
  expect(accelerationOfVelocity(velocityPeak, f) / STANDARD_GRAVITY).toBeCloseTo(0.184054, 5);
});

it('check value 5: 1 g peak at 1000 Hz (derived; 61.4 g/f is common practice, no single source)', () => {
  expect(velocityOfAcceleration(STANDARD_GRAVITY, 1000) / 0.0254).toBeCloseTo(0.0614479, 6);
});

it('check value 6: the handbook constants, rounded (common practice) and exact (derived)', () => {
  const inch = 0.0254;
  const exact = {
    gOfD: accelerationOfVelocity(velocityOfDisplacement(inch / 2, 1), 1) / STANDARD_GRAVITY,
    gOfV: accelerationOfVelocity(inch, 1) / STANDARD_GRAVITY,
    vOfG: velocityOfAcceleration(STANDARD_GRAVITY, 1) / inch,
    dOfV: (2 * displacementOfVelocity(inch, 1)) / inch,
  };
  for (const [value, printed, known] of [
    [exact.gOfD, 0.0511, 0.0511261],
    [exact.gOfV, 0.0162, 0.016274],
    [exact.vOfG, 61.4, 61.4479],
    [exact.dOfV, 0.318, 0.3183099],
  ] as const) {
    expect(Math.abs(value / printed - 1)).toBeLessThan(0.005);
    expect(Math.abs(value - known)).toBeLessThan(1e-6 * Math.max(1, known));
  }
  expect(apparentFrequencyHz(velocityOfDisplacement(1e-4, 25), 1e-4)).toBeCloseTo(25, 9);
});

it('check value 18: NEMA MG 1 Part 7 rows below 1200 r/min are a constant 2.5 mil pk-pk', () => {
  for (const [rpm, exact, printed] of [
    [900, 0.118, 0.12],
    [720, 0.094, 0.09],
    [600, 0.079, 0.08],
  ] as const) {
    const peak = velocityOfDisplacement((2.5 * MIL) / 2, toHz(rpm, 'r/min')) / 0.0254;
    expect(peak).toBeCloseTo(exact, 3);
    expect(publishedById(`nema-mg1-${rpm}`)[0]).toMatchObject({ bc: printed, unit: 'in/s', detection: 'true peak' });
    expect(Math.abs(peak - printed)).toBeLessThan(0.005);
  }
});

it('check value 19: 6205 geometry, Case Western Reserve University bearing data centre', () => {
  const orders = bearingOrders({ elements: 9, elementDiameter: 0.3126, pitchDiameter: 1.537, contactAngleDeg: 0 });
  expect(orders.bpfi).toBeCloseTo(5.4152, 4);
  expect(orders.bpfo).toBeCloseTo(3.5848, 4);
  expect(orders.ftf).toBeCloseTo(0.3983, 4);
  expect(2 * orders.bsf).toBeCloseTo(4.7134, 4);
});

describe('check value 26: every unit conversion against js-quantities', () => {
  const theirs: Readonly<Record<string, string>> = {
    'mm/s': 'mm/s',
    'in/s': 'in/s',
    'm/s': 'm/s',
    µm: 'um',
    mm: 'mm',
    mil: 'mil',
    in: 'in',
    m: 'm',
    g: 'gee',
    'm/s²': 'm/s2',
    'mm/s²': 'mm/s2',
    'in/s²': 'in/s2',
  };
  for (const [from, a] of Object.entries(theirs)) {
    for (const [to, b] of Object.entries(theirs)) {
      const ours = unitFactor(from, to);
      it(`${from} to ${to}`, () => {
        if (ours === null) expect(Qty(a).isCompatible(Qty(b))).toBe(false);
        else {
          const expected = Qty(1, a).to(b).scalar;
          expect(Math.abs(ours / expected - 1)).toBeLessThan(1e-12);
        }
      });
    }
  }
});

it('check value 27: 1 mm/s r.m.s. is 120 dB re 1 nm/s (ISO 1683)', () => {
  expect(decibels(1e-3, DB_REFERENCES.velocity.si)).toBeCloseTo(120, 9);
  expect(DB_REFERENCES.velocity.text).toBe('re 1 nm/s');
});

it('check value 30: ratio 2.5 is 7.96 dB, 8 dB is ×2.512 (arithmetic)', () => {
  expect(decibels(2.5, 1)).toBeCloseTo(7.96, 2);
  expect(Math.exp((8 * Math.LN10) / 20)).toBeCloseTo(2.512, 3);
});
