/**
 * Words for exceptions that have none. In: the record. Out: a row of findings.csv for each action that the rules drafted above
 * watch. Never: a cause where nobody with a diagnosing category signs, an override, or more than overall values can say.
 */
import type { RecordAction, RecordMeasurement, SwayfolioRecord } from '../record/types.ts';
import { formatNumber } from '../words/numbers.ts';
import { say } from '../words/say.ts';
import type { Language } from '../words/sentences.ts';

/** Cells by column name; `finding_text` is the second column `finding`. Columns that are not here stay blank: they are the analyst's. */
export type DraftRow = Readonly<Record<string, string>> & { readonly finding: string };

export function draftRows(record: SwayfolioRecord): DraftRow[] {
  const drafted = record.actions.filter((a) => a.origin === 'drafted' && a.urgency !== null && a.urgency !== 'watch');
  return drafted.map((action) => draftRow(record, action));
}

function draftRow(record: SwayfolioRecord, action: RecordAction): DraftRow {
  const { language } = record.plant;
  const indications = indicationsAt(record, action);
  const target = action.verification?.target ?? null;
  const needsStop = isRepair(action);
  const isMeasured = action.value !== null && !isHeld(action);
  return {
    finding: action.action,
    machine: action.machine,
    component: action.component ?? '',
    points: action.points.join('; '),
    finding_text: observation(record, action),
    likely_cause: indications.map((i) => i.cause).join('; '),
    less_likely: indications.length === 0 ? '' : say(language, 'draft.also'),
    confidence: indications.some((i) => i.confidence === 'medium') ? 'medium' : isMeasured ? 'low' : '',
    recommendation: recommendation(language, action, needsStop),
    needs_stop: needsStop ? 'yes' : 'no',
    check_first: checkFirst(
      language,
      action,
      indications.map((i) => i.confirm),
    ),
    consequence: say(language, `draft.consequence.${consequenceOf(record, action)}`),
    due: action.due ?? '',
    verify_point: target?.point ?? '',
    verify_below: target === null ? '' : String(Number(target.value.toPrecision(4))),
  };
}

/** The reading that the action speaks of; null where it speaks of none. */
function readingOf(record: SwayfolioRecord, action: RecordAction): RecordMeasurement | null {
  const at = record.measurements.filter((m) => m.machine === action.machine && action.points.includes(m.point));
  const { quantity } = action.facts;
  return at.find((m) => m.value === action.value) ?? at.find((m) => m.quantity === quantity) ?? null;
}

/** The level rests on an earlier reading, or on none: the work is to measure. */
const isHeld = (action: RecordAction): boolean => action.rule === 'M1' || action.rule === 'M2' || action.rule === 'M3';

/** In C and D, and their ratio classes, the work is a repair; below them it is to measure again and to find why. */
const isRepair = (action: RecordAction): boolean => /^[CD]\d$/.test(action.rule ?? '');

/** What was read, where, against what and when. */
function observation(record: SwayfolioRecord, action: RecordAction): string {
  const { language } = record.plant;
  const m = readingOf(record, action);
  const sentences = [`${action.reason.charAt(0).toUpperCase()}${action.reason.slice(1)}`];
  if (m !== null && !isHeld(action)) {
    const unit = m.detection === null ? m.unit : `${m.unit} ${m.detection}`;
    if (m.previous !== null) sentences.push(say(language, 'draft.previous', { value: m.previous.value, unit, date: m.previous.date }));
    if (m.baseline !== null) sentences.push(baselineSentence(language, m.baseline, unit));
    for (const doubt of m.doubts) sentences.push(doubt.message);
  }
  return sentences.join(' ');
}

function baselineSentence(language: Language, baseline: NonNullable<RecordMeasurement['baseline']>, unit: string): string {
  const { value, from, n, provisional } = baseline;
  if (n === 0) return say(language, 'draft.baseline.stated', { value: formatNumber(language, value), unit, from });
  return say(language, 'draft.baseline', {
    value,
    unit,
    n,
    from,
    provisional: provisional ? say(language, 'draft.baseline.provisional') : '',
  });
}

interface Told {
  readonly cause: string;
  readonly confirm: string;
  readonly confidence: string;
}

/** Indications of the machine that are about this reading, or about no one bearing. */
function indicationsAt(record: SwayfolioRecord, action: RecordAction): Told[] {
  if (isHeld(action)) return [];
  const machine = record.machines.find((m) => m.machine === action.machine);
  return (machine?.indications ?? []).flatMap((indication) => {
    const { point, confidence } = indication.facts;
    if (indication.cause === undefined || (typeof point === 'string' && !action.points.includes(point))) return [];
    return [{ cause: indication.cause, confirm: indication.confirm, confidence: String(confidence) }];
  });
}

/** What to do, running or stopped, by when. */
function recommendation(language: Language, action: RecordAction, needsStop: boolean): string {
  const how = isHeld(action) ? [] : [say(language, needsStop ? 'draft.stop' : 'draft.running')];
  const when =
    action.urgency === 'now' ? [say(language, 'draft.now')] : action.due === null ? [] : [say(language, 'draft.by', { due: action.due })];
  return [action.recommendation ?? '', ...how, ...when].filter((t) => t !== '').join(' ');
}

function checkFirst(language: Language, action: RecordAction, confirms: readonly string[]): string {
  const tests = [...new Set(confirms)];
  const confirm = tests.length === 0 ? [] : [say(language, 'draft.confirm', { tests: tests.join('; ') })];
  return [action.check_first ?? '', ...confirm, say(language, 'draft.isolate')].filter((t) => t !== '').join(' ');
}

function consequenceOf(record: SwayfolioRecord, action: RecordAction): 'D' | 'C' | 'class' | 'change' | 'unknown' {
  const m = readingOf(record, action);
  if (isHeld(action) || m === null) return 'unknown';
  if (m.zone === 'D' || m.zone === 'C') return m.zone;
  return m.ratio_class === 'r-C' || m.ratio_class === 'r-D' ? 'class' : 'change';
}
