// Builds the program: src/ becomes dist/ (our own code bundled, packages left where npm puts them), and the
// JSON Schemas are written beside it. In memory first, so that a build that fails leaves the old dist/ whole.
import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { build } from 'esbuild';

const root = fileURLToPath(new URL('..', import.meta.url));
const dist = join(root, 'dist');

export async function buildProgram() {
  const result = await build({
    absWorkingDir: root,
    entryPoints: {
      main: './src/main.ts',
      'schemas/plant': './src/survey/schema.ts',
      'schemas/record': './src/record/schema.ts',
      'schemas/comparison': './src/record/comparison.ts',
    },
    outdir: 'dist',
    bundle: true,
    splitting: true,
    format: 'esm',
    platform: 'node',
    target: 'node20.19',
    packages: 'external',
    legalComments: 'none',
    sourcemap: false,
    write: false,
    logLevel: 'warning',
  });
  rmSync(dist, { recursive: true, force: true });
  for (const file of result.outputFiles) {
    mkdirSync(dirname(file.path), { recursive: true });
    writeFileSync(file.path, file.contents, { mode: file.path === join(dist, 'main.js') ? 0o755 : 0o644 });
  }
  await writeSchema('plant', 'plantJsonSchema');
  await writeSchema('record', 'recordJsonSchema');
  await writeSchema('comparison', 'comparisonJsonSchema');
}

async function writeSchema(name, of) {
  const module = await import(pathToFileURL(join(dist, 'schemas', `${name}.js`)).href);
  writeFileSync(join(dist, 'schemas', `${name}.schema.json`), `${JSON.stringify(module[of](), null, 2)}\n`);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await buildProgram();
