/** Doubts from readings that belong together: pairs that cannot be, values copied from last time, exchanged points or machines. */
import { limitFactor } from '../../measure/limit-factor.ts';
import { unitFactor } from '../../measure/units.ts';
import { bandOf } from '../comparable.ts';
import { exceeds, reaches } from '../exceeds.ts';
import { decibelChange } from '../rise.ts';
import { type Context, isMeasured, type Look, pointRow, type Track } from '../track.ts';
import { doubt, lastTime } from './doubt.ts';

interface Seen {
  readonly track: Track;
  readonly look: Look;
}

function seenOn(tracks: readonly Track[], survey: number): Seen[] {
  return tracks.flatMap((track) => {
    const look = track.looks[survey] ?? null;
    return look === null ? [] : [{ track, look }];
  });
}

/** Typed figures carry a rounding of about this share. */
const ROUNDING = 0.02;

/** impossible: what no signal can be, whatever it is. */
export function impossiblePairs(context: Context, survey: number): void {
  const { settings } = context.plant;
  for (const tracks of context.byMachine.values()) {
    const seen = seenOn(tracks, survey);
    for (const a of seen) {
      const oneTimes = a.look.reading.phase?.amplitude ?? null;
      if (oneTimes !== null && exceeds(oneTimes, a.look.value * (1 + ROUNDING)))
        mark(a, { value: oneTimes, other: a.look.value, unit: a.track.series.unit }, '.one_times');
      for (const b of seen) if (a.track.series.point === b.track.series.point) pair(a, b);
    }
    impossibleFrequencies(context, seen);
  }
  function mark(s: Seen, facts: Readonly<Record<string, string | number>>, variant: string): void {
    if (!s.look.doubts.some((d) => d.kind === 'impossible'))
      s.look.doubts.push(doubt(settings, 'impossible', 're-measure', facts, variant));
  }
  /** r.m.s. against the peak, or half the peak-to-peak, of the same quantity. */
  function pair(rms: Seen, other: Seen): void {
    const [a, b] = [rms.track.series, other.track.series];
    const units = unitFactor(b.unit, a.unit);
    if (
      a.detection !== 'rms' ||
      b.detection === null ||
      b.detection === 'rms' ||
      b.detection === 'mean' ||
      a.quantity !== b.quantity ||
      units === null
    )
      return;
    const half = b.detection.endsWith('peak-to-peak') ? 0.5 : 1;
    const peak = other.look.value * units * half;
    const facts = { value: rms.look.value, other: other.look.value * units, unit: a.unit, detection: b.detection };
    if (exceeds(rms.look.value, peak * (1 + ROUNDING))) {
      mark(rms, facts, '.above_peak');
      mark(other, facts, '.above_peak');
    } else if (b.detection.startsWith('calculated')) {
      const exact = limitFactor({ unit: a.unit, detection: 'rms' }, { unit: b.unit, detection: b.detection });
      if (exact !== null && exceeds(Math.abs(other.look.value / (rms.look.value * exact.factor) - 1), ROUNDING))
        mark(other, facts, '.not_calculated');
    }
  }
}

/** v/(2πd) above a/(2πv): of r.m.s. values in one band the frequency from displacement is never above that from acceleration. */
function impossibleFrequencies(context: Context, seen: readonly Seen[]): void {
  const points = new Set(seen.map((s) => s.track.series.point));
  for (const point of points) {
    const three = threeOf(seen, point);
    if (three === null) continue;
    const { fromDisplacementHz, fromAccelerationHz } = three;
    if (!exceeds(fromDisplacementHz, (1 + context.policy['7.impossible.margin']) * fromAccelerationHz)) continue;
    const facts = { low: fromAccelerationHz, high: fromDisplacementHz };
    for (const s of three.members) s.look.doubts.push(doubt(context.plant.settings, 'impossible', 're-measure', facts, '.frequencies'));
  }
}

export interface Three {
  readonly members: readonly Seen[];
  /** v/(2πd) and a/(2πv), Hz. */
  readonly fromDisplacementHz: number;
  readonly fromAccelerationHz: number;
}

/** Displacement, velocity and acceleration of one point, all r.m.s. and in one band, as the two frequencies they tell. */
export function threeOf(seen: readonly Seen[], point: string): Three | null {
  const rms = seen.filter((s) => s.track.series.point === point && s.track.series.detection === 'rms');
  const of = (quantity: string): Seen | undefined => rms.find((s) => s.track.series.quantity === quantity);
  const [d, v, a] = [of('displacement'), of('velocity'), of('acceleration')];
  if (d === undefined || v === undefined || a === undefined) return null;
  const bands = [d, v, a].map((s) => bandOf(s.track, s.look.reading));
  if (bands.some((b) => b.lowHz !== bands[0]?.lowHz || b.highHz !== bands[0]?.highHz)) return null;
  const si = (s: Seen, unit: string): number => s.look.value * (unitFactor(s.track.series.unit, unit) ?? Number.NaN);
  const [metres, metresPerSecond, metresPerSecond2] = [si(d, 'm'), si(v, 'm/s'), si(a, 'm/s²')];
  if (!(metres > 0 && metresPerSecond > 0)) return null;
  return {
    members: [d, v, a],
    fromDisplacementHz: metresPerSecond / (2 * Math.PI * metres),
    fromAccelerationHz: metresPerSecond2 / (2 * Math.PI * metresPerSecond),
  };
}

