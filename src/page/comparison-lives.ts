/** Changes, coverage and actions of the Comparison as chapters. In: a Comparison. Out: tables of finished strings. Never: a figure of its own. */
import type { Comparison } from '../record/comparison.ts';
import { type Chapter, cell, chapter, placeText, seriesName } from './comparison-table.ts';

export function changeChapters(c: Comparison): Chapter[] {
  return [
    chapter(
      'changes',
      'What changed',
      'Limits, limit sets, baselines, policy, points, ids, units, machines, instruments, calibrations, people and qualifications, from one record to the next.',
      'Nothing changed.',
      ['What', 'Of', 'Before', 'After', 'From', 'Approved by', 'Records'],
      c.changes.map((x) => [
        cell(x.kind),
        cell(x.of),
        cell(x.before ?? 'none'),
        cell(x.after ?? 'none'),
        cell(x.since),
        cell(x.by ?? 'nobody named'),
        cell(`${x.previous_record} → ${x.record}`),
      ]),
    ),
    chapter(
      'past-due',
      'Readings past a calibration or qualification',
      'Readings taken after the day on which the paper ended.',
      'None: each paper that is stated was in force.',
      ['Of', 'What', 'Ended', 'Survey', 'Readings', 'First of them'],
      c.past_due.map((p) => [cell(p.of), cell(p.kind), cell(p.ended), cell(p.survey), cell(p.readings), cell(placeText(p))]),
    ),
  ];
}

export function coverageChapters(c: Comparison): Chapter[] {
  const whole = (s: Comparison['coverage'][number]['surveys'][number]): boolean => s.status === 'measured';
  const gaps = c.coverage.flatMap((m) =>
    m.surveys
      .filter((s) => !whole(s))
      .map((s) => [
        cell(m.machine),
        cell(m.criticality),
        cell(s.survey),
        cell(s.status),
        cell(s.why ?? 'not stated'),
        cell(`${s.measured} of ${s.of}`),
        cell(s.record),
      ]),
  );
  return [
    chapter(
      'coverage',
      'Coverage',
      'How often each machine was measured, its longest time without a reading, and the calendar quarters that had none.',
      'No machine.',
      ['Machine', 'Criticality', 'Surveys with a reading', 'Longest time, days', 'Quarters without a reading'],
      c.coverage.map((m) => [
        cell(m.name === null ? m.machine : `${m.machine} ${m.name}`),
        cell(m.criticality),
        cell(`${m.surveys.filter((s) => s.measured > 0).length} of ${m.surveys.length}`),
        cell(m.longest_days === null ? 'never measured' : `${m.longest_days} (${m.from} to ${m.to})`),
        cell(m.quarters_missed.length === 0 ? 'none' : m.quarters_missed.join(', ')),
      ]),
    ),
    chapter(
      'not-measured',
      'Not measured, or not whole',
      'Each machine at each survey that was not measured at every point, with the commonest reason. At every other survey it was measured whole.',
      'Every machine was measured whole at every survey.',
      ['Machine', 'Criticality', 'Survey', 'State', 'Why', 'Points', 'Record'],
      gaps,
    ),
    chapter(
      'vanished',
      'Points that vanished',
      'Series of one record that the next one does not have under any name.',
      'None.',
      ['Series', 'Last record', 'Gone from', 'Record'],
      c.vanished.map((v) => [cell(seriesName(v)), cell(v.last_record), cell(v.since), cell(v.record)]),
    ),
  ];
}

export function actionChapters(c: Comparison): Chapter[] {
  return [
    chapter(
      'actions',
      'Actions from raised to verified',
      'What is only watched is no action. Verified means: a comparable reading after closing at or below the target that was fixed before.',
      'No action.',
      ['Action', 'Recommended', 'Raised, ordered', 'Closed by', 'Days open', 'Verification', 'What is missing; reported in'],
      c.actions.map((a) => [
        cell(`${a.action} ${a.points.join(', ')}`),
        cell(a.recommendation ?? ''),
        cell(
          `${a.raised ?? 'not stated'}; ${a.ordered === null ? 'not reported as ordered' : `ordered, reported ${a.ordered}`}${a.work_order === null ? '' : `, ${a.work_order}`}; reported ${a.times_reported}×`,
        ),
        cell(a.closed === null ? a.status : `${a.status} ${a.closed}, ${a.closed_by ?? 'nobody named'}`),
        cell(a.days_open ?? ''),
        cell(
          `${a.verification ?? 'none'}${a.before === null ? '' : `; before ${a.before}`}${a.after === null ? '' : `; after ${a.after}`}`,
        ),
        cell([...a.flags, `${a.first_record} to ${a.last_record}`].join('; ')),
      ]),
    ),
    chapter(
      'as-found',
      'As found, against what was said',
      'Notes of what was found when the work was done.',
      'No note of what was found.',
      ['Action', 'Said', 'Found', 'Closed by', 'Record'],
      c.as_found.map((f) => [
        cell(f.action),
        cell([f.said ?? '', f.cause === null ? '' : `Likely cause: ${f.cause}`].filter((t) => t !== '').join(' ')),
        cell(f.as_found),
        cell(`${f.closed ?? 'not closed'}, ${f.closed_by ?? 'nobody named'}`),
        cell(f.record),
      ]),
    ),
  ];
}
