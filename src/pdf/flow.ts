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
    for (let i = 0; i < boxes.length; i += 1) {
      const box = boxes[i] as Box;
      if (this.#pen.pages.length === 0 || (box.newPage === true && !this.#fresh)) this.#newPage();
      const chain = chainHeight(boxes, i);
      const room = this.#bottom - this.#y - (this.#fresh ? 0 : box.before);
      if (chain > room && !this.#fresh && (chain <= this.pageHeight || box.height > room)) {
        if (box.split === undefined || !this.#placeSplit(box, room)) {
          this.#newPage();
          this.#repeatHeader(box);
          this.#placeTall(box);
        }
      } else this.#placeTall(box);
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

  /** Splits a row at the foot of a page only when it is too tall for most of a page: short rows move on whole. */
  #placeSplit(box: Box, room: number): boolean {
    if (box.height < this.pageHeight * 0.5) return false;
    const parts = box.split?.(room) ?? null;
    if (parts === null) return false;
    this.#place({ ...parts[0], anchor: box.anchor ?? null });
    this.#newPage();
    this.#repeatHeader(box);
    this.#placeTall(parts[1]);
    return true;
  }

  #repeatHeader(box: Box): void {
    if (box.header == null) return;
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

/** Height of a box and those it must stay with. */
function chainHeight(boxes: readonly Box[], from: number): number {
  let height = 0;
  for (let i = from; i < boxes.length; i += 1) {
    const box = boxes[i] as Box;
    height += box.height + (i === from ? 0 : box.before);
    if (!box.keepNext) break;
  }
  return height;
}
