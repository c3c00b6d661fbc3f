/**
 * Small pictures of each kind of page, PDF and site, against those that were looked at and kept. Renew on purpose by
 * UPDATE_GOLDENS=1 npx vitest run test/pictures, and look at every one that changed.
 */
import { existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import { reportPdf } from '../../src/pdf/report.ts';
import { readRecord } from '../../src/record/read.ts';
import { writeRecord } from '../../src/record/write.ts';
import { loadAssets } from '../../src/shell/assets.ts';
import { realShell } from '../../src/shell/shell.ts';
import { site } from '../../src/site/site.ts';
import { readPlant } from '../../src/survey/read.ts';
import { launch } from '../browser/launch.ts';
import { read } from '../pdf/document.ts';

const require = createRequire(import.meta.url);
const golden = fileURLToPath(new URL('./golden', import.meta.url));
const renew = process.env['UPDATE_GOLDENS'] === '1';
const demo = new URL('../../demo-survey', import.meta.url).pathname;
const home = mkdtempSync(join(tmpdir(), 'swayfolio-pictures-'));

/** Width of a kept picture, pixels; a pixel differs by this much of 255; so many of a hundred may. */
const WIDTH = 260;
const DIFFERS = 56;
const MOST_PERCENT = 1.5;

let browser: Browser;
let lens: Page;
let pdf: Uint8Array;
let texts: string[];

beforeAll(async () => {
  const { plant } = readPlant(realShell, demo);
  if (plant === null) throw new Error('the demo plant has errors');
  const text = writeRecord(assess(plant, { survey: null, toolVersion: 'test' }));
  const record = readRecord(text);
  const assets = loadAssets(demo);
  pdf = (await reportPdf(record, assets, { tags: true, profile: 'PDF/A-3b', recordText: text })).bytes;
  texts = (await read(pdf)).map((p) => p.text);
  for (const { path, bytes } of site(record, assets, { pdf: true, recordText: text })) {
    mkdirSync(dirname(join(home, path)), { recursive: true });
    writeFileSync(join(home, path), bytes);
  }
  browser = await launch();
  lens = await browser.newPage();
  const build = dirname(require.resolve('pdfjs-dist/package.json'));
  // The worker's module beside the library: pdfjs then works in the page itself, without a worker of its own.
  for (const file of ['pdf.worker.min.mjs', 'pdf.min.mjs'])
    await lens.addScriptTag({ type: 'module', content: readFileSync(join(build, 'legacy/build', file), 'utf8') });
  await lens.evaluate(
    `globalThis.opened = globalThis.pdfjsLib.getDocument({ data: Uint8Array.from(atob('${Buffer.from(pdf).toString('base64')}'), (c) => c.charCodeAt(0)) }).promise; null`,
  );
}, 180_000);

afterAll(async () => browser?.close());

/** A PDF page drawn in the browser, as PNG in base 64. */
const drawn = (page: number): Promise<string> =>
  lens.evaluate(`(async () => {
    const page = await (await globalThis.opened).getPage(${page});
    const view = page.getViewport({ scale: 2 * ${WIDTH} / page.getViewport({ scale: 1 }).width });
    const canvas = document.createElement('canvas');
    canvas.width = view.width; canvas.height = view.height;
    await page.render({ canvasContext: canvas.getContext('2d'), canvas, viewport: view }).promise;
    return canvas.toDataURL('image/png').slice(22);
  })()`);

/** The picture made small, and how many of a hundred pixels differ from the kept one. */
async function compare(png: string, name: string): Promise<number> {
  const file = join(golden, `${name}.png`);
  const small: string = await lens.evaluate(`(async () => {
    const image = new Image(); image.src = 'data:image/png;base64,${png}'; await image.decode();
    const canvas = document.createElement('canvas');
    canvas.width = ${WIDTH}; canvas.height = Math.min(420, Math.round(image.height * ${WIDTH} / image.width));
    const pen = canvas.getContext('2d'); pen.imageSmoothingQuality = 'high';
    pen.drawImage(image, 0, 0, ${WIDTH}, image.height * ${WIDTH} / image.width);
    return canvas.toDataURL('image/png').slice(22);
  })()`);
  if (renew) {
    mkdirSync(golden, { recursive: true });
    writeFileSync(file, Buffer.from(small, 'base64'));
  }
  if (!existsSync(file)) throw new Error(`${file} is not there; make it by UPDATE_GOLDENS=1 and look at it`);
  return lens.evaluate(`(async () => {
    const pixels = async (base) => {
      const image = new Image(); image.src = 'data:image/png;base64,' + base; await image.decode();
      const canvas = document.createElement('canvas'); canvas.width = image.width; canvas.height = image.height;
      const pen = canvas.getContext('2d'); pen.drawImage(image, 0, 0);
      return pen.getImageData(0, 0, image.width, image.height);
    };
    const [a, b] = [await pixels('${small}'), await pixels('${readFileSync(file).toString('base64')}')];
    if (a.width !== b.width || a.height !== b.height) return 100;
    let far = 0;
    for (let i = 0; i < a.data.length; i += 4) if ([0, 1, 2].some((c) => Math.abs(a.data[i + c] - b.data[i + c]) > ${DIFFERS})) far += 1;
    return (100 * far) / (a.width * a.height);
  })()`);
}

describe('pages of the PDF', () => {
  for (const [name, marks] of [
    ['control', 'Vibration survey report'],
    ['manager', 'things to do this week'],
    ['ranked', 'Ranked actions Rank'],
    ['coverage', 'Not measured Machine State'],
    ['machines', 'All machines'],
    ['exception', 'Machines with findings JP-1C'],
    ['polar', '1× vector, angles as lag'],
    ['method', 'Method, limits and policy Each reading'],
    ['people', 'People and instruments People'],
    ['data', 'The data of this survey Every'],
    ['cautions', 'End of the report'],
  ] as const) {
    it(name, async () => {
      const squeezed = marks.replace(/\s/g, '');
      const page = texts.findIndex((t, i) => (i > 0 || name === 'control') && t.replace(/\s/g, '').includes(squeezed));
      expect(page, marks).toBeGreaterThanOrEqual(0);
      expect(await compare(await drawn(page + 1), `pdf-${name}`)).toBeLessThan(MOST_PERCENT);
    }, 60_000);
  }
});

describe('pages of the site', () => {
  const machine = (): string => `machines/${readdirSync(join(home, 'machines')).find((f) => f.startsWith('tg-01')) ?? ''}`;
  const wide = { viewport: { width: 1200, height: 900 } };
  const narrow = { viewport: { width: 390, height: 844 } };
  for (const [name, path, options] of [
    ['index', () => 'index.html', wide],
    ['actions', () => 'actions.html', wide],
    ['machines', () => 'machines.html', wide],
    ['machine', machine, wide],
    ['coverage', () => 'coverage.html', wide],
    ['method', () => 'method.html', wide],
    ['downloads', () => 'downloads.html', wide],
    ['index-narrow', () => 'index.html', narrow],
    ['machine-narrow', machine, narrow],
    ['machines-dark', () => 'machines.html', { ...wide, colorScheme: 'dark' as const }],
    ['machine-dark', machine, { ...wide, colorScheme: 'dark' as const }],
  ] as const) {
    it(name, async () => {
      const context = await browser.newContext(options);
      const page = await context.newPage();
      await page.goto(pathToFileURL(join(home, path())).href);
      await page.evaluate('document.fonts.ready.then(() => null)');
      const shot = (await page.screenshot({ fullPage: true })).toString('base64');
      await context.close();
      expect(await compare(shot, `site-${name}`)).toBeLessThan(MOST_PERCENT);
    }, 60_000);
  }
});
