/**
 * What an issued folder holds. In: issued/<number>/ as `issue` froze it. Out: its names and the type of issue.json.
 * Never: anything read or written here.
 */
export const MANIFEST = 'manifest.sha256';
export const SIGNATURE = 'manifest.sha256.sig';
export const ISSUE_FILE = 'issue.json';
export const RECORD_FILE = 'record.json';
/** The plant folder's files as they were, below this folder of the issue. */
export const INPUTS = 'inputs';

/** issue.json: keys in this order. */
export interface IssueFile {
  /** Year of the survey, then its place among that year's issues: `2026-001`. A re-issue keeps it. */
  readonly number: string;
  /** 0 for the first issue of a survey. */
  readonly revision: number;
  readonly tool: { readonly name: string; readonly version: string };
  readonly survey: string;
  /** `YYYY-MM-DD`. */
  readonly issued_on: string;
  /** Name of the issued folder that this one replaces; it stays. */
  readonly replaces: string | null;
  readonly reason: string | null;
  /** SHA-256 of the manifest that was issued before this one; null for the archive's first. */
  readonly previous_manifest: string | null;
  /** Fingerprint of the key that signed the manifest, as `ssh-keygen -l` prints it. */
  readonly signed_by: string | null;
}

/** `2026-001`, and for a revision `2026-001-r1`. */
export const issueFolder = (number: string, revision: number): string => (revision === 0 ? number : `${number}-r${revision}`);

/** What names an issued folder; anything else in issued/ is not ours. */
export const ISSUE_FOLDER: RegExp = /^(\d{4}-\d{3,})(?:-r([1-9]\d*))?$/;
