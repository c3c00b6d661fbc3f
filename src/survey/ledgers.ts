import { isKnownQuantity } from '../measure/detection.ts';
import {
  type Accepted,
  EVENTS,
  KINDS,
  type LedgerAction,
  type LimitRow,
  MEASURED_ON,
  type PlantEvent,
  type Rename,
} from '../plant/types.ts';
import { Cells } from './cells.ts';
import type { Table } from './csv.ts';
import type { Problems } from './problems.ts';
import { detectionOf, type PeakMeans, quantityOf, unitOf } from './quantities.ts';

export const LIMITS_COLUMNS = [
  'limit_set',
  'title',
  'basis',
  'source',
  'edition',
  'quantity',
  'unit',
  'detection',
  'measured_on',
  'low_hz',
  'high_hz',
  'ab',
  'bc',
  'cd',
  'alarm',
  'trip',
  'applies_machine',
  'applies_component',
  'applies_point',
  'applies_kind',
  'valid_from',
  'approved_by',
  'approved_on',
  'notes',
] as const;
export const EVENTS_COLUMNS = [
  'machine',
  'component',
  'point',
  'quantity',
  'date',
  'event',
  'new_baseline',
  'serial_out',
  'serial_in',
  'notes',
] as const;
export const ACTIONS_COLUMNS = [
  'action',
  'finding',
  'machine',
  'raised',
  'recommendation',
  'due',
  'owner',
  'work_order',
  'status',
  'closed',
  'closed_by',
  'as_found',
  'verify_point',
  'verify_below',
  'notes',
] as const;
export const ACCEPTED_COLUMNS = ['machine', 'point', 'quantity', 'up_to', 'until', 'by', 'reason'] as const;
export const RENAMES_COLUMNS = ['kind', 'machine', 'old', 'new', 'since'] as const;

/** Rows of a table, each by `read`; rows that could not be read are left out with their problems told. */
export function rowsOf<T>(table: Table | null, problems: Problems, read: (cells: Cells) => T | null): T[] {
  if (table === null) return [];
  const cells = new Cells(table, problems);
  const rows: T[] = [];
  while (cells.next()) {
    const row = read(cells);
    if (row !== null) rows.push(row);
  }
  return rows;
}

const BASES = ['maker', 'contract', 'statistics', 'owner', 'standard'] as const;

export const limitRow =
  (peakMeans: PeakMeans) =>
  (cells: Cells): LimitRow | null => {
    const limitSet = cells.required('limit_set');
    const typed = cells.required('quantity');
    const basis = cells.word('basis', BASES);
    if (cells.text('basis') === null)
      cells.error('blank', 'basis', '"basis" is blank: a limit must say on whose word it stands.', `Give one of: ${BASES.join(', ')}.`);
    if (limitSet === null || typed === null) return null;
    const quantity = quantityOf(typed);
    const unitText = cells.required('unit');
    const detection = detectionOf(cells, 'detection', quantity, peakMeans);
    if (isKnownQuantity(quantity) && detection === null)
      cells.error(
        'blank',
        'detection',
        `"detection" is blank; a limit of ${quantity} without it means nothing.`,
        'Give rms or a peak that says whether it is calculated or true.',
      );
    const unit = unitText === null ? null : unitOf(cells, 'unit', unitText, quantity);
    const least = isKnownQuantity(quantity) ? 0 : null;
    const [ab, bc, cd] = [cells.number('ab', least), cells.number('bc', least), cells.number('cd', least)];
    checkOrder(cells, [
      ['ab', ab],
      ['bc', bc],
      ['cd', cd],
    ]);
    if (basis === null || detection === undefined || unit === null) return null;
    return {
      validFrom: cells.day('valid_from'),
      place: cells.place,
      limitSet,
      title: cells.text('title'),
      basis,
      source: cells.text('source'),
      edition: cells.text('edition'),
      quantity,
      unit,
      detection,
      measuredOn: cells.word('measured_on', MEASURED_ON),
      lowHz: cells.number('low_hz', 0),
      highHz: cells.number('high_hz', 0),
      ab,
      bc,
      cd,
      alarm: cells.number('alarm', least),
      trip: cells.number('trip', least),
      appliesMachine: cells.text('applies_machine'),
      appliesComponent: cells.text('applies_component'),
      appliesPoint: cells.text('applies_point'),
      appliesKind: cells.word('applies_kind', KINDS),
      approvedBy: cells.text('approved_by'),
      approvedOn: cells.day('approved_on'),
      notes: cells.text('notes'),
    };
  };

