/**
 * The defaults of the assessment: every number a plant may override in plant.yaml, with its id, its mark and what it does.
 * Ids are `section.name`; the section is that of the assessment rules. The report prints each one that was in force.
 */

/** std = a published standard; common practice = of the trade, no single source; own = project rule; recalled = from memory of a standard. */
export const MARKS = ['std', 'common practice', 'own', 'recalled'] as const;
export type Mark = (typeof MARKS)[number];

export interface PolicyDefault {
  readonly value: number;
  /** Unit of the value, `×` a factor, `share` a fraction of one. */
  readonly unit: string;
  readonly mark: Mark;
  readonly about: string;
}

const own = (value: number, unit: string, about: string): PolicyDefault => ({ value, unit, mark: 'own', about });
const std = (value: number, unit: string, about: string): PolicyDefault => ({ value, unit, mark: 'std', about });
const cp = (value: number, unit: string, about: string): PolicyDefault => ({ value, unit, mark: 'common practice', about });

export const POLICY_DEFAULTS = {
  '1.group2.max_power': own(45, 'kW', 'motor or generator of unknown shaft height: ISO 20816-3 group 2 up to this power'),
  '1.group1.min_power': own(300, 'kW', 'motor or generator of unknown shaft height: group 1 above this power'),
  '1.slow.speed': std(600, 'r/min', 'up to this speed the set needs a band from 1.slow.low'),
  '1.slow.low': std(2, 'Hz', 'lower band edge needed at or below 1.slow.speed'),
  '2.near.share': std(0.1, 'share', 'within this share of a boundary a zone is called near it (instrument tolerance of ISO 2954)'),
  '2.ratio.b': own(1.6, '×', 'ratio to the baseline above which the class is r-B (4 dB)'),
  '2.ratio.c': own(2.5, '×', 'ratio to the baseline above which the class is r-C (8 dB)'),
  '2.ratio.d': own(6.3, '×', 'ratio to the baseline above which the class is r-D (16 dB)'),
  '2.db.b': own(4, 'dB', 'rise above which a quantity on a dB scale is r-B'),
  '2.db.c': own(8, 'dB', 'rise above which a quantity on a dB scale is r-C'),
  '2.db.d': own(16, 'dB', 'rise above which a quantity on a dB scale is r-D'),
  '2.floor.velocity.rms': own(0.71, 'mm/s', 'velocity below this is never raised by ratio'),
  '2.floor.displacement.rms': own(10, 'µm', 'housing displacement below this is never raised by ratio'),
  '2.floor.shaft.pkpk': own(25, 'µm', 'shaft displacement, peak-to-peak, below this is never raised by ratio'),
  '2.floor.acceleration.rms': own(1, 'm/s²', 'acceleration below this is never raised by ratio'),
  '2.floor.acceleration.peak': own(3, 'm/s²', 'acceleration, true peak, below this is never raised by ratio'),
  '2.r1.support': own(4, 'dB', 'rise of a second quantity or point of the bearing that supports an r-D'),
  '2.background.share': cp(1 / 3, 'share', 'a stopped reading above this share of the running one marks the zone with "background"'),
  '3.speed.overall': own(0.05, 'share', 'speeds this close to the current one compare'),
  '3.speed.vector': own(0.02, 'share', 'speeds this close to the current one compare for 1× vectors'),
  '3.load': own(10, 'percentage points', 'loads this close to the current one compare'),
  '3.mounting.above': own(1000, 'Hz', 'above this band edge the mounting and the instrument must be of one kind'),
  '4.baseline.count': own(3, 'readings', 'the baseline is the median of this many first comparable readings'),
  '4.baseline.spread': own(1.6, '×', 'largest by smallest reading of the baseline above which it is provisional'),
  '4.q': std(0.25, 'share', 'share of B/C that makes a change significant, and that ALARM stands above the baseline'),
  '4.alarm.cap': std(1.25, '×', 'ALARM at most this times B/C'),
  '4.trip.cap': std(1.25, '×', 'TRIP at most this times C/D'),
  '5.fast.steps': own(2, 'q', 'rise since last time above which travel is fast'),
  '5.fast.factor': own(2.5, '×', 'ratio to last time from which travel is fast'),
  '5.rising.factor': own(1.6, '×', 'where no limits exist: ratio to last time from which travel is rising'),
  '5.rising.sag': own(2, 'dB', 'a real trend is rising only while the reading is not more than this below the last one'),
  '5.step.factor': own(1.6, '×', 'ratio to the baseline from which travel is step'),
  '5.step.median': own(1.35, '×', 'ratio of the median of the last three to the baseline from which travel is step'),
  '5.step.scatter': own(
    0.1,
    'neper',
    'scatter of repeated readings taken at least, where steps are parted from it (levels by least squares, Schwarz criterion)',
  ),
  '5.falling.factor': own(1.6, '×', 'ratio down since last time from which travel is falling or held'),
  '5.plateau.count': own(6, 'readings', 'readings needed to call a plateau'),
  '5.plateau.rise': own(2, 'dB', 'the two before the last stand at least this over the three before them'),
  '5.plateau.top': own(1, 'dB', 'the last stands at most this over those two'),
  '5.trend.count': own(5, 'readings', 'readings needed for a trend'),
  '5.trend.p': own(0.05, 'probability', 'two-sided Mann–Kendall probability up to which a trend is real'),
  '5.trend.rise': own(1.35, '×', 'rise over the trend from which it is real'),
  '5.trend.gap': own(2, 'intervals', 'a gap above this many intervals is marked and cuts the forecast'),
  '6.forecast.count': own(6, 'readings', 'comparable readings needed for a forecast'),
  '6.forecast.range': own(0.8, 'probability', 'range of the dates of a forecast'),
  '6.forecast.horizon': own(365, 'days', 'a forecast looks at most this far ahead'),
  '7.unit.points': own(4, 'points', 'readings that one unit factor must fit'),
  '7.unit.spread': own(0.15, 'share', 'their ratios lie within this of their median'),
  '7.unit.match': own(0.05, 'share', 'the median lies within this of a unit factor'),
  '7.unit.sine.points': own(8, 'points', 'readings, on two machines, that a factor of detection must fit'),
  '7.unit.alone': own(9.8, '×', 'one point alone is doubted only for factors from this on'),
  '7.unit.history': own(0.25, 'share', 'and fits its history within this once undone'),
  '7.near_zero.share': own(0.05, 'share', 'a running machine below this share of its baseline is doubted'),
  '7.all_down.share': own(0.95, 'share', 'fall of all points of a machine from which it is taken for stopped'),
  '7.all_down.points': own(3, 'points', 'points of a machine that must have fallen'),
  '7.impossible.margin': own(0.1, 'share', 'margin by which the displacement frequency may exceed the acceleration frequency'),
  '7.swapped.gain': own(4, 'dB', 'what exchanging two points or machines must save on both'),
  '7.identical.points': own(4, 'points', 'readings equal to the last to three figures'),
  '7.identical.two': own(8, 'points', 'readings equal to the last to two figures'),
  '7.retake': own(0.25, 'share', 'retakes further apart than this are doubted'),
  '8.grace.share': cp(0.2, 'share', 'share of the interval by which a reading may be late'),
  '8.grace.days': cp(28, 'days', 'and at most this many days'),
  '8.target.zone': own(0.9, 'share', 'verification target from C or D, share of B/C'),
  '8.target.ratio': own(1.6, '×', 'verification target by ratio, times the baseline'),
  '9.hysteresis': own(0.9, 'share', 'a level is left when the reading is at or below this share of the boundary crossed'),
  '9.due.week': own(7, 'days', 'due of within a week'),
  '9.due.month': own(30, 'days', 'due of within a month'),
  '9.due.stop': own(180, 'days', 'due of next planned stop where no stop is planned'),
  '9.rank.band': own(0.1, 'share', 'closeness to C/D is ranked in bands of this share'),
  '11.sisters.count': own(6, 'machines', 'sisters needed to call one an outlier'),
  '11.sisters.sd': own(3.5, 'robust standard deviations', 'distance from which a sister is an outlier'),
  '11.sisters.db': own(4, 'dB', 'and at least this far'),
} as const satisfies Record<string, PolicyDefault>;

export type PolicyId = keyof typeof POLICY_DEFAULTS;
/** Every default with the plant's overrides applied. */
export type Policy = { readonly [K in PolicyId]: number };

export const POLICY_IDS = Object.keys(POLICY_DEFAULTS) as PolicyId[];

/** The defaults with a plant's overrides (ids already checked by survey/). */
export function policyWith(overrides: Readonly<Partial<Record<PolicyId, number>>>): Policy {
  const policy = {} as Record<PolicyId, number>;
  for (const id of POLICY_IDS) policy[id] = overrides[id] ?? POLICY_DEFAULTS[id].value;
  return policy;
}
