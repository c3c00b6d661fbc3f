/** The control page, people and instruments, coverage, changes: what an auditor asks for. */
import { unitTerm } from '../words/terms.ts';
import { slugOf } from './file-name.ts';
import type { Format } from './format.ts';
import { issueChanges, issueFields } from './issue.ts';
import { approval } from './method.ts';

export interface FieldView {
  readonly label: string;
  readonly value: string;
}

const field = (label: string, value: string | null): FieldView[] => (value === null || value === '' ? [] : [{ label, value }]);

export interface ControlView {
  readonly plant: string;
  readonly title: string;
  readonly status: string;
  readonly fields: readonly FieldView[];
  /** Of the fields, what an issue says of itself. */
  readonly issue: readonly FieldView[];
  readonly isIssued: boolean;
  /** Since the issue that this one replaces. */
  readonly changes: readonly string[];
  readonly hasChanges: boolean;
  readonly hasLogo: boolean;
  readonly logo: string;
  readonly contractor: string;
}

export function controlView(format: Format): ControlView {
  const { plant, survey, issue, tool, policy_hash: hash } = format.record;
  const span =
    survey.from === survey.to
      ? format.date(survey.from)
      : format.say('view.span', { from: format.date(survey.from), to: format.date(survey.to) });
  return {
    plant: plant.plant,
    title: format.say('view.title'),
    status:
      issue === null
        ? format.say('view.draft')
        : format.say('view.issued', { number: issue.number, revision: issue.revision, date: format.date(issue.issued_on) }),
    fields: [
      ...field(format.say('view.client'), plant.client),
      ...field(format.say('view.site'), plant.site),
      ...field(format.say('view.contract'), plant.contract),
      ...field(format.say('view.procedure'), plant.procedure),
      ...field(format.say('view.survey'), `${format.survey(survey.id)}, ${format.term(survey.kind)}`),
      ...field(format.say('view.measured'), span),
      ...field(format.say('view.contractor'), plant.contractor.name),
      ...field(format.say('view.address'), plant.contractor.address),
      ...field(format.say('view.contact'), plant.contractor.contact),
      ...field(format.say('view.measured_by'), survey.people.map((p) => p.name).join(', ')),
      ...field(format.say('view.reviewed_by'), survey.reviewed_by ?? format.say('view.not_yet')),
      ...field(format.say('view.approved_by'), survey.approved_by ?? format.say('view.not_yet')),
      ...field(format.say('view.issue_date'), format.date(issue?.issued_on ?? survey.issue_date)),
      ...issueFields(format),
      ...field(format.say('view.distribution'), plant.distribution.join(', ')),
      ...field(format.say('view.retention'), plant.retention),
      ...field(format.say('view.made_with'), format.say('view.tool', { tool: `${tool.name} ${tool.version}`, hash: hash.slice(0, 12) })),
    ],
    issue: issueFields(format),
    isIssued: issue !== null,
    changes: issueChanges(format),
    hasChanges: issueChanges(format).length > 0,
    hasLogo: plant.contractor.logo !== null,
    logo: plant.contractor.logo ?? '',
    contractor: plant.contractor.name ?? '',
  };
}

export function peopleView(format: Format) {
  const { survey } = format.record;
  return {
    people: survey.people.map((p) => ({
      name: p.name,
      role: p.role ?? '',
      category: p.category ?? '',
      certificate: p.certificate ?? '',
      expires: format.date(p.expires),
      ended: p.expires !== null && p.expires < survey.to,
    })),
    instruments: survey.instruments.map((i) => ({
      id: i.id,
      make: [i.make, i.model].filter((t) => t !== null).join(' '),
      serial: i.serial ?? '',
      band: i.band ?? '',
      calibrated: format.date(i.calibrated_on),
      due: format.date(i.calibration_due),
      lapsed: i.calibration_due !== null && i.calibration_due < survey.to,
      laboratory: i.laboratory ?? '',
    })),
    conditions: [
      ...field(format.say('view.field_check'), survey.field_check),
      ...field(format.say('view.process'), survey.process),
      ...field(format.say('view.weather'), survey.weather),
      ...field(format.say('view.remarks'), survey.remarks),
    ],
    hasPeople: survey.people.length > 0,
    hasInstruments: survey.instruments.length > 0,
    hasConditions: [survey.field_check, survey.process, survey.weather, survey.remarks].some((t) => t !== null),
  };
}

/** Statuses that kept a machine from being measured, joined in the record. */
const whyText = (format: Format, why: string): string =>
  why
    .split(', ')
    .map((word) => format.term(word))
    .join(', ');

