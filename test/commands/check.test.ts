import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { plantFolder, readings, STACK, swayfolio } from './program.ts';

const LAST = 'surveys/2026-01-14/readings.csv';

describe('check', () => {
  test('a sound plant: exit 0 and a count', () => {
    const run = swayfolio(plantFolder(), ['check', 'plant']);
    expect(run.stderr).toBe('');
    expect(run.code).toBe(0);
    expect(run.stdout).toMatch(/(no problems|warnings?|notes?)\nNext: .*swayfolio report plant\n$/);
  });

  test('prints file:line:column: code message, all of several faults in one run', () => {
    const home = plantFolder({ [LAST]: readings(['P-1,DE-H,velocity,rms,eight,mm/s,1480', 'P-9,DE-H,velocity,rms,1.8,mm/s,1480']) });
    const run = swayfolio(home, ['check', 'plant']);
    expect(run.code).toBe(1);
    expect(run.stdout).toMatch(/^surveys\/2026-01-14\/readings\.csv:2:5: \S+ .*eight/m);
    expect(run.stdout).toMatch(/^surveys\/2026-01-14\/readings\.csv:3:1: \S+ .*P-9/m);
    expect(run.stdout).toMatch(
      /2 errors\nNext: mend surveys\/2026-01-14\/readings\.csv:2:5 and the 1 after it, then run again: swayfolio check plant\n$/,
    );
  });

  test('shows the first five of a kind and counts the rest; --json has them all', () => {
    const rows = Array.from({ length: 8 }, (_, index) => `P-1,X-${index},velocity,rms,1,mm/s,1480`);
    const home = plantFolder({ [LAST]: readings(rows) });
    const run = swayfolio(home, ['check', 'plant']);
    expect(run.code).toBe(1);
    expect(run.stdout.match(/^surveys\/2026-01-14\/readings\.csv:\d+:\d+: /gm)).toHaveLength(5);
    expect(run.stdout).toMatch(/and 3 more of /);
    const json = JSON.parse(swayfolio(home, ['check', 'plant', '--json']).stdout);
    expect(json.errors).toBe(8);
    expect(json.problems.filter((problem: { file: string }) => problem.file === LAST)).toHaveLength(8);
  });

  test('compares with today: a date in a far future is a warning that report does not give', () => {
    const home = plantFolder({ 'surveys/2126-01-14/readings.csv': readings(['P-1,DE-H,velocity,rms,2,mm/s,1480']) });
    const run = swayfolio(home, ['check', 'plant']);
    expect(run.stdout).toMatch(/date-after-today .*2126-01-14/);
    expect(run.code).toBe(0);
    expect(swayfolio(home, ['report', 'plant', '--json']).stderr).not.toMatch(/date-after-today/);
  });

  test('never loads the PDF library, nor anything the site is made with', () => {
    const home = plantFolder();
    const hooks = `import { writeSync } from "node:fs"; export async function load(url, context, next) { writeSync(2, 'loaded ' + url + '\\n'); return next(url, context); }`;
    const tell = `data:text/javascript,import { register } from "node:module"; register("data:text/javascript;base64,${Buffer.from(hooks).toString('base64')}");`;
    const loaded = (args: readonly string[]): string => swayfolio(home, args, { node: ['--import', tell] }).stderr;
    expect(loaded(['report', 'plant'])).toMatch(/node_modules\/pdfkit/);
    const ofCheck = loaded(['check', 'plant']);
    expect(ofCheck).toMatch(/node_modules\/csv-parse/);
    expect(ofCheck).not.toMatch(/pdfkit|fontkit|handlebars|htmlparser2|d3-/);
  });
});

