/**
 * Every number of the reference page on severity stands in the program under its own id, unit, detection and confidence.
 * The rows are copied from that page, which quotes the standards second-hand; rows it marks "from memory" are held here only
 * to be marked recalled, which is no check of their truth.
 */
import { describe, expect, it } from 'vitest';
import { publishedById, publishedIds, publishedSets } from '../../src/limits/published.ts';
import { SHAFT_SET_ID, shaftSet } from '../../src/limits/iso20816-3.ts';
import { RATING_LADDER } from '../../src/limits/iso20816-9.ts';

type Row = readonly [
  id: string,
  quantity: string,
  unit: string,
  detection: string,
  ab: number | null,
  bc: number | null,
  cd: number | null,
  confidence: string,
];

const V = ['velocity', 'mm/s', 'rms'] as const;
const D = ['displacement', 'µm', 'rms'] as const;

const PAGE: readonly Row[] = [
  // ISO 20816-3:2022 Tables A.1, A.2 (same numbers as ISO 10816-3:2009)
  ['iso20816-3-group1-rigid', ...V, 2.3, 4.5, 7.1, 'confirmed'],
  ['iso20816-3-group1-rigid', ...D, 29, 57, 90, 'confirmed'],
  ['iso20816-3-group1-flexible', ...V, 3.5, 7.1, 11.0, 'confirmed'],
  ['iso20816-3-group1-flexible', ...D, 45, 90, 140, 'confirmed'],
  ['iso20816-3-group2-rigid', ...V, 1.4, 2.8, 4.5, 'confirmed'],
  ['iso20816-3-group2-rigid', ...D, 22, 45, 71, 'confirmed'],
  ['iso20816-3-group2-flexible', ...V, 2.3, 4.5, 7.1, 'confirmed'],
  ['iso20816-3-group2-flexible', ...D, 37, 71, 113, 'confirmed'],
  // ISO 10816-7:2009
  ['iso10816-7-category1-to-200kW', ...V, 2.5, 4.0, 6.6, 'one source'],
  ['iso10816-7-category1-above-200kW', ...V, 3.5, 5.0, 7.6, 'one source'],
  ['iso10816-7-category2-to-200kW', ...V, 3.2, 5.1, 8.5, 'one source'],
  ['iso10816-7-category2-above-200kW', ...V, 4.2, 6.1, 9.5, 'one source'],
  // ISO 10816-1:1995 Annex B
  ['iso10816-1-class1', ...V, 0.71, 1.8, 4.5, 'confirmed'],
  ['iso10816-1-class2', ...V, 1.12, 2.8, 7.1, 'confirmed'],
  ['iso10816-1-class3', ...V, 1.8, 4.5, 11.2, 'confirmed'],
  ['iso10816-1-class4', ...V, 2.8, 7.1, 18, 'confirmed'],
  // ISO 20816-2
  ['iso20816-2-3000', ...V, 3.8, 7.5, 11.8, 'one source'],
  ['iso20816-2-1500', ...V, 2.8, 5.3, 8.5, 'recalled'],
  // ISO 14694:2003
  ['iso14694-bv2-rigid', ...V, 5.6, 9.0, null, 'recalled'],
  ['iso14694-bv2-flexible', ...V, 9.0, 14.0, null, 'recalled'],
  ['iso14694-bv3-rigid', ...V, 4.5, 7.1, 9.0, 'recalled'],
  ['iso14694-bv3-flexible', ...V, 6.3, 11.8, 12.5, 'recalled'],
  ['iso14694-bv4-rigid', ...V, 2.8, 4.5, 7.1, 'recalled'],
  ['iso14694-bv4-flexible', ...V, 4.5, 7.1, 11.2, 'recalled'],
  ['iso14694-bv5-rigid', ...V, 1.8, 4.0, 5.6, 'recalled'],
  ['iso14694-bv5-flexible', ...V, 2.8, 5.6, 7.1, 'recalled'],
  // Acceptance: NEMA MG 1 Part 7, API 610 / ISO 13709, IEC 60034-14:2003
  ...(
    [
      [3600, 0.15],
      [1800, 0.15],
      [1200, 0.15],
      [900, 0.12],
      [720, 0.09],
      [600, 0.08],
    ] as const
  ).map(([rpm, peak]): Row => [`nema-mg1-${rpm}`, 'velocity', 'in/s', 'true peak', null, peak, null, 'confirmed']),
  ['api610-preferred', ...V, null, 3.0, null, 'confirmed'],
  ['api610-allowable', ...V, null, 3.9, null, 'confirmed'],
  ['iec60034-14-a-h56-132', ...V, null, 1.6, null, 'one source'],
  ['iec60034-14-a-h132-280', ...V, null, 2.2, null, 'one source'],
  ['iec60034-14-a-h280', ...V, null, 2.8, null, 'one source'],
];

