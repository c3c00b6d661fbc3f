/** `new`: a plant folder that runs at once, or the scaffold of a plant's next survey. In: a folder. Out: files in it. Never overwrites one. */
import { parseDay } from '../plant/day.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import type { OutputFile } from '../shell/types.ts';
import { UserError } from '../shell/types.ts';
import type { Command } from './command.ts';

export const newCommand: Command = {
  usage: 'new <folder>',
  describe: 'make a plant folder; with --survey, the next survey of a plant',
  positionals: { folder: { describe: 'a folder that is new or empty; with --survey, the plant folder', type: 'string' } },
  options: { survey: { describe: 'date of the next survey, YYYY-MM-DD', type: 'string' } },
  async run({ folder = '', survey }, { shell, version }) {
    if (survey === undefined) {
      const { newPlant } = await import('../survey/new.ts');
      shell.createFolder(folder, newPlant());
      shell.stdout(`Made ${folder}: a plant with a survey of invented readings. Replace them by yours, then run: swayfolio report ${folder}\n`);
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
    shell.createFolder(`${folder}/${home}`, below(home, nextSurvey(plant, survey, alarmsOf(assess(plant, { survey: null, toolVersion: version })))));
    shell.stdout(`Made ${folder}/${home}. Fill in readings.csv, then run: swayfolio report ${folder}\n`);
    return 0;
  },
};

/** ALARM of each series at the last survey, to stand beside the blanks of the next. */
function alarmsOf(record: SwayfolioRecord): Map<string, number> {
  const alarms = new Map<string, number>();
  for (const m of record.measurements) if (m.limits?.alarm != null) alarms.set([m.machine, m.point, m.quantity, m.detection ?? ''].join('\u0000'), m.limits.alarm);
  return alarms;
}

/** The scaffold's paths count from the plant folder; all of them lie in the new survey's own. */
function below(home: string, files: readonly OutputFile[]): readonly OutputFile[] {
  return files.map((file) => {
    if (!file.path.startsWith(home)) throw new Error(`The scaffold writes ${file.path} outside ${home}.`);
    return { path: file.path.slice(home.length), bytes: file.bytes };
  });
}
