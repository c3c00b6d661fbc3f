/**
 * Choosing a published set by rule (section 1 of the assessment). In: kind, power, speed, shaft height, support. Out: the
 * set with its reason, or no published zone with its reason. Never: a guess where a figure is missing.
 */
import type { ComponentRow, Kind } from '../plant/types.ts';
import type { Facts } from '../words/facts.ts';
import { fanSetId } from './iso14694.ts';
import { pumpSetId } from './iso10816-7.ts';
import { groupSetId, SHAFT_SPEED_RANGE_RPM, shaftSet } from './iso20816-3.ts';
import { gearSet } from './iso20816-9.ts';
import { publishedById } from './published.ts';
import type { LimitSet } from './types.ts';

export interface RuleQuestion {
  readonly row: ComponentRow;
  readonly quantity: string;
  readonly shaftRelative: boolean;
  readonly speedRpm: number | null;
  /** Support in the measuring direction: the point's, else the component's. */
  readonly support: 'rigid' | 'flexible' | null;
  /** A component of the train is a reciprocating machine. */
  readonly coupledToReciprocating: boolean;
  /** A steam turbine above 40 MW drives the train. */
  readonly largeTurbineSet: boolean;
  readonly policy: { readonly group2MaxKw: number; readonly group1MinKw: number };
}

export interface RuleAnswer {
  readonly set: LimitSet | null;
  readonly rule: string;
  readonly facts: Facts;
}

const none = (rule: string, facts: Facts = {}): RuleAnswer => ({ set: null, rule: `limits.none.${rule}`, facts });

/** Kinds outside every built-in set [recalled]. */
const OUTSIDE: ReadonlySet<Kind> = new Set([
  'displacement pump',
  'screw compressor',
  'lobe blower',
  'vacuum pump',
  'reciprocating',
  'hydro turbine',
  'gas turbine',
  'screen',
  'other',
]);

const SPEED_RANGE_RPM = [120, 30000] as const;
const LEAST_KW = 15;
const GROUP_1_ABOVE_KW = 300;
const FRAME_GROUP_1_MM = 315;
const FRAME_GROUP_2_MM = 160;
const LARGE_TURBINE_KW = 40000;
const PUMP_LEAST_KW = 1;
const PUMP_STEP_KW = 200;
const FAN_MOST_KW = 300;

export function chooseByRule(q: RuleQuestion): RuleAnswer {
  const { row } = q;
  if (q.quantity !== 'velocity' && q.quantity !== 'displacement')
    return q.quantity === 'acceleration' ? none('acceleration') : none('own_quantity', { quantity: q.quantity });
  if (row.kind === null) return none('kind');
  if (OUTSIDE.has(row.kind)) return none('outside', { kind: row.kind });
  if (q.coupledToReciprocating) return none('reciprocating');
  if (q.shaftRelative) return byShaft(q);
  if (row.kind === 'pump' || (row.kind === 'motor' && row.pumpCategory !== null)) return forPump(q);
  if (row.kind === 'gearbox') return forGear(q);
  if ((row.kind === 'steam turbine' || row.kind === 'generator') && q.largeTurbineSet) return forLargeTurbine(q);
  if (row.kind === 'fan' && row.fanCategory !== null && q.support === 'flexible') {
    // Which standard serves it depends on the power: unknown, neither is taken.
    if (row.powerKw === null) return none('power', { kind: row.kind });
    if (row.powerKw <= FAN_MOST_KW) return forFan(q, row.fanCategory);
  }
  return byGroup(q);
}

/** The row of a published set for the quantity asked, or none because the set has no such row. */
function rowOf(id: string, q: RuleQuestion, rule: string, facts: Facts): RuleAnswer {
  const rows = publishedById(id);
  const set = rows.find((s) => s.quantity === q.quantity);
  const title = rows[0]?.source ?? id;
  return set === undefined ? none('quantity', { quantity: q.quantity, source: title }) : { set, rule: `limits.rule.${rule}`, facts };
}

function byShaft(q: RuleQuestion): RuleAnswer {
  if (q.quantity !== 'displacement') return none('shaft_quantity', { quantity: q.quantity });
  if (q.speedRpm === null) return none('shaft_speed');
  const [least, most] = SHAFT_SPEED_RANGE_RPM;
  if (q.speedRpm < least || q.speedRpm > most) return none('speed', { speed_rpm: q.speedRpm, least, most });
  return { set: shaftSet(q.speedRpm), rule: 'limits.rule.shaft', facts: { speed_rpm: q.speedRpm } };
}

