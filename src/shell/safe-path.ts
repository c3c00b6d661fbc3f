/** Paths that may be written or followed. In: a path as given. Out: the same path, proved to stay where it belongs. */
import { realpathSync } from 'node:fs';
import { isAbsolute, join, relative, sep } from 'node:path';

// Control characters and what Windows forbids: an output folder must be copyable to any disk.
const UNSAFE = /[\p{Cc}\\:*?"<>|]/u;

/** Throws (a bug: names are made by us) unless `path` is relative, `/` separated, downward and safe on every disk. */
export function assertSafeOutputPath(path: string): void {
  const parts = path.split('/');
  const bad = path === '' || UNSAFE.test(path) || parts.some((part) => part === '' || part === '.' || part === '..' || /[. ]$/.test(part));
  if (bad) throw new Error(`Output path ${JSON.stringify(path)} is not a safe relative path.`);
}

/** Whether `inner`, links resolved, lies in `folder`, links resolved. False when either does not exist. */
export function liesIn(folder: string, inner: string): boolean {
  try {
    const way = relative(realpathSync(folder), realpathSync(inner));
    return way !== '..' && !way.startsWith(`..${sep}`) && !isAbsolute(way);
  } catch {
    return false;
  }
}

/** The path of a file below `folder`, or null when it leaves the folder or is not there. */
export function fileBelow(folder: string, path: string): string | null {
  const full = join(folder, path);
  return liesIn(folder, full) ? full : null;
}
