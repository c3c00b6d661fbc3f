/**
 * Working data of the assessment. In: the Plant, cut at the survey. Out: a track for each series: its readings by survey
 * and, filled survey by survey, how each was looked at in its own time. Never: verdicts by today's comparisons.
 */
import type { Day } from '../plant/day.ts';
import type { Policy } from '../plant/policy.ts';
import {
  type Component,
  type ComponentRow,
  inForce,
  type LedgerAction,
  type Machine,
  type MachineRow,
  type Plant,
  type PlantEvent,
  type PointRow,
  type Reading,
  type Series,
} from '../plant/types.ts';
import type { Doubt, Facts, RatioClass, Zone } from '../record/types.ts';
import type { LimitsInForce } from './limits-in-force.ts';
import type { Sisterhood } from './sisterhood.ts';

export interface Baseline {
  /** In the unit and detection of the series. */
  readonly value: number;
  /** Date of the first reading in it, or what the plant states about it. */
  readonly from: string;
  /** Readings it was made from; 0 where the plant states it. */
  readonly n: number;
  readonly provisional: boolean;
}

/** A reading judged as of its own survey. */
export interface Look {
  readonly survey: number;
  readonly reading: Reading;
  /** The number judged: in the unit and detection of the series. */
  readonly value: number;
  readonly limits: LimitsInForce;
  /** Earlier readings it compares with, oldest first. */
  readonly comparable: readonly Reading[];
  readonly previous: Reading | null;
  readonly baseline: Baseline | null;
  readonly zone: Zone | null;
  /** Key and facts of the sentence why there is no zone; null where there is one. */
  readonly noZone: { readonly key: string; readonly facts: Facts } | null;
  readonly ratioClass: RatioClass | null;
  /** Added by the doubts' step. */
  readonly doubts: Doubt[];
  /** What "last time" means for doubts, once it has been asked for. */
  lastTime: number | null | undefined;
  /** A fall by the factor of the rules that a closing event or a second low reading explains. */
  explainedFall: 'event' | 'second reading' | null;
}

export interface Track {
  readonly machine: Machine;
  readonly component: Component;
  readonly series: Series;
  /** By survey; null where there is none. */
  readonly readings: readonly (Reading | null)[];
  /** By survey; null where there is no number to judge. */
  readonly looks: (Look | null)[];
  /** Events that concern this series, by day. */
  readonly events: readonly PlantEvent[];
  /** Every reading was taken alike, so that all measured ones compare unless one is doubted. */
  readonly uniform: boolean;
  /** Survey from which on the reading of a survey is no longer doubted low, by survey. */
  readonly lifted: (number | null)[];
}

/** What every step of the assessment may read. */
export interface Context {
  readonly plant: Plant;
  readonly policy: Policy;
  /** Index of the survey that is assessed: the last in `plant.surveys`. */
  readonly current: number;
  readonly tracks: readonly Track[];
  readonly byMachine: ReadonlyMap<string, readonly Track[]>;
  /** Ledger actions done, by machine. */
  readonly closedActions: ReadonlyMap<string, readonly LedgerAction[]>;
  /** How each current reading stands among its sisters; filled once all are looked at. */
  readonly sisters: Map<Track, Sisterhood>;
  /** Median gap of the last routine surveys; null with one survey. */
  readonly usualIntervalDays: number | null;
}

export const dayAt = (context: Context, survey: number): Day => (context.plant.surveys[survey] as { day: Day }).day;

export const pointRow = (track: Track, day: Day): PointRow => inForce(track.series.rows, day);
export const componentRow = (track: Track, day: Day): ComponentRow => inForce(track.component.rows, day);
export const machineRow = (machine: Machine, day: Day): MachineRow => inForce(machine.rows, day);

/** True where a low-side doubt stands: the reading keeps its zone, but holds the level of the last one. */
export const doubtedLow = (look: Look): boolean => look.doubts.some((d) => d.effect === 'held');
export const doubtedHigh = (look: Look): boolean => look.doubts.some((d) => d.effect === 're-measure');

/** A number that can be judged: measured, finite and no bound. */
export const isMeasured = (reading: Reading | null): reading is Reading & { value: number } =>
  reading !== null && reading.status === 'measured' && reading.value !== null && reading.bound === null;

function concerns(event: PlantEvent, component: string, series: Series): boolean {
  return (
    (event.component === null || event.component === component) &&
    (event.point === null || event.point === series.point) &&
    (event.quantity === null || event.quantity === series.quantity)
  );
}

/**
 * Whether every reading of a series was taken alike: one band, state, sensor and place, speeds and loads as near as the rules
 * ask of any two. Most series of a plant are so, and none of their readings need be held against each other.
 */
function isUniform(series: Series, component: Component, policy: Policy): boolean {
  const [first] = series.readings;
  if (first === undefined || series.rows.length > 1 || component.rows.length > 1) return false;
  const highHz = series.rows[0]?.highHz ?? null;
  const drive = component.rows[0]?.drive ?? null;
  const seesMounting = highHz === null || highHz > policy['3.mounting.above'];
  let [slowest, fastest, least, most] = [Number.POSITIVE_INFINITY, 0, Number.POSITIVE_INFINITY, 0];
  for (const r of series.readings) {
    if (r.lowHz !== null || r.highHz !== null || r.sensor !== null || r.state !== first.state || (r.instrument !== null && seesMounting))
      return false;
    if (r.speedRpm === null && drive === 'variable') return false;
    if (r.speedRpm !== null) [slowest, fastest] = [Math.min(slowest, r.speedRpm), Math.max(fastest, r.speedRpm)];
    if (r.loadPct !== null) [least, most] = [Math.min(least, r.loadPct), Math.max(most, r.loadPct)];
  }
  return (fastest === 0 || fastest - slowest <= policy['3.speed.overall'] * slowest) && most - least <= policy['3.load'];
}

/** Tracks of all series in the order of machines and series; readings are spread over the surveys. */
export function tracksOf(plant: Plant): Track[] {
  const events = new Map<string, PlantEvent[]>();
  for (const event of plant.events) {
    const list = events.get(event.machine);
    if (list === undefined) events.set(event.machine, [event]);
    else list.push(event);
  }
  const tracks: Track[] = [];
  for (const machine of plant.machines) {
    const own = events.get(machine.id) ?? [];
    const components = new Map(machine.components.map((c) => [c.id, c]));
    for (const series of machine.series) {
      const component = components.get(series.component) ?? (machine.components[0] as Component);
      const readings = new Array<Reading | null>(plant.surveys.length).fill(null);
      for (const reading of series.readings) readings[reading.survey] = reading;
      tracks.push({
        machine,
        component,
        series,
        readings,
        looks: new Array<Look | null>(plant.surveys.length).fill(null),
        events: own.length === 0 ? own : own.filter((e) => concerns(e, component.id, series)).sort((a, b) => a.day - b.day),
        uniform: isUniform(series, component, plant.policy) && !own.some((e) => concerns(e, component.id, series)),
        lifted: new Array<number | null>(plant.surveys.length).fill(null),
      });
    }
  }
  return tracks;
}