/** identical: four readings of a machine equal to the last to three figures, or eight to two. */
export function identicalReadings(context: Context, survey: number): void {
  const { policy, plant } = context;
  for (const tracks of context.byMachine.values()) {
    const pairs = seenOn(tracks, survey).flatMap((s) => {
      const before = lastReading(s.track, survey);
      return before === null ? [] : [{ ...s, before }];
    });
    const equal = (digits: number) => pairs.filter((p) => p.look.value.toPrecision(digits) === p.before.toPrecision(digits));
    const [three, two] = [equal(3), equal(2)];
    const same = three.length >= policy['7.identical.points'] ? three : two.length >= policy['7.identical.two'] ? two : [];
    for (const s of same)
      s.look.doubts.push(doubt(plant.settings, 'identical', 're-measure', { readings: same.length, digits: same === three ? 3 : 2 }));
  }
}

function lastReading(track: Track, survey: number): number | null {
  for (let s = survey - 1; s >= 0; s -= 1) {
    const reading = track.readings[s] ?? null;
    if (isMeasured(reading)) return reading.value;
  }
  return null;
}

interface Away extends Seen {
  readonly before: number;
}

/** Readings with what they were last time, on a linear scale. */
function awayOf(seen: readonly Seen[]): Away[] {
  return seen.flatMap((s) => {
    const before = lastTime(s.look);
    return before === null || before <= 0 || s.look.value <= 0 || pointRow(s.track, s.look.reading.day).scale !== 'linear'
      ? []
      : [{ ...s, before }];
  });
}

const away = (value: number, before: number): number => Math.abs(decibelChange(value, before, 'linear') ?? 0);

/** swapped-points: exchanging two readings of a machine halves Σ|dB| against last time and saves 4 dB on both. */
export function swappedPoints(context: Context, survey: number): void {
  const { policy, plant } = context;
  for (const tracks of context.byMachine.values()) {
    const all = awayOf(seenOn(tracks, survey));
    all.forEach((a, i) => {
      for (const b of all.slice(i + 1)) {
        const [x, y] = [a.track.series, b.track.series];
        if (x.quantity !== y.quantity || x.unit !== y.unit || x.detection !== y.detection) continue;
        const [now, then] = [
          [away(a.look.value, a.before), away(b.look.value, b.before)] as const,
          [away(b.look.value, a.before), away(a.look.value, b.before)] as const,
        ];
        const gain = policy['7.swapped.gain'];
        if (!reaches(now[0] - then[0], gain) || !reaches(now[1] - then[1], gain) || exceeds(2 * (then[0] + then[1]), now[0] + now[1]))
          continue;
        for (const s of [a, b])
          s.look.doubts.push(doubt(plant.settings, 'swapped-points', 're-measure', { point: x.point, other: y.point }));
      }
    });
  }
}

/**
 * swapped-machines: the same for two machines read at the same points, two or more of them; half the gain a
 * reading, which makes the whole of it on each machine's sum, and which scatter alone does not reach.
 */
export function swappedMachines(context: Context, survey: number): void {
  const { policy, plant } = context;
  const gain = policy['7.swapped.gain'];
  const machines = [...context.byMachine.values()]
    .map((tracks) => awayOf(seenOn(tracks, survey)))
    .filter((list) => list.length >= 2 && reaches(list.reduce((sum, s) => sum + away(s.look.value, s.before), 0) / list.length, gain / 2));
  machines.forEach((first, i) => {
    for (const second of machines.slice(i + 1)) {
      const pairs = first.flatMap((a) => {
        const b = second.find(
          (s) =>
            s.track.series.point === a.track.series.point &&
            s.track.series.quantity === a.track.series.quantity &&
            s.track.series.detection === a.track.series.detection &&
            s.track.series.unit === a.track.series.unit,
        );
        return b === undefined ? [] : [[a, b] as const];
      });
      if (pairs.length < 2) continue;
      const mean = (of: (a: Away, b: Away) => number): number => pairs.reduce((sum, [a, b]) => sum + of(a, b), 0) / pairs.length;
      const [nowA, nowB] = [mean((a) => away(a.look.value, a.before)), mean((_, b) => away(b.look.value, b.before))];
      const [thenA, thenB] = [mean((a, b) => away(b.look.value, a.before)), mean((a, b) => away(a.look.value, b.before))];
      const least = gain / 2;
      if (!reaches(nowA - thenA, least) || !reaches(nowB - thenB, least) || exceeds(2 * (thenA + thenB), nowA + nowB)) continue;
      for (const [a, b] of pairs) {
        const facts = { machine: a.track.machine.id, other: b.track.machine.id };
        for (const s of [a, b]) s.look.doubts.push(doubt(plant.settings, 'swapped-machines', 're-measure', facts));
      }
    }
  });
}
