/** `check`: every problem of a plant folder. In: the folder. Out: its problems, as lines or JSON. Never loads the PDF library. */
import { afterToday } from './after-today.ts';
import { type Command, jsonOption, plantArgument } from './command.ts';
import { countProblems, countText, nextStep, problemText } from './problems.ts';

export const check: Command = {
  usage: 'check <plant>',
  describe: 'report every problem of a plant folder by file, line and column',
  positionals: { plant: plantArgument },
  options: { json: jsonOption },
  async run({ plant: folder = '', json = false }, { shell }) {
    const { readPlant } = await import('../survey/read.ts');
    const read = readPlant(shell, folder);
    const problems = read.plant === null ? read.problems : [...read.problems, ...afterToday(read.plant, shell.today())];
    const counts = countProblems(problems);
    if (json) shell.stdout(`${JSON.stringify({ ...counts, problems }, null, 2)}\n`);
    else shell.stdout(`${problemText(problems)}${countText(counts)}\n${nextStep(folder, problems)}\n`);
    return counts.errors > 0 ? 1 : 0;
  },
};