describe('each row of the page', () => {
  for (const [id, quantity, unit, detection, ab, bc, cd, confidence] of PAGE) {
    it(`${id}, ${quantity}`, () => {
      expect(publishedById(id).filter((s) => s.quantity === quantity)).toMatchObject([
        { unit, detection, ab, bc, cd, confidence, published: true, basis: 'standard' },
      ]);
    });
  }

  it('NEMA, rigid mounting: 0.8 of the resilient limit', () => {
    for (const rpm of [3600, 1800, 1200, 900, 720, 600]) {
      const [resilient, rigid] = [publishedById(`nema-mg1-${rpm}`)[0]?.bc ?? 0, publishedById(`nema-mg1-${rpm}-rigid`)[0]?.bc ?? 0];
      expect(rigid / resilient).toBeCloseTo(0.8, 12);
    }
  });

  it('ISO 20816-9:2020: one rung below, at and above each rating of the ladder; VR 8 is 5, 8, 12.5', () => {
    const ladder = [2, 3.15, 5, 8, 12.5, 20, 31.5, 50, 80, 125, 200, 315];
    expect(RATING_LADDER).toEqual(ladder);
    for (const [letters, quantity, unit, detection] of [
      ['vr', 'velocity', 'mm/s', 'rms'],
      ['ar', 'acceleration', 'm/s²', 'true peak'],
      ['dr', 'displacement', 'µm', 'true peak-to-peak'],
    ] as const) {
      ladder.forEach((rating, i) => {
        const rows = publishedById(`iso20816-9-${letters}${rating}`);
        const [ab, cd] = [ladder[i - 1], ladder[i + 1]];
        if (ab === undefined || cd === undefined) expect(rows).toEqual([]);
        else expect(rows).toMatchObject([{ quantity, unit, detection, ab, bc: rating, cd, confidence: 'one source' }]);
      });
    }
    expect(publishedById('iso20816-9-vr8')[0]).toMatchObject({ ab: 5, bc: 8, cd: 12.5 });
  });

  it('ISO 7919-3 formulas: n = 3600 gives 80, 150, 220 and n = 10 000 gives 48, 90, 132 µm pk-pk', () => {
    for (const [rpm, ab, bc, cd] of [
      [3600, 80, 150, 220],
      [10_000, 48, 90, 132],
    ] as const) {
      const set = shaftSet(rpm);
      expect(set.ab).toBeCloseTo(ab, 9);
      expect(set.bc).toBeCloseTo(bc, 9);
      expect(set.cd).toBeCloseTo(cd, 9);
      expect(set).toMatchObject({
        id: SHAFT_SET_ID,
        unit: 'µm',
        detection: 'true peak-to-peak',
        measuredOn: 'shaft relative',
        confidence: 'one source',
      });
    }
  });

  it('check value 10: displacement is v/(2πf0), f0 12.5 Hz for group 1 and 10 Hz for group 2, within 1 µm (derived)', () => {
    for (const group of [1, 2] as const) {
      for (const support of ['rigid', 'flexible']) {
        const rows = publishedById(`iso20816-3-group${group}-${support}`);
        const [velocity, displacement] = [rows.find((s) => s.quantity === 'velocity'), rows.find((s) => s.quantity === 'displacement')];
        for (const key of ['ab', 'bc', 'cd'] as const) {
          const derived = ((velocity?.[key] ?? Number.NaN) * 1000) / (2 * Math.PI * (group === 1 ? 12.5 : 10));
          expect(Math.abs((displacement?.[key] ?? Number.NaN) - derived)).toBeLessThan(1);
        }
      }
    }
  });

  it('ISO 10816-7 ALARM and TRIP at most: 1.25 × B/C and C/D, as the page prints them (arithmetic)', () => {
    for (const [id, alarm, trip] of [
      ['category1-to', 5.0, 8.3],
      ['category1-above', 6.3, 9.5],
      ['category2-to', 6.4, 10.6],
      ['category2-above', 7.6, 11.9],
    ] as const) {
      const set = publishedById(`iso10816-7-${id}-200kW`)[0];
      expect(Math.abs(1.25 * (set?.bc ?? 0) - alarm)).toBeLessThanOrEqual(0.05 + 1e-9);
      expect(Math.abs(1.25 * (set?.cd ?? 0) - trip)).toBeLessThanOrEqual(0.05 + 1e-9);
    }
  });
});

describe('the list as a whole', () => {
  it('holds nothing that the page has not', () => {
    const known = new Set([...PAGE.map(([id]) => id), SHAFT_SET_ID]);
    const other = publishedSets()
      .map((s) => s.id)
      .filter((id) => !known.has(id) && !/^iso20816-9-(vr|ar|dr)[\d.]+$/.test(id) && !/^nema-mg1-\d+-rigid$/.test(id));
    expect(other).toEqual([]);
  });

  it('each set names standard, edition, table and how sure it is; boundaries ascend; (id, quantity) is one row', () => {
    const seen = new Set<string>();
    for (const set of publishedSets()) {
      for (const text of [set.id, set.title, set.source, set.edition, set.table, set.confidence]) expect(text).toBeTruthy();
      expect(set.id).toMatch(/^[A-Za-z0-9.-]+$/);
      const boundaries = [set.ab, set.bc, set.cd].filter((b) => b !== null);
      expect(boundaries).toEqual([...boundaries].sort((a, b) => a - b));
      const key = `${set.id} ${set.quantity}`;
      expect(seen.has(key)).toBe(false);
      seen.add(key);
      expect(set.source).toMatch(/second-hand|recalled/);
    }
  });

  it('acceptance limits are marked as such, and no others; an unknown id has no rows', () => {
    for (const set of publishedSets()) expect([set.id, set.acceptance]).toEqual([set.id, /^(nema|api|iec)/.test(set.id)]);
    expect(publishedById('iso20816-3-group3-rigid')).toEqual([]);
    expect(publishedById('constructor')).toEqual([]);
    expect(publishedIds()).toContain('iso20816-3-group2-rigid');
  });
});
