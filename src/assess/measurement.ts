/**
 * Lines of the record for each series. In: a verdict. Out: a RecordMeasurement with its history. Never: rounding.
 */
import { dayText } from '../plant/day.ts';
import type { Reading } from '../plant/types.ts';
import type { History, RecordMeasurement, Status } from '../record/types.ts';
import { say } from '../words/say.ts';
import { alarmTrip } from './alarm.ts';
import { boundNumber } from './bound.ts';
import { changeOf } from './change.ts';
import { bandOf, whyNotComparable } from './comparable.ts';
import { inScope } from './coverage.ts';
import { forecastLine } from './forecast.ts';
import type { Verdict } from './level.ts';
import type { LimitBook, LimitsInForce } from './limits-in-force.ts';
import { notesOf } from './notes.ts';
import { type Baseline, type Context, type Look, pointRow, type Track } from './track.ts';
import { nearBoundary, zoneOfBound } from './zone.ts';

export function measurementOf(context: Context, book: LimitBook, verdict: Verdict): RecordMeasurement {
  const { track, look, heldFrom, level } = verdict;
  const { series } = track;
  const survey = context.plant.surveys[context.current] as (typeof context.plant.surveys)[number];
  const reading = track.readings[context.current] ?? null;
  const day = reading?.day ?? survey.day;
  const row = pointRow(track, day);
  const limits = look?.limits ?? book.at(track, day, survey.kind);
  const band = reading === null ? row : bandOf(track, reading);
  const shown = look ?? heldFrom;
  return {
    machine: track.machine.id,
    component: track.component.id,
    point: series.point,
    location: row.location,
    direction: row.direction,
    quantity: series.quantity,
    unit: series.unit,
    detection: series.detection,
    measured_on: row.measuredOn,
    low_hz: band.lowHz,
    high_hz: band.highHz,
    ...takenOf(reading, track, context),
    ...judgedOf(context, track, look, reading, limits),
    held: heldFrom === null ? null : { zone: heldFrom.zone ?? heldFrom.ratioClass ?? 'not assessed', date: dayText(heldFrom.reading.day) },
    ...limitsOf(context, track, limits, shown?.baseline ?? null),
    ...changesOf(verdict, look),
    urgency: level.urgency,
    rule: level.rule,
    trend: verdict.movement?.trend ?? null,
    forecast: forecastLine(context, verdict.movement?.outlook ?? null),
    sisters: sistersLine(context, track),
    doubts: look?.doubts ?? [],
    notes: notesOf(context, track, look, limits, verdict.movement?.trend ?? null),
    history: historyOf(context, track, reading ?? heldFrom?.reading ?? null),
  };
}

function sistersLine(context: Context, track: Track): RecordMeasurement['sisters'] {
  const among = context.sisters.get(track);
  return among === undefined ? null : { n: among.n, place: among.place, db_above_median: among.dbAboveMedian, outlier: among.outlier };
}

type Taken = Pick<
  RecordMeasurement,
  | 'state'
  | 'speed_rpm'
  | 'load_pct'
  | 'instrument'
  | 'measured_by'
  | 'taken_at'
  | 'remark'
  | 'phase'
  | 'status'
  | 'value'
  | 'typed'
  | 'typed_unit'
  | 'bound'
  | 'source'
>;

function takenOf(reading: Reading | null, track: Track, context: Context): Taken {
  const phase = reading?.phase ?? null;
  return {
    state: reading?.state ?? null,
    speed_rpm: reading?.speedRpm ?? null,
    load_pct: reading?.loadPct ?? null,
    instrument: reading?.instrument ?? null,
    measured_by: reading?.measuredBy ?? null,
    taken_at: reading?.takenAt ?? null,
    remark: reading?.remark ?? null,
    phase: phase === null ? null : { amplitude: phase.amplitude, lag_deg: phase.lagDeg, reference: phase.reference },
    status: statusOf(context, reading, track),
    value: reading === null || reading.bound === '<' ? null : reading.value,
    typed: reading?.typed ?? null,
    typed_unit: reading?.typedUnit ?? null,
    bound: reading?.bound ?? null,
    source: reading === null ? null : { file: reading.place.file, line: reading.place.line },
  };
}

/** A reading that is not there was missed where it was in scope, else it was not due. */
function statusOf(context: Context, reading: Reading | null, track: Track): Status {
  if (reading !== null && !(reading.status === 'measured' && reading.value === null && reading.bound === null)) return reading.status;
  const survey = context.plant.surveys[context.current];
  return survey !== undefined && inScope(track.machine, survey) ? 'missing' : 'not due';
}

type JudgedFields = Pick<RecordMeasurement, 'zone' | 'ratio_class' | 'zone_basis' | 'no_zone_because' | 'near_boundary'>;

