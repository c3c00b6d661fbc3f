/**
 * The manifest of an issued folder. In: paths and bytes. Out: its text, which `sha256sum -c` reads, and back. Never: two texts for the
 * same files: sorted by code unit, a line a file, a break at the end of each.
 */
import { createHash } from 'node:crypto';

export interface ManifestLine {
  readonly path: string;
  /** 64 digits, lower case. */
  readonly sha256: string;
}

export const sha256 = (bytes: Uint8Array | string): string => createHash('sha256').update(bytes).digest('hex');

export function manifestText(lines: readonly ManifestLine[]): string {
  const sorted = [...lines].sort((a, b) => (a.path < b.path ? -1 : a.path > b.path ? 1 : 0));
  return sorted.map((line) => `${line.sha256}  ${line.path}\n`).join('');
}

/** The lines that can be read; `isCanonical` false where the text is not what manifestText makes of them. */
export function parseManifest(text: string): { readonly lines: readonly ManifestLine[]; readonly isCanonical: boolean } {
  const lines: ManifestLine[] = [];
  const seen = new Set<string>();
  for (const line of text.split('\n')) {
    const match = /^([0-9a-f]{64}) {2}(.+)$/.exec(line);
    if (match === null || seen.has(match[2] as string)) continue;
    seen.add(match[2] as string);
    lines.push({ sha256: match[1] as string, path: match[2] as string });
  }
  return { lines, isCanonical: lines.length > 0 && manifestText(lines) === text };
}

/** Names that `sha256sum` would write in another way, or that no disk takes from every system. */
export const isPlainPath = (path: string): boolean => !/[\p{Cc}\\]/u.test(path);
