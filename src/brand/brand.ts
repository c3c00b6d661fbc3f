/**
 * The brand: one palette for both media. In: light or dark, the contractor's accent. Out: a hex colour for each ink. Quiet
 * paper and ink; slate, ochre and brick only in zone marks and bands; teal for links and the last reading.
 */
import { contrast, isHex, TEXT_CONTRAST } from '../words/legible.ts';

export type BrandInk =
  | 'ink'
  | 'quiet'
  | 'rule'
  | 'paper'
  | 'teal'
  | 'zone-a'
  | 'zone-b'
  | 'zone-c'
  | 'zone-d'
  | 'band-a'
  | 'band-b'
  | 'band-c'
  | 'band-d';

const LIGHT: Readonly<Record<BrandInk, string>> = {
  ink: '#23211d',
  quiet: '#625d53',
  rule: '#cfc8b8',
  paper: '#ffffff',
  teal: '#0b6a6a',
  'zone-a': '#5d6a70',
  'zone-b': '#4f6b80',
  'zone-c': '#9a6a10',
  'zone-d': '#9c3a26',
  'band-a': '#fbfaf7',
  'band-b': '#eef1f3',
  'band-c': '#f8efdc',
  'band-d': '#f6e2dc',
};

const DARK: Readonly<Record<BrandInk, string>> = {
  ink: '#ece7db',
  quiet: '#b3ac9c',
  rule: '#4a463e',
  paper: '#1d1b18',
  teal: '#63c3bf',
  'zone-a': '#a9b3b8',
  'zone-b': '#9db7cb',
  'zone-c': '#e0b45c',
  'zone-d': '#ea8d76',
  'band-a': '#211f1c',
  'band-b': '#262a2d',
  'band-c': '#332b1b',
  'band-d': '#38231d',
};

/** The palette; the contractor's accent (`#rrggbb`) takes the place of teal where it can be read on the paper. */
export function inks(mode: 'light' | 'dark', accent: string | null): Readonly<Record<BrandInk, string>> {
  const palette = mode === 'light' ? LIGHT : DARK;
  const usable = accent !== null && isHex(accent) && contrast(accent, palette.paper) >= TEXT_CONTRAST;
  return usable ? { ...palette, teal: accent.toLowerCase() } : palette;
}
