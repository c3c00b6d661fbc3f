/** The style sheet's colours from the brand; the rest of it is templates/site/style.css. */
import { inks } from '../brand/brand.ts';

const rules = (palette: Readonly<Record<string, string>>): string =>
  Object.entries(palette)
    .map(([ink, hex]) => `--${ink}:${hex};`)
    .join('');

const classes = (palette: Readonly<Record<string, string>>): string =>
  Object.keys(palette)
    .map((ink) => `.f-${ink}{fill:var(--${ink})}.s-${ink}{stroke:var(--${ink})}`)
    .join('\n');

/** Colours by ink, light and dark, and the fill and stroke classes of drawings. */
export function inkStyles(accent: string | null): string {
  const light = inks('light', accent);
  return `:root{color-scheme:light dark;${rules(light)}}\n@media screen and (prefers-color-scheme:dark){:root{${rules(inks('dark', accent))}}}\n.f-none{fill:none}\n${classes(light)}\n`;
}
