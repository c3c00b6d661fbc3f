/**
 * What the writers print with. In: the installed package, and a plant folder or none. Out: Assets. Never reads outside those two:
 * fonts come from their npm packages, templates from templates/, a plant's own template of the same name in place of ours.
 */
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import type { Assets } from '../page/assets.ts';
import { packageRoot } from './package.ts';
import { fileBelow } from './safe-path.ts';
import { realShell } from './shell.ts';
import { UserError } from './types.ts';

const require = createRequire(import.meta.url);
const fontFile = (name: string, path: string): Uint8Array => readFileSync(join(dirname(require.resolve(`${name}/package.json`)), path));
const sans = (face: string): Uint8Array => fontFile('source-sans', `TTF/SourceSans3-${face}.ttf`);
const web = (face: string): Uint8Array => fontFile('source-sans', `WOFF2/TTF/SourceSans3-${face}.ttf.woff2`);
const dejavu = (face: string): Uint8Array => fontFile('dejavu-fonts-ttf', `ttf/DejaVuSans${face}.ttf`);

/** `plantFolder` null: a record rendered where its plant is not to be found; then no pictures, no inputs, no overrides. */
export function loadAssets(plantFolder: string | null): Assets {
  const below = (path: string): Uint8Array | null => {
    const file = plantFolder === null ? null : fileBelow(plantFolder, path);
    return file === null ? null : readFileSync(file);
  };
  return {
    templates: loadTemplates(plantFolder),
    pdfFonts: {
      regular: sans('Regular'),
      bold: sans('Bold'),
      italic: sans('It'),
      boldItalic: sans('BoldIt'),
      fallback: dejavu(''),
      fallbackBold: dejavu('-Bold'),
    },
    siteFonts: new Map([
      ['source-sans-regular.woff2', web('Regular')],
      ['source-sans-bold.woff2', web('Bold')],
      ['source-sans-italic.woff2', web('It')],
      ['source-sans-bold-italic.woff2', web('BoldIt')],
    ]),
    picture: below,
    input: below,
  };
}

function loadTemplates(plantFolder: string | null): ReadonlyMap<string, string> {
  const ours = join(packageRoot, 'templates');
  const templates = new Map(templatePaths(ours).map((path) => [path, readFileSync(join(ours, path), 'utf8')]));
  const theirs = plantFolder === null ? null : fileBelow(plantFolder, 'templates');
  if (theirs === null) return templates;
  for (const path of templatePaths(theirs)) {
    if (!templates.has(path)) {
      throw new UserError(
        `templates/${path} overrides nothing: swayfolio has no template of that name.`,
        `It has ${[...templates.keys()].join(', ')}.`,
      );
    }
    templates.set(path, readFileSync(join(theirs, path), 'utf8'));
  }
  return templates;
}

const templatePaths = (folder: string): readonly string[] =>
  realShell.list(folder).files.filter((path) => !path.startsWith('words/') && !path.endsWith('.md'));