function forPump(q: RuleQuestion): RuleAnswer {
  const { powerKw, pumpCategory, kind } = q.row;
  if (pumpCategory === null) return none('pump_category');
  if (powerKw === null) return none('power', { kind });
  if (powerKw <= PUMP_LEAST_KW) return none('small', { power_kw: powerKw, least: PUMP_LEAST_KW, source: 'ISO 10816-7' });
  return rowOf(pumpSetId(pumpCategory, powerKw > PUMP_STEP_KW), q, kind === 'motor' ? 'pump_motor' : 'pump', {
    category: pumpCategory,
    power_kw: powerKw,
  });
}

function forGear(q: RuleQuestion): RuleAnswer {
  const rating = q.row.gearRatingVr;
  if (rating === null) return none('gear_rating');
  const set = gearSet(rating);
  if (set === null) return none('gear_ladder', { rating });
  return q.quantity === 'velocity'
    ? { set, rule: 'limits.rule.gear', facts: { rating } }
    : none('quantity', { quantity: q.quantity, source: 'ISO 20816-9 by VR rating' });
}

function forLargeTurbine(q: RuleQuestion): RuleAnswer {
  if (q.speedRpm === null) return none('turbine_speed');
  const id =
    q.speedRpm === 3000 || q.speedRpm === 3600 ? 'iso20816-2-3000' : q.speedRpm === 1500 || q.speedRpm === 1800 ? 'iso20816-2-1500' : null;
  return id === null ? none('turbine_speed') : rowOf(id, q, 'large_turbine', { speed_rpm: q.speedRpm });
}

function forFan(q: RuleQuestion, category: string): RuleAnswer {
  if (category === 'BV-1') return none('fan_category', { category });
  return rowOf(fanSetId(category, 'flexible'), q, 'fan', { category });
}

/** ISO 20816-3: the group by shaft height for motors and generators, by power for all else; then the support. */
function byGroup(q: RuleQuestion): RuleAnswer {
  const { kind, powerKw } = q.row;
  const [least, most] = SPEED_RANGE_RPM;
  if (q.speedRpm !== null && (q.speedRpm < least || q.speedRpm > most)) return none('speed', { speed_rpm: q.speedRpm, least, most });
  if (powerKw !== null && powerKw <= LEAST_KW) return none('small', { power_kw: powerKw, least: LEAST_KW, source: 'ISO 20816-3' });
  const group = kind === 'motor' || kind === 'generator' ? electricalGroup(q) : powerGroup(q);
  if ('set' in group) return group;
  if (q.support === null) return none('support');
  const facts = {
    kind,
    group: group.group,
    support: q.support,
    power_kw: powerKw,
    shaft_height_mm: q.row.shaftHeightMm,
    speed_rpm: q.speedRpm,
  };
  return rowOf(groupSetId(group.group, q.support), q, q.speedRpm === null ? `${group.by}_speed_unknown` : group.by, facts);
}

type Group = { readonly group: 1 | 2; readonly by: 'shaft_height' | 'power' };

function electricalGroup(q: RuleQuestion): Group | RuleAnswer {
  const { shaftHeightMm, powerKw } = q.row;
  if (shaftHeightMm !== null) {
    if (shaftHeightMm < FRAME_GROUP_2_MM) return none('small_frame', { shaft_height_mm: shaftHeightMm, least: FRAME_GROUP_2_MM });
    return { group: shaftHeightMm >= FRAME_GROUP_1_MM ? 1 : 2, by: 'shaft_height' };
  }
  if (powerKw === null) return none('shaft_height_and_power');
  if (powerKw > q.policy.group1MinKw) return { group: 1, by: 'power' };
  return powerKw <= q.policy.group2MaxKw
    ? { group: 2, by: 'power' }
    : none('shaft_height', { power_kw: powerKw, least: q.policy.group2MaxKw, most: q.policy.group1MinKw });
}

function powerGroup(q: RuleQuestion): Group | RuleAnswer {
  const { powerKw, kind } = q.row;
  if (powerKw === null) return none('power', { kind });
  return { group: powerKw > GROUP_1_ABOVE_KW ? 1 : 2, by: 'power' };
}

export const isLargeTurbine = (row: ComponentRow): boolean =>
  row.kind === 'steam turbine' && row.powerKw !== null && row.powerKw > LARGE_TURBINE_KW;
