import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { parseDocument } from 'htmlparser2';
import { describe, expect, it } from 'vitest';
import { inks } from '../../src/brand/brand.ts';
import type { Drawing, PathShape } from '../../src/chart/drawing.ts';
import { apart } from '../../src/chart/history.ts';
import { toPdfOperators } from '../../src/chart/operators.ts';
import { plantOverTime } from '../../src/chart/over-time.ts';
import { ringValue } from '../../src/chart/polar.ts';
import { toSvg } from '../../src/chart/svg.ts';
import { zoneMark } from '../../src/chart/zone-mark.ts';
import { dayText } from '../../src/plant/day.ts';
import { all, CASES, columns, DATES, history, polar, spark } from './cases.ts';

const names = Object.keys(CASES);
/** Drawings kept as text: one of each kind. */
const KEPT = [
  'sparkline',
  'sparkline new baseline',
  'sparkline hollow',
  'sparkline held',
  'history',
  'history forecast',
  'polar',
  'over time',
  'mark B',
  'mark r-C',
  'mark not assessed',
];
const drawn = (name: string): Drawing => (CASES[name] as () => Drawing)();
const numbersOf = (d: string): number[] => (d.match(/-?\d*\.?\d+(?:e-?\d+)?/g) ?? []).map(Number);
const paths = (drawing: Drawing): PathShape[] => drawing.shapes.filter((s): s is PathShape => s.kind === 'path');
const D = /^(?:M-?[\d.]+ -?[\d.]+(?:L-?[\d.]+ -?[\d.]+|C-?[\d.]+ -?[\d.]+ -?[\d.]+ -?[\d.]+ -?[\d.]+ -?[\d.]+)*Z?)+$/;

/** Absolute M, L, C, Z; two decimals; inside the sheet; only inks of the palette; texts inside by a generous letter width. */
function expectSound(drawing: Drawing, slack = 0.01): void {
  expect(JSON.stringify(drawing)).not.toMatch(/NaN|Infinity|undefined/);
  const palette = Object.keys(inks('light', null));
  for (const shape of drawing.shapes) {
    if (shape.kind === 'text') {
      const long = shape.text.length * shape.size * 0.52;
      const left = shape.anchor === 'start' ? shape.x : shape.anchor === 'end' ? shape.x - long : shape.x - long / 2;
      expect(left, shape.text).toBeGreaterThanOrEqual(-6);
      expect(left + long, shape.text).toBeLessThanOrEqual(drawing.width + 6);
      expect(shape.y).toBeGreaterThan(shape.size * 0.5);
      expect(shape.y).toBeLessThanOrEqual(drawing.height);
      expect(palette).toContain(shape.fill);
      continue;
    }
    expect(shape.d).toMatch(D);
    const numbers = numbersOf(shape.d);
    expect(numbers.length % 2).toBe(0);
    numbers.forEach((n, i) => {
      expect(Math.abs(n * 100 - Math.round(n * 100))).toBeLessThan(1e-6);
      expect(n).toBeGreaterThanOrEqual(-slack);
      expect(n).toBeLessThanOrEqual((i % 2 === 0 ? drawing.width : drawing.height) + slack);
    });
    if (shape.circle !== undefined) {
      const [cx, cy, r] = shape.circle;
      expect(Math.max(...numbers.filter((_, i) => i % 2 === 0))).toBeCloseTo(cx + r, 1);
      expect(Math.min(...numbers.filter((_, i) => i % 2 === 1))).toBeCloseTo(cy - r, 1);
    }
    for (const ink of [shape.fill, shape.stroke]) if (ink !== null) expect(palette).toContain(ink);
  }
}

