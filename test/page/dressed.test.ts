/** The demo in each language, on each paper, in each unit system: the first page and one machine as a reader has them. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import type { DisplayUnits } from '../../src/measure/display.ts';
import { reportPdf } from '../../src/pdf/report.ts';
import { readRecord } from '../../src/record/read.ts';
import { writeRecord } from '../../src/record/write.ts';
import { loadAssets } from '../../src/shell/assets.ts';
import { realShell } from '../../src/shell/shell.ts';
import { site } from '../../src/site/site.ts';
import { readPlant } from '../../src/survey/read.ts';
import { LANGUAGES, type Language } from '../../src/words/sentences.ts';
import { read } from '../pdf/document.ts';

const demo = new URL('../../demo-survey', import.meta.url).pathname;
const assets = loadAssets(demo);
const { plant } = readPlant(realShell, demo);

const INCH: DisplayUnits = {
  velocity: { unit: 'in/s', detection: 'calculated peak' },
  displacement: { unit: 'mil', detection: null },
  acceleration: { unit: 'g', detection: null },
};
/** ISO 216 A4 and ANSI Letter in points. */
const WIDTH = { A4: 595.28, Letter: 612 } as const;
const MACHINE = 'SB-02';

const words = (language: Language): Record<string, string> => {
  const file = (name: string): Record<string, string> =>
    JSON.parse(readFileSync(new URL(`../../templates/words/${language}/${name}.json`, import.meta.url), 'utf8'));
  return { ...file('page'), ...file('view'), ...file('assess') };
};
const ENGLISH = words('en');

/** English sentences of the report that this language says otherwise. */
function englishOnly(language: Language): string[] {
  const own = words(language);
  return Object.entries(ENGLISH)
    .filter(([key, text]) => own[key] !== text && !text.includes('{') && /\w \w/.test(text))
    .map(([, text]) => text);
}

const squeezed = (text: string): string => text.replace(/[\s\u00a0\u202f]+/g, '');

describe.each(LANGUAGES)('the demo in %s', (language) => {
  describe.each(['metric', 'inch'] as const)('%s', (system) => {
    if (plant === null) throw new Error('the demo plant has errors');
    const own = words(language);
    const settings = { ...plant.settings, language, ...(system === 'inch' ? { units: INCH, frequencyUnit: 'CPM' as const } : {}) };

    it.each(['A4', 'Letter'] as const)(
      '%s: one first page, one machine, nothing clipped, mixed or left in English',
      async (paper) => {
        const text = writeRecord(assess({ ...plant, settings: { ...settings, paper } }, { survey: null, toolVersion: 'test' }));
        const record = readRecord(text);
        const pdf = async (options: object) =>
          read((await reportPdf(record, assets, { tags: true, profile: 'PDF/A-3b', recordText: text, ...options })).bytes);
        const [brief, machine] = [await pdf({ brief: true }), await pdf({ machine: MACHINE })];
        const title = squeezed(own['page.since_the_survey_before'] ?? '');
        const first = brief.filter((p) => squeezed(p.text).includes(squeezed(own['view.this_week'] ?? '')));
        expect(first.length).toBe(1);
        expect(squeezed(first[0]?.text ?? '')).toContain(title);
        expect(squeezed(first[0]?.text ?? ''), 'the note at the foot is on the same page').toContain(
          squeezed(own['page.manager_note'] ?? ''),
        );
        for (const page of [...brief, ...machine]) {
          expect(page.width).toBeCloseTo(WIDTH[paper], 0);
          for (const item of page.items) expect(item.x + item.width).toBeLessThan(page.width);
        }
        const printed = squeezed([...brief, ...machine].map((p) => p.text).join(' '));
        for (const sentence of englishOnly(language)) expect(printed).not.toContain(squeezed(sentence));
        for (const caution of record.cautions) expect(printed).toContain(squeezed(caution));
        // 5.10 mm/s r.m.s. is 5.10 × √2 / 25.4 = 0.284 in/s as a calculated peak.
        const value = (system === 'metric' ? '5.10mm/s' : '0.284in/s').replace('.', language === 'en' ? '.' : ',');
        const page = squeezed(machine.map((p) => p.text).join(' '));
        expect(page).toContain(value);
        expect(page.includes('mm/s')).toBe(system === 'metric');
        expect(page).toContain(squeezed(own['page.cannot_see'] ?? ''));
      },
      60_000,
    );

    it('the site of a machine says the same', () => {
      const text = writeRecord(assess({ ...plant, settings }, { survey: null, toolVersion: 'test' }));
      for (const { path, bytes } of site(readRecord(text), assets, { pdf: true, recordText: text, machine: MACHINE })) {
        if (!path.endsWith('.html')) continue;
        const html = String(bytes);
        expect(html).toContain(`<html lang="${language}">`);
        for (const sentence of englishOnly(language)) expect(html).not.toContain(`>${sentence}<`);
        // As typed stands beside, small.
        if (path.startsWith('machines/')) expect(html.replace(/<small>[^<]*<\/small>/g, '').includes('mm/s')).toBe(system === 'metric');
      }
    }, 60_000);
  });
});
