/**
 * The issues that stand in an archive. In: the folder issued/. Out: each with its issue.json and its manifest's hash, and where the
 * chain ends. Never: a folder opened that no issue made.
 */
import { z } from 'zod';
import { type Shell, UserError } from '../shell/types.ts';
import { sha256 } from './manifest.ts';
import { ISSUE_FILE, ISSUE_FOLDER, type IssueFile, MANIFEST } from './types.ts';

export type ArchiveShell = Pick<Shell, 'listAll' | 'folders' | 'read' | 'exists'>;

export interface Issued {
  /** Name of the folder. */
  readonly name: string;
  readonly file: IssueFile;
  readonly manifestHash: string;
}

const hash = z.string().regex(/^[0-9a-f]{64}$/);
const SHAPE = z.object({
  number: z.string().regex(/^\d{4}-\d{3,}$/),
  revision: z.number().int().min(0),
  tool: z.object({ name: z.string(), version: z.string() }),
  survey: z.string(),
  issued_on: z.string().regex(/^\d{4}-\d{2}-\d{2}$/),
  replaces: z.string().nullable(),
  reason: z.string().nullable(),
  previous_manifest: hash.nullable(),
  signed_by: z.string().nullable(),
});

/** A key a line, in the order of the type. */
export function issueText(file: IssueFile): string {
  const { number, revision, tool, survey, issued_on, replaces, reason, previous_manifest, signed_by } = file;
  return `${JSON.stringify({ number, revision, tool: { name: tool.name, version: tool.version }, survey, issued_on, replaces, reason, previous_manifest, signed_by }, null, 2)}\n`;
}

/** null where the text is no issue.json. */
export function readIssue(text: string): IssueFile | null {
  try {
    const read = SHAPE.safeParse(JSON.parse(text));
    return read.success ? read.data : null;
  } catch {
    return null;
  }
}

/** Issues of an archive, by name. Throws a UserError for a folder named as an issue that is none. */
export function issuesIn(archive: string, shell: ArchiveShell): readonly Issued[] {
  return shell
    .folders(archive)
    .filter((name) => ISSUE_FOLDER.test(name))
    .map((name) => {
      const at = `${archive}/${name}`;
      const whole = shell.exists(`${at}/${ISSUE_FILE}`) && shell.exists(`${at}/${MANIFEST}`);
      const file = whole ? readIssue(new TextDecoder().decode(shell.read(`${at}/${ISSUE_FILE}`))) : null;
      if (file === null)
        throw new UserError(`${at} is named as an issued report and is none.`, `See what is wrong by: swayfolio verify ${at}`);
      return { name, file, manifestHash: sha256(shell.read(`${at}/${MANIFEST}`)) };
    });
}

/** The manifest that the next issue names; null in an empty archive. Throws a UserError where the chain has come apart. */
export function chainEnd(archive: string, issues: readonly Issued[]): string | null {
  const named = new Set(issues.map((issued) => issued.file.previous_manifest));
  const ends = issues.filter((issued) => !named.has(issued.manifestHash));
  if (issues.length > 0 && ends.length !== 1) {
    throw new UserError(
      `The chain of ${archive} has come apart: ${ends.map((end) => end.name).join(', ')} are named by no later issue.`,
      `See what was changed by: swayfolio verify ${archive}`,
    );
  }
  return ends[0]?.manifestHash ?? null;
}
