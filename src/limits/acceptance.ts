/**
 * Acceptance limits often quoted in contracts: one number for a new or repaired machine, held as B/C so that above it is
 * not accepted. Never chosen by rule; by name, or named for a survey of kind acceptance.
 */
import { publishedSet, type Standard } from './published-set.ts';
import type { LimitSet } from './types.ts';

const nema: Standard = {
  source: 'NEMA MG 1 (quoted second-hand)',
  edition: 'Part 7',
  table: 'no load, resilient mount',
  confidence: 'confirmed',
  lowHz: null,
  highHz: null,
};
const api: Standard = {
  source: 'API 610 / ISO 13709 (quoted second-hand)',
  edition: 'not known',
  table: 'bearing housing, horizontal',
  confidence: 'confirmed',
  lowHz: null,
  highHz: null,
};
const iec: Standard = {
  source: 'IEC 60034-14 (quoted second-hand)',
  edition: '2003',
  table: 'grade A, free suspension',
  confidence: 'one source',
  lowHz: 10,
  highHz: 1000,
};

const NEMA_ROWS = [
  [3600, 0.15],
  [1800, 0.15],
  [1200, 0.15],
  [900, 0.12],
  [720, 0.09],
  [600, 0.08],
] as const;
/** Rigid mounting: 0.8 of the resilient limit. */
const NEMA_RIGID = 0.8;
const IEC_ROWS = [
  ['h56-132', 'H 56 to 132', 1.6],
  ['h132-280', 'H above 132 to 280', 2.2],
  ['h280', 'H above 280', 2.8],
] as const;
const API_ROWS = [
  ['preferred', 'preferred region', 3.0],
  ['allowable', 'allowable region', 3.9],
] as const;

const acceptance = (standard: Standard, id: string, title: string, unit: string, detection: 'rms' | 'true peak', bc: number): LimitSet =>
  publishedSet(standard, { id, title, quantity: 'velocity', unit, detection, bc, acceptance: true });

export const ACCEPTANCE_SETS: readonly LimitSet[] = [
  ...NEMA_ROWS.map(([rpm, bc]) =>
    acceptance(nema, `nema-mg1-${rpm}`, `Acceptance of motors, ${rpm} r/min, resilient mount`, 'in/s', 'true peak', bc),
  ),
  ...NEMA_ROWS.map(([rpm, bc]) =>
    acceptance(nema, `nema-mg1-${rpm}-rigid`, `Acceptance of motors, ${rpm} r/min, rigid mount`, 'in/s', 'true peak', bc * NEMA_RIGID),
  ),
  ...API_ROWS.map(([id, title, bc]) => acceptance(api, `api610-${id}`, `Acceptance of pumps, ${title}`, 'mm/s', 'rms', bc)),
  ...IEC_ROWS.map(([id, title, bc]) =>
    acceptance(iec, `iec60034-14-a-${id}`, `Acceptance of electrical machines, grade A, ${title}`, 'mm/s', 'rms', bc),
  ),
];
