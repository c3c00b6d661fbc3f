/** One stage in a process of its own. In: the stage's name, a plant folder, a scratch folder with the stages' results before it. Out: one JSON line: seconds of the stage alone, peak memory of the process. */
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { deflateSync, inflateSync } from 'node:zlib';
import { parse } from 'csv-parse/sync';
import { assess } from '../../src/assess/assess.ts';
import { afterToday } from '../../src/commands/after-today.ts';
import { reportPdf } from '../../src/pdf/report.ts';
import { readRecord } from '../../src/record/read.ts';
import { writeRecord } from '../../src/record/write.ts';
import { loadAssets } from '../../src/shell/assets.ts';
import { realShell } from '../../src/shell/shell.ts';
import { site } from '../../src/site/site.ts';
import { readPlant } from '../../src/survey/read.ts';
import { workList } from '../../src/table/work-list.ts';

const [, , stage = '', plantFolder = '', scratch = ''] = process.argv;
const recordFile = join(scratch, 'record.json');
const csvTexts = (): string[] =>
  realShell
    .list(plantFolder)
    .files.filter((path) => path.endsWith('.csv'))
    .map((path) => readFileSync(join(plantFolder, path), 'utf8'));
const plant = () => {
  const read = readPlant(realShell, plantFolder);
  if (read.plant === null) throw new Error(`The bench plant has errors: ${JSON.stringify(read.problems.slice(0, 3))}`);
  return read.plant;
};
const pdf = async (tags: boolean): Promise<() => Promise<void>> => {
  const recordText = readFileSync(recordFile, 'utf8');
  const record = readRecord(recordText);
  const assets = loadAssets(plantFolder);
  return async () => {
    const made = await reportPdf(record, assets, { tags, profile: 'PDF/A-3b', recordText });
    writeFileSync(join(scratch, tags ? 'tagged.pdf' : 'untagged.pdf'), made.bytes);
  };
};

/** Each gives the work to be timed; what it needs beforehand is not. */
const STAGES: Readonly<Record<string, () => (() => unknown) | Promise<() => unknown>>> = {
  'split by hand': () => () => csvTexts().map((text) => text.split('\n').map((line) => line.split(','))).length,
  'csv-parse alone': () => () => csvTexts().map((text) => parse(text, {}).length),
  check: () => () => afterToday(plant(), realShell.today()).length,
  survey: () => () => plant().machines.length,
  assess: () => {
    const read = plant();
    return () => assess(read, { survey: null, toolVersion: 'bench' }).actions.length;
  },
  record: () => {
    const record = assess(plant(), { survey: null, toolVersion: 'bench' });
    return () => {
      const text = writeRecord(record);
      writeFileSync(recordFile, text);
      return readRecord(text).format;
    };
  },
  'work list': () => {
    const record = readRecord(readFileSync(recordFile, 'utf8'));
    return () => workList(record).length;
  },
  'PDF, tagged': () => pdf(true),
  'PDF, untagged': () => pdf(false),
  site: () => {
    const recordText = readFileSync(recordFile, 'utf8');
    const record = readRecord(recordText);
    const assets = loadAssets(plantFolder);
    return () => {
      let bytes = 0;
      for (const file of site(record, assets, { pdf: true, recordText })) bytes += Buffer.byteLength(file.bytes);
      return bytes;
    };
  },
  'the PDF as raw strings': () => {
    const texts = pdfStreams(readFileSync(join(scratch, 'tagged.pdf'))).map((bytes) => bytes.toString('latin1'));
    return () => texts.reduce((sum, text) => sum + deflateSync(Buffer.from(text, 'latin1')).length, 0);
  },
};

/** The inflated streams of a PDF: what a writer would have to deflate even if it laid out nothing. */
function pdfStreams(file: Buffer): Buffer[] {
  const streams: Buffer[] = [];
  for (let at = file.indexOf('stream\n'); at >= 0; at = file.indexOf('stream\n', at + 7)) {
    const end = file.indexOf('endstream', at);
    if (end < 0) break;
    try {
      streams.push(inflateSync(file.subarray(at + 7, end)));
    } catch {
      // Not deflated: metadata, or the end of another stream.
    }
  }
  return streams;
}

const prepare = STAGES[stage];
if (prepare === undefined) throw new Error(`There is no stage ${stage}.`);
const work = await prepare();
const begin = performance.now();
await work();
const seconds = (performance.now() - begin) / 1000;
process.stdout.write(`${JSON.stringify({ seconds, megabytes: process.resourceUsage().maxRSS / 1024 })}\n`);
