// `node --import ./.tools/typescript.mjs script.ts` runs a TypeScript file as it stands: Node 20 cannot strip types itself.
import { register } from 'node:module';
import { isMainThread } from 'node:worker_threads';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { transformSync } from 'esbuild';

if (isMainThread) register(import.meta.url);

export async function load(url, context, next) {
  if (!url.startsWith('file:') || !url.endsWith('.ts')) return next(url, context);
  const { code } = transformSync(readFileSync(fileURLToPath(url), 'utf8'), {
    loader: 'ts',
    format: 'esm',
    target: 'node20.19',
    sourcefile: url,
  });
  return { format: 'module', source: code, shortCircuit: true };
}
