import type { RecordMachine, RecordMeasurement } from '../record/types.ts';
import { type Charts, seriesId } from './charts.ts';
import { slugOf } from './file-name.ts';
import type { ConditionView, Format } from './format.ts';
import { isUncertaintyStated } from './issue.ts';

/** A machine in the list of all. */
export interface MachineView {
  readonly id: string;
  readonly name: string;
  readonly area: string;
  readonly page: string;
  readonly anchor: string;
  readonly criticality: string;
  readonly condition: ConditionView;
  readonly previous: string;
  readonly urgency: string;
  readonly urgencyFull: string;
  readonly rule: string;
  readonly reason: string;
  readonly governing: string;
  readonly value: string;
  readonly unit: string;
  readonly change: string;
  readonly travel: string;
  readonly hasChart: boolean;
  readonly chartKey: string;
  readonly chartAlt: string;
  readonly isException: boolean;
  readonly marks: string;
}

/** The reading that governs a machine: of its level, else of its condition, else its first with history. */
export function governingMeasurement(format: Format, machine: RecordMachine): RecordMeasurement | null {
  return (
    format.measurement(machine.machine, machine.urgency_by) ??
    format.measurement(machine.machine, machine.governed_by) ??
    format.measurementsOf(machine.machine).find((m) => m.history.value.some((v) => v !== null)) ??
    null
  );
}

export function changeText(format: Format, m: RecordMeasurement): string {
  const { change } = m;
  if (change === null) return '';
  const percent = change.percent === null ? '' : ` (${format.signedPercent(change.percent)})`;
  return `${format.difference(change.absolute, m.value ?? 0)}${percent}`;
}

export function machineView(format: Format, charts: Charts, machine: RecordMachine): MachineView {
  const m = governingMeasurement(format, machine);
  const hasChart = m?.history.value.some((v) => v !== null) === true;
  const doubts = machine.doubts.length === 0 ? '' : format.say('view.doubt');
  const held = m !== null && m.travel === 'held' ? format.term('held') : '';
  const [measured] = machine.measured_of;
  return {
    id: machine.machine,
    name: machine.name ?? '',
    area: machine.area ?? '',
    page: `machines/${slugOf(machine.machine)}.html`,
    anchor: `machine-${slugOf(machine.machine)}`,
    criticality: format.term(machine.criticality),
    condition: format.machineCondition(machine),
    previous: machine.previous_condition === null ? '–' : format.term(machine.previous_condition),
    urgency: format.urgency(machine.urgency),
    urgencyFull: format.urgencyFull(machine.urgency),
    rule: machine.rule ?? '',
    reason: machine.reason,
    governing: m === null ? '' : `${m.point} ${format.term(m.quantity)}`,
    value: m === null ? '' : format.reading(m),
    unit: m === null || format.reading(m) === '' ? '' : format.unit(m.unit, m.detection),
    change: m === null ? '' : changeText(format, m),
    travel: m?.travel == null ? '' : format.term(m.travel),
    hasChart,
    chartKey: m === null ? '' : seriesId(m),
    chartAlt: m === null || !hasChart ? '' : charts.alt(m),
    isException: machine.urgency !== null,
    marks: [held, doubts, measured === 0 ? format.term('not measured') : ''].filter((t) => t !== '').join(', '),
  };
}

/** A reading of this survey, as a row of the data. */
export interface ReadingView {
  readonly anchor: string;
  readonly machine: string;
  readonly machineAnchor: string;
  readonly point: string;
  readonly component: string;
  readonly quantity: string;
  /** For a narrow column. */
  readonly quantityShort: string;
  readonly value: string;
  readonly unit: string;
  readonly condition: ConditionView;
  readonly conditionNote: string;
  readonly change: string;
  readonly baseline: string;
  readonly limits: string;
  readonly alarm: string;
  readonly travel: string;
  readonly status: string;
  readonly notes: string;
  readonly source: string;
  readonly limitReason: string;
  readonly typed: string;
  readonly chartKey: string;
  readonly hasChart: boolean;
}

export function readingView(format: Format, m: RecordMeasurement): ReadingView {
  const condition = format.condition(m.zone ?? m.ratio_class);
  const held = m.held === null ? '' : format.say('view.last_zone', { zone: format.term(m.held.zone), date: format.date(m.held.date) });
  const near =
    m.near_boundary === null
      ? ''
      : format.say(isUncertaintyStated(format) ? 'view.near.stated' : 'view.near', { boundary: m.near_boundary });
  const set = m.limits;
  const boundaries = set === null ? '' : [set.ab, set.bc, set.cd].map((v) => (v === null ? '–' : format.number(v))).join('\u00a0/\u00a0');
  const doubts = m.doubts.map((d) => d.message);
  return {
    anchor: `reading-${slugOf(seriesId(m))}`,
    machine: m.machine,
    machineAnchor: `machine-${slugOf(m.machine)}`,
    point: m.point,
    component: m.component === m.machine ? '' : m.component,
    quantity: format.term(m.quantity),
    quantityShort: format.shortTerm(m.quantity),
    value: m.value === null && m.bound === null ? format.term(m.status) : format.reading(m),
    unit: format.unit(m.unit, m.detection),
    condition,
    conditionNote: [held, near].filter((t) => t !== '').join('; '),
    change: changeText(format, m),
    baseline:
      m.baseline === null
        ? ''
        : `${format.number(m.baseline.value)}${m.baseline.provisional ? ` (${format.say('view.provisional')})` : ''}`,
    limits: boundaries,
    alarm: set?.alarm == null ? '' : format.number(set.alarm),
    travel: m.travel === null ? '' : format.term(m.travel),
    status: format.term(m.status),
    notes: [...(m.no_zone_because === null || m.status !== 'measured' ? [] : [m.no_zone_because]), ...doubts, ...m.notes].join(' '),
    source: m.source === null ? '' : `${m.source.file}:${m.source.line}`,
    limitReason: m.limit_reason,
    typed: m.typed_unit === null ? '' : format.say('view.typed', { typed: `${m.typed} ${m.typed_unit}` }),
    chartKey: seriesId(m),
    hasChart: m.history.value.some((v) => v !== null),
  };
}
