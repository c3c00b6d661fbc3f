/**
 * One PDF file over pdfkit. In: options of the report. Out: pages, fonts, bookmarks, attachments; small objects packed into
 * object streams with a cross-reference stream. Deflated by Node's zlib: the same bytes on one Node major and CPU family.
 * Rests on members of pdfkit 0.20.2 that are not published (ref, _write, _refEnd, _finalize): the version is pinned, a test asserts them.
 */
import { deflateSync } from 'node:zlib';
import type { Font } from 'fontkit';
import PDFDocument from 'pdfkit';

/** What pdfkit makes of a font; widths in thousandths. */
export interface EmbeddedFont {
  readonly id: string;
  encode(text: string): readonly [readonly string[], readonly { readonly xAdvance: number; readonly advanceWidth: number }[]];
  ref(): Reference;
}

/** An indirect object of pdfkit. */
export interface Reference {
  readonly id: number;
  data: Record<string, unknown>;
  buffer: Uint8Array[];
  compress: boolean;
  write(chunk: string | Uint8Array): void;
  end(chunk?: string | Uint8Array): void;
  finalize(): void;
}

/** The members of pdfkit's document that are used here. */
interface Base {
  readonly page: {
    readonly width: number;
    readonly height: number;
    readonly dictionary: Reference;
    readonly content: Reference;
    readonly fonts: Record<string, Reference>;
    readonly xobjects: Record<string, Reference>;
  };
  readonly outline: Outline;
  readonly _root: Reference;
  readonly _info: Reference;
  readonly _id: Uint8Array;
  readonly _offsets: (number | null)[];
  readonly _offset: number;
  _font: EmbeddedFont;
  ref(data?: Record<string, unknown>): Reference;
  _write(data: string | Uint8Array): void;
  _refEnd(ref: Reference): void;
  _finalize(): void;
  endMetadata(): void;
  font(src: unknown): Base;
  addPage(): Base;
  addContent(bytes: Uint8Array): Base;
  addNamedDestination(name: string, ...args: readonly unknown[]): void;
  addNamedEmbeddedFile(name: string, ref: Reference): void;
  push(chunk: unknown): boolean;
  on(event: 'data', listener: (chunk: Uint8Array) => void): Base;
  on(event: 'end', listener: () => void): Base;
  end(): void;
}

export interface Outline {
  options: Readonly<Record<string, unknown>>;
  addItem(title: string, options: Readonly<Record<string, unknown>>): Outline;
}

export interface DocumentOptions {
  readonly paper: 'A4' | 'Letter';
  readonly profile: 'PDF/A-3b' | 'PDF/A-1b';
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  readonly language: string;
  /** `YYYY-MM-DD`. */
  readonly date: string;
}

const POOL = 200;
const deflate = (bytes: Uint8Array): Uint8Array => deflateSync(bytes);
/** Attachments are most of a file's bytes: a little less packing for half of the time. */
const ATTACHED_LEVEL = 3;

/** What XML 1.0 (section 2.2) has no place for. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is taken out.
const NOT_XML = /[\x00-\x08\x0b\x0c\x0e-\x1f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g;

/** pdfkit writes titles into the XMP unescaped: its own text form is escaped, its value is not. */
class XmpText extends String {
  override toString(): string {
    return this.valueOf().replace(NOT_XML, '').replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
  }
}

const BaseDocument = PDFDocument as unknown as new (options: Readonly<Record<string, unknown>>) => Base;

export class PackedDocument extends BaseDocument {
  readonly #packs: boolean;
  /** Object number → object stream and place in it. */
  readonly #packed = new Map<number, readonly [number, number]>();
  #pool: { readonly id: number; readonly text: string }[] = [];
  /** Text of the object that is being finished; a plain property, for pdfkit's constructor writes before our fields exist. */
  private captured: string[] | null = null;
  /** Entries set on the catalogue just before it is written. */
  readonly catalogue: Record<string, unknown> = {};

  constructor(options: DocumentOptions) {
    const { paper, profile, title, author, subject, language, date } = options;
    const isFirst = profile === 'PDF/A-1b';
    super({
      size: paper === 'A4' ? 'A4' : 'LETTER',
      margin: 0,
      autoFirstPage: false,
      font: null,
      // Words are kept once, by Type.
      fontLayoutCache: false,
      pdfVersion: isFirst ? '1.4' : '1.7',
      subset: profile === 'PDF/A-1b' ? 'PDF/A-1b' : 'PDF/A-3b',
      lang: language,
      displayTitle: true,
      info: {
        Title: new XmpText(title),
        Author: new XmpText(author),
        Subject: new XmpText(subject),
        Producer: 'swayfolio',
        Creator: 'swayfolio',
        CreationDate: dateOf(date),
      },
    });
    this.#packs = !isFirst;
    this.outline.options = { expanded: true };
  }

  /** A parsed font, ready to encode. */
  embedFont(font: Font): EmbeddedFont {
    this.font(font);
    return this._font;
  }

  override ref(data?: Record<string, unknown>): Reference {
    const ref = super.ref(data);
    const finish = ref.finalize.bind(ref);
    ref.finalize = () => this.#finish(ref, finish);
    return ref;
  }

