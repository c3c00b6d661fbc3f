/** The control page, people and instruments, coverage, changes, method: what an auditor asks for. */
import type { LimitSetLine } from '../record/types.ts';
import { slugOf } from './file-name.ts';
import type { Format } from './format.ts';

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
  readonly hasLogo: boolean;
  readonly logo: string;
  readonly contractor: string;
}

export function controlView(format: Format): ControlView {
  const { plant, survey, issue, tool, policy_hash: hash } = format.record;
  const span = survey.from === survey.to ? format.date(survey.from) : `${format.date(survey.from)} to ${format.date(survey.to)}`;
  return {
    plant: plant.plant,
    title: 'Vibration survey report',
    status: issue === null ? 'DRAFT, not issued' : `No. ${issue.number}, revision ${issue.revision}, issued ${format.date(issue.issued_on)}`,
    fields: [
      ...field('Client', plant.client),
      ...field('Site', plant.site),
      ...field('Contract', plant.contract),
      ...field('Procedure', plant.procedure),
      ...field('Survey', `${survey.id}, ${survey.kind}`),
      ...field('Measured', span),
      ...field('Contractor', plant.contractor.name),
      ...field('Address', plant.contractor.address),
      ...field('Contact', plant.contractor.contact),
      ...field('Measured by', survey.people.map((p) => p.name).join(', ')),
      ...field('Reviewed by', survey.reviewed_by ?? 'not yet'),
      ...field('Approved by', survey.approved_by ?? 'not yet'),
      ...field('Issue date', format.date(survey.issue_date)),
      ...field('Distribution', plant.distribution.join(', ')),
      ...field('Retention', plant.retention),
      ...field('Made with', `${tool.name} ${tool.version}, policy ${hash.slice(0, 12)}`),
    ],
    hasLogo: plant.contractor.logo !== null,
    logo: plant.contractor.logo ?? '',
    contractor: plant.contractor.name ?? '',
  };
}

export function peopleView(format: Format) {
  const { survey } = format.record;
  return {
    people: survey.people.map((p) => ({ name: p.name, role: p.role ?? '', category: p.category ?? '', certificate: p.certificate ?? '', expires: format.date(p.expires), ended: p.expires !== null && p.expires < survey.to })),
    instruments: survey.instruments.map((i) => ({
      id: i.id, make: [i.make, i.model].filter((t) => t !== null).join(' '), serial: i.serial ?? '', band: i.band ?? '', calibrated: format.date(i.calibrated_on), due: format.date(i.calibration_due),
      lapsed: i.calibration_due !== null && i.calibration_due < survey.to, laboratory: i.laboratory ?? '',
    })),
    conditions: [...field('Field check', survey.field_check), ...field('Process', survey.process), ...field('Weather', survey.weather), ...field('Remarks', survey.remarks)],
    hasPeople: survey.people.length > 0,
    hasInstruments: survey.instruments.length > 0,
    hasConditions: [survey.field_check, survey.process, survey.weather, survey.remarks].some((t) => t !== null),
  };
}

const CONFIDENCE: Readonly<Record<string, string>> = { confirmed: 'confirmed', 'one source': 'one source', recalled: 'recalled: check against your copy of the standard' };

/** A boundary as its source prints it; one that was computed, to three digits. */
const boundary = (format: Format, value: number | null): string => (value === null ? '–' : Math.round(value * 1000) / 1000 === value ? format.plain(value) : format.number(value));

function limitView(format: Format, set: LimitSetLine) {
  const { ab, bc, cd } = set.boundaries;
  const band = set.low_hz === null && set.high_hz === null ? '' : `${set.low_hz ?? '…'} to ${set.high_hz ?? '…'} Hz`;
  return {
    id: set.id,
    anchor: `limit-${slugOf(set.id)}`,
    title: set.title,
    quantity: set.quantity,
    unit: format.unit(set.unit, set.detection),
    ab: boundary(format, ab),
    bc: boundary(format, bc),
    cd: boundary(format, cd),
    band,
    basis: set.basis,
    source: [set.source, set.edition, set.table].filter((t) => t !== null).join(', '),
    confidence: set.confidence === null ? approval(format, set) : (CONFIDENCE[set.confidence] ?? set.confidence),
  };
}

function approval(format: Format, set: LimitSetLine): string {
  const by = set.approved_by === null ? 'approval not stated' : `approved by ${set.approved_by}`;
  const on = set.approved_on === null ? '' : ` on ${format.date(set.approved_on)}`;
  return `${by}${on}${set.valid_from === null ? '' : `, valid from ${format.date(set.valid_from)}`}`;
}

