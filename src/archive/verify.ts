/**
 * Verifying. In: an issued folder, what stands beside it, keys, and a way to assess its frozen inputs again. Out: every file that is
 * not as it was issued, the chain, the signature, and whether the record comes out again. Never: a folder changed.
 */
import { readRecord } from '../record/read.ts';
import type { Issue, SwayfolioRecord } from '../record/types.ts';
import { UserError } from '../shell/types.ts';
import { type ArchiveShell, issueText, readIssue } from './chain.ts';
import { type Difference, differencesOf } from './difference.ts';
import { type Alteration, alterationsOf } from './alteration.ts';
import { sha256 } from './manifest.ts';
import { fingerprint } from './ssh-key.ts';
import { signerOf } from './ssh-signature.ts';
import { INPUTS, ISSUE_FILE, type IssueFile, issueFolder, MANIFEST, RECORD_FILE, SIGNATURE } from './types.ts';

export type { Alteration };

export interface Neighbour {
  readonly manifestHash: string;
  readonly previous: string | null;
}

/** What is taken from the frozen record to assess its inputs again. */
export interface FrozenHead {
  readonly survey: string;
  readonly issue: Issue | null;
}

export interface Question {
  readonly folder: string;
  /** Every other issue at hand, from the same archive or named too. */
  readonly neighbours: readonly Neighbour[];
  /** In an archive the issue before must be at hand, and a folder bears its issue's name; a copy elsewhere may stand alone. */
  readonly inArchive: boolean;
  /** Public keys that may have signed; null = none was given. */
  readonly keys: readonly Uint8Array[] | null;
  /** The text of the record that the inputs give today under this head, or the reason why there is none. */
  readonly assessAgain: (inputs: string, frozen: FrozenHead) => { readonly text: string } | { readonly none: string };
}

export type Reproduction =
  | { readonly result: 'reproduced'; readonly wording: readonly Difference[]; readonly versions: readonly Difference[] }
  | {
      readonly result: 'differs';
      readonly differences: readonly Difference[];
      readonly wording: readonly Difference[];
      readonly versions: readonly Difference[];
    }
  | { readonly result: 'not possible'; readonly because: string };

export interface Verdict {
  readonly folder: string;
  readonly issue: IssueFile | null;
  readonly manifestHash: string | null;
  readonly alterations: readonly Alteration[];
  readonly chain: 'first' | 'linked' | 'not at hand' | 'broken';
  readonly signature: { readonly state: 'none' | 'good' | 'bad'; readonly signer: string | null; readonly message: string };
  readonly reproduction: Reproduction;
  readonly isSound: boolean;
}

export function verifyIssue(question: Question, shell: ArchiveShell): Verdict {
  const { folder, neighbours } = question;
  const read = (path: string): Uint8Array | null => (shell.exists(`${folder}/${path}`) ? shell.read(`${folder}/${path}`) : null);
  const manifest = read(MANIFEST);
  const manifestHash = manifest === null ? null : sha256(manifest);
  const issueBytes = read(ISSUE_FILE);
  const issue = issueBytes === null ? null : readIssue(utf8(issueBytes));
  const signature = signatureOf(manifest, read(SIGNATURE), issue, question.keys);
  const vouched = signature.state === 'good' || neighbours.some((other) => other.previous === manifestHash);
  const alterations = [...alterationsOf(folder, manifest, vouched, shell), ...signature.alterations];
  if (issueBytes !== null && (issue === null || issueText(issue) !== utf8(issueBytes)))
    alterations.push({ path: ISSUE_FILE, kind: 'changed', message: 'it is not as issue writes it' });
  if (issue !== null && question.inArchive && !folder.endsWith(`/${issueFolder(issue.number, issue.revision)}`)) {
    alterations.push({ path: '.', kind: 'renamed', message: `issue.json says ${issueFolder(issue.number, issue.revision)}` });
  }
  const record = frozenRecord(read(RECORD_FILE));
  if (issue !== null && !('none' in record) && !isHeadOf(record.read, issue))
    alterations.push({ path: RECORD_FILE, kind: 'changed', message: 'its issue is not that of issue.json' });
  const chain = chainOf(issue, question);
  const reproduction: Reproduction = 'none' in record ? { result: 'not possible', because: record.none } : reproductionOf(record, question);
  const isSound = alterations.length === 0 && chain !== 'broken' && signature.state !== 'bad' && reproduction.result === 'reproduced';
  const { state, signer, message } = signature;
  return { folder, issue, manifestHash, alterations, chain, signature: { state, signer, message }, reproduction, isSound };
}

