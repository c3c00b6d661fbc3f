/**
 * Stacking boxes onto pages. In: boxes in order. Out: pages drawn through the pen. Never: an orphan heading, a header row
 * without a row under it, a box cut off at the foot.
 */
import type { Box } from './block.ts';
import type { Pen } from './pen.ts';
import { MARGIN, PAPER } from './sheet.ts';

export class Flow {
  readonly #pen: Pen;
  readonly #bottom: number;
  readonly pageHeight: number;
  readonly width: number;
  #y = 0;
  #fresh = true;

  constructor(pen: Pen, paper: 'A4' | 'Letter') {
    this.#pen = pen;
    this.#bottom = PAPER[paper].height - MARGIN.bottom;
    this.pageHeight = this.#bottom - MARGIN.top;
    this.width = PAPER[paper].width - MARGIN.left - MARGIN.right;
  }

  #newPage(): void {
    this.#pen.newPage();
    this.#y = MARGIN.top;
    this.#fresh = true;
  }

  add(boxes: readonly Box[]): void {
    /** Sections kept together that are more than a page with what leads to them are let go up to here. */
    let loose = 0;
    for (let i = 0; i < boxes.length; i += 1) {
      const box = boxes[i] as Box;
      if (this.#pen.pages.length === 0 || (box.newPage === true && !this.#fresh)) this.#newPage();
      const whole = chainOf(boxes, i, true);
      if (whole.height > this.pageHeight) loose = Math.max(loose, whole.end);
      const need = i < loose ? chainOf(boxes, i, false).height : whole.height;
      const room = this.#bottom - this.#y - box.before;
      if (!this.#fresh && need > room + 0.01 && (need <= this.pageHeight || leastOf(box) > room)) {
        this.#newPage();
        this.#repeatHeader(box);
      }
      this.#placeTall(box);
    }
  }

  /** Places a box; one taller than the page is split as often as it takes. */
  #placeTall(box: Box): void {
    let rest: Box = box;
    for (;;) {
      const room = this.#bottom - this.#y - (this.#fresh ? 0 : rest.before);
      if (rest.height <= room + 0.01) break;
      const parts = rest.split?.(room) ?? null;
      if (parts === null) break;
      this.#place(parts[0]);
      rest = { ...parts[1], anchor: null };
      this.#newPage();
      this.#repeatHeader(rest);
    }
    this.#place(rest);
  }

  #repeatHeader(box: Box): void {
    if (box.header == null || box.header.height > this.pageHeight / 3) return;
    box.header.draw(this.#pen, MARGIN.left, this.#y);
    this.#y += box.header.height;
  }

  #place(box: Box): void {
    if (!this.#fresh) this.#y += box.before;
    const { page } = this.#pen;
    if (box.anchor != null) this.#pen.targets.set(box.anchor, { page, y: this.#y });
    if (box.heading !== undefined) this.#pen.outline.push({ ...box.heading, page, y: this.#y });
    box.draw(this.#pen, MARGIN.left, this.#y);
    this.#y += box.height;
    if (box.height > 0) this.#fresh = false;
  }
}

/** What must fit where a box begins: a tall one may be split after its least part. */
const leastOf = (box: Box): number => Math.min(box.height, box.least ?? box.height);

/** Height of a box and those it must stay with, and the index after them. */
function chainOf(boxes: readonly Box[], from: number, withSections: boolean): { readonly height: number; readonly end: number } {
  let height = 0;
  let end = from;
  for (; end < boxes.length; end += 1) {
    const box = boxes[end] as Box;
    const goesOn = end + 1 < boxes.length && (box.keepNext || (withSections && box.keepInSection === true));
    height += (goesOn ? box.height : leastOf(box)) + (end === from ? 0 : box.before);
    if (!goesOn) break;
  }
  return { height, end: end + 1 };
}
