/** Choosing a published set by rule, and "no published zone" with its reason. Rules: section 1 of the assessment; scopes of the standards second-hand or recalled. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KINDS } from '../../src/plant/words.ts';
import { say } from '../../src/words/say.ts';
import { type Asked, chosen } from './question.ts';

/** Id of the set, or the reason why none. */
function answer(asked: Asked): string {
  const { set, rule, conflict } = chosen(asked);
  return set === null ? (conflict ?? rule) : set.id;
}
const none = (reason: string): string => `limits.none.${reason}`;
const motor = { kind: 'motor', powerKw: 75, shaftHeightMm: 225, speedRpm: 1480, support: 'rigid' } as const;
const shaft = {
  point: { measuredOn: 'shaft relative' },
  series: { quantity: 'displacement', unit: 'µm', detection: 'true peak-to-peak' },
} as const;

describe('ISO 20816-3', () => {
  it('motors and generators by shaft height, whatever the power: 315 is group 1, 160 group 2, below none', () => {
    for (const kind of ['motor', 'generator'] as const) {
      for (const powerKw of [null, 16, 400]) {
        const at = (shaftHeightMm: number) => answer({ component: { ...motor, kind, powerKw, shaftHeightMm } });
        expect([at(315), at(314), at(160), at(159)]).toEqual([
          'iso20816-3-group1-rigid',
          'iso20816-3-group2-rigid',
          'iso20816-3-group2-rigid',
          none('small_frame'),
        ]);
      }
    }
  });

  it('shaft height unknown: to 45 kW group 2, above 300 group 1, between them no zone; the policy moves both', () => {
    const at = (powerKw: number | null, policy = {}) => answer({ component: { ...motor, shaftHeightMm: null, powerKw }, policy });
    expect([at(45), at(45.1), at(300), at(300.1), at(null)]).toEqual([
      'iso20816-3-group2-rigid',
      none('shaft_height'),
      none('shaft_height'),
      'iso20816-3-group1-rigid',
      none('shaft_height_and_power'),
    ]);
    expect(at(45.1, { '1.group2.max_power': 55 })).toBe('iso20816-3-group2-rigid');
    const moved = chosen({ component: { ...motor, shaftHeightMm: null, powerKw: 100 }, policy: { '1.group2.max_power': 55 } });
    expect(say('en', moved.rule, moved.facts)).toContain('between 55 and 300 kW');
  });

  it('other kinds by power: above 300 kW group 1; 15 kW and below none; unknown none', () => {
    for (const kind of ['fan', 'compressor', 'steam turbine', 'mixer', 'roll'] as const) {
      const at = (powerKw: number | null) => answer({ component: { kind, powerKw, speedRpm: 1480, support: 'flexible' } });
      expect([at(301), at(300), at(15.1), at(15), at(null)]).toEqual([
        'iso20816-3-group1-flexible',
        'iso20816-3-group2-flexible',
        'iso20816-3-group2-flexible',
        none('small'),
        none('power'),
      ]);
    }
  });

  it('120 to 30 000 r/min; a speed that is not stated is judged and said', () => {
    const at = (speedRpm: number | null) => answer({ component: { ...motor, speedRpm } });
    expect([at(119), at(120), at(30_000), at(30_001)]).toEqual([
      none('speed'),
      'iso20816-3-group2-rigid',
      'iso20816-3-group2-rigid',
      none('speed'),
    ]);
    expect(at(null)).toBe('iso20816-3-group2-rigid');
    expect(chosen({ component: { ...motor, speedRpm: null } }).rule).toBe('limits.rule.shaft_height_speed_unknown');
    expect(chosen({ component: { kind: 'fan', powerKw: 55, support: 'rigid' } }).rule).toBe('limits.rule.power_speed_unknown');
  });

  it('support by direction where the point states it, else the component’s, else none', () => {
    expect(answer({ component: motor, point: { support: 'flexible' } })).toBe('iso20816-3-group2-flexible');
    expect(answer({ component: { ...motor, support: null }, point: { support: 'flexible' } })).toBe('iso20816-3-group2-flexible');
    expect(answer({ component: { ...motor, support: null } })).toBe(none('support'));
  });

  it('velocity and displacement have a row each, acceleration and the plant’s own quantity none', () => {
    expect(chosen({ component: motor, series: { quantity: 'displacement', unit: 'µm' } }).set).toMatchObject({ ab: 22, bc: 45, cd: 71 });
    expect(answer({ component: motor, series: { quantity: 'acceleration', unit: 'm/s²' } })).toBe(none('acceleration'));
    expect(answer({ component: motor, series: { quantity: 'bearing reading', unit: 'x', detection: null } })).toBe(none('own_quantity'));
  });

  it('axial on a bearing housing: by our choice, and only there', () => {
    expect(chosen({ component: motor, point: { direction: 'axial' } }).byOurChoice).toBe(true);
    expect(chosen({ component: motor }).byOurChoice).toBe(false);
    expect(chosen({ component: { ...motor, support: null }, point: { direction: 'axial' } }).byOurChoice).toBe(false);
  });
});

