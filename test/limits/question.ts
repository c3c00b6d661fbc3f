/** A question to chooseLimits about one point of one machine, from the columns that matter. */
import { chooseLimits, ownLimits } from '../../src/limits/choose.ts';
import type { LimitChoice } from '../../src/limits/types.ts';
import type { ComponentRow, LimitRow, Machine, Plant, PointRow, Series, SurveyKind } from '../../src/plant/types.ts';
import { readPlant } from '../../src/survey/read.ts';
import { folder, memoryShell } from '../assess/folder.ts';

const COMPONENT: ComponentRow = {
  validFrom: null,
  place: null,
  kind: null,
  powerKw: null,
  speedRpm: null,
  speedRatio: null,
  speedMinRpm: null,
  speedMaxRpm: null,
  drive: 'fixed',
  support: null,
  shaftHeightMm: null,
  bearings: null,
  orientation: null,
  rotor: null,
  pumpCategory: null,
  fanCategory: null,
  gearRatingVr: null,
  limitSet: null,
  serial: null,
  makeLimits: null,
  notes: null,
};
const POINT: PointRow = {
  validFrom: null,
  place: null,
  location: null,
  direction: 'horizontal',
  measuredOn: 'bearing housing',
  scale: 'linear',
  lowHz: 10,
  highHz: 1000,
  support: null,
  limitSet: null,
  baseline: null,
  baselineFrom: null,
  floor: null,
  notes: null,
};
const LIMIT: LimitRow = {
  validFrom: null,
  place: null,
  limitSet: 'own',
  title: null,
  basis: 'owner',
  source: null,
  edition: null,
  quantity: 'velocity',
  unit: 'mm/s',
  detection: 'rms',
  measuredOn: null,
  lowHz: null,
  highHz: null,
  ab: 1,
  bc: 2,
  cd: 3,
  alarm: null,
  trip: null,
  appliesMachine: null,
  appliesComponent: null,
  appliesPoint: null,
  appliesKind: null,
  approvedBy: null,
  approvedOn: null,
  notes: null,
};

const plantOf = (() => {
  const { plant } = readPlant(memoryShell(folder([{ machine: 'M', columns: {}, series: [{ point: 'P', values: [1] }] }])), 'plant');
  if (plant === null) throw new Error('no plant');
  return plant;
})();

export interface Asked {
  readonly component?: Partial<ComponentRow>;
  /** Further components of the train, after the one asked about. */
  readonly others?: readonly Partial<ComponentRow>[];
  /** Components before the one asked about: what drives it. */
  readonly drivers?: readonly Partial<ComponentRow>[];
  readonly point?: Partial<PointRow>;
  readonly series?: Partial<Pick<Series, 'quantity' | 'detection' | 'unit'>>;
  readonly limits?: readonly Partial<LimitRow>[];
  readonly policy?: Partial<Plant['policy']>;
  readonly day?: number;
  readonly surveyKind?: SurveyKind;
}

/** The choice at point P of component C of machine M, on day 20 000 unless said. */
export function chosen(asked: Asked): LimitChoice {
  const series: Series = {
    machine: 'M',
    component: 'C',
    point: 'P',
    quantity: 'velocity',
    unit: 'mm/s',
    detection: 'rms',
    rows: [{ ...POINT, ...asked.point }],
    readings: [],
    ...asked.series,
  };
  const component = { id: 'C', implicit: false, rows: [{ ...COMPONENT, ...asked.component }] };
  const beside = (rows: readonly Partial<ComponentRow>[], name: string) =>
    rows.map((row, i) => ({ id: `${name}${i}`, implicit: false, rows: [{ ...COMPONENT, ...row }] }));
  const components = [...beside(asked.drivers ?? [], 'driver'), component, ...beside(asked.others ?? [], 'other')];
  const [first] = plantOf.machines;
  if (first === undefined) throw new Error('no machine');
  const machine: Machine = { ...first, id: 'M', components, series: [series] };
  const limits = (asked.limits ?? []).map((row) => ({ ...LIMIT, ...row }));
  const plant: Plant = { ...plantOf, limits, policy: { ...plantOf.policy, ...asked.policy } };
  return chooseLimits({
    plant,
    machine,
    component,
    series,
    day: asked.day ?? 20_000,
    surveyKind: asked.surveyKind ?? 'routine',
    own: ownLimits(limits),
  });
}
