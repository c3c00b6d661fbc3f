/**
 * Drawing on pages that are still being made. In: lines, rules, drawings at places (points, y down). Out: operators by
 * page, with what is not known yet (page numbers) left open. Never: content without a tag or an artifact mark.
 */
import type { Drawing } from '../chart/drawing.ts';
import { toPdfOperators } from '../chart/operators.ts';
import type { EmbeddedFont } from './document.ts';
import type { SetWord, Type } from './face.ts';
import type { PdfImage } from './image.ts';
import type { Line, PageNumber, Token, Word } from './inline.ts';
import { groupsOf, type Run, runsOf } from './runs.ts';
import type { Node, Structure } from './tags.ts';

export interface PageLink {
  /** Left, top, right, bottom, y down; known when all page numbers are. */
  box(): readonly [number, number, number, number];
  readonly target: string;
  readonly node: Node | null;
}

export interface PageDraft {
  readonly pieces: (string | (() => string))[];
  readonly fonts: Set<EmbeddedFont>;
  readonly images: Set<PdfImage>;
  readonly links: PageLink[];
}

export interface Target {
  readonly page: number;
  readonly y: number;
}

export interface OutlineEntry {
  readonly level: 1 | 2 | 3;
  readonly title: string;
  readonly page: number;
  readonly y: number;
}

const n = (value: number): string => {
  if (!Number.isFinite(value)) throw new Error('A place on the page is not a number.');
  return String(Math.round(value * 100) / 100);
};

/** By how much words stand aside because page numbers before them in the line are wider or narrower than their room. */
type Shift = () => number;

export class Pen {
  readonly pages: PageDraft[] = [];
  readonly targets = new Map<string, Target>();
  readonly outline: OutlineEntry[] = [];
  readonly #type: Type;
  readonly #structure: Structure;
  readonly #inks: Readonly<Record<string, string>>;
  readonly #tags: boolean;
  readonly #colours = new Map<string, string>();
  /** Template that asked for each target: checked at the end. */
  readonly wanted = new Map<string, string>();
  /** Name of the template that is being laid out. */
  template = '';
  readonly #marks = new WeakMap<Drawing, string>();

  constructor(type: Type, structure: Structure, inks: Readonly<Record<string, string>>, tags: boolean) {
    this.#type = type;
    this.#structure = structure;
    this.#inks = inks;
    this.#tags = tags;
  }

  get page(): number {
    return this.pages.length - 1;
  }

  newPage(): void {
    const last = this.pages[this.page];
    if (last !== undefined) joinPieces(last.pieces);
    this.pages.push({ pieces: [], fonts: new Set(), images: new Set(), links: [] });
  }