describe('the other standards', () => {
  it('ISO 10816-7: category and power, 200 kW still the lower row, above 1 kW; the motor where it bears the category', () => {
    for (const kind of ['pump', 'motor'] as const) {
      const at = (powerKw: number | null, pumpCategory: 'I' | 'II') => answer({ component: { kind, powerKw, pumpCategory } });
      expect([at(200, 'I'), at(201, 'I'), at(200, 'II'), at(201, 'II')]).toEqual(
        ['1-to', '1-above', '2-to', '2-above'].map((end) => `iso10816-7-category${end}-200kW`),
      );
      expect([at(1, 'I'), at(1.1, 'I'), at(null, 'I')]).toEqual([none('small'), 'iso10816-7-category1-to-200kW', none('power')]);
    }
    expect(answer({ component: { kind: 'pump', powerKw: 75 } })).toBe(none('pump_category'));
    expect(answer({ component: motor, others: [{ kind: 'pump', powerKw: 75, pumpCategory: 'I' }] })).toBe('iso20816-3-group2-rigid');
    expect(answer({ component: { kind: 'pump', powerKw: 75, pumpCategory: 'I' }, series: { quantity: 'displacement', unit: 'µm' } })).toBe(
      none('quantity'),
    );
  });

  it('ISO 14694: fans of a stated category on flexible mounts up to 300 kW; other fans ISO 20816-3', () => {
    const fan = { kind: 'fan', speedRpm: 1470, support: 'flexible', fanCategory: 'BV-3', powerKw: 45 } as const;
    expect(answer({ component: fan })).toBe('iso14694-bv3-flexible');
    expect(answer({ component: { ...fan, powerKw: 300 } })).toBe('iso14694-bv3-flexible');
    expect(answer({ component: { ...fan, powerKw: 301 } })).toBe('iso20816-3-group1-flexible');
    expect(answer({ component: { ...fan, support: 'rigid' } })).toBe('iso20816-3-group2-rigid');
    expect(answer({ component: { ...fan, powerKw: 3 } })).toBe('iso14694-bv3-flexible');
    expect(answer({ component: { ...fan, powerKw: null } })).toBe(none('power'));
    expect(answer({ component: { ...fan, fanCategory: 'BV-1' } })).toBe(none('fan_category'));
    expect(chosen({ component: { ...fan, fanCategory: 'BV-2' } }).set?.cd).toBeNull();
  });

  it('ISO 20816-9 needs the rating, and a rung on both sides of it; no lower power', () => {
    const at = (gearRatingVr: number | null) => answer({ component: { kind: 'gearbox', gearRatingVr, powerKw: 5 } });
    expect([at(8), at(null), at(7), at(2), at(315), at(200)]).toEqual([
      'iso20816-9-vr8',
      none('gear_rating'),
      none('gear_ladder'),
      none('gear_ladder'),
      none('gear_ladder'),
      'iso20816-9-vr200',
    ]);
  });

  it('ISO 20816-2 above 40 MW, for the turbine and its generator, at four speeds', () => {
    const turbine = { kind: 'steam turbine', powerKw: 60_000, speedRpm: 3000, support: 'rigid' } as const;
    const at = (speedRpm: number | null) => answer({ component: { ...turbine, speedRpm } });
    expect([at(3000), at(3600), at(1500), at(1800), at(3001), at(null)]).toEqual([
      'iso20816-2-3000',
      'iso20816-2-3000',
      'iso20816-2-1500',
      'iso20816-2-1500',
      none('turbine_speed'),
      none('turbine_speed'),
    ]);
    expect(answer({ component: { kind: 'generator', powerKw: 60_000, speedRpm: 3000, support: 'rigid' }, drivers: [turbine] })).toBe(
      'iso20816-2-3000',
    );
    expect(answer({ component: { ...turbine, powerKw: 40_000 } })).toBe('iso20816-3-group1-rigid');
  });

  it('shaft relative: by the rated speed, 1000 to 30 000 r/min, by ratio to what drives it too', () => {
    const at = (speedRpm: number | null) => answer({ component: { kind: 'compressor', speedRpm }, ...shaft });
    expect([at(999), at(1000), at(30_000), at(30_001), at(null)]).toEqual([
      none('speed'),
      'iso20816-3-shaft',
      'iso20816-3-shaft',
      none('speed'),
      none('shaft_speed'),
    ]);
    const geared = chosen({
      component: { kind: 'compressor', speedRatio: 2 },
      drivers: [
        { kind: 'motor', speedRpm: 3000 },
        { kind: 'gearbox', speedRatio: 2.5 },
      ],
      ...shaft,
    });
    expect(geared.facts.speed_rpm).toBe(15_000);
    expect(geared.set?.ab).toBeCloseTo(4800 / Math.sqrt(15_000), 9);
    expect(answer({ component: { kind: 'compressor', speedRpm: 3000 }, point: { measuredOn: 'shaft relative' } })).toBe(
      none('shaft_quantity'),
    );
  });
});