export function coverageView(format: Format) {
  const { coverage } = format.record;
  const missed = coverage.filter((c) => c.status === 'not measured' || c.status === 'partly measured' || c.status === 'excused');
  const view = (c: (typeof coverage)[number]) => ({
    machine: c.machine,
    anchor: `machine-${slugOf(c.machine)}`,
    page: `machines/${slugOf(c.machine)}.html`,
    name: format.name(c.machine),
    status: format.term(c.status),
    why: c.why === null ? '' : whyText(format, c.why),
    points: format.say('view.n_of_m', { n: c.measured, of: c.of }),
    inARow: c.misses_in_a_row === 0 ? '' : String(c.misses_in_a_row),
    last: c.last_measured === null ? format.say('view.never') : format.date(c.last_measured),
    next: format.date(c.next_due),
    interval: c.interval_days === null ? '' : String(Math.round(c.interval_days)),
  });
  const byDue = [...coverage]
    .filter((c) => c.next_due !== null)
    .sort((a, b) => ((a.next_due as string) < (b.next_due as string) ? -1 : a.next_due === b.next_due ? 0 : 1));
  const open = coverage.filter((c) => c.status !== 'measured');
  return {
    missed: missed.map(view),
    hasMissed: missed.length > 0,
    open: open.map(view),
    hasOpen: open.length > 0,
    due: byDue.map(view),
    hasDue: byDue.length > 0,
  };
}

/** What changed since the survey before: limits, baselines, points. */
export function changesView(format: Format) {
  const { record } = format;
  const before = record.surveys[record.surveys.length - 2]?.date ?? '';
  const rows: { what: string; text: string }[] = [];
  for (const set of record.limit_sets) {
    if (set.valid_from !== null && set.valid_from > before && set.valid_from <= record.survey.to)
      rows.push({
        what: format.say('view.limit', { id: set.id }),
        text: format.say('view.limit.changed', {
          title: set.title,
          bc: format.number(set.boundaries.bc),
          unit: set.unit,
          date: format.date(set.valid_from),
          approval: approval(format, set),
        }),
      });
  }
  for (const machine of record.machines) {
    for (const event of machine.events) {
      if (event.date <= before) continue;
      const where = [event.component, event.point, event.quantity === null ? null : format.term(event.quantity)]
        .filter((t) => t !== null)
        .join(' ');
      const serial = event.serial_in === null ? '' : format.say('view.serials', { out: event.serial_out ?? '?', in: event.serial_in });
      const told = format.say(where === '' ? 'view.event' : 'view.event.of', {
        date: format.date(event.date),
        event: format.term(event.event),
        where,
      });
      rows.push({
        what: machine.machine,
        text: `${told}${serial}${event.new_baseline ? `; ${format.say('view.new_baseline')}` : ''}${event.notes === null ? '' : `: ${event.notes}`}`,
      });
    }
  }
  for (const r of record.plant.renames ?? []) {
    if (r.since !== null && r.since > before && r.since <= record.survey.to)
      rows.push({
        what: r.machine ?? r.old,
        text: format.say('view.rename', { kind: format.term(r.kind), old: r.old, new: r.new, date: format.date(r.since) }),
      });
  }
  rows.push(...unitChanges(format));
  for (const p of record.policy.filter((line) => line.overridden))
    rows.push({
      what: format.say('view.policy', { id: p.id }),
      text: format.say('view.policy.set', { value: format.plain(p.value), unit: format.term(p.unit), about: format.policyAbout(p) }),
    });
  return { rows, hasRows: rows.length > 0 };
}

/** Readings typed in another unit than their point's. */
function unitChanges(format: Format): { what: string; text: string }[] {
  return format.asRead.measurements.flatMap((m) =>
    m.typed_unit === null
      ? []
      : [
          {
            what: m.machine,
            text: format.say('view.unit_change', {
              point: m.point,
              quantity: m.quantity,
              typed: `${m.typed} ${m.typed_unit}`,
              unit: format.unit(m.unit, m.detection),
            }),
          },
        ],
  );
}

export function acceptedView(format: Format) {
  const rows = format.record.machines.flatMap((m) =>
    m.accepted.map((a) => ({
      machine: m.machine,
      point:
        [a.point, a.quantity === null ? null : format.term(a.quantity)].filter((t) => t !== null).join(' ') ||
        format.say('view.all_points'),
      upTo: `${format.number(a.up_to)} ${unitTerm(format.language, a.unit ?? '')}`.trim(),
      until: format.date(a.until),
      by: a.by ?? format.say('view.not_stated'),
      reason: a.reason ?? '',
      state: format.say(a.in_force ? 'view.in_force' : 'view.no_longer'),
    })),
  );
  return { rows, hasRows: rows.length > 0 };
}

export function noticesView(format: Format) {
  const rows = format.record.survey.notified.map((n) => ({ who: n.who, when: n.when ?? '', how: n.how ?? '', about: n.about ?? '' }));
  return { rows, hasRows: rows.length > 0 };
}

/** Machines without limits or baseline, and series that have no zone and no class. */
export function limitsToSetView(format: Format) {
  const rows = format.record.measurements
    .filter((m) => m.status === 'measured' && m.zone === null && m.ratio_class === null && m.baseline === null && m.limit_set === null)
    .map((m) => ({
      machine: m.machine,
      point: m.point,
      quantity: `${format.term(m.quantity)}, ${format.unit(m.unit, m.detection)}`,
      because: m.no_zone_because ?? '',
    }));
  return { rows, hasRows: rows.length > 0 };
}
