/**
 * A whole PDF. In: sections of markup, drawings, pictures, a brand. Out: its bytes. Two passes: all is laid out first, so
 * that page numbers are known, then pages are written one by one.
 */
import type { BlockContext } from './block.ts';
import { sectionBoxes } from './boxes.ts';
import { type Outline, latin1, PackedDocument, pdfText, type Reference } from './document.ts';
import { Type } from './face.ts';
import { Flow } from './flow.ts';
import { UserError } from '../shell/types.ts';
import { ImageError, imageOf, type PdfImage } from './image.ts';
import { parseMarkup } from './markup.ts';
import { Pen, type PageLink, type Target } from './pen.ts';
import { MARGIN, PAPER, STYLES } from './sheet.ts';
import { Structure } from './tags.ts';
import type { PdfInput, PdfOutput } from './types.ts';

/** Throws an Error that names the template for markup outside the subset, or a link to an id that is not there. */
export async function renderPdf(input: PdfInput): Promise<PdfOutput> {
  const document = new PackedDocument(input);
  const chunks: Uint8Array[] = [];
  document.on('data', (chunk) => chunks.push(chunk));
  const ended = new Promise<void>((resolve) => document.on('end', () => resolve()));
  const job = await layOut(input, document);
  await writePages(input, document, job);
  writeOutline(document, job.pen);
  for (const file of input.attachments) {
    if (input.profile === 'PDF/A-1b') break;
    document.attach(file, input.date);
  }
  document.end();
  await ended;
  return { bytes: new Uint8Array(Buffer.concat(chunks)), pages: job.pen.pages.length };
}

interface Job {
  readonly pen: Pen;
  readonly structure: Structure;
  readonly images: ReadonlyMap<string, PdfImage>;
}

async function layOut(input: PdfInput, document: PackedDocument): Promise<Job> {
  const structure = new Structure();
  const type = new Type(document, input.fonts);
  const pen = new Pen(type, structure, input.inks, input.tags);
  const flow = new Flow(pen, input.paper);
  const images = new Map<string, PdfImage>();
  const picture = (kind: 'photo' | 'logo', key: string): PdfImage => {
    const kept = images.get(key);
    if (kept !== undefined) return kept;
    const image = readImage(input.picture(kind, key), key, `I${images.size + 1}`);
    images.set(key, image);
    return image;
  };
  for (const { template, html } of input.sections) {
    pen.template = template;
    const context: BlockContext = {
      type,
      structure,
      tagged: input.tags,
      width: flow.width,
      pageHeight: flow.pageHeight,
      template,
      chart: input.chart,
      picture,
    };
    for (const section of parseMarkup(template, html)) flow.add(sectionBoxes(context, section, structure.root));
    await turn();
  }
  for (const [id, template] of pen.wanted)
    if (!pen.targets.has(id)) throw new Error(`Template ${template}: a link leads to "${id}", which is nowhere in the document.`);
  structure.reservePages(pen.pages.length);
  return { pen, structure, images };
}

/** Throws a UserError that names the picture. */
function readImage(bytes: Uint8Array, key: string, name: string): PdfImage {
  try {
    return imageOf(bytes, name);
  } catch (error) {
    if (!(error instanceof ImageError)) throw error;
    throw new UserError(
      `The picture ${key} cannot be printed: ${error.message}.`,
      'Save it anew as JPEG in colour or grey, or as PNG without interlacing.',
    );
  }
}

/** pdfkit's stream is drained between pages. */
const turn = (): Promise<void> => new Promise((resolve) => setImmediate(resolve));

async function writePages(input: PdfInput, document: PackedDocument, job: Job): Promise<void> {
  const { pen, structure } = job;
  const names = destinationNames(pen);
  const targets = pen.pages.map((): (readonly [string, Target])[] => []);
  for (const [id, target] of pen.targets) targets[target.page]?.push([id, target]);
  const written = new Map<PdfImage, Reference>();
  const pages: Reference[] = [];
  const { height } = PAPER[input.paper];
  for (let page = 0; page < pen.pages.length; page += 1) {
    furniture(input, pen, page);
    document.addPage();
    const draft = pen.pages[page] as Pen['pages'][number];
    pages.push(document.page.dictionary);
    for (const font of draft.fonts) document.page.fonts[font.id] = font.ref();
    for (const image of draft.images) {
      const ref = written.get(image) ?? image.write(document);
      written.set(image, ref);
      document.page.xobjects[image.name] = ref;
    }
    document.addContent(latin1(draft.pieces.map((piece) => (typeof piece === 'string' ? piece : piece())).join('\n')));
    draft.pieces.length = 0;
    if (input.tags) document.page.dictionary.data['StructParents'] = page;
    if (input.tags) document.page.dictionary.data['Tabs'] = 'S';
    for (const [id, target] of targets[page] ?? [])
      document.addNamedDestination(names.get(id) as string, 'XYZ', 0, Math.max(0, target.y - 8), null);
    writeLinks(document, draft.links, names, structure, page, height, input.tags);
    await turn();
  }
  document.catalogue['PageLabels'] = { Nums: [0, { S: 'D' }] };
  if (input.tags) {
    document.catalogue['MarkInfo'] = { Marked: true };
    figureBoxes(structure, height);
    const root = structure.write(document, pages);
    document.catalogue['StructTreeRoot'] = { toString: () => `${root} 0 R`, [Symbol.toStringTag]: 'Reference' };
  }
}

