/**
 * The report as a PDF. In: a record and assets. Out: the file. Sections are rendered one by one in the order of the report;
 * everything printed comes from the record.
 */
import { inks } from '../brand/brand.ts';
import type { Assets } from '../page/assets.ts';
import { rankedViews } from '../page/actions.ts';
import { Charts } from '../page/charts.ts';
import { acceptedView, changesView, controlView, coverageView, limitsToSetView, noticesView, peopleView } from '../page/control.ts';
import { methodView, overTimeView } from '../page/method.ts';
import { exceptionView } from '../page/exception.ts';
import { Format } from '../page/format.ts';
import { Templates } from '../page/handlebars.ts';
import { machineView, readingView } from '../page/machines.ts';
import { managerView, settledViews } from '../page/manager.ts';
import type { RecordMachine, SwayfolioRecord } from '../record/types.ts';
import { UserError } from '../shell/types.ts';
import { renderPdf } from './render.ts';
import type { PdfAttachment, PdfOutput, PdfSection } from './types.ts';

export interface ReportOptions {
  readonly tags: boolean;
  readonly profile: 'PDF/A-3b' | 'PDF/A-1b';
  readonly recordText: string;
  /** The manager's page, the list and the cautions only. */
  readonly brief?: boolean;
  /** One machine's pages and the cautions only. */
  readonly machine?: string;
}

const MOST_ATTACHED_BYTES = 20_000_000;
const READINGS_A_SECTION = 200;

/** Throws UserError for a template of the plant's own that leaves out the cautions. */
export function reportPdf(record: SwayfolioRecord, assets: Assets, options: ReportOptions): Promise<PdfOutput> {
  const format = new Format(record);
  const charts = new Charts(format);
  const templates = new Templates(assets.templates, format.language);
  const { plant, survey, issue } = record;
  return renderPdf({
    sections: withCautions(record, sectionsOf(format, charts, templates, options)),
    chart: (kind, key) => charts.drawing(kind, key),
    picture: (_kind, key) => {
      const bytes = assets.picture(key);
      if (bytes === null) throw new UserError(`The picture ${key} is not there.`, 'Put it back, or take it out of the plant folder.');
      return bytes;
    },
    title: format.say('view.pdf.title', { plant: plant.plant, survey: survey.id }),
    author: plant.contractor.name ?? format.say('view.not_stated'),
    subject: format.say('view.pdf.subject'),
    language: plant.language,
    date: survey.to,
    paper: plant.paper,
    runningLeft: plant.plant,
    runningRight: format.say('view.pdf.running', { survey: survey.id }),
    footerLeft: `${issue === null ? format.say('view.draft') : format.say('view.revision', { number: issue.number, revision: issue.revision })}. ${format.say('view.pdf.screening')}`,
    pageOf: (page, pages) => format.say('view.pdf.page', { page, pages }),
    mark: issue === null ? format.say('view.pdf.mark') : null,
    inks: inks('light', plant.contractor.accent),
    fonts: assets.pdfFonts,
    tags: options.tags,
    profile: options.profile,
    attachments: attachmentsOf(format, assets, options.recordText),
  });
}

/** Passes the sections on and refuses a report without its cautions. */
function* withCautions(record: SwayfolioRecord, sections: Iterable<PdfSection>): Iterable<PdfSection> {
  const missing = new Set(record.cautions.map(escaped));
  for (const section of sections) {
    for (const caution of missing) if (section.html.includes(caution)) missing.delete(caution);
    yield section;
  }
  if (missing.size > 0)
    throw new UserError(
      'The templates of this plant leave out the cautions; no report is made without them.',
      'Keep {{> shared/cautions}} in templates/pdf/end.hbs.',
    );
}