  #draft(page: number): PageDraft {
    return this.pages[page] as PageDraft;
  }

  /** Content under a node's mark, or as an artifact where there is none. */
  marked(node: Node | null, content: string | (() => string), page = this.page): void {
    const { pieces } = this.#draft(page);
    if (!this.#tags) {
      pieces.push(content);
      return;
    }
    pieces.push(node === null ? '/Artifact BMC' : this.#structure.begin(node, page), content, 'EMC');
  }

  colour(ink: string, operator: 'rg' | 'RG'): string {
    const key = `${ink}${operator}`;
    const kept = this.#colours.get(key);
    if (kept !== undefined) return kept;
    const hex = this.#inks[ink] ?? '#000000';
    const parts = [1, 3, 5].map((i) => n(Number.parseInt(hex.slice(i, i + 2), 16) / 255));
    const text = `${parts.join(' ')} ${operator}`;
    this.#colours.set(key, text);
    return text;
  }

  rule(x1: number, y1: number, x2: number, y2: number, ink: string, width: number): void {
    this.marked(null, `${this.colour(ink, 'RG')} ${n(width)} w ${n(x1)} ${n(y1)} m ${n(x2)} ${n(y2)} l S`);
  }

  /** A line of tokens with its baseline at y. */
  line(line: Line, x: number, y: number, artifact = false): void {
    let at = x;
    let shift: Shift | null = null;
    for (const group of groupsOf(line.tokens)) {
      const node = artifact ? null : group.node;
      const start = at;
      const startShift: Shift | null = shift;
      let content = '';
      const flush = (): void => {
        if (content !== '') this.marked(node, content);
        content = '';
      };
      for (const run of runsOf(group.tokens)) {
        if (run.kind === 'page') {
          flush();
          shift = this.#pageNumber(node, run.token, at, y, shift);
        } else if (shift === null) content += this.#run(run, at, y, this.page);
        else this.#shifted(node, run, at, y, shift);
        at += run.width;
      }
      flush();
      if (!artifact) this.#link(group, y, start, startShift, at, shift);
    }
  }

  #run(run: Exclude<Run, { kind: 'page' }>, x: number, y: number, page: number): string {
    if (run.kind === 'words') return `${this.#show(run.words, x, y, page)}\n`;
    const { drawing } = run.token;
    const operators = this.#marks.get(drawing) ?? toPdfOperators(drawing, this.#inks);
    this.#marks.set(drawing, operators);
    return `q 1 0 0 1 ${n(x)} ${n(y - drawing.height * 0.88)} cm ${operators} Q\n`;
  }

  /** What follows a page number in its line is placed when the number is known; its fonts are asked for now. */
  #shifted(node: Node | null, run: Exclude<Run, { kind: 'page' }>, x: number, y: number, shift: Shift): void {
    const { page } = this;
    this.#run(run, x, y, page);
    this.marked(node, () => this.#run(run, x + shift(), y, page));
  }

  #link(
    group: { readonly node: Node | null; readonly tokens: readonly Token[] },
    y: number,
    left: number,
    leftShift: Shift | null,
    right: number,
    rightShift: Shift | null,
  ): void {
    const word = group.tokens.find((t): t is Word => t.kind === 'word' && t.link !== null);
    if (word === undefined) return;
    const target = word.link as string;
    this.#want(target);
    const [top, bottom] = [y - word.size * 0.85, y + word.size * 0.3];
    this.#draft(this.page).links.push({
      box: () => [left + (leftShift?.() ?? 0), top, right + (rightShift?.() ?? 0), bottom],
      target,
      node: group.node,
    });
  }

  #want(target: string): void {
    if (!this.wanted.has(target)) this.wanted.set(target, this.template);
  }

  /** A page number in the room left for it; known when all pages are. */
  #pageNumber(node: Node | null, { target, like, atRight }: PageNumber, x: number, y: number, before: Shift | null): Shift {
    this.#want(target);
    const { page } = this;
    // The digits' glyphs are asked for now, so that the font holds them whatever the number is.
    this.#show([{ ...like, set: this.#type.set('0123456789', like.style) }], x, y);
    const set = (): SetWord => this.#type.set(String((this.targets.get(target)?.page ?? 0) + 1), like.style);
    const lack = (): number => (set().width * like.size) / 1000 - like.width;
    this.marked(node, () => this.#show([{ ...like, set: set() }], x + (before?.() ?? 0) - (atRight ? lack() : 0), y, page));
    return () => (before?.() ?? 0) + (atRight ? 0 : lack());
  }

  /** Words of one line, grouped by font. */
  #show(words: readonly Word[], x: number, y: number, page = this.page): string {
    const { fonts } = this.#draft(page);
    let content = 'BT';
    let at = x;
    let last = '';
    for (const word of words) {
      const head = `${this.colour(word.ink, 'rg')} 1 0 0 -1 ${n(at)} ${n(y - word.rise)} Tm`;
      let pieceAt = at;
      for (const piece of word.set.pieces) {
        fonts.add(piece.font);
        const face = `/${piece.font.id} ${n(word.size)} Tf`;
        const key = `${face}${word.ink}${word.rise}`;
        if (key === last && content.endsWith('] TJ')) content = `${content.slice(0, -4)}${piece.show}] TJ`;
        else content += ` ${pieceAt === at ? head : `1 0 0 -1 ${n(pieceAt)} ${n(y - word.rise)} Tm`} ${face} [${piece.show}] TJ`;
        last = key;
        pieceAt += (piece.width * word.size) / 1000;
      }
      at += (word.set.width * word.size) / 1000;
    }
    return `${content} ET`;
  }

  /** A text cut to a width, with the sign of omission. */
  fitted(text: string, size: number, width: number): string {
    const isFit = (t: string): boolean => this.#type.width(t, { bold: false, italic: false }, size) <= width;
    if (isFit(text)) return text;
    const characters = [...text];
    while (characters.length > 0 && !isFit(`${characters.join('').trimEnd()}…`)) characters.pop();
    return `${characters.join('').trimEnd()}…`;
  }

  /** Plain text at a baseline, for headers, footers and labels of drawings. */
  text(
    node: Node | null,
    text: string,
    x: number,
    y: number,
    size: number,
    ink: string,
    bold: boolean,
    anchor: 'start' | 'middle' | 'end' = 'start',
    page = this.page,
  ): void {
    this.marked(node, this.textOperators(text, x, y, size, ink, bold, anchor, page), page);
  }

  textOperators(
    text: string,
    x: number,
    y: number,
    size: number,
    ink: string,
    bold: boolean,
    anchor: 'start' | 'middle' | 'end',
    page = this.page,
  ): string {
    const style = { bold, italic: false };
    const set: SetWord = this.#type.set(text, style);
    const width = (set.width * size) / 1000;
    const left = anchor === 'end' ? x - width : anchor === 'middle' ? x - width / 2 : x;
    return this.#show([{ kind: 'word', text, set, width, size, ink, rise: 0, link: null, node: null, style }], left, y, page);
  }

  /** A drawing scaled by `scale` with its upper left corner at x, y. */
  drawing(node: Node | null, drawing: Drawing, x: number, y: number, scale: number): void {
    let content = `q ${n(scale)} 0 0 ${n(scale)} ${n(x)} ${n(y)} cm\n${toPdfOperators(drawing, this.#inks)}\n`;
    for (const shape of drawing.shapes)
      if (shape.kind === 'text')
        content += `${this.textOperators(shape.text, shape.x, shape.y, shape.size, shape.fill, shape.bold, shape.anchor)}\n`;
    this.marked(node, `${content}Q`);
  }

  image(node: Node | null, image: PdfImage, x: number, y: number, width: number, height: number): void {
    this.#draft(this.page).images.add(image);
    this.marked(node, `q ${image.matrix(x, y, width, height)} cm /${image.name} Do Q`);
  }
}

/** Texts of a finished page in one flat string, which takes a fraction of the room; what is not known yet stays apart. */
function joinPieces(pieces: (string | (() => string))[]): void {
  const joined: typeof pieces = [];
  let texts: string[] = [];
  const flush = (): void => {
    if (texts.length > 0) joined.push(texts.join('\n'));
    texts = [];
  };
  for (const piece of pieces) {
    if (typeof piece === 'string') texts.push(piece);
    else {
      flush();
      joined.push(piece);
    }
  }
  flush();
  pieces.splice(0, pieces.length, ...joined);
}
