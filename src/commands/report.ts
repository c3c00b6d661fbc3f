/** `report`: the deliverable of one survey. In: a plant folder. Out: PDF, site, record, work list in one folder. Writes nothing when the input has errors. */
import { type Arguments, type Command, type Context, plantArgument } from './command.ts';
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
    const { plant: folder = '' } = given;
    if (given.out !== undefined) shell.claimFolder(given.out);
    const assessed = await assessedRecord(folder, given, { shell, version });
    if (assessed === null) return 1;
    const out = given.out ?? `${folder.replace(/\/+$/, '')}/out/${folderName(assessed.survey)}`;
    shell.claimFolder(out);
    const { deliver } = await import('./deliver.ts');
    const { loadAssets } = await import('../shell/assets.ts');
    const { writeDelivery } = await import('./written.ts');
    const delivery = await deliver(assessed.text, loadAssets(folder), given, shell.progress);
    writeDelivery(delivery, out, given, shell);
    return 0;
  },
};

/** The record as text alone, so that the plant it was made from is let go before the writers begin. */
async function assessedRecord(
  folder: string,
  given: Arguments,
  { shell, version }: Context,
): Promise<{ survey: string; text: string } | null> {
  const { readSoundPlant } = await import('./sound-plant.ts');
  const { assess } = await import('../assess/assess.ts');
  const { writeRecord } = await import('../record/write.ts');
  shell.progress('reading the plant');
  const plant = readSoundPlant(folder, shell, given);
  if (plant === null) return null;
  shell.progress('assessing');
  const record = assess(plant, { survey: given.survey ?? null, toolVersion: version });
  return { survey: record.survey.id, text: writeRecord(record) };
}

/** A survey may be named by a date-time, whose colons no Windows disk takes. */
const folderName = (survey: string): string => survey.replace(/[^\w.-]+/g, '-');
