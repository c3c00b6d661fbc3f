/** The method pages: limit sets, rules and policy in force, problems of the input; and the plant over time. */
import { fromHz } from '../measure/units.ts';
import type { LimitSetLine, RuleLine } from '../record/types.ts';
import { slugOf } from './file-name.ts';
import type { Format } from './format.ts';
import { decisionOfAll } from './issue.ts';

/** A boundary as its source prints it; one that was computed, to three digits. */
const boundary = (format: Format, value: number | null): string =>
  value === null ? '–' : Math.round(value * 1000) / 1000 === value ? format.plain(value) : format.number(value);

function limitView(format: Format, set: LimitSetLine) {
  const { ab, bc, cd } = set.boundaries;
  const frequency = format.record.plant.frequency_unit;
  const edge = (hz: number | null): string => (hz === null ? '…' : format.plain(fromHz(hz, frequency)));
  const band =
    set.low_hz === null && set.high_hz === null
      ? ''
      : `${format.say('view.span', { from: edge(set.low_hz), to: edge(set.high_hz) })} ${frequency}`;
  return {
    id: set.id,
    anchor: `limit-${slugOf(set.id)}`,
    title: set.title,
    quantity: format.term(set.quantity),
    unit: format.unit(set.unit, set.detection),
    ab: boundary(format, ab),
    bc: boundary(format, bc),
    cd: boundary(format, cd),
    band,
    basis: format.term(set.basis),
    source: [set.source, set.edition, set.table].filter((t) => t !== null).join(', '),
    confidence: set.confidence === null ? approval(format, set) : format.say(`view.sure.${set.confidence}`),
  };
}

export function approval(format: Format, set: LimitSetLine): string {
  const by = set.approved_by === null ? format.say('view.approval.none') : format.say('view.approval.by', { by: set.approved_by });
  const on = set.approved_on === null ? by : format.say('view.approval.on', { by, date: format.date(set.approved_on) });
  return set.valid_from === null ? on : `${on}${format.say('view.approval.valid', { date: format.date(set.valid_from) })}`;
}

export function methodView(format: Format) {
  const { record } = format;
  const rules = record.rules ?? [];
  const rule = (r: RuleLine) => ({ id: r.id, mark: format.term(r.mark), about: format.ruleAbout(r) });
  const level = (r: RuleLine, column: number): string => format.term(r.levels[column] ?? '');
  return {
    sets: record.limit_sets.map((set) => limitView(format, set)),
    hasSets: record.limit_sets.length > 0,
    policy: record.policy.map((p) => ({
      id: p.id,
      value: format.plain(p.value),
      unit: format.term(p.unit),
      mark: format.term(p.mark),
      about: format.policyAbout(p),
      changed: p.overridden,
    })),
    hash: record.policy_hash,
    urgencyRules: rules
      .filter((r) => r.levels.length > 0)
      .map((r) => ({
        ...rule(r),
        critical: level(r, 0),
        essential: level(r, 1),
        general: level(r, 2),
        spare: [3, 4, 5].map((i) => level(r, i)).join(' / '),
      })),
    otherRules: rules.filter((r) => r.levels.length === 0).map(rule),
    hasRules: rules.length > 0,
    decision: decisionOfAll(format),
    problems: record.problems
      .filter((p) => p.severity !== 'note')
      .map((p) => ({ place: p.line === null ? p.file : `${p.file}:${p.line}`, message: p.message })),
    hasProblems: record.problems.some((p) => p.severity !== 'note'),
    inputs: record.inputs.map((i) => ({ path: i.path, bytes: String(i.bytes), sha256: i.sha256 })),
  };
}

const WORST_FIRST = ['D', 'C', 'B', 'A', 'r-D', 'r-C', 'r-B', 'r-A', 'not assessed'] as const;

/** Machines by condition, coverage and the ledger at each survey. */
export function overTimeView(format: Format) {
  const { plant_over_time: lines } = format.record;
  const rows = lines.map((line) => ({
    survey: format.survey(line.survey),
    conditions: WORST_FIRST.filter((c) => line.conditions[c] > 0)
      .map((c) => `${line.conditions[c]} ${format.term(c)}`)
      .join(', '),
    points: format.say('view.n_of_m', { n: line.measured, of: line.of }),
    open: String(line.open_actions),
    repeats: line.repeats === undefined ? '' : String(line.repeats),
    closed: String(line.closed_actions),
    closureDays: line.closure_days == null ? '' : format.plain(line.closure_days),
  }));
  return { rows, hasRows: rows.length > 1 };
}
