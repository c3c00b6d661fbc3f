/**
 * `compare`: the years side by side. In: a plant folder with issued reports, or record.json files of any format. Out: PDF, site and JSON of the
 * comparison, on wish CSV. Exit 1 where a past reading was altered. Never: a record changed.
 */
import type { Named } from '../archive/compared.ts';
import type { Comparison } from '../record/comparison.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import { type OutputFile, type Shell, UserError } from '../shell/types.ts';
import { type Command, jsonOption } from './command.ts';
import { printable } from './problems.ts';

export const compare: Command = {
  usage: 'compare <records..>',
  describe: 'the years side by side: what changed, what was restated, what became of each action',
  positionals: {
    records: { describe: 'a plant folder with issued reports, or record.json files and issued folders', type: 'string', array: true },
  },
  options: {
    out: { describe: 'output folder: new, empty or made by swayfolio; <plant>/out/compare where not given', type: 'string' },
    csv: { describe: 'comparison.csv too; without a folder to write to, on stdout', type: 'boolean' },
    json: jsonOption,
  },
  async run({ records: paths = [], out, csv = false, json = false }, { shell, version }) {
    const { compareRecords } = await import('../archive/compare.ts');
    const { exceeds } = await import('../assess/exceeds.ts');
    const { writeComparison } = await import('../record/comparison.ts');
    const found = await gather(paths, shell, version);
    const target = out ?? (found.plant === null ? null : `${found.plant}/out/compare`);
    if (target === null && !csv && !json)
      throw new UserError('There is no folder to write to.', 'Give --out DIR, or --csv or --json for stdout.', 2);
    if (target !== null) shell.claimFolder(target);
    const comparison = compareRecords(found.records, { today: found.today, toolVersion: version, exceeds, notes: found.notes });
    const text = writeComparison(comparison);
    if (target !== null) shell.replaceFolder(target, await files(comparison, text, found.plant, csv, shell));
    shell.progress('');
    const { comparisonCsv } = await import('../table/comparison.ts');
    if (json) shell.stdout(text);
    else if (target === null) shell.stdout(comparisonCsv(comparison));
    else shell.stdout(told(comparison, target, csv));
    return comparison.restated.length > 0 ? 1 : 0;
  },
};

interface Found {
  readonly records: readonly Named[];
  readonly plant: string | null;
  readonly today: SwayfolioRecord | null;
  readonly notes: readonly string[];
}

/** Records of all that was named; of a plant folder also what it would say today. */
async function gather(paths: readonly string[], shell: Shell, version: string): Promise<Found> {
  const { issuesIn } = await import('../archive/chain.ts');
  const { readRecord } = await import('../record/read.ts');
  const records: Named[] = [];
  const plants: string[] = [];
  const seen = new Set<string>();
  const add = (name: string, path: string): void => {
    if (seen.has(shell.absolute(path))) return;
    seen.add(shell.absolute(path));
    shell.progress(`reading ${name}`);
    records.push({ name, record: readRecord(utf8(shell.read(path), path)) });
  };
  for (const given of paths) {
    const path = given.replace(/(?<=[^/])\/+$/, '');
    if (path.endsWith('.json')) {
      add(path, path);
      continue;
    }
    if (shell.exists(`${path}/plant.yaml`)) plants.push(path);
    const archive = shell.exists(`${path}/issued`) ? `${path}/issued` : path;
    const issues = shell.exists(`${path}/record.json`) || shell.folders(archive).length === 0 ? [] : issuesIn(archive, shell);
    if (shell.exists(`${path}/record.json`)) add(path, `${path}/record.json`);
    else if (issues.length > 0)
      for (const issue of issues)
        add(paths.length === 1 ? `issued/${issue.name}` : `${archive}/${issue.name}`, `${archive}/${issue.name}/record.json`);
    else if (shell.exists(`${path}/plant.yaml`))
      throw new UserError(`${path} has no issued report.`, 'Issue one by: swayfolio issue, or name record.json files.');
    else throw new UserError(`${path} holds no record and no issued report.`, 'Give a plant folder, issued folders, or record.json files.');
  }
  const plant = plants.length === 1 ? (plants[0] ?? null) : null;
  return { records, plant, ...(plant === null ? { today: null, notes: [] } : await assessedToday(plant, shell, version)) };
}

function utf8(bytes: Uint8Array, path: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new UserError(`${path} is not UTF-8 text.`, 'Give the record.json that swayfolio wrote.');
  }
}

/** The archive stands by itself: a plant folder that has errors meanwhile is said, and the last record speaks for today. */
async function assessedToday(plant: string, shell: Shell, version: string): Promise<Pick<Found, 'today' | 'notes'>> {
  const { readPlant } = await import('../survey/read.ts');
  const { assess } = await import('../assess/assess.ts');
  const read = readPlant(shell, plant);
  if (read.plant !== null) return { today: assess(read.plant, { survey: null, toolVersion: version }), notes: [] };
  const errors = read.problems.filter((problem) => problem.severity === 'error').length;
  return {
    today: null,
    notes: [`The plant folder has ${errors} errors as it stands; the limits and policy of today are those of the last record.`],
  };
}

async function files(
  comparison: Comparison,
  text: string,
  plant: string | null,
  csv: boolean,
  shell: Shell,
): Promise<Iterable<OutputFile>> {
  const { loadAssets } = await import('../shell/assets.ts');
  const { comparisonPdf } = await import('../pdf/comparison.ts');
  const { comparisonSite } = await import('../site/comparison.ts');
  const { comparisonCsv } = await import('../table/comparison.ts');
  const assets = loadAssets(plant);
  shell.progress('writing the PDF');
  const pdf = await comparisonPdf(comparison, assets, text);
  return (function* all(): Iterable<OutputFile> {
    yield { path: 'comparison.json', bytes: text };
    if (csv) yield { path: 'comparison.csv', bytes: comparisonCsv(comparison) };
    yield { path: 'comparison.pdf', bytes: pdf.bytes };
    for (const file of comparisonSite(comparison, assets)) yield { path: `site/${file.path}`, bytes: file.bytes };
  })();
}

function told(c: Comparison, out: string, csv: boolean): string {
  return [
    `${c.plant}: ${c.records.length} records, ${c.from} to ${c.to}`,
    `  restated readings        ${c.restated.length}`,
    `  verdicts other today     ${c.verdicts.filter((v) => v.why !== null).length} of ${c.verdicts.length}`,
    `  changes                  ${c.changes.length}`,
    `  actions without proof    ${c.actions.filter((a) => a.flags.some((flag) => flag.startsWith('closed'))).length} of ${c.actions.length}`,
    `  ${out}: comparison.pdf, site/index.html, comparison.json${csv ? ', comparison.csv' : ''}`,
    ...c.notes,
  ]
    .map((line) => `${printable(line)}\n`)
    .join('');
}
