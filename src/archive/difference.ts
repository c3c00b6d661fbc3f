/**
 * What differs between two records of one survey. In: two records. Out: places with both values, figures apart from policy, version
 * and wording. Never: a judgement on which of them is right.
 */
import type { SwayfolioRecord } from '../record/types.ts';

export type DifferenceKind = 'figure' | 'input' | 'limit' | 'policy' | 'version' | 'wording';

export interface Difference {
  readonly kind: DifferenceKind;
  /** Keys and ids from the record's top, e.g. `measurements P-1 DE-H velocity rms: value`. */
  readonly path: string;
  /** JSON text; null where the one has it not. */
  readonly before: string | null;
  readonly after: string | null;
}

type Fields = Readonly<Record<string, unknown>>;

/** What names an item of a list; the place in the list where there is none. */
const KEYS: Readonly<Record<string, readonly string[]>> = {
  surveys: ['id'],
  policy: ['id'],
  limit_sets: ['id', 'quantity', 'detection', 'valid_from'],
  machines: ['machine'],
  components: ['machine', 'component'],
  measurements: ['machine', 'point', 'quantity', 'detection'],
  actions: ['action'],
  coverage: ['machine'],
  plant_over_time: ['survey'],
  inputs: ['path'],
  problems: ['code', 'file', 'line', 'column'],
  people: ['name'],
  instruments: ['id'],
  sensors: ['id'],
};

const KIND_OF_TOP: Readonly<Record<string, DifferenceKind>> = {
  tool: 'version',
  format: 'version',
  policy: 'policy',
  policy_hash: 'policy',
  limit_sets: 'limit',
  inputs: 'input',
  cautions: 'wording',
  problems: 'wording',
};
/** Sentences: what they were made from stands beside them and is compared as figures. */
const SENTENCES: ReadonlySet<string> = new Set([
  'reason',
  'message',
  'confirm',
  'limit_reason',
  'no_zone_because',
  'cannot_see',
  'about',
  'above_next_because',
  'recommendation',
  'check_first',
  'hint',
  'title',
  'why',
  'none',
  'because',
]);

/** Without the issue's own head, which differs always. */
export function differencesOf(before: SwayfolioRecord, after: SwayfolioRecord): readonly Difference[] {
  const found: Difference[] = [];
  const tops = new Set([...Object.keys(before), ...Object.keys(after)]);
  for (const top of tops)
    if (top !== 'issue') compare(field(before, top), field(after, top), top, KIND_OF_TOP[top] ?? 'figure', top, found);
  return found;
}

const field = (value: unknown, key: string): unknown => (isObject(value) && Object.hasOwn(value, key) ? value[key] : undefined);
const isObject = (value: unknown): value is Fields => typeof value === 'object' && value !== null && !Array.isArray(value);
const shown = (value: unknown): string | null => (value === undefined ? null : JSON.stringify(value));

function compare(before: unknown, after: unknown, path: string, kind: DifferenceKind, key: string, found: Difference[]): void {
  if (shown(before) === shown(after)) return;
  if (isObject(before) && isObject(after)) {
    for (const name of new Set([...Object.keys(before), ...Object.keys(after)])) {
      compare(field(before, name), field(after, name), `${path}${path.includes(' ') ? ': ' : ' '}${name}`, kindOf(kind, name), name, found);
    }
  } else if (isListOfObjects(before) && isListOfObjects(after)) compareLists(before, after, path, kind, key, found);
  else found.push({ kind, path, before: shown(before), after: shown(after) });
}

const kindOf = (kind: DifferenceKind, name: string): DifferenceKind => (kind === 'figure' && SENTENCES.has(name) ? 'wording' : kind);
const isListOfObjects = (value: unknown): value is readonly Fields[] => Array.isArray(value) && value.every(isObject);

function compareLists(
  before: readonly Fields[],
  after: readonly Fields[],
  path: string,
  kind: DifferenceKind,
  key: string,
  found: Difference[],
): void {
  const [old, now] = [named(before, key), named(after, key)];
  for (const name of new Set([...old.keys(), ...now.keys()])) compare(old.get(name), now.get(name), `${path} ${name}`, kind, '', found);
  if (
    old.size === now.size &&
    [...old.keys()].join('\n') !== [...now.keys()].join('\n') &&
    [...old.keys()].every((name) => now.has(name))
  ) {
    found.push({ kind, path: `${path}, their order`, before: JSON.stringify([...old.keys()]), after: JSON.stringify([...now.keys()]) });
  }
}

function named(items: readonly Fields[], key: string): Map<string, Fields> {
  const names = new Map<string, Fields>();
  for (const [index, item] of items.entries()) {
    const keys = KEYS[key] ?? [];
    const name = keys
      .map((k) => item[k])
      .filter((v) => v !== null && v !== undefined)
      .join(' ');
    names.set(name === '' || names.has(name) ? `${name}${name === '' ? '' : ' '}#${index + 1}` : name, item);
  }
  return names;
}

/** `measurements P-1 DE-H: value 2.1, was 2.4`. */
export function differenceText({ path, before, after }: Difference, was = 'was'): string {
  const short = (text: string): string => (text.length > 80 ? `${text.slice(0, 79)}…` : text);
  if (before === null) return `${path}: new, ${short(after ?? '')}`;
  if (after === null) return `${path}: gone, ${was} ${short(before)}`;
  return `${path}: ${short(after)}, ${was} ${short(before)}`;
}
