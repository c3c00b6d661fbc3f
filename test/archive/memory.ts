/** An archive in memory: the shell's reading half over a map, and issues made by the same functions as the command's. */
import { issuesIn, type ArchiveShell } from '../../src/archive/chain.ts';
import { changesSince, folderOf, frozenFiles, headOf, nextIssue, printedChanges } from '../../src/archive/issue.ts';
import { fingerprint, type SigningKey } from '../../src/archive/ssh-key.ts';
import { assess } from '../../src/assess/assess.ts';
import { readRecord } from '../../src/record/read.ts';
import { writeRecord } from '../../src/record/write.ts';
import { readPlant } from '../../src/survey/read.ts';
import { UserError } from '../../src/shell/types.ts';

export type Memory = Map<string, Uint8Array>;

const byCodeUnit = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

/** Paths from `/`. */
export function memoryShell(files: Memory): ArchiveShell & { list(folder: string): { files: string[]; refused: string[] } } {
  const below = (folder: string): string[] =>
    [...files.keys()]
      .filter((path) => path.startsWith(`${folder}/`))
      .map((path) => path.slice(folder.length + 1))
      .sort(byCodeUnit);
  return {
    list: (folder) => ({ files: below(folder).filter((path) => !/^(?:issued|out)\//.test(path)), refused: [] }),
    listAll: (folder) => ({ files: below(folder), others: [] }),
    folders: (folder) =>
      [
        ...new Set(
          below(folder)
            .filter((path) => path.includes('/'))
            .map((path) => path.slice(0, path.indexOf('/'))),
        ),
      ].sort(byCodeUnit),
    exists: (path) => files.has(path) || below(path).length > 0,
    read: (path) => {
      const bytes = files.get(path);
      if (bytes === undefined) throw new UserError(`Cannot read ${path}: it does not exist.`);
      return bytes;
    },
  };
}

export function putPlant(files: Memory, folder: string, texts: Readonly<Record<string, string>>): void {
  for (const [path, text] of Object.entries(texts)) files.set(`${folder}/${path}`, Buffer.from(text));
}

/** Freezes a survey of the plant at `folder`; PDF and site are stood for by a few bytes. Returns the issued folder's path. */
export function issueInMemory(
  files: Memory,
  folder: string,
  survey: string,
  { reason = null, key = null, version = '0.1.0' }: { reason?: string | null; key?: SigningKey | null; version?: string } = {},
): string {
  const shell = memoryShell(files);
  const { plant, problems } = readPlant(shell, folder);
  if (plant === null) throw new Error(problems.map((problem) => problem.message).join('\n'));
  const record = assess(plant, { survey, toolVersion: version });
  const archive = `${folder}/issued`;
  const file = nextIssue(archive, issuesIn(archive, shell), record, {
    survey,
    reason,
    today: '2026-02-02',
    signedBy: key === null ? null : fingerprint(key.publicBlob),
  });
  const old = file.replaces === null ? null : readRecord(Buffer.from(shell.read(`${archive}/${file.replaces}/record.json`)).toString());
  const changes = old === null ? null : printedChanges(changesSince(old, readRecord(writeRecord(record))));
  const recordText = writeRecord({ ...record, issue: headOf(file, changes) });
  const made = [
    { path: 'record.json', bytes: recordText },
    { path: 'report.pdf', bytes: `%PDF ${survey}` },
    { path: 'site/index.html', bytes: '<p>ä</p>' },
    { path: 'site/machines/p-1.html', bytes: '<p>1</p>' },
    ...shell.list(folder).files.map((path) => ({ path: `inputs/${path}`, bytes: shell.read(`${folder}/${path}`) })),
  ];
  const target = `${archive}/${folderOf(file)}`;
  for (const { path, bytes } of [...frozenFiles(made, file, key, () => {})])
    files.set(`${target}/${path}`, typeof bytes === 'string' ? Buffer.from(bytes) : bytes);
  return target;
}
