import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { contents, plantFolder, readings, STACK, swayfolio } from './program.ts';

const OUT = 'plant/out/2026-01-14';

describe('report', () => {
  test('writes the four parts to <plant>/out/<survey>/ and says where', () => {
    const home = plantFolder();
    const run = swayfolio(home, ['report', 'plant']);
    expect(run.stderr).not.toMatch(STACK);
    expect(run.code).toBe(0);
    const written = contents(join(home, OUT));
    for (const path of ['report.pdf', 'site/index.html', 'record.json', 'work-list.csv']) {
      expect(Object.keys(written)).toContain(path);
      expect(run.stdout).toContain(`${OUT}/${path}`);
    }
    expect(written['report.pdf']?.slice(0, 5)).toBe('%PDF-');
    expect(JSON.parse(written['record.json'] ?? '').survey.id).toBe('2026-01-14');
    expect(written['work-list.csv']).toContain('P-1');
  });

  test('--survey cuts the plant there; --out with a trailing slash; the plant folder itself unchanged', () => {
    const home = plantFolder();
    const before = contents(join(home, 'plant'));
    const run = swayfolio(home, ['report', 'plant/', '--survey', '2025-11-10', '--out', 'here/']);
    expect(run.code).toBe(0);
    expect(contents(join(home, 'plant'))).toEqual(before);
    const record = JSON.parse(readFileSync(join(home, 'here/record.json'), 'utf8'));
    expect(record.surveys.map((survey: { id: string }) => survey.id)).toEqual(['2025-09-10', '2025-11-10']);
  });

  test('--json: one object on stdout, nothing else; --quiet: nothing at all', () => {
    const home = plantFolder();
    const run = swayfolio(home, ['report', 'plant', '--json']);
    const summary = JSON.parse(run.stdout);
    expect(summary).toMatchObject({ survey: '2026-01-14', out: OUT });
    expect(summary.files).toContain('site/index.html');
    // 8.9 mm/s rms on a rolling-bearing category II pump of 75 kW is zone D of ISO 10816-7; critical and trebled: act now.
    expect(summary.machines).toEqual({ now: 1, 'within a week': 0, 'within a month': 0, 'next planned stop': 0, watch: 0, none: 1 });
    const quiet = swayfolio(home, ['report', 'plant', '--quiet']);
    expect(quiet).toEqual({ code: 0, stdout: '', stderr: '' });
  });

  test('warnings go to stderr and leave the exit code 0', () => {
    const home = plantFolder({
      'machines.csv':
        'machine,name,area,criticality,interval_days,colour\nP-1,Feed pump,North,critical,60,red\nP-2,Drain pump,North,general,60,blue\n',
    });
    const run = swayfolio(home, ['report', 'plant', '--json']);
    expect(run.code).toBe(0);
    const summary = JSON.parse(run.stdout);
    const checked = JSON.parse(swayfolio(home, ['check', 'plant', '--json']).stdout);
    expect(checked.problems.some((problem: { message: string }) => problem.message.includes('colour'))).toBe(true);
    expect(checked.warnings).toBe(summary.warnings);
    if (checked.warnings > 0) expect(run.stderr).toMatch(/^\S+: \S+ /m);
  });

  test('a later run replaces the folder whole; with errors it leaves the old one as it was', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['report', 'plant', '--out', 'out']).code).toBe(0);
    writeFileSync(join(home, 'out/stray.txt'), 'x');
    expect(swayfolio(home, ['report', 'plant', '--out', 'out']).code).toBe(0);
    expect(existsSync(join(home, 'out/stray.txt'))).toBe(false);
    const before = contents(join(home, 'out'));
    writeFileSync(join(home, 'plant/surveys/2026-01-14/readings.csv'), readings(['P-1,DE-H,velocity,rms,eight,mm/s,1480']));
    expect(swayfolio(home, ['report', 'plant', '--out', 'out']).code).toBe(1);
    expect(contents(join(home, 'out'))).toEqual(before);
  });

  test('refuses a folder it did not make, the plant itself among them, before it works for long', () => {
    const home = plantFolder();
    mkdirSync(join(home, 'mine'));
    writeFileSync(join(home, 'mine/thesis.txt'), 'dear');
    for (const out of ['mine', 'plant', 'plant/surveys', '.']) {
      const run = swayfolio(home, ['report', 'plant', '--out', out]);
      expect(run.code).toBe(2);
      expect(run.stderr).toMatch(/hint: .*new, empty, or made by swayfolio/);
    }
    expect(readFileSync(join(home, 'mine/thesis.txt'), 'utf8')).toBe('dear');
  });

  test('an output folder inside the plant is never read as input', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['report', 'plant', '--out', 'plant/surveys-report']).code).toBe(0);
    const first = contents(join(home, 'plant/surveys-report'));
    expect(swayfolio(home, ['report', 'plant', '--out', 'plant/surveys-report']).code).toBe(0);
    expect(contents(join(home, 'plant/surveys-report'))).toEqual(first);
  });

  test('--brief, --machine, --no-tags: each another PDF; the record stays the same', () => {
    const home = plantFolder();
    const of = (...options: string[]): Readonly<Record<string, string>> => {
      const run = swayfolio(home, ['report', 'plant', '--out', 'out', ...options]);
      expect(run.stderr).not.toMatch(STACK);
      expect(run.code).toBe(0);
      return contents(join(home, 'out'));
    };
    const whole = of();
    for (const options of [['--brief'], ['--machine', 'P-1'], ['--no-tags']]) {
      const other = of(...options);
      expect(other['record.json']).toBe(whole['record.json']);
      expect(other['report.pdf']).not.toBe(whole['report.pdf']);
      expect(other['report.pdf']?.length ?? 0).toBeLessThan(whole['report.pdf']?.length ?? 0);
    }
  });

  test('an unknown survey or machine is wrong usage and writes nothing', () => {
    const home = plantFolder();
    for (const options of [
      ['--survey', '2026-01-15'],
      ['--machine', 'P-3'],
    ]) {
      const run = swayfolio(home, ['report', 'plant', '--out', 'out', ...options]);
      expect(run.code).toBe(2);
      expect(run.stderr).toMatch(/hint: /);
      expect(existsSync(join(home, 'out'))).toBe(false);
    }
  });

  test('the same bytes in another time zone and language, in another folder, and from files written in another order', () => {
    const home = plantFolder();
    expect(
      swayfolio(home, ['report', 'plant', '--out', 'one'], {
        env: { TZ: 'Pacific/Kiritimati', LANG: 'tr_TR.UTF-8', LC_ALL: 'tr_TR.UTF-8' },
      }).code,
    ).toBe(0);
    expect(swayfolio(home, ['report', 'plant', '--out', 'two'], { env: { TZ: 'America/Adak', LANG: 'C', LC_ALL: 'C' } }).code).toBe(0);
    const other = plantFolder({ 'plant.yaml': null });
    writeFileSync(join(other, 'plant/plant.yaml'), 'plant: Test Works\n');
    expect(swayfolio(join(other, 'plant'), ['report', '.', '--out', '../three']).code).toBe(0);
    const one = contents(join(home, 'one'));
    expect(contents(join(home, 'two'))).toEqual(one);
    expect(contents(join(other, 'three'))).toEqual(one);
  });
});

