/**
 * Reading a record. In: the text of record.json. Out: a Record of today's format. Older formats are upgraded step by step,
 * future ones refused with a hint.
 */
import { UserError } from '../shell/types.ts';
import { recordFault } from './check.ts';
import { RECORD_FORMAT, type SwayfolioRecord } from './types.ts';

type Upgrade = (record: Record<string, unknown>) => Record<string, unknown>;

/** Step n makes format n + 2 of format n + 1; none yet, since format 1 is the first. */
const UPGRADES: readonly Upgrade[] = [];

/** Throws UserError for what is no record of swayfolio, or one of a later format. */
export function readRecord(text: string): SwayfolioRecord {
  const value = parse(text);
  const format = value['format'];
  if (typeof format !== 'number' || !Number.isInteger(format) || format < 1)
    throw new UserError('This is no record of swayfolio: it has no format number.', 'Give the record.json of a report.');
  if (format > RECORD_FORMAT)
    throw new UserError(
      `The record has format ${format}; this swayfolio reads up to ${RECORD_FORMAT}.`,
      'Use the version of swayfolio that wrote it, or a later one.',
    );
  let record = value;
  for (const upgrade of UPGRADES.slice(format - 1)) record = upgrade(record);
  const fault = recordFault(record);
  if (fault !== null)
    throw new UserError(`The record is not whole: ${fault}.`, 'The file may be cut off or edited; take it from the archive again.');
  if ((record['cautions'] as unknown[]).length === 0)
    throw new UserError('The record has no cautions; no report is made without them.', 'Take the record from the archive again.');
  return record as unknown as SwayfolioRecord;
}

function parse(text: string): Record<string, unknown> {
  let value: unknown;
  try {
    value = JSON.parse(text.startsWith('\ufeff') ? text.slice(1) : text);
  } catch (error) {
    throw new UserError(`The record is no JSON: ${(error as Error).message}.`, 'Give the record.json of a report, whole.');
  }
  if (value === null || typeof value !== 'object' || Array.isArray(value))
    throw new UserError('This is no record of swayfolio.', 'Give the record.json of a report.');
  return value as Record<string, unknown>;
}
