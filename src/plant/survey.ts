/** A survey: who measured what with what, and what the analyst found. */
import type { Day } from './day.ts';
import type { Place } from './problem.ts';
import type { SurveyKind, Urgency } from './words.ts';

/** A 1× vector: amplitude in the series' unit and detection, angle as a lag in degrees after conversion from the stated convention. */
export interface Phase {
  readonly amplitude: number | null;
  readonly lagDeg: number;
  readonly reference: string | null;
}

export interface Person {
  readonly name: string;
  readonly role: string | null;
  /** e.g. `ISO 18436-2 category II`; as typed. */
  readonly category: string | null;
  readonly certificate: string | null;
  readonly expires: Day | null;
}

export interface Instrument {
  readonly id: string;
  readonly make: string | null;
  readonly model: string | null;
  readonly serial: string | null;
  readonly band: string | null;
  readonly calibratedOn: Day | null;
  readonly calibrationDue: Day | null;
  readonly certificate: string | null;
  readonly laboratory: string | null;
}

export interface Sensor {
  readonly id: string;
  readonly serial: string | null;
  readonly sensitivity: string | null;
  readonly mounting: string | null;
  readonly calibrationDue: Day | null;
}

/** ISO 18436-2 category II or above. */
const DIAGNOSING = /\b(?:IV|III|II)\b|\bcat(?:egory|\.)?\s*[234]\b/i;

/** Whether a person of this category may state what a machine suffers from. */
export const diagnoses = (category: string | null): boolean => category !== null && DIAGNOSING.test(category);

export interface Notice {
  readonly who: string;
  readonly when: string | null;
  readonly how: string | null;
  readonly about: string | null;
}

/** What a survey set out to measure; `all` or the named parts. */
export interface Scope {
  readonly all: boolean;
  readonly areas: readonly string[];
  readonly routes: readonly string[];
  readonly machines: readonly string[];
}

export interface Survey {
  /** The folder's name or the survey_date as typed. */
  readonly id: string;
  /** The survey's date: from its id, else its last day. */
  readonly day: Day;
  readonly from: Day;
  readonly to: Day;
  readonly kind: SurveyKind;
  readonly scope: Scope;
  readonly people: readonly Person[];
  readonly instruments: readonly Instrument[];
  readonly sensors: readonly Sensor[];
  readonly fieldCheck: string | null;
  readonly process: string | null;
  readonly weather: string | null;
  readonly remarks: string | null;
  readonly issueDate: Day | null;
  readonly reviewedBy: string | null;
  readonly approvedBy: string | null;
  readonly notified: readonly Notice[];
  readonly findings: readonly Finding[];
  readonly photos: readonly Photo[];
  /** Where its readings came from; null when there are none. */
  readonly place: Place | null;
}

export interface Finding {
  readonly id: string;
  readonly machine: string;
  readonly component: string | null;
  readonly points: readonly string[];
  readonly finding: string | null;
  readonly likelyCause: string | null;
  readonly lessLikely: string | null;
  readonly confidence: 'low' | 'medium' | 'high' | null;
  readonly recommendation: string | null;
  readonly needsStop: boolean | null;
  readonly checkFirst: string | null;
  readonly consequence: string | null;
  readonly downtimeH: number | null;
  readonly parts: string | null;
  readonly due: Day | null;
  readonly owner: string | null;
  readonly urgency: Urgency | null;
  readonly overrideBy: string | null;
  readonly overrideReason: string | null;
  readonly overrideUntil: Day | null;
  readonly verifyPoint: string | null;
  readonly verifyBelow: number | null;
  readonly carriedFrom: string | null;
  readonly confirmed: Day | null;
  readonly closed: Day | null;
  readonly place: Place;
}

export interface Photo {
  /** Relative to the plant folder. */
  readonly path: string;
  readonly machine: string;
  readonly point: string | null;
  readonly caption: string | null;
}
