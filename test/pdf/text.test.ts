/** Text and markup at their edges: right to left, repeated heads in the structure, what a parser would mend in silence. */
import { describe, expect, it } from 'vitest';
import { open, pdf, read } from './document.ts';
import { row, words } from './pages.ts';

describe('names from right to left', () => {
  it('keep their brackets and numbers on the proper sides', async () => {
    const [page] = await read((await pdf('<section><p>Pump שלום (אחת) 123 end</p></section>', { mark: null })).bytes);
    const line = page?.items.filter((i) => i.y > 700 && i.y < 790 && i.str.trim() !== '') ?? [];
    const x = (part: RegExp): number => line.find((i) => part.test(i.str))?.x ?? Number.NaN;
    // Unicode Standard Annex 9, rules W2 to N1: the number and the bracketed word stand left of the first word.
    expect(x(/123/)).toBeLessThan(x(/אחת|תחא/));
    expect(x(/אחת|תחא/)).toBeLessThan(x(/שלום|םולש/));
    expect(x(/שלום|םולש/)).toBeLessThan(x(/end/));
  });

  it('marks of direction are not printed and turn nothing round', async () => {
    const [page] = await read((await pdf('<section><p>a\u202edcba\u202c b\u200bc</p></section>', { mark: null })).bytes);
    expect(page?.text).toContain('adcba bc');
  });
});

it('a repeated head is an artifact: each head cell is in the structure once', async () => {
  const rows = words(150)
    .map((w) => row(w))
    .join('');
  const { bytes } = await pdf(
    `<section><table><col class="text"><thead><tr><th scope="col">Head</th></tr></thead><tbody>${rows}</tbody></table></section>`,
  );
  const document = await open(bytes);
  let heads = 0;
  const visit = (node: { role?: string; children?: object[] }): void => {
    if (node.role === 'TH' && (node.children?.length ?? 0) > 0) heads += 1;
    for (const child of node.children ?? []) visit(child);
  };
  const printed = (await read(bytes)).filter((p) => p.text.includes('Head')).length;
  // Each page's tree is the whole one, with the content of that page alone.
  for (let n = 1; n <= document.numPages; n += 1) visit((await (await document.getPage(n)).getStructTree()) as object);
  expect(printed).toBe(document.numPages);
  expect(document.numPages).toBeGreaterThan(2);
  expect(heads).toBe(1);
});

describe('markup that a parser would mend in silence is refused', () => {
  for (const [what, html] of [
    ['a stray closing tag', '<section><p>x</strong></p></section>'],
    ['a document type', '<!doctype html><section><p>x</p></section>'],
    [
      'text beside a figure in a cell',
      '<section><table><tbody><tr><td>lost<figure data-chart="c" data-key="1"></figure></td></tr></tbody></table></section>',
    ],
    ['a span of no number', '<section><table><tbody><tr><td colspan="wide">x</td></tr></tbody></table></section>'],
    ['an unknown mark', '<section><p><span data-mark="E"></span> E</p></section>'],
    ['a figure of nothing', '<section><figure data-alt="x"></figure></section>'],
    ['a page of nowhere', '<section><p><span data-page="gone"></span></p></section>'],
    ['a link to nowhere', '<section><p><a href="#gone">x</a></p></section>'],
  ] as const) {
    it(what, async () => {
      await expect(pdf(html)).rejects.toThrow(/^Template test: /);
    });
  }
});
