/**
 * Reading a plant folder. In: its files through the shell. Out: a Plant, or every problem that stands in its way, in one
 * run. Never: a guess; never a file changed.
 */
import { createHash } from 'node:crypto';
import type { Problem } from '../plant/problem.ts';
import type { InputFile, Plant } from '../plant/types.ts';
import type { Shell } from '../shell/types.ts';
import { readTable, type Table } from './csv.ts';
import { type Found, findFiles, PLANT_TABLES } from './find.ts';
import { fits, type Imports, mappingOf, NO_IMPORTS } from './mapping.ts';
import {
  ACCEPTED_COLUMNS,
  ACTIONS_COLUMNS,
  acceptedRow,
  actionRow,
  EVENTS_COLUMNS,
  eventRow,
  LIMITS_COLUMNS,
  limitRow,
  RENAMES_COLUMNS,
  renameRow,
  rowsOf,
} from './ledgers.ts';
import { COMPONENTS_COLUMNS, MACHINES_COLUMNS } from './machines.ts';
import { Names } from './names.ts';
import { POINTS_COLUMNS } from './points.ts';
import { Problems } from './problems.ts';
import { registerOf } from './register.ts';
import { NO_SETTINGS, type Settings, settingsOf } from './settings.ts';
import { surveysOf } from './surveys.ts';
import { policyWith } from '../plant/policy.ts';
import { readYaml } from './yaml.ts';
import { mendLedgers } from './known.ts';

export type ReadingShell = Pick<Shell, 'list' | 'read' | 'exists'>;

/** Files of one plant folder: read once, hashed as they are read. */
export class Folder {
  readonly inputs: InputFile[] = [];
  readonly #shell: ReadingShell;
  readonly #folder: string;
  readonly problems: Problems;
  /** First file of readings by its hash. */
  readonly #readings = new Map<string, string>();

  constructor(shell: ReadingShell, folder: string, problems: Problems) {
    this.#shell = shell;
    this.#folder = folder.replace(/\/+$/, '');
    this.problems = problems;
  }

  bytes(path: string): Uint8Array {
    const bytes = this.#shell.read(`${this.#folder}/${path}`);
    this.inputs.push({ path, bytes: bytes.length, sha256: createHash('sha256').update(bytes).digest('hex') });
    return bytes;
  }

  /** True, with a problem, where a file of readings is byte for byte another one that was read before. */
  isTwin(path: string): boolean {
    const own = this.inputs.find((input) => input.path === path);
    if (own === undefined || own.bytes === 0) return false;
    const twin = this.#readings.get(own.sha256);
    this.#readings.set(own.sha256, twin ?? path);
    if (twin === undefined) return false;
    this.problems.error(
      'same-file-twice',
      { file: path, line: null },
      `The file is byte for byte ${twin}: its readings are there already.`,
      'Remove one of the two files.',
    );
    return true;
  }

  table(
    path: string,
    known: readonly string[],
    required: readonly string[],
    named?: (header: readonly string[]) => readonly string[],
  ): Table | null {
    return readTable(path, this.bytes(path), known, required, this.problems, named);
  }
}

const COLUMNS: Readonly<
  Record<(typeof PLANT_TABLES)[number], { readonly known: readonly string[]; readonly required: readonly string[] }>
> = {
  'machines.csv': { known: MACHINES_COLUMNS, required: ['machine'] },
  'components.csv': { known: COMPONENTS_COLUMNS, required: ['machine', 'component'] },
  'points.csv': { known: POINTS_COLUMNS, required: ['machine', 'point', 'quantity'] },
  'limits.csv': { known: LIMITS_COLUMNS, required: ['limit_set', 'quantity', 'unit'] },
  'events.csv': { known: EVENTS_COLUMNS, required: ['machine', 'date', 'event'] },
  'actions.csv': { known: ACTIONS_COLUMNS, required: ['action', 'machine'] },
  'renames.csv': { known: RENAMES_COLUMNS, required: ['kind', 'old', 'new'] },
  'accepted.csv': { known: ACCEPTED_COLUMNS, required: ['machine', 'up_to'] },
};

