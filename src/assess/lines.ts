/**
 * The parts of the record that are copied rather than judged: plant, surveys, policy, limit sets, the plant over time.
 */
import { createHash } from 'node:crypto';
import { type Day, dayText } from '../plant/day.ts';
import { POLICY_DEFAULTS, POLICY_IDS } from '../plant/policy.ts';
import type { Instrument, LedgerAction, Person, Plant, Survey } from '../plant/types.ts';
import type {
  Condition,
  LimitSetLine,
  PlantOverTime,
  PolicyLine,
  RecordInstrument,
  RecordMachine,
  RecordPerson,
  RecordPlant,
  RecordSurvey,
  SurveyLine,
} from '../record/types.ts';
import { inService, measuredOf, wasMeasured } from './coverage.ts';
import { dateOrNull } from './cut.ts';
import type { LimitsInForce } from './limits-in-force.ts';
import { conditionAt } from './machine.ts';
import { median } from './statistics/median.ts';
import type { Context } from './track.ts';

export function plantLine({ settings, renames }: Plant): RecordPlant {
  const { contractor } = settings;
  return {
    plant: settings.plant,
    client: settings.client,
    site: settings.site,
    contract: settings.contract,
    procedure: settings.procedure,
    contractor: {
      name: contractor.name,
      address: contractor.address,
      contact: contractor.contact,
      logo: contractor.logo,
      accent: contractor.accent,
    },
    language: settings.language,
    paper: settings.paper,
    units: settings.units,
    frequency_unit: settings.frequencyUnit,
    next_stops: settings.nextStops.map((s) => ({ date: dayText(s.day), area: s.area })),
    renames: renames.map((r) => ({ kind: r.kind, machine: r.machine, old: r.old, new: r.new, since: dateOrNull(r.since) })),
    retention: settings.retention,
    distribution: settings.distribution,
  };
}

const personLine = (p: Person): RecordPerson => ({
  name: p.name,
  role: p.role,
  category: p.category,
  certificate: p.certificate,
  expires: dateOrNull(p.expires),
});

const instrumentLine = (i: Instrument): RecordInstrument => ({
  id: i.id,
  make: i.make,
  model: i.model,
  serial: i.serial,
  band: i.band,
  calibrated_on: dateOrNull(i.calibratedOn),
  calibration_due: dateOrNull(i.calibrationDue),
  certificate: i.certificate,
  laboratory: i.laboratory,
});

export function surveyHead(survey: Survey): RecordSurvey {
  return {
    id: survey.id,
    from: dayText(survey.from),
    to: dayText(survey.to),
    kind: survey.kind,
    scope: survey.scope,
    people: survey.people.map(personLine),
    instruments: survey.instruments.map(instrumentLine),
    sensors: survey.sensors.map((s) => ({
      id: s.id,
      serial: s.serial,
      sensitivity: s.sensitivity,
      mounting: s.mounting,
      calibration_due: dateOrNull(s.calibrationDue),
    })),
    field_check: survey.fieldCheck,
    process: survey.process,
    weather: survey.weather,
    remarks: survey.remarks,
    issue_date: dateOrNull(survey.issueDate),
    reviewed_by: survey.reviewedBy,
    approved_by: survey.approvedBy,
    notified: survey.notified.map((n) => ({ who: n.who, when: n.when, how: n.how, about: n.about })),
    photos: survey.photos.map((p) => ({ path: p.path, machine: p.machine, point: p.point, caption: p.caption })),
  };
}

/** Surveys up to the current one; conditions are judged by today's rules, each survey with the readings it had. */
export function surveyLines(context: Context): SurveyLine[] {
  return context.plant.surveys.map((survey, s) => {
    const conditions: Record<string, Condition> = {};
    for (const machine of context.plant.machines) {
      const tracks = context.byMachine.get(machine.id) ?? [];
      if (wasMeasured(tracks, s)) conditions[machine.id] = conditionAt(tracks, s) ?? 'not assessed';
    }
    return {
      id: survey.id,
      date: dayText(survey.day),
      from: dayText(survey.from),
      to: dayText(survey.to),
      kind: survey.kind,
      scope: survey.scope,
      people: survey.people.map(personLine),
      instruments: survey.instruments.map(instrumentLine),
      file: survey.place?.file ?? null,
      conditions,
    };
  });
}

