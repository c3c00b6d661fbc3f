import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { contents, freshFolder, plantFolder, readings, STACK, swayfolio } from './program.ts';

describe('new', () => {
  test('makes a plant that check and report take at once', () => {
    const home = freshFolder();
    const run = swayfolio(home, ['new', 'works']);
    expect(run.code).toBe(0);
    expect(run.stdout).toMatch(/swayfolio report works/);
    expect(existsSync(join(home, 'works/plant.yaml'))).toBe(true);
    const checked = swayfolio(home, ['check', 'works']);
    expect(checked.stdout).not.toMatch(/error/);
    expect(checked.code).toBe(0);
    expect(swayfolio(home, ['report', 'works']).code).toBe(0);
  });

  test('takes an empty folder, the current one too, and refuses one that is not empty', () => {
    const home = freshFolder();
    mkdirSync(join(home, 'empty'));
    expect(swayfolio(join(home, 'empty'), ['new', '.']).code).toBe(0);
    const before = contents(home);
    const again = swayfolio(home, ['new', 'empty']);
    expect(again.code).toBe(2);
    expect(again.stderr).toMatch(/not empty/);
    expect(contents(home)).toEqual(before);
  });

  test('--survey: the next survey’s scaffold, which the plant takes once the values are typed in', () => {
    const home = plantFolder();
    const before = contents(join(home, 'plant'));
    const run = swayfolio(home, ['new', 'plant', '--survey', '2026-03-15']);
    expect(run.stderr).not.toMatch(STACK);
    expect(run.code).toBe(0);
    const after = contents(join(home, 'plant'));
    for (const [path, bytes] of Object.entries(before)) expect(after[path]).toBe(bytes);
    const sheet = join(home, 'plant/surveys/2026-03-15/readings.csv');
    const lines = readFileSync(sheet, 'utf8').trim().split('\n');
    expect(lines).toHaveLength(3);
    const header = (lines[0] ?? '').split(',');
    const filled = lines.slice(1).map((line) =>
      line
        .split(',')
        .map((cell, index) => (header[index] === 'value' ? '2.0' : cell))
        .join(','),
    );
    writeFileSync(sheet, `${[lines[0], ...filled].join('\n')}\n`);
    const reported = swayfolio(home, ['report', 'plant', '--json']);
    expect(reported.stderr).not.toMatch(STACK);
    expect(reported.code).toBe(0);
    expect(JSON.parse(reported.stdout).survey).toBe('2026-03-15');
  });

  test('--survey refuses a survey that stands, a date that is none, and a plant with errors', () => {
    const home = plantFolder();
    const before = contents(home);
    expect(swayfolio(home, ['new', 'plant', '--survey', '2026-01-14']).code).not.toBe(0);
    for (const date of ['2026-02-30', 'soon', '15.03.2026']) expect(swayfolio(home, ['new', 'plant', '--survey', date]).code).toBe(2);
    expect(contents(home)).toEqual(before);
    const broken = plantFolder({ 'surveys/2026-01-14/readings.csv': readings(['P-1,DE-H,velocity,rms,eight,mm/s,1480']) });
    const run = swayfolio(broken, ['new', 'plant', '--survey', '2026-03-15']);
    expect(run.code).toBe(1);
    expect(existsSync(join(broken, 'plant/surveys/2026-03-15'))).toBe(false);
  });
});

describe('new --from', () => {
  test('exports without a question: a folder that report takes at once; what was given stays as it was', () => {
    const home = freshFolder();
    const text = 'Asset;Point;Date;Vel (mm/s RMS)\nFAN-1;1H;14/01/2026;1,8\nFAN-1;2H;14/01/2026;STBY\n';
    writeFileSync(join(home, 'export.csv'), text);
    const run = swayfolio(home, ['new', 'works', '--from', 'export.csv']);
    expect(run.stderr).toBe('');
    expect(run.code).toBe(0);
    expect(run.stdout).toMatch(/Next: .*swayfolio report works\n$/);
    expect(readFileSync(join(home, 'export.csv'), 'utf8')).toBe(text);
    expect(readFileSync(join(home, 'works/surveys/export.csv'), 'utf8')).toBe(text);
    expect(readFileSync(join(home, 'works/plant.yaml'), 'utf8')).toMatch(/\$schema=\.\/plant\.schema\.json/);
    expect(swayfolio(home, ['report', 'works']).code).toBe(0);
  });

  test('asks, and is refused for a file that is not there, two of one name, and together with --survey', () => {
    const home = freshFolder();
    writeFileSync(join(home, 'export.csv'), 'Asset;Point;Date;Level\nFAN-1;1H;01/02/2026;1,8\n');
    const run = swayfolio(home, ['new', 'works', '--from', 'export.csv']);
    expect(run.stdout).toMatch(/question: surveys\/export\.csv: In which unit[\s\S]*Next: answer the 2 questions in works\/plant\.yaml/);
    for (const args of [['missing.csv'], ['export.csv', './export.csv'], ['export.csv', '--survey', '2026-01-14']]) {
      const refused = swayfolio(home, ['new', 'other', '--from', ...args]);
      expect(refused.code).not.toBe(0);
      expect(refused.stderr).not.toMatch(STACK);
      expect(existsSync(join(home, 'other'))).toBe(false);
    }
  });
});
