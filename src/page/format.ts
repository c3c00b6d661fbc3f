/**
 * Words and numbers for print, bound to one record. In: values with unit and detection. Out: finished strings. Templates
 * hold no logic: what they print is made here.
 */
import type { Detection } from '../measure/detection.ts';
import type { Condition, RecordMachine, RecordMeasurement, SeriesKey, SwayfolioRecord } from '../record/types.ts';
import { decimalsFor, formatNumber, NO_BREAK, plainNumber } from '../words/numbers.ts';
import { type Language, say } from '../words/say.ts';

/** A condition for print: its mark, letter and words. */
export interface ConditionView {
  /** Value for data-mark: a condition, or `none`. */
  readonly mark: string;
  readonly text: string;
  readonly isAssessed: boolean;
}

const DETECTION_WORDS: Readonly<Record<Detection, string>> = {
  rms: 'r.m.s.', 'calculated peak': 'calc. peak', 'true peak': 'true peak', 'calculated peak-to-peak': 'calc. pk-pk', 'true peak-to-peak': 'true pk-pk', mean: 'mean',
};

export class Format {
  readonly record: SwayfolioRecord;
  readonly language: Language;
  readonly #byMachine = new Map<string, RecordMeasurement[]>();

  constructor(record: SwayfolioRecord) {
    this.record = record;
    this.language = record.plant.language;
    for (const measurement of record.measurements) {
      const list = this.#byMachine.get(measurement.machine);
      if (list === undefined) this.#byMachine.set(measurement.machine, [measurement]);
      else list.push(measurement);
    }
  }

  measurementsOf(machine: string): readonly RecordMeasurement[] {
    return this.#byMachine.get(machine) ?? [];
  }

  measurement(machine: string, key: SeriesKey | null): RecordMeasurement | null {
    if (key === null) return null;
    return this.measurementsOf(machine).find((m) => m.point === key.point && m.quantity === key.quantity && m.detection === key.detection) ?? null;
  }

  say(key: string, facts = {}): string {
    return say(this.language, key, facts);
  }

  number(value: number | null, limit: number | null = null): string {
    return value === null ? '' : formatNumber(this.language, value, { limit });
  }

  /** A count, a rating, a published boundary: the decimals it was given with. */
  plain(value: number | null): string {
    return value === null ? '' : plainNumber(this.language, value);
  }

  /** A difference, with the decimals of the reading it belongs to. */
  difference(value: number, reading: number): string {
    return formatNumber(this.language, value, { decimals: decimalsFor(reading, null), sign: true });
  }

  signedPercent(value: number): string {
    return `${formatNumber(this.language, value, { decimals: 0, sign: true })}${NO_BREAK}%`;
  }

  /** The boundary that a reading is printed beside: the nearest one, so that the two can be told apart. */
  nearestLimit(m: RecordMeasurement): number | null {
    const limits = m.limits;
    if (limits === null || m.value === null) return null;
    const given = [limits.ab, limits.bc, limits.cd].filter((v): v is number => v !== null);
    const value = m.value;
    return given.sort((a, b) => Math.abs(a - value) - Math.abs(b - value))[0] ?? null;
  }

  /** A reading as printed: its bound, digits enough to differ from the boundary beside it. */
  reading(m: RecordMeasurement): string {
    if (m.bound === '<') return (m.typed ?? '').replace('<', `<${NO_BREAK}`);
    if (m.value === null) return '';
    return `${m.bound === '>' ? `>${NO_BREAK}` : ''}${this.number(m.value, this.nearestLimit(m))}`;
  }

  unit(unit: string, detection: Detection | null): string {
    return detection === null ? unit : `${unit}${NO_BREAK}${DETECTION_WORDS[detection].replaceAll(' ', NO_BREAK)}`;
  }

  condition(condition: Condition | null): ConditionView {
    return condition === null || condition === 'not assessed' ? { mark: 'none', text: 'not assessed', isAssessed: false } : { mark: condition, text: condition, isAssessed: true };
  }

  /** Condition of a machine, with how much of it was measured where that was not all. */
  machineCondition(machine: RecordMachine): ConditionView {
    const [n, m] = machine.measured_of;
    const view = this.condition(machine.condition);
    return view.isAssessed && n < m ? { ...view, text: `${view.text} (${n} of ${m})` } : view;
  }

  date(text: string | null): string {
    return text === null ? '' : text.replaceAll('-', '\u2011');
  }

  /** Name of a machine beside its id, or nothing. */
  name(machine: string): string {
    return this.record.machines.find((m) => m.machine === machine)?.name ?? '';
  }
}

export const URGENCY_WORDS: Readonly<Record<string, string>> = {
  now: 'Act now',
  'within a week': 'Within a week',
  'within a month': 'Within a month',
  'next planned stop': 'Next planned stop',
  watch: 'Watch',
};

/** `now` never stands alone: who decides on stopping is said with it. */
export const urgencyText = (urgency: string | null): string =>
  urgency === null ? '–' : urgency === 'now' ? "Act now; the plant's responsible person decides on stopping" : (URGENCY_WORDS[urgency] ?? urgency);

export const urgencyShort = (urgency: string | null): string => (urgency === null ? '–' : (URGENCY_WORDS[urgency] ?? urgency));
