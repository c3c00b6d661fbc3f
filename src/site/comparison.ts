/** The Comparison as a static site: a page a chapter. In: a comparison and assets. Out: files. Never: a page without the cautions. */
import Handlebars from 'handlebars';
import type { Assets } from '../page/assets.ts';
import { comparisonView } from '../page/comparison.ts';
import { Templates } from '../page/handlebars.ts';
import type { Comparison } from '../record/comparison.ts';
import { type OutputFile, UserError } from '../shell/types.ts';
import { inkStyles } from './style.ts';

export function* comparisonSite(comparison: Comparison, assets: Assets): Iterable<OutputFile> {
  const templates = new Templates(assets.templates);
  const { chapters, ...first } = comparisonView(comparison);
  yield { path: 'style.css', bytes: inkStyles(comparison.accent) + templates.text('site/style.css') };
  yield { path: 'script.js', bytes: templates.text('site/script.js') };
  for (const [name, bytes] of assets.siteFonts) yield { path: `fonts/${name}`, bytes };
  const links = [{ href: 'index.html', label: 'Questions' }, ...chapters.map(({ id, title }) => ({ href: `${id}.html`, label: title }))];
  const page = (path: string, title: string, model: object): OutputFile => {
    const { plant, from, to, cautions, tool, records } = comparison;
    const bytes = templates.render('site/comparison', {
      language: 'en',
      title,
      plant,
      survey: `${from} to ${to}`,
      status: `comparison of ${records.length} records`,
      up: '',
      nav: links.map((link) => ({ ...link, isHere: link.href === path })),
      cautions,
      tool: `${tool.name} ${tool.version}`,
      ...model,
    });
    if (cautions.some((caution) => !bytes.includes(Handlebars.escapeExpression(caution))))
      throw new UserError(
        'The template site/comparison leaves out the cautions; no site is made without them.',
        'Keep {{> site/foot}} at its end.',
      );
    return { path, bytes };
  };
  yield page('index.html', 'The years side by side', { chapter: null, ...first });
  for (const chapter of chapters) yield page(`${chapter.id}.html`, chapter.title, { chapter });
}
