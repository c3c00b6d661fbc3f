/** Each rule of the house fires on a bad line and keeps quiet on its good neighbour: the real biome.json on snippets laid into a copy of the tree. */
import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';

const biome = join(process.cwd(), 'node_modules/.bin/biome');
const lines = (count: number, line: string): string => Array.from({ length: count }, () => `${line}\n`).join('');

interface Case {
  readonly rule: string;
  /** Where the snippet lies: rules differ by folder. */
  readonly at: string;
  readonly bad: string;
  readonly good: string;
  /** Part of the complaint. */
  readonly says: string;
}

const importing = (path: string): string => `import { f } from '${path}';\nexport const g = f;\n`;
const direction = (at: string, bad: string, good: string): Case => ({
  rule: 'direction',
  at: `src/${at}/snippet.ts`,
  bad: importing(bad),
  good: importing(good),
  says: 'Imports run downwards only',
});
const line = (code: string): string => `export const f = () => ${code};\n`;
const impure = (bad: string, good: string, says: string): Case => ({
  rule: 'impure',
  at: 'src/assess/snippet.ts',
  bad: line(bad),
  good: line(good),
  says,
});
const boundary = (bad: string, good: string): Case => ({
  rule: 'boundary',
  at: 'src/assess/snippet.ts',
  bad: line(bad),
  good: line(good),
  says: 'compared by exceeds() alone',
});

const CASES: readonly Case[] = [
  direction('measure', '../plant/day.ts', './units.ts'),
  direction('plant', '../assess/zone.ts', '../measure/units.ts'),
  direction('limits', '../survey/read.ts', '../plant/day.ts'),
  direction('survey', '../assess/assess.ts', '../shell/types.ts'),
  direction('survey', '../record/types.ts', '../words/natural.ts'),
  direction('record', '../assess/assess.ts', '../plant/policy.ts'),
  direction('assess', '../survey/read.ts', '../limits/choose.ts'),
  direction('assess', '../page/summary.ts', '../record/types.ts'),
  direction('assess/doubts', '../../survey/read.ts', '../zone.ts'),
  direction('words', '../measure/units.ts', './facts.ts'),
  direction('brand', '../page/summary.ts', '../words/facts.ts'),
  direction('chart', '../page/summary.ts', '../brand/brand.ts'),
  direction('page', '../pdf/render.ts', '../chart/svg.ts'),
  direction('page', '../assess/zone.ts', '../record/types.ts'),
  direction('pdf', '../assess/assess.ts', '../page/assets.ts'),
  direction('pdf', '../site/site.ts', '../record/types.ts'),
  direction('site', '../survey/read.ts', '../page/assets.ts'),
  direction('table', '../pdf/render.ts', '../words/say.ts'),
  direction('archive', '../commands/report.ts', '../record/read.ts'),
  direction('commands', '../main.ts', '../assess/assess.ts'),
  direction('shell', '../survey/read.ts', '../page/assets.ts'),
  direction('measure', '../shell/shell.ts', '../shell/types.ts'),
  {
    rule: 'disk',
    at: 'src/survey/snippet.ts',
    bad: importing('node:fs'),
    good: importing('node:crypto'),
    says: 'Only shell/ touches disk',
  },
  impure('Date.now() + x + y', 'x + y', 'No clock and no time zone'),
  impure('Intl.NumberFormat', 'x + y', 'No locale of the runtime'),
  impure('process.env.TZ', 'x + y', 'Only shell/ and main.ts see the process'),
  impure('performance.now()', 'x + y', 'measuring is for test/bench'),
  impure('Math.random()', 'Math.sqrt(x)', 'nothing random'),
  impure('Math.pow(x, y)', 'Math.exp(x)', 'Math.pow differs'),
  impure('x ** y', 'x * y', '** differs'),
  impure('(x **= y)', '(x *= y)', '** differs'),
  impure('x.localeCompare(y)', 'x + y', 'No locale of the runtime'),
  impure('x?.toLocaleUpperCase()', 'x.toFixed(y)', 'No locale of the runtime'),
  boundary('value > limits.bc', 'exceeds(value, limits.bc)'),
  boundary('limits.of.cd <= value', 'value <= other'),
  boundary('value >= 0.9 * limits.ab', 'value >= 0.9 * other'),
  boundary('value < bc * 1.25', 'value < other * 1.25'),
  boundary('value - other > q', 'exceeds(value - other, q)'),
  boundary('value > limits.alarm', 'limits.alarm === null'),
  boundary('value > limits.trip', 'limits.tripped > value'),
  { rule: 'file length', at: 'src/page/snippet.ts', bad: lines(301, 'f();'), good: lines(300, 'f();'), says: 'too many lines' },
  {
    rule: 'function length',
    at: 'src/page/snippet.ts',
    bad: `export function f(): void {\n${lines(61, '  f();')}}\n`,
    good: `export function f(): void {\n${lines(60, '  f();')}}\n`,
    says: 'too many lines',
  },
  { rule: 'any', at: 'src/page/snippet.ts', bad: 'export const a: any = 1;\n', good: 'export const a: unknown = 1;\n', says: 'any' },
  { rule: 'default export', at: 'src/page/snippet.ts', bad: 'export default 1;\n', good: 'export const a = 1;\n', says: 'default export' },
  {
    rule: 'non-null',
    at: 'src/page/snippet.ts',
    bad: 'export const f = (a: string | null) => a!;\n',
    good: 'export const f = (a: string | null) => a;\n',
    says: 'non-null',
  },
];

