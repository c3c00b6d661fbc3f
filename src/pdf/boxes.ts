/**
 * Blocks as boxes to stack. In: elements of a section. Out: boxes of known height that can draw themselves. Never: a
 * block drawn while it is laid out.
 */
import { altOf, type BlockContext, type Box, pictureOf } from './block.ts';
import { linesOf, plainText, tokensOf } from './inline.ts';
import type { Element } from './markup.ts';
import type { Pen } from './pen.ts';
import { STYLES, type TextStyle } from './sheet.ts';
import { tableBoxes } from './table.ts';
import type { Node } from './tags.ts';

/** Boxes of a section; its own id anchors the first of them. */
export function sectionBoxes(context: BlockContext, section: Element, parent: Node): Box[] {
  const node = context.structure.node('Sect', parent);
  const boxes: Box[] = [];
  for (const child of section.children) {
    if (typeof child === 'string') continue;
    // A note belongs to what stands above it: it does not begin a page by itself.
    const above = boxes[boxes.length - 1];
    if (child.tag === 'p' && child.attributes['class'] === 'note' && above !== undefined) above.keepNext = true;
    for (const box of blockBoxes(context, child, node)) boxes.push(box);
  }
  const first = boxes[0];
  if (first === undefined) return boxes;
  const { id, class: kind } = section.attributes;
  if (id !== undefined) {
    if (first.anchor == null) first.anchor = id;
    else boxes.unshift(anchorBox(id));
  }
  const head = boxes[0] as Box;
  if (kind === 'page') head.newPage = true;
  if (kind === 'keep') keepTogether(boxes, context.pageHeight);
  return boxes;
}

const anchorBox = (anchor: string): Box => ({ height: 0, before: 0, keepNext: true, anchor, draw: () => undefined });

/** What fits a page stays together; what does not begins one, so that as little of it as can be is turned over. */
function keepTogether(boxes: readonly Box[], pageHeight: number): void {
  const height = boxes.reduce((sum, b) => sum + b.height + b.before, 0);
  if (height > pageHeight) {
    (boxes[0] as Box).newPage = true;
    return;
  }
  for (const box of boxes.slice(0, -1)) box.keepInSection = true;
}

function blockBoxes(context: BlockContext, element: Element, parent: Node): Box[] {
  switch (element.tag) {
    case 'section':
      return sectionBoxes(context, element, parent);
    case 'h1':
    case 'h2':
    case 'h3':
      return headingBoxes(context, element, parent);
    case 'p':
      return paragraphBoxes(context, element, parent);
    case 'ul':
    case 'ol':
      return listBoxes(context, element, parent);
    case 'table':
      return tableBoxes(context, element, parent);
    default:
      return figureBoxes(context, element, parent);
  }
}

function headingBoxes(context: BlockContext, element: Element, parent: Node): Box[] {
  const level = Number(element.tag.slice(1)) as 1 | 2 | 3;
  const node = context.structure.node(`H${level}`, parent);
  const boxes = textBoxes(context, element, STYLES[element.tag as 'h1'], node, 0);
  const heading = { level, title: plainText(element) };
  return boxes.map((box, i) => ({ ...box, keepNext: true, ...(i === 0 ? { anchor: element.attributes['id'] ?? null, heading } : {}) }));
}

function paragraphBoxes(context: BlockContext, element: Element, parent: Node): Box[] {
  const kind = (element.attributes['class'] ?? 'p') as 'p' | 'lead' | 'note' | 'caution';
  const node = context.structure.node('P', parent);
  const boxes = textBoxes(context, element, STYLES[kind], node, kind === 'caution' ? 10 : 0);
  const first = boxes[0];
  if (first !== undefined && element.attributes['id'] !== undefined) first.anchor = element.attributes['id'];
  return kind === 'caution' ? boxes.map(withSideRule) : boxes;
}

/** Cautions have a rule at their left, in ink: no alert box. */
function withSideRule(box: Box): Box {
  return {
    ...box,
    draw(pen, x, y) {
      pen.rule(x + 2, y - 1, x + 2, y + box.height + 1, 'ink', 0.9);
      box.draw(pen, x, y);
    },
  };
}

/** One box a line; the first two and the last two lines stay together. */
function textBoxes(context: BlockContext, element: Element, style: TextStyle, node: Node, indent: number): Box[] {
  const lines = linesOf(context, tokensOf(context, element.children, style, node), context.width - indent);
  return lines.map((line, i) => ({
    height: style.leading,
    before: i === 0 ? style.before : 0,
    keepNext: lines.length > 1 && (i === 0 || i === lines.length - 2),
    draw: (pen: Pen, x: number, y: number) => pen.line(line, x + indent, y + style.leading * 0.76),
  }));
}

function listBoxes(context: BlockContext, element: Element, parent: Node): Box[] {
  const list = context.structure.node('L', parent);
  const indent = 14;
  return element.children.flatMap((item, index) => {
    if (typeof item === 'string') return [];
    const node = context.structure.node('LI', list);
    const label = context.structure.node('Lbl', node);
    const body = context.structure.node('LBody', node);
    const boxes = textBoxes(context, item, STYLES.li, body, indent);
    const sign = element.tag === 'ol' ? `${index + 1}.` : '–';
    const [first, ...rest] = boxes;
    if (first === undefined) return [];
    const labelled: Box = {
      ...first,
      draw(pen, x, y) {
        pen.text(label, sign, x + 1, y + STYLES.li.leading * 0.76, STYLES.li.size, 'ink', false);
        first.draw(pen, x, y);
      },
    };
    return [labelled, ...rest];
  });
}

function figureBoxes(context: BlockContext, figure: Element, parent: Node): Box[] {
  const node = context.structure.node('Figure', parent, { alt: altOf(context, figure) });
  const picture = pictureOf(context, figure, context.width);
  const caption = figure.children.find((c): c is Element => typeof c !== 'string' && c.tag === 'figcaption');
  const boxes: Box[] = [
    {
      height: picture.height,
      before: 8,
      keepNext: caption !== undefined,
      draw(pen, x, y) {
        node.box = [x, y, x + picture.width, y + picture.height];
        picture.draw(pen, node, x, y);
      },
    },
  ];
  if (caption !== undefined) boxes.push(...textBoxes(context, caption, STYLES.caption, context.structure.node('Caption', parent), 0));
  return boxes;
}
