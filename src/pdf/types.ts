/**
 * What the PDF writer takes and gives. In: sections of the closed HTML subset, drawings and pictures by key, a brand.
 * Out: bytes of one PDF. Never: the Record, the disk, the clock.
 */
import type { Drawing } from '../chart/drawing.ts';
import type { FontFiles } from '../page/assets.ts';

export interface PdfSection {
  /** Name of the template the markup came from, for errors. */
  readonly template: string;
  /** One or more `section` elements in the closed subset of the design. */
  readonly html: string;
}

export interface PdfAttachment {
  /** Fixed lower-case ASCII. */
  readonly name: string;
  readonly mime: string;
  readonly description: string;
  readonly bytes: Uint8Array;
}

export interface PdfInput {
  readonly sections: Iterable<PdfSection>;
  /** Drawing of a `figure[data-chart]` or `td figure`; throws on an unknown key. */
  readonly chart: (kind: string, key: string) => Drawing;
  /** JPEG or PNG bytes of a `figure[data-photo]` or `[data-logo]`. */
  readonly picture: (kind: 'photo' | 'logo', key: string) => Uint8Array;
  readonly title: string;
  readonly author: string;
  readonly subject: string;
  /** BCP 47, e.g. `en`. */
  readonly language: string;
  /** `YYYY-MM-DD`: the creation date written into the file (the survey's, never the clock's). */
  readonly date: string;
  readonly paper: 'A4' | 'Letter';
  /** Running header, left and right; the footer's left. Footer's right is page x of y. */
  readonly runningLeft: string;
  readonly runningRight: string;
  readonly footerLeft: string;
  /** `Page {page} of {pages}` in the report's language. */
  readonly pageOf: (page: number, pages: number) => string;
  /** Printed large across the margin of each page when it is a draft, else null. */
  readonly mark: string | null;
  /** Hex colours by ink name, from brand/. */
  readonly inks: Readonly<Record<string, string>>;
  readonly fonts: FontFiles;
  readonly tags: boolean;
  readonly profile: 'PDF/A-3b' | 'PDF/A-1b';
  readonly attachments: readonly PdfAttachment[];
}

export interface PdfOutput {
  readonly bytes: Uint8Array;
  readonly pages: number;
}
