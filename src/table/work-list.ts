/** work-list.csv: one row an action, for a work-order system. In: the record. Out: the columns of actions.csv and what the assessment adds. */
import type { RecordAction, SwayfolioRecord } from '../record/types.ts';
import { csvText } from './csv.ts';

const LEDGER_COLUMNS = [
  'action',
  'finding',
  'machine',
  'raised',
  'recommendation',
  'due',
  'owner',
  'work_order',
  'status',
  'closed',
  'closed_by',
  'as_found',
  'verify_point',
  'verify_below',
  'notes',
] as const;
const ADDED_COLUMNS = ['urgency', 'rule', 'reason', 'check_first', 'points', 'value', 'unit', 'limit', 'survey', 'caution'] as const;

export const WORK_LIST_COLUMNS: readonly string[] = [...LEDGER_COLUMNS, ...ADDED_COLUMNS];

/** Numbers as the record has them, at most six significant digits, with a dot: another program reads them. */
const numberCell = (value: number | null): string => (value === null ? '' : String(Number(value.toPrecision(6))));

function rowOf(action: RecordAction, survey: string, caution: string): string[] {
  const target = action.verification?.target ?? null;
  return [
    action.action,
    action.finding ?? '',
    action.machine,
    action.raised ?? '',
    action.recommendation ?? '',
    action.due ?? '',
    action.owner ?? '',
    action.work_order ?? '',
    action.status,
    action.closed ?? '',
    action.closed_by ?? '',
    action.as_found ?? '',
    target?.point ?? '',
    numberCell(target?.value ?? null),
    action.notes ?? '',
    action.urgency ?? '',
    action.rule ?? '',
    action.reason,
    action.check_first ?? '',
    action.points.join('; '),
    numberCell(action.value),
    action.unit ?? '',
    numberCell(action.limit),
    survey,
    caution,
  ];
}

/** The cautions in short: screening, maker's limits, who decides. */
export const shortCaution = (record: SwayfolioRecord): string =>
  [0, 1, 3]
    .map((i) => record.cautions[i] ?? '')
    .filter((t) => t !== '')
    .join(' ');

export function workList(record: SwayfolioRecord): string {
  const caution = shortCaution(record);
  return csvText([WORK_LIST_COLUMNS, ...record.actions.map((action) => rowOf(action, record.survey.id, caution))]);
}
