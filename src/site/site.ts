/**
 * The static site. In: a record and assets. Out: files, pages made one by one. Never: a request to anywhere, an inline
 * style or script; every page is complete without JavaScript and carries the cautions.
 */
import Handlebars from 'handlebars';
import { toSvg } from '../chart/svg.ts';
import { rankedViews } from '../page/actions.ts';
import type { Assets } from '../page/assets.ts';
import { Charts, seriesId } from '../page/charts.ts';
import { acceptedView, changesView, controlView, coverageView, noticesView, peopleView } from '../page/control.ts';
import { methodView, overTimeView } from '../page/method.ts';
import { exceptionView, photoFile } from '../page/exception.ts';
import { Format } from '../page/format.ts';
import { Templates } from '../page/handlebars.ts';
import { governingMeasurement, machineView } from '../page/machines.ts';
import { managerView, settledViews } from '../page/manager.ts';
import { URGENCIES } from '../plant/types.ts';
import type { RecordMachine, RecordMeasurement, SwayfolioRecord } from '../record/types.ts';
import { type OutputFile, UserError } from '../shell/types.ts';
import { naturalOrder } from '../words/natural.ts';
import { withoutMetadata } from './photo.ts';
import { inkStyles } from './style.ts';

export interface SiteOptions {
  /** report.pdf was written beside the site. */
  readonly pdf: boolean;
  readonly recordText: string;
  /** That machine's page and the index only. */
  readonly machine?: string;
}

const PAGES = [
  { href: 'index.html', label: 'page.what_to_do_first' },
  { href: 'actions.html', label: 'view.actions' },
  { href: 'machines.html', label: 'page.machines' },
  { href: 'coverage.html', label: 'page.coverage' },
  { href: 'method.html', label: 'page.method_and_limits' },
  { href: 'downloads.html', label: 'page.downloads' },
] as const;

/** A drawing as markup that needs no escaping: svg.ts escapes its words, the rest of it is numbers. */
const svgOf = (charts: Charts, kind: string, m: RecordMeasurement, decorative = false): Handlebars.SafeString =>
  new Handlebars.SafeString(
    toSvg(charts.drawing(kind, seriesId(m)), { decorative, ...(kind === 'sparkline' ? { className: 'spark' } : {}) }),
  );

export function* site(record: SwayfolioRecord, assets: Assets, options: SiteOptions): Iterable<OutputFile> {
  const format = new Format(record);
  const charts = new Charts(format);
  const pages = new Pages(format, new Templates(assets.templates, format.language));
  const only = options.machine;
  yield* furniture(record, assets, pages);
  if (only === undefined) yield* listPages(format, charts, pages, options);
  else yield pages.page('index', 'index.html', format.say('page.what_to_do_first'), firstPage(format));
  for (const machine of format.record.machines)
    if (only === undefined || machine.machine === only) yield machinePage(format, charts, pages, machine);
  for (const photo of record.survey.photos) {
    const bytes = only === undefined || photo.machine === only ? assets.picture(photo.path) : null;
    if (bytes !== null) yield { path: `photos/${photoFile(photo.path)}`, bytes: withoutMetadata(bytes) };
  }
}

class Pages {
  readonly #format: Format;
  readonly templates: Templates;

  constructor(format: Format, templates: Templates) {
    this.#format = format;
    this.templates = templates;
  }

  /** Throws UserError for a template of the plant's own that leaves out the cautions. */
  page(template: string, path: string, title: string, model: object): OutputFile {
    const format = this.#format;
    const { plant, survey, issue, cautions, tool } = format.record;
    const up = '../'.repeat(path.split('/').length - 1);
    const html = this.templates.render(`site/${template}`, {
      language: plant.language,
      title,
      plant: plant.plant,
      survey: format.survey(survey.id),
      status:
        issue === null ? format.say('view.draft.site') : format.say('view.revision', { number: issue.number, revision: issue.revision }),
      up,
      nav: PAGES.map((p) => ({ href: p.href, label: format.say(p.label), isHere: p.href === path })),
      cautions,
      tool: `${tool.name} ${tool.version}`,
      ...model,
    });
    const missing = cautions.find((c) => !html.includes(Handlebars.escapeExpression(c)));
    if (missing !== undefined)
      throw new UserError(
        `The template site/${template} leaves out the cautions; no site is made without them.`,
        'Keep {{> site/foot}} at its end.',
      );
    return { path, bytes: html };
  }
}

