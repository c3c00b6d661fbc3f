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
import type { Node, Structure } from './tags.ts';

export interface PageLink {
  /** Left, top, right, bottom, y down. */
  readonly box: readonly [number, number, number, number];
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

const n = (value: number): string => String(Math.round(value * 100) / 100);

export class Pen {
  readonly pages: PageDraft[] = [];
  readonly targets = new Map<string, Target>();
  readonly outline: OutlineEntry[] = [];
  readonly #type: Type;
  readonly #structure: Structure;
  readonly #inks: Readonly<Record<string, string>>;
  readonly #tags: boolean;
  readonly #colours = new Map<string, string>();
  /** Pages a number is asked for that has no target: checked at the end. */
  readonly wanted = new Set<string>();

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
    for (const group of groupsOf(line.tokens)) {
      const node = artifact ? null : group.node;
      let content = '';
      const start = at;
      for (const run of runsOf(group.tokens)) {
        if (run.kind === 'words') content += `${this.#show(run.words, at, y)}\n`;
        else if (run.kind === 'mark') {
          const { drawing } = run.token;
          content += `q 1 0 0 1 ${n(at)} ${n(y - drawing.height * 0.88)} cm ${toPdfOperators(drawing, this.#inks)} Q\n`;
        } else {
          if (content !== '') this.marked(node, content);
          content = '';
          this.#pageNumber(node, run.token, at, y);
        }
        at += run.width;
      }
      if (content !== '') this.marked(node, content);
      const link = group.tokens.find((t): t is Word => t.kind === 'word' && t.link !== null);
      if (link !== undefined && !artifact) {
        this.wanted.add(link.link as string);
        this.#draft(this.page).links.push({ box: [start, y - link.size * 0.85, at, y + link.size * 0.3], target: link.link as string, node: group.node });
      }
    }
  }

  /** A page number in the room left for it; known when all pages are. */
  #pageNumber(node: Node | null, { target, like, atRight }: PageNumber, x: number, y: number): void {
    this.wanted.add(target);
    const { page } = this;
    // The digits' glyphs are asked for now, so that the font holds them whatever the number is.
    this.#show([{ ...like, set: this.#type.set('0123456789', like.style) }], x, y);
    this.marked(node, () => {
      const text = String((this.targets.get(target)?.page ?? 0) + 1);
      const set = this.#type.set(text, like.style);
      return this.#show([{ ...like, text, set }], atRight ? x + like.width - (set.width * like.size) / 1000 : x, y, page);
    });
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

  /** Plain text at a baseline, for headers, footers and labels of drawings. */
  text(node: Node | null, text: string, x: number, y: number, size: number, ink: string, bold: boolean, anchor: 'start' | 'middle' | 'end' = 'start', page = this.page): void {
    this.marked(node, this.textOperators(text, x, y, size, ink, bold, anchor, page), page);
  }

  textOperators(text: string, x: number, y: number, size: number, ink: string, bold: boolean, anchor: 'start' | 'middle' | 'end', page = this.page): string {
    const style = { bold, italic: false };
    const set: SetWord = this.#type.set(text, style);
    const width = (set.width * size) / 1000;
    const left = anchor === 'end' ? x - width : anchor === 'middle' ? x - width / 2 : x;
    return this.#show([{ kind: 'word', text, set, width, size, ink, rise: 0, link: null, node: null, style }], left, y, page);
  }

  /** A drawing scaled by `scale` with its upper left corner at x, y. */
  drawing(node: Node | null, drawing: Drawing, x: number, y: number, scale: number): void {
    let content = `q ${n(scale)} 0 0 ${n(scale)} ${n(x)} ${n(y)} cm\n${toPdfOperators(drawing, this.#inks)}\n`;
    for (const shape of drawing.shapes) if (shape.kind === 'text') content += `${this.textOperators(shape.text, shape.x, shape.y, shape.size, shape.fill, shape.bold, shape.anchor)}\n`;
    this.marked(node, `${content}Q`);
  }

  image(node: Node | null, image: PdfImage, x: number, y: number, width: number, height: number): void {
    this.#draft(this.page).images.add(image);
    this.marked(node, `q ${image.matrix(x, y, width, height)} cm /${image.name} Do Q`);
  }
}

/** Neighbouring tokens of one node. */
function groupsOf(tokens: readonly Token[]): { readonly node: Node | null; readonly tokens: Token[] }[] {
  const groups: { node: Node | null; tokens: Token[] }[] = [];
  for (const token of tokens) {
    const last = groups[groups.length - 1];
    if (last !== undefined && last.node === token.node) last.tokens.push(token);
    else groups.push({ node: token.node, tokens: [token] });
  }
  return groups;
}

type Run =
  | { readonly kind: 'words'; readonly words: Word[]; width: number }
  | { readonly kind: 'mark'; readonly token: Extract<Token, { kind: 'mark' }>; readonly width: number }
  | { readonly kind: 'page'; readonly token: Extract<Token, { kind: 'page' }>; readonly width: number };

function runsOf(tokens: readonly Token[]): Run[] {
  const runs: Run[] = [];
  for (const token of tokens) {
    if (token.kind === 'break') continue;
    if (token.kind === 'mark') runs.push({ kind: 'mark', token, width: token.width });
    else if (token.kind === 'page') runs.push({ kind: 'page', token, width: token.width });
    else {
      const word = token.kind === 'space' ? token.word : token;
      const last = runs[runs.length - 1];
      if (last?.kind === 'words') {
        last.words.push(word);
        last.width += word.width;
      } else runs.push({ kind: 'words', words: [word], width: word.width });
    }
  }
  return runs;
}