describe('render', () => {
  test('gives the bytes of report, from the record beside its plant', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['report', 'plant']).code).toBe(0);
    const run = swayfolio(home, ['render', `${OUT}/record.json`, '--out', 'again']);
    expect(run.stderr).not.toMatch(STACK);
    expect(run.code).toBe(0);
    expect(contents(join(home, 'again'))).toEqual(contents(join(home, OUT)));
  });

  test('works where the plant is gone, and may replace the folder the record lies in', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['report', 'plant', '--out', 'report']).code).toBe(0);
    const record = readFileSync(join(home, 'report/record.json'), 'utf8');
    rmSync(join(home, 'plant'), { recursive: true });
    expect(swayfolio(home, ['render', 'report/record.json', '--out', 'report', '--quiet']).code).toBe(0);
    expect(readFileSync(join(home, 'report/record.json'), 'utf8')).toBe(record);
  });

  test('refuses what is no record: another text, a record of the future, bytes that are no text, none at all', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['report', 'plant']).code).toBe(0);
    const record = JSON.parse(readFileSync(join(home, OUT, 'record.json'), 'utf8'));
    writeFileSync(join(home, 'future.json'), JSON.stringify({ ...record, format: 999 }));
    writeFileSync(join(home, 'half.json'), JSON.stringify(record).slice(0, 500));
    writeFileSync(join(home, 'list.json'), '[]');
    writeFileSync(join(home, 'bytes.json'), Buffer.from([0xff, 0xfe, 0x00]));
    for (const name of ['future.json', 'half.json', 'list.json', 'bytes.json', 'none.json']) {
      const run = swayfolio(home, ['render', name, '--out', 'again']);
      expect(run.code).toBe(1);
      expect(run.stderr).toMatch(/hint: /);
      expect(run.stderr).not.toMatch(STACK);
      expect(existsSync(join(home, 'again'))).toBe(false);
    }
  });
});
