/**
 * The Record: one survey assessed, the contract between computing and writing. Field names are those of record.json.
 * What is absent is null, never 0. Readers find everything they print here and nowhere else.
 */
import type { Detection } from '../measure/detection.ts';
import type { Mark } from '../plant/policy.ts';
import type { Problem } from '../plant/problem.ts';
import type { Criticality, SurveyKind, Urgency } from '../plant/types.ts';
import type { Facts } from '../words/facts.ts';
import type { RecordAction } from './action.ts';
import type { RecordMeasurement } from './measurement.ts';
import type { Condition, DateText, Doubt, Indication, Override, SeriesKey } from './terms.ts';

export type { Facts };
export * from './action.ts';
export * from './measurement.ts';
export * from './terms.ts';

export const RECORD_FORMAT = 1;

export interface Issue {
  readonly number: string;
  readonly revision: number;
  readonly issued_on: DateText;
  readonly replaces: string | null;
  readonly reason: string | null;
  readonly previous_manifest: string | null;
  /** What changed since the issue it replaces, a line a change; absent in a first issue. */
  readonly changes?: readonly string[];
  /** Issues of the archive whose retention had ended on the day of this one; null where the plant's words name no number of years; absent where it states none. */
  readonly retention_due?: readonly string[] | null;
}

/** plant.yaml as the report needs it. */
export interface RecordPlant {
  readonly plant: string;
  readonly client: string | null;
  readonly site: string | null;
  readonly contract: string | null;
  readonly procedure: string | null;
  readonly contractor: {
    readonly name: string | null;
    readonly address: string | null;
    readonly contact: string | null;
    readonly logo: string | null;
    readonly accent: string | null;
  };
  readonly language: 'en' | 'de' | 'es' | 'fr';
  readonly paper: 'A4' | 'Letter';
  readonly units: { readonly [quantity: string]: { readonly unit: string | null; readonly detection: Detection | null } };
  readonly frequency_unit: 'Hz' | 'CPM';
  readonly next_stops: readonly { readonly date: DateText; readonly area: string | null }[];
  /** Ids that were changed, and since when; absent in early records. */
  readonly renames?: readonly {
    readonly kind: 'machine' | 'component' | 'point';
    readonly machine: string | null;
    readonly old: string;
    readonly new: string;
    readonly since: DateText | null;
  }[];
  readonly retention: string | null;
  readonly distribution: readonly string[];
}

export interface RecordPerson {
  readonly name: string;
  readonly role: string | null;
  readonly category: string | null;
  readonly certificate: string | null;
  readonly expires: DateText | null;
}

export interface RecordInstrument {
  readonly id: string;
  readonly make: string | null;
  readonly model: string | null;
  readonly serial: string | null;
  readonly band: string | null;
  readonly calibrated_on: DateText | null;
  readonly calibration_due: DateText | null;
  readonly certificate: string | null;
  readonly laboratory: string | null;
}

export interface RecordScope {
  readonly all: boolean;
  readonly areas: readonly string[];
  readonly routes: readonly string[];
  readonly machines: readonly string[];
}

/** The survey this record is of. */
export interface RecordSurvey {
  readonly id: string;
  readonly from: DateText;
  readonly to: DateText;
  readonly kind: SurveyKind;
  readonly scope: RecordScope;
  readonly people: readonly RecordPerson[];
  readonly instruments: readonly RecordInstrument[];
  readonly sensors: readonly {
    readonly id: string;
    readonly serial: string | null;
    readonly sensitivity: string | null;
    readonly mounting: string | null;
    readonly calibration_due: DateText | null;
  }[];
  readonly field_check: string | null;
  readonly process: string | null;
  readonly weather: string | null;
  readonly remarks: string | null;
  readonly issue_date: DateText | null;
  readonly reviewed_by: string | null;
  readonly approved_by: string | null;
  readonly notified: readonly {
    readonly who: string;
    readonly when: string | null;
    readonly how: string | null;
    readonly about: string | null;
  }[];
  readonly photos: readonly {
    readonly path: string;
    readonly machine: string;
    readonly point: string | null;
    readonly caption: string | null;
  }[];
}

/** Any survey up to this one; history columns are aligned to the list of them. */
export interface SurveyLine {
  readonly id: string;
  readonly date: DateText;
  readonly from: DateText;
  readonly to: DateText;
  readonly kind: SurveyKind;
  readonly scope: RecordScope;
  readonly people: readonly RecordPerson[];
  readonly instruments: readonly RecordInstrument[];
  /** Where its readings came from; a history names its files only where they are others. */
  readonly file: string | null;
  /** Condition by machine id at that survey, recomputed by today's rules; a machine that was not measured is absent. */
  readonly conditions: { readonly [machine: string]: Condition };
}

export interface PolicyLine {
  readonly id: string;
  readonly value: number;
  readonly unit: string;
  readonly mark: Mark;
  readonly about: string;
  /** True where plant.yaml set it. */
  readonly overridden: boolean;
}

