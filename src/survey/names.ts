/**
 * Ids and their renames. In: an id as typed, its day. Out: the id of today, or null with the nearest as a hint.
 */
import { nearestWord } from '../measure/nearest.ts';
import { likelyOriginal } from './damaged.ts';
import type { Day } from '../plant/day.ts';
import type { Rename } from '../plant/types.ts';
import type { Problems } from './problems.ts';

/** Follows renames of machines, components and points; `since` bounds the days on which the old name still means the thing. */
export class Names {
  readonly #machines = new Map<string, Rename>();
  readonly #inner = new Map<string, Rename>();

  constructor(renames: readonly Rename[]) {
    for (const rename of renames) {
      if (rename.kind === 'machine') this.#machines.set(rename.old, rename);
      else this.#inner.set(`${rename.kind}\u0000${rename.machine}\u0000${rename.old}`, rename);
    }
  }

  get any(): boolean {
    return this.#machines.size + this.#inner.size > 0;
  }

  /** Today's id of a machine; a day from `since` on keeps the name as typed where a machine of that name exists. */
  machine(id: string, day: Day | null, exists: (id: string) => boolean): string {
    return follow(id, day, exists, (old) => this.#machines.get(old));
  }

  inner(kind: 'component' | 'point', machine: string, id: string, day: Day | null, exists: (id: string) => boolean): string {
    return follow(id, day, exists, (old) => this.#inner.get(`${kind}\u0000${machine}\u0000${old}`));
  }
}

function follow(id: string, day: Day | null, exists: (id: string) => boolean, renameOf: (id: string) => Rename | undefined): string {
  let name = id;
  for (let step = 0; step < 10; step += 1) {
    const rename = renameOf(name);
    if (rename === undefined) return name;
    const stillOld = day === null || rename.since === null || day < rename.since;
    if (!stillOld && exists(name)) return name;
    name = rename.new;
  }
  return name;
}

/** Tells an id that nothing bears. */
export function tellUnknown(
  problems: Problems,
  place: { readonly file: string; readonly line: number; readonly column: number | null },
  what: 'machine' | 'point' | 'component',
  id: string,
  where: string,
  known: readonly string[],
): void {
  const near = nearestWord(id, known);
  const original = likelyOriginal(id, known);
  if (original !== null) {
    problems.error(
      `unknown-${what}`,
      place,
      `There is no ${what} "${id}" ${where}.`,
      `A spreadsheet makes "${id}" of "${original}": that is the likely original. Write it back, and keep the column as text.`,
    );
    return;
  }
  problems.error(
    `unknown-${what}`,
    place,
    `There is no ${what} "${id}" ${where}.`,
    near === null ? `Add it there, or mend the id.` : `The nearest is "${near}".`,
  );
}

/** Ids that differ only in case are two things to us and one to most people. */
export function tellCaseTwins(problems: Problems, file: string, what: string, ids: Iterable<string>): void {
  const seen = new Map<string, string>();
  for (const id of ids) {
    const folded = id.toLowerCase();
    const twin = seen.get(folded);
    if (twin !== undefined && twin !== id)
      problems.add(
        'warning',
        'ids-differ-in-case',
        { file, line: null },
        `The ${what}s "${twin}" and "${id}" differ only in case; they are taken as two.`,
        'Make them one, or rename one of them.',
      );
    seen.set(folded, id);
  }
}
