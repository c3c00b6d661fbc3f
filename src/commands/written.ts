/** What was written, told. In: a delivery and its folder. Out: a summary on stdout, as text or JSON. Never the findings themselves. */
import { URGENCIES } from '../plant/types.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import type { OutputFile, Shell } from '../shell/types.ts';
import type { Arguments } from './command.ts';
import type { Delivery } from './deliver.ts';
import { countProblems } from './problems.ts';

/** Writes the files of a delivery and tells what stands where. */
export function writeDelivery(delivery: Delivery, out: string, { json = false, quiet = false }: Arguments, shell: Shell): void {
  const paths: string[] = [];
  shell.replaceFolder(out, noted(delivery.files, paths));
  shell.progress('');
  const machines = machinesByUrgency(delivery.record);
  const { warnings } = countProblems(delivery.record.problems);
  if (json)
    shell.stdout(
      `${JSON.stringify({ survey: delivery.record.survey.id, out, pages: delivery.pages, files: paths, machines, warnings }, null, 2)}\n`,
    );
  else if (!quiet) shell.stdout(summary(delivery, out, machines));
}

function* noted(files: Iterable<OutputFile>, paths: string[]): Iterable<OutputFile> {
  for (const file of files) {
    paths.push(file.path);
    yield file;
  }
}

function machinesByUrgency(record: SwayfolioRecord): Readonly<Record<string, number>> {
  const counts: Record<string, number> = {};
  for (const urgency of URGENCIES) counts[urgency] = record.machines.filter((machine) => machine.urgency === urgency).length;
  counts.none = record.machines.filter((machine) => machine.urgency === null).length;
  return counts;
}

function summary(delivery: Delivery, out: string, machines: Readonly<Record<string, number>>): string {
  const { record, pages } = delivery;
  const raised = URGENCIES.filter((urgency) => (machines[urgency] ?? 0) > 0).map((urgency) => `${urgency}: ${machines[urgency]}`);
  return [
    `${record.plant.plant}, survey ${record.survey.id}: ${record.machines.length} ${record.machines.length === 1 ? 'machine' : 'machines'}; ${raised.length === 0 ? 'nothing raised' : raised.join(', ')}`,
    `  ${out}/report.pdf (${pages} pages)`,
    `  ${out}/site/index.html`,
    `  ${out}/work-list.csv`,
    `  ${out}/record.json`,
    '',
  ].join('\n');
}
