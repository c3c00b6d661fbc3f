/** Measures of the sheet, points: paper, margins, type sizes. */
export const PAPER = { A4: { width: 595.28, height: 841.89 }, Letter: { width: 612, height: 792 } } as const;

export const MARGIN = { left: 52, right: 52, top: 66, bottom: 58 } as const;

export interface TextStyle {
  readonly size: number;
  readonly leading: number;
  readonly bold: boolean;
  readonly italic: boolean;
  readonly ink: string;
  readonly before: number;
}

const style = (size: number, leading: number, before: number, more: Partial<TextStyle> = {}): TextStyle => ({
  size,
  leading,
  before,
  bold: false,
  italic: false,
  ink: 'ink',
  ...more,
});

export const STYLES = {
  h1: style(20, 24, 26, { bold: true }),
  h2: style(13.5, 17, 18, { bold: true }),
  h3: style(10.5, 13.5, 12, { bold: true }),
  p: style(9.5, 13, 6),
  lead: style(12, 16, 6),
  note: style(8.2, 11, 4, { ink: 'quiet' }),
  caution: style(8.8, 12, 4),
  li: style(9.5, 13, 2.5),
  td: style(8.4, 10.8, 0),
  th: style(7.8, 10, 0, { ink: 'quiet', bold: true }),
  caption: style(8.2, 11, 4, { ink: 'quiet' }),
  running: style(7.6, 10, 0, { ink: 'quiet' }),
} as const;
