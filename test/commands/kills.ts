/**
 * Kills `issue` at random moments, between its start and its end and, in every second turn, after its claim stands. In: how many. Out: what was
 * broken after any of them. As a program: `node --import ./.tools/typescript.mjs test/commands/kills.ts 200` (some minutes).
 */
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { setTimeout as sleep } from 'node:timers/promises';
import { contents, MAIN, plantFolder, swayfolio } from './program.ts';

export const PEOPLE = 'people:\n  - name: A. Analyst\n    category: ISO 18436-2 category II\n';
export const ISSUABLE = { 'surveys/2025-11-10/survey.yaml': PEOPLE, 'surveys/2026-01-14/survey.yaml': PEOPLE };

/** Faults of an issued folder against its own manifest, without the program. */
export function faultsOf(folder: string): string[] {
  if (!existsSync(join(folder, 'manifest.sha256'))) return ['no manifest'];
  const stated = new Map(
    readFileSync(join(folder, 'manifest.sha256'), 'utf8')
      .trimEnd()
      .split('\n')
      .map((line) => [line.slice(66), line.slice(0, 64)]),
  );
  const there = contents(folder);
  const names = new Set([...stated.keys(), ...Object.keys(there)]);
  return [...names].filter(
    (name) =>
      !name.startsWith('manifest.sha256') &&
      stated.get(name) !==
        createHash('sha256')
          .update(there[name] ?? '', 'latin1')
          .digest('hex'),
  );
}

export async function killAtRandom(kills: number): Promise<{ faults: string[]; issues: number; during: number }> {
  const home = plantFolder(ISSUABLE);
  const archive = join(home, 'plant/issued');
  const begin = Date.now();
  swayfolio(home, ['issue', 'plant']);
  const whole = Date.now() - begin;
  const first = contents(join(archive, '2026-001'));
  const faults: string[] = [];
  let during = 0;
  for (let turn = 0; turn < kills; turn += 1) {
    const child = spawn(process.execPath, [MAIN, 'issue', 'plant', '--reason', `turn ${turn}`], { cwd: home, stdio: 'ignore' });
    const ended = once(child, 'exit');
    const dead = child.pid as number;
    if (turn % 2 === 0) await Promise.race([sleep(Math.random() * whole * 1.1), ended]);
    else {
      while (child.exitCode === null && !holds(archive, dead)) await sleep(2);
      await Promise.race([sleep(Math.random() * whole * 0.9), ended]);
    }
    child.kill('SIGKILL');
    await ended;
    if (holds(archive, dead)) during += 1;
    for (const name of readdirSync(archive).filter((entry) => !entry.startsWith('.'))) {
      for (const fault of /^2026-001(-r\d+)?$/.test(name) ? faultsOf(join(archive, name)) : ['a strange folder'])
        faults.push(`turn ${turn}, ${name}: ${fault}`);
    }
  }
  if (JSON.stringify(contents(join(archive, '2026-001'))) !== JSON.stringify(first)) faults.push('the first issue is not as it was');
  const last = swayfolio(home, ['issue', 'plant', '--reason', 'after them all']);
  if (last.code !== 0) faults.push(`the next run: ${last.stderr}`);
  const verified = swayfolio(home, ['verify', 'plant']);
  if (verified.code !== 0) faults.push(verified.stdout);
  faults.push(
    ...readdirSync(archive)
      .filter((name) => name.startsWith('.'))
      .map((name) => `left over: ${name}`),
  );
  return { faults, issues: readdirSync(archive).length, during };
}

/** Whether the claim, or the end of a row of claims, is this process's. */
function holds(archive: string, pid: number): boolean {
  try {
    return readdirSync(archive, { recursive: true, encoding: 'utf8' }).some(
      (path) => /^\.claim\/(?:.*\/)?owner$/.test(path) && readFileSync(join(archive, path), 'utf8').startsWith(`${pid}-`),
    );
  } catch {
    return false;
  }
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  const result = await killAtRandom(Number(process.argv[2] ?? 200));
  process.stdout.write(`${JSON.stringify(result, null, 2)}\n`);
  process.exitCode = result.faults.length > 0 ? 1 : 0;
}
