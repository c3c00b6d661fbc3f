import type { Day } from '../plant/day.ts';
import type { LimitRow, MeasuredOn, Series } from '../plant/types.ts';
import type { AppliedSet, LimitSet, OwnLimits } from './types.ts';

/** A row of limits.csv as a set. */
function setOf(row: LimitRow): LimitSet {
  return {
    id: row.limitSet,
    title: row.title ?? row.limitSet,
    basis: row.basis,
    source: row.source,
    edition: row.edition,
    table: null,
    confidence: null,
    quantity: row.quantity,
    unit: row.unit,
    detection: row.detection,
    measuredOn: row.measuredOn,
    lowHz: row.lowHz,
    highHz: row.highHz,
    ab: row.ab,
    bc: row.bc,
    cd: row.cd,
    alarm: row.alarm,
    trip: row.trip,
    validFrom: row.validFrom,
    approvedBy: row.approvedBy,
    approvedOn: row.approvedOn,
    published: false,
    acceptance: false,
  };
}

/** Index of the plant's own limits, made once for a plant. */
export function ownLimits(rows: readonly LimitRow[]): OwnLimits {
  const byName = new Map<string, LimitSet[]>();
  const applied: AppliedSet[] = [];
  for (const row of rows) {
    const set = setOf(row);
    const named = byName.get(set.id);
    if (named === undefined) byName.set(set.id, [set]);
    else named.push(set);
    if (row.appliesMachine !== null || row.appliesComponent !== null || row.appliesPoint !== null || row.appliesKind !== null) {
      applied.push({ set, machine: row.appliesMachine, component: row.appliesComponent, point: row.appliesPoint, kind: row.appliesKind });
    }
  }
  return { byName, applied };
}

export type Found = { readonly set: LimitSet } | { readonly conflict: string } | null;

/**
 * The one set of a list that is in force for a series on a day: of its quantity and measuring place, the last valid_from
 * up to that day, of the same detection before another. Two that remain are a conflict.
 */
export function inForceFor(
  sets: readonly LimitSet[],
  series: Series,
  measuredOn: MeasuredOn | null,
  day: Day,
  namedAtPoint = false,
): Found {
  // What shakes a pipe or a frame is no bearing: limits reach it only where they say so, or where the point itself names them.
  const isElsewhere = !namedAtPoint && (measuredOn === 'pipe' || measuredOn === 'structure');
  const isThere = (s: LimitSet): boolean => (s.measuredOn === null ? !isElsewhere : measuredOn === null || s.measuredOn === measuredOn);
  const fitting = sets.filter((s) => s.quantity === series.quantity && isThere(s) && (s.validFrom === null || s.validFrom <= day));
  const last = new Map<string, LimitSet[]>();
  for (const set of fitting) {
    const key = [set.id, set.detection ?? '', set.measuredOn ?? '', set.lowHz ?? '', set.highHz ?? ''].join('\u0000');
    const kept = last.get(key) ?? [];
    const from = kept[0]?.validFrom ?? Number.NEGATIVE_INFINITY;
    const own = set.validFrom ?? Number.NEGATIVE_INFINITY;
    if (kept.length === 0 || own > from) last.set(key, [set]);
    else if (own === from) kept.push(set);
  }
  const left = [...last.values()].flat();
  const same = left.filter((s) => s.detection === series.detection);
  const candidates = same.length > 0 ? same : left;
  const [first, second] = candidates;
  if (first === undefined) return null;
  if (second === undefined) return { set: first };
  const place = (s: LimitSet): string => `${s.id} (${s.ab ?? ''}/${s.bc ?? ''}/${s.cd ?? ''} ${s.unit})`;
  return { conflict: `two limits of the plant are in force at one rank: ${place(first)} and ${place(second)}` };
}
