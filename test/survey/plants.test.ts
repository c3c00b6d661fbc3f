/**
 * Plant folders, a folder a case: problem-* with the problems they must tell, record-* with the record they must give.
 * Renew on purpose by UPDATE_GOLDENS=1 npx vitest run test/survey, and read the difference.
 */
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import { readRecord } from '../../src/record/read.ts';
import type { SwayfolioRecord } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { realShell } from '../../src/shell/shell.ts';
import { readPlant } from '../../src/survey/read.ts';

const home = fileURLToPath(new URL('../plants', import.meta.url));
const cases = readdirSync(home).sort();
const renew = process.env['UPDATE_GOLDENS'] === '1';

/** Holds text against the golden file beside the case. */
function golden(name: string, text: string): void {
  const file = join(home, name, 'expected.txt');
  if (renew || !existsSync(file)) {
    if (!renew) throw new Error(`${file} is not there; make it by UPDATE_GOLDENS=1`);
    writeFileSync(file, text);
  }
  expect(text).toBe(readFileSync(file, 'utf8'));
}

describe('problems', () => {
  const names = cases.filter((name) => name.startsWith('problem-'));

  it('there are at least forty cases', () => {
    expect(names.length).toBeGreaterThanOrEqual(40);
  });

  for (const name of names) {
    it(name.slice('problem-'.length), () => {
      const { problems } = readPlant(realShell, join(home, name));
      const told = problems.filter((p) => p.file !== 'expected.txt');
      golden(
        name,
        `${told.map((p) => `${p.severity} ${p.file}:${p.line ?? ''}:${p.column ?? ''} ${p.code}: ${p.message}${p.hint === null ? '' : ` | ${p.hint}`}`).join('\n')}\n`,
      );
    });
  }
});

/** The verdicts of a record in a few lines. */
function summary(record: SwayfolioRecord): string {
  const machines = record.machines.map(
    (m) => `${m.machine}: ${m.condition} (${m.measured_of.join(' of ')}) ${m.urgency ?? 'none'} ${m.rule ?? ''} | ${m.reason}`,
  );
  const readings = record.measurements.map((m) =>
    [
      `  ${m.machine} ${m.component} ${m.point} ${m.quantity}`,
      m.status,
      `${m.value} ${m.unit} ${m.detection}`,
      m.zone ?? m.ratio_class ?? `no zone: ${m.no_zone_because}`,
      m.travel,
      m.limit_set,
      `previous ${m.previous?.value ?? ''}`,
      `baseline ${m.baseline?.value ?? ''}`,
      m.history.value.join(' '),
    ].join(' | '),
  );
  const actions = record.actions.map((a) => `${a.rank}. ${a.action} ${a.urgency} ${a.status} ${a.origin} due ${a.due}`);
  return `${[...machines, ...readings, ...actions].join('\n')}\n`;
}

describe('records', () => {
  for (const name of cases.filter((c) => c.startsWith('record-'))) {
    it(name.slice('record-'.length), () => {
      const { plant, problems } = readPlant(realShell, join(home, name));
      if (plant === null) throw new Error(JSON.stringify(problems));
      golden(name, summary(readRecord(writeRecord(assess(plant, { survey: null, toolVersion: 'test' })))));
    });
  }
});
