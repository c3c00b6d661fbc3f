/**
 * Files as they come, a folder a case: import-* with the readings they give, or the problems where they must be refused.
 * Renew on purpose by UPDATE_GOLDENS=1 npx vitest run test/survey/import.test.ts, and read the difference.
 */
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Ajv2020 } from 'ajv/dist/2020.js';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import type { Plant } from '../../src/plant/types.ts';
import { realShell } from '../../src/shell/shell.ts';
import { readPlant } from '../../src/survey/read.ts';
import { plantJsonSchema } from '../../src/survey/schema.ts';

const home = fileURLToPath(new URL('../plants', import.meta.url));
const names = readdirSync(home)
  .filter((name) => name.startsWith('import-'))
  .sort();
const renew = process.env['UPDATE_GOLDENS'] === '1';

/** Each reading in a line. */
function readingsOf(plant: Plant): string[] {
  return plant.machines.flatMap((machine) =>
    machine.series.flatMap((s) =>
      s.readings.map((r) =>
        [
          machine.id,
          s.point,
          s.quantity,
          s.detection ?? 'no detection',
          plant.surveys[r.survey]?.id,
          r.status,
          r.bound === null ? `${r.value} ${s.unit}` : `${r.typed} ${s.unit}`,
          ...(r.typedUnit === null ? [] : [`typed ${r.typed} ${r.typedUnit}`]),
          ...(r.speedRpm === null ? [] : [`${r.speedRpm} r/min`]),
          ...(r.remark === null ? [] : [r.remark]),
        ].join(' | '),
      ),
    ),
  );
}

describe('the published schema of plant.yaml', () => {
  const holds = new Ajv2020({ strict: false }).compile(plantJsonSchema());
  it.each(
    names.filter((name) => name.startsWith('import-map-') && !/^refused/.test(readFileSync(join(home, name, 'expected.txt'), 'utf8'))),
  )('takes the mapping of %s', (name) => {
    expect([holds(parse(readFileSync(join(home, name, 'plant.yaml'), 'utf8'), { schema: 'core' })), holds.errors]).toEqual([true, null]);
  });

  it('refuses a key and a word that the program refuses', () => {
    for (const name of ['import-map-unknown-key', 'import-map-bad-word', 'import-map-states-wrong'])
      expect(holds(parse(readFileSync(join(home, name, 'plant.yaml'), 'utf8'), { schema: 'core' })), name).toBe(false);
  });
});

describe('files as they come', () => {
  for (const name of names) {
    it(name.slice('import-'.length), () => {
      const { plant, problems } = readPlant(realShell, join(home, name));
      const told = problems
        .filter((p) => p.file !== 'expected.txt')
        .map(
          (p) =>
            `${p.severity} ${p.file}:${p.line ?? ''}:${p.column ?? ''} ${p.code}: ${p.message}${p.hint === null ? '' : ` | ${p.hint}`}`,
        );
      const text = `${[...(plant === null ? ['refused'] : readingsOf(plant)), ...told].join('\n')}\n`;
      const file = join(home, name, 'expected.txt');
      if (renew) writeFileSync(file, text);
      else if (!existsSync(file)) throw new Error(`${file} is not there; make it by UPDATE_GOLDENS=1`);
      expect(text).toBe(readFileSync(file, 'utf8'));
    });
  }
});
