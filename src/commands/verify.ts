/**
 * `verify`: is an issued report unaltered, and does it come out again? In: issued folders, an archive, or a plant folder. Out: every difference
 * by name, exit 1 where there is one. Never: a folder changed.
 */
import { readIssue } from '../archive/chain.ts';
import { sha256 } from '../archive/manifest.ts';
import type { Neighbour, Question } from '../archive/verify.ts';
import { type Shell, UserError } from '../shell/types.ts';
import { type Command, jsonOption } from './command.ts';
import { verdictLines } from './verdict.ts';

export const verify: Command = {
  usage: 'verify <issued..>',
  describe: 'is an issued report unaltered, and does its record come out again?',
  positionals: {
    issued: { describe: 'issued folders; an archive issued/ or its plant stands for all in it', type: 'string', array: true },
  },
  options: { key: { describe: 'public key file of who should have signed', type: 'string' }, json: jsonOption },
  async run({ issued = [], key, json = false }, { shell, version }) {
    const { verifyIssue } = await import('../archive/verify.ts');
    const keys = key === undefined ? null : (await import('../archive/ssh-key.ts')).readPublicKeys(shell.read(key), key);
    const named = await foldersOf(issued, shell);
    const assessAgain = await assessing(shell, version);
    const verdicts = named.folders.map((folder) => verifyIssue({ ...placeOf(folder, named.folders, shell), keys, assessAgain }, shell));
    shell.progress('');
    const isSound = named.strangers.length === 0 && verdicts.every((verdict) => verdict.isSound);
    if (json) shell.stdout(`${JSON.stringify({ sound: isSound, strangers: named.strangers, issues: verdicts }, null, 2)}\n`);
    else shell.stdout(verdictLines(verdicts, named.strangers, isSound));
    return isSound ? 0 : 1;
  },
};

/** Folders to verify, from the root of the disk; and what stands in an archive without being an issue. */
async function foldersOf(named: readonly string[], shell: Shell): Promise<{ folders: readonly string[]; strangers: readonly string[] }> {
  const { ISSUE_FILE, ISSUE_FOLDER, MANIFEST } = await import('../archive/types.ts');
  const folders = new Set<string>();
  const strangers: string[] = [];
  for (const name of named) {
    const at = shell.absolute(name);
    if (!shell.exists(at)) throw new UserError(`${name} is not there.`, 'Name an issued folder, or the folder issued/ of a plant.');
    if (shell.exists(`${at}/${MANIFEST}`) || shell.exists(`${at}/${ISSUE_FILE}`) || ISSUE_FOLDER.test(at.slice(at.lastIndexOf('/') + 1))) {
      folders.add(at);
      continue;
    }
    const archive = shell.exists(`${at}/issued`) ? `${at}/issued` : at;
    const below = shell.folders(archive).filter((folder) => !folder.startsWith('.'));
    const issues = below.filter((folder) => ISSUE_FOLDER.test(folder));
    if (issues.length === 0)
      throw new UserError(`${name} holds no issued report.`, 'Name an issued folder, or the folder issued/ of a plant.');
    for (const folder of issues) folders.add(`${archive}/${folder}`);
    strangers.push(...below.filter((folder) => !ISSUE_FOLDER.test(folder)).map((folder) => `${archive}/${folder}`));
  }
  return { folders: [...folders], strangers };
}

/** In an archive its neighbours are all that stand there; a copy has those that were named with it. */
function placeOf(folder: string, named: readonly string[], shell: Shell): Pick<Question, 'folder' | 'neighbours' | 'inArchive'> {
  const parent = folder.slice(0, folder.lastIndexOf('/'));
  const inArchive = parent.endsWith('/issued');
  const others = inArchive ? shell.folders(parent).map((name) => `${parent}/${name}`) : named;
  return { folder, inArchive, neighbours: others.flatMap((other) => (other === folder ? [] : neighbourAt(other, shell))) };
}

function neighbourAt(folder: string, shell: Shell): readonly Neighbour[] {
  const manifest = `${folder}/manifest.sha256`;
  const file = `${folder}/issue.json`;
  if (!shell.exists(manifest) || !shell.exists(file)) return [];
  const issue = readIssue(new TextDecoder().decode(shell.read(file)));
  return issue === null ? [] : [{ manifestHash: sha256(shell.read(manifest)), previous: issue.previous_manifest }];
}

async function assessing(shell: Shell, version: string): Promise<Question['assessAgain']> {
  const { readPlant } = await import('../survey/read.ts');
  const { assess } = await import('../assess/assess.ts');
  const { writeRecord } = await import('../record/write.ts');
  return (inputs, frozen) => {
    shell.progress(`assessing ${inputs}`);
    try {
      const { plant, problems } = readPlant(shell, inputs);
      const error = problems.find((problem) => problem.severity === 'error');
      if (plant === null)
        return { none: `the frozen inputs have errors: ${error?.file ?? ''}:${error?.line ?? ''} ${error?.message ?? ''}` };
      return { text: writeRecord({ ...assess(plant, { survey: frozen.survey, toolVersion: version }), issue: frozen.issue }) };
    } catch (error) {
      if (error instanceof UserError) return { none: error.message };
      throw error;
    }
  };
}