const ESCAPES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#x27;',
  '`': '&#x60;',
  '=': '&#x3D;',
};
const escaped = (text: string): string => text.replace(/[&<>"'`=]/g, (c) => ESCAPES[c] as string);

function* sectionsOf(format: Format, charts: Charts, templates: Templates, options: ReportOptions): Iterable<PdfSection> {
  const { record } = format;
  const render = (name: string, model: object): PdfSection => ({ template: `pdf/${name}`, html: templates.render(`pdf/${name}`, model) });
  const cautions = { cautions: record.cautions, coverage: coverageView(format) };
  const actions = rankedViews(format);
  const settled = settledViews(format);
  const manager = managerView(format);
  if (options.machine !== undefined) {
    const machine = record.machines.find((m) => m.machine === options.machine) as RecordMachine;
    yield render('exception', { ...exceptionView(format, charts, machine), startsPage: true });
    yield render('end', {
      ...cautions,
      coverage: { ...cautions.coverage, due: cautions.coverage.due.filter((c) => c.machine === machine.machine) },
    });
    return;
  }
  const exceptions = record.machines.filter((m) => m.urgency !== null);
  const ordered = byRank(
    exceptions,
    actions.map((a) => a.machine),
  );
  const bodies = options.brief === true ? [] : ordered;
  const shown = new Set(bodies.map((m) => m.machine));
  const unlinked = <T extends { readonly machineAnchor: string; readonly machine: string }>(list: readonly T[]) =>
    list.map((v) => (shown.has(v.machine) ? v : { ...v, machineAnchor: 'ranked' }));
  if (options.brief !== true) yield render('control', { control: controlView(format), contents: contentsOf(format, bodies.length > 0) });
  yield render('manager', {
    manager: { ...manager, groups: manager.groups.map((g) => ({ ...g, actions: unlinked(g.actions) })) },
    hasLines: manager.lines.length > 0,
  });
  yield render('ranked', {
    actions: unlinked(actions),
    hasActions: actions.length > 0,
    settled,
    hasSettled: settled.length > 0,
    notices: noticesView(format),
  });
  if (options.brief !== true) yield* bodySections(format, charts, render, bodies);
  yield render('end', cautions);
}

type Render = (name: string, model: object) => PdfSection;

function* bodySections(format: Format, charts: Charts, render: Render, exceptions: readonly RecordMachine[]): Iterable<PdfSection> {
  const { record } = format;
  yield render('coverage', { coverage: coverageView(format), accepted: acceptedView(format), changes: changesView(format) });
  const machines = record.machines.map((m) => machineView(format, charts, m));
  yield render('machines', { machines, overTime: overTimeView(format), overTimeAlt: charts.drawing('over-time', 'all').alt });
  let first = true;
  for (const machine of exceptions) {
    const section = render('exception', { ...exceptionView(format, charts, machine), startsPage: first });
    yield first
      ? { ...section, html: section.html.replace('<h2', `<h1 id="exceptions">${format.say('view.chapter.exceptions')}</h1><h2`) }
      : section;
    first = false;
  }
  const changed = record.machines.flatMap((m, i) =>
    m.previous_condition !== null && m.previous_condition !== m.condition ? [machines[i] as object] : [],
  );
  yield render('peer-check', { changed, hasChanged: changed.length > 0 });
  yield render('method', { method: methodView(format), people: peopleView(format), limitsToSet: limitsToSetView(format) });
  yield render('data-head', {});
  for (let from = 0; from < record.measurements.length; from += READINGS_A_SECTION) {
    yield render('data', { readings: record.measurements.slice(from, from + READINGS_A_SECTION).map((m) => readingView(format, m)) });
  }
}

function byRank(machines: readonly RecordMachine[], order: readonly string[]): RecordMachine[] {
  const at = new Map<string, number>();
  order.forEach((id, i) => {
    if (!at.has(id)) at.set(id, i);
  });
  const place = (m: RecordMachine): number => at.get(m.machine) ?? order.length;
  return [...machines].sort((a, b) => place(a) - place(b));
}

/** Chapters of the report; each id is that of a section. */
function contentsOf(format: Format, hasExceptions: boolean): { id: string; title: string }[] {
  const chapters = [
    ['manager', 'page.what_to_do_first'],
    ['ranked', 'page.ranked_actions'],
    ['coverage', 'view.chapter.coverage'],
    ['machines', 'page.all_machines'],
    ...(hasExceptions ? [['exceptions', 'view.chapter.exceptions']] : []),
    ['peer-check', 'page.peer_check'],
    ['method', 'page.method_limits_and_policy'],
    ['people', 'page.people_and_instruments'],
    ['data', 'page.the_data_of_this_survey'],
    ['next', 'page.due_next'],
    ['cautions', 'page.cautions'],
  ] as const;
  return chapters.map(([id = '', key = '']) => ({ id, title: format.say(key) }));
}

/** The record, and the inputs while they are small enough together; else their hashes in the record must do. */
function attachmentsOf(format: Format, assets: Assets, recordText: string): PdfAttachment[] {
  const { record } = format;
  const files: PdfAttachment[] = [
    {
      name: 'record.json',
      mime: 'application/json',
      description: format.say('view.pdf.record'),
      bytes: new TextEncoder().encode(recordText),
    },
  ];
  const total = record.inputs.reduce((sum, input) => sum + input.bytes, 0);
  if (total > MOST_ATTACHED_BYTES) return files;
  record.inputs.forEach((input, i) => {
    const bytes = assets.input(input.path);
    if (bytes === null) return;
    const end = /\.([a-z0-9]+)$/i.exec(input.path)?.[1]?.toLowerCase() ?? 'bin';
    files.push({
      name: `input-${String(i + 1).padStart(4, '0')}.${end}`,
      mime: end === 'csv' ? 'text/csv' : 'application/octet-stream',
      description: format.say('view.pdf.input', { path: input.path }),
      bytes,
    });
  });
  return files;
}
