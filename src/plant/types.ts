/**
 * The Plant: everything that was read from a plant folder, in plain data. survey/ makes it, assess/ reads it;
 * they meet nowhere else. Nothing here is computed beyond what reading needs (a reading's value is in its
 * series' unit). A blank cell is null: unknown, never zero.
 */
import type { Detection } from '../measure/detection.ts';
import type { Day } from './day.ts';
import type { Policy } from './policy.ts';
import type { Place, Problem } from './problem.ts';
import type { Phase, Survey } from './survey.ts';
import type { Criticality, Direction, EventKind, Kind, MeasuredOn, Status, Support } from './words.ts';

export * from './survey.ts';
export * from './words.ts';

/** A row that is in force from a day on; the last with validFrom ≤ the reading's day judges it (null = always). */
export interface Dated {
  readonly validFrom: Day | null;
  readonly place: Place | null;
}

export interface MachineRow extends Dated {
  readonly name: string | null;
  readonly area: string | null;
  readonly route: string | null;
  /** null = not stated: assessed as essential, and said so. */
  readonly criticality: Criticality | null;
  readonly spareGroup: string | null;
  /** false: never relieved by a spare. */
  readonly relief: boolean;
  readonly intervalDays: number | null;
  readonly nextStop: Day | null;
  readonly inServiceFrom: Day | null;
  readonly removedOn: Day | null;
  readonly family: string | null;
  readonly notes: string | null;
}

export interface ComponentRow extends Dated {
  readonly kind: Kind | null;
  readonly powerKw: number | null;
  readonly speedRpm: number | null;
  readonly speedRatio: number | null;
  readonly speedMinRpm: number | null;
  readonly speedMaxRpm: number | null;
  readonly drive: 'fixed' | 'variable' | null;
  readonly support: Support | null;
  readonly shaftHeightMm: number | null;
  readonly bearings: 'rolling' | 'plain' | null;
  readonly orientation: 'horizontal' | 'vertical' | null;
  readonly rotor: 'between bearings' | 'overhung' | null;
  readonly pumpCategory: 'I' | 'II' | null;
  readonly fanCategory: 'BV-1' | 'BV-2' | 'BV-3' | 'BV-4' | 'BV-5' | null;
  /** ISO 20816-9 housing velocity rating VR in mm/s r.m.s., e.g. 8. */
  readonly gearRatingVr: number | null;
  readonly limitSet: string | null;
  readonly serial: string | null;
  readonly makeLimits: string | null;
  readonly notes: string | null;
}

export interface PointRow extends Dated {
  readonly location: string | null;
  readonly direction: Direction | null;
  readonly measuredOn: MeasuredOn | null;
  readonly scale: 'linear' | 'dB' | 'none';
  readonly lowHz: number | null;
  readonly highHz: number | null;
  readonly support: Support | null;
  readonly limitSet: string | null;
  /** Stated baseline in the series' unit. */
  readonly baseline: number | null;
  readonly baselineFrom: string | null;
  /** In the series' unit. */
  readonly floor: number | null;
  readonly notes: string | null;
}

/** A machine: what maintenance calls one, usually a train. `rows` ascending by validFrom (null first), never empty. */
export interface Machine {
  readonly id: string;
  readonly rows: readonly MachineRow[];
  /** Never empty: without components.csv one component of the machine's own name, `implicit`. */
  readonly components: readonly Component[];
  readonly series: readonly Series[];
  /** False where machines.csv is absent and the machine is known from its readings only. */
  readonly declared: boolean;
}

export interface Component {
  readonly id: string;
  /** Stands for the whole machine and is not printed as a component. */
  readonly implicit: boolean;
  readonly rows: readonly ComponentRow[];
}

/** All readings of one thing measured at one place: key (machine, point, quantity, detection). */
export interface Series {
  readonly machine: string;
  readonly component: string;
  readonly point: string;
  /** velocity, displacement, acceleration, or the plant's own word. */
  readonly quantity: string;
  /** null only for a plant's own quantity. */
  readonly detection: Detection | null;
  /** Canonical symbol for the three known quantities (mm/s, in/s, m/s, µm, mm, mil, in, g, m/s², mm/s², in/s²), else free text. */
  readonly unit: string;
  readonly rows: readonly PointRow[];
  /** Ascending by survey index; at most one for each survey (the last retake; earlier ones in `retakes`). */
  readonly readings: readonly Reading[];
}

export interface Reading {
  /** Index into Plant.surveys. */
  readonly survey: number;
  readonly day: Day;
  readonly status: Status;
  /** In the series' unit and detection; null when there is no number (blank, a bound `<`, a status). A `>` bound keeps its number here. */
  readonly value: number | null;
  readonly bound: '<' | '>' | null;
  /** As typed, with no unit; null when blank. */
  readonly typed: string | null;
  /** The unit as typed where it is not the series' own (converted exactly); else null. */
  readonly typedUnit: string | null;
  /** Override of the point's band; null = the point's. */
  readonly lowHz: number | null;
  readonly highHz: number | null;
  readonly speedRpm: number | null;
  readonly loadPct: number | null;
  readonly state: string | null;
  readonly phase: Phase | null;
  readonly runningHours: number | null;
  readonly takenAt: string | null;
  readonly instrument: string | null;
  readonly sensor: string | null;
  readonly measuredBy: string | null;
  readonly remark: string | null;
  readonly place: Place;
  /** Earlier takes of the same key, oldest first; null when there is none (the common case). */
  readonly retakes: readonly Reading[] | null;
}

