/**
 * The Comparison for print. In: a Comparison. Out: chapters of plain tables, the same for PDF and site, each figure with its record, file, line, date,
 * instrument and person. Never: a figure that the Comparison has not.
 */
import type { Comparison } from '../record/comparison.ts';
import { answersOf } from './comparison-answers.ts';
import { actionChapters, changeChapters, coverageChapters } from './comparison-lives.ts';
import { type Chapter, cell, chapter, placeText, seriesName } from './comparison-table.ts';

export interface ComparisonView {
  readonly lead: string;
  readonly notes: readonly string[];
  readonly answers: readonly { readonly question: string; readonly answer: string; readonly id: string }[];
  readonly chapters: readonly Chapter[];
}

export function comparisonView(c: Comparison): ComparisonView {
  return {
    lead: `${c.records.length} records of ${c.plant}, surveys ${c.from} to ${c.to}, beside the limits and the policy of ${c.today.of} (survey ${c.today.survey}).`,
    notes: c.notes,
    answers: answersOf(c),
    chapters: [restated(c), ...verdicts(c), ...changeChapters(c), ...coverageChapters(c), ...actionChapters(c), forecasts(c), records(c)],
  };
}

function restated(c: Comparison): Chapter {
  return chapter(
    'restated',
    'Restated history',
    'Past readings whose value in a later record is another. Both values, both places.',
    'No past reading differs between the records.',
    ['Reading', 'Survey', 'First told', 'There', 'Later', 'There'],
    c.restated.map((r) => [
      cell(seriesName(r)),
      cell(r.survey),
      cell(r.before ?? 'none'),
      cell(
        placeText({
          record: r.before_record,
          file: r.before_file,
          line: r.before_line,
          date: r.date,
          instrument: r.instrument,
          person: r.person,
        }),
      ),
      cell(r.after ?? 'none'),
      cell(placeText(r)),
    ]),
  );
}

function verdicts(c: Comparison): Chapter[] {
  const columns = ['Machine', 'Survey', 'As issued', 'Today', 'Governing reading', 'From'];
  const row = (v: Comparison['verdicts'][number]) => [
    cell(v.name === null ? v.machine : `${v.machine} ${v.name}`),
    cell(v.survey),
    cell(v.issued),
    cell(v.today),
    cell(v.point === null ? 'none' : `${v.point} ${v.quantity} ${v.value ?? '–'} ${v.unit}, ${v.limit_set ?? 'no limit set'}`),
    cell(placeText(v)),
  ];
  const differing = c.verdicts.filter((v) => v.why !== null);
  return [
    chapter(
      'differing',
      'Verdicts that depend on what changed',
      'Conditions as issued that are others under the limits and policy of today, and why.',
      'Each condition is the same under the limits and policy of today.',
      ['Machine', 'Survey', 'As issued', 'Today', 'Why', 'From'],
      differing.map((v) => [cell(v.machine), cell(v.survey), cell(v.issued), cell(v.today), cell(v.why ?? ''), cell(placeText(v))]),
    ),
    chapter(
      'verdicts',
      'Every condition as issued',
      'Each machine at each survey, beside the condition under the limits and policy of today. A reading is judged again by its limits and ratio classes alone: points that were not measured, bounds, bands and floors stay as issued.',
      'No machine.',
      columns,
      c.verdicts.map(row),
    ),
  ];
}

function forecasts(c: Comparison): Chapter {
  return chapter(
    'forecasts',
    'Forecasts and what came',
    'Ranges of dates (80 %) that were printed, beside the first reading above the boundary. A crossing is not a failure.',
    'No record has a forecast.',
    ['Reading', 'Survey', 'Boundary', 'Range', 'What came', 'From'],
    c.forecasts.map((f) => [
      cell(seriesName(f)),
      cell(f.survey),
      cell(`${f.boundary} ${f.limit} ${f.unit}`),
      cell(`${f.earliest} to ${f.latest ?? 'beyond the horizon'}, likely ${f.likely ?? 'beyond the horizon'}`),
      cell(`${f.outcome}: ${f.came}`),
      cell(placeText(f)),
    ]),
  );
}

function records(c: Comparison): Chapter {
  return chapter(
    'records',
    'The records compared',
    'File and line in this comparison stand in the folder inputs/ of the record that is named beside them.',
    'None.',
    ['Record', 'Survey', 'Issue', 'Issued on', 'Reviewed, approved by', 'Made by, policy'],
    c.records.map((r) => [
      cell(r.record),
      cell(r.survey),
      cell(r.number === null ? 'not issued' : `${r.number}, revision ${r.revision}`),
      cell(r.issued_on ?? ''),
      cell([r.reviewed_by, r.approved_by].map((n) => n ?? 'not stated').join(', ')),
      cell(`${r.tool}, format ${r.format}, policy ${r.policy_hash.slice(0, 12)}`),
    ]),
  );
}
