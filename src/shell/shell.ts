/** The real Shell: disk, clock and terminal of this process. In: calls. Out: effects. Never decides anything about the survey. */
import { existsSync, readFileSync, statSync } from 'node:fs';
import { resolve } from 'node:path';
import { claimArchive } from './archive.ts';
import { foldersIn, listEverything, listFiles } from './list.ts';
import { claimFolder, createFolder, replaceFile, replaceFolder } from './replace.ts';
import { type Shell, UserError } from './types.ts';

const WHY: Readonly<Record<string, string>> = {
  ENOENT: 'it does not exist',
  EACCES: 'reading it is not permitted',
  EPERM: 'reading it is not permitted',
  EISDIR: 'it is a folder',
  ENOTDIR: 'it is not a folder',
  ELOOP: 'its links run in a circle',
  ENAMETOOLONG: 'its name is too long',
  EMFILE: 'too many files are open',
};

/** A million rows of readings are about 60 MB. */
const MOST_BYTES = 256 * 1024 * 1024;

/** Runs `access` and turns what the disk refuses into a UserError. */
function orUserError<T>(path: string, access: () => T): T {
  try {
    return access();
  } catch (error) {
    const why = WHY[(error as NodeJS.ErrnoException).code ?? ''];
    if (why === undefined) throw error;
    throw new UserError(`Cannot read ${path}: ${why}.`, 'Check the path and its permissions.');
  }
}

export const realShell: Shell = {
  list: (folder) => orUserError(folder, () => listFiles(folder)),
  listAll: (folder) => orUserError(folder, () => listEverything(folder)),
  folders: (folder) => orUserError(folder, () => foldersIn(folder)),
  read: (path) =>
    orUserError(path, () => {
      if (!statSync(path).isFile()) throw new UserError(`Cannot read ${path}: it is no file.`, 'Name a file.');
      // Text is held whole and a string cannot be longer: said before any of it is read.
      if (statSync(path).size > MOST_BYTES)
        throw new UserError(
          `Cannot read ${path}: it is larger than ${MOST_BYTES / 1024 / 1024} MB.`,
          'Part it into several files, one a survey or a year.',
        );
      return readFileSync(path);
    }),
  exists: (path) => existsSync(path),
  absolute: (path) => resolve(path).replaceAll('\\', '/'),
  claimFolder: (out) => void claimFolder(out),
  replaceFolder,
  createFolder,
  claimArchive: (folder) => claimArchive(folder),
  replaceFile,
  today: () => new Date().toISOString().slice(0, 10),
  stdout: (text) => void process.stdout.write(text),
  stderr: (text) => void process.stderr.write(text),
  progress: (text) => {
    if (process.stderr.isTTY) process.stderr.write(`\r\u001b[K${text}`);
  },
};