export interface PlantEvent {
  readonly machine: string;
  /** null = all. */
  readonly component: string | null;
  readonly point: string | null;
  readonly quantity: string | null;
  readonly day: Day;
  readonly event: EventKind;
  readonly newBaseline: boolean;
  readonly serialOut: string | null;
  readonly serialIn: string | null;
  readonly notes: string | null;
  readonly place: Place;
}

export interface LedgerAction {
  readonly id: string;
  readonly finding: string | null;
  readonly machine: string;
  readonly raised: Day | null;
  readonly recommendation: string | null;
  readonly due: Day | null;
  readonly owner: string | null;
  readonly workOrder: string | null;
  readonly status: 'open' | 'ordered' | 'done' | 'rejected';
  readonly closed: Day | null;
  readonly closedBy: string | null;
  readonly asFound: string | null;
  readonly verifyPoint: string | null;
  readonly verifyBelow: number | null;
  readonly notes: string | null;
  readonly place: Place;
}

export interface Accepted {
  readonly machine: string;
  /** null = every point. */
  readonly point: string | null;
  readonly quantity: string | null;
  /** In the unit of the series it applies to. */
  readonly upTo: number;
  readonly until: Day | null;
  readonly by: string | null;
  readonly reason: string | null;
  readonly place: Place;
}

export interface Rename {
  readonly kind: 'machine' | 'component' | 'point';
  readonly machine: string | null;
  readonly old: string;
  readonly new: string;
  readonly since: Day | null;
  readonly place: Place;
}

export type LimitBasis = 'maker' | 'contract' | 'statistics' | 'owner' | 'standard';

/** A row of limits.csv: one quantity of one of the plant's own limit sets. */
export interface LimitRow extends Dated {
  readonly limitSet: string;
  readonly title: string | null;
  readonly basis: LimitBasis;
  readonly source: string | null;
  readonly edition: string | null;
  readonly quantity: string;
  readonly unit: string;
  readonly detection: Detection | null;
  readonly measuredOn: MeasuredOn | null;
  readonly lowHz: number | null;
  readonly highHz: number | null;
  readonly ab: number | null;
  readonly bc: number | null;
  readonly cd: number | null;
  readonly alarm: number | null;
  readonly trip: number | null;
  readonly appliesMachine: string | null;
  readonly appliesComponent: string | null;
  readonly appliesPoint: string | null;
  readonly appliesKind: Kind | null;
  readonly approvedBy: string | null;
  readonly approvedOn: Day | null;
  readonly notes: string | null;
}

export interface Contractor {
  readonly name: string | null;
  readonly address: string | null;
  readonly contact: string | null;
  readonly logo: string | null;
  readonly accent: string | null;
}

export interface PlannedStop {
  readonly day: Day;
  /** null = plant-wide. */
  readonly area: string | null;
}

export interface PlantSettings {
  readonly plant: string;
  readonly client: string | null;
  readonly site: string | null;
  readonly contract: string | null;
  readonly procedure: string | null;
  readonly contractor: Contractor;
  readonly language: 'en' | 'de' | 'es' | 'fr';
  readonly paper: 'A4' | 'Letter';
  /** Display unit and detection by quantity. */
  readonly units: Readonly<Record<string, { readonly unit: string | null; readonly detection: Detection | null }>>;
  readonly frequencyUnit: 'Hz' | 'CPM';
  readonly peakMeans: 'calculated' | 'true' | null;
  readonly nextStops: readonly PlannedStop[];
  readonly retention: string | null;
  readonly distribution: readonly string[];
}

export interface InputFile {
  readonly path: string;
  readonly bytes: number;
  readonly sha256: string;
}

export interface Plant {
  readonly settings: PlantSettings;
  readonly policy: Policy;
  /** Ascending by id (code unit order). */
  readonly machines: readonly Machine[];
  /** Ascending by day, then id. Readings refer to them by index. */
  readonly surveys: readonly Survey[];
  readonly limits: readonly LimitRow[];
  readonly events: readonly PlantEvent[];
  readonly actions: readonly LedgerAction[];
  readonly accepted: readonly Accepted[];
  readonly renames: readonly Rename[];
  readonly problems: readonly Problem[];
  readonly inputs: readonly InputFile[];
}

/** The row in force on a day: the last with validFrom ≤ day; before the first, the first (it is all that is known). */
export function inForce<T extends Dated>(rows: readonly T[], day: Day): T {
  let found = rows[0] as T;
  for (const row of rows) if (row.validFrom === null || row.validFrom <= day) found = row;
  return found;
}
