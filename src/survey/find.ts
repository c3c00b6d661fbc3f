/**
 * Which file of a plant folder is what. In: relative paths. Out: tables, surveys and photos by name. Never: a file read.
 */
export interface Found {
  readonly plantYaml: string | null;
  /** Tables beside plant.yaml that are there, by name. */
  readonly tables: ReadonlySet<string>;
  /** Long-form files directly in surveys/. */
  readonly histories: readonly string[];
  /** Files that the import section speaks of. */
  readonly imports: readonly string[];
  readonly surveys: readonly FoundSurvey[];
  /** CSV and YAML files whose name says nothing to us. */
  readonly strangers: readonly string[];
}

export interface FoundSurvey {
  readonly id: string;
  readonly yaml: string | null;
  readonly readings: string | null;
  readonly findings: string | null;
  readonly captions: string | null;
  readonly photos: readonly string[];
}

export const PLANT_TABLES = [
  'machines.csv',
  'components.csv',
  'points.csv',
  'limits.csv',
  'events.csv',
  'actions.csv',
  'renames.csv',
  'accepted.csv',
] as const;

export function findFiles(files: readonly string[], isMapped: (path: string) => boolean = () => false): Found {
  const surveys = new Map<string, OpenSurvey>();
  const tables = new Set<string>();
  const histories: string[] = [];
  const imports: string[] = [];
  const strangers: string[] = [];
  let plantYaml: string | null = null;
  for (const path of files) {
    const parts = path.split('/');
    const name = parts[parts.length - 1] as string;
    if (path === 'plant.yaml') plantYaml = path;
    else if (isMapped(path)) {
      imports.push(path);
      if (parts[0] === 'surveys' && parts.length >= 3) surveyAt(surveys, parts[1] as string);
    } else if (parts.length === 1 && (PLANT_TABLES as readonly string[]).includes(name)) tables.add(name);
    else if (parts[0] === 'surveys' && parts.length === 2 && name.endsWith('.csv')) histories.push(path);
    else if (parts[0] === 'surveys' && parts.length >= 3) {
      const survey = surveyAt(surveys, parts[1] as string);
      if (!place(survey, parts.slice(2).join('/'), path)) strangers.push(path);
    } else if (parts[0] !== 'templates' && /\.(csv|ya?ml)$/.test(name)) strangers.push(path);
  }
  return { plantYaml, tables, histories, imports, strangers, surveys: [...surveys.entries()].map(([id, s]) => ({ id, ...s })) };
}

type OpenSurvey = { yaml: string | null; readings: string | null; findings: string | null; captions: string | null; photos: string[] };

function surveyAt(surveys: Map<string, OpenSurvey>, name: string): OpenSurvey {
  const id = surveyName(name);
  const survey = surveys.get(id) ?? { yaml: null, readings: null, findings: null, captions: null, photos: [] };
  surveys.set(id, survey);
  return survey;
}

export const surveyName = (folder: string): string => folder.normalize('NFC').trim();

/** Puts a file of a survey's folder where it belongs; false for a table that has no place there. */
function place(survey: OpenSurvey, name: string, path: string): boolean {
  if (name === 'survey.yaml') survey.yaml = path;
  else if (name === 'readings.csv') survey.readings = path;
  else if (name === 'findings.csv') survey.findings = path;
  else if (name === 'photos/captions.csv') survey.captions = path;
  else if (/^photos\/[^/]+\.(jpe?g|png)$/i.test(name)) survey.photos.push(path);
  else return !/\.(csv|ya?ml)$/.test(name);
  return true;
}
