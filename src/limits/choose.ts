/**
 * Which limit set judges a series. Order: limit_set of the point, of the component, the plant's rows by point, component,
 * machine, kind, then a published set by rule, then none with its reason.
 */
import { inForce, type PointRow } from '../plant/types.ts';
import { chooseByRule, isLargeTurbine } from './by-rule.ts';
import { SHAFT_SET_ID, shaftSet } from './iso20816-3.ts';
import { inForceFor, ownLimits } from './own.ts';
import { publishedById } from './published.ts';
import { ratedSpeedRpm } from './speed.ts';
import type { AppliedSet, LimitChoice, LimitQuestion, LimitSet } from './types.ts';

export { ownLimits };

const conflictOf = (conflict: string): LimitChoice => ({
  set: null,
  rule: 'limits.none.conflict',
  facts: { conflict },
  conflict,
  byOurChoice: false,
});

const without = (rule: string, facts: LimitChoice['facts'] = {}): LimitChoice => ({
  set: null,
  rule,
  facts,
  conflict: null,
  byOurChoice: false,
});

/** The one set for a series on a day, or none, with the reason as key and facts. Throws nothing. */
export function chooseLimits(q: LimitQuestion): LimitChoice {
  const point = inForce(q.series.rows, q.day);
  const component = inForce(q.component.rows, q.day);
  for (const [name, by] of [
    [point.limitSet, 'point'],
    [component.limitSet, 'component'],
  ] as const) {
    if (name === null) continue;
    const named = byName(q, point, name, by);
    if (named !== null) return named;
  }
  const applied = byApplication(q, point, component.kind);
  if (applied !== null) return applied;
  if (point.limitSet !== null || (component.limitSet !== null && point.measuredOn !== 'pipe' && point.measuredOn !== 'structure')) {
    return without('limits.none.named', { limit_set: point.limitSet ?? component.limitSet, quantity: q.series.quantity });
  }
  return byRule(q, point);
}

/** A set by its name: the plant's own of that name, else a built-in one. null where it has no row for this quantity. */
function byName(q: LimitQuestion, point: PointRow, name: string, by: 'point' | 'component'): LimitChoice | null {
  const own = q.own.byName.get(name) ?? [];
  const published = own.length > 0 ? [] : builtIn(q, name);
  if (own.length === 0 && published === null) return q.series.quantity === 'displacement' ? without('limits.none.shaft_speed') : null;
  if (own.length === 0 && published?.length === 0) return conflictOf(`no limit set is called "${name}"`);
  const found = inForceFor(own.length > 0 ? own : (published ?? []), q.series, point.measuredOn, q.day, by === 'point');
  if (found === null) return null;
  if ('conflict' in found) return conflictOf(found.conflict);
  return {
    set: found.set,
    rule: `limits.named.${by}`,
    facts: { limit_set: name, title: found.set.title, basis: found.set.basis },
    conflict: null,
    byOurChoice: false,
  };
}

/** Rows of a built-in set; null for the shaft formulas where the rated speed is unknown. */
function builtIn(q: LimitQuestion, name: string): readonly LimitSet[] | null {
  if (name !== SHAFT_SET_ID) return publishedById(name);
  const speedRpm = ratedSpeedRpm(q.machine, q.component, q.day);
  return speedRpm === null ? null : [shaftSet(speedRpm)];
}

const RANKS = ['point', 'component', 'machine', 'kind'] as const;

/** The plant's rows that say what they apply to, the most particular rank first. */
function byApplication(q: LimitQuestion, point: PointRow, kind: string | null): LimitChoice | null {
  const speaks = (a: AppliedSet): boolean =>
    (a.machine === null || a.machine === q.machine.id) &&
    (a.component === null || a.component === q.component.id) &&
    (a.point === null || a.point === q.series.point) &&
    (a.kind === null || a.kind === kind);
  const fitting = q.own.applied.filter(speaks);
  for (const rank of RANKS) {
    const sets = fitting.filter((a) => RANKS.find((r) => a[r] !== null) === rank).map((a) => a.set);
    const found = inForceFor(sets, q.series, point.measuredOn, q.day, rank === 'point');
    if (found === null) continue;
    if ('conflict' in found) return conflictOf(found.conflict);
    return {
      set: found.set,
      rule: `limits.own.${rank}`,
      facts: { limit_set: found.set.id, title: found.set.title, basis: found.set.basis },
      conflict: null,
      byOurChoice: false,
    };
  }
  return null;
}

function byRule(q: LimitQuestion, point: PointRow): LimitChoice {
  const place = point.measuredOn ?? 'bearing housing';
  const done = (answer: { set: LimitSet | null; rule: string; facts: LimitChoice['facts'] }): LimitChoice => ({
    ...answer,
    conflict: null,
    byOurChoice: answer.set !== null && point.direction === 'axial' && place === 'bearing housing',
  });
  if (place === 'shaft absolute') return without('limits.none.shaft_absolute');
  if (place !== 'bearing housing' && place !== 'shaft relative') return without('limits.none.place', { place });
  const rows = q.machine.components.map((c) => inForce(c.rows, q.day));
  const component = inForce(q.component.rows, q.day);
  const { policy } = q.plant;
  return done(
    chooseByRule({
      row: component,
      quantity: q.series.quantity,
      shaftRelative: place === 'shaft relative',
      speedRpm: ratedSpeedRpm(q.machine, q.component, q.day),
      support: point.support ?? component.support,
      coupledToReciprocating: rows.some((r) => r.kind === 'reciprocating'),
      largeTurbineSet: rows.some(isLargeTurbine),
      policy: { group2MaxKw: policy['1.group2.max_power'], group1MinKw: policy['1.group1.min_power'] },
    }),
  );
}
