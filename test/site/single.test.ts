/** The site as one file: nothing beside it is needed, every link leads somewhere in it, its policy lets run what it holds and nothing else. */
import { createHash } from 'node:crypto';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Parser } from 'htmlparser2';
import { beforeAll, describe, expect, it } from 'vitest';
import { singleFile } from '../../src/site/single.ts';
import { site } from '../../src/site/site.ts';
import { launch } from '../browser/launch.ts';
import { assets, plantOf, recordOfFiles } from './plants.ts';

let html: string;
let cautions: readonly string[];
let pages: readonly string[];
const attributes: Record<string, string>[] = [];

beforeAll(() => {
  const { record, text } = recordOfFiles(
    plantOf({ machines: 5, exceptionEvery: 2, nameOf: (i) => `<b>"Pump" & ${i} <a href="https://a.example">x</a>` }),
  );
  cautions = record.cautions;
  pages = [...site(record, assets, { pdf: true, recordText: text })].map((f) => f.path).filter((p) => p.endsWith('.html'));
  const { path, bytes } = singleFile(site(record, assets, { pdf: true, recordText: text }));
  expect(path).toBe('index.html');
  html = String(bytes);
  const parser = new Parser({ onopentag: (name, given) => attributes.push({ ...given, tag: name }) });
  parser.end(html);
});

describe('the single file', () => {
  it('has every page, and every link leads to one id in it', () => {
    const ids = attributes.flatMap((a) => (a['id'] === undefined ? [] : [a['id']]));
    expect(new Set(ids).size).toBe(ids.length);
    const links = attributes.filter((a) => a['tag'] === 'a').map((a) => a['href'] ?? '');
    expect(links.length).toBeGreaterThan(15);
    for (const href of links) expect(ids, href).toContain(href.replace(/^#/, ''));
    expect(pages.length).toBeGreaterThan(10);
    for (const path of pages) expect(ids, path).toContain(`page-${path.replace('.html', '').replaceAll('/', '-')}`);
  });

  it('asks for nothing from beside it', () => {
    for (const a of attributes) for (const name of ['src', 'srcset', 'data']) expect(a[name] ?? 'data:').toMatch(/^data:/);
    expect(attributes.some((a) => a['tag'] === 'link')).toBe(false);
    expect(html.match(/url\('(?!data:)/)).toBeNull();
  });

  it('has a policy of hashes, which are those of its style and its script', () => {
    const policy = attributes.find((a) => a['http-equiv'] === 'Content-Security-Policy')?.['content'] ?? '';
    expect(policy).toContain("default-src 'none'");
    expect(policy).not.toContain('unsafe');
    for (const tag of ['style', 'script']) {
      const text = new RegExp(`<${tag}>([\\s\\S]*?)</${tag}>`).exec(html)?.[1] ?? '';
      expect(text.length).toBeGreaterThan(500);
      // CSP Level 3: the base64 of the SHA-256 of the element's text.
      expect(policy).toContain(`${tag}-src 'sha256-${createHash('sha256').update(text).digest('base64')}'`);
    }
  });

  it('carries the cautions', () => {
    for (const caution of cautions) expect(html).toContain(caution.replaceAll("'", '&#x27;'));
  });

  it('runs in a browser under that policy: script, style and fonts work and nothing is refused', async () => {
    const file = join(mkdtempSync(join(tmpdir(), 'swayfolio-single-')), 'index.html');
    writeFileSync(file, html);
    const browser = await launch();
    try {
      const page = await browser.newPage();
      const told: string[] = [];
      page.on('console', (message) => told.push(message.text()));
      page.on('pageerror', (error) => told.push(error.message));
      await page.goto(pathToFileURL(file).href);
      expect(await page.isVisible('#filters')).toBe(true);
      expect(
        await page.evaluate(
          "document.fonts.ready.then(() => document.fonts.check('16px Sheet') && getComputedStyle(document.body).fontFamily.includes('Sheet'))",
        ),
      ).toBe(true);
      expect(told).toEqual([]);
    } finally {
      await browser.close();
    }
  }, 60_000);
});