export interface LimitSetLine {
  readonly id: string;
  readonly title: string;
  readonly basis: 'maker' | 'contract' | 'statistics' | 'owner' | 'standard';
  readonly source: string | null;
  readonly edition: string | null;
  readonly table: string | null;
  /** confirmed (two or more public sources, or arithmetic that reproduces every digit), one source, recalled (from memory), or null for the plant's own. */
  readonly confidence: 'confirmed' | 'one source' | 'recalled' | null;
  readonly boundaries: { readonly ab: number | null; readonly bc: number | null; readonly cd: number | null };
  readonly quantity: string;
  readonly unit: string;
  readonly detection: Detection | null;
  readonly low_hz: number | null;
  readonly high_hz: number | null;
  readonly valid_from: DateText | null;
  readonly approved_by: string | null;
  readonly approved_on: DateText | null;
}

export interface RecordMachine {
  readonly machine: string;
  readonly name: string | null;
  readonly area: string | null;
  readonly route: string | null;
  readonly family: string | null;
  readonly criticality: Criticality;
  /** False: not stated, taken as essential. */
  readonly criticality_stated: boolean;
  readonly condition: Condition;
  /** [n, m]: n of m assessable points were measured. */
  readonly measured_of: readonly [number, number];
  readonly previous_condition: Condition | null;
  readonly governed_by: SeriesKey | null;
  readonly urgency: Urgency | null;
  readonly urgency_by: SeriesKey | null;
  readonly rule: string | null;
  readonly reason: string;
  readonly facts: Facts;
  readonly computed_urgency: Urgency | null;
  readonly override: Override | null;
  readonly spare: { readonly machine: string; readonly proven: boolean; readonly reason: string; readonly facts: Facts } | null;
  readonly accepted: readonly {
    readonly point: string | null;
    readonly quantity: string | null;
    readonly up_to: number;
    /** Unit and detection of up_to. */
    readonly unit: string | null;
    readonly until: DateText | null;
    readonly by: string | null;
    readonly reason: string | null;
    /** False once the value or the date is past: then it accepts nothing. */
    readonly in_force: boolean;
  }[];
  readonly indications: readonly Indication[];
  readonly doubts: readonly Doubt[];
  readonly cannot_see: readonly string[];
  readonly events: readonly {
    readonly date: DateText;
    readonly component: string | null;
    readonly point: string | null;
    readonly quantity: string | null;
    readonly event: string;
    readonly new_baseline: boolean;
    readonly serial_out: string | null;
    readonly serial_in: string | null;
    readonly notes: string | null;
  }[];
}

export interface RecordComponent {
  readonly machine: string;
  readonly component: string;
  /** True: stands for the whole machine, not printed as a component. */
  readonly implicit: boolean;
  readonly kind: string | null;
  readonly condition: Condition;
  readonly governed_by: SeriesKey | null;
  readonly limit_set: string | null;
  readonly limit_reason: string;
  readonly power_kw: number | null;
  readonly speed_rpm: number | null;
}

/** A machine of the scope, or due, that was not wholly measured, or that was: one line for each machine in service. */
export interface CoverageLine {
  readonly machine: string;
  readonly due: boolean;
  readonly in_scope: boolean;
  readonly measured: number;
  readonly of: number;
  readonly status: 'measured' | 'partly measured' | 'not measured' | 'excused' | 'not due' | 'out of scope';
  /** e.g. `no access`, `stopped`, `missing`: the commonest reason among its points. */
  readonly why: string | null;
  readonly misses_in_a_row: number;
  readonly last_measured: DateText | null;
  readonly next_due: DateText | null;
  readonly interval_days: number | null;
}

export interface PlantOverTime {
  readonly survey: string;
  readonly date: DateText;
  readonly conditions: { readonly [C in Condition]: number };
  readonly measured: number;
  readonly of: number;
  readonly open_actions: number;
  readonly closed_actions: number;
  /** Median days from raised to closed of the actions closed since the survey before; null where none was. Absent in early records. */
  readonly closure_days?: number | null;
  /** Open actions that stood at an earlier survey already. Absent in early records. */
  readonly repeats?: number;
}

/** A rule that may stand beside a verdict. */
export interface RuleLine {
  readonly id: string;
  readonly mark: Mark;
  readonly about: string;
  /** Of the urgency table: critical, essential, general, then the same with a proven spare; else empty. */
  readonly levels: readonly string[];
}

export interface SwayfolioRecord {
  readonly format: number;
  readonly tool: { readonly name: string; readonly version: string };
  readonly issue: Issue | null;
  readonly plant: RecordPlant;
  readonly survey: RecordSurvey;
  readonly surveys: readonly SurveyLine[];
  readonly policy: readonly PolicyLine[];
  readonly policy_hash: string;
  /** Absent in early records. */
  readonly rules?: readonly RuleLine[];
  readonly limit_sets: readonly LimitSetLine[];
  readonly cautions: readonly string[];
  readonly machines: readonly RecordMachine[];
  readonly components: readonly RecordComponent[];
  /** Grouped by machine in the order of `machines`, then by point. */
  readonly measurements: readonly RecordMeasurement[];
  /** In rank order; verified and rejected ones of this survey stand at the end with rank 0. */
  readonly actions: readonly RecordAction[];
  readonly coverage: readonly CoverageLine[];
  readonly plant_over_time: readonly PlantOverTime[];
  readonly problems: readonly Problem[];
  readonly inputs: readonly { readonly path: string; readonly bytes: number; readonly sha256: string }[];
}