export function methodView(format: Format) {
  const { record } = format;
  return {
    sets: record.limit_sets.map((set) => limitView(format, set)),
    hasSets: record.limit_sets.length > 0,
    policy: record.policy.map((p) => ({ id: p.id, value: format.plain(p.value), unit: p.unit, mark: p.mark, about: p.about, changed: p.overridden })),
    hash: record.policy_hash,
    problems: record.problems.filter((p) => p.severity !== 'note').map((p) => ({ place: p.line === null ? p.file : `${p.file}:${p.line}`, message: p.message })),
    hasProblems: record.problems.some((p) => p.severity !== 'note'),
    inputs: record.inputs.map((i) => ({ path: i.path, bytes: String(i.bytes), sha256: i.sha256 })),
  };
}

export function coverageView(format: Format) {
  const { coverage } = format.record;
  const missed = coverage.filter((c) => c.status === 'not measured' || c.status === 'partly measured' || c.status === 'excused');
  const view = (c: (typeof coverage)[number]) => ({
    machine: c.machine,
    anchor: `machine-${slugOf(c.machine)}`,
    page: `machines/${slugOf(c.machine)}.html`,
    name: format.name(c.machine),
    status: c.status,
    why: c.why ?? '',
    points: `${c.measured} of ${c.of}`,
    inARow: c.misses_in_a_row === 0 ? '' : String(c.misses_in_a_row),
    last: c.last_measured === null ? 'never' : format.date(c.last_measured),
    next: format.date(c.next_due),
    interval: c.interval_days === null ? '' : String(Math.round(c.interval_days)),
  });
  const byDue = [...coverage].filter((c) => c.next_due !== null).sort((a, b) => ((a.next_due as string) < (b.next_due as string) ? -1 : a.next_due === b.next_due ? 0 : 1));
  const open = coverage.filter((c) => c.status !== 'measured');
  return { missed: missed.map(view), hasMissed: missed.length > 0, open: open.map(view), hasOpen: open.length > 0, due: byDue.map(view), hasDue: byDue.length > 0 };
}

/** What changed since the survey before: limits, baselines, points. */
export function changesView(format: Format) {
  const { record } = format;
  const before = record.surveys[record.surveys.length - 2]?.date ?? '';
  const rows: { what: string; text: string }[] = [];
  for (const set of record.limit_sets) {
    if (set.valid_from !== null && set.valid_from > before && set.valid_from <= record.survey.to) rows.push({ what: `Limit ${set.id}`, text: `${set.title}: B/C ${format.number(set.boundaries.bc)} ${set.unit} from ${format.date(set.valid_from)}; ${approval(format, set)}` });
  }
  for (const machine of record.machines) {
    for (const event of machine.events) {
      if (event.date <= before) continue;
      const where = [event.component, event.point, event.quantity].filter((t) => t !== null).join(' ');
      const serial = event.serial_in === null ? '' : `, serial ${event.serial_out ?? '?'} out, ${event.serial_in} in`;
      rows.push({ what: machine.machine, text: `${format.date(event.date)} ${event.event}${where === '' ? '' : ` of ${where}`}${serial}${event.new_baseline ? '; new baseline' : ''}${event.notes === null ? '' : `: ${event.notes}`}` });
    }
  }
  for (const r of record.plant.renames ?? []) {
    if (r.since !== null && r.since > before && r.since <= record.survey.to) rows.push({ what: r.machine ?? r.old, text: `${r.kind} ${r.old} is called ${r.new} since ${format.date(r.since)}` });
  }
  rows.push(...unitChanges(format));
  for (const p of record.policy.filter((line) => line.overridden)) rows.push({ what: `Policy ${p.id}`, text: `set to ${format.plain(p.value)} ${p.unit} by this plant: ${p.about}` });
  return { rows, hasRows: rows.length > 0 };
}

/** Readings typed in another unit than their point's. */
function unitChanges(format: Format): { what: string; text: string }[] {
  return format.record.measurements.flatMap((m) => (m.typed_unit === null ? [] : [{ what: m.machine, text: `${m.point} ${m.quantity} was typed as ${m.typed} ${m.typed_unit} and converted to ${format.unit(m.unit, m.detection)}` }]));
}

export function acceptedView(format: Format) {
  const rows = format.record.machines.flatMap((m) =>
    m.accepted.map((a) => ({
      machine: m.machine, point: [a.point, a.quantity].filter((t) => t !== null).join(' ') || 'all points', upTo: `${format.number(a.up_to)} ${a.unit ?? ''}`.trim(), until: format.date(a.until), by: a.by ?? 'not stated',
      reason: a.reason ?? '', state: a.in_force ? 'in force' : 'no longer in force',
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
    .map((m) => ({ machine: m.machine, point: m.point, quantity: `${m.quantity}, ${format.unit(m.unit, m.detection)}`, because: m.no_zone_because ?? '' }));
  return { rows, hasRows: rows.length > 0 };
}
