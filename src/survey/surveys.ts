/**
 * Surveys and their readings. In: survey folders and long-form files. Out: surveys by day, readings joined to the register.
 */
import { type Day, parseDay } from '../plant/day.ts';
import type { Photo, Survey } from '../plant/types.ts';
import type { Cells } from './cells.ts';
import type { Table } from './csv.ts';
import { FINDINGS_COLUMNS, findingRow, findingsHeader, photoOf } from './findings.ts';
import { type Found, type FoundSurvey, surveyName } from './find.ts';
import { rowsOf } from './ledgers.ts';
import { mappedTable } from './mapped.ts';
import { type Imports, mappingOf } from './mapping.ts';
import { type Names, tellUnknown } from './names.ts';
import type { Problems } from './problems.ts';
import type { PeakMeans } from './quantities.ts';
import type { Folder } from './read.ts';
import { READINGS_COLUMNS, readingEntries } from './readings.ts';
import type { Register } from './register.ts';
import { bareSurvey, surveyHead } from './settings.ts';
import { joinDays } from './rounds.ts';
import { readYaml } from './yaml.ts';

const NO_JOINS: ReadonlyMap<string, string> = new Map();

interface Source {
  readonly table: Table;
  /** Survey that all rows belong to; null where each names its own. */
  readonly survey: string | null;
}

/** All surveys, ascending by day then id; readings are joined by the way. */
export function surveysOf(
  found: Found,
  reader: Folder,
  register: Register,
  peakMeans: PeakMeans,
  names: Names,
  imports: Imports,
): Survey[] {
  const { problems } = reader;
  const heads = new Map<string, Survey>();
  const sources: Source[] = [];
  for (const folder of found.surveys) readFolder(folder, reader, heads, sources);
  const folders = new Set(heads.keys());
  const inHistory = new Set([
    ...found.histories.flatMap((file) => readHistory(file, reader, heads, sources)),
    ...found.imports.flatMap((file) => readMapped(file, imports, reader, heads, sources)),
  ]);
  for (const folder of found.surveys)
    if (folder.readings === null && heads.has(folder.id) && !inHistory.has(folder.id)) tellEmpty(folder, problems);
  const joined = imports.span_days === null ? NO_JOINS : joinDays(heads, folders, imports.span_days);
  const states = new Map(Object.entries(imports.states));
  const surveys = [...heads.values()].sort((a, b) => a.day - b.day || (a.id < b.id ? -1 : 1));
  const index = new Map(surveys.map((survey, i) => [survey.id, i]));
  const rounds = new Map<string, string>();
  for (const source of sources) {
    readingEntries(source.table, source.survey, peakMeans, states, problems, (entry, cells) => {
      const at = index.get(joined.get(entry.survey) ?? entry.survey);
      if (at === undefined) return;
      const survey = surveys[at] as Survey;
      const ids = idsOf(register, names, entry.machine, entry.point, survey.day, cells, problems);
      if (ids === null || !isOneRound(rounds, ids.machine, survey, cells)) return;
      const day = joined.has(entry.survey) ? (parseDay(entry.survey) ?? survey.day) : survey.day;
      register.joiner.join(entry, cells, ids.machine, ids.point, at, day, register.componentIds(ids.machine)[0] as string);
    });
  }
  register.joiner.spread();
  return surveys;
}

function readFolder(folder: FoundSurvey, reader: Folder, heads: Map<string, Survey>, sources: Source[]): void {
  const { problems } = reader;
  const yaml = folder.yaml === null ? null : readYaml(folder.yaml, reader.bytes(folder.yaml), problems);
  const day = parseDay(folder.id);
  if (folder.yaml === null && day === null) {
    problems.error(
      'survey-without-date',
      { file: `surveys/${folder.id}`, line: null },
      `The survey folder "${folder.id}" is named by no date and has no survey.yaml that gives one.`,
      'Name it by the date, such as 2026-01-14.',
    );
    return;
  }
  const head = yaml === null ? (day === null ? null : bareSurvey(folder.id, day)) : surveyHead(folder.id, yaml, problems);
  if (head === null) return;
  const findings =
    folder.findings === null ? null : reader.table(folder.findings, FINDINGS_COLUMNS, ['finding', 'machine'], findingsHeader);
  const table = folder.readings === null ? null : reader.table(folder.readings, READINGS_COLUMNS, ['machine', 'point', 'value']);
  const twin = table !== null && folder.readings !== null && table.rows.length > 0 && reader.isTwin(folder.readings);
  if (table !== null && !twin) sources.push({ table, survey: folder.id });
  if (table?.rows.length === 0) tellEmpty(folder, problems);
  const captions = folder.captions === null ? null : reader.table(folder.captions, ['photo', 'caption'], ['photo', 'caption']);
  for (const path of folder.photos) reader.bytes(path);
  const photos: Photo[] = folder.photos.map((path) => ({ path, machine: '', point: null, caption: captionOf(captions, path, problems) }));
  heads.set(folder.id, {
    ...head,
    findings: rowsOf(findings, problems, findingRow),
    photos,
    place: { file: folder.readings ?? folder.yaml ?? `surveys/${folder.id}`, line: 1 },
  });
}

function tellEmpty(folder: FoundSurvey, problems: Problems): void {
  const place = { file: folder.readings ?? folder.yaml ?? `surveys/${folder.id}`, line: null };
  problems.error(
    'survey-without-readings',
    place,
    `The survey ${folder.id} has no readings.`,
    'Fill in its readings.csv, or remove the folder.',
  );
}

