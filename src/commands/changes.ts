/** What differs between two records, on the terminal. In: differences. Out: lines, indented; the first of each kind and the count of the rest. */
import { type Difference, differenceText } from '../archive/difference.ts';

const SHOWN_OF_A_KIND = 10;

export function changeLines(changes: readonly Difference[]): readonly string[] {
  if (changes.length === 0) return ['  what changed: no figure, limit, setting, input or wording of the record'];
  const kinds = new Map<string, Difference[]>();
  for (const change of changes) kinds.set(change.kind, [...(kinds.get(change.kind) ?? []), change]);
  return [...kinds].flatMap(([kind, list]) => [
    `  ${kind}: ${list.length} changed`,
    ...list.slice(0, SHOWN_OF_A_KIND).map((change) => `    ${differenceText(change)}`),
    ...(list.length > SHOWN_OF_A_KIND ? [`    … and ${list.length - SHOWN_OF_A_KIND} more`] : []),
  ]);
}