const utf8 = (bytes: Uint8Array): string => new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes);

interface Signature {
  readonly state: 'none' | 'good' | 'bad';
  readonly signer: string | null;
  readonly message: string;
  readonly alterations: readonly Alteration[];
}

function signatureOf(
  manifest: Uint8Array | null,
  bytes: Uint8Array | null,
  issue: IssueFile | null,
  keys: readonly Uint8Array[] | null,
): Signature {
  const bad = (kind: Alteration['kind'], message: string): Signature => ({
    state: 'bad',
    signer: null,
    message,
    alterations: [{ path: SIGNATURE, kind, message }],
  });
  const stated = issue?.signed_by ?? null;
  if (bytes === null) {
    if (stated !== null) return bad('missing', `issue.json says that ${stated} signed`);
    if (keys === null) return { state: 'none', signer: null, message: 'not signed', alterations: [] };
    return { state: 'bad', signer: null, message: 'not signed, though a key was given to check it by', alterations: [] };
  }
  if (manifest === null) return bad('changed', 'there is no manifest that it could sign');
  const blob = signerOf(manifest, Buffer.from(bytes).toString('latin1'));
  if (blob === null) return bad('changed', 'it is no signature of this manifest');
  const signer = fingerprint(blob);
  if (issue !== null && stated === null) return bad('added', 'issue.json says that nobody signed');
  if (stated !== null && stated !== signer) return bad('changed', `${signer} signed it; issue.json says ${stated}`);
  if (keys !== null && !keys.some((key) => Buffer.from(key).equals(blob))) {
    return { state: 'bad', signer, message: `signed by ${signer}, which is not the key given`, alterations: [] };
  }
  return {
    state: 'good',
    signer,
    message: `signed by ${signer}${keys === null ? '; whose key that is was not checked (--key)' : ', the key given'}`,
    alterations: [],
  };
}

function chainOf(issue: IssueFile | null, { neighbours, inArchive }: Question): Verdict['chain'] {
  if (issue === null) return 'broken';
  const previous = issue.previous_manifest;
  // Each issue names one before it, and is named by one: two of a kind are a chain that was forked.
  if (inArchive && neighbours.some((other) => other.previous === previous)) return 'broken';
  if (previous === null) return 'first';
  if (neighbours.some((other) => other.manifestHash === previous)) return 'linked';
  return inArchive ? 'broken' : 'not at hand';
}

type Frozen = { readonly text: string; readonly read: SwayfolioRecord };

function frozenRecord(bytes: Uint8Array | null): Frozen | { readonly none: string } {
  if (bytes === null) return { none: 'record.json is missing' };
  try {
    const text = utf8(bytes);
    return { text, read: readRecord(text) };
  } catch (error) {
    if (error instanceof UserError) return { none: `record.json: ${error.message}` };
    throw error;
  }
}

function isHeadOf({ issue }: SwayfolioRecord, file: IssueFile): boolean {
  return (
    issue !== null &&
    issue.number === file.number &&
    issue.revision === file.revision &&
    issue.issued_on === file.issued_on &&
    issue.replaces === file.replaces &&
    issue.reason === file.reason &&
    issue.previous_manifest === file.previous_manifest
  );
}

/** An altered record may hold keys that no record has. */
function knownHead({ number, revision, issued_on, replaces, reason, previous_manifest, changes, retention_due }: Issue): Issue {
  return {
    number,
    revision,
    issued_on,
    replaces,
    reason,
    previous_manifest,
    ...(changes === undefined ? {} : { changes }),
    ...(retention_due === undefined ? {} : { retention_due }),
  };
}

function reproductionOf(frozen: Frozen, { folder, assessAgain }: Question): Reproduction {
  const { survey, issue } = frozen.read;
  const again = assessAgain(`${folder}/${INPUTS}`, { survey: survey.id, issue: issue === null ? null : knownHead(issue) });
  if ('none' in again) return { result: 'not possible', because: again.none };
  const found = again.text === frozen.text ? [] : differencesOf(frozen.read, readRecord(again.text));
  const wording = found.filter((difference) => difference.kind === 'wording');
  const versions = found.filter((difference) => difference.kind === 'version');
  const differences = found.filter((difference) => difference.kind !== 'wording' && difference.kind !== 'version');
  return differences.length === 0 ? { result: 'reproduced', wording, versions } : { result: 'differs', differences, wording, versions };
}
