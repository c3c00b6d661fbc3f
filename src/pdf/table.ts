/**
 * Tables. In: a table element. Out: a box a row: columns sized to their contents, numerals aligned on the decimal point,
 * the header repeated on each page, tall rows split. Never: a cell cut off.
 */
import { altOf, type BlockContext, type Box, type Picture, pictureOf } from './block.ts';
import { columnWidths, type Kind, type Need } from './columns.ts';
import { type Line, linesOf, measure, type Token, tokensOf } from './inline.ts';
import type { Element } from './markup.ts';
import type { Pen } from './pen.ts';
import { STYLES } from './sheet.ts';
import type { Node } from './tags.ts';

const PAD = { x: 4, y: 2.6 } as const;
/** A figure in a cell is at most this wide, and as narrow as its column, points. */
const WIDEST_FIGURE = 200;
/** A row taller than this share of the page is split where the page ends; shorter ones move on whole. */
const SPLIT_FROM = 0.5;
/** No part of a split row is shorter, in lines. */
const LEAST_LINES = 2;

/** Widths of a cell that begins with a number: before the decimal point, the digits after it, all after it. */
interface Point {
  readonly before: number;
  readonly digits: number;
  readonly after: number;
}

interface Cell {
  readonly tokens: readonly Token[];
  readonly node: Node | null;
  readonly column: number;
  readonly span: number;
  readonly figure: { readonly element: Element; readonly picture: Picture; readonly node: Node | null } | null;
  readonly point: Point | null;
  readonly isHead: boolean;
}

interface Row {
  readonly cells: readonly Cell[];
  readonly isHead: boolean;
  readonly anchor: string | null;
}

interface Grid {
  readonly kinds: readonly Kind[];
  readonly widths: readonly number[];
  readonly lefts: readonly number[];
  /** Widest part before the decimal point by column. */
  readonly points: readonly number[];
  readonly afters: readonly number[];
  readonly digits: readonly number[];
}

const elements = (parent: Element, tag: string): Element[] => parent.children.filter((c): c is Element => typeof c !== 'string' && c.tag === tag);

export function tableBoxes(context: BlockContext, table: Element, parent: Node): Box[] {
  const kinds = elements(table, 'col').map((c) => (c.attributes['class'] ?? 'text') as Kind);
  const node = context.structure.node('Table', parent);
  const head = elements(table, 'thead').flatMap((part) => rowsOf(context, part, context.structure.node('THead', node), kinds, true));
  const body = elements(table, 'tbody').flatMap((part) => rowsOf(context, part, context.structure.node('TBody', node), kinds, false));
  const columns = [...head, ...body].reduce((most, r) => Math.max(most, r.cells.reduce((sum, c) => sum + c.span, 0)), kinds.length);
  const all = Array.from({ length: columns }, (_, i) => kinds[i] ?? 'text');
  const grid = gridOf(context, all, [...head, ...body]);
  const headRows = head.map((row) => laidRow(context, grid, row));
  const splitFrom = context.pageHeight * SPLIT_FROM;
  const headHeight = headRows.reduce((sum, r) => sum + r.height, 0);
  const repeat = headRows.length === 0 ? null : { height: headHeight, draw: (pen: Pen, x: number, y: number) => drawRows(pen, headRows, x, y, true) };
  const boxes: Box[] = headRows.map((row, i) => rowBox(row, i === 0 ? 8 : 0, splitFrom, null));
  body.forEach((row, i) => {
    const box = rowBox(laidRow(context, grid, row), boxes.length === 0 ? 8 : 0, splitFrom, repeat);
    box.anchor = row.anchor;
    box.keepNext = body.length > 1 && i === body.length - 2;
    boxes.push(box);
  });
  return boxes;
}

