/** Plain tables of the Comparison: a chapter with its lead, columns and cells. Finished strings only. */
export interface Cell {
  readonly text: string;
}

export interface Chapter {
  readonly id: string;
  readonly title: string;
  readonly lead: string;
  readonly none: string;
  readonly columns: readonly string[];
  readonly hasRows: boolean;
  /** The first cell heads its row. */
  readonly rows: readonly { readonly head: Cell; readonly cells: readonly Cell[] }[];
}

/** Dates do not break at their hyphens. */
export const cell = (text: string | number): Cell => ({
  text: String(text).replace(/(\d{4})-(\d{2})-(\d{2})(?![\d/])/g, '$1\u2011$2\u2011$3'),
});

export function chapter(
  id: string,
  title: string,
  lead: string,
  none: string,
  columns: readonly string[],
  rows: readonly (readonly Cell[])[],
): Chapter {
  return { id, title, lead, none, columns, hasRows: rows.length > 0, rows: rows.map(([head = cell(''), ...cells]) => ({ head, cells })) };
}

export interface Place {
  readonly record: string;
  readonly file: string | null;
  readonly line: number | null;
  readonly date: string | null;
  readonly instrument: string | null;
  readonly person: string | null;
}

/** Record, file and line; date, instrument, person. */
export function placeText({ record, file, line, date, instrument, person }: Place): string {
  const at = file === null ? record : `${record} › ${file}:${line ?? ''}`;
  return [at, date ?? '', instrument ?? 'instrument not stated', person ?? 'person not stated'].filter((t) => t !== '').join('; ');
}

export const seriesName = ({
  machine,
  point,
  quantity,
  detection,
}: {
  readonly machine: string;
  readonly point: string;
  readonly quantity: string;
  readonly detection: string | null;
}): string => `${machine} ${point} ${quantity}${detection === null ? '' : ` ${detection}`}`;
