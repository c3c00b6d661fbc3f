/**
 * Inline markup to lines. In: children of a block. Out: tokens, then lines of a width. Never: a word cut off; one that is
 * wider than the line is broken.
 */
import { zoneMark } from '../chart/zone-mark.ts';
import type { Drawing } from '../chart/drawing.ts';
import type { SetWord, Type } from './face.ts';
import type { Element } from './markup.ts';
import type { TextStyle } from './sheet.ts';
import type { Node, Structure } from './tags.ts';

interface Placed {
  readonly width: number;
  readonly node: Node | null;
}

export interface Word extends Placed {
  readonly kind: 'word';
  readonly text: string;
  readonly set: SetWord;
  readonly size: number;
  readonly ink: string;
  readonly rise: number;
  readonly link: string | null;
  readonly style: { readonly bold: boolean; readonly italic: boolean };
}
export interface Space extends Placed {
  readonly kind: 'space';
  readonly word: Word;
}
export interface Mark extends Placed {
  readonly kind: 'mark';
  readonly drawing: Drawing;
}
export interface PageNumber extends Placed {
  readonly kind: 'page';
  readonly target: string;
  readonly like: Word;
  /** Alone in a cell of a table the number stands at the right of its room. */
  readonly atRight: boolean;
}
export type Token = Word | Space | Mark | PageNumber | { readonly kind: 'break'; readonly width: 0; readonly node: null };

export interface Line {
  readonly tokens: readonly Token[];
  readonly width: number;
}

export interface InlineContext {
  readonly type: Type;
  readonly structure: Structure;
  readonly tagged: boolean;
}

interface Current extends TextStyle {
  readonly rise: number;
  readonly link: string | null;
  readonly node: Node | null;
}

/** Tokens of a block's children; `node` null draws them as an artifact. */
export function tokensOf(context: InlineContext, children: Element['children'], base: TextStyle, node: Node | null): Token[] {
  const tokens: Token[] = [];
  collect(context, children, { ...base, rise: 0, link: null, node }, tokens);
  const [page] = tokens;
  if (tokens.length === 1 && page?.kind === 'page' && node?.role === 'TD') return [{ ...page, atRight: true }];
  return tokens;
}

function collect(context: InlineContext, children: Element['children'], now: Current, tokens: Token[]): void {
  for (const child of children) {
    if (typeof child === 'string') addText(context, child, now, tokens);
    else if (child.tag === 'br') tokens.push({ kind: 'break', width: 0, node: null });
    else if (child.tag === 'strong') collect(context, child.children, { ...now, bold: true }, tokens);
    else if (child.tag === 'em') collect(context, child.children, { ...now, italic: true }, tokens);
    else if (child.tag === 'sup') collect(context, child.children, { ...now, size: now.size * 0.7, rise: now.size * 0.33 }, tokens);
    else if (child.tag === 'sub') collect(context, child.children, { ...now, size: now.size * 0.7, rise: -now.size * 0.12 }, tokens);
    else if (child.tag === 'a') addLink(context, child, now, tokens);
    else if (child.tag === 'span') addSpan(context, child, now, tokens);
    else if (child.tag === 'p') {
      if (tokens.length > 0) tokens.push({ kind: 'break', width: 0, node: null });
      collect(context, child.children, now, tokens);
    }
  }
}

function addLink(context: InlineContext, element: Element, now: Current, tokens: Token[]): void {
  const node = now.node === null ? null : context.structure.node('Link', now.node, { alt: plainText(element) });
  collect(context, element.children, { ...now, ink: 'teal', link: (element.attributes['href'] ?? '#').slice(1), node }, tokens);
}

function addSpan(context: InlineContext, element: Element, now: Current, tokens: Token[]): void {
  const { 'data-mark': mark, 'data-page': target } = element.attributes;
  if (mark !== undefined) {
    const drawing = markOf(mark, now.size * 0.86);
    tokens.push({ kind: 'mark', drawing, width: drawing.width + 2.2, node: now.node });
  } else if (target !== undefined) {
    const like = wordOf(context, '000', now);
    tokens.push({ kind: 'page', target, like, width: like.width, node: now.node, atRight: false });
  }
  collect(context, element.children, now, tokens);
}

/** Marks are few and drawn often: one drawing each. */
const marks = new Map<string, Drawing>();

function markOf(condition: string, size: number): Drawing {
  const key = `${condition} ${size}`;
  const kept = marks.get(key) ?? zoneMark(condition, size);
  marks.set(key, kept);
  return kept;
}

export function plainText(element: Element): string {
  return element.children
    .map((c) => (typeof c === 'string' ? c : plainText(c)))
    .join('')
    .replace(/[ \t\r\n\f]+/g, ' ')
    .trim();
}

function wordOf(context: InlineContext, text: string, now: Current): Word {
  const set = context.type.set(text, now);
  return {
    kind: 'word',
    text,
    set,
    width: (set.width * now.size) / 1000,
    size: now.size,
    ink: now.ink,
    rise: now.rise,
    link: now.link,
    node: now.node,
    style: { bold: now.bold, italic: now.italic },
  };
}

/** Blanks collapse, but for the no-break blank, which belongs to its word. */
function addText(context: InlineContext, text: string, now: Current, tokens: Token[]): void {
  if (!/[ \t\r\n\f]/.test(text)) {
    if (text !== '') tokens.push(wordOf(context, text, now));
    return;
  }
  for (const part of text.split(/([ \t\r\n\f]+)/)) {
    if (part === '') continue;
    if (!/^[ \t\r\n\f]/.test(part)) tokens.push(wordOf(context, part, now));
    else if (tokens.length > 0 && tokens[tokens.length - 1]?.kind !== 'space') {
      const word = wordOf(context, ' ', now);
      tokens.push({ kind: 'space', word, width: word.width, node: now.node });
    }
  }
}

