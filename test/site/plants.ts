/** Plants of all sizes for the writers' tests, and everything that is written of one. */
import { assess } from '../../src/assess/assess.ts';
import { Format } from '../../src/page/format.ts';
import { reportPdf, type ReportOptions } from '../../src/pdf/report.ts';
import { readRecord } from '../../src/record/read.ts';
import type { SwayfolioRecord } from '../../src/record/types.ts';
import { writeRecord } from '../../src/record/write.ts';
import { loadAssets } from '../../src/shell/assets.ts';
import { site } from '../../src/site/site.ts';
import { readPlant } from '../../src/survey/read.ts';
import { folder, GROUPS, memoryShell, type Files, type MachineInput } from '../assess/folder.ts';

export const assets = loadAssets(null);

export function recordOfFiles(files: Files): { readonly record: SwayfolioRecord; readonly text: string } {
  const { plant, problems } = readPlant(memoryShell(files), 'plant');
  if (plant === null) throw new Error(JSON.stringify(problems.filter((p) => p.severity === 'error').slice(0, 3)));
  const text = writeRecord(assess(plant, { survey: null, toolVersion: 'test' }));
  return { record: readRecord(text), text };
}

export interface PlantOptions {
  readonly machines: number;
  /** One in so many has a finding; 0 = none. */
  readonly exceptionEvery: number;
  readonly nameOf?: (i: number) => string;
  readonly points?: number;
}

/** A plant of so many machines, read at three surveys. */
export function plantOf({ machines, exceptionEvery, nameOf = (i) => `Machine ${i}`, points = 2 }: PlantOptions): Files {
  const list: MachineInput[] = Array.from({ length: machines }, (_, i) => {
    const isBad = exceptionEvery > 0 && i % exceptionEvery === 0;
    const values = isBad ? [1.1, 1.2, 4.9] : [1.1, 1.2, 1.15];
    return {
      machine: `M-${i + 1}`,
      columns: { ...GROUPS.G2R, name: `"${nameOf(i + 1).replaceAll('"', '""')}"`, area: `Area ${i % 7}`, interval_days: '91' },
      series: Array.from({ length: points }, (__, p) => ({ point: `${p + 1}H`, values })),
    };
  });
  return folder(list);
}

export const siteOf = (record: SwayfolioRecord, text: string, from = assets): Map<string, string | Uint8Array> =>
  new Map([...site(record, from, { pdf: true, recordText: text })].map((f) => [f.path, f.bytes]));

export const pdfOf = (record: SwayfolioRecord, text: string, options: Partial<ReportOptions> = {}, from = assets) =>
  reportPdf(record, from, { tags: true, profile: 'PDF/A-3b', recordText: text, ...options });

export const formatOf = (record: SwayfolioRecord): Format => new Format(record);
