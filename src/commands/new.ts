/** `new`: a plant folder that runs at once, or the scaffold of a plant's next survey. In: a folder. Out: files in it. Never overwrites one. */
import { parseDay } from '../plant/day.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import type { OutputFile } from '../shell/types.ts';
import type { Shell } from '../shell/types.ts';
import { UserError } from '../shell/types.ts';
import type { Command, ExitCode } from './command.ts';
import { nextStep, printable, problemText } from './problems.ts';

export const newCommand: Command = {
  usage: 'new <folder>',
  describe: 'make a plant folder; with --from, out of exports; with --survey, the next survey of a plant',
  positionals: { folder: { describe: 'a folder that is new or empty; with --survey, the plant folder', type: 'string' } },
  options: {
    survey: { describe: 'date of the next survey, YYYY-MM-DD', type: 'string' },
    from: { describe: 'exports to make the plant of, in whatever form they are', type: 'string', array: true },
  },
  async run({ folder = '', survey, from }, { shell, version }) {
    if (from !== undefined) return madeFrom(folder, from, survey, shell);
    if (survey === undefined) {
      const { newPlant } = await import('../survey/new.ts');
      shell.createFolder(folder, newPlant());
      shell.stdout(
        `Made ${folder}: a plant with a survey of invented readings. Replace them by yours, then run: swayfolio report ${folder}\n`,
      );
      return 0;
    }
    if (!/^\d{4}-\d{2}-\d{2}$/.test(survey) || parseDay(survey) === null) {
      throw new UserError(`--survey ${survey} is no date.`, 'Give the day of the next survey as YYYY-MM-DD.', 2);
    }
    const { readSoundPlant } = await import('./sound-plant.ts');
    const plant = readSoundPlant(folder, shell, {});
    if (plant === null) return 1;
    const { nextSurvey } = await import('../survey/new.ts');
    const { assess } = await import('../assess/assess.ts');
    const home = `surveys/${survey}/`;
    shell.createFolder(
      `${folder}/${home}`,
      below(home, nextSurvey(plant, survey, alarmsOf(assess(plant, { survey: null, toolVersion: version })))),
    );
    shell.stdout(`Made ${folder}/${home}. Fill in readings.csv, then run: swayfolio report ${folder}\n`);
    return 0;
  },
};

/** The plant of some exports: what is sure stands in its mapping, what is not is asked here and there. */
async function madeFrom(folder: string, from: readonly string[], survey: string | undefined, shell: Shell): Promise<ExitCode> {
  if (survey !== undefined) throw new UserError('--from and --survey do not go together.', 'Make the plant by --from first.', 2);
  const exports = from.map((path) => ({ name: nameOf(path), bytes: shell.read(path) }));
  const twice = exports.find((file, i) => exports.findIndex((other) => other.name.toLowerCase() === file.name.toLowerCase()) !== i);
  if (exports.length === 0 || twice !== undefined)
    throw new UserError(
      twice === undefined ? '--from names no file.' : `Two of the files are called ${twice.name}.`,
      'Name each export once; rename one of two of the same name.',
      2,
    );
  const { plantFrom } = await import('../survey/from.ts');
  const { files, questions } = plantFrom(exports, nameOf(shell.absolute(folder)));
  shell.createFolder(folder, files);
  const { readPlant } = await import('../survey/read.ts');
  const { problems } = readPlant(shell, folder);
  shell.stdout(`Made ${folder}: the exports are copied into surveys/, the mapping of their columns stands in plant.yaml.\n`);
  for (const question of questions) shell.stdout(`question: ${printable(question)}\n`);
  shell.stdout(problemText(problems));
  shell.stdout(
    questions.length === 0
      ? `${nextStep(folder, problems)}\n`
      : `Next: answer the ${questions.length === 1 ? 'question' : `${questions.length} questions`} in ${folder}/plant.yaml, then run: swayfolio check ${folder}\n`,
  );
  return 0;
}

const nameOf = (path: string): string => path.replaceAll('\\', '/').replace(/\/+$/, '').split('/').pop() ?? path;

/** ALARM of each series at the last survey, to stand beside the blanks of the next. */
function alarmsOf(record: SwayfolioRecord): Map<string, number> {
  const alarms = new Map<string, number>();
  for (const m of record.measurements)
    if (m.limits?.alarm != null) alarms.set([m.machine, m.point, m.quantity, m.detection ?? ''].join('\u0000'), m.limits.alarm);
  return alarms;
}

/** The scaffold's paths count from the plant folder; all of them lie in the new survey's own. */
function below(home: string, files: readonly OutputFile[]): readonly OutputFile[] {
  return files.map((file) => {
    if (!file.path.startsWith(home)) throw new Error(`The scaffold writes ${file.path} outside ${home}.`);
    return { path: file.path.slice(home.length), bytes: file.bytes };
  });
}
