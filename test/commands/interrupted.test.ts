/** A report that is killed at any moment leaves the old output whole, and the next run puts right what lies about. */
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { existsSync, readdirSync, watch, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { setTimeout as sleep } from 'node:timers/promises';
import { expect, test } from 'vitest';
import { contents, MAIN, plantFolder, readings, swayfolio } from './program.ts';

const LAST = 'plant/surveys/2026-01-14/readings.csv';

async function killed(home: string, when: () => Promise<void>): Promise<void> {
  const child = spawn(process.execPath, [MAIN, 'report', 'plant', '--out', 'out'], { cwd: home, stdio: 'ignore' });
  const ended = once(child, 'exit');
  await Promise.race([when(), ended]);
  child.kill('SIGKILL');
  await ended;
}

/** Until the first file stands in the folder beside. */
async function writingBegan(home: string): Promise<void> {
  await new Promise<void>((resolve) => {
    const watcher = watch(home, { persistent: false }, (_, name) => {
      if (name?.startsWith('out.new-')) {
        watcher.close();
        resolve();
      }
    });
  });
}

test('killed at nine moments between start and end, and twice while writing: each time the old or the new output, whole', async () => {
  const home = plantFolder();
  const begin = performance.now();
  expect(swayfolio(home, ['report', 'plant', '--out', 'out']).code).toBe(0);
  const duration = performance.now() - begin;
  const old = contents(join(home, 'out'));
  writeFileSync(join(home, LAST), readings(['P-1,DE-H,velocity,rms,2.3,mm/s,1480', 'P-2,DE-H,velocity,rms,1.8,mm/s,1480']));
  expect(swayfolio(home, ['report', 'plant', '--out', 'fresh']).code).toBe(0);
  const fresh = contents(join(home, 'fresh'));
  expect(fresh['record.json']).not.toBe(old['record.json']);

  const moments = [
    ...Array.from({ length: 9 }, (_, index) => () => sleep((duration * (index + 1)) / 10)),
    () => writingBegan(home),
    () => writingBegan(home).then(() => sleep(5)),
  ];
  for (const moment of moments) {
    await killed(home, moment);
    // Between two renames the folder itself may be away: then the old one stands beside, whole, and the next start brings it back.
    const standing = existsSync(join(home, 'out')) ? 'out' : readdirSync(home).find((name) => name.startsWith('out.old-'));
    expect([old, fresh]).toContainEqual(contents(join(home, standing ?? 'nothing stands')));
  }

  writeFileSync(join(home, LAST), readings(['P-1,DE-H,velocity,rms,eight,mm/s,1480']));
  expect(swayfolio(home, ['report', 'plant', '--out', 'out']).code).toBe(1);
  expect(readdirSync(home).sort()).toEqual(['fresh', 'out', 'plant']);
  expect([old, fresh]).toContainEqual(contents(join(home, 'out')));
});

test('two at once: each ends well or says that the other is at work, and the folder is whole', async () => {
  const home = plantFolder();
  expect(swayfolio(home, ['report', 'plant', '--out', 'alone']).code).toBe(0);
  const both = [1, 2].map(() => spawn(process.execPath, [MAIN, 'report', 'plant', '--out', 'out'], { cwd: home, stdio: 'ignore' }));
  const codes = (await Promise.all(both.map((child) => once(child, 'exit')))).map(([code]) => code);
  expect(codes).toContain(0);
  for (const code of codes) expect([0, 1]).toContain(code);
  expect(contents(join(home, 'out'))).toEqual(contents(join(home, 'alone')));
  expect(readdirSync(home).sort()).toEqual(['alone', 'out', 'plant']);
});
