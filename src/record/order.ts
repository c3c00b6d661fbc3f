/**
 * The order of keys in record.json, one list for each kind of object. A key that is not listed is a bug, so that the
 * written record and its types cannot drift apart.
 */
export type Order = readonly string[];

const words = (text: string): Order => text.trim().split(/\s+/);

export const RECORD = words(`format tool issue plant survey surveys policy policy_hash limit_sets cautions machines components measurements actions coverage
  plant_over_time problems inputs`);

/** Order by the name of the key under which an object, or each object of a list, stands; `*` in a name is any parent. */
export const ORDERS: Readonly<Record<string, Order>> = {
  tool: words('name version'),
  issue: words('number revision issued_on replaces reason previous_manifest'),
  plant: words('plant client site contract procedure contractor language paper units frequency_unit next_stops retention distribution'),
  contractor: words('name address contact logo accent'),
  next_stops: words('date area'),
  survey: words(`id from to kind scope people instruments sensors field_check process weather remarks issue_date reviewed_by approved_by notified photos`),
  surveys: words('id date from to kind scope people instruments file conditions'),
  scope: words('all areas routes machines'),
  people: words('name role category certificate expires'),
  instruments: words('id make model serial band calibrated_on calibration_due certificate laboratory'),
  sensors: words('id serial sensitivity mounting calibration_due'),
  notified: words('who when how about'),
  photos: words('path machine point caption'),
  policy: words('id value unit mark about overridden'),
  limit_sets: words(`id title basis source edition table confidence boundaries quantity unit detection low_hz high_hz valid_from approved_by approved_on`),
  boundaries: words('ab bc cd'),
  machines: words(`machine name area route family criticality criticality_stated condition measured_of previous_condition governed_by urgency urgency_by rule reason
    facts computed_urgency override spare accepted indications doubts cannot_see events`),
  governed_by: words('component point quantity detection'),
  urgency_by: words('component point quantity detection'),
  override: words('urgency by reason until lowers_now'),
  spare: words('machine proven reason facts'),
  accepted: words('point quantity up_to unit until by reason in_force'),
  indications: words('rule message confirm mark facts'),
  doubts: words('kind message effect facts'),
  events: words('date component point quantity event new_baseline serial_out serial_in notes'),
  components: words('machine component implicit kind condition governed_by limit_set limit_reason power_kw speed_rpm'),
  measurements: words(`machine component point location direction quantity unit detection measured_on low_hz high_hz state speed_rpm load_pct instrument measured_by
    taken_at remark phase status value typed typed_unit bound source zone ratio_class zone_basis no_zone_because near_boundary held limit_set limit_reason limits baseline
    previous change from_baseline travel urgency rule trend forecast sisters doubts notes history`),
  phase: words('amplitude lag_deg reference'),
  source: words('file line'),
  held: words('zone date'),
  limits: words('ab bc cd alarm trip of by'),
  of: words('ab bc cd unit detection'),
  baseline: words('value from n provisional'),
  previous: words('value date'),
  change: words('absolute percent db of_bc significant vector'),
  from_baseline: words('absolute percent db of_bc significant vector'),
  vector: words('amplitude lag_deg'),
  trend: words('kind db_per_year slope_per_year rise p n'),
  forecast: words('boundary earliest likely latest range none'),
  history: words('value typed why line file'),
  actions: words(`rank action finding machine component points urgency computed_urgency rule reason facts above_next_because observation likely_cause less_likely
    confidence downtime_h parts recommendation check_first needs_stop consequence due owner work_order status origin raised closed closed_by as_found times_reported
    overdue_days carried_from confirmed override verification value unit limit notes`),
  verification: words('target before after result'),
  target: words('point quantity value unit'),
  before: words('value date'),
  after: words('value date'),
  coverage: words('machine due in_scope measured of status why misses_in_a_row last_measured next_due interval_days'),
  plant_over_time: words('survey date conditions measured of open_actions closed_actions'),
  problems: words('code severity file line column message hint'),
  inputs: words('path bytes sha256'),
};

/** Maps whose keys are data (machine ids, quantities, facts, survey indices); written in the order of their keys by code unit. */
export const MAPS: ReadonlySet<string> = new Set(['conditions', 'units', 'facts', 'why', 'sisters']);
/** Values of these maps are objects of their own. */
export const MAP_VALUES: Readonly<Record<string, Order>> = { units: words('unit detection') };