function checkOrder(cells: Cells, boundaries: readonly (readonly [string, number | null])[]): void {
  const given = boundaries.filter((b): b is readonly [string, number] => b[1] !== null);
  given.forEach(([name, value], i) => {
    const before = given[i - 1];
    if (before !== undefined && before[1] >= value)
      cells.error(
        'limits-order',
        name,
        `"${name}" (${value}) is not above "${before[0]}" (${before[1]}).`,
        'Boundaries rise from ab by bc to cd.',
      );
  });
  if (given.length === 0 && cells.number('alarm') === null && cells.number('trip') === null)
    cells.warn('limits-blank', 'bc', 'The row gives no boundary at all.', 'Give ab, bc, cd, alarm or trip.');
}

export const eventRow = (cells: Cells): PlantEvent | null => {
  const machine = cells.required('machine');
  const day = cells.required('date') === null ? null : cells.day('date');
  const event = cells.required('event') === null ? null : cells.word('event', EVENTS);
  const quantity = cells.text('quantity');
  const newBaseline = cells.yesNo('new_baseline') ?? false;
  if (machine === null || day === null || event === null) return null;
  return {
    machine,
    component: cells.text('component'),
    point: cells.text('point'),
    quantity: quantity === null ? null : quantityOf(quantity),
    day,
    event,
    newBaseline,
    serialOut: cells.text('serial_out'),
    serialIn: cells.text('serial_in'),
    notes: cells.text('notes'),
    place: cells.place,
  };
};

export const actionRow = (cells: Cells): LedgerAction | null => {
  const id = cells.required('action');
  const machine = cells.required('machine');
  const status = cells.word('status', ['open', 'ordered', 'done', 'rejected'] as const) ?? 'open';
  const [raised, due, closed] = [cells.day('raised'), cells.day('due'), cells.day('closed')];
  const verifyBelow = cells.number('verify_below', 0);
  if (raised !== null && closed !== null && closed < raised)
    cells.error('closed-before-raised', 'closed', 'The action was closed before it was raised.', 'Check both dates.');
  if (status === 'done' && closed === null)
    cells.warn(
      'done-without-date',
      'closed',
      'The action is done, but not since when: it cannot be verified.',
      'Give the date in "closed".',
    );
  if (id === null || machine === null) return null;
  return {
    id,
    finding: cells.text('finding'),
    machine,
    raised,
    recommendation: cells.text('recommendation'),
    due,
    owner: cells.text('owner'),
    workOrder: cells.text('work_order'),
    status,
    closed,
    closedBy: cells.text('closed_by'),
    asFound: cells.text('as_found'),
    verifyPoint: cells.text('verify_point'),
    verifyBelow,
    notes: cells.text('notes'),
    place: cells.place,
  };
};

export const acceptedRow = (cells: Cells): Accepted | null => {
  const machine = cells.required('machine');
  const upTo = cells.required('up_to') === null ? null : cells.number('up_to', 0);
  const quantity = cells.text('quantity');
  if (cells.text('by') === null)
    cells.warn('blank', 'by', 'The accepted deviation does not say who accepts it.', 'Name the owner\'s engineer in "by".');
  if (machine === null || upTo === null) return null;
  return {
    machine,
    point: cells.text('point'),
    quantity: quantity === null ? null : quantityOf(quantity),
    upTo,
    until: cells.day('until'),
    by: cells.text('by'),
    reason: cells.text('reason'),
    place: cells.place,
  };
};

export const renameRow = (cells: Cells): Rename | null => {
  const kind = cells.required('kind') === null ? null : cells.word('kind', ['machine', 'component', 'point'] as const);
  const [old, now] = [cells.required('old'), cells.required('new')];
  const machine = cells.text('machine');
  if (kind !== null && kind !== 'machine' && machine === null)
    cells.error('blank', 'machine', `"machine" is blank: a ${kind} is renamed within its machine.`, 'Name the machine.');
  if (kind === null || old === null || now === null) return null;
  return { kind, machine, old, new: now, since: cells.day('since'), place: cells.place };
};
