import type { Detection } from '../measure/detection.ts';
import type { MeasuredOn } from '../plant/types.ts';
import type { LimitSet } from './types.ts';

export interface Standard {
  readonly source: string;
  readonly edition: string;
  readonly table: string;
  readonly confidence: 'confirmed' | 'one source' | 'recalled';
  readonly lowHz: number | null;
  readonly highHz: number | null;
}

interface Row {
  readonly id: string;
  readonly title: string;
  readonly quantity: string;
  readonly unit: string;
  readonly detection: Detection;
  readonly measuredOn?: MeasuredOn;
  readonly ab?: number | null;
  readonly bc?: number | null;
  readonly cd?: number | null;
  readonly confidence?: Standard['confidence'];
  readonly acceptance?: boolean;
}

/** A published set: boundaries in the row's unit and detection, everything else from its standard. */
export function publishedSet(standard: Standard, row: Row): LimitSet {
  return {
    id: row.id,
    title: row.title,
    basis: 'standard',
    source: standard.source,
    edition: standard.edition,
    table: standard.table,
    confidence: row.confidence ?? standard.confidence,
    quantity: row.quantity,
    unit: row.unit,
    detection: row.detection,
    measuredOn: row.measuredOn ?? 'bearing housing',
    lowHz: standard.lowHz,
    highHz: standard.highHz,
    ab: row.ab ?? null,
    bc: row.bc ?? null,
    cd: row.cd ?? null,
    alarm: null,
    trip: null,
    validFrom: null,
    approvedBy: null,
    approvedOn: null,
    published: true,
    acceptance: row.acceptance ?? false,
  };
}

type Triple = readonly [number, number, number];

/** A set of velocity boundaries in mm/s r.m.s. */
export const velocitySet = (
  standard: Standard,
  id: string,
  title: string,
  [ab, bc, cd]: Triple,
  confidence?: Standard['confidence'],
): LimitSet =>
  publishedSet(standard, {
    id,
    title,
    quantity: 'velocity',
    unit: 'mm/s',
    detection: 'rms',
    ab,
    bc,
    cd,
    ...(confidence === undefined ? {} : { confidence }),
  });

/** A set of displacement boundaries in µm r.m.s. */
export const displacementSet = (standard: Standard, id: string, title: string, [ab, bc, cd]: Triple): LimitSet =>
  publishedSet(standard, { id, title, quantity: 'displacement', unit: 'µm', detection: 'rms', ab, bc, cd });
