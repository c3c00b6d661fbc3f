/** One row of the plant's tables by column name. */
export type Row = Readonly<Record<string, string | number>>;

/** A number in the series' unit, a status, or null where there is no row. */
export type Told = number | string | null;

/** A series and what it read: a level that scatters, or a value (or status) for each of the ten surveys. */
export interface DemoSeries {
  readonly component?: string;
  readonly point: string;
  readonly columns?: Row;
  readonly quantity?: string;
  readonly unit?: string;
  readonly detection?: string;
  readonly level?: number;
  readonly values?: readonly Told[];
  /** Columns of its readings, by survey index. */
  readonly taken?: (survey: number) => Row;
}

export interface DemoMachine {
  readonly machine: string;
  readonly columns: Row;
  readonly components?: readonly (Row & { readonly component: string })[];
  readonly series: readonly DemoSeries[];
}

export const SURVEYS = [
  '2023-10-18',
  '2023-11-22',
  '2024-01-17',
  '2024-10-16',
  '2024-11-20',
  '2025-01-15',
  '2025-02-19',
  '2025-10-15',
  '2025-11-19',
  '2026-01-14',
] as const;
/** A second look at one machine beside the routine survey before it. */
export const REPEAT = '2025-11-26';
export const LAST = SURVEYS.length - 1;
