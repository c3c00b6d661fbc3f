/**
 * Small plant folders in memory: files in, record out, by the whole program short of the disk. Dates are quarterly.
 */
import { assess } from '../../src/assess/assess.ts';
import type { RecordMachine, RecordMeasurement, SwayfolioRecord } from '../../src/record/types.ts';
import { readRecord } from '../../src/record/read.ts';
import { writeRecord } from '../../src/record/write.ts';
import { readPlant } from '../../src/survey/read.ts';

export type Files = Readonly<Record<string, string>>;

/** A shell that knows these files alone. */
export function memoryShell(files: Files) {
  const bytes = new Map(Object.entries(files).map(([path, text]) => [path, new TextEncoder().encode(text)]));
  const local = (path: string): string => path.replace(/^plant\//, '');
  return {
    list: () => ({ files: [...bytes.keys()].sort(), refused: [] }),
    read: (path: string): Uint8Array => {
      const found = bytes.get(local(path));
      if (found === undefined) throw new Error(`no file ${path}`);
      return found;
    },
    exists: (path: string): boolean => bytes.has(local(path)),
  };
}

/** The record of a folder, written and read back; throws with the problems when the folder has errors. */
export function recordOf(files: Files, survey: string | null = null): SwayfolioRecord {
  const { plant, problems } = readPlant(memoryShell(files), 'plant');
  if (plant === null) throw new Error(problems.map((p) => `${p.file}:${p.line}:${p.column}: ${p.code} ${p.message}`).join('\n'));
  return readRecord(writeRecord(assess(plant, { survey, toolVersion: 'test' })));
}

export const QUARTERS = [
  '2023-01-10',
  '2023-04-11',
  '2023-07-11',
  '2023-10-10',
  '2024-01-09',
  '2024-04-09',
  '2024-07-09',
  '2024-10-08',
  '2025-01-07',
  '2025-04-08',
  '2025-07-08',
  '2025-10-07',
] as const;

/** A machine of one component with the limit groups of ISO 20816-3 that the rules' cases name. */
export const GROUPS = {
  G2R: { kind: 'motor', power_kw: '75', shaft_height_mm: '225', support: 'rigid' },
  G2F: { kind: 'motor', power_kw: '75', shaft_height_mm: '225', support: 'flexible' },
  G1R: { kind: 'motor', power_kw: '400', shaft_height_mm: '355', support: 'rigid' },
  G1F: { kind: 'motor', power_kw: '400', shaft_height_mm: '355', support: 'flexible' },
} as const;

export interface SeriesInput {
  readonly point: string;
  readonly location?: string;
  readonly quantity?: string;
  readonly unit?: string;
  readonly detection?: string;
  /** A number as text, or a status word; blank leaves the row out. */
  readonly values: readonly (number | string)[];
  readonly columns?: Readonly<Record<string, string>>;
  readonly pointColumns?: Readonly<Record<string, string>>;
}

export interface MachineInput {
  readonly machine: string;
  readonly columns: Readonly<Record<string, string>>;
  readonly series: readonly SeriesInput[];
}

const csv = (rows: readonly Readonly<Record<string, string>>[]): string => {
  const columns = [...new Set(rows.flatMap((r) => Object.keys(r)))];
  return `${[columns.join(','), ...rows.map((r) => columns.map((c) => r[c] ?? '').join(','))].join('\n')}\n`;
};

/** Folder of machines whose readings stand in one long-form file, a column of dates a survey. */
export function folder(machines: readonly MachineInput[], more: Files = {}, dates: readonly string[] = QUARTERS): Files {
  const points = machines.flatMap((m) =>
    m.series.map((s) => ({
      machine: m.machine,
      component: m.machine,
      point: s.point,
      location: s.location ?? s.point,
      direction: 'horizontal',
      measured_on: 'bearing housing',
      quantity: s.quantity ?? 'velocity',
      unit: s.unit ?? 'mm/s',
      detection: s.detection ?? 'rms',
      low_hz: '10',
      high_hz: '1000',
      ...s.pointColumns,
    })),
  );
  const readings = machines.flatMap((m) =>
    m.series.flatMap((s) =>
      s.values.flatMap((value, i) => {
        if (value === '') return [];
        const status = typeof value === 'string' && !/^[<>\d]/.test(value) ? value : 'measured';
        return [
          {
            survey_date: dates[i] ?? '',
            machine: m.machine,
            point: s.point,
            quantity: s.quantity ?? 'velocity',
            detection: s.detection ?? 'rms',
            value: status === 'measured' ? String(value) : '',
            unit: s.unit ?? 'mm/s',
            status,
            ...s.columns,
          },
        ];
      }),
    ),
  );
  return {
    'plant.yaml': 'plant: Test works\n',
    'machines.csv': csv(machines.map((m) => ({ machine: m.machine, speed_rpm: '1480', drive: 'fixed', ...m.columns }))),
    'points.csv': csv(points),
    'surveys/history.csv': csv(readings),
    ...more,
  };
}

export function machineOf(record: SwayfolioRecord, id: string): RecordMachine {
  const found = record.machines.find((m) => m.machine === id);
  if (found === undefined) throw new Error(`no machine ${id} in the record`);
  return found;
}

export function measurementOf(record: SwayfolioRecord, machine: string, point: string, quantity = 'velocity'): RecordMeasurement {
  const found = record.measurements.find((m) => m.machine === machine && m.point === point && m.quantity === quantity);
  if (found === undefined) throw new Error(`no measurement ${machine} ${point} ${quantity} in the record`);
  return found;
}
