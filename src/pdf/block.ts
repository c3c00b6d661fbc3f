/**
 * What blocks are to the flow: boxes of known height that can draw themselves, and pictures scaled to their room.
 */
import type { Drawing } from '../chart/drawing.ts';
import type { PdfImage } from './image.ts';
import { type InlineContext, plainText } from './inline.ts';
import type { Element } from './markup.ts';
import type { OutlineEntry, Pen } from './pen.ts';
import type { Node } from './tags.ts';

export interface Box {
  readonly height: number;
  /** Blank above, dropped at the top of a page. */
  readonly before: number;
  /** Stays on one page with the next box. */
  keepNext: boolean;
  /** Stays with the next box where the whole section fits on a page. */
  keepInSection?: boolean;
  /** Repeated at the top of each further page while its table goes on. */
  readonly header?: { readonly height: number; draw(pen: Pen, x: number, y: number): void } | null;
  /** Begins a page. */
  newPage?: boolean;
  anchor?: string | null;
  readonly heading?: Omit<OutlineEntry, 'page' | 'y'>;
  draw(pen: Pen, x: number, y: number): void;
  /** Height of the least first part of a box that may be split at the foot of a page. */
  readonly least?: number;
  /** The part that fits into `room` and the rest; null when nothing sensible fits. */
  split?(room: number): readonly [Box, Box] | null;
}

export interface BlockContext extends InlineContext {
  readonly width: number;
  readonly pageHeight: number;
  readonly template: string;
  readonly chart: (kind: string, key: string) => Drawing;
  readonly picture: (kind: 'photo' | 'logo', key: string) => PdfImage;
}

/** The drawing or picture of a figure: its size and how it is drawn under a node. */
export interface Picture {
  readonly width: number;
  readonly height: number;
  draw(pen: Pen, node: Node, x: number, y: number): void;
}

/** Room left on a page for the caption and heading of a figure as tall as it may be, points. */
const CAPTION_ROOM = 60;
const PHOTO_HEIGHT = 190;
const LOGO_HEIGHT = 40;

export function pictureOf(context: BlockContext, figure: Element, width: number): Picture {
  const { 'data-chart': chart, 'data-photo': photo, 'data-logo': logo, 'data-key': key = '' } = figure.attributes;
  if (chart !== undefined) {
    const drawing = context.chart(chart, key);
    const scale = Math.min(1, width / drawing.width, (context.pageHeight - CAPTION_ROOM) / drawing.height);
    return {
      width: drawing.width * scale,
      height: drawing.height * scale,
      draw: (pen, node, x, y) => pen.drawing(node, drawing, x, y, scale),
    };
  }
  const image = context.picture(photo !== undefined ? 'photo' : 'logo', photo ?? logo ?? key);
  const scale = Math.min(width / image.width, (photo !== undefined ? PHOTO_HEIGHT : LOGO_HEIGHT) / image.height);
  return {
    width: image.width * scale,
    height: image.height * scale,
    draw: (pen, node, x, y) => pen.image(node, image, x, y, image.width * scale, image.height * scale),
  };
}

export function altOf(context: BlockContext, figure: Element): string {
  const { 'data-alt': alt, 'data-chart': chart, 'data-key': key = '' } = figure.attributes;
  return alt !== undefined && alt !== '' ? alt : chart !== undefined ? context.chart(chart, key).alt : plainText(figure);
}
