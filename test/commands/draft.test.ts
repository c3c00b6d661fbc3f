import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { contents, plantFolder, STACK, swayfolio } from './program.ts';

const FINDINGS = 'plant/surveys/2026-01-14/findings.csv';

describe('draft', () => {
  test('makes the file with a row for the exception, and nothing else; again, nothing', () => {
    const home = plantFolder();
    const before = contents(home);
    const run = swayfolio(home, ['draft', 'plant']);
    expect([run.code, run.stderr]).toEqual([0, '']);
    expect(run.stdout).toContain('One row was added');
    const after = contents(home);
    expect(Object.keys(after).filter((path) => after[path] !== before[path])).toEqual([FINDINGS]);
    expect(after[FINDINGS]).toContain('P-1/2026-01-14/1,P-1,pump,DE-H,');
    expect(swayfolio(home, ['draft', 'plant']).stdout).toContain('Nothing to draft');
    expect(contents(home)).toEqual(after);
    expect(swayfolio(home, ['report', 'plant', '--quiet']).code).toBe(0);
  });

  test('keeps what the analyst wrote byte for byte', () => {
    const own = 'finding,machine,finding,remark of mine\r\n"F-1",P-2, spelled  as I like ,"x"\r\n';
    const home = plantFolder({ 'surveys/2026-01-14/findings.csv': own });
    const run = swayfolio(home, ['draft', 'plant']);
    expect(run.code).toBe(0);
    expect(run.stderr).toContain('has no column for');
    expect(readFileSync(join(home, FINDINGS), 'utf8').startsWith(own)).toBe(true);
  });

  test('--survey drafts for that survey; one that is not there is told', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['draft', 'plant', '--survey', '2025-11-10']).stdout).toContain('Nothing to draft');
    const run = swayfolio(home, ['draft', 'plant', '--survey', '2024-01-01']);
    expect(run.code).toBeGreaterThan(0);
    expect(run.stderr).toContain('2024-01-01');
    expect(run.stderr).not.toMatch(STACK);
  });

  test('a survey whose readings stand in a history file gets a folder for its findings', () => {
    const history = 'survey_date,machine,point,value,unit\n2026-04-14,P-1,DE-H,9.1,mm/s\n2026-04-14,P-2,DE-H,1.9,mm/s\n';
    const home = plantFolder({ 'surveys/history.csv': history });
    expect(swayfolio(home, ['draft', 'plant']).code).toBe(0);
    expect(existsSync(join(home, 'plant/surveys/2026-04-14/findings.csv'))).toBe(true);
    expect(swayfolio(home, ['check', 'plant']).code).toBe(0);
  });

  test('a plant with errors is refused and nothing is written', () => {
    const home = plantFolder({ 'points.csv': 'machine\nP-1\n' });
    const before = contents(home);
    expect(swayfolio(home, ['draft', 'plant']).code).toBe(1);
    expect(contents(home)).toEqual(before);
  });
});
