/** A problem of the input: data, not an exception, so that one run can report them all. */
export interface Problem {
  /** Short kebab-case code, stable between versions, e.g. `unknown-point`. */
  readonly code: string;
  readonly severity: 'error' | 'warning' | 'note';
  /** Path relative to the plant folder, `/` as separator; empty for the folder itself. */
  readonly file: string;
  /** 1-based; null where the problem is of the whole file. */
  readonly line: number | null;
  /** 1-based column of the field (CSV: the field's number; YAML: the character); null where there is none. */
  readonly column: number | null;
  /** What was found and what was expected, an English sentence. */
  readonly message: string;
  /** What to do about it; null where the message says it. */
  readonly hint: string | null;
}

/** Where a row came from. */
export interface Place {
  readonly file: string;
  readonly line: number;
}
