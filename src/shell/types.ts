/** Disk, clock and log arrive as one argument, so that everything else is pure and tests need no patching. */
export interface OutputFile {
  /** Relative, `/` separated, already safe. */
  readonly path: string;
  readonly bytes: Uint8Array | string;
}

export interface Shell {
  /** Files below `folder`, relative with `/`, sorted by code unit; symbolic links that leave the folder are listed in `refused`. */
  list(folder: string): { readonly files: readonly string[]; readonly refused: readonly string[] };
  /** Everything below `folder`, hidden or not, by code unit: files, and what is none (a link, a pipe, an empty folder). */
  listAll(folder: string): { readonly files: readonly string[]; readonly others: readonly string[] };
  /** Names of the folders directly in `folder`, by code unit; none where it is not there. */
  folders(folder: string): readonly string[];
  /** Bytes of a file; throws a UserError with a hint when it cannot be read. */
  read(path: string): Uint8Array;
  exists(path: string): boolean;
  /** The path from the root of the disk, `/` separated. */
  absolute(path: string): string;
  /** Puts right what an interrupted run left at `out`; throws a UserError where `out` is not new, empty or made by swayfolio. */
  claimFolder(out: string): void;
  /** Replaces the folder `out` whole: written beside, old renamed aside, new renamed in. Refuses a folder swayfolio did not make. */
  replaceFolder(out: string, files: Iterable<OutputFile>): void;
  /** Writes files into a folder that must be new or empty. */
  createFolder(out: string, files: Iterable<OutputFile>): void;
  /** Takes the archive `folder` for this process; throws a UserError while another process has it. */
  claimArchive(folder: string): ArchiveClaim;
  /** Replaces one file, or makes it: written beside and renamed in, so that it is the old one or the new one, whole. */
  replaceFile(path: string, bytes: Uint8Array): void;
  /** Today as `YYYY-MM-DD` by UTC: only `check` and `issue` ask. */
  today(): string;
  stdout(text: string): void;
  /** Progress: to stderr, and only on a terminal. */
  progress(text: string): void;
  stderr(text: string): void;
}

/** The archive of issued folders, held by this process alone. */
export interface ArchiveClaim {
  /** Writes a new folder `name` whole: rendered aside, on the disk, renamed, read-only. Throws a UserError where that cannot be; then nothing of it stays. */
  publish(name: string, files: Iterable<OutputFile>): void;
  release(): void;
}

/** An error the user can mend: told in one line with its hint, exit code 1 or 2, no stack trace. Everything else is a bug (exit 3). */
export class UserError extends Error {
  readonly hint: string | null;
  readonly exitCode: 1 | 2;
  constructor(message: string, hint: string | null = null, exitCode: 1 | 2 = 1) {
    super(message);
    this.hint = hint;
    this.exitCode = exitCode;
  }
}
