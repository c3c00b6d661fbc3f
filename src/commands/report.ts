/** `report`: the deliverable of one survey. In: a plant folder. Out: PDF, site, record, work list in one folder. Writes nothing when the input has errors. */
import { type Command, plantArgument } from './command.ts';
import { writerOptions } from './writer-options.ts';

export const report: Command = {
  usage: 'report <plant>',
  describe: 'write report.pdf, site/, record.json and work-list.csv of a survey',
  positionals: { plant: plantArgument },
  options: {
    survey: { describe: 'which survey; the latest where not given', type: 'string' },
    out: { describe: 'output folder: new, empty or made by swayfolio; <plant>/out/<survey> where not given', type: 'string' },
    ...writerOptions,
  },
  async run(given, { shell, version }) {
    const { readSoundPlant } = await import('./sound-plant.ts');
    const { plant: folder = '' } = given;
    if (given.out !== undefined) shell.claimFolder(given.out);
    shell.progress('reading the plant');
    const plant = readSoundPlant(folder, shell, given);
    if (plant === null) return 1;
    const { assess } = await import('../assess/assess.ts');
    shell.progress('assessing');
    const assessed = assess(plant, { survey: given.survey ?? null, toolVersion: version });
    const out = given.out ?? `${folder.replace(/\/+$/, '')}/out/${folderName(assessed.survey.id)}`;
    shell.claimFolder(out);
    const { writeRecord } = await import('../record/write.ts');
    const { deliver } = await import('./deliver.ts');
    const { loadAssets } = await import('../shell/assets.ts');
    const { writeDelivery } = await import('./written.ts');
    const delivery = await deliver(writeRecord(assessed), loadAssets(folder), given, shell.progress);
    writeDelivery(delivery, out, given, shell);
    return 0;
  },
};

/** A survey may be named by a date-time, whose colons no Windows disk takes. */
const folderName = (survey: string): string => survey.replace(/[^\w.-]+/g, '-');
