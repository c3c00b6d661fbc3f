/** plant.yaml and survey.yaml as settings and survey heads. */
import { readableAccent } from '../words/legible.ts';
import { parseDetection } from '../measure/detection.ts';
import { nearestWord } from '../measure/nearest.ts';
import { parseFrequencyUnit, parseUnit } from '../measure/units.ts';
import { type Day, parseDay } from '../plant/day.ts';
import { POLICY_IDS, type Policy, type PolicyId, policyWith } from '../plant/policy.ts';
import type { PlantSettings, Survey } from '../plant/types.ts';
import { type Imports, NO_IMPORTS } from './mapping.ts';
import type { Problems } from './problems.ts';
import { PLANT_KEYS, plantSchema, SURVEY_KEYS, surveySchema } from './schema.ts';
import type { YamlFile } from './yaml.ts';

const HINT = 'See the README for what this file may hold.';

/** A map with unknown keys noted and left out; null with a problem when the file holds something else. */
function mapOf(yaml: YamlFile, keys: readonly string[], problems: Problems): Record<string, unknown> | null {
  const { value } = yaml;
  if (value === null || value === undefined || value === '') return {};
  if (typeof value !== 'object' || Array.isArray(value)) {
    problems.error(
      'broken-yaml',
      { file: yaml.file, line: 1, column: 1 },
      'The file holds no names and values.',
      'Each line is a name, a colon and a value.',
    );
    return null;
  }
  const known: Record<string, unknown> = {};
  for (const [key, item] of Object.entries(value)) {
    if (keys.includes(key)) known[key] = item;
    else {
      const near = nearestWord(key, keys);
      problems.add(
        'note',
        'unknown-key',
        yaml.place([key]),
        `"${key}" is not known; it is left out.`,
        near === null ? null : `The nearest is "${near}".`,
      );
    }
  }
  return known;
}

type Issues = { readonly issues: readonly { readonly path: readonly PropertyKey[]; readonly message: string }[] };

function tell(yaml: YamlFile, error: Issues, problems: Problems): void {
  for (const issue of error.issues) {
    const path = issue.path.map((p) => (typeof p === 'symbol' ? String(p) : p));
    problems.error(
      'bad-value',
      yaml.place(path),
      `"${path.join('.')}"${issue.message.startsWith('is ') ? '' : ':'} ${issue.message}.`,
      HINT,
    );
  }
}

export interface Settings {
  readonly settings: PlantSettings;
  readonly policy: Policy;
  readonly imports: Imports;
}

export const NO_SETTINGS: PlantSettings = {
  plant: 'Plant not named',
  client: null,
  site: null,
  contract: null,
  procedure: null,
  contractor: { name: null, address: null, contact: null, logo: null, accent: null },
  language: 'en',
  paper: 'A4',
  units: {},
  frequencyUnit: 'Hz',
  peakMeans: null,
  nextStops: [],
  retention: null,
  distribution: [],
};

export function settingsOf(yaml: YamlFile, problems: Problems): Settings {
  const none = { settings: NO_SETTINGS, policy: policyWith({}), imports: NO_IMPORTS };
  const map = mapOf(yaml, PLANT_KEYS, problems);
  if (map === null) return none;
  const parsed = plantSchema.safeParse(map);
  if (!parsed.success) {
    tell(yaml, parsed.error, problems);
    return none;
  }
  const { data } = parsed;
  if (data.plant === null)
    problems.error(
      'no-plant-name',
      yaml.place(['plant']),
      '"plant" is blank: the report needs its name.',
      'Add a line: plant: Name of the plant',
    );
  const { units, frequencyUnit } = displayUnits(yaml, data.units, data.peak_means, problems);
  checkAccent(yaml, data.contractor.accent, problems);
  return {
    settings: {
      plant: data.plant ?? NO_SETTINGS.plant,
      client: data.client,
      site: data.site,
      contract: data.contract,
      procedure: data.procedure,
      contractor: data.contractor,
      language: data.language ?? 'en',
      paper: data.paper ?? 'A4',
      units,
      frequencyUnit,
      peakMeans: data.peak_means,
      nextStops: data.next_stops.flatMap((s) =>
        s === null ? [] : typeof s === 'number' ? [{ day: s, area: null }] : s.date === null ? [] : [{ day: s.date, area: s.area }],
      ),
      retention: data.retention,
      distribution: data.distribution,
    },
    policy: policyWith(overridesOf(yaml, data.policy, problems)),
    imports: data.import,
  };
}

