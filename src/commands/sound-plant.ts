/** A plant without errors. In: a folder. Out: the plant, or null with every problem told. Never a plant with errors. */
import type { Plant } from '../plant/types.ts';
import type { Shell } from '../shell/types.ts';
import { readPlant } from '../survey/read.ts';
import type { Arguments } from './command.ts';
import { countProblems, countText, problemText } from './problems.ts';

/** Warnings go to stderr; errors too, and with `json` to stdout as `check --json` has them. */
export function readSoundPlant(folder: string, shell: Shell, { quiet = false, json = false }: Arguments): Plant | null {
  const { plant, problems } = readPlant(shell, folder);
  shell.progress('');
  if (plant !== null) {
    if (!quiet) shell.stderr(problemText(problems.filter((problem) => problem.severity === 'warning')));
    return plant;
  }
  const counts = countProblems(problems);
  shell.stderr(`${problemText(problems)}${countText(counts)}: nothing was written.\n`);
  if (json) shell.stdout(`${JSON.stringify({ ...counts, problems }, null, 2)}\n`);
  return null;
}