  #finish(ref: Reference, finish: () => void): void {
    if (ref.buffer.length > 0) {
      if (ref.compress) {
        ref.buffer = [deflate(Buffer.concat(ref.buffer))];
        ref.compress = false;
      }
      finish();
      return;
    }
    if (this.#packs !== true) {
      finish();
      return;
    }
    this.captured = [];
    finish();
    const [, text = ''] = this.captured as string[];
    this.captured = null;
    this.pack(ref.id, text);
  }

  override _write(data: string | Uint8Array): void {
    if (!this.captured || typeof data !== 'string') super._write(data);
    else this.captured.push(data);
  }

  /** Object number for an object that is written as text by `pack`. */
  allocate(): number {
    this._offsets.push(null);
    return this._offsets.length;
  }

  /** Writes an object without a stream: into an object stream, or plainly where those are not allowed. */
  pack(id: number, text: string): void {
    if (!this.#packs) {
      this._offsets[id - 1] = this._offset;
      super._write(`${id} 0 obj`);
      super._write(text);
      super._write('endobj');
      return;
    }
    this.#pool.push({ id, text });
    if (this.#pool.length >= POOL) this.#writePool();
  }

  #writePool(): void {
    const pool = this.#pool;
    if (pool.length === 0) return;
    this.#pool = [];
    const id = this.allocate();
    let head = '';
    let body = '';
    pool.forEach((object, i) => {
      this.#packed.set(object.id, [id, i]);
      head += `${object.id} ${body.length} `;
      body += `${object.text}\n`;
    });
    const bytes = deflate(latin1(head + body));
    this._offsets[id - 1] = this._offset;
    this.#stream(id, `<< /Type /ObjStm /N ${pool.length} /First ${head.length} /Filter /FlateDecode /Length ${bytes.length} >>`, bytes);
  }

  #stream(id: number, dictionary: string, bytes: Uint8Array): void {
    super._write(`${id} 0 obj`);
    super._write(dictionary);
    super._write('stream');
    super._write(bytes);
    super._write('\nendstream');
    super._write('endobj');
  }

  /** An attached file as PDF/A-3 has it: an associated file of the document, with its day and size. */
  attach(
    file: { readonly name: string; readonly mime: string; readonly description: string; readonly bytes: Uint8Array },
    date: string,
  ): void {
    const made = dateOf(date);
    const stream = this.ref({
      Type: 'EmbeddedFile',
      Subtype: file.mime.replace('/', '#2F'),
      Filter: 'FlateDecode',
      Params: { Size: file.bytes.length, CreationDate: made, ModDate: made },
    });
    stream.end(deflateSync(file.bytes, { level: ATTACHED_LEVEL }));
    const [name, description] = [new String(file.name), new String(file.description)];
    const spec = this.ref({
      Type: 'Filespec',
      AFRelationship: file.name === 'record.json' ? 'Source' : 'Data',
      F: name,
      UF: name,
      Desc: description,
      EF: { F: stream },
    });
    spec.end();
    this.addNamedEmbeddedFile(file.name, spec);
    this.catalogue['AF'] = [...((this.catalogue['AF'] as Reference[] | undefined) ?? []), spec];
  }

  override endMetadata(): void {
    super.endMetadata();
    Object.assign(this._root.data, this.catalogue);
  }

  override _finalize(): void {
    if (!this.#packs) {
      super._finalize();
      return;
    }
    this.#writePool();
    const id = this.allocate();
    const at = this._offset;
    this._offsets[id - 1] = at;
    const count = this._offsets.length + 1;
    const rows = deflate(this.#crossReferences(count));
    const hex = [...this._id].map((b) => b.toString(16).padStart(2, '0')).join('');
    this.#stream(
      id,
      `<< /Type /XRef /Size ${count} /W [1 4 2] /Root ${this._root} /Info ${this._info} /ID [<${hex}> <${hex}>] /Filter /FlateDecode /Length ${rows.length} >>`,
      rows,
    );
    super._write('startxref');
    super._write(`${at}`);
    super._write('%%EOF');
    this.push(null);
  }

  /** Rows of type (1 byte), offset or stream (4), place (2). */
  #crossReferences(count: number): Uint8Array {
    const rows = new Uint8Array(count * 7);
    const view = new DataView(rows.buffer);
    view.setUint16(5, 65535);
    for (let number = 1; number < count; number += 1) {
      const packed = this.#packed.get(number);
      view.setUint8(number * 7, packed === undefined ? 1 : 2);
      view.setUint32(number * 7 + 1, packed === undefined ? (this._offsets[number - 1] ?? 0) : packed[0]);
      view.setUint16(number * 7 + 5, packed === undefined ? 0 : packed[1]);
    }
    return rows;
  }
}

/** pdfkit asks for a Date object; this one is made from the survey's day, never from the clock. */
// biome-ignore lint/style/noRestrictedGlobals: the type and the constructor with an argument, which no clock answers.
export const dateOf = (text: string): Date => new Date(`${text}T00:00:00Z`);

/** One byte a character: what pdfkit writes is already escaped to that. */
export const latin1 = (text: string): Uint8Array => Buffer.from(text, 'latin1');

/** A text string of PDF: UTF-16 with mark, in hex, so that nothing needs escaping. */
export function pdfText(text: string): string {
  let hex = 'feff';
  for (let i = 0; i < text.length; i += 1) hex += text.charCodeAt(i).toString(16).padStart(4, '0');
  return `<${hex}>`;
}
