/**
 * The fields of record.json: the one table from which key order, JSON Schema and the check at reading are made. Each object
 * is a line of `name:type` pairs in written order: s text, n number, i whole number, b yes or no, d date, S list of texts,
 * V list of numbers or null, T list of texts or null, P pair of whole numbers, w:… a word of a closed list, o:… an object,
 * l:… a list of objects; maps whose keys are data: F facts, C conditions, I whole numbers by condition, W texts by key,
 * U units by quantity. A `?` after the kind means also null, a `*` at the end that it may be absent.
 */
import { DETECTIONS } from '../measure/detection.ts';
import { KINDS, MEASURED_ON, STATUSES, SURVEY_KINDS, URGENCIES } from '../plant/types.ts';
import { DOUBT_KINDS } from './terms.ts';

/** The closed lists of words, by the name the fields give them. */
export const WORDS: Readonly<Record<string, readonly string[]>> = {
  urgency: URGENCIES,
  condition: ['A', 'B', 'C', 'D', 'r-A', 'r-B', 'r-C', 'r-D', 'not assessed'],
  zone: ['A', 'B', 'C', 'D'],
  ratio: ['r-A', 'r-B', 'r-C', 'r-D'],
  basis: ['standard', 'own', 'ratio'],
  setbasis: ['maker', 'contract', 'statistics', 'owner', 'standard'],
  confidence: ['confirmed', 'one source', 'recalled'],
  sure: ['low', 'medium', 'high'],
  travel: ['fast', 'rising', 'step', 'steady', 'falling', 'held'],
  status: [...STATUSES, 'missing'],
  doubt: DOUBT_KINDS,
  effect: ['held', 're-measure', 'note'],
  detection: DETECTIONS,
  on: MEASURED_ON,
  direction: ['horizontal', 'vertical', 'axial', 'radial'],
  bound: ['<', '>'],
  by: ['exact', 'sine'],
  trend: ['none', 'small', 'ramp', 'plateau', 'step'],
  criticality: ['critical', 'essential', 'general'],
  ledger: ['open', 'ordered', 'done', 'rejected'],
  origin: ['analyst', 'ledger', 'drafted'],
  result: ['verified', 'not verified', 'not yet measured'],
  covered: ['measured', 'partly measured', 'not measured', 'excused', 'not due', 'out of scope'],
  survey: SURVEY_KINDS,
  kind: KINDS,
  mark: ['std', 'common practice', 'own', 'recalled'],
  severity: ['error', 'warning', 'note'],
  language: ['en', 'de', 'es', 'fr'],
  paper: ['A4', 'Letter'],
  frequency: ['Hz', 'CPM'],
};

