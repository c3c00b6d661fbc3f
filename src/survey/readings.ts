/**
 * Readings as typed. In: a readings table. Out: rows with number, bound, unit, detection, status, not yet joined to points.
 * Never: a missing value as a number, a row silently dropped.
 */
import type { Detection } from '../measure/detection.ts';
import { isKnownQuantity } from '../measure/detection.ts';
import { type Day, parseDay } from '../plant/day.ts';
import { type Reading, STATUSES, type Status } from '../plant/types.ts';
import { nearestWord } from '../measure/nearest.ts';
import { Cells, plainNumber } from './cells.ts';
import type { Table } from './csv.ts';
import type { Problems } from './problems.ts';
import { type OwnStates, STATE_WORDS, stateOf } from './states.ts';
import { detectionOf, type PeakMeans, quantityOf } from './quantities.ts';

export const READINGS_COLUMNS = [
  'machine',
  'point',
  'quantity',
  'detection',
  'value',
  'unit',
  'low_hz',
  'high_hz',
  'speed_rpm',
  'load_pct',
  'state',
  'status',
  'phase_deg',
  'amplitude_1x',
  'phase_ref',
  'phase_convention',
  'running_hours',
  'taken_at',
  'instrument',
  'sensor',
  'measured_by',
  'retake',
  'remark',
  'survey_date',
  'component',
  'location',
  'direction',
  'measured_on',
  'last_value',
  'last_date',
  'alarm',
] as const;

/** A row of readings.csv. `value` and the phase's amplitude are in the unit typed. */
export interface ReadingEntry {
  readonly survey: string;
  readonly machine: string;
  readonly point: string | null;
  readonly quantity: string | null;
  readonly detection: Detection | null;
  readonly unitText: string | null;
  readonly retake: number;
  /** Open until it is joined: its survey, day and unit are set then, in place, for there are many. */
  readonly reading: { -readonly [Field in keyof Reading]: Reading[Field] };
  /** Day of taken_at, else null: then the survey's. */
  readonly takenOn: Day | null;
  readonly convention: 'lag' | 'lead';
}

/** Rows of one table in the order of the file; `survey` null means that each row names its own by survey_date. */
export function readingEntries(
  table: Table,
  survey: string | null,
  peakMeans: PeakMeans,
  states: OwnStates,
  problems: Problems,
  take: (entry: ReadingEntry, cells: Cells) => void,
): void {
  const cells = new Cells(table, problems);
  const has = (column: string): boolean => table.column(column) >= 0;
  const columns: Columns = {
    phase: has('phase_deg'),
    band: has('low_hz') || has('high_hz'),
    retake: has('retake'),
    status: has('status'),
    taken: has('taken_at'),
  };
  while (cells.next()) {
    const entry = entryOf(cells, survey, peakMeans, states, columns);
    if (entry !== null) take(entry, cells);
  }
}

interface Columns {
  readonly phase: boolean;
  readonly band: boolean;
  readonly retake: boolean;
  readonly status: boolean;
  readonly taken: boolean;
}

function entryOf(cells: Cells, survey: string | null, peakMeans: PeakMeans, states: OwnStates, columns: Columns): ReadingEntry | null {
  const id = survey ?? surveyOf(cells);
  const machine = cells.required('machine');
  const stated = columns.status ? statusOf(cells, states) : 'measured';
  const quantityText = cells.text('quantity');
  const quantity = quantityText === null ? null : quantityOf(quantityText);
  const detection = detectionOf(cells, 'detection', quantity ?? '', peakMeans);
  const point = cells.text('point');
  const typed = cells.text('value');
  const value = typed === null ? null : typedValue(cells, typed, quantity, states);
  const status = stated === 'measured' ? (value?.status ?? stated) : stated;
  if (point === null && status === 'measured' && machine !== null) {
    cells.error('blank', 'point', '"point" is blank.', 'Only a row with a status other than measured may speak for the whole machine.');
    return null;
  }
  if (id === null || machine === null || detection === undefined || value === undefined) return null;
  const takenAt = columns.taken ? cells.text('taken_at') : null;
  const takenOn = takenAt === null ? null : takenDay(cells, takenAt);
  return {
    survey: id,
    machine,
    point,
    quantity,
    detection,
    unitText: cells.text('unit'),
    retake: columns.retake ? retakeOf(cells) : 0,
    takenOn,
    convention: columns.phase ? (cells.word('phase_convention', ['lag', 'lead'] as const) ?? 'lag') : 'lag',
    reading: readingOf(cells, status, value, columns, takenAt),
  };
}

