/** What the writers need from the package and the plant, read once by shell/ and handed on: templates, fonts, pictures. */

/** TrueType files. A character that the text faces lack is set in the fallback; one that neither has is printed as its code, such as [U+1FAE0]. */
export interface FontFiles {
  readonly regular: Uint8Array;
  readonly bold: Uint8Array;
  readonly italic: Uint8Array;
  readonly boldItalic: Uint8Array;
  readonly fallback: Uint8Array;
  readonly fallbackBold: Uint8Array;
}

export interface Assets {
  /** Template sources by path below templates/, e.g. `pdf/control.hbs`; a plant's own of the same path already in place. */
  readonly templates: ReadonlyMap<string, string>;
  readonly pdfFonts: FontFiles;
  /** File name → bytes of the WOFF2 faces the site ships. */
  readonly siteFonts: ReadonlyMap<string, Uint8Array>;
  /** Bytes of a photo or logo by its path in the plant folder; null where it is gone. */
  readonly picture: (path: string) => Uint8Array | null;
  /** Bytes of an input file of the plant, for attaching; null where it is gone. */
  readonly input: (path: string) => Uint8Array | null;
}
