/** `compare` as the built program: what it writes, its exit codes, the same bytes twice. */
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { contents, plantFolder, readings, STACK, swayfolio } from './program.ts';

/** Records of two surveys; before the second, a reading of the first is written over. */
function twoRecords(restated: boolean): string {
  const home = plantFolder();
  expect(swayfolio(home, ['report', 'plant', '--survey', '2025-11-10', '--out', 'first', '--quiet']).code).toBe(0);
  if (restated)
    writeFileSync(
      join(home, 'plant/surveys/2025-11-10/readings.csv'),
      readings(['P-1,DE-H,velocity,rms,2.7,mm/s,1480', 'P-2,DE-H,velocity,rms,1.9,mm/s,1480']),
    );
  expect(swayfolio(home, ['report', 'plant', '--out', 'second', '--quiet']).code).toBe(0);
  return home;
}

const RECORDS = ['first/record.json', 'second/record.json'];

test('an altered reading: exit 1, told in the site and beside it; the same bytes twice', () => {
  const home = twoRecords(true);
  const run = swayfolio(home, ['compare', ...RECORDS, '--out', 'years', '--csv']);
  expect(run.code, run.stderr).toBe(1);
  expect(run.stdout).toContain('restated readings        1');
  expect(swayfolio(home, ['compare', ...[...RECORDS].reverse(), '--out', 'again', '--csv']).code).toBe(1);
  const written = contents(join(home, 'years'));
  expect(contents(join(home, 'again'))).toEqual(written);
  expect(Object.keys(written)).toEqual(
    expect.arrayContaining(['comparison.csv', 'comparison.json', 'comparison.pdf', 'site/index.html', 'site/restated.html']),
  );
  expect(written['site/restated.html']).toMatch(
    /2\.2 mm\/s.*first\/record\.json.*surveys\/2025-11-10\/readings\.csv:2.*2\.7 mm\/s.*second\/record\.json/s,
  );
  for (const [path, text] of Object.entries(written))
    if (path.endsWith('.html')) expect(text, path).toContain('screening by overall values');
});

test('nothing altered: exit 0; CSV alone goes to stdout, and the schema of the package knows the JSON', () => {
  const home = twoRecords(false);
  const csv = swayfolio(home, ['compare', ...RECORDS, '--csv']);
  expect([csv.code, csv.stderr]).toEqual([0, '']);
  expect(csv.stdout).not.toContain('restated history');
  const json: unknown = JSON.parse(swayfolio(home, ['compare', ...RECORDS, '--json']).stdout);
  const schema = JSON.parse(readFileSync(join(process.cwd(), 'dist/schemas/comparison.schema.json'), 'utf8')) as { required: string[] };
  expect(Object.keys(json as object)).toEqual(schema.required);
});

test('wrong use: no folder to write to, no record, a plant without issues', () => {
  const home = twoRecords(false);
  for (const [args, code, text] of [
    [RECORDS, 2, 'no folder to write to'],
    [['plant'], 1, 'has no issued report'],
    [['plant/surveys', '--csv'], 1, 'plant/surveys'],
    [['absent.json', '--csv'], 1, 'absent.json'],
  ] as const) {
    const run = swayfolio(home, ['compare', ...args]);
    expect([run.code, run.stdout]).toEqual([code, '']);
    expect(run.stderr).toContain(text);
    expect(run.stderr).not.toMatch(STACK);
  }
});
