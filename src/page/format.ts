/**
 * Words and numbers for print, bound to one record. In: values with unit and detection. Out: finished strings. Templates
 * hold no logic: what they print is made here.
 */
import type { Detection } from '../measure/detection.ts';
import type { Urgency } from '../plant/types.ts';
import type { Condition, RecordMachine, RecordMeasurement, SeriesKey, SwayfolioRecord } from '../record/types.ts';
import { decimalsFor, formatNumber, NO_BREAK, plainNumber } from '../words/numbers.ts';
import { say } from '../words/say.ts';
import { inDisplayUnits } from './display.ts';
import { hasSentence, type Language } from '../words/sentences.ts';
import { formatDate, term } from '../words/terms.ts';

/** A condition for print: its mark, letter and words. */
export interface ConditionView {
  /** Value for data-mark: a condition, or `none`. */
  readonly mark: string;
  readonly text: string;
  readonly isAssessed: boolean;
}

/** Travel by its number in the ids of the urgency table. */
const TRAVELS = ['fast', 'rising', 'step', 'steady', 'falling'] as const;

export class Format {
  /** The record as it stands in record.json. */
  readonly asRead: SwayfolioRecord;
  /** The same in the plant's display units: what is printed. */
  readonly record: SwayfolioRecord;
  readonly language: Language;
  readonly #byMachine = new Map<string, RecordMeasurement[]>();

  constructor(record: SwayfolioRecord) {
    this.asRead = record;
    this.record = inDisplayUnits(record);
    this.language = record.plant.language;
    for (const measurement of this.record.measurements) {
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
    return (
      this.measurementsOf(machine).find((m) => m.point === key.point && m.quantity === key.quantity && m.detection === key.detection) ??
      null
    );
  }

  say(key: string, facts = {}): string {
    return say(this.language, key, facts);
  }

  /** A word of a closed list in the reader's language; the plant's own words stay. */
  term(word: string): string {
    return term(this.language, word);
  }

  /** The same, shorter where a narrow column asks for it. */
  shortTerm(word: string): string {
    const short = this.term(`short ${word}`);
    return short === `short ${word}` ? this.term(word) : short;
  }

  /** What a line of the policy does; in English where there are no words for it. */
  policyAbout(line: { readonly id: string; readonly about: string }): string {
    const key = `policy.${line.id}`;
    return hasSentence(this.language, key) ? this.say(key) : line.about;
  }

  /** What a rule does; rows of the urgency table (D1 to A3) name their zone and travel. */
  ruleAbout(line: { readonly id: string; readonly about: string }): string {
    const key = `assess.rule.${line.id}`;
    if (hasSentence(this.language, key)) return this.say(key);
    const travel = TRAVELS[Number(line.id.charAt(1)) - 1];
    return travel === undefined ? line.about : this.say('assess.rule.table', { zone: line.id.charAt(0), travel: this.term(travel) });
  }

  urgency(urgency: Urgency | null): string {
    return urgency === null ? '–' : this.say(`view.urgency.${urgency}`);
  }

  /** `now` never stands alone: who decides on stopping is said with it. */
  urgencyFull(urgency: Urgency | null): string {
    return urgency === 'now' ? this.say('view.urgency.now.full') : this.urgency(urgency);
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
    return detection === null ? unit : `${unit}${NO_BREAK}${term(this.language, `short ${detection}`).replaceAll(' ', NO_BREAK)}`;
  }

  condition(condition: Condition | null): ConditionView {
    return condition === null || condition === 'not assessed'
      ? { mark: 'none', text: this.term('not assessed'), isAssessed: false }
      : { mark: condition, text: condition, isAssessed: true };
  }

  /** Condition of a machine, with how much of it was measured where that was not all. */
  machineCondition(machine: RecordMachine): ConditionView {
    const [n, m] = machine.measured_of;
    const view = this.condition(machine.condition);
    return view.isAssessed && n < m ? { ...view, text: `${view.text} (${this.say('view.n_of_m', { n, of: m })})` } : view;
  }

  date(text: string | null): string {
    return text === null ? '' : formatDate(this.language, text).replaceAll('-', '\u2011');
  }

  /** A survey by its name, which is a date as a rule. */
  survey(id: string): string {
    return formatDate(this.language, id);
  }

  /** Name of a machine beside its id, or nothing. */
  name(machine: string): string {
    return this.record.machines.find((m) => m.machine === machine)?.name ?? '';
  }
}
