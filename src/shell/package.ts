/** Where the installed package lies, and which version it is: templates/ and package.json are found from here, dist/ or src/ alike. */
import { existsSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

function findRoot(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'package.json'))) {
    const parent = dirname(folder);
    if (parent === folder) throw new Error('The package swayfolio was installed without its package.json.');
    folder = parent;
  }
  return folder;
}

export const packageRoot: string = findRoot();

export function packageVersion(): string {
  const { version } = JSON.parse(readFileSync(join(packageRoot, 'package.json'), 'utf8')) as { version: string };
  return version;
}