function rowsOf(context: BlockContext, part: Element, parent: Node, kinds: readonly Kind[], isHead: boolean): Row[] {
  return elements(part, 'tr').map((row) => {
    const rowNode = context.structure.node('TR', parent);
    let column = 0;
    const cells = row.children.flatMap((cell) => {
      if (typeof cell === 'string') return [];
      const made = cellOf(context, cell, rowNode, column, kinds[column] ?? 'text', isHead);
      column += made.span;
      return [made];
    });
    return { cells, isHead, anchor: row.attributes['id'] ?? null };
  });
}

function cellOf(context: BlockContext, cell: Element, row: Node, column: number, kind: Kind, isHead: boolean): Cell {
  const span = Number(cell.attributes['colspan'] ?? 1);
  const isTh = cell.tag === 'th';
  const node = context.structure.node(isTh ? 'TH' : 'TD', row, { ...(isTh ? { scope: cell.attributes['scope'] === 'row' ? ('Row' as const) : ('Column' as const) } : {}), colspan: span });
  const figure = cell.children.find((c): c is Element => typeof c !== 'string' && c.tag === 'figure');
  if (figure !== undefined) {
    const figureNode = context.structure.node('Figure', node, { alt: altOf(context, figure) });
    return { tokens: [], node, column, span, figure: { element: figure, picture: pictureOf(context, figure, WIDEST_FIGURE), node: figureNode }, point: null, isHead };
  }
  const style = isHead ? STYLES.th : isTh ? { ...STYLES.td, bold: true } : STYLES.td;
  const tokens = tokensOf(context, cell.children, style, node);
  return { tokens, node, column, span, figure: null, point: kind === 'number' && !isHead && span === 1 ? decimalParts(context, tokens) : null, isHead };
}

/** Signs before a number and its digits before the decimal point, thousands apart by a narrow or no-break blank. */
const WHOLE = /^[<>≤≥±≈]?[\u00a0\u202f]?[+±\u2212-]?(?:\d+(?:[\u00a0\u202f]\d{3}(?!\d))*)?(?=$|\D)/;
const IS_NUMBER = /^[<>≤≥±≈]?[\u00a0\u202f]?[+±\u2212-]?[.,]?\d/;
const IS_SIGN = /^[<>≤≥±≈+\u2212-]$/;

/** Where the decimal point of a cell that begins with a number lies: the width up to it and from it on. */
function decimalParts(context: BlockContext, tokens: readonly Token[]): Point | null {
  if (tokens.some((t) => t.kind === 'break')) return null;
  const width = tokens.reduce((sum, t) => sum + t.width, 0);
  let before = 0;
  for (const token of tokens) {
    if (token.kind === 'word' && IS_NUMBER.test(token.text)) {
      const whole = WHOLE.exec(token.text)?.[0] ?? '';
      const digits = /^[.,]\d+/.exec(token.text.slice(whole.length))?.[0] ?? '';
      const points = (text: string): number => (context.type.set(text, token.style).width * token.size) / 1000;
      before += points(whole);
      return { before, digits: points(digits), after: width - before };
    }
    if (token.kind !== 'space' && !(token.kind === 'word' && IS_SIGN.test(token.text))) return null;
    before += token.width;
  }
  return null;
}

function gridOf(context: BlockContext, kinds: readonly Kind[], rows: readonly Row[]): Grid {
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
    const figure = cell.figure !== null && cell.figure.picture.width > room ? { ...cell.figure, picture: pictureOf(context, cell.figure.element, room) } : cell.figure;
    const pointX = x + width - PAD.x - (grid.afters[cell.column] as number);
    const numeralsEnd = pointX + (grid.digits[cell.column] as number);
    return { cell: figure === cell.figure ? cell : { ...cell, figure }, x, width, lines, align: lines.length > 1 && align === 'point' ? 'right' : align, pointX, numeralsEnd };
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
        const cells = row.cells.map((c) => ({ ...c, lines: c.lines.slice(from, to), cell: withFigures ? c.cell : { ...c.cell, figure: null } }));
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
