/**
 * Indications (section 10): what overall values are consistent with, never a fault named alone. In: the looks of a machine
 * at the current survey. Out: the rules that fit, with their numbers and the confirming test. Never: where nobody with a
 * diagnosing category signs the survey.
 */
import { shownFacts } from '../measure/display.ts';
import { diagnoses } from '../plant/survey.ts';
import type { Facts, Indication, Trend } from '../record/types.ts';
import { say } from '../words/say.ts';
import { carriesRatio } from './baseline.ts';
import { threeOf } from './doubts/pairs.ts';
import { exceeds, reaches, risesBy } from './exceeds.ts';
import { floorFor } from './floor.ts';
import { bearingOf, type Verdict } from './level.ts';
import { median } from './statistics/median.ts';
import { type Context, componentRow, doubtedHigh, doubtedLow, type Look, pointRow, type Track } from './track.ts';

export const isDiagnosed = (context: Context): boolean =>
  (context.plant.surveys[context.current]?.people ?? []).some((p) => diagnoses(p.category));

interface Read {
  readonly track: Track;
  readonly look: Look;
  readonly verdict: Verdict;
  readonly bearing: string;
  readonly trend: Trend | null;
}

type Hit = { readonly rule: string; readonly facts: Facts };

/** All indications of a machine; `isException`: it has a level, or stands in B or worse: on a smooth machine the rules of frequency alone are not worth print. */
export function indicationsOf(context: Context, verdicts: readonly Verdict[], isException: boolean): Indication[] {
  if (!isDiagnosed(context)) return [];
  const reads: Read[] = verdicts.flatMap((verdict) => {
    const { look, track, movement } = verdict;
    return look === null || doubtedLow(look) || doubtedHigh(look)
      ? []
      : [{ track, look, verdict, bearing: bearingOf(track, look.reading), trend: movement?.trend ?? null }];
  });
  const hits = [
    ...(isException ? frequencies(context, reads) : []),
    ...bearingDamage(context, reads),
    ...axial(reads),
    ...stiffness(reads),
    ...common(reads),
    ...phases(reads),
    ...hiddenVector(reads),
    ...crest(reads),
  ];
  const { language } = context.plant.settings;
  return hits.map(({ rule, facts }) => {
    const isSecond = hits.some((h) => h.rule !== rule && h.facts['bearing'] !== undefined && h.facts['bearing'] === facts['bearing']);
    const told = { ...facts, confidence: isSecond ? 'medium' : 'low' };
    const key = rule.replace(' ', '.');
    const cause = say(language, `assess.cause.${key}`, told);
    return {
      rule: rule.split(' ')[0] as string,
      message: say(language, `assess.indication.${key}`, { ...shownFacts(context.plant.settings.units, told), cause }),
      cause,
      confirm: say(language, `assess.confirm.${key}`, told),
      mark: 'common practice',
      facts: told,
    };
  });
}

const isVelocity = (r: Read): boolean => r.track.series.quantity === 'velocity' && r.track.series.detection === 'rms';
const directionOf = (r: Read): string | null => pointRow(r.track, r.look.reading.day).direction;
const bearings = (reads: readonly Read[]): Map<string, Read[]> => {
  const groups = new Map<string, Read[]>();
  for (const read of reads) groups.set(read.bearing, [...(groups.get(read.bearing) ?? []), read]);
  return groups;
};

/** I1 to I3: where displacement, velocity and acceleration of one point say that one frequency carries most of it. */
function frequencies(context: Context, reads: readonly Read[]): Hit[] {
  const hits: Hit[] = [];
  for (const point of new Set(reads.map((r) => r.track.series.point))) {
    const three = threeOf(reads, point);
    const one = reads.find((r) => r.track.series.point === point);
    const rpm = one === undefined ? null : (one.look.reading.speedRpm ?? one.look.limits.ratedRpm);
    if (three === null || one === undefined || rpm === null || rpm <= 0) continue;
    const [low, high] = [three.fromDisplacementHz, three.fromAccelerationHz].map((f) => (f * 60) / rpm) as [number, number];
    const near = (from: number, to: number): boolean => [low, high].every((o) => reaches(o, from) && reaches(to, o));
    const facts = { point, bearing: one.bearing, orders: (low + high) / 2, rpm };
    if (reaches(0.8, Math.max(low, high)) && !near(0.8, 1.2)) {
      const plain = componentRow(one.track, one.look.reading.day).bearings === 'plain';
      hits.push({
        rule: 'I3',
        facts: { ...facts, also: say(context.plant.settings.language, plain ? 'assess.indication.oil' : 'assess.indication.none', {}) },
      });
    } else if (exceeds(three.fromAccelerationHz / three.fromDisplacementHz, 1.25)) continue;
    else if (near(0.8, 1.2)) hits.push({ rule: 'I1', facts });
    else if (near(1.7, 2.3)) hits.push({ rule: 'I2', facts });
  }
  return hits;
}