/** A colour that cannot be read on the paper is refused: the report would not be the contractor's dress, or not be legible. */
function checkAccent(yaml: YamlFile, accent: string | null, problems: Problems): void {
  if (accent === null) return;
  const readable = readableAccent(accent);
  if (readable === null)
    problems.error(
      'bad-value',
      yaml.place(['contractor', 'accent']),
      `The accent "${accent}" is no colour of the form #rrggbb.`,
      'Give six digits after #, such as #0b6a6a, in quotes.',
    );
  else if (readable !== accent.toLowerCase())
    problems.error(
      'faint-colour',
      yaml.place(['contractor', 'accent']),
      `The accent ${accent} cannot be read on white paper: text needs a contrast of 4.5 to 1.`,
      `The nearest that passes is "${readable}".`,
    );
}

function displayUnits(
  yaml: YamlFile,
  given: Readonly<Record<string, { unit: string | null; detection: string | null }>>,
  peakMeans: 'calculated' | 'true' | null,
  problems: Problems,
) {
  const units: Record<string, { unit: string | null; detection: null | ReturnType<typeof detectionIn> }> = {};
  let frequencyUnit: 'Hz' | 'CPM' = 'Hz';
  const detectionIn = (text: string, quantity: string) => {
    const found = parseDetection(text, peakMeans);
    if (found !== null && 'detection' in found) return found.detection;
    problems.error(
      'unknown-word',
      yaml.place(['units', quantity]),
      `The detection "${text}" of ${quantity} is not known, or does not say which peak.`,
      'Give rms, or a peak that says whether it is calculated or true.',
    );
    return null;
  };
  for (const [quantity, { unit, detection }] of Object.entries(given)) {
    if (quantity === 'frequency') {
      const found = parseFrequencyUnit(unit ?? '');
      if (found === null || found === 'r/min')
        problems.error('unknown-unit', yaml.place(['units', quantity]), `The frequency unit "${unit}" is not known.`, 'Give Hz or CPM.');
      else frequencyUnit = found;
      continue;
    }
    const parsed = unit === null ? null : parseUnit(unit);
    units[quantity] = { unit: parsed?.symbol ?? unit, detection: detection === null ? null : detectionIn(detection, quantity) };
  }
  return { units, frequencyUnit };
}

function overridesOf(yaml: YamlFile, given: Readonly<Record<string, number>>, problems: Problems): Partial<Record<PolicyId, number>> {
  const overrides: Partial<Record<PolicyId, number>> = {};
  for (const [id, value] of Object.entries(given)) {
    const known = POLICY_IDS.find((p) => p === id);
    if (known !== undefined) overrides[known] = value;
    else {
      const near = nearestWord(id, POLICY_IDS);
      problems.error(
        'unknown-policy',
        yaml.place(['policy', id]),
        `There is no policy "${id}".`,
        near === null ? 'The report lists every id with its value.' : `The nearest is "${near}".`,
      );
    }
  }
  return overrides;
}

/** A survey without its own file: everything measured that day, nobody named. */
export function bareSurvey(id: string, day: Day): Survey {
  return {
    id,
    day,
    from: day,
    to: day,
    kind: 'routine',
    scope: { all: true, areas: [], routes: [], machines: [] },
    people: [],
    instruments: [],
    sensors: [],
    fieldCheck: null,
    process: null,
    weather: null,
    remarks: null,
    issueDate: null,
    reviewedBy: null,
    approvedBy: null,
    notified: [],
    findings: [],
    photos: [],
    place: null,
  };
}

/** Head of a survey from its survey.yaml; null with problems. A folder whose name is no date takes the last day of the file. */
export function surveyHead(id: string, yaml: YamlFile, problems: Problems): Survey | null {
  const map = mapOf(yaml, SURVEY_KEYS, problems);
  if (map === null) return null;
  const parsed = surveySchema.safeParse(map);
  if (!parsed.success) {
    tell(yaml, parsed.error, problems);
    return null;
  }
  const { data } = parsed;
  const day = parseDay(id) ?? data.to ?? data.from;
  if (day === null) {
    problems.error(
      'survey-without-date',
      yaml.place(['to']),
      `The survey "${id}" has no date: neither its folder's name nor "to" is one.`,
      'Name the folder by the date, such as 2026-01-14.',
    );
    return null;
  }
  const from = data.from ?? Math.min(day, data.to ?? day);
  const to = data.to ?? Math.max(day, from);
  if (from > to) problems.error('bad-date', yaml.place(['to']), '"to" lies before "from".', 'Check both dates.');
  return {
    ...bareSurvey(id, day),
    from,
    to,
    kind: data.kind ?? 'routine',
    scope: data.scope,
    people: data.people,
    instruments: data.instruments.map((i) => ({ ...i, calibratedOn: i.calibrated_on, calibrationDue: i.calibration_due })),
    sensors: data.sensors.map((s) => ({ ...s, calibrationDue: s.calibration_due })),
    fieldCheck: data.field_check,
    process: data.process,
    weather: data.weather,
    remarks: data.remarks,
    issueDate: data.issue_date,
    reviewedBy: data.reviewed_by,
    approvedBy: data.approved_by,
    notified: data.notified,
  };
}
