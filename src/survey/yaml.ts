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

/** null with the problems told when the file is no YAML. */
export function readYaml(file: string, bytes: Uint8Array, problems: Problems): YamlFile | null {
  const text = textOf(file, bytes, problems);
  if (text === null) return null;
  const lines = new LineCounter();
  const document = parseDocument(text, { schema: 'failsafe', lineCounter: lines, prettyErrors: false, uniqueKeys: true });
  for (const error of document.errors) {
    const at = lines.linePos(error.pos[0]);
    problems.error('broken-yaml', { file, line: at.line, column: at.col }, `The file is no YAML: ${error.message.split('\n')[0]}`, 'Check indentation, colons and quotes on this line and the one before.');
  }
  if (document.errors.length > 0) return null;
  return {
    file,
    value: document.toJS({ maxAliasCount: 20 }) as unknown,
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
