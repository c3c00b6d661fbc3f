/**
 * Chart inputs from a record. In: the record. Out: drawings by kind and key, made when asked for. One drawing serves both media.
 */
import type { Drawing } from '../chart/drawing.ts';
import { historyChart, type HistoryInput } from '../chart/history.ts';
import { plantOverTime } from '../chart/over-time.ts';
import { polarPlot } from '../chart/polar.ts';
import { sparkline } from '../chart/sparkline.ts';
import type { RecordMeasurement, SwayfolioRecord } from '../record/types.ts';
import { formatDate } from '../words/terms.ts';
import type { Format } from './format.ts';

export const seriesId = (m: RecordMeasurement): string => `${m.machine}\u001f${m.point}\u001f${m.quantity}\u001f${m.detection ?? ''}`;

/** Lower beside many readings, so that chart and readings of a machine stand on one page; points. */
const historyHeight = (readings: number): number => Math.max(100, 166 - 11 * Math.max(0, readings - 6));

/** Events that concern this series. */
function eventsOf(record: SwayfolioRecord, m: RecordMeasurement) {
  const events = record.machines.find((machine) => machine.machine === m.machine)?.events ?? [];
  return events.filter(
    (e) =>
      (e.component === null || e.component === m.component) &&
      (e.point === null || e.point === m.point) &&
      (e.quantity === null || e.quantity === m.quantity),
  );
}

/** Surveys before which a new baseline was set for this series, as indices into the history. */
function newBaselines(record: SwayfolioRecord, m: RecordMeasurement): number[] {
  const days = eventsOf(record, m)
    .filter((e) => e.new_baseline)
    .map((e) => e.date);
  return days.map((day) => record.surveys.findIndex((s) => s.date >= day)).filter((i) => i > 0);
}

/**
 * True for each survey whose reading compares with those beside it: with the last, or with its own kind before a new
 * baseline, where the line is parted.
 */
function comparable(format: Format, m: RecordMeasurement): boolean[] {
  const beforeNewBaseline = format.say('assess.why.before_new_baseline');
  return m.history.value.map((value, i) => {
    const why = m.history.why[String(i)];
    return value !== null && (why === undefined || why === beforeNewBaseline);
  });
}

export class Charts {
  readonly #format: Format;
  readonly #byId: ReadonlyMap<string, RecordMeasurement>;

  constructor(format: Format) {
    this.#format = format;
    this.#byId = new Map(format.record.measurements.map((m) => [seriesId(m), m]));
  }

  /** Throws for an unknown kind or key. */
  drawing(kind: string, key: string): Drawing {
    if (kind === 'over-time') return this.#overTime();
    const m = this.#byId.get(key);
    if (m === undefined) throw new Error(`There is no series for chart ${kind} ${key}.`);
    if (kind === 'sparkline') return this.sparkline(m);
    if (kind === 'history') return this.#history(m);
    if (kind === 'polar') return this.#polar(m);
    throw new Error(`There is no chart of kind ${kind}.`);
  }

