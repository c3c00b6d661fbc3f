/** The Comparison as a PDF. In: a comparison, assets, its text. Out: the file, with comparison.json attached. Everything printed comes from the comparison. */
import { inks } from '../brand/brand.ts';
import type { Assets } from '../page/assets.ts';
import { comparisonView } from '../page/comparison.ts';
import { Templates } from '../page/handlebars.ts';
import type { Comparison } from '../record/comparison.ts';
import { UserError } from '../shell/types.ts';
import { renderPdf } from './render.ts';
import type { PdfOutput, PdfSection } from './types.ts';

/** A long table is laid out in parts, so that one chapter never fills the memory. */
const ROWS_A_SECTION = 400;

const none = (what: string) => (): never => {
  throw new Error(`A comparison has no ${what}.`);
};

export function comparisonPdf(comparison: Comparison, assets: Assets, comparisonText: string): Promise<PdfOutput> {
  const { plant, from, to, tool } = comparison;
  return renderPdf({
    sections: sectionsOf(comparison, new Templates(assets.templates)),
    chart: none('chart'),
    picture: none('picture'),
    title: `${plant}: vibration reports ${from} to ${to}`,
    author: `${tool.name} ${tool.version}`,
    subject: 'Comparison of vibration reports',
    language: 'en',
    date: to,
    paper: comparison.paper,
    runningLeft: plant,
    runningRight: `${from} to ${to}`,
    footerLeft: 'Comparison of records. Screening by overall values, not a diagnosis',
    pageOf: (page, pages) => `Page ${page} of ${pages}`,
    mark: null,
    inks: inks('light', comparison.accent),
    fonts: assets.pdfFonts,
    tags: true,
    profile: 'PDF/A-3b',
    attachments: [
      {
        name: 'comparison.json',
        mime: 'application/json',
        description: 'The comparison that this document prints',
        bytes: new TextEncoder().encode(comparisonText),
      },
    ],
  });
}

function* sectionsOf(comparison: Comparison, templates: Templates): Iterable<PdfSection> {
  const view = comparisonView(comparison);
  yield { template: 'pdf/comparison', html: cautioned(templates.render('pdf/comparison', { view, cautions: comparison.cautions })) };
  for (const chapter of view.chapters) {
    for (let at = 0; at === 0 || at < chapter.rows.length; at += ROWS_A_SECTION) {
      const html = templates.render('pdf/comparison-chapter', {
        chapter: { ...chapter, rows: chapter.rows.slice(at, at + ROWS_A_SECTION) },
      });
      yield {
        template: 'pdf/comparison-chapter',
        html: at === 0 ? html : html.replace(/<section id="[^"]*">\s*<h1[\s\S]*?<\/p>/, '<section>'),
      };
    }
  }

  function cautioned(html: string): string {
    if (html.split('class="caution"').length - 1 < comparison.cautions.length)
      throw new UserError(
        'The template pdf/comparison leaves out the cautions; no comparison is made without them.',
        'Keep {{> shared/cautions}} in it.',
      );
    return html;
  }
}
