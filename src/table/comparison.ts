/**
 * comparison.csv: one row a fact, all sections in one table. In: the Comparison. Out: the same columns for each section, the cautions last.
 * Never: a figure without its record.
 */
import type { Comparison } from '../record/comparison.ts';
import { csvText } from './csv.ts';

export const COMPARISON_COLUMNS = [
  'section',
  'kind',
  'machine',
  'point',
  'quantity',
  'detection',
  'of',
  'survey',
  'before',
  'after',
  'unit',
  'since',
  'until',
  'by',
  'why',
  'previous_record',
  'previous_file',
  'previous_line',
  'record',
  'file',
  'line',
  'date',
  'instrument',
  'person',
  'caution',
] as const;

type Cells = { readonly [C in (typeof COMPARISON_COLUMNS)[number]]?: string | number | null };

const short = (cautions: readonly string[]): string =>
  [0, 1, 3]
    .map((i) => cautions[i] ?? '')
    .filter((t) => t !== '')
    .join(' ');

export function comparisonCsv(comparison: Comparison): string {
  const caution = short(comparison.cautions);
  const rows = [...records(comparison), ...readings(comparison), ...changes(comparison), ...coverage(comparison), ...actions(comparison)];
  return csvText([
    COMPARISON_COLUMNS,
    ...rows.map((row) => COMPARISON_COLUMNS.map((column) => (column === 'caution' ? caution : String(row[column] ?? '')))),
  ]);
}

function records({ records: list, notes }: Comparison): Cells[] {
  return [
    ...list.map((r) => ({
      section: 'record',
      of: r.tool,
      kind: `format ${r.format}`,
      survey: r.survey,
      record: r.record,
      after: r.number === null ? 'not issued' : `${r.number} revision ${r.revision}`,
      since: r.issued_on,
      by: r.approved_by,
      date: r.date,
      why: `policy ${r.policy_hash}`,
    })),
    ...notes.map((why) => ({ section: 'note', why })),
  ];
}

function readings(c: Comparison): Cells[] {
  return [
    ...c.restated.map((r) => ({
      section: 'restated history',
      ...r,
      previous_record: r.before_record,
      previous_file: r.before_file,
      previous_line: r.before_line,
    })),
    ...c.verdicts.map((v) => ({
      section: 'verdict',
      ...v,
      kind: v.why === null ? 'as today' : 'differs',
      of: v.limit_set,
      before: v.issued,
      after: v.today,
    })),
    ...c.past_due.map((p) => ({ section: 'past its end', ...p, until: p.ended, after: `${p.readings} readings` })),
    ...c.forecasts.map((f) => ({
      section: 'forecast',
      ...f,
      kind: f.outcome,
      of: f.boundary,
      before: f.limit,
      since: f.earliest,
      until: f.latest,
      after: f.likely,
      why: f.came,
    })),
  ];
}

function changes(c: Comparison): Cells[] {
  return [
    ...c.changes.map((change) => ({ section: 'change', ...change })),
    ...c.vanished.map((v) => ({ section: 'vanished point', ...v, previous_record: v.last_record })),
  ];
}

function coverage(c: Comparison): Cells[] {
  return c.coverage.flatMap(({ machine, criticality, surveys, longest_days: longest, from, to, quarters_missed: missed }): Cells[] => [
    {
      section: 'coverage of a machine',
      machine,
      kind: criticality,
      of: 'longest time unmeasured, days',
      after: longest,
      since: from,
      until: to,
    },
    {
      section: 'coverage of a machine',
      machine,
      kind: criticality,
      of: 'quarters without a reading',
      after: missed.length,
      why: missed.join(' '),
    },
    ...surveys.map((s) => ({
      section: 'coverage',
      machine,
      kind: criticality,
      survey: s.survey,
      after: s.status,
      of: `${s.measured} of ${s.of} points`,
      why: s.why,
      record: s.record,
      date: s.date,
    })),
  ]);
}

function actions(c: Comparison): Cells[] {
  return [
    ...c.actions.map((a) => ({
      section: 'action',
      kind: a.status,
      machine: a.machine,
      point: a.points.join('; '),
      of: a.action,
      before: a.before,
      after: a.after,
      since: a.raised,
      until: a.closed,
      by: a.closed_by,
      previous_record: a.first_record,
      record: a.last_record,
      date: a.ordered,
      why: [
        `reported ${a.times_reported} times`,
        `${a.days_open} days open`,
        ...(a.verification === null ? [] : [a.verification]),
        ...a.flags,
      ].join('; '),
    })),
    ...c.as_found.map((f) => ({
      section: 'as found',
      machine: f.machine,
      of: f.action,
      before: [f.said, f.cause].filter((t) => t !== null).join(' '),
      after: f.as_found,
      until: f.closed,
      by: f.closed_by,
      record: f.record,
    })),
  ];
}
