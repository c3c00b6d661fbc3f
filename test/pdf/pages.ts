/** Markup for the layout tests, and what holds of every page read back. */
import { expect } from 'vitest';
import { body, type ReadPage } from './document.ts';

export const words = (count: number, stem = 'word'): string[] => Array.from({ length: count }, (_, i) => `${stem}${i}`);
export const fill = (count: number): string =>
  words(count, 'fill')
    .map((w) => `<p>${w}</p>`)
    .join('');
export const of = (pages: readonly ReadPage[], stem: RegExp): string[] =>
  body(pages)
    .split(' ')
    .filter((w) => stem.test(w));
export const row = (...cells: string[]): string => `<tr>${cells.map((c) => `<td>${c}</td>`).join('')}</tr>`;
export const table = (columns: readonly string[], rows: string): string =>
  `<table>${columns.map((c) => `<col class="${c}">`).join('')}<tbody>${rows}</tbody></table>`;

/** Margins of the sheet, points: text stands between the running head and the footer. */
export function inside(pages: readonly ReadPage[]): void {
  for (const page of pages) {
    for (const item of page.items) {
      if (item.str.trim() === '' || /^(Left|Right|Foot|DRAFT|Page \d+ of \d+)$/.test(item.str)) continue;
      expect(item.x, item.str).toBeGreaterThanOrEqual(51.9);
      expect(item.x + item.width, item.str).toBeLessThanOrEqual(page.width - 51.5);
      expect(item.y, item.str).toBeGreaterThanOrEqual(57.9);
      expect(item.y, item.str).toBeLessThanOrEqual(page.height - 60);
    }
  }
}
