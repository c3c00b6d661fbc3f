/**
 * YAML files with places. In: bytes. Out: plain text values (failsafe schema, so that 007 stays) and where each stands.
 */
import { LineCounter, parseDocument } from 'yaml';
import type { Problems } from './problems.ts';
import { textOf } from './text.ts';

export interface YamlFile {
  readonly file: string;
  /** Maps, lists and strings only; null for an empty file. */
  readonly value: unknown;
  /** Line and column of a value, or of the nearest thing above it that has a place. */
  place(path: readonly (string | number)[]): { readonly file: string; readonly line: number | null; readonly column: number | null };
}

const MOST_NESTED = 500;

/** Line on which brackets, list marks or spaces nest deeper than the limit; null where none does. Signs inside quotes count too: no plant folder comes near. */
function deepLine(text: string): number | null {
  const rows = text.split('\n');
  let open = 0;
  for (let i = 0; i < rows.length; i += 1) {
    const row = rows[i] as string;
    let [marks, spaces] = [0, 0];
    for (const sign of row) {
      if (sign === '[' || sign === '{') open += 1;
      else if ((sign === ']' || sign === '}') && open > 0) open -= 1;
      if (open > MOST_NESTED) return i + 1;
    }
    for (let at = 0; at < row.length && (row[at] === ' ' || row[at] === '-' || row[at] === '?'); at += 1)
      if (row[at] === ' ') spaces += 1;
      else marks += 1;
    if ((marks > MOST_NESTED || spaces > 2 * MOST_NESTED) && !/^-+\s*$/.test(row)) return i + 1;
  }
  return null;
}

/** null with the problems told when the file is no YAML. */
export function readYaml(file: string, bytes: Uint8Array, problems: Problems): YamlFile | null {
  const text = textOf(file, bytes, problems);
  if (text === null) return null;
  const lines = new LineCounter();
  const deep = deepLine(text);
  if (deep !== null) {
    problems.error(
      'broken-yaml',
      { file, line: deep },
      `The file nests lists or maps more than ${MOST_NESTED} deep.`,
      'A plant folder needs a handful of levels; remove the brackets or the spaces before the line.',
    );
    return null;
  }
  const document = parseDocument(text, { schema: 'failsafe', lineCounter: lines, prettyErrors: false, uniqueKeys: true });
  for (const error of document.errors) {
    const at = lines.linePos(error.pos[0]);
    problems.error(
      'broken-yaml',
      { file, line: at.line, column: at.col },
      `The file is no YAML: ${error.message.split('\n')[0]}`,
      'Check indentation, colons and quotes on this line and the one before.',
    );
  }
  if (document.errors.length > 0) return null;
  let value: unknown;
  try {
    value = document.toJS({ maxAliasCount: 20 });
  } catch (error) {
    // The library's words for an alias that multiplies itself, or that names nothing.
    if (!(error instanceof ReferenceError)) throw error;
    problems.error(
      'broken-yaml',
      { file, line: null },
      'The file repeats parts by aliases (*name) that multiply or lead nowhere.',
      'Write the values out instead of aliases.',
    );
    return null;
  }
  return {
    file,
    value,
    place(path) {
      for (let length = path.length; length > 0; length -= 1) {
        const node = document.getIn(path.slice(0, length), true) as { readonly range?: readonly number[] } | undefined;
        const start = node?.range?.[0];
        if (start !== undefined) {
          const at = lines.linePos(start);
          return { file, line: at.line, column: at.col };
        }
      }
      return { file, line: 1, column: 1 };
    },
  };
}
