/** The zip and the XML of a workbook, by kept libraries and within limits. In: bytes. Out: parts by path; elements in order. */
import { createRequire } from 'node:module';

/** Loaded where a workbook is read and nowhere else: `check` of plain files does not wait for them. */
const load = createRequire(import.meta.url);
const zip = (): typeof import('fflate') => load('fflate') as typeof import('fflate');
const xml = (): typeof import('htmlparser2') => load('htmlparser2') as typeof import('htmlparser2');

/** Why a workbook cannot be read: a problem's code, the end of its sentence, a hint of its own. */
export class WorkbookFault extends Error {
  readonly code: string;
  readonly hint: string | null;
  constructor(code: string, message: string, hint: string | null) {
    super(message);
    this.code = code;
    this.hint = hint;
  }
}

const MOST_ENTRIES = 2_000;
const MOST_BYTES = 256 * 1024 * 1024;
/** Unpacked to packed size: XML of a sheet packs about 10 to 1; a bomb 1000 to 1. Small parts may do better. */
const MOST_RATIO = 200;
const SMALL = 1024 * 1024;
const WANTED = /^xl\/(?:workbook\.xml|_rels\/workbook\.xml\.rels|sharedStrings\.xml|styles\.xml|worksheets\/[^/]+\.xml)$/;

/** The parts that matter, none unpacked past its stated size, and that within the limits. */
export function unpacked(bytes: Uint8Array): Map<string, Uint8Array> {
  let [entries, total] = [0, 0];
  const filter = ({ name, size, originalSize }: { name: string; size: number; originalSize: number }): boolean => {
    entries += 1;
    if (entries > MOST_ENTRIES) throw new WorkbookFault('workbook-too-large', `it holds more than ${MOST_ENTRIES} parts`, null);
    if (!WANTED.test(name)) return false;
    total += originalSize;
    if (total > MOST_BYTES || (originalSize > SMALL && originalSize > MOST_RATIO * size))
      throw new WorkbookFault('workbook-too-large', `its part ${name} would unpack to ${originalSize} bytes`, null);
    return true;
  };
  try {
    return new Map(Object.entries(zip().unzipSync(bytes, { filter })));
  } catch (error) {
    if (error instanceof WorkbookFault) throw error;
    throw new WorkbookFault('workbook-broken', 'it is no workbook, or it is damaged', null);
  }
}

export type Attributes = Readonly<Record<string, string>>;

/** Walks the elements of a part in order, names without their namespace. Throws WorkbookFault where the part is missing or has a document type. */
export function elementsOf(
  parts: ReadonlyMap<string, Uint8Array>,
  path: string,
  open: (name: string, attributes: Attributes) => void,
  close: (name: string) => void = () => {},
  text: (piece: string) => void = () => {},
): void {
  const bytes = parts.get(path);
  if (bytes === undefined) throw new WorkbookFault('workbook-broken', `its part ${path || 'of the sheet'} is missing`, null);
  const local = (name: string): string => name.slice(name.indexOf(':') + 1);
  const { Parser } = xml();
  const parser = new Parser(
    {
      onopentag: (name, attributes) => open(local(name), attributes),
      onclosetag: (name) => close(local(name)),
      ontext: text,
      onprocessinginstruction: (name) => {
        if (name.startsWith('!'))
          throw new WorkbookFault('workbook-broken', `its part ${path} has a document type, which no workbook needs`, null);
      },
    },
    { xmlMode: true, decodeEntities: true },
  );
  try {
    parser.end(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch (error) {
    if (error instanceof WorkbookFault) throw error;
    throw new WorkbookFault('workbook-broken', `its part ${path} is no UTF-8 text`, null);
  }
}
