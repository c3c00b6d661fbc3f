/**
 * The archive of issued folders on the disk. In: a claim and files. Out: a new folder under its name, whole, synced and read-only.
 * Never: an issued folder changed, replaced or removed.
 */
import { chmodSync, closeSync, existsSync, fsyncSync, mkdirSync, openSync, readdirSync, renameSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { type Claim, claimExclusively, removeOpened, syncPath } from './claim.ts';
import { asUserError } from './replace.ts';
import { type ArchiveClaim, type OutputFile, UserError } from './types.ts';

const READ_ONLY_FILE = 0o444;
const READ_ONLY_FOLDER = 0o555;
const NOT_ISSUED = 'Nothing was issued, and what was issued before stands as it was.';

/** Writes one new file and has it on the disk; the tests' full disk stands in its place. */
export type WriteFile = (path: string, bytes: Uint8Array | string) => void;

const writeSynced: WriteFile = (path, bytes) => {
  const file = openSync(path, 'wx');
  try {
    writeFileSync(file, bytes);
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
};

export function claimArchive(folder: string, write: WriteFile = writeSynced): ArchiveClaim {
  const claim = orUserError(folder, () => claimExclusively(folder));
  orUserError(folder, () => protectAll(folder));
  return {
    publish: (name, files) => orUserError(folder, () => publish(folder, name, files, claim, write)),
    release: () => orUserError(folder, claim.release),
  };
}

function orUserError<T>(folder: string, act: () => T): T {
  try {
    return act();
  } catch (error) {
    throw asUserError(error, folder, NOT_ISSUED);
  }
}

function publish(folder: string, name: string, files: Iterable<OutputFile>, claim: Claim, write: WriteFile): void {
  const target = join(folder, name);
  const work = join(claim.folder, 'report');
  try {
    mkdirSync(work);
    const folders = writeAll(work, files, write);
    for (const made of folders) {
      if (made !== work) chmodSync(made, READ_ONLY_FOLDER);
      syncPath(made);
    }
    claim.assertHeld();
    // No rename of ours may fall on an issue: on Linux one would pass where the folder in the way is empty.
    if (existsSync(target)) throw new UserError(`${target} exists already.`, NOT_ISSUED);
    renameSync(work, target);
  } catch (error) {
    removeOpened(work);
    throw error;
  }
  syncPath(folder);
  chmodSync(target, READ_ONLY_FOLDER);
}

/** Returns every folder made, the deepest first. */
function writeAll(work: string, files: Iterable<OutputFile>, write: WriteFile): readonly string[] {
  const folders = new Set<string>([work]);
  for (const file of files) {
    const target = join(work, file.path);
    if (!target.startsWith(join(work, '/'))) throw new Error(`${file.path} leaves the issued folder.`);
    const parents: string[] = [];
    for (let parent = dirname(target); !folders.has(parent); parent = dirname(parent)) parents.push(parent);
    for (const parent of parents.reverse()) {
      mkdirSync(parent);
      folders.add(parent);
    }
    write(target, file.bytes);
    chmodSync(target, READ_ONLY_FILE);
  }
  return [...folders].reverse();
}

/** A folder is made read-only after its rename (no system lets one that is be moved): a run killed in between left it open. */
function protectAll(folder: string): void {
  for (const name of readdirSync(folder)) {
    const isIssue = !name.startsWith('.') && existsSync(join(folder, name, 'manifest.sha256'));
    if (isIssue) chmodSync(join(folder, name), READ_ONLY_FOLDER);
  }
}