function surveyOf(cells: Cells): string | null {
  const text = cells.required('survey_date');
  if (text === null) return null;
  if (parseDay(text) !== null) return text;
  cells.error(
    'bad-date',
    'survey_date',
    `"survey_date" is no date: ${text}.`,
    'Write dates as YYYY-MM-DD, date-times as YYYY-MM-DD hh:mm.',
  );
  return null;
}

interface Typed {
  readonly number: number | null;
  readonly bound: '<' | '>' | null;
  /** As typed, in the plain form; null where a word stands for the number. */
  readonly text: string | null;
  /** Where a word stands for the number. */
  readonly status: Status | null;
}

/** A status by its own word, or by one that stands for it. */
function statusOf(cells: Cells, states: OwnStates): Status {
  const text = cells.text('status');
  if (text === null) return 'measured';
  const state = STATUSES.find((s) => s === text) ?? stateOf(text, states);
  if (state === null) return cells.word('status', STATUSES) ?? 'measured';
  return state === 'not read' ? 'measured' : state;
}

/** A number, a bound or a word for a state; undefined with the problem told. `<0.2` is no number, `>50` is at least 50. */
function typedValue(cells: Cells, typed: string, quantity: string | null, states: OwnStates): Typed | undefined {
  const sign = typed[0];
  const bound = sign === '<' || sign === '>' ? sign : null;
  const digits = bound === null ? typed : typed.slice(1).trim();
  const value = cells.plain('value', digits);
  if (value === 'doubt') return undefined;
  if (typeof value === 'string') {
    const state = value === 'no number' ? stateOf(typed, states) : null;
    if (state !== null) return { number: null, bound: null, text: null, status: state === 'not read' ? null : state };
    const near = value === 'no number' ? nearestWord(typed, STATE_WORDS) : null;
    const hint =
      value === 'comma'
        ? 'Write the decimal sign as a dot, or map the file in the import section of plant.yaml.'
        : `Give a number, a bound such as <0.2, or leave it blank and say why in status.${near === null ? '' : ` The nearest word known is "${near}".`}${value === 'infinite' ? '' : ' A word for a state is mapped in plant.yaml by import: { states: { word: status } }.'}`;
    cells.error(
      'bad-number',
      'value',
      `"value" is ${value === 'infinite' ? 'not finite' : value === 'comma' ? 'written with a comma' : 'no number'}: ${typed}.`,
      hint,
    );
    return undefined;
  }
  if (value < 0 && (quantity === null || isKnownQuantity(quantity))) {
    cells.error(
      'negative',
      'value',
      `"value" is negative: ${typed}. An amplitude never is.`,
      'Check the sign; a gap or a position is a quantity of its own.',
    );
    return undefined;
  }
  return {
    number: bound === '<' ? null : value,
    bound,
    text: cells.table.decimal === 'dot' && bound === null ? typed : `${bound ?? ''}${cells.plainText('value', digits)}`,
    status: null,
  };
}

function takenDay(cells: Cells, text: string): Day | null {
  const day = parseDay(text);
  if (day === null) cells.error('bad-date', 'taken_at', `"taken_at" is no date or time: ${text}.`, 'Write YYYY-MM-DD or YYYY-MM-DD hh:mm.');
  return day;
}

/** 0 for none, 1 for `yes`, else the number of the take. */
function retakeOf(cells: Cells): number {
  const text = cells.text('retake');
  if (text === null || text === 'no' || text === '0') return 0;
  if (text === 'yes') return 1;
  const value = plainNumber(text);
  if (typeof value === 'number' && Number.isInteger(value) && value > 0) return value;
  cells.error('unknown-word', 'retake', `"retake" is "${text}".`, 'Give yes, or 1, 2, 3 for the first, second, third retake.');
  return 0;
}

function readingOf(cells: Cells, status: Status, value: Typed | null, columns: Columns, takenAt: string | null): ReadingEntry['reading'] {
  const lagDeg = columns.phase ? cells.number('phase_deg') : null;
  return {
    survey: -1,
    day: 0,
    status,
    value: value?.number ?? null,
    bound: value?.bound ?? null,
    typed: value?.text ?? null,
    typedUnit: null,
    lowHz: columns.band ? cells.number('low_hz', 0) : null,
    highHz: columns.band ? cells.number('high_hz', 0) : null,
    speedRpm: cells.number('speed_rpm', 0),
    loadPct: cells.number('load_pct', 0),
    state: cells.text('state'),
    phase: lagDeg === null ? null : { amplitude: cells.number('amplitude_1x', 0), lagDeg, reference: cells.text('phase_ref') },
    runningHours: cells.number('running_hours', 0),
    takenAt,
    instrument: cells.text('instrument'),
    sensor: cells.text('sensor'),
    measuredBy: cells.text('measured_by'),
    remark: cells.text('remark'),
    place: cells.place,
    retakes: null,
  };
}
