/**
 * Limits of a series on a day. In: the limit set that limits/ chooses. Out: its boundaries in the series' own unit and
 * detection, q and the caps of ALARM and TRIP. Never: a true peak under an r.m.s. limit.
 */
import { chooseLimits, ownLimits } from '../limits/choose.ts';
import { ratedSpeedRpm } from '../limits/speed.ts';
import type { LimitSet, OwnLimits } from '../limits/types.ts';
import { limitFactor } from '../measure/limit-factor.ts';
import type { Day } from '../plant/day.ts';
import type { Dated, SurveyKind } from '../plant/types.ts';
import type { Facts } from '../record/types.ts';
import type { Context, Track } from './track.ts';

export interface LimitsInForce {
  readonly set: LimitSet | null;
  /** Why this set, or why none: a sentence of `limits.*`. */
  readonly reason: { readonly key: string; readonly facts: Facts };
  /** Two sets in force at one rank, or a name that no set bears. */
  readonly conflict: string | null;
  readonly byOurChoice: boolean;
  /** Boundaries in the unit and detection of the series; all null where the set does not apply to it. */
  readonly ab: number | null;
  readonly bc: number | null;
  readonly cd: number | null;
  readonly alarm: number | null;
  readonly trip: number | null;
  readonly by: 'exact' | 'sine';
  /** True: a set was chosen, but its detection cannot be told from the series' own. */
  readonly otherDetection: boolean;
  /** Criterion II: share `4.q` of B/C; null without B/C. */
  readonly q: number | null;
  readonly ratedRpm: number | null;
}

/** Chooses once for each stretch of days on which no dated row changes. */
export class LimitBook {
  readonly #context: Context;
  readonly #own: OwnLimits;
  readonly #limitDays: readonly Day[];
  readonly #kept = new Map<Track, Map<string, LimitsInForce>>();
  readonly #constant = new Map<Track, LimitsInForce>();
  readonly #acceptance = new Map<Track, LimitsInForce>();

  constructor(context: Context) {
    this.#context = context;
    this.#own = ownLimits(context.plant.limits);
    this.#limitDays = startDays(context.plant.limits);
  }

  at(track: Track, day: Day, kind: SurveyKind): LimitsInForce {
    if (!this.#neverChanges(track)) return this.#atStretch(track, day, kind);
    const kept = (kind === 'acceptance' ? this.#acceptance : this.#constant).get(track);
    if (kept !== undefined) return kept;
    const found = this.#choose(track, day, kind);
    (kind === 'acceptance' ? this.#acceptance : this.#constant).set(track, found);
    return found;
  }

  /** No dated row bears on it, so one choice serves all its days. */
  #neverChanges({ series, machine }: Track): boolean {
    return (
      this.#limitDays.every((day) => day === Number.NEGATIVE_INFINITY) &&
      [series, machine, ...machine.components].every(({ rows }) => rows.length === 1)
    );
  }

  #atStretch(track: Track, day: Day, kind: SurveyKind): LimitsInForce {
    let kept = this.#kept.get(track);
    if (kept === undefined) {
      kept = new Map();
      this.#kept.set(track, kept);
    }
    const { series, machine } = track;
    // Rated speed and what it is coupled to are read from the other components too.
    const begun = [series, machine, ...machine.components].map(({ rows }) => countBefore(rows, day)).join(' ');
    const stretch = `${kind === 'acceptance' ? 'a' : ''}${startsBefore(this.#limitDays, day)} ${begun}`;
    let found = kept.get(stretch);
    if (found === undefined) {
      found = this.#choose(track, day, kind);
      kept.set(stretch, found);
    }
    return found;
  }

  #choose(track: Track, day: Day, surveyKind: SurveyKind): LimitsInForce {
    const { plant, policy } = this.#context;
    const { machine, component, series } = track;
    const choice = chooseLimits({ plant, machine, component, series, day, surveyKind, own: this.#own });
    const set = choice.conflict === null ? choice.set : null;
    const factor =
      set === null
        ? null
        : limitFactor({ unit: set.unit, detection: set.detection ?? series.detection }, { unit: series.unit, detection: series.detection });
    const inSeries = (value: number | null): number | null => (value === null || factor === null ? null : value * factor.factor);
    const bc = inSeries(set?.bc ?? null);
    return {
      set,
      reason: { key: choice.rule, facts: choice.facts },
      conflict: choice.conflict,
      byOurChoice: choice.byOurChoice,
      ab: inSeries(set?.ab ?? null),
      bc,
      cd: inSeries(set?.cd ?? null),
      alarm: inSeries(set?.alarm ?? null),
      trip: inSeries(set?.trip ?? null),
      by: factor?.by ?? 'exact',
      otherDetection: set !== null && factor === null,
      q: bc === null ? null : policy['4.q'] * bc,
      ratedRpm: ratedSpeedRpm(machine, component, day),
    };
  }
}

const startDays = (rows: readonly Dated[]): Day[] =>
  [...new Set(rows.map((r) => r.validFrom ?? Number.NEGATIVE_INFINITY))].sort((a, b) => a - b);

function startsBefore(days: readonly Day[], day: Day): number {
  let count = 0;
  for (const d of days) if (d <= day) count += 1;
  return count;
}

function countBefore(rows: readonly Dated[], day: Day): number {
  if (rows.length === 1) return 0;
  let count = 0;
  for (const row of rows) if (row.validFrom === null || row.validFrom <= day) count += 1;
  return count;
}
