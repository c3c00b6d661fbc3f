/**
 * Tables. In: a table element. Out: a box a row: columns sized to their contents, numerals aligned on the decimal point,
 * the header repeated on each page, tall rows split. Never: a cell cut off.
 */
import { type BlockContext, type Box, pictureOf } from './block.ts';
import type { Kind } from './columns.ts';
import { type Line, linesOf } from './inline.ts';
import type { Element } from './markup.ts';
import type { Pen } from './pen.ts';
import { STYLES } from './sheet.ts';
import { type Cell, elements, type Row, rowsOf } from './table-cells.ts';
import { type Grid, gridOf, PAD } from './table-grid.ts';
import type { Node } from './tags.ts';

/** A row taller than this share of the page is split where the page ends; shorter ones move on whole. */
const SPLIT_FROM = 0.5;
/** No part of a split row is shorter, in lines. */
const LEAST_LINES = 2;

export function tableBoxes(context: BlockContext, table: Element, parent: Node): Box[] {
  const kinds = elements(table, 'col').map((c) => (c.attributes['class'] ?? 'text') as Kind);
  const node = context.structure.node('Table', parent);
  const head = elements(table, 'thead').flatMap((part) => rowsOf(context, part, context.structure.node('THead', node), kinds, true));
  const body = elements(table, 'tbody').flatMap((part) => rowsOf(context, part, context.structure.node('TBody', node), kinds, false));
  const columns = [...head, ...body].reduce(
    (most, r) =>
      Math.max(
        most,
        r.cells.reduce((sum, c) => sum + c.span, 0),
      ),
    kinds.length,
  );
  const all = Array.from({ length: columns }, (_, i) => kinds[i] ?? 'text');
  const grid = gridOf(context, all, [...head, ...body]);
  const headRows = head.map((row) => laidRow(context, grid, row));
  const splitFrom = context.pageHeight * SPLIT_FROM;
  const headHeight = headRows.reduce((sum, r) => sum + r.height, 0);
  const repeat =
    headRows.length === 0 ? null : { height: headHeight, draw: (pen: Pen, x: number, y: number) => drawRows(pen, headRows, x, y, true) };
  const boxes: Box[] = headRows.map((row, i) => rowBox(row, i === 0 ? 8 : 0, splitFrom, null));
  body.forEach((row, i) => {
    const box = rowBox(laidRow(context, grid, row), boxes.length === 0 ? 8 : 0, splitFrom, repeat);
    box.anchor = row.anchor;
    box.keepNext = body.length > 1 && i === body.length - 2;
    boxes.push(box);
  });
  return boxes;
}

interface LaidCell {
  readonly cell: Cell;
  readonly x: number;
  readonly width: number;
  readonly lines: readonly Line[];
  readonly align: 'left' | 'right' | 'point';
  readonly pointX: number;
  /** Where the numerals of the column end: its heading ends there too. */
  readonly numeralsEnd: number;
}

interface LaidRow {
  readonly cells: readonly LaidCell[];
  readonly height: number;
  readonly isHead: boolean;
  readonly width: number;
  /** A rest of a split row has the rule of the row, but no first line of its own. */
  readonly leading: number;
}

function laidRow(context: BlockContext, grid: Grid, row: Row): LaidRow {
  const leading = row.isHead ? STYLES.th.leading : STYLES.td.leading;
  const cells = row.cells.map((cell): LaidCell => {
    const width = grid.widths.slice(cell.column, cell.column + cell.span).reduce((a, b) => a + b, 0);
    const x = grid.lefts[cell.column] as number;
    const kind = cell.span > 1 ? 'text' : (grid.kinds[cell.column] as Kind);
    const align = kind === 'number' ? (cell.point === null ? 'right' : 'point') : 'left';
    const room = width - PAD.x * 2;
    const lines = cell.figure === null ? linesOf(context, cell.tokens, room) : [];
    const figure =
      cell.figure !== null && cell.figure.picture.width > room
        ? { ...cell.figure, picture: pictureOf(context, cell.figure.element, room) }
        : cell.figure;
    const pointX = x + width - PAD.x - (grid.afters[cell.column] as number);
    const numeralsEnd = pointX + (grid.digits[cell.column] as number);
    return {
      cell: figure === cell.figure ? cell : { ...cell, figure },
      x,
      width,
      lines,
      align: lines.length > 1 && align === 'point' ? 'right' : align,
      pointX,
      numeralsEnd,
    };
  });
  const width = grid.widths.reduce((a, b) => a + b, 0);
  return { cells, isHead: row.isHead, leading, width, height: heightOf(cells, leading) };
}

