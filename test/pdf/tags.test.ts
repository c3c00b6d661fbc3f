/** What a reader by ear, an archive and a viewer's side panel find in the file: structure, bookmarks, links, attachments (ISO 32000-1, 14.7 and 14.8; ISO 19005-3, 6.8). */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { open, pdf } from './document.ts';

interface Branch {
  readonly role?: string;
  readonly alt?: string;
  readonly bbox?: number[];
  readonly children?: readonly Branch[];
}

const HTML = `<section id="one"><h1 id="t">Größe Ω שלום</h1><p class="lead">Lead</p><p class="caution">Careful</p><ul><li>first</li><li>second</li></ul>
<h2>Part</h2><p><a href="#two">the second</a> on page <span data-page="two"></span></p>
<figure data-chart="history" data-key="k" data-alt="rising"><figcaption>Caption</figcaption></figure>
<table><col class="text"><col class="number"><thead><tr><th scope="col">Name</th><th scope="col">Value</th></tr></thead><tbody><tr><th scope="row">Fan</th><td>1.5</td></tr><tr><td colspan="2">both</td></tr></tbody></table></section>
<section id="two" class="page"><h1>Second</h1><h2>Deeper</h2><h3>Deepest</h3><p>end</p></section>`;

const flat = (branch: Branch): Branch[] => [branch, ...(branch.children ?? []).flatMap(flat)];
const hasQpdf = spawnSync('qpdf', ['--version']).status === 0;
if (!hasQpdf) console.warn('qpdf is not on this machine: the objects of the file are not looked at.');

describe('a tagged file', () => {
  let bytes: Uint8Array;
  let branches: Branch[];
  beforeAll(async () => {
    bytes = (await pdf(HTML, { title: 'A \u0007& B <c>' })).bytes;
    branches = flat((await (await (await open(bytes)).getPage(1)).getStructTree()) as Branch);
  });

  it('has each role in its place', () => {
    const below = (role: string): (string | undefined)[] => (branches.find((b) => b.role === role)?.children ?? []).map((c) => c.role);
    expect(below('Document')[0]).toBe('Sect');
    expect(below('L')).toEqual(['LI', 'LI']);
    expect(below('LI')).toEqual(['Lbl', 'LBody']);
    expect(below('Table')).toEqual(['THead', 'TBody']);
    expect(below('TR')).toEqual(['TH', 'TH']);
    for (const role of ['H1', 'H2', 'P', 'Figure', 'Caption', 'Link', 'TD'])
      expect(
        branches.some((b) => b.role === role),
        role,
      ).toBe(true);
  });

  it('tells a figure in words', () => {
    expect(branches.find((b) => b.role === 'Figure')?.alt).toBe('rising');
  });

  it('has bookmarks by chapter, in any script', async () => {
    const outline = await (await open(bytes)).getOutline();
    expect(outline?.map((o) => o.title)).toEqual(['Größe Ω שלום', 'Second']);
    expect(outline?.map((o) => o.items.map((i: { title: string }) => i.title))).toEqual([['Part'], ['Deeper']]);
  });

  it('has links that lead to the page they name', async () => {
    const document = await open(bytes);
    const [link] = (await (await document.getPage(1)).getAnnotations()).filter((a: { subtype: string }) => a.subtype === 'Link');
    const destination = await document.getDestination(link.dest);
    expect(await document.getPageIndex(destination?.[0])).toBe(1);
    expect(link.contentsObj?.str).toBe('the second');
  });

  it('keeps the title as given', async () => {
    const { info, metadata } = await (await open(bytes)).getMetadata();
    expect((info as { Title: string }).Title).toBe('A \u0007& B <c>');
    expect(metadata?.get('dc:title')).toBe('A & B <c>');
  });

  it.skipIf(!hasQpdf)('has scopes, spans, boxes, the language, and the record as its source', async () => {
    const path = join(mkdtempSync(join(tmpdir(), 'swayfolio-tags-')), 'a.pdf');
    writeFileSync(
      path,
      (
        await pdf(HTML, {
          attachments: [
            { name: 'record.json', mime: 'application/json', description: 'record', bytes: new Uint8Array([123, 125]) },
            { name: 'a.csv', mime: 'text/csv', description: 'input', bytes: new Uint8Array([97]) },
          ],
        })
      ).bytes,
    );
    const text = execFileSync('qpdf', ['--qdf', '--object-streams=disable', path, '-'], { maxBuffer: 1 << 26 }).toString('latin1');
    const flattened = text.replace(/\s+/g, ' ');
    for (const wanted of [
      '/Scope /Column',
      '/Scope /Row',
      '/ColSpan 2',
      '/O /Layout',
      '/BBox [',
      '/Lang (en)',
      '/DisplayDocTitle true',
      '/Marked true',
      '/AFRelationship /Source',
      '/AFRelationship /Data',
      '/Type /OBJR',
      '/GTS_PDFA1',
      '/ParentTree',
    ]) {
      expect(flattened, wanted).toContain(wanted);
    }
    expect([...flattened.matchAll(/\/AFRelationship \/Source/g)].length).toBe(1);
    expect(flattened).toMatch(/\/AF \[/);
  });

  it.skipIf(!hasQpdf)('is sound without tags too, and has none then', async () => {
    const path = join(mkdtempSync(join(tmpdir(), 'swayfolio-tags-')), 'b.pdf');
    writeFileSync(path, (await pdf(HTML, { tags: false })).bytes);
    expect(execFileSync('qpdf', ['--check', path]).toString()).toContain('No syntax or stream encoding errors');
    const text = execFileSync('qpdf', ['--qdf', '--object-streams=disable', path, '-']).toString('latin1');
    expect(text).not.toContain('StructTreeRoot');
    expect(text).not.toContain(' BDC');
  });
});
