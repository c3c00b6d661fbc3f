/** Detection, limits carried between detections, phasors, relations of a sine. Relations: arithmetic of a pure sine. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DETECTIONS, KNOWN_QUANTITIES, parseDetection } from '../../src/measure/detection.ts';
import { bladePassHz, gearMeshHz, twiceLineHz } from '../../src/measure/forcing.ts';
import { limitFactor } from '../../src/measure/limit-factor.ts';
import { nearestWord } from '../../src/measure/nearest.ts';
import { vectorChange } from '../../src/measure/phasor.ts';
import {
  accelerationOfVelocity,
  apparentFrequencyHz,
  displacementOfVelocity,
  velocityOfAcceleration,
  velocityOfDisplacement,
} from '../../src/measure/sinusoid.ts';
import { unitsOf } from '../../src/measure/units.ts';

describe('detection', () => {
  it('each word of the contract is read as itself, whatever peak means', () => {
    for (const detection of DETECTIONS)
      for (const means of [null, 'calculated', 'true'] as const) expect(parseDetection(detection, means)).toEqual({ detection });
  });

  it('a bare peak asks back unless the plant says what it means', () => {
    for (const [typed, shape] of [
      ['peak', 'peak'],
      ['pk', 'peak'],
      ['0-p', 'peak'],
      ['zero to peak', 'peak'],
      ['peak-to-peak', 'peak-to-peak'],
      ['pk-pk', 'peak-to-peak'],
      ['P-P', 'peak-to-peak'],
    ] as const) {
      expect([typed, parseDetection(typed, null)]).toEqual([typed, { ambiguous: shape }]);
      expect(parseDetection(typed, 'calculated')).toEqual({ detection: `calculated ${shape}` });
      expect(parseDetection(typed, 'true')).toEqual({ detection: `true ${shape}` });
    }
  });

  it('stated beats what the plant says; RMS in any case; the rest is no detection', () => {
    expect(parseDetection('true pk', 'calculated')).toEqual({ detection: 'true peak' });
    expect(parseDetection('calc pk-pk', 'true')).toEqual({ detection: 'calculated peak-to-peak' });
    for (const typed of ['RMS', 'r.m.s.', 'true rms']) expect(parseDetection(typed, null)).toEqual({ detection: 'rms' });
    for (const typed of ['', 'max', 'true', 'constructor', 'mm/s']) expect([typed, parseDetection(typed, 'true')]).toEqual([typed, null]);
  });
});

describe('limits carried to another unit and detection', () => {
  const detection = fc.constantFrom(...DETECTIONS);
  const graduation = fc
    .constantFrom(...KNOWN_QUANTITIES)
    .chain((q) => fc.tuple(...[0, 1, 2].map(() => fc.record({ unit: fc.constantFrom(...unitsOf(q)), detection }))));

  it('r.m.s. to calculated peak is √2, to calculated peak-to-peak 2√2 (pure sine)', () => {
    const rms = { unit: 'mm/s', detection: 'rms' } as const;
    expect(limitFactor(rms, { unit: 'mm/s', detection: 'calculated peak' })).toEqual({ factor: Math.SQRT2, by: 'sine' });
    expect(limitFactor(rms, { unit: 'mm/s', detection: 'calculated peak-to-peak' })).toEqual({ factor: 2 * Math.SQRT2, by: 'sine' });
    expect(limitFactor(rms, rms)).toEqual({ factor: 1, by: 'exact' });
  });

  it('nothing is computed to or from a true or mean value of another detection', () => {
    fc.assert(
      fc.property(graduation, ([from, to]) => {
        if (from === undefined || to === undefined) return;
        const found = limitFactor(from, to);
        const untold = [from.detection, to.detection].some((d) => d.startsWith('true') || d === 'mean');
        if (from.detection === to.detection) expect(found?.by).toBe('exact');
        else if (untold) expect(found).toBeNull();
        else expect(found?.by).toBe('sine');
      }),
    );
  });

  it('there and back is 1, and a way by a third is the direct way', () => {
    fc.assert(
      fc.property(graduation, ([a, b, c]) => {
        if (a === undefined || b === undefined || c === undefined) return;
        const [ab, ba, bc, ac] = [limitFactor(a, b), limitFactor(b, a), limitFactor(b, c), limitFactor(a, c)];
        expect(ab === null).toBe(ba === null);
        if (ab !== null && ba !== null) expect(ab.factor * ba.factor).toBeCloseTo(1, 12);
        if (ab !== null && bc !== null && ac !== null) expect((ab.factor * bc.factor) / ac.factor).toBeCloseTo(1, 12);
      }),
    );
  });

  it('a plant’s own unit converts to itself alone', () => {
    expect(limitFactor({ unit: 'score', detection: null }, { unit: 'score', detection: null })?.factor).toBe(1);
    expect(limitFactor({ unit: 'score', detection: null }, { unit: 'points', detection: null })).toBeNull();
    expect(limitFactor({ unit: 'mm/s', detection: null }, { unit: 'mm/s', detection: 'rms' })).toBeNull();
  });
});

describe('phasors', () => {
  const phasor = fc.record({
    amplitude: fc.double({ min: 0, max: 100, noNaN: true }),
    lagDeg: fc.double({ min: 0, max: 360, noNaN: true }),
  });

  it('ISO 20816-1:2016 Annex D, second-hand: 3 mm/s at 40° to 2.5 mm/s at 180° is 5.1711 at 201.90°', () => {
    const change = vectorChange({ amplitude: 3, lagDeg: 40 }, { amplitude: 2.5, lagDeg: 180 });
    expect(change.amplitude).toBeCloseTo(5.1711, 4);
    expect(change.lagDeg).toBeCloseTo(201.9, 2);
  });

  it('the change lies between difference and sum of the lengths, its angle in 0 ≤ lag < 360', () => {
    fc.assert(
      fc.property(phasor, phasor, (a, b) => {
        const { amplitude, lagDeg } = vectorChange(a, b);
        expect(amplitude).toBeGreaterThanOrEqual(Math.abs(a.amplitude - b.amplitude) - 1e-9);
        expect(amplitude).toBeLessThanOrEqual(a.amplitude + b.amplitude + 1e-9);
        expect(lagDeg).toBeGreaterThanOrEqual(0);
        expect(lagDeg).toBeLessThan(360);
        expect(vectorChange(b, a).amplitude).toBeCloseTo(amplitude, 9);
      }),
    );
    expect(vectorChange({ amplitude: 1, lagDeg: 0 }, { amplitude: 2, lagDeg: -1e-15 }).lagDeg).toBe(0);
    expect(vectorChange({ amplitude: 2, lagDeg: 30 }, { amplitude: 2, lagDeg: 30 }).amplitude).toBe(0);
  });
});

describe('relations of a sine', () => {
  it('come back, and give the frequency they were made with', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1, noNaN: true }), fc.double({ min: 0.5, max: 20_000, noNaN: true }), (amplitude, hz) => {
        const velocity = velocityOfDisplacement(amplitude, hz);
        expect(displacementOfVelocity(velocity, hz) / amplitude).toBeCloseTo(1, 12);
        expect(velocityOfAcceleration(accelerationOfVelocity(velocity, hz), hz) / velocity).toBeCloseTo(1, 12);
        expect(apparentFrequencyHz(velocity, amplitude) / hz).toBeCloseTo(1, 12);
        expect(apparentFrequencyHz(accelerationOfVelocity(velocity, hz), velocity) / hz).toBeCloseTo(1, 12);
      }),
    );
  });

  it('forcing frequencies by count (textbook formulas, common practice)', () => {
    expect(gearMeshHz(37, 24.5)).toBeCloseTo(906.5, 9);
    expect(bladePassHz(6, 49.5)).toBeCloseTo(297, 9);
    expect([twiceLineHz(50), twiceLineHz(60)]).toEqual([100, 120]);
  });
});

it('the nearest word: one letter wrong, two exchanged, none where nothing is near', () => {
  const words = ['velocity', 'displacement', 'acceleration'];
  expect(nearestWord('velocty', words)).toBe('velocity');
  expect(nearestWord('VELOCITY ', words)).toBe('velocity');
  expect(nearestWord('veloctiy', words)).toBe('velocity');
  expect(nearestWord('temperature', words)).toBeNull();
  expect(nearestWord('', words)).toBeNull();
});
