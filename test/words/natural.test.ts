import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { naturalOrder } from '../../src/words/natural.ts';

const ids = fc.string({ unit: fc.constantFrom('a', 'B', '0', '1', '9', '-', ' ', 'é', '\ud83d\ude00'), maxLength: 8 });

describe('natural order', () => {
  it.each<[string[]]>([
    [['P-1', 'P-2', 'P-10', 'P-10A', 'P-11']],
    [['1', '01', '001', '2']],
    [['3-2', '3-10', '20-1']],
    [['', 'A', 'A1', 'A1b', 'a1']],
    [['1H', '1V', '2H', '10H']],
    [['x9007199254740993', 'x9007199254740994', 'x90071992547409930']],
  ])('%j', (sorted) => {
    for (const start of [[...sorted].reverse(), [...sorted.slice(1), sorted[0] as string]])
      expect(start.sort(naturalOrder)).toEqual(sorted);
  });

  /** Intl.Collator with `numeric` (ICU) is the outside check, for plain lower-case ids without leading zeros. */
  it('agrees with ICU on plain ids', () => {
    const icu = new Intl.Collator('en', { numeric: true });
    const plain = fc
      .tuple(fc.constantFrom('fan', 'pump', 'mill'), fc.nat(300), fc.constantFrom('', 'a', 'b'))
      .map(([a, n, b]) => `${a}${n}${b}`);
    fc.assert(
      fc.property(plain, plain, (a, b) => {
        expect(Math.sign(naturalOrder(a, b))).toBe(Math.sign(icu.compare(a, b)));
      }),
    );
  });

  it('property: a total order', () => {
    fc.assert(
      fc.property(ids, ids, ids, (a, b, c) => {
        expect(naturalOrder(a, b) === 0).toBe(a === b);
        expect(naturalOrder(a, b) < 0).toBe(naturalOrder(b, a) > 0);
        if (naturalOrder(a, b) <= 0 && naturalOrder(b, c) <= 0) expect(naturalOrder(a, c)).toBeLessThanOrEqual(0);
      }),
      { numRuns: 2000 },
    );
  });
});
