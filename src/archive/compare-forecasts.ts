/**
 * Forecasts against what came. In: records in order, and the last of them. Out: each range of dates beside the first reading above its boundary. A zone
 * crossing is not a failure.
 */
import type { ComparedForecast } from '../record/comparison.ts';
import type { Forecast, RecordMeasurement, SwayfolioRecord } from '../record/types.ts';
import type { Exceeds } from './compare-verdicts.ts';
import { dateOf, type Ids, type Named, placeOf } from './compared.ts';
import { unitFactor } from '../measure/units.ts';

type Dates = Exclude<Forecast, { readonly none: string }>;

export function forecastsOf(records: readonly Named[], ids: Ids, exceeds: Exceeds): ComparedForecast[] {
  const last = records.at(-1) as Named;
  const latest = ids.bySeries(last.record);
  return records.flatMap((named) =>
    named.record.measurements.flatMap((m) => {
      if (m.forecast === null || 'none' in m.forecast) return [];
      const limit = limitOf(m, m.forecast.boundary, named.record);
      if (limit === null) return [];
      const { boundary, earliest, likely, latest: until } = m.forecast;
      const came = whatCame(m, m.forecast, limit, dateOf(named.record), last.record, latest.get(ids.series(m)), ids, exceeds);
      return [
        {
          machine: m.machine,
          point: m.point,
          quantity: m.quantity,
          detection: m.detection,
          survey: named.record.survey.id,
          boundary,
          limit,
          unit: m.unit,
          earliest,
          likely,
          latest: until,
          ...came,
          ...placeOf(named.name, named.record, m),
        },
      ];
    }),
  );
}

/** The boundary as a value in the reading's unit. */
function limitOf(m: RecordMeasurement, boundary: string, record: SwayfolioRecord): number | null {
  if (/^B\/C/.test(boundary)) return m.limits?.bc ?? null;
  if (/^C\/D/.test(boundary)) return m.limits?.cd ?? null;
  const id = boundary.includes('r-C/r-D') || boundary.includes('6.3') ? '2.ratio.d' : '2.ratio.c';
  const ratio = record.policy.find((line) => line.id === id)?.value;
  return m.baseline === null || ratio === undefined ? null : Number((m.baseline.value * ratio).toPrecision(12));
}

type Came = Pick<ComparedForecast, 'came' | 'outcome'>;

function whatCame(
  m: RecordMeasurement,
  forecast: Dates,
  limit: number,
  made: string,
  last: SwayfolioRecord,
  now: RecordMeasurement | undefined,
  ids: Ids,
  exceeds: Exceeds,
): Came {
  const factor = now === undefined ? null : now.unit === m.unit ? 1 : unitFactor(now.unit, m.unit);
  const renewed = last.machines
    .find((machine) => ids.machine(machine.machine) === ids.machine(m.machine))
    ?.events.filter(
      (e) =>
        e.new_baseline &&
        e.date > made &&
        (e.component === null || e.component === m.component) &&
        (e.point === null || ids.point(m.machine, e.point) === ids.point(m.machine, m.point)) &&
        (e.quantity === null || e.quantity === m.quantity),
    )
    .map((e) => e.date)
    .sort()[0];
  let seen: string | null = null;
  for (const [i, survey] of last.surveys.entries()) {
    const value = now?.history.value[i] ?? null;
    if (survey.date <= made || value === null || factor === null) continue;
    if (renewed !== undefined && survey.date >= renewed) break;
    seen = survey.date;
    if (!exceeds(value * factor, limit)) continue;
    const outcome =
      survey.date < forecast.earliest
        ? 'before the range'
        : forecast.latest !== null && survey.date > forecast.latest
          ? 'after the range'
          : 'within the range';
    return { came: `first read above it on ${survey.date}`, outcome };
  }
  if (renewed !== undefined) return { came: `new baseline on ${renewed}, not read above it before`, outcome: 'new baseline first' };
  return seen === null
    ? { came: 'no reading since', outcome: 'no reading since' }
    : { came: `not read above it up to ${seen}`, outcome: 'not crossed so far' };
}