describe('drawings', () => {
  it.each(names)('%s is sound', (name) => {
    expectSound(drawn(name));
    expect(drawn(name).alt).not.toBe('');
  });

  it('are the kept ones (renew by UPDATE_GOLDENS=1 npx vitest run test/chart, and look at them)', () => {
    const file = fileURLToPath(new URL('golden.svg.txt', import.meta.url));
    const text = `${KEPT.map((name) => `# ${name}\n${toSvg(drawn(name)).replaceAll('><', '>\n<')}`).join('\n\n')}\n`;
    if (process.env['UPDATE_GOLDENS'] === '1') writeFileSync(file, text);
    expect(text).toBe(readFileSync(file, 'utf8'));
  });

  it('property: any readings give a sound sparkline and history', () => {
    const value = fc.oneof(
      fc.constant(null),
      fc.double({ min: 0, max: 1e9, noNaN: true }),
      fc.constantFrom(0, 1e-12, Number.NaN, Number.POSITIVE_INFINITY),
    );
    const rows = fc.array(fc.tuple(value, fc.boolean()), { maxLength: 12 });
    const limits = fc.constantFrom({}, { ab: null, bc: 2.8, cd: null }, { ab: null, bc: null, cd: null });
    fc.assert(
      fc.property(rows, fc.boolean(), limits, (pairs, held, change) => {
        const input = { values: pairs.map(([v]) => v), comparable: pairs.map(([, c]) => c), held, ...change };
        expectSound(spark({ ...input, newBaselineAt: [3] }));
        expectSound(
          history({
            ...input,
            dates: DATES.slice(0, pairs.length),
            forecast: { boundary: 'C/D', value: 4.5, earliest: '2026-02-01', latest: null },
          }),
        );
      }),
    );
  });

  it('property: any vectors and any counts give a sound plot', () => {
    const vector = fc.option(fc.tuple(fc.double({ min: 0, max: 1e4, noNaN: true }), fc.double({ min: 0, max: 360, noNaN: true })));
    fc.assert(
      fc.property(vector, vector, fc.option(fc.double({ min: 0, max: 1e4, noNaN: true })), (from, to, q) =>
        expectSound(polar(from, to, q)),
      ),
    );
    const count = fc.nat(3000);
    fc.assert(
      fc.property(fc.array(fc.record({ A: count, 'r-B': count, C: count, D: count, 'not assessed': count }), { maxLength: 50 }), (counts) =>
        expectSound(columns(counts)),
      ),
      { numRuns: 40 },
    );
  });

  it('property: readings that rise are a line that rises', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 50, noNaN: true }), { minLength: 2, maxLength: 12 }), (values) => {
        const sorted = [...values].sort((a, b) => a - b);
        const line = paths(spark({ values: sorted })).find((p) => p.stroke === 'ink');
        const ys = numbersOf(line?.d ?? '').filter((_, i) => i % 2 === 1);
        expect(ys).toHaveLength(sorted.length);
        for (let i = 1; i < ys.length; i += 1) expect(ys[i] as number).toBeLessThanOrEqual(ys[i - 1] as number);
      }),
    );
  });
});

