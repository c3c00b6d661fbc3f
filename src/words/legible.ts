/** Whether words can be read: contrast of two colours by WCAG 2.2. In: `#rrggbb`. Out: a ratio from 1 to 21, or the nearest colour that text can have on white. */

/** Contrast that text needs against the paper (WCAG 2.2, 1.4.3). */
export const TEXT_CONTRAST = 4.5;

function channel(hex: string, at: number): number {
  const value = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
  return value <= 0.04045 ? value / 12.92 : Math.exp(2.4 * Math.log((value + 0.055) / 1.055));
}

const luminance = (hex: string): number => 0.2126 * channel(hex, 1) + 0.7152 * channel(hex, 3) + 0.0722 * channel(hex, 5);

/** Contrast ratio of two colours by WCAG. */
export function contrast(a: string, b: string): number {
  const [x, y] = [luminance(a), luminance(b)];
  return (Math.max(x, y) + 0.05) / (Math.min(x, y) + 0.05);
}

/** `#rrggbb`. */
export const isHex = (text: string): boolean => /^#[0-9a-f]{6}$/i.test(text);

/** The colour itself where it can be read on the paper, else the lightest of its hue that can; null for what is no `#rrggbb`. */
export function readableAccent(accent: string): string | null {
  if (!isHex(accent)) return null;
  const given = accent.toLowerCase();
  if (contrast(given, WHITE) >= TEXT_CONTRAST) return given;
  const part = (at: number): number => Number.parseInt(given.slice(at, at + 2), 16);
  const channels = [part(1), part(3), part(5)];
  for (let step = STEPS - 1; step > 0; step -= 1) {
    const darker = `#${channels
      .map((c) =>
        Math.round((c * step) / STEPS)
          .toString(16)
          .padStart(2, '0'),
      )
      .join('')}`;
    if (contrast(darker, WHITE) >= TEXT_CONTRAST) return darker;
  }
  return '#000000';
}

const WHITE = '#ffffff';
/** A colour is darkened by this part of itself at a time. */
const STEPS = 256;
