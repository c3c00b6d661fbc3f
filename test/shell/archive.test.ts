/** The archive on the disk: whole or not at all, one process at a time. */
import { spawnSync } from 'node:child_process';
import {
  chmodSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  realpathSync,
  renameSync,
  statSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { claimArchive } from '../../src/shell/archive.ts';
import { listEverything } from '../../src/shell/list.ts';

const FILES = [
  { path: 'issue.json', bytes: '{}' },
  { path: 'site/machines/a.html', bytes: 'a' },
  { path: 'manifest.sha256', bytes: 'm' },
];
const fresh = (): string => join(realpathSync(mkdtempSync(join(tmpdir(), 'swayfolio-archive-'))), 'issued');

/** The number of a process that has ended. */
const goneProcess = (): number => spawnSync(process.execPath, ['-e', '']).pid;

function deadClaim(folder: string, pid: number, host = hostname().replace(/[^\w.]+/g, '_')): string {
  const claim = join(folder, '.claim');
  mkdirSync(join(claim, 'report/site'), { recursive: true });
  writeFileSync(join(claim, 'owner'), `${pid}-abc-${host}`);
  writeFileSync(join(claim, 'report/site/half.html'), '<p>');
  chmodSync(join(claim, 'report/site'), 0o555);
  return claim;
}

test('a folder is published whole and read-only, and nothing of the claim stays', () => {
  const folder = fresh();
  const claim = claimArchive(folder);
  claim.publish('2026-001', FILES);
  claim.release();
  expect(readdirSync(folder)).toEqual(['2026-001']);
  expect(listEverything(join(folder, '2026-001'))).toEqual({ files: FILES.map((file) => file.path).sort(), others: [] });
  for (const path of ['.', 'site', 'site/machines', ...FILES.map((file) => file.path)])
    expect(statSync(join(folder, '2026-001', path)).mode & 0o222, path).toBe(0);
});

test('a second claim is refused by the name of the process that has the first', () => {
  const folder = fresh();
  const claim = claimArchive(folder);
  expect(() => claimArchive(folder)).toThrow(`Another swayfolio (process ${process.pid}) is issuing into ${folder}.`);
  claim.release();
  claimArchive(folder).release();
});

test('a claim whose process is gone is taken over, and one taken over and left again', () => {
  const folder = fresh();
  const dead = deadClaim(folder, goneProcess());
  const token = readFileSync(join(dead, 'owner'), 'utf8');
  mkdirSync(join(dead, `next-${token}`));
  writeFileSync(join(dead, `next-${token}`, 'owner'), `${goneProcess()}-abd-${hostname().replace(/[^\w.]+/g, '_')}`);
  const claim = claimArchive(folder);
  expect(() => claimArchive(folder)).toThrow('is issuing into');
  claim.publish('2026-001', FILES);
  claim.release();
  expect(readdirSync(folder)).toEqual(['2026-001']);
});

test('the claim of another computer stands for an hour', () => {
  const folder = fresh();
  const claim = deadClaim(folder, 1, 'elsewhere');
  expect(() => claimArchive(folder)).toThrow('Another swayfolio (process 1)');
  const past = Date.now() / 1000 - 3700;
  utimesSync(claim, past, past);
  claimArchive(folder).release();
  expect(readdirSync(folder)).toEqual([]);
});

test('who lost its claim meanwhile publishes nothing', () => {
  const folder = fresh();
  const claim = claimArchive(folder);
  function* files() {
    yield* FILES;
    renameSync(join(folder, '.claim'), join(folder, '.claim-old-1-x'));
    mkdirSync(join(folder, '.claim/report'), { recursive: true });
    writeFileSync(join(folder, '.claim/owner'), '1-x-elsewhere');
  }
  expect(() => claim.publish('2026-001', files())).toThrow();
  claim.release();
  expect(existsSync(join(folder, '2026-001'))).toBe(false);
  expect(readFileSync(join(folder, '.claim/owner'), 'utf8')).toBe('1-x-elsewhere');
});

test.each([0, 1, 2])('a disk that is full at file %i: told in a line, nothing stays, the old issue as it was', (full) => {
  const folder = fresh();
  const first = claimArchive(folder);
  first.publish('2026-001', FILES);
  first.release();
  let written = 0;
  const claim = claimArchive(folder, (path, bytes) => {
    if (written === full) throw Object.assign(new Error('ENOSPC: no space left on device, write'), { code: 'ENOSPC' });
    written += 1;
    writeFileSync(path, bytes);
  });
  expect(() => claim.publish('2026-002', FILES)).toThrow(
    expect.objectContaining({
      message: `Cannot write ${folder}: the disk is full.`,
      hint: 'Nothing was issued, and what was issued before stands as it was.',
      exitCode: 1,
    }),
  );
  claim.release();
  expect(readdirSync(folder)).toEqual(['2026-001']);
  expect(readFileSync(join(folder, '2026-001/manifest.sha256'), 'utf8')).toBe('m');
});

test('an issue is never written over, an empty folder of its name neither', () => {
  const folder = fresh();
  const claim = claimArchive(folder);
  claim.publish('2026-001', FILES);
  expect(() => claim.publish('2026-001', FILES)).toThrow('exists already');
  mkdirSync(join(folder, '2026-002'));
  expect(() => claim.publish('2026-002', FILES)).toThrow('exists already');
  claim.release();
});

test('an issue that a killed run left open is made read-only at the next claim; what is not ours is let be', () => {
  const folder = fresh();
  for (const [name, file] of [
    ['2026-001', 'manifest.sha256'],
    ['letters', 'to-client.txt'],
  ] as const) {
    mkdirSync(join(folder, name), { recursive: true });
    writeFileSync(join(folder, name, file), '');
  }
  claimArchive(folder).release();
  expect(statSync(join(folder, '2026-001')).mode & 0o222).toBe(0);
  expect(statSync(join(folder, 'letters')).mode & 0o222).not.toBe(0);
});