describe('no published zone', () => {
  it('kinds outside every built-in set, whatever else is stated', () => {
    for (const kind of [
      'displacement pump',
      'screw compressor',
      'lobe blower',
      'vacuum pump',
      'reciprocating',
      'hydro turbine',
      'gas turbine',
      'screen',
      'other',
    ] as const) {
      expect([kind, answer({ component: { ...motor, kind } })]).toEqual([kind, none('outside')]);
    }
    expect(answer({ component: { ...motor, kind: null } })).toBe(none('kind'));
  });

  it('whatever is coupled to a reciprocating machine, on either side', () => {
    expect(answer({ component: motor, others: [{ kind: 'reciprocating' }] })).toBe(none('reciprocating'));
    expect(answer({ component: { ...motor, kind: 'generator' }, drivers: [{ kind: 'reciprocating' }] })).toBe(none('reciprocating'));
  });

  it('other places than housings and shafts', () => {
    for (const measuredOn of ['structure', 'pipe'] as const)
      expect(answer({ component: motor, point: { measuredOn } })).toBe(none('place'));
    expect(answer({ component: motor, ...shaft, point: { measuredOn: 'shaft absolute' } })).toBe(none('shaft_absolute'));
  });

  it('no acceptance limit and no class is ever chosen by rule, also for a survey of kind acceptance; every answer is a sentence', () => {
    const figure = (...values: number[]) => fc.constantFrom(null, ...values);
    const component = fc.record({
      kind: fc.constantFrom(null, ...KINDS),
      powerKw: figure(0.5, 1, 11, 15, 45, 75, 200, 300, 301, 40_001),
      shaftHeightMm: figure(90, 160, 315),
      speedRpm: figure(100, 600, 1500, 3000, 3600, 31_000),
      support: fc.constantFrom(null, 'rigid' as const, 'flexible' as const),
      pumpCategory: fc.constantFrom(null, 'I' as const, 'II' as const),
      fanCategory: fc.constantFrom(null, 'BV-1' as const, 'BV-3' as const),
      gearRatingVr: figure(2, 7, 8),
    });
    const measuredOn = fc.constantFrom(
      null,
      'bearing housing' as const,
      'shaft relative' as const,
      'shaft absolute' as const,
      'pipe' as const,
    );
    const quantity = fc.constantFrom('velocity', 'displacement', 'acceleration', 'own');
    fc.assert(
      fc.property(
        component,
        measuredOn,
        quantity,
        fc.constantFrom('routine' as const, 'acceptance' as const),
        (row, place, q, surveyKind) => {
          const choice = chosen({ component: row, point: { measuredOn: place }, series: { quantity: q }, surveyKind });
          expect(choice.conflict).toBeNull();
          expect(choice.set?.acceptance ?? false).toBe(false);
          expect(choice.set?.id ?? '').not.toMatch(/^iso10816-1/);
          expect(choice.rule.startsWith(choice.set === null ? 'limits.none.' : 'limits.rule.')).toBe(true);
          expect(say('en', choice.rule, choice.facts)).not.toMatch(/undefined|NaN|\{|unknown/);
        },
      ),
      { numRuns: 2000 },
    );
  });
});
