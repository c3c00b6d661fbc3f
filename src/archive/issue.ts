/**
 * Issuing. In: the record of a survey, the issues that stand, the files to freeze. Out: the head of the new issue, and its folder's files
 * with the manifest last. Never: a file written, or an issue changed.
 */
import { createHash } from 'node:crypto';
import { diagnoses } from '../plant/survey.ts';
import type { Issue, SwayfolioRecord } from '../record/types.ts';
import { type OutputFile, UserError } from '../shell/types.ts';
import { chainEnd, type Issued, issueText } from './chain.ts';
import { type Difference, differencesOf, differenceText } from './difference.ts';
import { isPlainPath, manifestText, type ManifestLine, sha256 } from './manifest.ts';
import type { SigningKey } from './ssh-key.ts';
import { signMessage } from './ssh-signature.ts';
import { type IssueFile, issueFolder, MANIFEST, SIGNATURE } from './types.ts';

/** What changed since the replaced issue, in print; the terminal and verify tell the rest. */
const PRINTED_CHANGES = 40;

export interface IssueWish {
  readonly survey: string;
  readonly reason: string | null;
  /** Of the shell's clock, `YYYY-MM-DD`; used where the survey states no issue_date. */
  readonly today: string;
  readonly signedBy: string | null;
}

/** Throws a UserError for a survey with findings or exceptions that nobody of a diagnosing category stands for. */
export function assertSignedFor(record: SwayfolioRecord): void {
  if (record.survey.people.some((person) => diagnoses(person.category))) return;
  const stated = record.actions.filter((action) => action.rank > 0 && (action.origin !== 'drafted' || action.urgency !== 'watch'));
  if (stated.length === 0) return;
  const of = stated
    .slice(0, 3)
    .map((action) => action.machine)
    .join(', ');
  throw new UserError(
    `Survey ${record.survey.id} has ${stated.length} findings or exceptions (${of}${stated.length > 3 ? ' …' : ''}) and names nobody of a diagnosing category.`,
    `Name in surveys/${record.survey.id}/survey.yaml under people: who stands for them, with category: ISO 18436-2 category II or above.`,
  );
}

/** The issue that this one would replace: the survey's latest; null for its first. */
export function replacedBy(survey: string, issues: readonly Issued[]): Issued | null {
  let found: Issued | null = null;
  for (const issued of issues)
    if (issued.file.survey === survey && (found === null || issued.file.revision > found.file.revision)) found = issued;
  return found;
}

/** Number, revision and place in the chain. Throws a UserError where the survey stands issued and no reason is given, or the other way round. */
export function nextIssue(archive: string, issues: readonly Issued[], record: SwayfolioRecord, wish: IssueWish): IssueFile {
  const replaced = replacedBy(wish.survey, issues);
  if (replaced !== null && wish.reason === null) {
    throw new UserError(
      `Survey ${wish.survey} is issued already, as ${archive}/${replaced.name}.`,
      'An issued report is never changed; to issue it again give --reason "why": it gets the next revision, and the old one stays.',
    );
  }
  if (replaced === null && wish.reason !== null)
    throw new UserError(`Survey ${wish.survey} was not issued before, so there is nothing to give a reason for.`, 'Leave --reason out.', 2);
  return {
    number: replaced?.file.number ?? nextNumber(wish.survey, issues, record),
    revision: replaced === null ? 0 : replaced.file.revision + 1,
    tool: record.tool,
    survey: wish.survey,
    issued_on: record.survey.issue_date ?? wish.today,
    replaces: replaced?.name ?? null,
    reason: wish.reason,
    previous_manifest: chainEnd(archive, issues),
    signed_by: wish.signedBy,
  };
}

function nextNumber(survey: string, issues: readonly Issued[], record: SwayfolioRecord): string {
  const year = (record.surveys.find((line) => line.id === survey)?.date ?? record.survey.to).slice(0, 4);
  const used = issues.filter((issued) => issued.file.number.startsWith(`${year}-`)).map((issued) => Number(issued.file.number.slice(5)));
  return `${year}-${String(Math.max(0, ...used) + 1).padStart(3, '0')}`;
}

/** The head as the record has it; with what changed since the issue it replaces, and what is past its retention. */
export function headOf(file: IssueFile, changes: readonly string[] | null, due?: readonly string[] | null): Issue {
  const { number, revision, issued_on, replaces, reason, previous_manifest } = file;
  return {
    number,
    revision,
    issued_on,
    replaces,
    reason,
    previous_manifest,
    ...(changes === null ? {} : { changes }),
    ...(due === undefined ? {} : { retention_due: due }),
  };
}

/** Readings first, then what follows from them, then what is neither; of each kind in the record's order. */
export function changesSince(before: SwayfolioRecord, after: SwayfolioRecord): readonly Difference[] {
  const ranks: readonly ((change: Difference) => boolean)[] = [
    ({ kind, path }) => kind === 'figure' && /^measurements .*: (?:value|typed|status)$/.test(path),
    ({ kind, path }) => kind === 'figure' && !path.includes(' facts'),
    ({ kind }) => kind === 'limit',
    ({ kind }) => kind === 'policy',
    ({ kind }) => kind === 'version',
    ({ kind }) => kind === 'input',
    ({ kind }) => kind === 'figure',
    ({ kind }) => kind === 'wording',
  ];
  const found = differencesOf(before, after);
  const rankOf = (change: Difference): number => ranks.findIndex((fits) => fits(change));
  return ranks.flatMap((_, rank) => found.filter((change) => rankOf(change) === rank));
}

export function printedChanges(changes: readonly Difference[]): readonly string[] {
  if (changes.length === 0) return ['No figure, limit, setting, input or wording of the record'];
  const lines = changes.slice(0, PRINTED_CHANGES).map((change) => `${change.kind}: ${differenceText(change)}`);
  return changes.length > PRINTED_CHANGES
    ? [...lines, `and ${changes.length - PRINTED_CHANGES} more; both records are in the archive`]
    : lines;
}

export const folderOf = (file: IssueFile): string => issueFolder(file.number, file.revision);

/** Files of the folder, passed on as they come; the manifest and its signature last. `told` gets the manifest's hash. */
export function* frozenFiles(
  files: Iterable<OutputFile>,
  file: IssueFile,
  key: SigningKey | null,
  told: (manifestHash: string) => void,
): Iterable<OutputFile> {
  const lines: ManifestLine[] = [];
  for (const each of withHead(files, file)) {
    if (!isPlainPath(each.path))
      throw new UserError(
        `The name of ${JSON.stringify(each.path)} has a control character or a backslash; no manifest can list it.`,
        'Rename the file in the plant folder.',
      );
    lines.push({ path: each.path, sha256: sha256(each.bytes) });
    yield each;
  }
  const manifest = Buffer.from(manifestText(lines), 'utf8');
  yield { path: MANIFEST, bytes: manifest };
  if (key !== null) yield { path: SIGNATURE, bytes: signMessage(manifest, key) };
  told(createHash('sha256').update(manifest).digest('hex'));
}

function* withHead(files: Iterable<OutputFile>, file: IssueFile): Iterable<OutputFile> {
  yield { path: 'issue.json', bytes: issueText(file) };
  yield* files;
}
