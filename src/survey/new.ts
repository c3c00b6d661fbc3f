/**
 * Scaffolds. In: nothing, or a plant and the day of its next survey. Out: files of a plant folder that runs at once, or of
 * the next survey: survey.yaml copied on, readings in route order with blanks, open findings carried. Never: overwrites.
 */
import { dayText } from '../plant/day.ts';
import type { Finding, Plant, Series, Survey } from '../plant/types.ts';
import type { OutputFile } from '../shell/types.ts';
import { FINDINGS_HEAD } from './findings.ts';

const cell = (text: string): string => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
const csv = (rows: readonly (readonly (string | number | null)[])[]): string =>
  `${rows.map((row) => row.map((v) => cell(v === null ? '' : String(v))).join(',')).join('\n')}\n`;

const PLANT_YAML = `# A plant folder of swayfolio. Every number here is invented: replace it by your own.
plant: Example works
client:
site:
contractor:
  name:
  contact:
paper: A4
# What "peak" without another word means in your files: calculated (r.m.s. times 1.414) or true.
peak_means: calculated
# Planned stops, plant-wide.
next_stops: []
`;

const SURVEY_YAML = `kind: routine
scope: all
people:
  - name: Name of the analyst
    category: ISO 18436-2 category II
instruments:
  - id: VM-1
    make: your maker
    model: your model
    calibration_due: 2027-01-01
remarks:
`;

const MACHINES = [
  [
    'machine',
    'name',
    'area',
    'criticality',
    'interval_days',
    'kind',
    'power_kw',
    'speed_rpm',
    'drive',
    'support',
    'shaft_height_mm',
    'bearings',
    'pump_category',
  ],
  ['FAN-1', 'Drying fan', 'Drying', 'essential', '91', 'fan', '90', '1480', 'fixed', 'rigid', '', 'rolling', ''],
  ['PMP-1', 'Feed pump', 'Boiler house', 'critical', '91', 'pump', '55', '2960', 'fixed', 'rigid', '', 'rolling', 'II'],
];

const POINTS = [
  ['machine', 'point', 'location', 'direction', 'measured_on', 'quantity', 'unit', 'detection', 'low_hz', 'high_hz'],
  ...['FAN-1', 'PMP-1'].flatMap((machine) =>
    [
      ['1H', 'horizontal'],
      ['2H', 'horizontal'],
      ['2A', 'axial'],
    ].map(([point = '', direction = '']) => [
      machine,
      point,
      `bearing ${point[0]}`,
      direction,
      'bearing housing',
      'velocity',
      'mm/s',
      'rms',
      '10',
      '1000',
    ]),
  ),
];

const EXAMPLE: Readonly<Record<string, readonly (readonly [string, string, number])[]>> = {
  '2026-01-14': [
    ['FAN-1', '1H', 1.8],
    ['FAN-1', '2H', 2.1],
    ['FAN-1', '2A', 1.1],
    ['PMP-1', '1H', 2.4],
    ['PMP-1', '2H', 2.6],
    ['PMP-1', '2A', 1.4],
  ],
  '2026-04-15': [
    ['FAN-1', '1H', 1.9],
    ['FAN-1', '2H', 3.4],
    ['FAN-1', '2A', 1.2],
    ['PMP-1', '1H', 2.3],
    ['PMP-1', '2H', 2.7],
    ['PMP-1', '2A', 1.4],
  ],
};

/** A plant with two machines and two surveys of invented readings, which `report` takes as it is. */
export function newPlant(): OutputFile[] {
  const surveys = Object.entries(EXAMPLE).flatMap(([date, readings]) => [
    { path: `surveys/${date}/survey.yaml`, bytes: SURVEY_YAML },
    {
      path: `surveys/${date}/readings.csv`,
      bytes: csv([
        ['machine', 'point', 'value', 'status', 'instrument', 'remark'],
        ...readings.map(([machine, point, value]) => [machine, point, value, '', 'VM-1', '']),
      ]),
    },
  ]);
  return [
    { path: 'plant.yaml', bytes: PLANT_YAML },
    { path: 'machines.csv', bytes: csv(MACHINES) },
    { path: 'points.csv', bytes: csv(POINTS) },
    ...surveys,
  ];
}

const READING_COLUMNS = [
  'machine',
  'point',
  'quantity',
  'detection',
  'value',
  'unit',
  'speed_rpm',
  'load_pct',
  'state',
  'status',
  'phase_deg',
  'amplitude_1x',
  'running_hours',
  'taken_at',
  'instrument',
  'measured_by',
  'retake',
  'remark',
  'last_value',
  'last_date',
  'alarm',
];

/** ALARM by machine, point, quantity and detection, parted by NUL; what the assessment of the last survey says. */
export type Alarms = ReadonlyMap<string, number>;