/** Fields by the name of the key under which an object, or each object of a list, stands. */
export const FIELDS: Readonly<Record<string, string>> = {
  tool: 'name:s version:s',
  issue: 'number:s revision:i issued_on:d replaces:s? reason:s? previous_manifest:s? changes:S* retention_due:S?*',
  plant: `plant:s client:s? site:s? contract:s? procedure:s? contractor:o:contractor language:w:language paper:w:paper units:U
    frequency_unit:w:frequency next_stops:l:next_stops renames:l:renames* retention:s? distribution:S`,
  contractor: 'name:s? address:s? contact:s? logo:s? accent:s?',
  next_stops: 'date:d area:s?',
  renames: 'kind:s machine:s? old:s new:s since:d?',
  survey: `id:s from:d to:d kind:w:survey scope:o:scope people:l:people instruments:l:instruments sensors:l:sensors field_check:s? process:s?
    weather:s? remarks:s? issue_date:d? reviewed_by:s? approved_by:s? notified:l:notified photos:l:photos`,
  surveys: 'id:s date:d from:d to:d kind:w:survey scope:o:scope people:l:people instruments:l:instruments file:s? conditions:C',
  scope: 'all:b areas:S routes:S machines:S',
  people: 'name:s role:s? category:s? certificate:s? expires:d?',
  instruments: 'id:s make:s? model:s? serial:s? band:s? calibrated_on:d? calibration_due:d? certificate:s? laboratory:s?',
  sensors: 'id:s serial:s? sensitivity:s? mounting:s? calibration_due:d?',
  notified: 'who:s when:s? how:s? about:s?',
  photos: 'path:s machine:s point:s? caption:s?',
  policy: 'id:s value:n unit:s mark:w:mark about:s overridden:b',
  limit_sets: `id:s title:s basis:w:setbasis source:s? edition:s? table:s? confidence:w?:confidence boundaries:o:boundaries quantity:s unit:s
    detection:w?:detection low_hz:n? high_hz:n? valid_from:d? approved_by:s? approved_on:d?`,
  boundaries: 'ab:n? bc:n? cd:n?',
  machines: `machine:s name:s? area:s? route:s? family:s? criticality:w:criticality criticality_stated:b condition:w:condition measured_of:P
    previous_condition:w?:condition governed_by:o?:governed_by urgency:w?:urgency urgency_by:o?:urgency_by rule:s? reason:s facts:F
    computed_urgency:w?:urgency override:o?:override spare:o?:spare accepted:l:accepted indications:l:indications doubts:l:doubts
    cannot_see:S events:l:events`,
  governed_by: 'component:s point:s quantity:s detection:w?:detection',
  urgency_by: 'component:s point:s quantity:s detection:w?:detection',
  override: 'urgency:w:urgency by:s reason:s until:d? lowers_now:b',
  spare: 'machine:s proven:b reason:s facts:F',
  accepted: 'point:s? quantity:s? up_to:n unit:s? until:d? by:s? reason:s? in_force:b',
  indications: 'rule:s message:s cause:s* confirm:s mark:w:mark facts:F',
  doubts: 'kind:w:doubt message:s effect:w:effect facts:F',
  events: 'date:d component:s? point:s? quantity:s? event:s new_baseline:b serial_out:s? serial_in:s? notes:s?',
  components: `machine:s component:s implicit:b kind:w?:kind condition:w:condition governed_by:o?:governed_by limit_set:s? limit_reason:s
    power_kw:n? speed_rpm:n?`,
  measurements: `machine:s component:s point:s location:s? direction:w?:direction quantity:s unit:s detection:w?:detection measured_on:w?:on
    low_hz:n? high_hz:n? state:s? speed_rpm:n? load_pct:n? instrument:s? measured_by:s? taken_at:s? remark:s? phase:o?:phase
    status:w:status value:n? typed:s? typed_unit:s? bound:w?:bound source:o?:source zone:w?:zone ratio_class:w?:ratio
    zone_basis:w?:basis no_zone_because:s? near_boundary:s? held:o?:held limit_set:s? limit_reason:s limits:o?:limits
    baseline:o?:baseline previous:o?:previous change:o?:change from_baseline:o?:from_baseline travel:w?:travel urgency:w?:urgency
    rule:s? trend:o?:trend forecast:o?:forecast sisters:F? doubts:l:doubts notes:S history:o:history`,
  phase: 'amplitude:n? lag_deg:n reference:s?',
  source: 'file:s line:i',
  held: 'zone:w:condition date:d',
  limits: 'ab:n? bc:n? cd:n? alarm:n? trip:n? of:o:of by:w:by',
  of: 'ab:n? bc:n? cd:n? unit:s detection:w?:detection',
  baseline: 'value:n from:s n:i provisional:b',
  previous: 'value:n date:d',
  change: 'absolute:n percent:n? db:n? of_bc:n? significant:b? vector:o?:vector',
  from_baseline: 'absolute:n percent:n? db:n? of_bc:n? significant:b? vector:o?:vector',
  vector: 'amplitude:n lag_deg:n',
  trend: 'kind:w:trend db_per_year:n? slope_per_year:n? rise:n? p:n? n:i changed_on:d?* changed_by:n?*',
  /** Either a boundary with its dates, or `none` with the reason. */
  forecast: 'boundary:s* earliest:d* likely:d?* latest:d?* range:n* none:s*',
  history: 'value:V typed:T* why:W line:V file:T*',
  actions: `rank:i action:s finding:s? machine:s component:s? points:S urgency:w?:urgency computed_urgency:w?:urgency rule:s? reason:s facts:F
    above_next_because:s? observation:s? likely_cause:s? less_likely:s? confidence:w?:sure downtime_h:n? parts:s? recommendation:s?
    check_first:s? needs_stop:b? consequence:s? due:d? owner:s? work_order:s? status:w:ledger origin:w:origin raised:d? closed:d?
    closed_by:s? as_found:s? times_reported:i overdue_days:i? carried_from:s? confirmed:d? override:o?:override
    verification:o?:verification value:n? unit:s? limit:n? notes:s?`,
  verification: 'target:o?:target before:o?:before after:o?:after result:w:result',
  target: 'point:s quantity:s value:n unit:s',
  before: 'value:n date:d',
  after: 'value:n date:d',
  coverage: `machine:s due:b in_scope:b measured:i of:i status:w:covered why:s? misses_in_a_row:i last_measured:d? next_due:d? interval_days:n?`,
  plant_over_time: 'survey:s date:d conditions:I measured:i of:i open_actions:i closed_actions:i closure_days:n?* repeats:i*',
  rules: 'id:s mark:w:mark about:s levels:S',
  problems: 'code:s severity:w:severity file:s line:i? column:i? message:s hint:s?',
  inputs: 'path:s bytes:i sha256:s',
};

/** Keys of the whole, in order. */
export const TOP = `format:i tool:o:tool issue:o?:issue plant:o:plant survey:o:survey surveys:l:surveys policy:l:policy policy_hash:s rules:l:rules* limit_sets:l:limit_sets
    cautions:S machines:l:machines components:l:components measurements:l:measurements actions:l:actions coverage:l:coverage
    plant_over_time:l:plant_over_time problems:l:problems inputs:l:inputs`;

export interface Field {
  readonly name: string;
  /** A letter of the head of this file. */
  readonly kind: string;
  /** Of a closed list, or of another object; empty for the rest. */
  readonly of: string;
  readonly orNull: boolean;
  readonly orAbsent: boolean;
}

function field(text: string): Field {
  const [name = '', sign = '', of = ''] = text.split(':');
  const signs = `${sign}${of}`;
  return { name, kind: sign.charAt(0), of: of.replace('*', ''), orNull: sign.includes('?'), orAbsent: signs.endsWith('*') };
}

export const fieldsOf = (line: string): readonly Field[] => line.split(/\s+/).map(field);

export const RECORD_FIELDS: readonly Field[] = fieldsOf(TOP);
/** The parsed table. */
export const OBJECTS: Readonly<Record<string, readonly Field[]>> = Object.fromEntries(
  Object.entries(FIELDS).map(([name, line]) => [name, fieldsOf(line)]),
);
