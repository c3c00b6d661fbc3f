/**
 * Words that stand where a number should. In: a cell, the plant's own words. Out: a status, or that nothing was read. Never: a
 * zero, never "good"; a word that is not known is null, for its problem.
 */
import { STATUSES, type Status } from '../plant/types.ts';

/** `not read`: the cell says that there is no value and not why. */
export type State = Status | 'not read';
export const STATES: readonly State[] = [...STATUSES.filter((s) => s !== 'measured'), 'not read'];

/** Words of collectors and sheets in the report's four languages. */
const WORDS: Readonly<Record<string, readonly string[]>> = {
  stopped: [
    'off',
    'stop',
    'stby',
    'standby',
    'stand-by',
    'stand by',
    'idle',
    'down',
    'not running',
    'shut down',
    'shutdown',
    'out of service',
    'aus',
    'steht',
    'stillstand',
    'abgestellt',
    'reserve',
    'parado',
    'parada',
    'detenido',
    'fuera de servicio',
    'arrêt',
    'arrêté',
    'arrêtée',
    "à l'arrêt",
    'hors service',
  ],
  'no access': [
    'inaccessible',
    'not accessible',
    'access denied',
    'kein zugang',
    'unzugänglich',
    'nicht zugänglich',
    'sin acceso',
    'inaccesible',
    "pas d'accès",
    'sans accès',
  ],
  unsafe: ['not safe', 'unsicher', 'inseguro', 'dangereux'],
  'guard fitted': ['guard', 'guarded'],
  'under work': [
    'under repair',
    'under maintenance',
    'maintenance',
    'in repair',
    'in reparatur',
    'wartung',
    'en mantenimiento',
    'en maintenance',
    'en réparation',
  ],
  'locked out': ['loto', 'lockout', 'locked-out'],
  'not due': ['nicht fällig', 'no toca'],
  faulty: ['sensor fault', 'bad', 'error', 'err', 'fault', 'cable fault', '#ref!', '#value!', '#div/0!'],
  'over range': ['ol', 'o/l', 'overload', 'overrange', 'over-range', 'overflow', 'ovl', 'ovld', 'überlauf', 'sobrecarga', 'surcharge'],
  'not read': [
    'n/a',
    'na',
    'n.a.',
    'n. a.',
    '#n/a',
    'not measured',
    'not read',
    'missed',
    'no data',
    'no reading',
    'nicht gemessen',
    'keine daten',
    'entfällt',
    'no medido',
    'sin datos',
    'non mesuré',
    'pas mesuré',
  ],
};
const BY_WORD = new Map<string, State>();
for (const state of STATES) for (const word of [state, ...(WORDS[state] ?? [])]) BY_WORD.set(word, state);

/** Words for hints. */
export const STATE_WORDS: readonly string[] = [...BY_WORD.keys()];

export type OwnStates = ReadonlyMap<string, State>;
export const NO_STATES: OwnStates = new Map();

export const foldState = (text: string): string => text.normalize('NFC').trim().toLowerCase().replace(/\s+/g, ' ');

/** Dashes, stars, crosses alone (`---`, `***`, `####`) are a sheet's way to say that there is nothing. */
export function stateOf(text: string, own: OwnStates): State | null {
  const word = foldState(text);
  return own.get(word) ?? BY_WORD.get(word) ?? (/^[-–—*#.?_]+$/.test(word) ? 'not read' : null);
}
