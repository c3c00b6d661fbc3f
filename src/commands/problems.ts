/** Problems on the terminal. In: problems. Out: text, `file:line:column: code message`, grouped by kind. Never drops one without saying how many. */
import type { Problem } from '../plant/problem.ts';

const SHOWN_OF_A_KIND = 5;
const SEVERITIES = ['error', 'warning', 'note'] as const;

export interface ProblemCounts {
  readonly errors: number;
  readonly warnings: number;
  readonly notes: number;
}

export function countProblems(problems: readonly Problem[]): ProblemCounts {
  const of = (severity: Problem['severity']): number => problems.filter((problem) => problem.severity === severity).length;
  return { errors: of('error'), warnings: of('warning'), notes: of('note') };
}

/** Errors first; of each kind the first five with their hints, then the count of the rest. Ends with a line break; empty for none. */
export function problemText(problems: readonly Problem[]): string {
  const lines: string[] = [];
  for (const severity of SEVERITIES) {
    const kinds = new Map<string, Problem[]>();
    for (const problem of problems) {
      if (problem.severity !== severity) continue;
      const kind = kinds.get(problem.code);
      if (kind === undefined) kinds.set(problem.code, [problem]);
      else kind.push(problem);
    }
    for (const [code, kind] of kinds) {
      for (const problem of kind.slice(0, SHOWN_OF_A_KIND)) lines.push(...linesOf(problem));
      if (kind.length > SHOWN_OF_A_KIND) lines.push(`  … and ${kind.length - SHOWN_OF_A_KIND} more of ${code} (all of them: check --json)`);
    }
  }
  return lines.map((line) => `${printable(line)}\n`).join('');
}

function linesOf(problem: Problem): readonly string[] {
  const first = `${placeOf(problem)}: ${problem.code} ${problem.message}`;
  return problem.hint === null ? [first] : [first, `  ${problem.severity === 'error' ? 'mend' : 'hint'}: ${problem.hint}`];
}

/** `2 errors, 1 warning`; `no problems`. */
export function countText(counts: ProblemCounts): string {
  const parts = (
    [
      ['error', counts.errors],
      ['warning', counts.warnings],
      ['note', counts.notes],
    ] as const
  )
    .filter(([, count]) => count > 0)
    .map(([word, count]) => `${count} ${word}${count === 1 ? '' : 's'}`);
  return parts.length === 0 ? 'no problems' : parts.join(', ');
}

/** The last line of `check`: what to do now. */
export function nextStep(folder: string, problems: readonly Problem[]): string {
  const errors = problems.filter((problem) => problem.severity === 'error');
  const [first] = errors;
  if (first === undefined)
    return printable(
      `Next: ${problems.some((problem) => problem.severity === 'warning') ? 'read the warnings above, then run: ' : ''}swayfolio report ${folder}`,
    );
  const others = errors.length === 1 ? '' : ` and the ${errors.length - 1} after it`;
  return printable(`Next: mend ${placeOf(first)}${others}, then run again: swayfolio check ${folder}`);
}

const placeOf = (problem: Problem): string =>
  [problem.file === '' ? '.' : problem.file, problem.line, problem.line === null ? null : problem.column]
    .filter((part) => part !== null)
    .join(':');

/** Input may hold control characters: on a terminal they would move the cursor or ring. */
export function printable(text: string): string {
  return text.replace(/\p{Cc}/gu, '\uFFFD');
}
