/** The site in a real browser, from file://: no request, no console word, WCAG by axe, sort, filter, search, keyboard, print. */
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import { readRecord } from '../../src/record/read.ts';
import type { SwayfolioRecord } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { loadAssets } from '../../src/shell/assets.ts';
import { realShell } from '../../src/shell/shell.ts';
import { site } from '../../src/site/site.ts';
import { readPlant } from '../../src/survey/read.ts';
import { launch } from './launch.ts';

const require = createRequire(import.meta.url);
const axeSource = require.resolve('axe-core/axe.min.js');
const demo = new URL('../../demo-survey', import.meta.url).pathname;
const home = mkdtempSync(join(tmpdir(), 'swayfolio-site-'));
let browser: Browser;
let record: SwayfolioRecord;

beforeAll(async () => {
  const { plant } = readPlant(realShell, demo);
  if (plant === null) throw new Error('the demo plant has errors');
  const text = writeRecord(assess(plant, { survey: null, toolVersion: 'test' }));
  record = readRecord(text);
  for (const { path, bytes } of site(record, loadAssets(demo), { pdf: true, recordText: text })) {
    mkdirSync(dirname(join(home, path)), { recursive: true });
    writeFileSync(join(home, path), bytes);
  }
  browser = await launch();
}, 120_000);

afterAll(async () => browser?.close());

const machinePage = (): string => `machines/${readdirSync(join(home, 'machines')).find((f) => f.startsWith('tg-01')) ?? ''}`;
const kinds = (): string[] => [
  'index.html',
  'actions.html',
  'machines.html',
  'coverage.html',
  'method.html',
  'downloads.html',
  machinePage(),
];

/** A page with every word of the console and every request off the disk kept. */
async function visit(path: string, options: BrowserContextOptions = {}): Promise<{ page: Page; said: string[]; asked: string[] }> {
  const context = await browser.newContext({ viewport: { width: 1280, height: 900 }, ...options });
  const page = await context.newPage();
  const said: string[] = [];
  const asked: string[] = [];
  page.on('console', (message) => said.push(message.text()));
  page.on('pageerror', (error) => said.push(error.message));
  page.on('request', (request) => {
    if (!request.url().startsWith('file://')) asked.push(request.url());
  });
  await page.goto(pathToFileURL(join(home, path)).href);
  return { page, said, asked };
}

describe('each kind of page', () => {
  for (const [name, options] of [
    ['wide, light', {}],
    ['narrow, light', { viewport: { width: 390, height: 844 } }],
    ['wide, dark', { colorScheme: 'dark' }],
    ['narrow, dark', { viewport: { width: 390, height: 844 }, colorScheme: 'dark' }],
  ] as const) {
    it(`is quiet and clean by axe: ${name}`, async () => {
      for (const path of kinds()) {
        const { page, said, asked } = await visit(path, options);
        expect(said, path).toEqual([]);
        expect(asked, path).toEqual([]);
        await page.evaluate(readFileSync(axeSource, 'utf8'));
        const found = await page.evaluate(async () => {
          const { axe } = globalThis as unknown as {
            axe: { run(options: object): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> };
          };
          return (await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'] })).violations.map(
            (v) => `${v.id}: ${v.nodes[0]?.html}`,
          );
        });
        expect(found, path).toEqual([]);
        await page.context().close();
      }
    }, 120_000);
  }

  it('does not scroll sideways on a phone', async () => {
    for (const path of kinds()) {
      const { page } = await visit(path, { viewport: { width: 390, height: 844 } });
      expect(await page.evaluate('document.documentElement.scrollWidth <= document.documentElement.clientWidth'), path).toBe(true);
      await page.context().close();
    }
  }, 60_000);

  it('shows everything without JavaScript, the cautions too', async () => {
    for (const path of kinds()) {
      const { page } = await visit(path, { javaScriptEnabled: false });
      const text = (await page.locator('body').textContent()) ?? '';
      expect(text, path).toContain('This is screening by overall values, not a diagnosis.');
      if (path === 'machines.html') expect(await page.locator('#machines tbody tr').count()).toBe(record.machines.length);
      await page.context().close();
    }
  }, 60_000);
});

describe('the list of machines', () => {
  const idsWhere = (fits: (m: SwayfolioRecord['machines'][number]) => boolean): string[] =>
    record.machines.filter(fits).map((m) => m.machine);
  const firstIds = (page: Page): Promise<string[]> => page.locator('#machines tbody tr:visible th a').allInnerTexts();

  it('sorts by condition, worst first, and back', async () => {
    const { page } = await visit('machines.html');
    await page.getByRole('button', { name: 'Condition' }).click();
    expect(await page.locator('#machines tbody tr').first().getAttribute('data-c')).toBe('D');
    await page.getByRole('button', { name: 'Condition' }).click();
    expect(await page.locator('#machines tbody tr').first().getAttribute('data-c')).toBe('none');
    await page.context().close();
  });

  it('filters by area, condition, urgency and criticality, and searches', async () => {
    const { page } = await visit('machines.html');
    await page.selectOption('#f-area', 'Packing annex');
    expect(await firstIds(page)).toEqual(idsWhere((m) => m.area === 'Packing annex'));
    await page.selectOption('#f-area', '');
    await page.selectOption('#f-urgency', 'Act now');
    expect(await firstIds(page)).toEqual(idsWhere((m) => m.urgency === 'now'));
    await page.selectOption('#f-urgency', '');
    await page.selectOption('#f-criticality', 'critical');
    expect(await firstIds(page)).toEqual(idsWhere((m) => m.criticality === 'critical'));
    await page.selectOption('#f-criticality', '');
    const wanted = record.machines.find((m) => /\p{Script=Cyrillic}/u.test(m.name ?? ''));
    await page.fill('#f-search', (wanted?.name ?? 'no such name').toUpperCase());
    expect(await firstIds(page)).toEqual([wanted?.machine]);
    expect(await page.locator('#f-count').textContent()).toBe(`1 of ${record.machines.length}`);
    await page.context().close();
  });

  it('is reached and worked by keyboard alone', async () => {
    const { page } = await visit('machines.html');
    await page.keyboard.press('Tab');
    expect(await page.evaluate('document.activeElement.className')).toBe('skip');
    for (let i = 0; i < 40 && (await page.evaluate('document.activeElement.tagName')) !== 'BUTTON'; i += 1)
      await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
    expect(await page.locator('#machines th[aria-sort]').count()).toBe(1);
    await page.context().close();
  });
});

it('every link leads to a file and an id that are there', async () => {
  for (const path of kinds()) {
    const { page } = await visit(path);
    const links = await page.locator('a[href]').evaluateAll((all) => all.map((a) => (a as unknown as { href: string }).href));
    for (const link of new Set(links)) {
      const [file = '', id] = new URL(link).pathname.concat(new URL(link).hash).split('#');
      const isBeside = /\/(report\.pdf|record\.json|work-list\.csv)$/.test(file);
      if (!isBeside) expect(statSync(decodeURIComponent(file)).isFile(), link).toBe(true);
      if (id !== undefined && file.endsWith(path)) expect(await page.locator(`[id="${id}"]`).count(), link).toBe(1);
    }
    await page.context().close();
  }
}, 60_000);

it('prints a machine on one sheet', async () => {
  const { page } = await visit(machinePage());
  const pdf = await page.pdf({ format: 'A4', margin: { top: '12mm', bottom: '12mm', left: '12mm', right: '12mm' } });
  expect((pdf.toString('latin1').match(/\/Type \/Page\b/g) ?? []).length).toBe(1);
  await page.context().close();
});
