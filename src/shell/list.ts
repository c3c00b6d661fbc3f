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

/** What an auditor must see: no name is passed over, no link followed. */
export function listEverything(folder: string): { files: string[]; others: string[] } {
  const found = { files: [] as string[], others: [] as string[] };
  const walkAll = (below: string): void => {
    const entries = readdirSync(join(folder, below), { withFileTypes: true });
    if (entries.length === 0) found.others.push(below === '' ? '.' : below);
    for (const entry of entries) {
      const path = below === '' ? entry.name : `${below}/${entry.name}`;
      if (entry.isDirectory()) walkAll(path);
      else (entry.isFile() ? found.files : found.others).push(path);
    }
  };
  walkAll('');
  found.files.sort(byCodeUnit);
  found.others.sort(byCodeUnit);
  return found;
}

export function foldersIn(folder: string): string[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { withFileTypes: true })
    .filter((entry) => entry.isDirectory())
    .map((entry) => entry.name)
    .sort(byCodeUnit);
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
