import { isKnownQuantity } from '../measure/detection.ts';
import { unitFactor } from '../measure/units.ts';
import { DIRECTIONS, MEASURED_ON, type PointRow } from '../plant/types.ts';
import type { Detection } from '../measure/detection.ts';
import { Cells } from './cells.ts';
import type { Table } from './csv.ts';
import type { Problems } from './problems.ts';
import { detectionOf, type PeakMeans, quantityOf, unitOf } from './quantities.ts';

export const POINTS_COLUMNS = [
  'machine',
  'component',
  'point',
  'location',
  'direction',
  'measured_on',
  'quantity',
  'unit',
  'detection',
  'scale',
  'low_hz',
  'high_hz',
  'support',
  'limit_set',
  'baseline',
  'baseline_from',
  'floor',
  'notes',
  'valid_from',
] as const;

/** A row of points.csv with its key. */
export interface PointEntry {
  readonly machine: string;
  readonly component: string | null;
  readonly point: string;
  readonly quantity: string;
  readonly detection: Detection | null;
  readonly unit: string;
  readonly row: PointRow;
  readonly cells: { readonly file: string; readonly line: number };
}

export const seriesKey = (machine: string, point: string, quantity: string, detection: string | null): string =>
  `${machine}\u0000${point}\u0000${quantity}\u0000${detection ?? ''}`;

export interface PointEntries {
  readonly entries: readonly PointEntry[];
  /** Points whose row has a problem of its own: their readings are not told as unknown too. */
  readonly faulty: readonly { readonly machine: string; readonly point: string }[];
}

export function pointEntries(table: Table, peakMeans: PeakMeans, problems: Problems): PointEntries {
  const cells = new Cells(table, problems);
  const entries: PointEntry[] = [];
  const faulty: { machine: string; point: string }[] = [];
  while (cells.next()) {
    const entry = pointEntry(cells, peakMeans);
    if (entry !== null) entries.push(entry);
    else faulty.push({ machine: cells.text('machine') ?? '', point: cells.text('point') ?? '' });
  }
  return { entries, faulty };
}

function pointEntry(cells: Cells, peakMeans: PeakMeans): PointEntry | null {
  const machine = cells.required('machine');
  const point = cells.required('point');
  const typed = cells.required('quantity');
  const unitText = cells.text('unit');
  const row = pointRow(cells, typed === null ? null : quantityOf(typed));
  if (machine === null || point === null || typed === null) return null;
  const quantity = quantityOf(typed);
  const detection = detectionOf(cells, 'detection', quantity, peakMeans);
  if (detection === undefined) return null;
  if (isKnownQuantity(quantity)) {
    if (detection === null)
      cells.error(
        'blank',
        'detection',
        `"detection" is blank; a ${quantity} without it means nothing.`,
        'Give rms, calculated peak, true peak, calculated peak-to-peak or true peak-to-peak.',
      );
    if (unitText === null)
      cells.error('blank', 'unit', `"unit" is blank; a ${quantity} without it means nothing.`, 'Give the unit, such as mm/s.');
    if (detection === null || unitText === null) return null;
  }
  const unit = unitOf(cells, 'unit', unitText ?? '', quantity);
  return unit === null ? null : { machine, component: cells.text('component'), point, quantity, detection, unit, row, cells: cells.place };
}

function pointRow(cells: Cells, quantity: string | null): PointRow {
  const scale = cells.word('scale', ['linear', 'dB', 'none'] as const);
  const [lowHz, highHz] = [cells.number('low_hz', 0), cells.number('high_hz', 0)];
  if (lowHz !== null && highHz !== null && lowHz >= highHz)
    cells.error('bad-band', 'high_hz', `The band from ${lowHz} to ${highHz} Hz is empty.`, 'Give low_hz below high_hz.');
  if (scale !== null && scale !== 'linear' && quantity !== null && isKnownQuantity(quantity)) {
    cells.error('wrong-scale', 'scale', `A ${quantity} is linear; scale "${scale}" is for a plant's own quantity.`, 'Leave scale blank.');
  }
  return {
    validFrom: cells.day('valid_from'),
    place: cells.place,
    location: cells.text('location'),
    direction: cells.word('direction', DIRECTIONS),
    measuredOn: cells.word('measured_on', MEASURED_ON),
    scale: scale ?? 'linear',
    lowHz,
    highHz,
    support: cells.word('support', ['rigid', 'flexible'] as const),
    limitSet: cells.text('limit_set'),
    baseline: cells.number('baseline', scale === 'dB' ? null : 0),
    baselineFrom: cells.text('baseline_from'),
    floor: cells.number('floor', scale === 'dB' ? null : 0),
    notes: cells.text('notes'),
  };
}

/** A point row of a later unit, with its own numbers brought into the unit of the series. */
export function inUnit(row: PointRow, from: string, to: string): PointRow {
  const factor = from === to ? 1 : (unitFactor(from, to) ?? 1);
  const scaled = (value: number | null): number | null => (value === null ? null : value * factor);
  return factor === 1 ? row : { ...row, baseline: scaled(row.baseline), floor: scaled(row.floor) };
}

export const PLAIN_POINT_ROW: PointRow = {
  validFrom: null,
  place: null,
  location: null,
  direction: null,
  measuredOn: null,
  scale: 'linear',
  lowHz: null,
  highHz: null,
  support: null,
  limitSet: null,
  baseline: null,
  baselineFrom: null,
  floor: null,
  notes: null,
};
