/**
 * What `report` and `render` share. In: the text of a record and the assets. Out: the files of an output folder. Never sees the
 * plant's tables: everything printed comes from the record's text read back, so that both commands give the same bytes.
 */
import { createHash } from 'node:crypto';
import { nearestWord } from '../measure/nearest.ts';
import type { Assets } from '../page/assets.ts';
import { reportPdf } from '../pdf/report.ts';
import { readRecord } from '../record/read.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import { type OutputFile, UserError } from '../shell/types.ts';
import { singleFile } from '../site/single.ts';
import { site } from '../site/site.ts';
import { workList } from '../table/work-list.ts';
import type { Arguments } from './command.ts';

export interface Delivery {
  readonly record: SwayfolioRecord;
  readonly pages: number;
  /** The site's pages are made one by one as they are written. */
  readonly files: Iterable<OutputFile>;
}

/** `recordText` is what stands in record.json, byte for byte. Throws a UserError where `machine` is not of the record. */
export async function deliver(recordText: string, assets: Assets, options: Arguments, progress: (text: string) => void): Promise<Delivery> {
  const record = readRecord(recordText);
  const { brief = false, machine, tags = true } = options;
  if (machine !== undefined) checkMachine(record, machine);
  const proved = provedAssets(record, assets);
  const ofMachine = machine === undefined ? {} : { machine };
  progress('writing the PDF');
  const pdf = await reportPdf(record, proved, { tags, profile: 'PDF/A-3b', recordText, brief, ...ofMachine });
  return { record, pages: pdf.pages, files: files() };

  function* files(): Iterable<OutputFile> {
    yield { path: 'record.json', bytes: recordText };
    yield { path: 'work-list.csv', bytes: workList(record) };
    yield { path: 'report.pdf', bytes: pdf.bytes };
    progress('writing the site');
    const pages = site(record, proved, { pdf: true, recordText, ...ofMachine });
    for (const file of options['single-file'] === true ? [singleFile(pages)] : pages)
      yield { path: `site/${file.path}`, bytes: file.bytes };
  }
}

function checkMachine(record: SwayfolioRecord, machine: string): void {
  const ids = record.machines.map((line) => line.machine);
  if (ids.includes(machine)) return;
  const near = nearestWord(machine, ids);
  throw new UserError(
    `The record of survey ${record.survey.id} has no machine ${machine}.`,
    near === null ? null : `The nearest is ${near}.`,
    2,
  );
}

/** A file that is no longer what the record was made from is not attached as its input. */
function provedAssets(record: SwayfolioRecord, assets: Assets): Assets {
  const hashes = new Map(record.inputs.map((input) => [input.path, input.sha256]));
  const proved = (path: string, bytes: Uint8Array | null): Uint8Array | null => {
    const hash = hashes.get(path);
    return bytes === null || hash === undefined || hash === createHash('sha256').update(bytes).digest('hex') ? bytes : null;
  };
  return {
    ...assets,
    input: (path) => (hashes.has(path) ? proved(path, assets.input(path)) : null),
    picture: (path) => proved(path, assets.picture(path)),
  };
}