function captionOf(captions: Table | null, path: string, problems: Problems): string | null {
  const name = path.slice(path.lastIndexOf('/') + 1);
  return rowsOf(captions, problems, (cells) => (cells.text('photo') === name ? cells.text('caption') : null))[0] ?? null;
}

/** Returns the surveys that the file has readings of. */
function readHistory(file: string, reader: Folder, heads: Map<string, Survey>, sources: Source[]): string[] {
  const table = reader.table(file, READINGS_COLUMNS, ['survey_date', 'machine', 'point', 'value']);
  if (table === null) return [];
  if (reader.isTwin(file)) return [];
  sources.push({ table, survey: null });
  if (table.rows.length === 0)
    reader.problems.error(
      'survey-without-readings',
      { file, line: 1 },
      'The file has a first line and no readings.',
      'Add the readings, or remove the file.',
    );
  return surveysIn(table, heads);
}

/** Reads a file that the import section speaks of; its survey is stated, or its folder, or in each row. */
function readMapped(file: string, imports: Imports, reader: Folder, heads: Map<string, Survey>, sources: Source[]): string[] {
  const mapping = mappingOf(imports, file);
  if (mapping === null) return [];
  const parts = file.split('/');
  const survey = mapping.survey ?? (parts[0] === 'surveys' && parts.length >= 3 ? surveyName(parts[1] as string) : null);
  const bytes = reader.bytes(file);
  if (reader.isTwin(file)) return [];
  const table = mappedTable(file, bytes, mapping, survey !== null, reader.problems);
  if (table === null) return survey === null ? [] : [survey];
  if (table.rows.length === 0)
    reader.problems.error(
      'survey-without-readings',
      { file, line: null },
      'The file has no readings below its column names.',
      'Check header, footer and wide in its mapping, or remove the file.',
    );
  sources.push({ table, survey });
  if (survey === null) return surveysIn(table, heads);
  const day = parseDay(survey);
  const head = heads.get(survey);
  if (head?.place?.file === `surveys/${survey}`) heads.set(survey, { ...head, place: { file, line: 1 } });
  if (!heads.has(survey) && day !== null) heads.set(survey, { ...bareSurvey(survey, day), place: { file, line: 1 } });
  if (!heads.has(survey))
    reader.problems.error(
      'bad-date',
      { file, line: null },
      `The survey "${survey}" of its mapping is no date, and no folder in surveys/ bears that name.`,
      'State survey as YYYY-MM-DD.',
    );
  return [survey];
}

/** The surveys that rows name; each is a survey of its own where no folder is. */
function surveysIn(table: Table, heads: Map<string, Survey>): string[] {
  const { file } = table;
  const at = table.column('survey_date');
  const seen = new Set<string>();
  for (const row of table.rows) {
    const id = (row[at] ?? '').trim();
    if (seen.has(id)) continue;
    seen.add(id);
    const day = parseDay(id);
    if (day !== null && !heads.has(id)) heads.set(id, { ...bareSurvey(id, day), place: { file, line: 1 } });
  }
  return [...seen];
}

/** Today's ids of a row's machine and point; null with the problem told when there is none. */
function idsOf(
  register: Register,
  names: Names,
  typedMachine: string,
  typedPoint: string | null,
  day: Day,
  cells: Cells,
  problems: Problems,
): { machine: string; point: string | null } | null {
  const machine = names.any ? names.machine(typedMachine, day, (id) => register.machines.has(id)) : typedMachine;
  if (register.machine(machine) === null) {
    tellUnknown(problems, cells.at('machine'), 'machine', machine, 'in machines.csv', [...register.machines.keys()]);
    return null;
  }
  if (typedPoint === null) return { machine, point: null };
  if (register.joiner.isFaulty(machine, typedPoint)) return null;
  const point = names.any
    ? names.inner('point', machine, typedPoint, day, (id) => register.joiner.pointsOf(machine).includes(id))
    : typedPoint;
  if (register.joiner.knowsPoint(machine, point)) return { machine, point };
  tellUnknown(problems, cells.at('point'), 'point', point, `of machine "${machine}" in points.csv`, register.joiner.pointsOf(machine));
  return null;
}

/** Rows of one machine within one day bear one survey: two date-times would make two surveys of one round. */
function isOneRound(rounds: Map<string, string>, machine: string, survey: Survey, cells: Cells): boolean {
  if (survey.id.length <= 10) return true;
  const key = `${machine}\u0000${survey.day}`;
  const other = rounds.get(key);
  rounds.set(key, other ?? survey.id);
  if (other === undefined || other === survey.id) return true;
  cells.error(
    'round-split',
    'survey_date',
    `Machine "${machine}" was read on one day under two survey dates, ${other} and ${survey.id}.`,
    'Give every row of one round the same survey_date, or join them in plant.yaml by import: { span_days: 1 }.',
  );
  return false;
}

/** Photos with their machine and point, known only when the register is closed. */
export function placedPhotos(surveys: readonly Survey[], points: ReadonlyMap<string, readonly string[]>, problems: Problems): Survey[] {
  return surveys.map((survey) => ({
    ...survey,
    photos: survey.photos.flatMap((photo) => {
      const placed = photoOf(photo.path, points, new Map());
      if (placed === null)
        problems.add(
          'warning',
          'photo-of-nothing',
          { file: photo.path, line: null },
          'The name of this photo begins with no known machine; it is left out.',
          'Name it <machine>-<point>-<n>.jpg.',
        );
      return placed === null ? [] : [{ ...placed, caption: photo.caption }];
    }),
  }));
}
