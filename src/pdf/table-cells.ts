/** Cells of a table. In: the rows of a table element. Out: their tokens, figures, tags, and where their numerals have the decimal point. */
import { altOf, type BlockContext, type Picture, pictureOf } from './block.ts';
import type { Kind } from './columns.ts';
import { type Token, tokensOf } from './inline.ts';
import type { Element } from './markup.ts';
import { STYLES } from './sheet.ts';
import type { Node } from './tags.ts';

/** A figure in a cell is at most this wide, and as narrow as its column, points. */
const WIDEST_FIGURE = 200;

/** Widths of a cell that begins with a number: before the decimal point, the digits after it, all after it. */
export interface Point {
  readonly before: number;
  readonly digits: number;
  readonly after: number;
}

export interface Cell {
  readonly tokens: readonly Token[];
  readonly node: Node | null;
  readonly column: number;
  readonly span: number;
  readonly figure: { readonly element: Element; readonly picture: Picture; readonly node: Node | null } | null;
  readonly point: Point | null;
  readonly isHead: boolean;
}

export interface Row {
  readonly cells: readonly Cell[];
  readonly isHead: boolean;
  readonly anchor: string | null;
}

export const elements = (parent: Element, tag: string): Element[] =>
  parent.children.filter((c): c is Element => typeof c !== 'string' && c.tag === tag);

export function rowsOf(context: BlockContext, part: Element, parent: Node, kinds: readonly Kind[], isHead: boolean): Row[] {
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
  const node = context.structure.node(isTh ? 'TH' : 'TD', row, {
    ...(isTh ? { scope: cell.attributes['scope'] === 'row' ? ('Row' as const) : ('Column' as const) } : {}),
    colspan: span,
  });
  const figure = cell.children.find((c): c is Element => typeof c !== 'string' && c.tag === 'figure');
  if (figure !== undefined) {
    const figureNode = context.structure.node('Figure', node, { alt: altOf(context, figure) });
    return {
      tokens: [],
      node,
      column,
      span,
      figure: { element: figure, picture: pictureOf(context, figure, WIDEST_FIGURE), node: figureNode },
      point: null,
      isHead,
    };
  }
  const style = isHead ? STYLES.th : isTh ? { ...STYLES.td, bold: true } : STYLES.td;
  const tokens = tokensOf(context, cell.children, style, node);
  return {
    tokens,
    node,
    column,
    span,
    figure: null,
    point: kind === 'number' && !isHead && span === 1 ? decimalParts(context, tokens) : null,
    isHead,
  };
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
