/** What an issue says of itself, and the decision rule of its verdicts. In: the record. Out: finished strings. Never: a zone judged again. */
import type { RecordMeasurement } from '../record/types.ts';
import type { Format } from './format.ts';

const NEAR = '2.near.share';

export function issueFields(format: Format): readonly { readonly label: string; readonly value: string }[] {
  const { issue, plant } = format.record;
  if (issue === null) return [];
  const fields = [{ label: format.say('view.previous_manifest'), value: issue.previous_manifest ?? format.say('view.first_issue') }];
  if (issue.replaces !== null)
    fields.unshift({
      label: format.say('view.replaces'),
      value: format.say('view.replaces.text', { issue: issue.replaces, reason: issue.reason ?? '' }),
    });
  if (plant.retention !== null && issue.retention_due !== undefined)
    fields.push({ label: format.say('view.due'), value: dueText(format, issue.retention_due) });
  return fields;
}

function dueText(format: Format, due: readonly string[] | null): string {
  if (due === null) return format.say('view.due.unknown');
  return due.length === 0 ? format.say('view.due.none') : format.say('view.due.some', { issues: due.join(', ') });
}

export const issueChanges = (format: Format): readonly string[] => format.record.issue?.changes ?? [];

/** The plant stated an uncertainty of its own; else the instrument tolerance of the policy stands. */
export const isUncertaintyStated = (format: Format): boolean => format.record.policy.some((line) => line.id === NEAR && line.overridden);

/** Limit sets with edition, boundary rule and what is done about uncertainty, for the verdicts of these readings. */
export function decisionText(format: Format, measurements: readonly RecordMeasurement[]): string {
  const used = new Set(measurements.flatMap((m) => (m.limit_set === null ? [] : [m.limit_set])));
  const sets = format.record.limit_sets.filter((set) => used.has(set.id));
  const named = new Set(
    sets.map((set) => `${set.id} (${[set.source, set.edition, set.table].filter((part) => part !== null).join(', ') || set.title})`),
  );
  return ruleText(format, named.size === 0 ? format.say('view.decision.none') : [...named].join('; '));
}

/** The same where every set is listed beside it. */
export const decisionOfAll = (format: Format): string => ruleText(format, format.say('view.decision.listed'));

function ruleText(format: Format, sets: string): string {
  const share = format.record.policy.find((line) => line.id === NEAR)?.value ?? 0;
  const percent = format.plain(Math.round(share * 1000) / 10);
  const uncertainty = isUncertaintyStated(format)
    ? format.say('view.decision.stated', { percent })
    : format.say('view.decision.tolerance', { percent });
  return format.say('view.decision', { sets, uncertainty });
}
