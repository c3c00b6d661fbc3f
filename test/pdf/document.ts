/** Small documents for the PDF tests, and their text as pdfjs reads it back. */
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { inks } from '../../src/brand/brand.ts';
import type { Drawing } from '../../src/chart/drawing.ts';
import type { FontFiles } from '../../src/page/assets.ts';
import { renderPdf } from '../../src/pdf/render.ts';
import type { PdfInput, PdfOutput } from '../../src/pdf/types.ts';

const require = createRequire(import.meta.url);
const file = (name: string, path: string): Uint8Array =>
  new Uint8Array(readFileSync(join(dirname(require.resolve(`${name}/package.json`)), path)));

export const FONTS: FontFiles = {
  regular: file('source-sans', 'TTF/SourceSans3-Regular.ttf'),
  bold: file('source-sans', 'TTF/SourceSans3-Bold.ttf'),
  italic: file('source-sans', 'TTF/SourceSans3-It.ttf'),
  boldItalic: file('source-sans', 'TTF/SourceSans3-BoldIt.ttf'),
  fallback: file('dejavu-fonts-ttf', 'ttf/DejaVuSans.ttf'),
  fallbackBold: file('dejavu-fonts-ttf', 'ttf/DejaVuSans-Bold.ttf'),
};

const CHART: Drawing = {
  width: 60,
  height: 14,
  alt: 'a trend',
  shapes: [{ kind: 'path', d: 'M0 10L20 4L40 8L60 2', fill: null, stroke: 'ink', strokeWidth: 0.8, dash: [] }],
};

export function pdf(html: string, more: Partial<PdfInput> = {}): Promise<PdfOutput> {
  return renderPdf({
    sections: [{ template: 'test', html }],
    chart: () => CHART,
    picture: () => {
      throw new Error('no picture');
    },
    title: 'A & B <test>',
    author: 'Nobody',
    subject: 'Test',
    language: 'en',
    date: '2026-01-14',
    paper: 'A4',
    runningLeft: 'Left',
    runningRight: 'Right',
    footerLeft: 'Foot',
    pageOf: (page, pages) => `Page ${page} of ${pages}`,
    mark: 'DRAFT',
    inks: inks('light', null),
    fonts: FONTS,
    tags: true,
    profile: 'PDF/A-3b',
    attachments: [{ name: 'record.json', mime: 'application/json', description: 'the record', bytes: new TextEncoder().encode('{}') }],
    ...more,
  });
}

interface Item {
  readonly str: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
}

export interface ReadPage {
  readonly text: string;
  readonly items: readonly Item[];
  readonly width: number;
  readonly height: number;
}

/** The document as pdfjs opens it. */
export async function open(bytes: Uint8Array) {
  const pdfjs = await import('pdfjs-dist/legacy/build/pdf.mjs');
  return pdfjs.getDocument({ data: bytes.slice(), useSystemFonts: false, verbosity: 0 }).promise;
}

export async function read(bytes: Uint8Array): Promise<ReadPage[]> {
  const document = await open(bytes);
  const pages: ReadPage[] = [];
  for (let n = 1; n <= document.numPages; n += 1) {
    const page = await document.getPage(n);
    const content = await page.getTextContent();
    const [, , width = 0, height = 0] = page.view;
    const items = content.items.flatMap((item) =>
      'str' in item ? [{ str: item.str, x: item.transform[4] as number, y: item.transform[5] as number, width: item.width }] : [],
    );
    pages.push({
      text: items
        .map((i) => i.str)
        .join(' ')
        .replace(/\s+/g, ' '),
      items,
      width,
      height,
    });
  }
  return pages;
}

/** Text of all pages without running header, footer and draft mark. */
export const body = (pages: readonly ReadPage[]): string =>
  pages
    .map((p) => p.text.replace(/\bLeft\b|\bRight\b|\bFoot\b|\bDRAFT\b|Page \d+ of \d+/g, ' '))
    .join(' ')
    .replace(/\s+/g, ' ')
    .trim();
