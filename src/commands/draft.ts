/** `draft`: rows in findings.csv for exceptions without words. In: a plant folder. Out: rows after those that stand there. Never touches a row. */
import { UserError } from '../shell/types.ts';
import { type Command, plantArgument } from './command.ts';

export const draft: Command = {
  usage: 'draft <plant>',
  describe: 'write rows in findings.csv for exceptions that have no words yet',
  positionals: { plant: plantArgument },
  options: { survey: { describe: 'this survey instead of the latest', type: 'string' } },
  async run({ plant: folder = '', survey }, { shell, version }) {
    const { readSoundPlant } = await import('./sound-plant.ts');
    const plant = readSoundPlant(folder, shell, {});
    if (plant === null) return 1;
    const { assess } = await import('../assess/assess.ts');
    const { draftRows } = await import('../table/draft.ts');
    const { appendRows } = await import('../table/append.ts');
    const { FINDINGS_HEAD, findingsHeader } = await import('../survey/findings.ts');
    const record = assess(plant, { survey: survey ?? null, toolVersion: version });
    const rows = draftRows(record);
    const path = `${folder.replace(/[\\/]+$/, '')}/surveys/${homeOf(record.survey.id)}/findings.csv`;
    if (rows.length === 0) {
      shell.stdout(`Nothing to draft: every exception of survey ${record.survey.id} has its finding or action.\n`);
      return 0;
    }
    const { bytes, lacking } = appended(
      () => appendRows(shell.exists(path) ? shell.read(path) : null, FINDINGS_HEAD, rows, findingsHeader),
      path,
    );
    shell.replaceFile(path, bytes);
    if (lacking.length > 0)
      shell.stderr(
        `${path} has no column for ${lacking.map((name) => name.replace('finding_text', 'finding (the second, for the text)')).join(', ')}: that text was left out.\n`,
      );
    shell.stdout(
      `${rows.length === 1 ? 'One row was' : `${rows.length} rows were`} added to ${path}: ${rows.map((row) => row.machine).join(', ')}. They are drafts by rule: read, change and confirm them.\n`,
    );
    return 0;
  },
};

/** The folder of a survey is its id; one that names an hour cannot be a folder on every disk. */
function homeOf(survey: string): string {
  if (/^[\w.-]+$/.test(survey)) return survey;
  throw new UserError(
    `Survey ${survey} can have no folder of its own for findings.`,
    'Give its readings a survey_date without an hour, or keep it in a folder surveys/<date>/.',
  );
}

function appended<T>(make: () => T, path: string): T {
  try {
    return make();
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    throw new UserError(`${path} is not UTF-8; nothing was written.`, 'Save it as UTF-8, then draft again.');
  }
}
