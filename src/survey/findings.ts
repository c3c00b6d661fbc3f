import type { Finding, Photo } from '../plant/types.ts';
import { URGENCIES } from '../plant/types.ts';
import type { Cells } from './cells.ts';

/** The column `finding` stands twice in this table: first the id, then the text, which is read as `finding_text`. */
export const FINDINGS_COLUMNS = [
  'finding',
  'machine',
  'component',
  'points',
  'finding_text',
  'likely_cause',
  'less_likely',
  'confidence',
  'recommendation',
  'needs_stop',
  'check_first',
  'consequence',
  'downtime_h',
  'parts',
  'due',
  'owner',
  'urgency',
  'override_by',
  'override_reason',
  'override_until',
  'verify_point',
  'verify_below',
  'carried_from',
  'confirmed',
  'closed',
] as const;

/** First line of a new findings.csv. */
export const FINDINGS_HEAD: readonly string[] = FINDINGS_COLUMNS.map((name) => (name === 'finding_text' ? 'finding' : name));

export function findingsHeader(header: readonly string[]): string[] {
  const second = header.lastIndexOf('finding');
  return header.map((name, i) => (name === 'finding' && i === second && i !== header.indexOf('finding') ? 'finding_text' : name));
}

export function findingRow(cells: Cells): Finding | null {
  const id = cells.required('finding');
  const machine = cells.required('machine');
  const urgency = cells.word('urgency', URGENCIES);
  const [by, reason, until] = [cells.text('override_by'), cells.text('override_reason'), cells.day('override_until')];
  if (urgency !== null && (by === null || reason === null)) {
    cells.warn(
      'override-incomplete',
      'urgency',
      'The urgency is overridden without a name or a reason; the computed one stands.',
      'Fill in override_by, override_reason and override_until.',
    );
  }
  const [confirmed, closed, due] = [cells.day('confirmed'), cells.day('closed'), cells.day('due')];
  const [downtimeH, verifyBelow] = [cells.number('downtime_h', 0), cells.number('verify_below', 0)];
  if (id === null || machine === null) return null;
  return {
    id,
    machine,
    component: cells.text('component'),
    points: cells.list('points'),
    finding: cells.text('finding_text'),
    likelyCause: cells.text('likely_cause'),
    lessLikely: cells.text('less_likely'),
    confidence: cells.word('confidence', ['low', 'medium', 'high'] as const),
    recommendation: cells.text('recommendation'),
    needsStop: cells.yesNo('needs_stop'),
    checkFirst: cells.text('check_first'),
    consequence: cells.text('consequence'),
    downtimeH,
    parts: cells.text('parts'),
    due,
    owner: cells.text('owner'),
    urgency,
    overrideBy: by,
    overrideReason: reason,
    overrideUntil: until,
    verifyPoint: cells.text('verify_point'),
    verifyBelow,
    carriedFrom: cells.text('carried_from'),
    confirmed,
    closed,
    place: cells.place,
  };
}

/** `<machine>[-<point>][-n].jpg|png` of a known machine, the longest id that fits; null where none does. */
export function photoOf(
  path: string,
  machines: ReadonlyMap<string, readonly string[]>,
  captions: ReadonlyMap<string, string>,
): Photo | null {
  const name = path.slice(path.lastIndexOf('/') + 1);
  const stem = name.replace(/\.(jpe?g|png)$/i, '');
  const fitting = [...machines.keys()].filter((id) => stem === id || stem.startsWith(`${id}-`)).sort((a, b) => b.length - a.length);
  const machine = fitting[0];
  if (machine === undefined) return null;
  const rest = stem.slice(machine.length + 1);
  const points = machines.get(machine) ?? [];
  const point =
    points.find((p) => rest === p) ?? points.filter((p) => rest.startsWith(`${p}-`)).sort((a, b) => b.length - a.length)[0] ?? null;
  return { path, machine, point, caption: captions.get(name) ?? captions.get(path) ?? null };
}