function judgedOf(context: Context, track: Track, look: Look | null, reading: Reading | null, limits: LimitsInForce): JudgedFields {
  const { language } = context.plant.settings;
  const basis = limits.set?.published === true ? ('standard' as const) : ('own' as const);
  if (look !== null) {
    return {
      zone: look.zone,
      ratio_class: look.ratioClass,
      zone_basis: look.zone !== null ? basis : look.ratioClass !== null ? 'ratio' : null,
      no_zone_because: look.noZone === null ? null : say(language, look.noZone.key, look.noZone.facts),
      near_boundary: look.zone === null ? null : nearBoundary(look.value, limits, context.policy['2.near.share']),
    };
  }
  const bounded = boundZone(track, reading, limits);
  const because =
    bounded !== null
      ? null
      : say(language, reading?.bound === '<' || reading?.bound === '>' ? 'assess.nozone.bound' : 'assess.nozone.not_measured', {});
  return { zone: bounded, ratio_class: null, zone_basis: bounded === null ? null : basis, no_zone_because: because, near_boundary: null };
}

/** Zone that a typed bound settles; its number is in the typed text, in the unit it was typed in. */
function boundZone(track: Track, reading: Reading | null, limits: LimitsInForce): ReturnType<typeof zoneOfBound> {
  if (reading === null || reading.bound === null || !['measured', 'over range'].includes(reading.status)) return null;
  const value = reading.value ?? boundNumber(reading.typed, reading.typedUnit, track.series.unit);
  return value === null || limits.otherDetection ? null : zoneOfBound(reading.bound, value, limits);
}

function limitsOf(
  context: Context,
  track: Track,
  limits: LimitsInForce,
  baseline: Baseline | null,
): Pick<RecordMeasurement, 'limit_set' | 'limit_reason' | 'limits' | 'baseline'> {
  const { ab, bc, cd, set } = limits;
  const { alarm, trip } = alarmTrip(limits, baseline, context.policy);
  return {
    limit_set: set?.id ?? null,
    limit_reason: say(context.plant.settings.language, limits.reason.key, limits.reason.facts),
    limits:
      set === null || limits.otherDetection
        ? null
        : {
            ab,
            bc,
            cd,
            alarm,
            trip,
            of: { ab: set.ab, bc: set.bc, cd: set.cd, unit: set.unit, detection: set.detection ?? track.series.detection },
            by: limits.by,
          },
    baseline: baseline === null ? null : { value: baseline.value, from: baseline.from, n: baseline.n, provisional: baseline.provisional },
  };
}

function changesOf(verdict: Verdict, look: Look | null): Pick<RecordMeasurement, 'previous' | 'change' | 'from_baseline' | 'travel'> {
  const { track, movement, heldFrom } = verdict;
  if (look === null || movement === null) {
    const last = heldFrom === null ? null : { value: heldFrom.value, date: dayText(heldFrom.reading.day) };
    return { previous: last, change: null, from_baseline: null, travel: heldFrom === null ? null : 'held' };
  }
  const { scale } = pointRow(track, look.reading.day);
  const { previous, baseline } = look;
  return {
    previous: previous === null ? null : { value: previous.value as number, date: dayText(previous.day) },
    change: previous === null ? null : changeOf(look.value, previous.value as number, look, scale, movement.vector),
    from_baseline: baseline === null ? null : changeOf(look.value, baseline.value, look, scale, null),
    travel: movement.travel,
  };
}

/** Columns aligned to the surveys; `why` for each reading that takes no part in the comparison with the current one. */
function historyOf(context: Context, track: Track, current: Reading | null): History {
  const { language } = context.plant.settings;
  const why: Record<string, string> = {};
  const options = { speedShare: context.policy['3.speed.overall'], acrossNewBaseline: false };
  let unusual = false;
  track.readings.forEach((reading, survey) => {
    if (reading === null) return;
    if (reading.bound !== null || reading.typedUnit !== null) unusual = true;
    if (reading.status !== 'measured') why[String(survey)] = say(language, 'assess.why.status', { status: reading.status });
    else if (current !== null && reading !== current && survey < current.survey) {
      const code = whyNotComparable(context, track, reading, current, options);
      if (code !== null) why[String(survey)] = say(language, `assess.why.${code.replaceAll(' ', '_')}`, {});
    }
  });
  const elsewhere = track.series.readings.some((r) => r.place.file !== context.plant.surveys[r.survey]?.place?.file);
  return {
    value: track.readings.map((r) => (r === null || r.bound === '<' ? null : r.value)),
    ...(unusual
      ? {
          typed: track.readings.map((r) =>
            r === null || r.typed === null ? null : r.typedUnit === null ? r.typed : `${r.typed} ${r.typedUnit}`,
          ),
        }
      : {}),
    why,
    line: track.readings.map((r) => r?.place.line ?? null),
    ...(elsewhere ? { file: track.readings.map((r) => r?.place.file ?? null) } : {}),
  };
}