  sparkline(m: RecordMeasurement): Drawing {
    const { record } = this.#format;
    return sparkline({
      values: m.history.value,
      comparable: comparable(this.#format, m),
      held: m.travel === 'held',
      newBaselineAt: newBaselines(record, m),
      ab: m.limits?.ab ?? null,
      bc: m.limits?.bc ?? null,
      cd: m.limits?.cd ?? null,
      alt: this.alt(m),
    });
  }

  /** What a trend shows, in words. */
  alt(m: RecordMeasurement): string {
    const values = m.history.value.filter((v): v is number => v !== null);
    if (values.length === 0) return this.#format.say('view.alt.none', { point: m.point, quantity: m.quantity });
    const [least, most, last] = [Math.min(...values), Math.max(...values), values[values.length - 1] as number];
    return this.#format.say('view.alt.trend', {
      point: m.point,
      quantity: m.quantity,
      n: values.length,
      least,
      most,
      last,
      unit: this.#format.unit(m.unit, m.detection),
    });
  }

  #history(m: RecordMeasurement): Drawing {
    const { record } = this.#format;
    return historyChart({
      dates: record.surveys.map((s) => s.date),
      values: m.history.value,
      comparable: comparable(this.#format, m),
      held: m.travel === 'held',
      ab: m.limits?.ab ?? null,
      bc: m.limits?.bc ?? null,
      cd: m.limits?.cd ?? null,
      alarm: m.limits?.alarm ?? null,
      baseline: m.baseline?.value ?? null,
      events: eventsOf(record, m).map((e) => ({
        date: e.date,
        label: e.event === 'other' && e.notes !== null ? shortened(e.notes) : this.#format.term(e.event),
        newBaseline: e.new_baseline,
      })),
      language: record.plant.language,
      forecast: forecastOf(record, m) ?? null,
      unit: this.#format.unit(m.unit, m.detection),
      width: 490,
      height: historyHeight(this.#format.measurementsOf(m.machine).length),
      alt: this.alt(m),
    });
  }

  #polar(m: RecordMeasurement): Drawing {
    const now = m.phase === null || m.phase.amplitude === null ? null : { amplitude: m.phase.amplitude, lagDeg: m.phase.lag_deg };
    const change = m.change?.vector ?? null;
    const from = now === null || change === null ? null : minus(now, { amplitude: change.amplitude, lagDeg: change.lag_deg });
    const q = m.limits?.bc == null ? null : m.limits.bc * (this.#format.record.policy.find((p) => p.id === '4.q')?.value ?? 0.25);
    const unit = this.#format.unit(m.unit, m.detection);
    const words =
      now === null
        ? this.#format.say('view.alt.polar.none')
        : this.#format.say('view.alt.polar.now', { amplitude: now.amplitude, unit, lag: now.lagDeg });
    const told = change === null ? words : this.#format.say('view.alt.polar.moved', { words, change: change.amplitude });
    return polarPlot({
      from,
      to: now,
      q,
      unit,
      size: 140,
      language: this.#format.language,
      alt: this.#format.say('view.alt.polar', { point: m.point, words: told }),
    });
  }

  #overTime(): Drawing {
    const { record } = this.#format;
    // A second look at a few machines is no column of the plant's.
    const lines = record.plant_over_time.filter((_, i) => record.surveys[i]?.kind !== 're-measurement');
    const last = lines[lines.length - 1];
    const words =
      last === undefined
        ? ''
        : Object.entries(last.conditions)
            .filter(([, n]) => n > 0)
            .map(([c, n]) => `${n} ${this.#format.term(c)}`)
            .join(', ');
    return plantOverTime({
      dates: lines.map((l) => formatDate(this.#format.language, l.date)),
      counts: lines.map((l) => l.conditions),
      width: 490,
      height: 120,
      alt: this.#format.say('view.alt.over_time', { n: lines.length, words }),
    });
  }
}

/** The forecast as the chart draws it: the boundary's value and the range of dates; null where there is none. */
function forecastOf(record: SwayfolioRecord, m: RecordMeasurement): HistoryInput['forecast'] {
  if (m.forecast === null || 'none' in m.forecast) return null;
  const step = (id: string): number | null =>
    m.baseline === null ? null : m.baseline.value * (record.policy.find((p) => p.id === id)?.value ?? Number.NaN);
  const values: Readonly<Record<string, number | null>> = {
    'B/C': m.limits?.bc ?? null,
    'C/D': m.limits?.cd ?? null,
    'r-B/r-C': step('2.ratio.c'),
    'r-C/r-D': step('2.ratio.d'),
  };
  const value = values[m.forecast.boundary] ?? null;
  return value === null ? null : { boundary: m.forecast.boundary, value, earliest: m.forecast.earliest, latest: m.forecast.latest };
}

const LONGEST_LABEL = 28;

/** The first words of a note, for a label. */
const shortened = (note: string): string =>
  note.length <= LONGEST_LABEL ? note : `${note.slice(0, LONGEST_LABEL - 1).replace(/\s+\S*$/, '')}…`;

/** The vector before: now less the change. */
function minus(
  now: { amplitude: number; lagDeg: number },
  change: { amplitude: number; lagDeg: number },
): { amplitude: number; lagDeg: number } {
  const rad = Math.PI / 180;
  const x = now.amplitude * Math.cos(now.lagDeg * rad) - change.amplitude * Math.cos(change.lagDeg * rad);
  const y = now.amplitude * Math.sin(now.lagDeg * rad) - change.amplitude * Math.sin(change.lagDeg * rad);
  const deg = Math.atan2(y, x) / rad;
  return { amplitude: Math.hypot(x, y), lagDeg: deg < 0 ? deg + 360 : deg };
}
