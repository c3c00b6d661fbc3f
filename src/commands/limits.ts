/** `limits`: the published limit sets. In: an id, or none for all. Out: boundaries with source and how sure we are. Never a judgement. */
import type { LimitSet } from '../limits/types.ts';
import { dayText } from '../plant/day.ts';
import { UserError } from '../shell/types.ts';
import { type Command, jsonOption } from './command.ts';

export const limits: Command = {
  usage: 'limits [id]',
  describe: 'list the limit sets with their source and how sure they are',
  positionals: { id: { describe: 'one set', type: 'string' } },
  options: { json: jsonOption },
  async run({ id, json = false }, { shell }) {
    const { publishedSets } = await import('../limits/published.ts');
    const { nearestWord } = await import('../measure/nearest.ts');
    const all = publishedSets();
    const sets = id === undefined ? all : all.filter((set) => set.id === id);
    if (sets.length === 0) {
      const near = nearestWord(
        id ?? '',
        all.map((set) => set.id),
      );
      throw new UserError(
        `There is no limit set ${id}.`,
        near === null ? 'Run swayfolio limits for the list.' : `The nearest is ${near}.`,
        2,
      );
    }
    shell.stdout(json ? `${JSON.stringify(sets.map(asJson), null, 2)}\n` : asText(sets));
    return 0;
  },
};

/** A set of several quantities stands under its id once. */
function asText(sets: readonly LimitSet[]): string {
  const heads = sets.map((set) => [set.id, `  ${set.title}`, `  ${sourceOf(set)}`].join('\n'));
  return sets
    .map(
      (set, index) => `${heads[index] === heads[index - 1] ? '' : `${index === 0 ? '' : '\n'}${heads[index]}\n`}  ${boundariesOf(set)}\n`,
    )
    .join('');
}

const sourceOf = (set: LimitSet): string =>
  `${[set.source, set.edition, set.table].filter((part) => part !== null && part !== '').join(', ')}; ${set.confidence}`;

function boundariesOf(set: LimitSet): string {
  const boundary = (name: string, value: number | null): string => `${name} ${value ?? '–'}`;
  const band = set.lowHz === null && set.highHz === null ? '' : `, ${set.lowHz ?? '?'}–${set.highHz ?? '?'} Hz`;
  const what = `${set.quantity}, ${set.unit}${set.detection === null ? '' : ` ${set.detection}`}${band}${set.measuredOn === null ? '' : `, ${set.measuredOn}`}`;
  return `${what}: ${boundary('A/B', set.ab)}, ${boundary('B/C', set.bc)}, ${boundary('C/D', set.cd)}`;
}

/** In the names of the record's limit_sets. */
function asJson(set: LimitSet): object {
  return {
    id: set.id,
    title: set.title,
    basis: set.basis,
    source: set.source,
    edition: set.edition,
    table: set.table,
    confidence: set.confidence,
    quantity: set.quantity,
    unit: set.unit,
    detection: set.detection,
    measured_on: set.measuredOn,
    low_hz: set.lowHz,
    high_hz: set.highHz,
    boundaries: { ab: set.ab, bc: set.bc, cd: set.cd, alarm: set.alarm, trip: set.trip },
    valid_from: dayOrNull(set.validFrom),
    approved_by: set.approvedBy,
    approved_on: dayOrNull(set.approvedOn),
  };
}

const dayOrNull = (day: number | null): string | null => (day === null ? null : dayText(day));
