/**
 * Output folders. In: files. Out: a folder replaced whole, or left as it was. Never: a folder half written under its own name.
 * Written beside as `<out>.new-<pid>`, the old one renamed aside as `<out>.old-<pid>`, the new one renamed in, the old removed.
 */
import { existsSync, mkdirSync, readdirSync, realpathSync, renameSync, rmdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { basename, dirname, join, resolve } from 'node:path';
import { assertSafeOutputPath } from './safe-path.ts';
import { type OutputFile, UserError } from './types.ts';

/** Its presence tells that swayfolio made a folder and may replace it. */
export const MARKER = '.swayfolio';
const MARKER_TEXT = 'Made by swayfolio, which replaces this folder whole at each run: keep nothing of your own here.\n';

/** Puts right what an interrupted run left beside `out`, and refuses an `out` that swayfolio may not replace. Returns its real path. */
export function claimFolder(out: string): string {
  try {
    const path = existsSync(out) ? realpathSync(out) : resolve(out);
    putRight(path);
    refuseForeign(path, out);
    return path;
  } catch (error) {
    throw asUserError(error, out);
  }
}

function refuseForeign(path: string, out: string): void {
  if (existsSync(path) && !statSync(path).isDirectory()) {
    throw new UserError(`The output folder ${out} is a file.`, 'Name a folder that is new, empty, or made by swayfolio.', 2);
  }
  if (!existsSync(path) || existsSync(join(path, MARKER)) || readdirSync(path).length === 0) return;
  throw new UserError(
    `The output folder ${out} holds files that swayfolio did not make.`,
    'Name one that is new, empty, or made by swayfolio; nothing was written.',
    2,
  );
}

export function replaceFolder(out: string, files: Iterable<OutputFile>): void {
  const path = claimFolder(out);
  const fresh = `${path}.new-${process.pid}`;
  const old = `${path}.old-${process.pid}`;
  try {
    mkdirSync(fresh, { recursive: true });
    writeFileSync(join(fresh, MARKER), MARKER_TEXT);
    writeInto(fresh, files);
    if (existsSync(path)) renameSync(path, old);
    renameSync(fresh, path);
  } catch (error) {
    rmSync(fresh, { recursive: true, force: true });
    if (existsSync(old)) renameSync(old, path);
    throw asUserError(error, out);
  }
  if (existsSync(old)) removeMade(old);
}

/** The marker goes last, so that a removal that is cut short is still known for ours. */
function removeMade(folder: string): void {
  for (const name of readdirSync(folder)) if (name !== MARKER) rmSync(join(folder, name), { recursive: true, force: true });
  rmSync(folder, { recursive: true, force: true });
}

/** Written beside as `<path>.new-<pid>` and renamed in. */
export function replaceFile(path: string, bytes: Uint8Array): void {
  const fresh = `${path}.new-${process.pid}`;
  try {
    mkdirSync(dirname(path), { recursive: true });
    writeFileSync(fresh, bytes);
    renameSync(fresh, path);
  } catch (error) {
    rmSync(fresh, { force: true });
    throw asUserError(error, path, 'Nothing was changed.');
  }
}

/** Writes files into a folder that must be new or empty; on failure nothing stays. */
export function createFolder(out: string, files: Iterable<OutputFile>): void {
  const isNew = !existsSync(out);
  if (!isNew && !statSync(out).isDirectory()) throw new UserError(`${out} is a file.`, 'Name a folder that is new or empty.', 2);
  if (!isNew && readdirSync(out).length > 0)
    throw new UserError(`The folder ${out} is not empty.`, 'Name a folder that is new or empty; nothing was written.', 2);
  try {
    mkdirSync(out, { recursive: true });
    writeInto(out, files);
  } catch (error) {
    for (const name of existsSync(out) ? readdirSync(out) : []) rmSync(join(out, name), { recursive: true, force: true });
    if (isNew && existsSync(out)) rmdirSync(out);
    throw asUserError(error, out);
  }
}

function writeInto(folder: string, files: Iterable<OutputFile>): void {
  const seen = new Set<string>();
  const made = new Set<string>();
  for (const file of files) {
    assertSafeOutputPath(file.path);
    const key = file.path.toLowerCase();
    if (seen.has(key)) throw new Error(`Output path ${file.path} is written twice on a disk that ignores case.`);
    seen.add(key);
    const target = join(folder, file.path);
    const parent = dirname(target);
    if (!made.has(parent)) mkdirSync(parent, { recursive: true });
    made.add(parent);
    writeFileSync(target, file.bytes);
  }
}

/** A run that was killed leaves `.new-<pid>` (unfinished: dropped) and, between the two renames, `.old-<pid>` (whole: brought back). */
function putRight(path: string): void {
  const parent = dirname(path);
  if (!existsSync(parent)) return;
  const prefix = basename(path);
  for (const name of readdirSync(parent)) {
    const match = name.startsWith(prefix) ? /^\.(new|old)-(\d+)$/.exec(name.slice(prefix.length)) : null;
    if (match === null) continue;
    const leftOver = join(parent, name);
    if (isAtWork(Number(match[2]), leftOver)) {
      throw new UserError(
        `Another swayfolio (process ${match[2]}) is writing to ${path}.`,
        `Wait for it; if it is not so, remove ${leftOver}.`,
      );
    }
    if (match[1] === 'old' && !existsSync(path)) renameSync(leftOver, path);
    else if (existsSync(join(leftOver, MARKER)) || readdirSync(leftOver).length === 0) removeMade(leftOver);
  }
}

/** A process number is given again in time: an hour-old left-over is nobody's. */
function isAtWork(pid: number, leftOver: string): boolean {
  if (pid === process.pid || Date.now() - statSync(leftOver).mtimeMs > 3_600_000) return false;
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}

const DISK_TROUBLE: Readonly<Record<string, string>> = {
  EACCES: 'the folder may not be written to',
  EPERM: 'the folder may not be written to',
  EROFS: 'the disk is read-only',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  ENAMETOOLONG: 'the name is too long',
  ENOTDIR: 'a part of the path is a file',
  EEXIST: 'a part of the path is a file',
  ENOTEMPTY: 'another run wrote it meanwhile',
  ENOENT: 'another run took it away meanwhile',
};

export function asUserError(error: unknown, out: string, hint = 'Nothing was changed; name another folder by --out.'): unknown {
  const why = DISK_TROUBLE[(error as NodeJS.ErrnoException).code ?? ''];
  return why === undefined ? error : new UserError(`Cannot write ${out}: ${why}.`, hint);
}