/** A folder with our biome.json and rules, and one file. */
function complaints(files: Readonly<Record<string, string>>): string {
  const home = mkdtempSync(join(tmpdir(), 'swayfolio-lint-'));
  cpSync('biome.json', join(home, 'biome.json'));
  cpSync('.tools', join(home, '.tools'), { recursive: true });
  for (const [path, text] of Object.entries(files)) {
    mkdirSync(dirname(join(home, path)), { recursive: true });
    writeFileSync(join(home, path), text);
  }
  const run = spawnSync(biome, ['lint', '--error-on-warnings', '--max-diagnostics=none', '--colors=off', 'src'], {
    cwd: home,
    encoding: 'utf8',
  });
  return run.status === 0 ? '' : `${run.stdout}${run.stderr}`;
}

/** All snippets of one kind at once: a start of biome takes a while. Each in a file of its own name. */
function allComplaints(which: 'bad' | 'good'): readonly string[] {
  const files = Object.fromEntries(CASES.map((one, index) => [one.at.replace('snippet', `snippet-${index}x`), one[which]]));
  const blocks = complaints(files).split(/\n(?=src\/)/);
  return CASES.map((_, index) => blocks.filter((block) => block.includes(`snippet-${index}x.ts`)).join('\n'));
}

let onBad: readonly string[] = [];
let onGood: readonly string[] = [];
beforeAll(() => {
  onBad = allComplaints('bad');
  onGood = allComplaints('good');
});

describe('the lint rules', () => {
  test.each(CASES.map((one, index) => ({ ...one, index })))('$rule at $at fires on: $bad', ({ index, says }) => {
    expect(onBad[index]).toContain(says);
    expect(onGood[index]).toBe('');
  });

  test('a cycle of imports', () => {
    const cycle = {
      'src/page/a.ts': "import { b } from './b.ts';\nexport const a = (): unknown => b;\n",
      'src/page/b.ts': "import { a } from './a.ts';\nexport const b = (): unknown => a;\n",
    };
    expect(complaints(cycle)).toContain('noImportCycles');
    expect(complaints({ ...cycle, 'src/page/b.ts': 'export const b = 1;\n' })).toBe('');
  });

  test('exceeds.ts alone may compare a boundary, shell/ alone may ask the clock', () => {
    const comparing = 'export const exceeds = (value: number, bc: number): boolean => value > bc;\n';
    expect(complaints({ 'src/assess/exceeds.ts': comparing, 'src/shell/clock.ts': 'export const now = (): number => Date.now();\n' })).toBe(
      '',
    );
    expect(complaints({ 'src/assess/other.ts': comparing })).toContain('exceeds() alone');
  });
});