export function policyLines({ policy }: Plant): PolicyLine[] {
  return POLICY_IDS.map((id) => {
    const { value, unit, mark, about } = POLICY_DEFAULTS[id];
    return { id, value: policy[id], unit, mark, about, overridden: policy[id] !== value };
  });
}

/** SHA-256 of ids and values in force: two records of one hash were judged by one policy. */
export const policyHash = (lines: readonly PolicyLine[]): string =>
  createHash('sha256')
    .update(lines.map((line) => `${line.id}=${line.value}\n`).join(''))
    .digest('hex');

/** Each limit set that judged something, once for each of its quantities and rows, by id. */
export function limitSetLines(used: Iterable<LimitsInForce>): LimitSetLine[] {
  const lines = new Map<string, LimitSetLine>();
  for (const { set } of used) {
    if (set === null) continue;
    const key = [
      set.id,
      set.quantity,
      set.detection ?? '',
      set.measuredOn ?? '',
      set.validFrom ?? '',
      set.ab ?? '',
      set.bc ?? '',
      set.cd ?? '',
    ].join('\u0000');
    if (lines.has(key)) continue;
    lines.set(key, {
      id: set.id,
      title: set.title,
      basis: set.basis,
      source: set.source,
      edition: set.edition,
      table: set.table,
      confidence: set.confidence,
      boundaries: { ab: set.ab, bc: set.bc, cd: set.cd },
      quantity: set.quantity,
      unit: set.unit,
      detection: set.detection,
      low_hz: set.lowHz,
      high_hz: set.highHz,
      valid_from: dateOrNull(set.validFrom),
      approved_by: set.approvedBy,
      approved_on: dateOrNull(set.approvedOn),
    });
  }
  return [...lines.entries()].sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)).map(([, line]) => line);
}

const noConditions = (): Record<Condition, number> => ({
  A: 0,
  B: 0,
  C: 0,
  D: 0,
  'r-A': 0,
  'r-B': 0,
  'r-C': 0,
  'r-D': 0,
  'not assessed': 0,
});

/** Counts of machines by condition at each survey; a machine in service that was not measured counts as not assessed. */
export function plantOverTime(context: Context, surveys: readonly SurveyLine[], current: readonly RecordMachine[]): PlantOverTime[] {
  return context.plant.surveys.map((survey, s) => {
    const conditions = noConditions();
    let measured = 0;
    let of = 0;
    for (const machine of context.plant.machines) {
      if (!inService(machine, survey.day)) continue;
      const tracks = context.byMachine.get(machine.id) ?? [];
      const own = surveys[s]?.conditions[machine.id] ?? 'not assessed';
      const now = s === context.current && wasMeasured(tracks, s) ? current.find((m) => m.machine === machine.id)?.condition : undefined;
      conditions[now ?? own] += 1;
      const [n, m] = measuredOf(context, tracks, s);
      measured += n;
      of += m;
    }
    return {
      survey: survey.id,
      date: dayText(survey.day),
      conditions,
      measured,
      of,
      ...ledgerAt(context, survey.day, context.plant.surveys[s - 1]?.day ?? null),
    };
  });
}

/** The ledger as it stood on the day of a survey; `before` is the day of the survey before it. */
function ledgerAt(
  context: Context,
  day: Day,
  before: Day | null,
): Pick<PlantOverTime, 'open_actions' | 'closed_actions' | 'closure_days' | 'repeats'> {
  const raised = context.plant.actions.filter((a) => a.raised === null || a.raised <= day);
  const isClosed = (a: LedgerAction): a is LedgerAction & { closed: Day } =>
    (a.status === 'done' || a.status === 'rejected') && a.closed !== null && a.closed <= day;
  const closed = raised.filter(isClosed);
  const lately = closed.flatMap((a) => (a.raised === null || (before !== null && a.closed <= before) ? [] : [a.closed - a.raised]));
  return {
    open_actions: raised.length - closed.length,
    closed_actions: closed.length,
    closure_days: lately.length === 0 ? null : median(lately),
    repeats: before === null ? 0 : raised.filter((a) => !isClosed(a) && a.raised !== null && a.raised <= before).length,
  };
}
