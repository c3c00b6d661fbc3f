/**
 * One process at a time in a folder. In: a folder. Out: a claim on it, or a UserError that names who holds it. Never: two at once.
 * `.claim/owner` says whose it is; it comes into being with its folder, by a rename that fails where a claim stands already. A
 * claim whose process is gone is taken over by `next-<its token>` inside it, made in the same way: of many that see the same
 * dead claim one alone can make that folder, and one that comes late makes a folder that nobody looks at. The last of the
 * row holds the claim.
 */
import {
  chmodSync,
  closeSync,
  existsSync,
  fsyncSync,
  mkdirSync,
  openSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { UserError } from './types.ts';

const CLAIM = '.claim';
/** What is being made ready, and what is being cleared away, with the process that does it. */
const PASSING = /^\.claim-(?:new|old)-(\d+)-/;
/** A process number is given again in time, and that of another computer says nothing here: an hour-old claim is nobody's. */
const OLD_MS = 3_600_000;

export interface Claim {
  /** A folder of the holder's own, inside the claim. */
  readonly folder: string;
  /** Throws UserError where another process took the claim over meanwhile. */
  assertHeld(): void;
  release(): void;
}

interface Owner {
  readonly folder: string;
  readonly token: string;
}

let claims = 0;

export function claimExclusively(folder: string): Claim {
  mkdirSync(folder, { recursive: true });
  claims += 1;
  const token = `${process.pid}-${Date.now().toString(36)}${claims}-${hostname().replace(/[^\w.]+/g, '_')}`;
  const held = lastOwner(folder);
  if (held !== null && isAtWork(held)) throw taken(folder, held);
  const target = held === null ? join(folder, CLAIM) : join(held.folder, `next-${held.token}`);
  takePlace(folder, target, token);
  const own = lastOwner(folder);
  if (own?.token !== token) throw taken(folder, own);
  clearPassing(folder);
  return {
    folder: own.folder,
    assertHeld: () => {
      const now = lastOwner(folder);
      if (now?.token !== token) throw taken(folder, now);
    },
    release: () => release(folder, token),
  };
}

function takePlace(folder: string, target: string, token: string): void {
  const ready = join(folder, `.claim-new-${process.pid}-${token}`);
  try {
    mkdirSync(ready);
    writeFileSync(join(ready, 'owner'), token);
    renameSync(ready, target);
  } catch (error) {
    rmSync(ready, { recursive: true, force: true });
    // Another was quicker: it made the same folder, or cleared the dead claim away.
    const { code } = error as NodeJS.ErrnoException;
    if (existsSync(target) || code === 'ENOENT') throw taken(folder, lastOwner(folder));
    throw error;
  }
}

/** The end of the row of claims; null where there is none. */
function lastOwner(folder: string): Owner | null {
  let found: Owner | null = null;
  for (let at: string | null = join(folder, CLAIM); at !== null && existsSync(at); ) {
    const token = ownerOf(at);
    if (token === null) return found;
    found = { folder: at, token };
    at = join(at, `next-${token}`);
  }
  return found;
}

function ownerOf(claim: string): string | null {
  try {
    return readFileSync(join(claim, 'owner'), 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw error;
  }
}

const taken = (folder: string, owner: Owner | null): UserError =>
  new UserError(
    `Another swayfolio${owner === null ? '' : ` (process ${Number.parseInt(owner.token, 10)})`} is issuing into ${folder}.`,
    'Wait until it is done, then run again; nothing was issued.',
  );

function isAtWork({ folder, token }: Owner): boolean {
  try {
    if (Date.now() - statSync(folder).mtimeMs > OLD_MS) return false;
  } catch {
    return false;
  }
  const host = token.split('-').slice(2).join('-');
  return host !== hostname().replace(/[^\w.]+/g, '_') || isAlive(Number.parseInt(token, 10));
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}

/** Away under another name first, so that a claim is never seen half removed. */
function release(folder: string, token: string): void {
  if (lastOwner(folder)?.token !== token) return;
  const old = join(folder, `.claim-old-${process.pid}-${token}`);
  renameSync(join(folder, CLAIM), old);
  removeOpened(old);
}

function clearPassing(folder: string): void {
  for (const name of readdirSync(folder)) {
    const pid = PASSING.exec(name)?.[1];
    if (pid !== undefined && Number(pid) !== process.pid && !isAlive(Number(pid))) removeOpened(join(folder, name));
  }
}

/** Folders that were made read-only must be opened before they can be cleared away. */
export function removeOpened(folder: string): void {
  if (!existsSync(folder)) return;
  const open = (at: string): void => {
    chmodSync(at, 0o755);
    for (const entry of readdirSync(at, { withFileTypes: true })) if (entry.isDirectory()) open(join(at, entry.name));
  };
  open(folder);
  rmSync(folder, { recursive: true, force: true });
}

/** What was written must be on the disk before its name is. Where a folder cannot be synced (Windows), its file system keeps that order itself. */
export function syncPath(path: string): void {
  let file: number | null = null;
  try {
    file = openSync(path, 'r');
    fsyncSync(file);
  } catch (error) {
    const { code = '' } = error as NodeJS.ErrnoException;
    if (!['EISDIR', 'EPERM', 'EACCES', 'EINVAL'].includes(code)) throw error;
  } finally {
    if (file !== null) closeSync(file);
  }
}
