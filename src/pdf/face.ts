/**
 * Type. In: text of one style. Out: glyph codes and widths, from the text face or, character by character, the fallback.
 * Never: a missing glyph in silence; what neither face has is printed as its code point.
 */
import { create, type Font } from 'fontkit';
import type { FontFiles } from '../page/assets.ts';
import type { EmbeddedFont, PackedDocument } from './document.ts';

export interface Style {
  readonly bold: boolean;
  readonly italic: boolean;
}

/** Glyphs of one face, ready for a TJ operator. */
export interface Piece {
  readonly font: EmbeddedFont;
  readonly show: string;
  /** Thousandths of the size. */
  readonly width: number;
}

/** A word set: pieces in visual order. */
export interface SetWord {
  readonly pieces: readonly Piece[];
  /** Thousandths of the size. */
  readonly width: number;
  readonly rightToLeft: boolean;
}

interface Face {
  readonly parsed: Font;
  readonly embedded: EmbeddedFont;
}

/** Hebrew, Arabic and their kin; the digits of Arabic run left to right. */
const RTL = '\\u0590-\\u065f\\u066a-\\u06ef\\u06fa-\\u08ff\\ufb1d-\\ufdff\\ufe70-\\ufefc';
const RIGHT_TO_LEFT = new RegExp(`[${RTL}]`);
/** Runs of a right-to-left word: its letters; words and numbers of the other direction; single signs. */
const RUNS = new RegExp(`[${RTL}\\u200c\\u200d]+|(?![${RTL}])[\\p{L}\\p{N}](?:(?![${RTL}])[\\p{L}\\p{M}\\p{N}.,:])*(?<![.,:])|.`, 'gsu');
const MIRRORED: Readonly<Record<string, string>> = {
  '(': ')',
  ')': '(',
  '[': ']',
  ']': '[',
  '{': '}',
  '}': '{',
  '<': '>',
  '>': '<',
  '«': '»',
  '»': '«',
};
/** Characters without a form of their own (soft hyphen, zero-width and direction marks, variation selectors): not printed, so they cannot turn a text round. */
const UNSEEN_RANGES = [
  '\\u00ad',
  '\\u034f',
  '\\u061c',
  '\\u180b-\\u180f',
  '\\u200b',
  '\\u200e\\u200f',
  '\\u202a-\\u202e',
  '\\u2060-\\u206f',
  '\\ufe00-\\ufe0f',
  '\\ufeff',
];
const UNSEEN = new RegExp(`[${UNSEEN_RANGES.join('')}]|(?:\\udb40[\\udc00-\\uddef])`, 'g');
const JOINERS = /[\u200c\u200d]/g;

/** Visual order of a right-to-left word; brackets mirrored. A simple form of Unicode's rules: no nested directions, no marks of direction. */
const inVisualRuns = (text: string): string[] => (text.match(RUNS) ?? []).reverse().map((run) => MIRRORED[run] ?? run);

export class Type {
  readonly #faces: readonly Face[];
  readonly #words: Map<string, SetWord>[] = [new Map(), new Map(), new Map(), new Map()];

