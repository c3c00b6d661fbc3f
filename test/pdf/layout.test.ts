/** Pages as a reader gets them: nothing cut, nothing lost, nothing alone; read back by pdfjs-dist. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { body, pdf, read, type ReadPage } from './document.ts';
import { fill, inside, of, row, table, words } from './pages.ts';

describe('rows taller than a page', () => {
  for (const count of [61, 62, 63, 64, 65, 66, 67, 68, 69, 70, 140, 900]) {
    it(`${count} lines are all there, between the margins`, async () => {
      const pages = await read((await pdf(`<section>${table(['text', 'text'], row('left', words(count).join('<br>')))}</section>`)).bytes);
      expect(of(pages, /^word/)).toEqual(words(count));
      inside(pages);
    });
  }

  it('begin on the page that leads to them', async () => {
    const pages = await read((await pdf(`<section>${fill(10)}${table(['text'], row(words(4000).join(' ')))}</section>`)).bytes);
    expect(pages[0]?.text).toContain('word0');
    expect(of(pages, /^word/)).toEqual(words(4000));
  });

  it('a head row too tall to repeat is printed once and in full', async () => {
    const html = `<table><col class="text"><thead><tr><th scope="col">${words(2500).join(' ')}</th></tr></thead><tbody>${row('x')}${row('y')}</tbody></table>`;
    const pages = await read((await pdf(`<section>${html}</section>`)).bytes);
    expect(of(pages, /^word/)).toEqual(words(2500));
    inside(pages);
  });
});

describe('what stays together', () => {
  for (let before = 28; before < 48; before += 1) {
    it(`a heading after ${before} lines is not alone before a row of many pages`, async () => {
      const pages = await read(
        (await pdf(`<section>${fill(before)}<h2>Heading</h2>${table(['text'], row(words(3000).join(' ')))}</section>`)).bytes,
      );
      const page = pages.find((p) => p.text.includes('Heading'));
      expect(page?.text).toContain('word0');
    });
  }

  it('a heading stays with a kept section that fills nearly a page', async () => {
    const kept = words(37, 'kept')
      .map((w) => `<p>${w}</p>`)
      .join('');
    const pages = await read((await pdf(`<section>${fill(5)}<h2>Heading</h2><section class="keep">${kept}</section></section>`)).bytes);
    expect(pages.find((p) => p.text.includes('Heading'))?.text).toContain('kept0');
    expect(of(pages, /^kept/)).toEqual(words(37, 'kept'));
  });

  it('a kept section that fits on a page is on one', async () => {
    for (const before of [20, 30, 38, 40]) {
      const pages = await read(
        (
          await pdf(
            `<section>${fill(before)}<section class="keep"><h3>Kept</h3>${words(8, 'kept')
              .map((w) => `<p>${w}</p>`)
              .join('')}</section></section>`,
          )
        ).bytes,
      );
      const on = pages.filter((p) => /Kept|kept\d/.test(p.text));
      expect(on.length).toBe(1);
    }
  });

  it('a note is not alone on a page after its table', async () => {
    const rows = words(12, 'cell')
      .map((w) => row(w))
      .join('');
    for (let before = 26; before < 42; before += 1) {
      const pages = await read((await pdf(`<section>${fill(before)}${table(['text'], rows)}<p class="note">Anote</p></section>`)).bytes);
      expect(pages.find((p) => p.text.includes('Anote'))?.text, `${before}`).toContain('cell11');
    }
  });

  it('a paragraph leaves neither its first nor its last line alone', async () => {
    for (let before = 36; before < 46; before += 1) {
      const pages = await read((await pdf(`<section>${fill(before)}<p>${words(100).join(' ')}</p></section>`, { mark: null })).bytes);
      if (pages.length === 1) continue;
      const lines = pages
        .map((p) => new Set(p.items.filter((i) => i.str.includes('word')).map((i) => i.y.toFixed(1))).size)
        .filter((n) => n > 0);
      for (const n of lines) expect(n).toBeGreaterThanOrEqual(2);
    }
  });
});

describe('columns', () => {
  it('numbers of every form have their points in one line', async () => {
    const cells = [
      '1.25',
      '&lt;&#160;0.2',
      '±3.5',
      '≤&#160;12.75',
      '\u22120.5',
      '&gt;45.1&#160;mm/s',
      '+2.50',
      '.5',
      '1&#8239;200.5',
      '&lt; 9.75',
      '<strong>7.5</strong>',
    ];
    const pages = await read(
      (await pdf(`<section>${table(['number', 'text'], cells.map((c) => row(c, 'x')).join(''))}</section>`, { mark: null })).bytes,
    );
    const items = pages[0]?.items.filter((i) => i.x < 150 && /\d/.test(i.str) && !i.str.startsWith('Page')) ?? [];
    // What stands before the point is set again alone, so that its width is the font's own (9.5 points there, 8.4 in the table).
    const wholes = cells.map((c) => c.replace(/\.\d.*?(<|$)/, '$1'));
    const [alone] = await read((await pdf(`<section>${wholes.map((w) => `<p>${w}|</p>`).join('')}</section>`, { mark: null })).bytes);
    const ends = alone?.items.filter((i) => i.str.endsWith('|')) ?? [];
    const [bar] = (await read((await pdf('<section><p>|</p><p><strong>|</strong></p></section>', { mark: null })).bytes))[0]?.items ?? [];
    expect(items.length).toBe(cells.length);
    const points = items.map(
      (item, i) => item.x + (((ends[i]?.x ?? Number.NaN) + (ends[i]?.width ?? 0) - 52 - (bar?.width ?? Number.NaN)) * 8.4) / 9.5,
    );
    for (const [i, p] of points.entries()) expect(Math.abs(p - (points[0] as number)), items[i]?.str).toBeLessThan(0.3);
  });

  it('a spanning cell has its words, and room for its longest', async () => {
    const long = 'Spannedwordoflengthtwentyeight';
    const pages = await read(
      (
        await pdf(
          `<section><table><col class="number"><col class="text"><tbody><tr><td colspan="2">${long} more</td></tr>${row('1', 'b')}</tbody></table></section>`,
        )
      ).bytes,
    );
    expect(pages[0]?.text).toContain(`${long} more`);
  });

  it('a crowded table loses nothing and stays between the margins', async () => {
    const cells = Array.from({ length: 20 }, (_, i) => `${1000 + i}.${10 + i}`);
    const pages = await read(
      (
        await pdf(
          `<section>${table(
            cells.map(() => 'number'),
            row(...cells),
          )}</section>`,
        )
      ).bytes,
    );
    expect([...body(pages)].filter((c) => /\d/.test(c)).length).toBe(20 * 6);
    inside(pages);
  });
});

describe('page numbers', () => {
  it('of one and of three digits stand close to the words around them', async () => {
    const far = Array.from({ length: 120 }, () => '<section class="page"><p>p</p></section>').join('');
    const { bytes, pages } = await pdf(
      `<section><p>near (<span data-page="near"></span>), far (<span data-page="far"></span>), <a href="#far">end</a>.</p></section><section class="page" id="near"><p>n</p></section>${far}<section class="page" id="far"><p>f</p></section>`,
      { mark: null },
    );
    const [first] = await read(bytes);
    expect(body([first as ReadPage]).replace(/\s/g, '')).toBe(`near(2),far(${pages}),end.`);
    const line = (first as ReadPage).items.filter((i) => i.str.trim() !== '' && i.y < 790 && i.y > 100);
    for (const [i, item] of line.slice(1).entries()) {
      const gap = item.x - ((line[i]?.x ?? 0) + (line[i]?.width ?? 0));
      expect(gap, item.str).toBeGreaterThan(-0.5);
      expect(gap, item.str).toBeLessThan(4);
    }
  });

  it('on Letter too, each page tells its own', async () => {
    const pages = await read((await pdf(`<section>${fill(120)}</section>`, { paper: 'Letter' })).bytes);
    expect(pages[0]?.width).toBe(612);
    for (const [i, page] of pages.entries()) expect(page.text).toContain(`Page ${i + 1} of ${pages.length}`);
    inside(pages);
  });

  it('running heads of any length stay on the sheet, apart from each other', async () => {
    const [page] = await read(
      (
        await pdf('<section><p>x</p></section>', {
          runningLeft: 'Plant of a long name '.repeat(9),
          runningRight: 'Survey of a long name '.repeat(9),
          footerLeft: 'Foot of a long text '.repeat(20),
          mark: null,
        })
      ).bytes,
    );
    const at = (start: string) => page?.items.find((i) => i.str.startsWith(start));
    const [left, right, foot, number] = [at('Plant'), at('Survey'), at('Foot'), at('Page 1')];
    expect((left?.x ?? 0) + (left?.width ?? 0)).toBeLessThan(right?.x ?? 0);
    expect((right?.x ?? 0) + (right?.width ?? 0)).toBeLessThanOrEqual((page?.width ?? 0) - 51);
    expect((foot?.x ?? 0) + (foot?.width ?? 0)).toBeLessThan(number?.x ?? 0);
  });
});

it('random documents keep every word once, between the margins, and give the same bytes', async () => {
  let count = 0;
  const word = fc
    .tuple(fc.constantFrom('w', 'longer', 'muchlongerword'.repeat(2), 'verylongwordthatfillsaline'.repeat(6)))
    .map(([stem]) => stem);
  const text = fc.array(word, { minLength: 1, maxLength: 40 });
  const block = fc.tuple(fc.constantFrom('p', 'caution', 'h2', 'ul', 'keep', 'page', 'cells', 'tall'), text, text);
  await fc.assert(
    fc.asyncProperty(
      fc.array(block, { minLength: 1, maxLength: 14 }),
      fc.constantFrom('A4' as const, 'Letter' as const),
      async (blocks, paper) => {
        count = 0;
        const mark = (list: readonly string[]): string => list.map((w) => `${w}#${count++};`).join(' ');
        const html = blocks.map(([kind, a, b]) => {
          if (kind === 'ul') return `<ul><li>${mark(a)}</li><li>${mark(b)}</li></ul>`;
          if (kind === 'keep' || kind === 'page')
            return `<section class="${kind}"><h3>${mark(a.slice(0, 4))}</h3><p>${mark(b)}</p></section>`;
          if (kind === 'cells') return table(['text', 'number', 'text'], row(mark(a), '1.5', mark(b)) + row(mark(b), '22', mark(a)));
          if (kind === 'tall') return table(['text', 'text'], row('x', Array.from({ length: 9 }, () => mark(a)).join('<br>')));
          return kind === 'caution' ? `<p class="caution">${mark(a)}</p>` : `<${kind}>${mark(a)}</${kind}>`;
        });
        const { bytes } = await pdf(`<section>${html.join('')}</section>`, { paper });
        const pages = await read(bytes);
        const found = [
          ...body(pages)
            .replace(/\s/g, '')
            .matchAll(/#(\d+);/g),
        ].map((m) => Number(m[1]));
        expect(found.length).toBe(count);
        expect(new Set(found).size).toBe(count);
        inside(pages);
        expect(Buffer.compare(Buffer.from((await pdf(`<section>${html.join('')}</section>`, { paper })).bytes), Buffer.from(bytes))).toBe(
          0,
        );
      },
    ),
    { numRuns: 25, seed: 11 },
  );
}, 120_000);
