import { type Component, type ComponentRow, CRITICALITIES, type Dated, KINDS, type MachineRow } from '../plant/types.ts';
import type { Day } from '../plant/day.ts';
import type { Place } from '../plant/problem.ts';
import type { Cells } from './cells.ts';
import type { Problems } from './problems.ts';

export const COMPONENT_COLUMNS = [
  'kind',
  'power_kw',
  'speed_rpm',
  'speed_ratio',
  'speed_min',
  'speed_max',
  'drive',
  'support',
  'shaft_height_mm',
  'bearings',
  'orientation',
  'rotor',
  'pump_category',
  'fan_category',
  'gear_rating',
  'limit_set',
  'serial',
  'make_limits',
  'notes',
  'valid_from',
] as const;
export const MACHINES_COLUMNS = [
  'machine',
  'name',
  'area',
  'route',
  'criticality',
  'spare_group',
  'relief',
  'interval_days',
  'next_stop',
  'in_service_from',
  'removed_on',
  'family',
  ...COMPONENT_COLUMNS,
] as const;
export const COMPONENTS_COLUMNS = ['machine', 'component', ...COMPONENT_COLUMNS] as const;

export function machineRow(cells: Cells): MachineRow {
  return {
    validFrom: cells.day('valid_from'),
    place: cells.place,
    name: cells.text('name'),
    area: cells.text('area'),
    route: cells.text('route'),
    criticality: cells.word('criticality', CRITICALITIES),
    spareGroup: cells.text('spare_group'),
    relief: cells.yesNo('relief') ?? true,
    intervalDays: cells.number('interval_days', 1),
    nextStop: cells.day('next_stop'),
    inServiceFrom: cells.day('in_service_from'),
    removedOn: cells.day('removed_on'),
    family: cells.text('family'),
    notes: cells.text('notes'),
  };
}

export function componentRow(cells: Cells): ComponentRow {
  const gear = cells.text('gear_rating');
  return {
    validFrom: cells.day('valid_from'),
    place: cells.place,
    kind: cells.word('kind', KINDS),
    powerKw: cells.number('power_kw', 0),
    speedRpm: cells.number('speed_rpm', 0),
    speedRatio: cells.number('speed_ratio', 0),
    speedMinRpm: cells.number('speed_min', 0),
    speedMaxRpm: cells.number('speed_max', 0),
    drive: cells.word('drive', ['fixed', 'variable'] as const),
    support: cells.word('support', ['rigid', 'flexible'] as const),
    shaftHeightMm: cells.number('shaft_height_mm', 0),
    bearings: cells.word('bearings', ['rolling', 'plain'] as const),
    orientation: cells.word('orientation', ['horizontal', 'vertical'] as const),
    rotor: cells.word('rotor', ['between bearings', 'overhung'] as const),
    pumpCategory: cells.word('pump_category', ['I', 'II'] as const),
    fanCategory: cells.word('fan_category', ['BV-1', 'BV-2', 'BV-3', 'BV-4', 'BV-5'] as const),
    gearRatingVr: gear === null ? null : gearRating(cells, gear),
    limitSet: cells.text('limit_set'),
    serial: cells.text('serial'),
    makeLimits: cells.text('make_limits'),
    notes: cells.text('notes'),
  };
}

/** `8`, `VR 8` or `VR8`. */
function gearRating(cells: Cells, text: string): number | null {
  const value = Number(text.replace(/^VR\s*/i, ''));
  if (Number.isFinite(value) && value > 0) return value;
  cells.error('bad-number', 'gear_rating', `"gear_rating" is no rating: ${text}.`, 'Give the VR rating, such as 8 or VR 8.');
  return null;
}

export const NO_COMPONENT_ROW: ComponentRow = {
  validFrom: null,
  place: null,
  kind: null,
  powerKw: null,
  speedRpm: null,
  speedRatio: null,
  speedMinRpm: null,
  speedMaxRpm: null,
  drive: null,
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

export const NO_MACHINE_ROW: MachineRow = {
  validFrom: null,
  place: null,
  name: null,
  area: null,
  route: null,
  criticality: null,
  spareGroup: null,
  relief: true,
  intervalDays: null,
  nextStop: null,
  inServiceFrom: null,
  removedOn: null,
  family: null,
  notes: null,
};

export const implicitComponent = (machine: string, rows: readonly ComponentRow[]): Component => ({
  id: machine,
  implicit: true,
  rows: rows.length === 0 ? [NO_COMPONENT_ROW] : rows,
});

/** Rows of one thing in the order they come into force; two from one day are an error that names both places. */
export function inOrder<T extends Dated>(rows: readonly T[], what: string, problems: Problems): T[] {
  const start = (day: Day | null): number => day ?? Number.NEGATIVE_INFINITY;
  const sorted = [...rows].sort((a, b) => start(a.validFrom) - start(b.validFrom));
  sorted.forEach((row, i) => {
    const before = sorted[i - 1];
    if (before === undefined || start(before.validFrom) !== start(row.validFrom) || row.place === null) return;
    const other = before.place as Place;
    problems.error(
      'two-in-force',
      { ...row.place, column: 1 },
      `${what} has two rows in force from the same day; the other is ${other.file}:${other.line}.`,
      'Give the later one its valid_from, or remove one.',
    );
  });
  return sorted;
}
