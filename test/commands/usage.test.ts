import { spawnSync } from 'node:child_process';
import { rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { MAIN, plantFolder, STACK, swayfolio } from './program.ts';

describe('wrong usage', () => {
  test.each([
    [[]],
    [['reprot', 'plant']],
    [['report']],
    [['report', 'plant', '--colour', 'red']],
    [['report', 'plant', 'more']],
    [['report', 'plant', '--out']],
    [['report', 'plant', '--out=']],
    [['report', 'plant', '--out', 'a', '--out', 'b']],
    [['render', 'record.json']],
    [['check', 'plant', '--survey', '2026-01-14']],
    [['limits', 'a', 'b']],
    [['check', '']],
  ])('%j: exit 2, a line and a hint, no stack trace, nothing on stdout', (args) => {
    const run = swayfolio(plantFolder(), args);
    expect(run.code).toBe(2);
    expect(run.stderr).toMatch(/^swayfolio: .+\n/);
    expect(run.stderr).not.toMatch(STACK);
    expect(run.stdout).toBe('');
  });

  test('the terminal speaks English whatever the system speaks', () => {
    const home = plantFolder();
    const english = swayfolio(home, ['report', '--colour'], { env: { LANG: 'C', LC_ALL: 'C' } });
    expect(swayfolio(home, ['report', '--colour'], { env: { LANG: 'de_DE.UTF-8', LC_ALL: 'de_DE.UTF-8', LANGUAGE: 'de' } })).toEqual(
      english,
    );
  });
});

describe('help and version', () => {
  test('list what there is, and nothing that is not there yet', () => {
    const home = plantFolder();
    const help = swayfolio(home, ['--help']);
    expect(help.code).toBe(0);
    for (const command of ['new <folder>', 'check <plant>', 'report <plant>', 'render <record>', 'limits [id]'])
      expect(help.stdout).toContain(command);
    const options = swayfolio(home, ['report', '--help']).stdout;
    for (const option of ['--survey', '--out', '--brief', '--machine', '--tags', '--json', '--quiet']) expect(options).toContain(option);
    expect(swayfolio(home, ['--version']).stdout).toMatch(/^\d+\.\d+\.\d+\n$/);
  });
});

describe('a bug', () => {
  test('is exit 3 and told as one, with its trace', () => {
    const home = plantFolder();
    // The nearest to a bug that can be had without building one in: a runtime that breaks under the program.
    const run = swayfolio(home, ['limits', '--json'], {
      node: ['--import', 'data:text/javascript,JSON.stringify = () => { throw new TypeError("sabotage"); };'],
    });
    expect(run.code).toBe(3);
    expect(run.stderr).toMatch(/bug of the program/);
    expect(run.stderr).toMatch(/sabotage/);
  });
});

describe('the terminal', () => {
  test('a reader that closes early is no error', () => {
    const home = plantFolder();
    const run = spawnSync(
      'sh',
      ['-c', `"${process.execPath}" "${MAIN}" limits | head -n 1; "${process.execPath}" "${MAIN}" limits --json | true`],
      { cwd: home, encoding: 'utf8' },
    );
    expect(run.stderr).toBe('');
  });

  test('a folder that may not be written to is told in a line', () => {
    if (process.getuid?.() === 0) {
      // The administrator may write anywhere: a file in the way is what is left to try.
      const home = plantFolder();
      rmSync(join(home, 'plant/out'), { recursive: true, force: true });
      writeFileSync(join(home, 'plant/out'), 'a file');
      const run = swayfolio(home, ['report', 'plant']);
      expect(run.code).toBeGreaterThan(0);
      expect(run.code).toBeLessThan(3);
      expect(run.stderr).not.toMatch(STACK);
      return;
    }
    const home = plantFolder();
    spawnSync('chmod', ['a-w', join(home, 'plant')]);
    const run = swayfolio(home, ['report', 'plant']);
    expect(run.code).toBe(1);
    expect(run.stderr).toMatch(/may not be written to/);
    expect(run.stderr).not.toMatch(STACK);
  });
});
