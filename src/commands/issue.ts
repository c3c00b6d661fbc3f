/**
 * `issue`: a survey's report, numbered and frozen. In: a plant folder. Out: a new folder in its issued/. Refuses while the input has errors,
 * where nobody may state its findings, and a second time without a reason. Never: an issued folder changed.
 */
import type { Difference } from '../archive/difference.ts';
import { sha256 } from '../archive/manifest.ts';
import type { SigningKey } from '../archive/ssh-key.ts';
import type { IssueFile } from '../archive/types.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import { type ArchiveClaim, type OutputFile, type Shell, UserError } from '../shell/types.ts';
import { changeLines } from './changes.ts';
import { type Arguments, type Command, type Context, type ExitCode, plantArgument } from './command.ts';
import type { Delivery } from './deliver.ts';
import { printable } from './problems.ts';

export const issue: Command = {
  usage: 'issue <plant>',
  describe: "number and freeze a survey's report into <plant>/issued/",
  positionals: { plant: plantArgument },
  options: {
    survey: { describe: 'which survey; the latest where not given', type: 'string' },
    reason: { describe: 'why a survey is issued again: the next revision, beside the old one', type: 'string' },
    sign: { describe: 'an unencrypted Ed25519 private key file of OpenSSH; signs the manifest', type: 'string' },
  },
  async run(given, context) {
    const { shell, version } = context;
    const folder = (given.plant ?? '').replace(/(?<=[^/])\/+$/, '');
    const key =
      given.sign === undefined ? null : (await import('../archive/ssh-key.ts')).readSigningKey(shell.read(given.sign), given.sign);
    const { readSoundPlant } = await import('./sound-plant.ts');
    const { assess } = await import('../assess/assess.ts');
    const { assertSignedFor } = await import('../archive/issue.ts');
    shell.progress('reading the plant');
    const plant = readSoundPlant(folder, shell, {});
    if (plant === null) return 1;
    const record = assess(plant, { survey: given.survey ?? null, toolVersion: version });
    assertSignedFor(record);
    refuseKeysAmong(folder, shell);
    const claim = shell.claimArchive(`${folder}/issued`);
    try {
      return await issueInto(folder, record, { given, key, claim }, context);
    } finally {
      claim.release();
    }
  },
};

interface Way {
  readonly given: Arguments;
  readonly key: SigningKey | null;
  readonly claim: ArchiveClaim;
}

async function issueInto(folder: string, record: SwayfolioRecord, { given, key, claim }: Way, { shell }: Context): Promise<ExitCode> {
  const { issuesIn } = await import('../archive/chain.ts');
  const { changesSince, folderOf, frozenFiles, headOf, nextIssue, printedChanges } = await import('../archive/issue.ts');
  const { dueFor } = await import('../archive/retention.ts');
  const { fingerprint } = await import('../archive/ssh-key.ts');
  const { readRecord } = await import('../record/read.ts');
  const { writeRecord } = await import('../record/write.ts');
  const archive = `${folder}/issued`;
  const issues = issuesIn(archive, shell);
  const file = nextIssue(archive, issues, record, {
    survey: record.survey.id,
    reason: given.reason ?? null,
    today: shell.today(),
    signedBy: key === null ? null : fingerprint(key.publicBlob),
  });
  const replaced =
    file.replaces === null ? null : readRecord(new TextDecoder().decode(shell.read(`${archive}/${file.replaces}/record.json`)));
  const changes = replaced === null ? null : changesSince(replaced, readRecord(writeRecord(record)));
  const due = record.plant.retention === null ? undefined : dueFor(issues, record.plant.retention, file.issued_on);
  const text = writeRecord({ ...record, issue: headOf(file, changes === null ? null : printedChanges(changes), due) });
  const { deliver } = await import('./deliver.ts');
  const { loadAssets } = await import('../shell/assets.ts');
  const delivery = await deliver(text, loadAssets(folder), {}, shell.progress);
  let manifestHash = '';
  const all = both(delivery.files, inputFiles(folder, delivery.record, shell));
  claim.publish(
    folderOf(file),
    frozenFiles(all, file, key, (hash) => {
      manifestHash = hash;
    }),
  );
  shell.progress('');
  shell.stdout(told(`${archive}/${folderOf(file)}`, file, delivery, manifestHash, changes));
  return 0;
}

/** A private key that lies in the plant folder would be frozen with it, and handed to whoever gets the report. */
function refuseKeysAmong(folder: string, shell: Shell): void {
  for (const path of shell.list(folder).files) {
    const head = new TextDecoder('latin1').decode(shell.read(`${folder}/${path}`).subarray(0, 200));
    if (/-----BEGIN [A-Z ]*PRIVATE KEY-----/.test(head))
      throw new UserError(
        `${folder}/${path} is a private key; the plant folder's files are frozen into the issued report.`,
        'Move it out of the plant folder.',
      );
  }
}

function* both(first: Iterable<OutputFile>, second: Iterable<OutputFile>): Iterable<OutputFile> {
  yield* first;
  yield* second;
}

/** The plant folder's files as they were read; one that changed meanwhile would freeze another survey than the one assessed. */
function* inputFiles(folder: string, record: SwayfolioRecord, shell: Shell): Iterable<OutputFile> {
  const hashes = new Map(record.inputs.map((input) => [input.path, input.sha256]));
  for (const path of shell.list(folder).files) {
    const bytes = shell.read(`${folder}/${path}`);
    const hash = hashes.get(path);
    if (hash !== undefined && hash !== sha256(bytes))
      throw new UserError(
        `${folder}/${path} was changed while its report was made.`,
        'Run again when nobody writes to it; nothing was issued.',
      );
    hashes.delete(path);
    yield { path: `inputs/${path}`, bytes };
  }
  for (const path of hashes.keys())
    throw new UserError(
      `${folder}/${path} was taken away while its report was made.`,
      'Run again when nobody writes to it; nothing was issued.',
    );
}

function told(
  at: string,
  file: IssueFile,
  { pages, record }: Delivery,
  manifestHash: string,
  changes: readonly Difference[] | null,
): string {
  return [
    `Issued survey ${file.survey} as number ${file.number}, revision ${file.revision}, on ${file.issued_on}: ${at}`,
    `  report.pdf (${pages} pages), site/, record.json, work-list.csv, inputs/`,
    ...(file.replaces === null ? [] : [`  replaces ${file.replaces}, which stays; reason: ${file.reason}`, ...changeLines(changes ?? [])]),
    `  previous manifest  ${file.previous_manifest ?? 'none: the first of this archive'}`,
    `  its own manifest   ${manifestHash}`,
    ...(file.signed_by === null ? [] : [`  signed by          ${file.signed_by}`]),
    ...retentionLines(record),
    '  Keep the hash of its manifest apart from the archive: it proves the last issue, which no later one names.',
  ]
    .map((line) => `${printable(line)}\n`)
    .join('');
}

function retentionLines({ plant, issue }: SwayfolioRecord): readonly string[] {
  if (plant.retention === null) return [];
  const due = issue?.retention_due ?? null;
  if (due === null) return [`  retention          ${plant.retention}: names no number of years, so what is past it cannot be told`];
  return [`  retention          ${plant.retention}; past it: ${due.length === 0 ? 'none' : due.join(', ')} (nothing is ever deleted)`];
}