describe('what a line may not say', () => {
  const lines = (drawing: Drawing): number[] =>
    paths(drawing)
      .filter((p) => p.stroke === 'ink' && p.dash.length === 0)
      .map((p) => numbersOf(p.d).length / 2);

  it('a new baseline breaks the line; a reading that does not compare is left out and stands hollow', () => {
    expect(lines(spark())).toEqual([12]);
    expect(lines(spark({ newBaselineAt: [6] }))).toEqual([6, 6]);
    const hollow = spark({ comparable: all(12).map((_, i) => i !== 2 && i !== 5) });
    expect(lines(hollow)).toEqual([10]);
    expect(paths(hollow).filter((p) => p.stroke === 'quiet' && p.fill === null)).toHaveLength(2);
  });

  it('nothing is drawn for what is missing; a lone reading is a dot', () => {
    expect(lines(spark({ values: [null, null, null] }))).toEqual([]);
    expect(paths(spark({ values: [null, null] })).some((p) => p.fill === 'teal' || p.stroke === 'teal')).toBe(false);
    expect(paths(spark({ values: [2.2] })).filter((p) => p.fill === 'teal')).toHaveLength(1);
  });

  it('a held one is open at its end, its mark hollow', () => {
    const held = paths(spark({ held: true }));
    expect(held.filter((p) => p.dash.length > 0)).toHaveLength(1);
    expect(held.some((p) => p.fill === 'teal')).toBe(false);
    expect(held.filter((p) => p.stroke === 'teal')).toHaveLength(1);
  });

  it('the history chart says its lines, gaps and what is hollow', () => {
    expect(history().alt).toBe(
      'DE1H velocity. Lines: A/B 1.4, B/C 2.8, C/D 4.5, ALARM 3.5 and baseline 1.20. The line is broken where a new baseline begins.',
    );
    expect(drawn('history held, earlier ones hollow').alt).toContain('6 readings do not compare with the last and stand hollow. ');
    expect(drawn('history held, earlier ones hollow').alt).toContain('it is held');
    expect(drawn('history forecast').alt).toContain('Forecast: C/D between 2026-01-20 and 2026-08-01.');
    expect(drawn('history forecast open').alt).toContain('Forecast: C/D from 2026-01-20 on.');
    expect(drawn('history no limits').alt).toBe('DE1H velocity.');
  });

  it('the newest event keeps its words where they are crowded, the newest survey its date', () => {
    const words = (drawing: Drawing): string[] => drawing.shapes.flatMap((s) => (s.kind === 'text' ? [s.text] : []));
    const crowded = words(
      history({
        events: ['2025-06-01', '2025-06-20', '2025-07-02'].map((date, i) => ({
          date,
          label: `repair number ${i + 1}`,
          newBaseline: false,
        })),
      }),
    );
    expect(crowded).toContain('repair number 3');
    expect(crowded).not.toContain('repair number 2');
    for (const n of [39, 40, 41, 42]) {
      const dates = Array.from({ length: n }, (_, i) => dayText(20_000 + 91 * i));
      expect(words(plantOverTime({ dates, counts: dates.map(() => ({ A: 1 })), width: 490, height: 120, alt: '' }))).toContain(
        dates[n - 1],
      );
    }
  });

  it('labels of limits never lie on one another', () => {
    for (const name of names.filter((n) => n.startsWith('history'))) {
      const ys = drawn(name)
        .shapes.flatMap((s) => (s.kind === 'text' && s.x > 380 && s.anchor === 'start' && / [\d.]+$/.test(s.text) ? [s.y] : []))
        .sort((a, b) => a - b);
      for (let i = 1; i < ys.length; i += 1) expect((ys[i] as number) - (ys[i - 1] as number), name).toBeGreaterThan(6.5);
    }
    expect(apart([50, 50, 50], 7, 0)).toEqual([50, 43, 36]);
    expect(apart([12, 11, 10], 7, 8)).toEqual([22, 15, 8]);
  });

  it('marks differ by shape and filling, not by colour alone', () => {
    const outlines = ['A', 'B', 'C', 'D', 'r-A', 'r-B', 'r-C', 'r-D', 'not assessed'].map((c) =>
      zoneMark(c, 9)
        .shapes.map((s) => (s.kind === 'path' ? `${s.d}${s.fill === null ? 'o' : 'f'}` : ''))
        .join(),
    );
    expect(new Set(outlines).size).toBe(9);
  });

  it.each([
    [0.9, 1],
    [1, 1.2],
    [2.1, 2.5],
    [48, 60],
    [0, 1],
    [Number.NaN, 1],
  ])('the outer ring over %d is %d', (reach, ring) => {
    expect(ringValue(reach)).toBe(ring);
  });
});

describe('the two writers', () => {
  it('SVG: well formed, no style attribute, text escaped', () => {
    const drawing: Drawing = {
      ...history({ events: [{ date: '2024-05-02', label: '<script>alert("&")</script>' }] }),
      alt: '"><img src=x onerror=alert(1)>',
    };
    const svg = toSvg(drawing);
    expect(svg).not.toMatch(/ style=| fill=| stroke="|<script|<img/);
    const root = parseDocument(svg, { xmlMode: true }).children;
    expect(root).toHaveLength(1);
    expect(svg).toContain('role="img" aria-label="&quot;&gt;&lt;img src=x onerror=alert(1)&gt;"');
    expect(toSvg(drawing, { decorative: true })).toContain('aria-hidden="true"');
  });

  it.each(names)('PDF operators of %s: known operators with their operands, two decimals, nothing else', (name) => {
    const operands: Readonly<Record<string, number>> = { m: 2, l: 2, c: 6, h: 0, rg: 3, RG: 3, w: 1, f: 0, S: 0, B: 0 };
    let stack = 0;
    for (const word of toPdfOperators(drawn(name), inks('light', null))
      .replace(/\[[\d. ]*\] 0 d /g, '')
      .split(/\s+/)
      .filter((w) => w !== '')) {
      if (/^-?\d+(\.\d{1,2})?$/.test(word)) stack += 1;
      else {
        expect(operands[word], word).toBe(stack);
        stack = 0;
      }
    }
    expect(stack).toBe(0);
  });

  it('an ink without a colour is a bug', () => {
    expect(() => toPdfOperators(spark(), {})).toThrow(/no ink/);
  });

  it('a sparkline of twelve readings takes well below 0.1 ms', () => {
    const run = (): number => {
      const start = performance.now();
      for (let i = 0; i < 500; i += 1) spark();
      return (performance.now() - start) / 500;
    };
    run();
    expect(Math.min(run(), run(), run(), run())).toBeLessThan(0.1);
  });
});