const heightOf = (cells: readonly LaidCell[], leading: number): number =>
  Math.max(leading, ...cells.map((c) => (c.cell.figure === null ? c.lines.length * leading : c.cell.figure.picture.height))) + PAD.y * 2;

function rowBox(row: LaidRow, before: number, splitFrom: number, header: Box['header']): Box {
  const tallest = row.cells.reduce((most, c) => Math.max(most, c.lines.length), 0);
  const figures = row.cells.reduce((most, c) => Math.max(most, c.cell.figure?.picture.height ?? 0), 0);
  const least = Math.max(figures, LEAST_LINES * row.leading) + PAD.y * 2;
  return {
    height: row.height,
    before,
    keepNext: row.isHead,
    header: header ?? null,
    ...(row.height > splitFrom ? { least } : {}),
    draw: (pen, x, y) => drawRows(pen, [row], x, y, false),
    split(room) {
      const count = Math.min(Math.floor((room - PAD.y * 2 + 0.01) / row.leading), tallest - LEAST_LINES);
      if (count < LEAST_LINES || least > room + 0.01) return null;
      const part = (from: number, to: number, withFigures: boolean): LaidRow => {
        const cells = row.cells.map((c) => ({
          ...c,
          lines: c.lines.slice(from, to),
          cell: withFigures ? c.cell : { ...c.cell, figure: null },
        }));
        return { ...row, cells, height: heightOf(cells, row.leading) };
      };
      return [rowBox(part(0, count, true), before, splitFrom, header), rowBox(part(count, tallest, false), 0, splitFrom, header)];
    },
  };
}

function drawRows(pen: Pen, rows: readonly LaidRow[], x: number, y: number, artifact: boolean): void {
  let top = y;
  for (const row of rows) {
    for (const cell of row.cells) drawCell(pen, cell, row, x, top, artifact);
    top += row.height;
    pen.rule(x, top, x + row.width, top, row.isHead ? 'ink' : 'rule', row.isHead ? 0.7 : 0.4);
  }
}

function drawCell(pen: Pen, laid: LaidCell, row: LaidRow, x: number, top: number, artifact: boolean): void {
  const { cell, lines } = laid;
  if (cell.figure !== null) {
    const { picture, node } = cell.figure;
    const y = top + (row.height - picture.height) / 2;
    if (node !== null && !artifact) {
      node.box = [x + laid.x + PAD.x, y, x + laid.x + PAD.x + picture.width, y + picture.height];
      picture.draw(pen, node, x + laid.x + PAD.x, y);
    }
    return;
  }
  const drop = row.isHead ? row.height - PAD.y * 2 - lines.length * row.leading : 0;
  lines.forEach((line, i) => {
    pen.line(line, x + leftOf(laid, row, line), top + PAD.y + drop + i * row.leading + row.leading * 0.76, artifact);
  });
}

function leftOf(laid: LaidCell, row: LaidRow, line: Line): number {
  const [least, most] = [laid.x + PAD.x, laid.x + laid.width - PAD.x - line.width];
  if (laid.align === 'left') return least;
  if (laid.align === 'point' && laid.cell.point !== null) return laid.pointX - laid.cell.point.before;
  return row.isHead ? Math.min(most, Math.max(least, laid.numeralsEnd - line.width)) : most;
}