/** I4: acceleration up by ×1.6 at one rolling bearing while its velocity has not moved. */
function bearingDamage(context: Context, reads: readonly Read[]): Hit[] {
  return reads.flatMap((r): Hit[] => {
    const { series } = r.track;
    const { baseline, value } = r.look;
    if (series.quantity !== 'acceleration' || !carriesRatio(baseline) || componentRow(r.track, r.look.reading.day).bearings !== 'rolling')
      return [];
    const floor = floorFor(series, pointRow(r.track, r.look.reading.day), context.policy);
    if (!reaches(value / baseline.value, 1.6) || floor === null || !reaches(value, floor)) return [];
    const velocities = reads.filter((v) => isVelocity(v) && v.bearing === r.bearing);
    const still =
      velocities.length > 0 &&
      velocities.every(
        (v) => v.look.limits.q !== null && v.look.baseline !== null && !risesBy(v.look.value, v.look.baseline.value, v.look.limits.q),
      );
    return still
      ? [{ rule: 'I4', facts: { point: series.point, bearing: r.bearing, ratio: value / baseline.value, value, unit: series.unit } }]
      : [];
  });
}

const hasRisen = (r: Read): boolean => {
  const { q } = r.look.limits;
  const before = [r.look.previous?.value ?? null, r.look.baseline?.value ?? null].filter((v): v is number => v !== null);
  return q !== null && before.some((b) => risesBy(r.look.value, b, q));
};

/** I5: axial at least half of the larger radial, and risen or in B or worse. */
function axial(reads: readonly Read[]): Hit[] {
  return reads.flatMap((r): Hit[] => {
    if (!isVelocity(r) || directionOf(r) !== 'axial') return [];
    const beside = reads.filter((o) => isVelocity(o) && directionOf(o) !== 'axial' && o.track.series.unit === r.track.series.unit);
    const same = beside.filter((o) => o.bearing === r.bearing);
    const radials = same.length > 0 ? same : beside.filter((o) => o.track.component === r.track.component);
    const radial = Math.max(...radials.map((o) => o.look.value));
    const isBad = r.look.zone !== null && r.look.zone !== 'A';
    if (radials.length === 0 || !reaches(r.look.value, 0.5 * radial) || !(hasRisen(r) || isBad)) return [];
    const overhung = componentRow(r.track, r.look.reading.day).rotor === 'overhung';
    return [
      {
        rule: overhung ? 'I5 overhung' : 'I5',
        facts: { point: r.track.series.point, bearing: r.bearing, axial: r.look.value, radial, unit: r.track.series.unit },
      },
    ];
  });
}

/** I6 and I7: vertical against horizontal at one bearing. */
function stiffness(reads: readonly Read[]): Hit[] {
  const hits: Hit[] = [];
  for (const [bearing, group] of bearings(reads.filter(isVelocity))) {
    const [h, v] = [group.find((r) => directionOf(r) === 'horizontal'), group.find((r) => directionOf(r) === 'vertical')];
    if (h === undefined || v === undefined) continue;
    const facts = { bearing, vertical: v.look.value, horizontal: h.look.value, unit: v.track.series.unit };
    const earlier = [
      [v.look.previous?.value, h.look.previous?.value],
      [v.look.baseline?.value, h.look.baseline?.value],
    ];
    const wasLower = earlier.some(([below, above]) => typeof below === 'number' && typeof above === 'number' && reaches(above, below));
    const lies = componentRow(v.track, v.look.reading.day).orientation !== 'vertical';
    if (lies && exceeds(v.look.value, 1.2 * h.look.value) && hasRisen(v) && wasLower) hits.push({ rule: 'I6', facts });
    const [low, high] = [Math.min(h.look.value, v.look.value), Math.max(h.look.value, v.look.value)];
    if (low > 0 && reaches(high, 4 * low)) hits.push({ rule: 'I7', facts: { ...facts, ratio: high / low } });
  }
  return hits;
}

