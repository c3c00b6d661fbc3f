/** The worked override of templates/README.md, run; and that the page names every template there is. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { body, read } from '../pdf/document.ts';
import { assets, pdfOf, plantOf, recordOfFiles } from '../site/plants.ts';

const home = new URL('../../templates/', import.meta.url);
const readme = readFileSync(new URL('README.md', home), 'utf8');
const worked = /```hbs\n([\s\S]*?)```/.exec(readme)?.[1] ?? '';
const over = (path: string, source: string) => ({ ...assets, templates: new Map(assets.templates).set(path, source) });

describe('templates/README.md', () => {
  it('names every template', () => {
    for (const folder of ['pdf', 'site', 'shared']) {
      for (const name of readdirSync(new URL(`${folder}/`, home)))
        if (name.endsWith('.hbs')) expect(readme).toContain(`\`${folder}/${name}\``);
    }
  });

  it('has an override that prints in every language what it adds, and the words of the heading in that language', async () => {
    for (const [language, heading] of [
      ['en', 'The data of this survey'],
      ['de', 'Die Daten dieser Messung'],
    ]) {
      const files = plantOf({ machines: 2, exceptionEvery: 1 });
      const { record, text } = recordOfFiles({
        ...files,
        'plant.yaml': `${String(files['plant.yaml'] ?? 'plant: Mill\n')}language: ${language}\n`,
      });
      const words = body(await read((await pdfOf(record, text, {}, over('pdf/data-head.hbs', worked))).bytes));
      expect(words).toContain('handed over on request');
      expect(words).toContain(heading);
    }
  });

  it('says true: a field that is not of the view, unknown words and lost cautions are refused', async () => {
    const { record, text } = recordOfFiles(plantOf({ machines: 2, exceptionEvery: 1 }));
    const made = async (path: string, source: string) => pdfOf(record, text, {}, over(path, source));
    await expect(made('pdf/data-head.hbs', worked.replace('[[data_note]]', '{{spectra}}'))).rejects.toThrow(/data-head/);
    await expect(made('pdf/data-head.hbs', worked.replace('[[data_note]]', '[[no_such]]'))).rejects.toThrow(
      /data-head, line 3: there are no words "no_such"/,
    );
    await expect(
      made(
        'pdf/end.hbs',
        '<section id="next"><h1 id="next-title">x</h1></section><section id="cautions"><h1 id="cautions-title">x</h1></section>',
      ),
    ).rejects.toThrow(/cautions/);
  });
});
