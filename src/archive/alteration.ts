/**
 * Files that are not as they were issued. In: an issued folder and its manifest. Out: each of them by name and kind. Never: one passed
 * over, hidden or not.
 */
import type { ArchiveShell } from './chain.ts';
import { parseManifest, sha256 } from './manifest.ts';
import { MANIFEST, SIGNATURE } from './types.ts';

export interface Alteration {
  /** Relative to the issued folder; `.` for the folder itself. */
  readonly path: string;
  readonly kind: 'changed' | 'missing' | 'added' | 'renamed';
  readonly message: string;
}

/** `vouched`: a signature or a later issue proves that the manifest is the one that was issued. */
export function alterationsOf(folder: string, manifest: Uint8Array | null, vouched: boolean, shell: ArchiveShell): readonly Alteration[] {
  const { files, others } = shell.listAll(folder);
  const found: Alteration[] = others.map((path) => ({ path, kind: 'added', message: 'it is no file: a link, or a folder without files' }));
  if (manifest === null) {
    found.push({ path: MANIFEST, kind: 'missing', message: 'nothing tells what was issued' });
    const moved = files.find((path) => parseManifest(Buffer.from(shell.read(`${folder}/${path}`)).toString('utf8')).isCanonical);
    return moved === undefined ? found : [...found, { path: moved, kind: 'added', message: 'it is a manifest under another name' }];
  }
  const text = Buffer.from(manifest).toString('utf8');
  const { lines, isCanonical } = parseManifest(text);
  const stated = new Map(lines.map((line) => [line.path, line.sha256]));
  const there = new Map<string, string>();
  for (const path of files) if (path !== MANIFEST && path !== SIGNATURE) there.set(path, sha256(shell.read(`${folder}/${path}`)));
  const byHash = new Map([...there].map(([path, hash]) => [hash, path]));
  for (const [path, hash] of stated) {
    const now = there.get(path);
    const moved = byHash.get(hash);
    if (now === undefined)
      found.push({
        path,
        kind: 'missing',
        message: moved === undefined || stated.has(moved) ? 'the manifest lists it' : `the manifest lists it; its bytes are in ${moved}`,
      });
    else if (now !== hash) found.push({ path, kind: 'changed', message: `its SHA-256 is ${now}; the manifest states ${hash}` });
  }
  for (const path of there.keys()) if (!stated.has(path)) found.push({ path, kind: 'added', message: 'the manifest does not list it' });
  const isOwn = isCanonical && Buffer.from(text, 'utf8').equals(manifest);
  if (!isOwn) found.push({ path: MANIFEST, kind: 'changed', message: 'it is not in the form that issue writes, byte for byte' });
  else if (found.length > 0 && !vouched)
    found.push({
      path: MANIFEST,
      kind: 'changed',
      message: 'it, or the files named, are not as issued: no signature and no later issue vouches for it',
    });
  return found;
}