/** Changes of less than this are the scatter of readings. */
const CHANGED = 1.25;

/** I8: three quarters of a train's points changed by one ratio, or one bearing alone. */
function common(reads: readonly Read[]): Hit[] {
  const changed = reads.flatMap((r) =>
    r.look.previous === null || !(Number(r.look.previous.value) > 0) ? [] : [{ r, ratio: r.look.value / Number(r.look.previous.value) }],
  );
  if (changed.length < 3) return [];
  const middle = median(changed.map((c) => c.ratio));
  const close = changed.filter((c) => !exceeds(Math.abs(c.ratio / middle - 1), 0.2));
  if ((reaches(middle, CHANGED) || reaches(1 / CHANGED, middle)) && reaches(close.length, 0.75 * changed.length))
    return [{ rule: 'I8', facts: { points: close.length, of: changed.length, ratio: middle } }];
  const rising = new Set(reads.filter((r) => ['fast', 'rising'].includes(r.verdict.movement?.travel ?? '')).map((r) => r.bearing));
  const all = new Set(reads.map((r) => r.bearing));
  const [only] = rising;
  return rising.size === 1 && all.size >= 3 && only !== undefined
    ? [{ rule: 'I8 local', facts: { bearing: only, bearings: all.size } }]
    : [];
}

/** I9: the 1× carries the overall, and its phase from horizontal to vertical tells whether the force turns. */
function phases(reads: readonly Read[]): Hit[] {
  const hits: Hit[] = [];
  const phased = reads.filter(
    (r) => r.look.reading.phase?.amplitude != null && reaches(r.look.reading.phase.amplitude, 0.8 * r.look.value),
  );
  for (const [bearing, group] of bearings(phased)) {
    const [h, v] = [group.find((r) => directionOf(r) === 'horizontal'), group.find((r) => directionOf(r) === 'vertical')];
    const [a, b] = [h?.look.reading.phase, v?.look.reading.phase];
    if (a == null || b == null || a.reference !== b.reference) continue;
    const apart = Math.abs(((((a.lagDeg - b.lagDeg) % 360) + 540) % 360) - 180);
    const facts = { bearing, degrees: apart };
    if (!exceeds(Math.abs(apart - 90), 30)) hits.push({ rule: 'I9', facts });
    else if (reaches(30, apart) || reaches(apart, 150)) hits.push({ rule: 'I9 directional', facts });
  }
  return hits;
}

/** I10: the vector moved by more than q while the level did not. */
function hiddenVector(reads: readonly Read[]): Hit[] {
  return reads.flatMap((r): Hit[] => {
    const { q } = r.look.limits;
    const vector = r.verdict.movement?.vector ?? null;
    const before = r.look.previous?.value ?? null;
    if (
      q === null ||
      vector === null ||
      before === null ||
      !exceeds(vector.amplitude, q) ||
      risesBy(r.look.value, before, q) ||
      risesBy(before, r.look.value, q)
    )
      return [];
    return [
      {
        rule: 'I10',
        facts: {
          point: r.track.series.point,
          bearing: r.bearing,
          vector: vector.amplitude,
          change: Math.abs(r.look.value - before),
          unit: r.track.series.unit,
        },
      },
    ];
  });
}

/** I11: true peak over r.m.s. of acceleration from six, where it was at most four. */
function crest(reads: readonly Read[]): Hit[] {
  return reads.flatMap((peak): Hit[] => {
    const { series } = peak.track;
    if (series.quantity !== 'acceleration' || series.detection !== 'true peak') return [];
    const rms = reads.find(
      (r) =>
        r.track.series.point === series.point &&
        r.track.series.quantity === 'acceleration' &&
        r.track.series.detection === 'rms' &&
        r.track.series.unit === series.unit,
    );
    if (rms === undefined || rms.look.baseline === null || peak.look.baseline === null) return [];
    const [now, then] = [peak.look.value / rms.look.value, peak.look.baseline.value / rms.look.baseline.value];
    return reaches(now, 6) && reaches(4, then)
      ? [{ rule: 'I11', facts: { point: series.point, bearing: peak.bearing, crest: now, before: then } }]
      : [];
  });
}