/** Tokens that stand together without a blank between. */
function chunksOf(tokens: readonly Token[]): { readonly space: Space | null; readonly tokens: Token[]; readonly breakBefore: boolean }[] {
  const chunks: { space: Space | null; tokens: Token[]; breakBefore: boolean }[] = [];
  let open = { space: null as Space | null, tokens: [] as Token[], breakBefore: false };
  const push = (): void => {
    if (open.tokens.length > 0 || open.breakBefore) chunks.push(open);
  };
  for (const token of tokens) {
    if (token.kind === 'space') {
      push();
      open = { space: token, tokens: [], breakBefore: false };
    } else if (token.kind === 'break') {
      push();
      open = { space: null, tokens: [], breakBefore: true };
    } else open.tokens.push(token);
  }
  push();
  return chunks;
}

const widthOf = (tokens: readonly Token[]): number => tokens.reduce((sum, t) => sum + t.width, 0);

/** Widest chunk, and width on one line: what a table column needs at least, and would like. */
export function measure(tokens: readonly Token[]): { readonly least: number; readonly natural: number } {
  let least = 0;
  let natural = 0;
  let line = 0;
  for (const chunk of chunksOf(tokens)) {
    const width = widthOf(chunk.tokens);
    least = Math.max(least, width);
    if (chunk.breakBefore) line = 0;
    line += (line > 0 ? (chunk.space?.width ?? 0) : 0) + width;
    natural = Math.max(natural, line);
  }
  return { least, natural };
}

/** Lines of at most `width`; a chunk wider than that is broken inside its words. */
export function linesOf(context: InlineContext, tokens: readonly Token[], width: number): Line[] {
  const lines: Line[] = [];
  let line: Token[] = [];
  let used = 0;
  const flush = (): void => {
    lines.push({ tokens: inVisualOrder(line), width: used });
    line = [];
    used = 0;
  };
  chunksOf(tokens).forEach((chunk, i) => {
    if (chunk.breakBefore && i > 0) flush();
    const own = widthOf(chunk.tokens);
    const space = line.length > 0 && chunk.space !== null ? chunk.space.width : 0;
    if (line.length > 0 && used + space + own > width + 0.01) flush();
    else if (space > 0) {
      line.push(chunk.space as Space);
      used += space;
    }
    if (own <= width + 0.01) {
      line.push(...chunk.tokens);
      used += own;
      return;
    }
    for (const token of chunk.tokens) {
      for (const piece of token.kind === 'word' ? brokenWord(context, token, width, width - used) : [token]) {
        if (line.length > 0 && used + piece.width > width + 0.01) flush();
        line.push(piece);
        used += piece.width;
      }
    }
  });
  if (line.length > 0 || lines.length === 0) flush();
  return lines;
}

/** A word in pieces that each fit: after a hyphen, slash or dot where there is one, else wherever it must be. */
function brokenWord(context: InlineContext, word: Word, width: number, first: number): Word[] {
  if (word.width <= first) return [word];
  const pieces: Word[] = [];
  let rest = [...word.text];
  let room = first < width * 0.3 ? width : first;
  const set = (text: string): Word => {
    const laid = context.type.set(text, word.style);
    return { ...word, text, set: laid, width: (laid.width * word.size) / 1000 };
  };
  while (rest.length > 0) {
    let count = 1;
    while (count < rest.length && set(rest.slice(0, count + 1).join('')).width <= room) count += 1;
    if (count < rest.length) {
      for (let back = count; back > count / 2; back -= 1) {
        if ('-/._'.includes(rest[back - 1] as string)) {
          count = back;
          break;
        }
      }
    }
    pieces.push(set(rest.slice(0, count).join('')));
    rest = rest.slice(count);
    room = width;
  }
  return pieces;
}

const isNumber = (text: string): boolean => /^[+\u2212-]?[\d\u0660-\u0669\u06f0-\u06f9][\d\u0660-\u0669\u06f0-\u06f9.,:%]*$/.test(text);
const isSigns = (text: string): boolean => !/[\p{L}\p{N}]/u.test(text);

/** Neighbouring right-to-left words of a line stand in reverse order, with the blanks, signs and numbers between and numbers after them. */
function inVisualOrder(tokens: readonly Token[]): Token[] {
  if (!tokens.some((t) => t.kind === 'word' && t.set.rightToLeft)) return [...tokens];
  const ordered: Token[] = [];
  let run: Token[] = [];
  const isRtl = (t: Token): boolean => t.kind === 'word' && t.set.rightToLeft;
  const ends = (t: Token): boolean => t.kind === 'word' && (t.set.rightToLeft || isNumber(t.text));
  const goesOn = (t: Token): boolean => t.kind === 'space' || (t.kind === 'word' && (isNumber(t.text) || isSigns(t.text)));
  const flush = (): void => {
    const tail: Token[] = [];
    while (run.length > 0 && !ends(run[run.length - 1] as Token)) tail.unshift(run.pop() as Token);
    ordered.push(...run.reverse(), ...tail);
    run = [];
  };
  for (const token of tokens) {
    if (isRtl(token) || (run.length > 0 && goesOn(token))) run.push(token);
    else {
      flush();
      ordered.push(token);
    }
  }
  flush();
  return ordered;
}