/** Files of the survey of `survey` (`YYYY-MM-DD`), each under surveys/<survey>/. */
export function nextSurvey(plant: Plant, survey: string, alarms: Alarms = new Map()): OutputFile[] {
  const last = plant.surveys[plant.surveys.length - 1];
  const home = `surveys/${survey}`;
  const rows = plant.machines
    .filter((machine) => machine.rows.every((row) => row.removedOn === null))
    .map((machine) => ({ machine, route: machine.rows[machine.rows.length - 1]?.route ?? '' }))
    .sort((a, b) => (a.route < b.route ? -1 : a.route > b.route ? 1 : 0))
    .flatMap(({ machine }) => machine.series.map((series) => readingRow(series, alarms)));
  const files: OutputFile[] = [
    { path: `${home}/survey.yaml`, bytes: surveyYaml(last) },
    { path: `${home}/readings.csv`, bytes: csv([READING_COLUMNS, ...rows]) },
  ];
  const open = openFindings(plant);
  if (open.length > 0) files.push({ path: `${home}/findings.csv`, bytes: csv([FINDINGS_HEAD, ...open.map(findingRow)]) });
  return files;
}

function readingRow(series: Series, alarms: Alarms): (string | number | null)[] {
  const last = [...series.readings].reverse().find((r) => r.typed !== null || r.value !== null);
  const alarm = alarms.get([series.machine, series.point, series.quantity, series.detection ?? ''].join('\u0000'));
  const shown =
    last === undefined ? null : last.typedUnit === null ? last.typed : last.value === null ? last.typed : Number(last.value.toPrecision(4));
  const blanks = { before: [''], after: ['', '', last?.state ?? '', '', '', '', '', '', '', '', '', ''] };
  return [
    series.machine,
    series.point,
    series.quantity,
    series.detection,
    ...blanks.before,
    series.unit,
    ...blanks.after,
    shown,
    last === undefined ? null : dayText(last.day),
    alarm === undefined ? null : Number(alarm.toPrecision(4)),
  ];
}

/** Each finding's last version, where it is not closed, with the survey it comes from. */
function openFindings(plant: Plant): { readonly finding: Finding; readonly from: string }[] {
  const latest = new Map<string, { finding: Finding; from: string }>();
  for (const survey of plant.surveys) for (const finding of survey.findings) latest.set(finding.id, { finding, from: survey.id });
  return [...latest.values()].filter(({ finding }) => finding.closed === null);
}

function findingRow({ finding: f, from }: { readonly finding: Finding; readonly from: string }): (string | number | null)[] {
  const yesNo = f.needsStop === null ? null : f.needsStop ? 'yes' : 'no';
  const day = (d: number | null): string | null => (d === null ? null : dayText(d));
  return [
    f.id,
    f.machine,
    f.component,
    f.points.join('; '),
    f.finding,
    f.likelyCause,
    f.lessLikely,
    f.confidence,
    f.recommendation,
    yesNo,
    f.checkFirst,
    f.consequence,
    f.downtimeH,
    f.parts,
    day(f.due),
    f.owner,
    f.urgency,
    f.overrideBy,
    f.overrideReason,
    day(f.overrideUntil),
    f.verifyPoint,
    f.verifyBelow,
    f.carriedFrom ?? from,
    null,
    null,
  ];
}

const quoted = (text: string | null): string => (text === null ? '' : JSON.stringify(text));

/** People, instruments and sensors stay; what was of that day is left blank. */
function surveyYaml(last: Survey | undefined): string {
  if (last === undefined) return SURVEY_YAML;
  const lines = ['kind: routine', 'scope: all', 'people:'];
  for (const p of last.people)
    lines.push(
      `  - name: ${quoted(p.name)}`,
      `    role: ${quoted(p.role)}`,
      `    category: ${quoted(p.category)}`,
      `    certificate: ${quoted(p.certificate)}`,
      `    expires: ${p.expires === null ? '' : dayText(p.expires)}`,
    );
  lines.push('instruments:');
  for (const i of last.instruments) {
    lines.push(
      `  - id: ${quoted(i.id)}`,
      `    make: ${quoted(i.make)}`,
      `    model: ${quoted(i.model)}`,
      `    serial: ${quoted(i.serial)}`,
      `    band: ${quoted(i.band)}`,
    );
    lines.push(
      `    calibrated_on: ${i.calibratedOn === null ? '' : dayText(i.calibratedOn)}`,
      `    calibration_due: ${i.calibrationDue === null ? '' : dayText(i.calibrationDue)}`,
      `    certificate: ${quoted(i.certificate)}`,
      `    laboratory: ${quoted(i.laboratory)}`,
    );
  }
  lines.push('sensors:');
  for (const s of last.sensors)
    lines.push(
      `  - id: ${quoted(s.id)}`,
      `    serial: ${quoted(s.serial)}`,
      `    sensitivity: ${quoted(s.sensitivity)}`,
      `    mounting: ${quoted(s.mounting)}`,
      `    calibration_due: ${s.calibrationDue === null ? '' : dayText(s.calibrationDue)}`,
    );
  lines.push('field_check:', 'process:', 'weather:', 'remarks:', 'issue_date:', 'reviewed_by:', 'approved_by:', 'notified: []');
  return `${lines.join('\n')}\n`;
}
