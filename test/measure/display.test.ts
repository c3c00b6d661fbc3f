/** Display units: factors against js-quantities and the definition of a calculated peak. */
import Qty from 'js-quantities';
import { describe, expect, it } from 'vitest';
import { graduationOf, graduationText, shownAs, shownFacts } from '../../src/measure/display.ts';

const INCH = {
  velocity: { unit: 'in/s', detection: 'calculated peak' },
  displacement: { unit: 'mil', detection: null },
  acceleration: { unit: 'g', detection: null },
} as const;

describe('display units', () => {
  it('a velocity in mm/s r.m.s. is shown in in/s, by the sine as a calculated peak', () => {
    const shown = shownAs(INCH, { unit: 'mm/s', detection: 'rms' });
    expect(shown).toMatchObject({ unit: 'in/s', detection: 'calculated peak' });
    // The unit by js-quantities; a calculated peak is r.m.s. × √2 by definition.
    expect(10 * shown.factor).toBeCloseTo(Qty('10 mm/s').to('in/s').scalar * Math.SQRT2, 12);
  });

  it('a true peak is never turned into another detection, its unit is', () => {
    const shown = shownAs({ acceleration: { unit: 'g', detection: 'rms' } }, { unit: 'm/s²', detection: 'true peak' });
    expect(shown).toMatchObject({ unit: 'g', detection: 'true peak' });
    expect(9.80665 * shown.factor).toBeCloseTo(1, 12);
  });

  it("a plant's own quantity, and one without a wish, stay as they are", () => {
    expect(shownAs(INCH, { unit: 'gE', detection: null })).toEqual({ unit: 'gE', detection: null, factor: 1 });
    expect(shownAs({}, { unit: 'mm/s', detection: 'rms' }).factor).toBe(1);
  });

  it('facts are said in display units: the numbers in the unit beside them alone', () => {
    const told = shownFacts(INCH, { value: 25.4, unit: 'mm/s rms', ratio: 2, point: '1H', baseline: null });
    expect(told['value']).toBeCloseTo(Math.SQRT2, 12);
    expect(told).toMatchObject({ unit: 'in/s calculated peak', ratio: 2, point: '1H', baseline: null });
    expect(graduationText(graduationOf('µm true peak-to-peak'))).toBe('µm true peak-to-peak');
  });
});