function* furniture(record: SwayfolioRecord, assets: Assets, pages: Pages): Iterable<OutputFile> {
  yield { path: 'style.css', bytes: inkStyles(record.plant.contractor.accent) + pages.templates.text('site/style.css') };
  yield { path: 'script.js', bytes: pages.templates.text('site/script.js') };
  for (const [name, bytes] of assets.siteFonts) yield { path: `fonts/${name}`, bytes };
}

function firstPage(format: Format): object {
  const manager = managerView(format);
  return { manager, hasLines: manager.lines.length > 0 };
}

function* listPages(format: Format, charts: Charts, pages: Pages, options: SiteOptions): Iterable<OutputFile> {
  const first = firstPage(format);
  const actions = rankedViews(format);
  const settled = settledViews(format);
  yield pages.page('index', 'index.html', format.say('page.what_to_do_first'), first);
  yield pages.page('actions', 'actions.html', format.say('page.ranked_actions'), {
    actions,
    hasActions: actions.length > 0,
    settled,
    hasSettled: settled.length > 0,
  });
  yield pages.page('machines', 'machines.html', format.say('page.machines'), machineList(format, charts));
  yield pages.page('coverage', 'coverage.html', format.say('page.coverage'), {
    ...first,
    coverage: coverageView(format),
    overTime: overTimeView(format),
    accepted: acceptedView(format),
    changes: changesView(format),
    notices: noticesView(format),
  });
  yield pages.page('method', 'method.html', format.say('page.method_and_limits'), {
    method: methodView(format),
    people: peopleView(format),
  });
  yield pages.page('downloads', 'downloads.html', format.say('page.downloads'), {
    hasPdf: options.pdf,
    method: methodView(format),
    control: controlView(format),
  });
}

function machineList(format: Format, charts: Charts): object {
  const { record } = format;
  const machines = record.machines.map((machine) => {
    const view = machineView(format, charts, machine);
    const m = governingMeasurement(format, machine);
    return { ...view, svg: view.hasChart && m !== null ? svgOf(charts, 'sparkline', m, true) : '' };
  });
  const areas = [...new Set(machines.map((m) => m.area).filter((a) => a !== ''))].sort(naturalOrder);
  const order = ['D', 'r-D', 'C', 'r-C', 'B', 'r-B', 'A', 'r-A', 'none'];
  const marks = [...new Set(machines.map((m) => m.condition.mark))].sort((a, b) => order.indexOf(a) - order.indexOf(b));
  const conditions = marks.map((mark) => ({ mark, text: mark === 'none' ? format.term('not assessed') : mark }));
  return {
    machines,
    areas,
    conditions,
    urgencies: URGENCIES.map((u) => format.urgency(u)).filter((u) => machines.some((m) => m.urgency === u)),
  };
}

function machinePage(format: Format, charts: Charts, pages: Pages, machine: RecordMachine): OutputFile {
  const view = exceptionView(format, charts, machine);
  const measurements = format.measurementsOf(machine.machine);
  const main = governingMeasurement(format, machine);
  const readings = measurements.map((m, i) => ({
    view: view.readings[i],
    svg: m.history.value.some((v) => v !== null) ? svgOf(charts, 'sparkline', m) : '',
  }));
  const polars = measurements
    .filter((m) => m.phase !== null && m.phase.amplitude !== null)
    .map((m, i) => ({ svg: svgOf(charts, 'polar', m), caption: view.polars[i]?.caption ?? '' }));
  return pages.page('machine', view.machine.page, view.title, {
    view,
    history: view.hasHistory && main !== null ? svgOf(charts, 'history', main) : '',
    readings,
    polars,
    hasComponents: view.components.length > 0,
  });
}
