/** The closed lists of the plant folder: the words are the contract's. */
export const CRITICALITIES = ['critical', 'essential', 'general'] as const;
export type Criticality = (typeof CRITICALITIES)[number];

export const KINDS = [
  'motor',
  'generator',
  'fan',
  'pump',
  'displacement pump',
  'compressor',
  'screw compressor',
  'lobe blower',
  'vacuum pump',
  'reciprocating',
  'gearbox',
  'steam turbine',
  'gas turbine',
  'hydro turbine',
  'mixer',
  'roll',
  'screen',
  'other',
] as const;
export type Kind = (typeof KINDS)[number];

export const MEASURED_ON = ['bearing housing', 'shaft relative', 'shaft absolute', 'structure', 'pipe'] as const;
export type MeasuredOn = (typeof MEASURED_ON)[number];

export const DIRECTIONS = ['horizontal', 'vertical', 'axial', 'radial'] as const;
export type Direction = (typeof DIRECTIONS)[number];

/** `missing` is never typed: it is what coverage calls a reading that was due and is not there. */
export const STATUSES = [
  'measured',
  'stopped',
  'no access',
  'unsafe',
  'guard fitted',
  'under work',
  'locked out',
  'not due',
  'faulty',
  'over range',
] as const;
export type Status = (typeof STATUSES)[number];

export const SURVEY_KINDS = ['routine', 're-measurement', 'after repair', 'acceptance', 'start-up'] as const;
export type SurveyKind = (typeof SURVEY_KINDS)[number];

export const EVENTS = ['repair', 'overhaul', 'balance', 'alignment', 'greasing', 'exchanged', 'sensor moved', 'other'] as const;
export type EventKind = (typeof EVENTS)[number];

export const URGENCIES = ['now', 'within a week', 'within a month', 'next planned stop', 'watch'] as const;
export type Urgency = (typeof URGENCIES)[number];

export type Support = 'rigid' | 'flexible';
