/** The files of a folder. In: a path. Out: relative paths by code unit, and links that were refused. Never follows a link out of the folder. */
import { type Dirent, existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { MARKER } from './replace.ts';
import { liesIn } from './safe-path.ts';

/** What swayfolio itself writes into a plant folder is not its input. */
const OUTPUTS: ReadonlySet<string> = new Set(['out', 'issued']);

export function listFiles(folder: string): { files: string[]; refused: string[] } {
  const found = { files: [] as string[], refused: [] as string[] };
  walk(folder, '', found);
  found.files.sort(byCodeUnit);
  found.refused.sort(byCodeUnit);
  return found;
}

function walk(root: string, below: string, found: { files: string[]; refused: string[] }): void {
  for (const entry of readdirSync(join(root, below), { withFileTypes: true })) {
    if (entry.name.startsWith('.')) continue;
    const path = below === '' ? entry.name : `${below}/${entry.name}`;
    if (entry.isDirectory()) {
      const ours = (below === '' && OUTPUTS.has(entry.name)) || existsSync(join(root, path, MARKER));
      if (!ours) walk(root, path, found);
    } else (isOwnFile(root, path, entry) ? found.files : found.refused).push(path);
  }
}

/** A file, or a link to a file of this same folder; pipes, sockets and links to folders are neither (a loop, or a wait without end). */
function isOwnFile(root: string, path: string, entry: Dirent): boolean {
  if (entry.isFile()) return true;
  const full = join(root, path);
  return entry.isSymbolicLink() && liesIn(root, full) && statSync(full).isFile();
}

function byCodeUnit(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
