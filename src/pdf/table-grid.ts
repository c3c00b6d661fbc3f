/** Columns of a table. In: its rows. Out: widths by their contents, and where the decimal points of a column stand, points. */
import type { BlockContext } from './block.ts';
import { columnWidths, type Kind, type Need } from './columns.ts';
import { measure } from './inline.ts';
import type { Cell, Row } from './table-cells.ts';

/** Room around the contents of a cell, points. */
export const PAD = { x: 4, y: 2.6 } as const;

export interface Grid {
  readonly kinds: readonly Kind[];
  readonly widths: readonly number[];
  readonly lefts: readonly number[];
  /** Widest part before the decimal point by column. */
  readonly points: readonly number[];
  readonly afters: readonly number[];
  readonly digits: readonly number[];
}

export function gridOf(context: BlockContext, kinds: readonly Kind[], rows: readonly Row[]): Grid {
  const needs: Need[] = kinds.map((kind) => ({ kind, least: 0, natural: 0 }));
  const points = kinds.map(() => 0);
  const afters = kinds.map(() => 0);
  const digits = kinds.map(() => 0);
  for (const row of rows) {
    for (const cell of row.cells) {
      if (cell.point === null) continue;
      points[cell.column] = Math.max(points[cell.column] as number, cell.point.before);
      afters[cell.column] = Math.max(afters[cell.column] as number, cell.point.after);
      digits[cell.column] = Math.max(digits[cell.column] as number, cell.point.digits);
    }
  }
  for (const row of rows) {
    for (const cell of row.cells) {
      if (cell.span > 1) continue;
      const need = needs[cell.column] as Need;
      const size = cell.figure === null ? measure(cell.tokens) : { least: cell.figure.picture.width, natural: cell.figure.picture.width };
      const aligned = (points[cell.column] as number) + (afters[cell.column] as number);
      need.least = Math.max(need.least, cell.point === null ? size.least : aligned);
      need.natural = Math.max(need.natural, cell.point === null ? size.natural : aligned);
    }
  }
  for (const row of rows) for (const cell of row.cells) if (cell.span > 1) widenFor(needs, cell);
  const widths = columnWidths(needs, context.width, PAD.x * 2);
  const lefts: number[] = [];
  widths.reduce((left, width, i) => {
    lefts[i] = left;
    return left + width;
  }, 0);
  return { kinds, widths, lefts, points, afters, digits };
}

/** A second pass: the last column under a spanning cell makes room for its longest word or figure. */
function widenFor(needs: readonly Need[], cell: Cell): void {
  const under = needs.slice(cell.column, cell.column + cell.span);
  const wanted = cell.figure?.picture.width ?? measure(cell.tokens).least;
  const lack = wanted - under.reduce((sum, n) => sum + n.least, 0) - (cell.span - 1) * PAD.x * 2;
  const last = under.findLast((n) => n.kind === 'text') ?? under[under.length - 1];
  if (last === undefined || lack <= 0) return;
  last.least += lack;
  last.natural = Math.max(last.natural, last.least);
}
