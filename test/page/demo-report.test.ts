/** The report of the demo plant as a reader has it: PDF by pdfjs, site as text. */
import { beforeAll, describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import { reportPdf } from '../../src/pdf/report.ts';
import { readRecord } from '../../src/record/read.ts';
import type { SwayfolioRecord } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { loadAssets } from '../../src/shell/assets.ts';
import { realShell } from '../../src/shell/shell.ts';
import { site } from '../../src/site/site.ts';
import { readPlant } from '../../src/survey/read.ts';
import { workList } from '../../src/table/work-list.ts';
import { open, read, type ReadPage } from '../pdf/document.ts';
import { NEVER } from './never.ts';
import { a1bCheck, hasA1bValidator, hasQpdf, qpdfCheck } from '../pdf/validators.ts';

const demo = new URL('../../demo-survey', import.meta.url).pathname;
const assets = loadAssets(demo);
let record: SwayfolioRecord;
let recordText: string;
let bytes: Uint8Array;
let pages: ReadPage[];
let site_: Map<string, string>;

beforeAll(async () => {
  const { plant } = readPlant(realShell, demo);
  if (plant === null) throw new Error('the demo plant has errors');
  recordText = writeRecord(assess(plant, { survey: null, toolVersion: 'test' }));
  record = readRecord(recordText);
  bytes = (await reportPdf(record, assets, { tags: true, profile: 'PDF/A-3b', recordText })).bytes;
  pages = await read(bytes);
  site_ = new Map(
    [...site(record, assets, { pdf: true, recordText })].flatMap((f) => (typeof f.bytes === 'string' ? [[f.path, f.bytes] as const] : [])),
  );
}, 120_000);

/** Text without blanks of any kind: lines and cells part words in the PDF. */
const squeezed = (text: string): string => text.replace(/[\s\u00ad\u00a0]+/g, '');

describe('the PDF', () => {
  it('has the manager’s page on one page, with the three things to do this week on it', () => {
    const first = pages.filter((p) => p.text.includes('What to do first') && p.text.includes('This week'));
    expect(first.length).toBe(1);
    const urgent = record.actions.filter((a) => a.urgency === 'now' || a.urgency === 'within a week');
    expect(urgent.length).toBe(3);
    for (const action of urgent) expect(first[0]?.text).toContain(action.machine);
    expect(first[0]?.text).toContain('responsible person decides on stopping');
    const next = pages[pages.indexOf(first[0] as ReadPage) + 1];
    expect(next?.text).toContain('Ranked actions');
  });

  it('prints every machine, every reading of the survey and every caution', () => {
    const all = squeezed(pages.map((p) => p.text).join(' '));
    for (const machine of record.machines) expect(all, machine.machine).toContain(squeezed(machine.machine));
    for (const m of record.measurements) if (m.source !== null) expect(all).toContain(squeezed(`${m.source.file}:${m.source.line}`));
    for (const caution of record.cautions) expect(all).toContain(squeezed(caution));
    for (const letters of ['ø', 'é', 'Ω']) expect(all).toContain(letters);
    expect(all).toMatch(/\p{Script=Cyrillic}/u);
  });

  it('prints the reason, the numbers and what to check for each of the first ten actions', () => {
    const all = squeezed(pages.map((p) => p.text).join(' '));
    for (const action of record.actions.slice(0, 10)) {
      expect(all).toContain(squeezed(action.reason).slice(0, 60));
      expect(action.reason, action.action).toMatch(/\d/);
      expect(action.check_first, action.action).not.toBeNull();
      expect(all).toContain(squeezed(action.check_first ?? '').slice(0, 40));
    }
  });

  it('prints every rule with its mark, and every default of the policy', () => {
    const from = pages.findIndex((p) => p.text.includes('Method, limits and policy') && p.text.includes('Limit sets in force'));
    const method = squeezed(
      pages
        .slice(from)
        .map((p) => p.text)
        .join(' '),
    );
    expect(record.rules?.length).toBe(16 + 11 + 12 + 11);
    for (const rule of record.rules ?? [])
      expect(method, rule.id).toContain(squeezed(`${rule.id} ${rule.levels.length > 0 ? rule.about : `${rule.mark} ${rule.about}`}`));
    for (const line of record.policy) expect(method, line.id).toContain(squeezed(line.id));
  });

  it('attaches the record and every input; bookmarks tell the chapters', async () => {
    const document = await open(bytes);
    expect(Object.keys((await document.getAttachments()) ?? {}).length).toBe(1 + record.inputs.length);
    const titles = (await document.getOutline())?.map((o) => o.title) ?? [];
    for (const title of ['What to do first', 'Ranked actions', 'All machines', 'Method, limits and policy', 'Cautions'])
      expect(titles).toContain(title);
  });
});

describe('the PDF, held from outside where the means are here', () => {
  it.skipIf(!hasQpdf)('qpdf --check finds no fault', () => {
    expect(qpdfCheck(bytes)).toContain('No syntax or stream encoding errors');
  });

  it.skipIf(!hasA1bValidator)(
    'the PDF/A-1b validator takes the same report in that profile, tagged',
    async () => {
      const inProfile = await reportPdf(record, assets, { tags: true, profile: 'PDF/A-1b', recordText });
      expect(a1bCheck(inProfile.bytes)).toContain('is a valid PDF/A-1b file');
    },
    120_000,
  );

  it('is at most twice the packed untagged one, what is attached left out of both', async () => {
    const bare = { ...record, inputs: [] };
    const size = async (tags: boolean): Promise<number> =>
      (await reportPdf(bare, assets, { tags, profile: 'PDF/A-3b', recordText: '{}' })).bytes.length;
    expect((await size(true)) / (await size(false))).toBeLessThanOrEqual(2);
  }, 60_000);
});

describe('every output', () => {
  it('says none of what overall values cannot say', () => {
    expect(pages.map((p) => p.text).join(' ')).not.toMatch(NEVER);
    for (const [path, html] of site_) if (path.endsWith('.html')) expect(html, path).not.toMatch(NEVER);
    expect(workList(record)).not.toMatch(NEVER);
    expect(JSON.stringify(record)).not.toMatch(NEVER);
  });

  it('addresses every action and every reading on the site', () => {
    const actions = site_.get('actions.html') ?? '';
    expect((actions.match(/<article class="action" id="action-/g) ?? []).length).toBe(record.actions.length);
    const readings = [...site_.values()].reduce((sum, html) => sum + (html.match(/<tr id="reading-/g) ?? []).length, 0);
    expect(readings).toBe(record.measurements.length);
  });
});
