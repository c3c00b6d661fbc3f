/** One machine in full: readings, charts, finding, action, doubts, what the readings cannot see. Serves the PDF's exceptions and the site's pages. */
import type { RecordMachine, RecordMeasurement } from '../record/types.ts';
import { type ActionView, actionView, overrideText } from './actions.ts';
import { type Charts, seriesId } from './charts.ts';
import { slugOf } from './file-name.ts';
import type { Format } from './format.ts';
import { decisionText } from './issue.ts';
import { governingMeasurement, type MachineView, machineView, type ReadingView, readingView } from './machines.ts';

export interface ExceptionView {
  readonly machine: MachineView;
  readonly title: string;
  readonly override: string;
  readonly spare: string;
  readonly criticality: string;
  readonly actions: readonly ActionView[];
  readonly hasActions: boolean;
  readonly readings: readonly ReadingView[];
  readonly hasReadings: boolean;
  readonly hasHistory: boolean;
  readonly historyKey: string;
  readonly historyAlt: string;
  readonly historyCaption: string;
  /** What is remarked about the governing reading: a step in its history, a spike that went, what it was compared with. */
  readonly remarks: string;
  readonly polars: readonly { readonly key: string; readonly alt: string; readonly caption: string }[];
  readonly photos: readonly { readonly path: string; readonly file: string; readonly alt: string; readonly caption: string }[];
  readonly doubts: readonly string[];
  readonly hasDoubts: boolean;
  readonly indications: readonly { readonly rule: string; readonly message: string; readonly confirm: string }[];
  readonly hasIndications: boolean;
  readonly forecast: string;
  /** The rule by which its zones were told. */
  readonly decision: string;
  readonly cannotSee: string;
  readonly events: readonly { readonly date: string; readonly text: string }[];
  readonly hasEvents: boolean;
  readonly components: readonly {
    readonly id: string;
    readonly kind: string;
    readonly condition: ReturnType<Format['condition']>;
    readonly limits: string;
  }[];
}

export function exceptionView(format: Format, charts: Charts, machine: RecordMachine): ExceptionView {
  const measurements = format.measurementsOf(machine.machine);
  const main = governingMeasurement(format, machine);
  const actions = format.record.actions.filter((a) => a.machine === machine.machine).map((a) => actionView(format, a));
  const hasHistory = main?.history.value.some((v) => v !== null) === true;
  const polars = measurements.filter((m) => (m.phase?.amplitude ?? null) !== null);
  const spoken = machine.criticality_stated
    ? format.term(machine.criticality)
    : format.say('view.criticality_taken', { criticality: format.term(machine.criticality) });
  return {
    machine: machineView(format, charts, machine),
    title: machine.name === null ? machine.machine : `${machine.machine}, ${machine.name}`,
    override: overrideText(format, machine),
    spare: machine.spare?.reason ?? '',
    criticality: spoken,
    actions,
    hasActions: actions.length > 0,
    readings: measurements.map((m) => readingView(format, m)),
    hasReadings: measurements.length > 0,
    hasHistory,
    historyKey: main === null ? '' : seriesId(main),
    // Asked for by the PDF alone: the site has it in its drawing, and a chart is not made twice.
    get historyAlt() {
      return main === null || !hasHistory ? '' : charts.drawing('history', seriesId(main)).alt;
    },
    historyCaption:
      main === null ? '' : `${main.point} ${format.term(main.quantity)}, ${format.unit(main.unit, main.detection)}: ${main.limit_reason}`,
    remarks: main === null || main.notes.length === 0 ? '' : `${main.point} ${main.quantity}: ${main.notes.join(' ')}`,
    polars: polars.map((m) => ({
      key: seriesId(m),
      caption: format.say('view.polar.caption', { point: m.point }),
      get alt() {
        return charts.drawing('polar', seriesId(m)).alt;
      },
    })),
    photos: format.record.survey.photos
      .filter((p) => p.machine === machine.machine)
      .map((p) => ({
        path: p.path,
        file: photoFile(p.path),
        alt: p.caption ?? format.say('view.photo', { machine: machine.machine }),
        caption: p.caption ?? '',
      })),
    doubts: machine.doubts.map((d) => d.message),
    hasDoubts: machine.doubts.length > 0,
    indications: machine.indications.map((i) => ({ rule: i.rule, message: i.message, confirm: i.confirm })),
    hasIndications: machine.indications.length > 0,
    forecast: main === null ? '' : forecastText(format, main),
    decision: decisionText(format, measurements),
    cannotSee: machine.cannot_see.join('; '),
    events: machine.events.map((e) => ({
      date: format.date(e.date),
      text: `${format.term(e.event)}${e.notes === null ? '' : `: ${e.notes}`}${e.new_baseline ? ` (${format.say('view.new_baseline')})` : ''}`,
    })),
    hasEvents: machine.events.length > 0,
    components: format.record.components
      .filter((c) => c.machine === machine.machine && !c.implicit)
      .map((c) => ({
        id: c.component,
        kind: c.kind === null ? '' : format.term(c.kind),
        condition: format.condition(c.condition),
        limits: c.limit_reason,
      })),
  };
}

/** The forecast of the governing reading in words; nothing where there is no real trend to speak of. */
function forecastText(format: Format, m: RecordMeasurement): string {
  const { forecast } = m;
  if (forecast === null || 'none' in forecast)
    return forecast === null || m.trend === null || m.trend.kind !== 'ramp'
      ? ''
      : format.say('view.no_forecast', { point: m.point, quantity: m.quantity, none: forecast.none });
  const likely = forecast.likely === null ? format.say('view.forecast.beyond') : format.date(forecast.likely);
  const latest = forecast.latest === null ? format.say('view.forecast.open') : format.date(forecast.latest);
  return format.say('view.forecast', {
    point: m.point,
    quantity: m.quantity,
    boundary: forecast.boundary,
    likely,
    earliest: format.date(forecast.earliest),
    latest,
  });
}

/** Name of a photo on the site. */
export const photoFile = (path: string): string => `${slugOf(path)}.${/\.png$/i.test(path) ? 'png' : 'jpg'}`;
