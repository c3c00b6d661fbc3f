/**
 * A reading judged in its own time. In: a track and a survey. Out: its limits, what compares with it, baseline, zone or
 * ratio class. Survey by survey, so that a doubt raised then is known to those who look later.
 */
import type { Reading } from '../plant/types.ts';
import type { RatioClass, Zone } from '../record/types.ts';
import { baselineFor, carriesRatio } from './baseline.ts';
import { bandOf, comparableBefore } from './comparable.ts';
import { reaches } from './exceeds.ts';
import { floorFor } from './floor.ts';
import type { LimitBook, LimitsInForce } from './limits-in-force.ts';
import { ratio, ratioOfDb } from './rise.ts';
import { type Baseline, type Context, isMeasured, type Look, pointRow, type Track } from './track.ts';
import { bandFit, type NoZone, neededLowHz, ratioClassOf, zoneOf } from './zone.ts';

/** Fills the looks of one survey for all tracks. */
export function lookAt(context: Context, book: LimitBook, survey: number): void {
  for (const track of context.tracks) {
    const reading = track.readings[survey] ?? null;
    if (isMeasured(reading)) track.looks[survey] = lookOf(context, book, track, reading);
  }
}

function lookOf(context: Context, book: LimitBook, track: Track, reading: Reading & { value: number }): Look {
  const { policy, plant } = context;
  const limits = book.at(track, reading.day, plant.surveys[reading.survey]?.kind ?? 'routine');
  const comparable = comparableBefore(context, track, reading);
  const baseline = baselineFor(track, reading, comparable, limits, policy);
  const judged = zoneFor(context, track, reading, limits);
  return {
    survey: reading.survey,
    reading,
    value: reading.value,
    limits,
    comparable,
    previous: comparable[comparable.length - 1] ?? null,
    baseline,
    zone: judged.zone,
    noZone: judged.noZone,
    ratioClass: judged.zone === null && judged.byRatio ? ratioClassFor(context, track, reading.value, reading, baseline) : null,
    doubts: [],
    lastTime: undefined,
    explainedFall: null,
  };
}

interface Judged {
  readonly zone: Zone | null;
  readonly noZone: NoZone | null;
  /** No limit applies at all, so the ratio rule serves; not where a limit exists and the band cannot see. */
  readonly byRatio: boolean;
}

/** Zone by criterion I, with what the band and the detection allow. */
export function zoneFor(context: Context, track: Track, reading: Reading & { value: number }, limits: LimitsInForce): Judged {
  const { policy } = context;
  const noLimits = limits.ab === null && limits.bc === null && limits.cd === null;
  if (limits.conflict !== null)
    return { zone: null, noZone: { key: 'assess.nozone.conflict', facts: { conflict: limits.conflict } }, byRatio: true };
  if (limits.otherDetection) {
    const facts = { detection: track.series.detection, limit_detection: limits.set?.detection ?? null };
    return { zone: null, noZone: { key: 'assess.nozone.detection', facts }, byRatio: true };
  }
  if (limits.set === null || noLimits) return { zone: null, noZone: limits.reason, byRatio: true };
  const zone = zoneOf(reading.value, limits);
  if (zone === null) return { zone: null, noZone: { key: 'assess.nozone.boundaries', facts: {} }, byRatio: true };
  if (zone === 'C' || zone === 'D') return { zone, noZone: null, byRatio: false };
  const band = bandOf(track, reading);
  const rpm = reading.speedRpm ?? limits.ratedRpm;
  const lowHz = neededLowHz(limits, rpm, { speedRpm: policy['1.slow.speed'], lowHz: policy['1.slow.low'] });
  const fit = bandFit(band, { lowHz, highHz: limits.set.highHz });
  if (fit !== 'narrow-low' && fit !== 'narrow-high') return { zone, noZone: null, byRatio: false };
  const facts = { rpm, band_low_hz: band.lowHz, band_high_hz: band.highHz, needed_low_hz: lowHz, needed_high_hz: limits.set.highHz };
  const key = fit === 'narrow-high' ? 'assess.nozone.band_high' : rpm === null ? 'assess.nozone.band_low' : 'assess.nozone.band';
  return { zone: null, noZone: { key, facts }, byRatio: false };
}

/** Ratio class by section 2; null where floor, baseline or scale give none. */
export function ratioClassFor(
  context: Context,
  track: Track,
  value: number,
  reading: Reading,
  baseline: Baseline | null,
): RatioClass | null {
  const row = pointRow(track, reading.day);
  const floor = floorFor(track.series, row, context.policy);
  if (row.scale === 'none' || floor === null || !carriesRatio(baseline)) return null;
  return ratioClassOf(ratio(value, baseline.value, row.scale), ratioSteps(context, row.scale), reaches(value, floor));
}

/** The three steps as ratios, whatever the scale. */
export function ratioSteps(context: Context, scale: 'linear' | 'dB'): readonly [number, number, number] {
  const p = context.policy;
  return scale === 'dB'
    ? [ratioOfDb(p['2.db.b']), ratioOfDb(p['2.db.c']), ratioOfDb(p['2.db.d'])]
    : [p['2.ratio.b'], p['2.ratio.c'], p['2.ratio.d']];
}