export type Tables = { readonly [name in (typeof PLANT_TABLES)[number]]: Table | null };

/** The plant, null when any problem is an error; the problems are told either way. */
export function readPlant(shell: ReadingShell, folder: string): { readonly plant: Plant | null; readonly problems: readonly Problem[] } {
  const problems = new Problems();
  const { files, refused } = shell.list(folder);
  for (const path of refused)
    problems.add(
      'warning',
      'link-refused',
      { file: path, line: null },
      'A link that leaves the plant folder is not followed.',
      'Copy the file into the folder.',
    );
  const reader = new Folder(shell, folder, problems);
  const { settings, policy, imports } = readSettings(files.includes('plant.yaml'), reader);
  const found = findFiles(files, (path) => mappingOf(imports, path) !== null);
  if (!isPlant(found, problems)) return { plant: null, problems: problems.sorted() };
  tellUnused(imports, found, problems);
  const tables = Object.fromEntries(
    PLANT_TABLES.map((name) => [name, found.tables.has(name) ? reader.table(name, COLUMNS[name].known, COLUMNS[name].required) : null]),
  ) as unknown as Tables;
  const names = new Names(rowsOf(tables['renames.csv'], problems, renameRow));
  const register = registerOf(found.tables.has('points.csv'), tables, settings.peakMeans, names, problems);
  const surveys = surveysOf(found, reader, register, settings.peakMeans, names, imports);
  const ledgers = {
    limits: rowsOf(tables['limits.csv'], problems, limitRow(settings.peakMeans)),
    events: rowsOf(tables['events.csv'], problems, eventRow),
    actions: rowsOf(tables['actions.csv'], problems, actionRow),
    accepted: rowsOf(tables['accepted.csv'], problems, acceptedRow),
  };
  const machines = register.close();
  const known = mendLedgers(ledgers, machines, surveys, names, problems);
  const told = problems.sorted();
  if (problems.anyError) return { plant: null, problems: told };
  const inputs = reader.inputs.sort((a, b) => (a.path < b.path ? -1 : 1));
  return {
    plant: { settings, policy, machines, ...known, renames: rowsOf(tables['renames.csv'], problems, renameRow), problems: told, inputs },
    problems: told,
  };
}

function isPlant(found: Found, problems: Problems): boolean {
  for (const file of found.strangers)
    problems.add('note', 'unknown-file', { file, line: null }, 'The name of this file says nothing to swayfolio; it is left out.', null);
  const hasSurvey = found.histories.length > 0 || found.imports.length > 0 || found.surveys.length > 0;
  if (found.plantYaml === null && !hasSurvey) {
    problems.error(
      'no-plant',
      { file: '', line: null },
      'This folder is no plant: it has neither plant.yaml nor a survey.',
      'Make one by: swayfolio new <folder>',
    );
    return false;
  }
  if (!hasSurvey)
    problems.error(
      'no-survey',
      { file: 'surveys', line: null },
      'The plant has no survey.',
      'Put readings into surveys/<date>/readings.csv, or a file with a survey_date column into surveys/.',
    );
  if (found.plantYaml === null)
    problems.add(
      'warning',
      'no-plant-yaml',
      { file: 'plant.yaml', line: null },
      'There is no plant.yaml: the plant has no name and every setting is the default.',
      'Add a plant.yaml with a line: plant: Name of the plant',
    );
  return true;
}

function tellUnused(imports: Imports, found: Found, problems: Problems): void {
  for (const { file } of imports.files) {
    if (found.imports.some((path) => fits(file, path))) continue;
    problems.error(
      'import-no-file',
      { file: 'plant.yaml', line: null },
      `The import section speaks of "${file}", and no file of that name is there.`,
      'Give its path in the plant folder, such as surveys/2026-01-14/export.csv; * stands for any part of a name.',
    );
  }
}

function readSettings(there: boolean, reader: Folder): Settings {
  const none = { settings: NO_SETTINGS, policy: policyWith({}), imports: NO_IMPORTS };
  if (!there) return none;
  const yaml = readYaml('plant.yaml', reader.bytes('plant.yaml'), reader.problems);
  return yaml === null ? none : settingsOf(yaml, reader.problems);
}
