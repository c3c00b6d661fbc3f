import { createHash } from 'node:crypto';

/** Safe name for a machine's files and anchors: a slug and a short hash of the id, lower-case ASCII, never the id itself. */
export function slugOf(id: string): string {
  const slug = id
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 40)
    .replace(/-+$/, '');
  const hash = createHash('sha256').update(id).digest('hex').slice(0, 8);
  return slug === '' ? `m-${hash}` : `${slug}-${hash}`;
}