  constructor(document: PackedDocument, files: FontFiles) {
    const order = [files.regular, files.bold, files.italic, files.boldItalic, files.fallback, files.fallbackBold];
    this.#faces = order.map((bytes) => {
      const parsed = parsedFont(bytes);
      return { parsed, embedded: document.embedFont(parsed) };
    });
  }

  set(text: string, style: Style): SetWord {
    const index = (style.bold ? 1 : 0) + (style.italic ? 2 : 0);
    const kept = this.#words[index]?.get(text);
    if (kept !== undefined) return kept;
    const word = this.#word(text.replace(UNSEEN, ''), index, style.bold);
    this.#words[index]?.set(text, word);
    return word;
  }

  /** Width in points at a size. */
  width(text: string, style: Style, size: number): number {
    return (this.set(text, style).width * size) / 1000;
  }

  #word(text: string, index: number, bold: boolean): SetWord {
    const rightToLeft = RIGHT_TO_LEFT.test(text);
    const pieces = rightToLeft
      ? inVisualRuns(text).flatMap((run) => this.#pieces(run, index, bold))
      : this.#pieces(text.replace(JOINERS, ''), index, bold);
    let width = 0;
    for (const p of pieces) width += p.width;
    return { pieces, width, rightToLeft };
  }

  #pieces(text: string, index: number, bold: boolean): Piece[] {
    const pieces: Piece[] = [];
    let run = '';
    let face = this.#faces[index] as Face;
    const flush = (): void => {
      if (run !== '') pieces.push(piece(face.embedded, run));
      run = '';
    };
    for (const character of text) {
      const found = this.#faceOf(character, index, bold);
      if (found === null) {
        flush();
        face = this.#faces[index] as Face;
        run = `[U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}]`;
        flush();
        continue;
      }
      if (found !== face) flush();
      face = found;
      run += character;
    }
    flush();
    return pieces;
  }

  #faceOf(character: string, index: number, bold: boolean): Face | null {
    const code = character.codePointAt(0) ?? 0;
    if (code < 32 || code === 127) return null;
    const main = this.#faces[index] as Face;
    if (main.parsed.hasGlyphForCodePoint(code)) return main;
    const fallback = this.#faces[bold ? 5 : 4] as Face;
    return fallback.parsed.hasGlyphForCodePoint(code) ? fallback : null;
  }
}

/** Hex codes with kerning for TJ, and their width. */
function piece(font: EmbeddedFont, text: string): Piece {
  return isPlain(text) ? plainPiece(font, text) : shapedPiece(font, text);
}

function shapedPiece(font: EmbeddedFont, text: string): Piece {
  const [codes, positions] = font.encode(text);
  let show = '<';
  let width = 0;
  codes.forEach((code, i) => {
    show += code;
    const { xAdvance, advanceWidth } = positions[i] as { xAdvance: number; advanceWidth: number };
    width += xAdvance;
    const kern = Math.round(advanceWidth - xAdvance);
    if (kern !== 0 && i < codes.length - 1) show += `> ${kern} <`;
  });
  return { font, show: `${show}>`, width };
}

/**
 * Numbers, and what has a digit in it (ids, dates, file names with lines), mostly stands once in a report: shaping each for its
 * kerning would be half of the whole time. Tabular figures have none.
 */
const isPlain = (text: string): boolean => /^[\x20-\x7e\u2011\u2212\u00a0\u202f]*$/.test(text) && /\d|^[^A-Za-z]*$/.test(text);

interface PlainGlyph {
  readonly code: string;
  readonly width: number;
}

const plainGlyphs = new WeakMap<EmbeddedFont, Map<string, PlainGlyph>>();

/** Glyph by glyph, each encoded once a font. */
function plainPiece(font: EmbeddedFont, text: string): Piece {
  let kept = plainGlyphs.get(font);
  if (kept === undefined) {
    kept = new Map();
    plainGlyphs.set(font, kept);
  }
  let show = '<';
  let width = 0;
  for (const character of text) {
    let glyph = kept.get(character);
    if (glyph === undefined) {
      const [codes, positions] = font.encode(character);
      glyph = { code: codes.join(''), width: positions.reduce((sum, p) => sum + p.xAdvance, 0) };
      kept.set(character, glyph);
    }
    show += glyph.code;
    width += glyph.width;
  }
  return { font, show: `${show}>`, width };
}

/** Fonts parsed once a process. */
const parsedFonts = new WeakMap<Uint8Array, Font>();

function parsedFont(bytes: Uint8Array): Font {
  const kept = parsedFonts.get(bytes) ?? (create(bytes as Buffer) as Font);
  parsedFonts.set(bytes, kept);
  return kept;
}
