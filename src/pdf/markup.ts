/**
 * The closed subset of HTML that PDF templates yield. In: markup of one template. Out: a tree of known elements. Never:
 * a tag mended in silence; what is not in the subset is an error that names the template.
 */
import { Parser } from 'htmlparser2';

export interface Element {
  readonly tag: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: (Element | string)[];
}

const CHILDREN: Readonly<Record<string, ReadonlySet<string>>> = {
  '': new Set(['section']),
  section: new Set(['section', 'h1', 'h2', 'h3', 'p', 'ul', 'ol', 'table', 'figure']),
  table: new Set(['col', 'thead', 'tbody']),
  thead: new Set(['tr']),
  tbody: new Set(['tr']),
  tr: new Set(['th', 'td']),
  ul: new Set(['li']),
  ol: new Set(['li']),
};
const INLINE = new Set(['strong', 'em', 'sup', 'sub', 'br', 'a', 'span']);
const WITH_INLINE = new Set(['h1', 'h2', 'h3', 'p', 'li', 'th', 'td', 'figcaption', 'strong', 'em', 'sup', 'sub', 'a', 'span']);
const EMPTY = new Set(['br', 'col']);

const ATTRIBUTES: Readonly<Record<string, readonly string[]>> = {
  section: ['id', 'class'],
  h1: ['id'],
  h2: ['id'],
  h3: ['id'],
  p: ['class', 'id'],
  col: ['class'],
  th: ['scope', 'colspan'],
  td: ['colspan'],
  tr: ['id'],
  figure: ['data-chart', 'data-photo', 'data-logo', 'data-key', 'data-alt'],
  a: ['href'],
  span: ['data-page', 'data-mark'],
};
const FORMS: Readonly<Record<string, RegExp>> = {
  scope: /^(row|col)$/,
  colspan: /^[1-9]\d?$/,
  'data-mark': /^((r-)?[A-D]|none)$/,
  'data-page': /./,
};
const CLASSES: Readonly<Record<string, readonly string[]>> = {
  section: ['page', 'keep'],
  p: ['lead', 'note', 'caution'],
  col: ['text', 'number', 'mark', 'chart'],
};

const allowed = (parent: string, tag: string): boolean => {
  if (WITH_INLINE.has(parent))
    return INLINE.has(tag) || (parent === 'td' && tag === 'figure') || ((parent === 'td' || parent === 'li') && tag === 'p');
  return parent === 'figure' ? tag === 'figcaption' : (CHILDREN[parent]?.has(tag) ?? false);
};

/** The sections of a template's markup. Throws an Error (a bug, or a plant's own template) that names the template and the tag. */
export function parseMarkup(template: string, html: string): Element[] {
  const root: Element = { tag: '', attributes: {}, children: [] };
  const open: Element[] = [root];
  const fail = (what: string): never => {
    throw new Error(`Template ${template}: ${what}.`);
  };
  /** Closing tags that closed something: the parser passes over the others in silence. */
  const closed = new Map<string, number>();
  const parser = new Parser(
    {
      onopentag(tag, attributes, implied) {
        const parent = open[open.length - 1] as Element;
        if (implied) fail(`<${tag}> is implied, not written`);
        if (!allowed(parent.tag, tag)) fail(`<${tag}> may not stand in ${parent.tag === '' ? 'the document' : `<${parent.tag}>`}`);
        checkAttributes(tag, attributes, fail);
        const element: Element = { tag, attributes, children: [] };
        parent.children.push(element);
        if (!EMPTY.has(tag)) open.push(element);
      },
      ontext(text) {
        const parent = open[open.length - 1] as Element;
        if (WITH_INLINE.has(parent.tag)) addText(parent, text);
        else if (/[^ \t\r\n\f]/.test(text)) fail(`text may not stand in <${parent.tag}>: ${text.trim().slice(0, 40)}`);
      },
      onclosetag(tag, implied) {
        if (!implied) closed.set(tag, (closed.get(tag) ?? 0) + 1);
        if (EMPTY.has(tag)) return;
        if (implied) fail(`<${tag}> is never closed`);
        const last = open.pop();
        if (last?.tag !== tag) fail(`</${tag}> closes nothing`);
        if (last !== undefined) checkFigures(last, fail);
      },
      oncomment() {},
      onprocessinginstruction: (name) => fail(`<${name}> may not stand there`),
    },
    { decodeEntities: true, recognizeSelfClosing: false },
  );
  parser.write(html);
  parser.end();
  if (open.length !== 1) fail(`<${(open[open.length - 1] as Element).tag}> is never closed`);
  for (const [, tag = ''] of html.replace(/<!--.*?-->/gs, '').matchAll(/<\/([^\s>]*)/g))
    closed.set(tag.toLowerCase(), (closed.get(tag.toLowerCase()) ?? 0) - 1);
  for (const [tag, count] of closed) if (count < 0) fail(`</${tag}> closes nothing`);
  return root.children as Element[];
}

/** A figure in a cell stands alone there and has no caption; it is of one kind. */
function checkFigures(element: Element, fail: (what: string) => never): void {
  if (
    element.tag === 'figure' &&
    ['data-chart', 'data-photo', 'data-logo'].filter((name) => element.attributes[name] !== undefined).length !== 1
  )
    fail('<figure> needs one of data-chart, data-photo, data-logo');
  if (element.tag !== 'td') return;
  const figure = element.children.find((c): c is Element => typeof c !== 'string' && c.tag === 'figure');
  if (figure === undefined) return;
  if (element.children.some((c) => c !== figure && (typeof c !== 'string' || /[^ \t\r\n\f]/.test(c))))
    fail('<figure> stands with something else in a <td>');
  if (figure.children.length > 0) fail('<figcaption> may not stand in a <td>');
}

/** The parser tells a text in parts, at each entity: they are one text, since a no-break blank belongs to its word. */
function addText(parent: Element, text: string): void {
  const last = parent.children[parent.children.length - 1];
  if (typeof last === 'string') parent.children[parent.children.length - 1] = last + text;
  else parent.children.push(text);
}

function checkAttributes(tag: string, attributes: Readonly<Record<string, string>>, fail: (what: string) => never): void {
  for (const [name, value] of Object.entries(attributes)) {
    if (!(ATTRIBUTES[tag] ?? []).includes(name)) fail(`<${tag}> may not have ${name}`);
    if (name === 'class' && !(CLASSES[tag] ?? []).includes(value)) fail(`<${tag}> may not have class ${value}`);
    if (name === 'href' && !/^#./.test(value)) fail(`a link leads out of the document: ${value}`);
    const form = FORMS[name];
    if (form !== undefined && !form.test(value)) fail(`<${tag}> may not have ${name} ${value}`);
  }
}
