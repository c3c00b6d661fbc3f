/**
 * The brand: one palette for both media. In: light or dark, the contractor's accent. Out: a hex colour for each ink. Quiet
 * paper and ink; slate, ochre and brick only in zone marks and bands; teal for links and the last reading.
 */
export type BrandInk = 'ink' | 'quiet' | 'rule' | 'paper' | 'teal' | 'zone-a' | 'zone-b' | 'zone-c' | 'zone-d' | 'band-a' | 'band-b' | 'band-c' | 'band-d';

const LIGHT: Readonly<Record<BrandInk, string>> = {
  ink: '#23211d', quiet: '#625d53', rule: '#cfc8b8', paper: '#ffffff', teal: '#0b6a6a', 'zone-a': '#5d6a70', 'zone-b': '#4f6b80', 'zone-c': '#9a6a10', 'zone-d': '#9c3a26',
  'band-a': '#fbfaf7', 'band-b': '#eef1f3', 'band-c': '#f8efdc', 'band-d': '#f6e2dc',
};

const DARK: Readonly<Record<BrandInk, string>> = {
  ink: '#ece7db', quiet: '#b3ac9c', rule: '#4a463e', paper: '#1d1b18', teal: '#63c3bf', 'zone-a': '#a9b3b8', 'zone-b': '#9db7cb', 'zone-c': '#e0b45c', 'zone-d': '#ea8d76',
  'band-a': '#211f1c', 'band-b': '#262a2d', 'band-c': '#332b1b', 'band-d': '#38231d',
};

/** Contrast that text needs against the paper (WCAG 2.2, 1.4.3). */
const TEXT_CONTRAST = 4.5;

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

/** The palette; the contractor's accent (`#rrggbb`) takes the place of teal where it can be read on the paper. */
export function inks(mode: 'light' | 'dark', accent: string | null): Readonly<Record<BrandInk, string>> {
  const palette = mode === 'light' ? LIGHT : DARK;
  const usable = accent !== null && /^#[0-9a-f]{6}$/i.test(accent) && contrast(accent, palette.paper) >= TEXT_CONTRAST;
  return usable ? { ...palette, teal: accent.toLowerCase() } : palette;
}