/** Named destinations in one form of equal length: pdfkit sorts them by locale. */
function destinationNames(pen: Pen): Map<string, string> {
  return new Map([...pen.targets.keys()].map((id, i) => [id, `d${String(i).padStart(6, '0')}`]));
}

/** Boxes of figures were told y down; the file wants y up. */
function figureBoxes(structure: Structure, height: number): void {
  const visit = (node: Structure['root']): void => {
    if (node.box !== null) node.box = [node.box[0], height - node.box[3], node.box[2], height - node.box[1]];
    for (const kid of node.kids) if ('role' in kid) visit(kid);
  };
  visit(structure.root);
}

function writeLinks(
  document: PackedDocument,
  links: readonly PageLink[],
  names: ReadonlyMap<string, string>,
  structure: Structure,
  page: number,
  height: number,
  tags: boolean,
): void {
  const annotations: { toString(): string }[] = [];
  for (const link of links) {
    const id = document.allocate();
    const [left, top, right, bottom] = link.box();
    const rect = [left, height - bottom, right, height - top].map((v) => v.toFixed(2)).join(' ');
    const key = tags && link.node !== null ? ` /StructParent ${structure.link(link.node, page, id)}` : '';
    const contents = link.node?.alt == null ? '' : ` /Contents ${pdfText(link.node.alt)}`;
    document.pack(
      id,
      `<< /Type /Annot /Subtype /Link /Rect [${rect}] /Border [0 0 0] /F 4 /Dest (${names.get(link.target)})${contents}${key} >>`,
    );
    annotations.push({ toString: () => `${id} 0 R`, [Symbol.toStringTag]: 'Reference' } as { toString(): string });
  }
  if (annotations.length > 0) document.page.dictionary.data['Annots'] = annotations;
}

/** Running header and footer, and the draft mark, all artifacts. */
function furniture(input: PdfInput, pen: Pen, page: number): void {
  const { width, height } = PAPER[input.paper];
  const { size, ink } = STYLES.running;
  const right = width - MARGIN.right;
  const top = 38;
  const foot = height - 32;
  const room = right - MARGIN.left;
  const atRight = pen.fitted(input.runningRight, size, room * 0.45);
  pen.text(null, pen.fitted(input.runningLeft, size, room * 0.53), MARGIN.left, top, size, ink, false, 'start', page);
  pen.text(null, atRight, right, top, size, ink, false, 'end', page);
  pen.marked(null, `${pen.colour('rule', 'RG')} 0.5 w ${MARGIN.left} ${top + 7} m ${right} ${top + 7} l S`, page);
  pen.text(null, pen.fitted(input.footerLeft, size, room * 0.8), MARGIN.left, foot, size, ink, false, 'start', page);
  pen.text(null, input.pageOf(page + 1, pen.pages.length), right, foot, size, ink, false, 'end', page);
  if (input.mark === null) return;
  const operators = pen.textOperators(input.mark, 0, 0, 26, 'rule', true, 'middle', page);
  pen.marked(null, `q 0 -1 1 0 33 ${height / 2} cm ${operators} Q`, page);
}

function writeOutline(document: PackedDocument, pen: Pen): void {
  const { width } = document.page;
  let chapter: Outline | null = null;
  for (const entry of pen.outline) {
    if (entry.level === 3) continue;
    const options = { fit: false, left: width, top: Math.max(0, entry.y - 8), pageNumber: entry.page, expanded: true };
    if (entry.level === 1 || chapter === null) chapter = document.outline.addItem(entry.title, options);
    else chapter.addItem(entry.title, options);
  }
}
