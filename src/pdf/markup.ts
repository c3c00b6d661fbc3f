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
  section: ['id', 'class'], h1: ['id'], h2: ['id'], h3: ['id'], p: ['class', 'id'], col: ['class'], th: ['scope', 'colspan'], td: ['colspan'], tr: ['id'],
  figure: ['data-chart', 'data-photo', 'data-logo', 'data-key', 'data-alt'], a: ['href'], span: ['data-page', 'data-mark'],
};
const CLASSES: Readonly<Record<string, readonly string[]>> = { section: ['page', 'keep'], p: ['lead', 'note', 'caution'], col: ['text', 'number', 'mark', 'chart'] };

const allowed = (parent: string, tag: string): boolean => {
  if (WITH_INLINE.has(parent)) return INLINE.has(tag) || ((parent === 'td' || parent === 'li') && (tag === 'figure' || tag === 'p'));
  return parent === 'figure' ? tag === 'figcaption' : (CHILDREN[parent]?.has(tag) ?? false);
};

/** The sections of a template's markup. Throws an Error (a bug, or a plant's own template) that names the template and the tag. */
export function parseMarkup(template: string, html: string): Element[] {
  const root: Element = { tag: '', attributes: {}, children: [] };
  const open: Element[] = [root];
  const fail = (what: string): never => {
    throw new Error(`Template ${template}: ${what}.`);
  };
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
        if (WITH_INLINE.has(parent.tag)) parent.children.push(text);
        else if (/[^ \t\r\n\f]/.test(text)) fail(`text may not stand in <${parent.tag}>: ${text.trim().slice(0, 40)}`);
      },
      onclosetag(tag, implied) {
        if (EMPTY.has(tag)) return;
        if (implied) fail(`<${tag}> is never closed`);
        const closed = open.pop();
        if (closed?.tag !== tag) fail(`</${tag}> closes nothing`);
      },
      oncomment() {},
    },
    { decodeEntities: true, recognizeSelfClosing: false },
  );
  parser.write(html);
  parser.end();
  if (open.length !== 1) fail(`<${(open[open.length - 1] as Element).tag}> is never closed`);
  return root.children as Element[];
}

function checkAttributes(tag: string, attributes: Readonly<Record<string, string>>, fail: (what: string) => never): void {
  for (const [name, value] of Object.entries(attributes)) {
    if (!(ATTRIBUTES[tag] ?? []).includes(name)) fail(`<${tag}> may not have ${name}`);
    if (name === 'class' && !(CLASSES[tag] ?? []).includes(value)) fail(`<${tag}> may not have class ${value}`);
    if (name === 'href' && !value.startsWith('#')) fail(`a link leads out of the document: ${value}`);
  }
}