/** Each: what is changed in a sound plant, and where the problem must be found. */
const BAD: readonly (readonly [string, Readonly<Record<string, string | null>>, RegExp])[] = [
  ['a missing column', { [LAST]: 'machine,quantity,detection,value,unit\nP-1,velocity,rms,1,mm/s\n' }, /readings\.csv:1.*point/],
  ['an unknown machine', { [LAST]: readings(['P-3,DE-H,velocity,rms,1,mm/s,1480']) }, /readings\.csv:2:1: .*P-3/],
  ['an unknown point', { [LAST]: readings(['P-1,DE-V,velocity,rms,1,mm/s,1480']) }, /readings\.csv:2:2: .*DE-V/],
  [
    'a reading given twice',
    { [LAST]: readings(['P-1,DE-H,velocity,rms,1,mm/s,1480', 'P-1,DE-H,velocity,rms,2,mm/s,1480']) },
    /readings\.csv:3.*2/,
  ],
  ['a value that is no number', { [LAST]: readings(['P-1,DE-H,velocity,rms,eight,mm/s,1480']) }, /readings\.csv:2:5: .*eight/],
  ['an infinite value', { [LAST]: readings(['P-1,DE-H,velocity,rms,Infinity,mm/s,1480']) }, /readings\.csv:2:5: .*Infinity/],
  ['a value that overflows', { [LAST]: readings(['P-1,DE-H,velocity,rms,1e999,mm/s,1480']) }, /readings\.csv:2:5: .*1e999/],
  ['a negative value', { [LAST]: readings(['P-1,DE-H,velocity,rms,-2,mm/s,1480']) }, /readings\.csv:2:5: .*-2/],
  ['an unknown unit', { [LAST]: readings(['P-1,DE-H,velocity,rms,2,mm/h,1480']) }, /readings\.csv:2:6: .*mm\/h/],
  ['an impossible date', { 'events.csv': 'machine,date,event\nP-1,2025-02-30,repair\n' }, /events\.csv:2:2: .*2025-02-30/],
  ['a detection the point has not', { [LAST]: readings(['P-1,DE-H,velocity,true peak,2,mm/s,1480']) }, /readings\.csv:2.*true peak/],
  ['a survey without readings', { [LAST]: readings([]) }, /readings\.csv/],
  ['an empty file', { 'machines.csv': '' }, /machines\.csv/],
  ['broken YAML', { 'plant.yaml': 'plant: [unclosed\n' }, /plant\.yaml:\d/],
  ['a NUL byte', { 'machines.csv': 'machine\nP-\u0000\n' }, /machines\.csv/],
  [
    'control characters, which must not reach the terminal',
    { [LAST]: readings(['P-\u001b[31m,DE-H,velocity,rms,1,mm/s,1480']) },
    /readings\.csv:2:1: /,
  ],
];

describe('bad input', () => {
  test.each(BAD)('%s: a problem with its place, exit 1, nothing written, no stack trace', (_, changes, place) => {
    const home = plantFolder(changes);
    const checked = swayfolio(home, ['check', 'plant']);
    expect(checked.stdout).toMatch(place);
    expect(checked.code).toBe(1);
    const reported = swayfolio(home, ['report', 'plant', '--out', 'out']);
    expect(reported.code).toBe(1);
    expect(reported.stdout).toBe('');
    expect(reported.stderr).toMatch(place);
    expect(existsSync(join(home, 'out'))).toBe(false);
    expect(existsSync(join(home, 'plant/out'))).toBe(false);
    for (const text of [checked.stdout, checked.stderr, reported.stderr]) {
      expect(text).not.toMatch(STACK);
      expect(text).not.toContain('\u001b');
    }
  });

  test('a folder that does not exist, one that is a file, and one that is no plant', () => {
    const home = plantFolder();
    for (const path of ['nowhere', 'plant/plant.yaml', 'plant/surveys']) {
      const run = swayfolio(home, ['check', path]);
      expect(run.code).toBe(1);
      expect(`${run.stdout}${run.stderr}`).toMatch(/nowhere|plant/);
      expect(`${run.stdout}${run.stderr}`).not.toMatch(STACK);
    }
  });
});
