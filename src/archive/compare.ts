/**
 * Comparing. In: records of years, and the one that holds today's limits and policy. Out: a Comparison. Never: a file read, a word
 * rendered, or a judgement on who was right.
 */
import type { Comparison } from '../record/comparison.ts';
import { COMPARISON_FORMAT } from '../record/comparison.ts';
import type { SwayfolioRecord } from '../record/types.ts';
import { UserError } from '../shell/types.ts';
import { actionsOf, asFoundOf } from './compare-actions.ts';
import { changesOf } from './compare-changes.ts';
import { coverageOf } from './compare-coverage.ts';
import { forecastsOf } from './compare-forecasts.ts';
import { pastDueOf, restatedOf, vanishedOf } from './compare-history.ts';
import { type Exceeds, verdictsOf } from './compare-verdicts.ts';
import { byCodeUnit, dateOf, Ids, inOrder, type Named } from './compared.ts';

export interface CompareOptions {
  /** The plant assessed as it stands; null: the last record is the latest there is. */
  readonly today: SwayfolioRecord | null;
  readonly toolVersion: string;
  readonly exceeds: Exceeds;
  readonly notes: readonly string[];
}

/** Throws a UserError where there is no record, or where they are of several plants. */
export function compareRecords(given: readonly Named[], { today, toolVersion, exceeds, notes }: CompareOptions): Comparison {
  const records = inOrder(given);
  const [first, last] = [records[0], records.at(-1)];
  if (first === undefined || last === undefined)
    throw new UserError('There is no record to compare.', 'Give a plant folder with issued reports, or record.json files.');
  const plants = [...new Set(records.map(({ record }) => record.plant.plant))].sort(byCodeUnit);
  const now = today ?? last.record;
  const { plant } = now;
  const ids = new Ids(now.plant.renames);
  return {
    format: COMPARISON_FORMAT,
    tool: { name: 'swayfolio', version: toolVersion },
    plant: plant.plant,
    language: plant.language,
    paper: plant.paper,
    accent: plant.contractor.accent,
    from: dateOf(first.record),
    to: dateOf(last.record),
    today: { of: today === null ? last.name : 'the plant folder as it stands', survey: now.survey.id, policy_hash: now.policy_hash },
    records: records.map(({ name, record }) => ({
      record: name,
      number: record.issue?.number ?? null,
      revision: record.issue?.revision ?? null,
      survey: record.survey.id,
      date: dateOf(record),
      format: record.format,
      tool: `${record.tool.name} ${record.tool.version}`,
      policy_hash: record.policy_hash,
      issued_on: record.issue?.issued_on ?? null,
      reviewed_by: record.survey.reviewed_by,
      approved_by: record.survey.approved_by,
    })),
    cautions: [...now.cautions],
    notes: [...notes, ...(plants.length > 1 ? [`The records bear several names of plants: ${plants.join(', ')}.`] : [])],
    restated: restatedOf(records, ids),
    verdicts: verdictsOf(records, now, ids, exceeds),
    changes: changesOf(records, ids),
    past_due: pastDueOf(records),
    coverage: coverageOf(records, ids),
    vanished: vanishedOf(records, ids),
    actions: actionsOf(records, ids),
    forecasts: forecastsOf(records, ids, exceeds),
    as_found: asFoundOf(records),
  };
}
