/** Writes demo-survey/ from its stories: run by `npm run demo:make`. The files are committed; a test holds them to this. */
import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { demoFiles } from './folder.ts';

const root = fileURLToPath(new URL('../../demo-survey', import.meta.url));
rmSync(root, { recursive: true, force: true });
for (const { path, bytes } of demoFiles()) {
  mkdirSync(dirname(join(root, path)), { recursive: true });
  writeFileSync(join(root, path), bytes);
}
