/**
 * The demo plant folder as files. In: machines and their stories. Out: every file of demo-survey/, the same bytes each time.
 */
import { FINDING_COLUMNS, FINDINGS } from './findings.ts';
import { ANNEX, MACHINES, ROUND } from './machines.ts';
import { ACCEPTED, ACTIONS, EVENTS, LIMITS, PLANT_YAML, RENAMES, surveyYaml } from './papers.ts';
import { couplingPicture, wheelPicture } from './png.ts';
import { notedValue, readAgain, retakes, takenAt } from './slips.ts';
import { type DemoMachine, type DemoSeries, LAST, REPEAT, type Row, SURVEYS } from './types.ts';

export interface DemoFile {
  readonly path: string;
  readonly bytes: Uint8Array | string;
}

const cell = (value: string | number | undefined): string => {
  const text = value === undefined ? '' : String(value);
  return /[",\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
};

function csv(columns: readonly string[], rows: readonly Row[]): string {
  return `${[columns.join(','), ...rows.map((row) => columns.map((c) => cell(row[c])).join(','))].join('\n')}\n`;
}

/** A value to three significant digits, at least one decimal. */
const shown = (value: number): string => (value >= 10 ? value.toFixed(1) : value >= 1 ? value.toFixed(2) : value.toFixed(3));

const READINGS = [
  'machine',
  'point',
  'quantity',
  'detection',
  'value',
  'unit',
  'low_hz',
  'high_hz',
  'speed_rpm',
  'state',
  'status',
  'phase_deg',
  'amplitude_1x',
  'phase_ref',
  'phase_convention',
  'taken_at',
  'instrument',
  'measured_by',
  'retake',
  'remark',
] as const;

function readingRow(machine: DemoMachine, series: DemoSeries, survey: number, date: string): Row | null {
  const value = notedValue(machine, series, survey, MACHINES);
  if (value === null) return null;
  const row = {
    machine: machine.machine,
    point: pointName(machine, series, survey),
    quantity: series.quantity ?? 'velocity',
    detection: series.detection ?? 'rms',
    unit: series.unit ?? 'mm/s',
    instrument: 'VM-1',
    measured_by: 'Signe Brødholt',
    taken_at: takenAt(machine.machine, series.point, survey, date),
  };
  if (typeof value === 'string') return { ...row, status: value, taken_at: '' };
  return { ...row, value: shown(value), ...series.taken?.(survey) };
}

/** The point was called DE until it was renamed. */
const pointName = (machine: DemoMachine, series: DemoSeries, survey: number): string =>
  machine.machine === 'KB-01' && series.point === '4H' && survey < 5 ? 'DE' : series.point;

function readingsOf(survey: number, machines: readonly DemoMachine[]): Row[] {
  const date = SURVEYS[survey] as string;
  return machines
    .flatMap((machine) => machine.series.map((series) => readingRow(machine, series, survey, date)))
    .filter((row): row is Row => row !== null);
}

/** Long form: rows that name their survey. */
const long = (surveys: readonly number[], machines: readonly DemoMachine[]): string =>
  csv(
    ['survey_date', ...READINGS],
    surveys.flatMap((s) => readingsOf(s, machines).map((row) => ({ survey_date: SURVEYS[s] as string, ...row }))),
  );

function machineTables(): DemoFile[] {
  const machineColumns = [
    'machine',
    'name',
    'area',
    'route',
    'criticality',
    'spare_group',
    'interval_days',
    'in_service_from',
    'removed_on',
    'family',
    'kind',
    'power_kw',
    'speed_rpm',
    'drive',
    'support',
    'shaft_height_mm',
    'bearings',
    'pump_category',
    'limit_set',
  ];
  const componentColumns = [
    'machine',
    'component',
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
  ];
  const pointColumns = [
    'machine',
    'component',
    'point',
    'location',
    'direction',
    'measured_on',
    'quantity',
    'unit',
    'detection',
    'low_hz',
    'high_hz',
    'limit_set',
  ];
  const points = MACHINES.flatMap((m) =>
    m.series.map((s) => ({
      machine: m.machine,
      component: s.component ?? '',
      point: s.point,
      quantity: s.quantity ?? 'velocity',
      unit: s.unit ?? 'mm/s',
      detection: s.detection ?? 'rms',
      ...s.columns,
    })),
  );
  return [
    {
      path: 'machines.csv',
      bytes: csv(
        machineColumns,
        MACHINES.map((m) => ({ machine: m.machine, ...m.columns })),
      ),
    },
    {
      path: 'components.csv',
      bytes: csv(
        componentColumns,
        MACHINES.flatMap((m) => (m.components ?? []).map((c) => ({ machine: m.machine, ...c }))),
      ),
    },
    { path: 'points.csv', bytes: csv(pointColumns, points) },
  ];
}

/** Old surveys stand in one long file, the last four in folders of their own. */
const HISTORY = 6;

/** The annex's crew sends a file of its own; the one of 2025-11-19 is the one with the slip. */
const ANNEX_FILES = [8, LAST] as const;

function annexFiles(): DemoFile[] {
  const older = SURVEYS.map((_, s) => s).filter((s) => !ANNEX_FILES.some((f) => f === s));
  return [
    { path: 'surveys/packing-annex.csv', bytes: long(older, ANNEX) },
    ...ANNEX_FILES.map((s) => ({ path: `surveys/packing-annex-${SURVEYS[s]}.csv`, bytes: long([s], ANNEX) })),
  ];
}

function surveyFiles(): DemoFile[] {
  const folders = SURVEYS.map((date, s) => ({ date, s })).slice(HISTORY);
  const repeat = MACHINES.filter((m) => m.machine === 'ID-01');
  return [
    {
      path: 'surveys/history.csv',
      bytes: long(
        Array.from({ length: HISTORY }, (_, s) => s),
        ROUND,
      ),
    },
    ...folders.flatMap(({ date, s }) => [
      { path: `surveys/${date}/survey.yaml`, bytes: surveyYaml(date, s === LAST) },
      { path: `surveys/${date}/readings.csv`, bytes: csv(READINGS, [...readingsOf(s, ROUND), ...retakes(s, date)]) },
    ]),
    { path: `surveys/${REPEAT}/survey.yaml`, bytes: surveyYaml(REPEAT, false, 'kind: re-measurement\nscope: { machines: [ID-01] }') },
    {
      path: `surveys/${REPEAT}/readings.csv`,
      bytes: csv(
        READINGS,
        readingsOf(8, repeat).map((row) => ({
          ...row,
          taken_at: REPEAT,
          value:
            row['point'] === '3H' && row['quantity'] === 'velocity'
              ? '7.80'
              : shown(readAgain(Number(row['value']), `${row['point']} ${row['quantity']}`)),
        })),
      ),
    },
    ...Object.entries(FINDINGS).map(([date, rows]) => ({ path: `surveys/${date}/findings.csv`, bytes: findingsCsv(rows) })),
  ];
}

export function demoFiles(): DemoFile[] {
  const photos = `surveys/${SURVEYS[LAST]}/photos`;
  return [
    { path: 'plant.yaml', bytes: PLANT_YAML },
    ...machineTables(),
    { path: 'limits.csv', bytes: csv(LIMITS.columns, LIMITS.rows) },
    { path: 'events.csv', bytes: csv(EVENTS.columns, EVENTS.rows) },
    { path: 'actions.csv', bytes: csv(ACTIONS.columns, ACTIONS.rows) },
    { path: 'accepted.csv', bytes: csv(ACCEPTED.columns, ACCEPTED.rows) },
    { path: 'renames.csv', bytes: csv(RENAMES.columns, RENAMES.rows) },
    ...surveyFiles(),
    ...annexFiles(),
    { path: `${photos}/CR-01-2A-1.png`, bytes: couplingPicture() },
    { path: `${photos}/ID-01-1.png`, bytes: wheelPicture() },
    {
      path: `${photos}/captions.csv`,
      bytes: csv(
        ['photo', 'caption'],
        [
          { photo: 'CR-01-2A-1.png', caption: 'Coupling, seen from the walkway (drawn)' },
          { photo: 'ID-01-1.png', caption: 'Wheel before cleaning (drawn)' },
        ],
      ),
    },
  ];
}

/** The column `finding` stands twice: id, then text. */
function findingsCsv(rows: readonly Row[]): string {
  return csv(FINDING_COLUMNS, rows).replace('finding_text', 'finding');
}
