import type { Place, Problem } from '../plant/problem.ts';

/** Letters of one sentence: what was typed is shown, a cell of megabytes only by its ends. */
const MOST_LETTERS = 2_000;

function shortened(text: string): string {
  return text.length <= MOST_LETTERS ? text : `${text.slice(0, MOST_LETTERS / 2)} … ${text.slice(-MOST_LETTERS / 2)}`;
}

/** Collects every problem of one run; the same words at the same place are told once. */
export class Problems {
  readonly #list: Problem[] = [];
  readonly #told = new Set<string>();

  add(
    severity: Problem['severity'],
    code: string,
    place: { readonly file: string; readonly line: number | null; readonly column?: number | null },
    message: string,
    hint: string | null = null,
  ): void {
    const { file, line, column = null } = place;
    [message, hint] = [shortened(message), hint === null ? null : shortened(hint)];
    const key = `${code}\u0000${file}\u0000${line}\u0000${column}\u0000${message}`;
    if (this.#told.has(key)) return;
    this.#told.add(key);
    this.#list.push({ code, severity, file, line, column, message, hint });
  }

  error(
    code: string,
    place: { readonly file: string; readonly line: number | null; readonly column?: number | null },
    message: string,
    hint: string | null = null,
  ): void {
    this.add('error', code, place, message, hint);
  }

  get anyError(): boolean {
    return this.#list.some((p) => p.severity === 'error');
  }

  /** By file, line, column, then as found. */
  sorted(): Problem[] {
    const order = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
    return [...this.#list].sort((a, b) => order(a.file, b.file) || (a.line ?? 0) - (b.line ?? 0) || (a.column ?? 0) - (b.column ?? 0));
  }
}

export const placeText = (place: Place): string => `${place.file}:${place.line}`;
