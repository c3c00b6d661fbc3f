/**
 * The structure tree. In: nodes as the layout makes them, marked content as it is drawn. Out: structure elements and the
 * parent tree of the file. Never: content that is neither tagged nor an artifact.
 */
import { type PackedDocument, pdfText, type Reference } from './document.ts';

export type Role =
  | 'Document'
  | 'Sect'
  | 'H1'
  | 'H2'
  | 'H3'
  | 'P'
  | 'L'
  | 'LI'
  | 'LBody'
  | 'Lbl'
  | 'Table'
  | 'THead'
  | 'TBody'
  | 'TR'
  | 'TH'
  | 'TD'
  | 'Figure'
  | 'Caption'
  | 'Link'
  | 'Span';

export interface Node {
  readonly role: Role;
  readonly parent: Node | null;
  readonly kids: (Node | Marked | LinkObject)[];
  /** Alternative text of a figure or link. */
  readonly alt: string | null;
  /** Scope of a header cell, columns it spans. */
  readonly scope: 'Row' | 'Column' | null;
  readonly colspan: number;
  /** Box of a figure on its page, points from the lower left. */
  box: readonly [number, number, number, number] | null;
  id: number;
}

interface Marked {
  readonly page: number;
  readonly mcid: number;
}

interface LinkObject {
  readonly page: number;
  readonly annotation: number;
}

export class Structure {
  readonly root: Node;
  /** For each page the node of each marked content. */
  readonly #pages: Node[][] = [];
  readonly #links: Node[] = [];

  constructor() {
    this.root = this.node('Document', null);
  }

  node(
    role: Role,
    parent: Node | null,
    more: { readonly alt?: string; readonly scope?: 'Row' | 'Column'; readonly colspan?: number } = {},
  ): Node {
    const node: Node = {
      role,
      parent,
      kids: [],
      alt: more.alt ?? null,
      scope: more.scope ?? null,
      colspan: more.colspan ?? 1,
      box: null,
      id: 0,
    };
    parent?.kids.push(node);
    return node;
  }

  /** Begins marked content of a node on a page (0-based); the operator to write before it. */
  begin(node: Node, page: number): string {
    const marked = this.#pages[page] ?? [];
    this.#pages[page] = marked;
    node.kids.push({ page, mcid: marked.length });
    marked.push(node);
    return `/${node.role} <</MCID ${marked.length - 1}>> BDC`;
  }

  /** Key of a link annotation in the parent tree; its object number is told when it is known. */
  link(node: Node, page: number, annotation: number): number {
    node.kids.push({ page, annotation });
    this.#links.push(node);
    return this.#pages.length + this.#links.length;
  }

  /** Must be known before links are keyed: pages keep the keys below their number. */
  reservePages(count: number): void {
    while (this.#pages.length < count) this.#pages.push([]);
  }

  /** Writes every element and the parent tree; returns the object number of the tree's root. */
  write(document: PackedDocument, pages: readonly Reference[]): number {
    prune(this.root);
    const treeRoot = document.allocate();
    const nodes: Node[] = [];
    const number = (node: Node): void => {
      node.id = document.allocate();
      nodes.push(node);
      for (const kid of node.kids) if ('role' in kid) number(kid);
    };
    number(this.root);
    for (const node of nodes) document.pack(node.id, elementText(node, treeRoot, pages));
    const parents = document.allocate();
    const keyed = [
      ...this.#pages.map((marked, page) => `${page} [${marked.map((n) => `${n.id} 0 R`).join(' ')}]`),
      ...this.#links.map((n, i) => `${this.#pages.length + i + 1} ${n.id} 0 R`),
    ];
    document.pack(parents, `<< /Nums [${keyed.join('\n')}] >>`);
    document.pack(
      treeRoot,
      `<< /Type /StructTreeRoot /K ${this.root.id} 0 R /ParentTree ${parents} 0 R /ParentTreeNextKey ${this.#pages.length + this.#links.length + 1} >>`,
    );
    return treeRoot;
  }
}

/** Elements without content (a table cell may be empty) are left out. */
function prune(node: Node): void {
  for (let i = node.kids.length - 1; i >= 0; i -= 1) {
    const kid = node.kids[i] as Node['kids'][number];
    if (!('role' in kid)) continue;
    prune(kid);
    if (kid.kids.length === 0 && kid.role !== 'TD' && kid.role !== 'TH') node.kids.splice(i, 1);
  }
}

function elementText(node: Node, treeRoot: number, pages: readonly Reference[]): string {
  const parent = node.parent === null ? treeRoot : node.parent.id;
  const kids = node.kids.map((kid) => kidText(kid, pages));
  const attributes = attributesText(node);
  const alt = node.alt === null ? '' : ` /Alt ${pdfText(node.alt)}`;
  return `<< /Type /StructElem /S /${node.role} /P ${parent} 0 R /K [${kids.join(' ')}]${alt}${attributes} >>`;
}

function kidText(kid: Node['kids'][number], pages: readonly Reference[]): string {
  if ('role' in kid) return `${kid.id} 0 R`;
  const page = pages[kid.page] as Reference;
  return 'mcid' in kid
    ? `<< /Type /MCR /Pg ${page.id} 0 R /MCID ${kid.mcid} >>`
    : `<< /Type /OBJR /Pg ${page.id} 0 R /Obj ${kid.annotation} 0 R >>`;
}

function attributesText(node: Node): string {
  if (node.box !== null) return ` /A << /O /Layout /Placement /Block /BBox [${node.box.map((v) => v.toFixed(2)).join(' ')}] >>`;
  const span = node.colspan > 1 ? ` /ColSpan ${node.colspan}` : '';
  const scope = node.scope === null ? '' : ` /Scope /${node.scope}`;
  return span === '' && scope === '' ? '' : ` /A << /O /Table${scope}${span} >>`;
}
