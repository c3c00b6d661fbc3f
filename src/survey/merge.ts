/**
 * Joins readings to series. In: points, reading rows, surveys. Out: series with their readings by survey. Never: a reading
 * under a series it does not belong to; a duplicate that silently wins.
 */
import type { Detection } from '../measure/detection.ts';
import { isKnownQuantity } from '../measure/detection.ts';
import { parseUnit, unitFactor } from '../measure/units.ts';
import type { Day } from '../plant/day.ts';
import type { PointRow, Reading, Series } from '../plant/types.ts';
import type { Cells } from './cells.ts';
import { inUnit, PLAIN_POINT_ROW, type PointEntry, seriesKey } from './points.ts';
import { placeText, type Problems } from './problems.ts';
import { unitOf } from './quantities.ts';
import type { ReadingEntry } from './readings.ts';

export interface OpenSeries {
  readonly machine: string;
  readonly component: string;
  readonly point: string;
  readonly quantity: string;
  readonly detection: Detection | null;
  readonly unit: string;
  rows: PointRow[];
  readonly takes: Map<number, { readonly order: number; readonly reading: Reading }[]>;
}

/** Series of a plant while it is read. `pointsDeclared`: points.csv is there, so no reading may bring a new one. */
export class Joiner {
  readonly series = new Map<string, OpenSeries>();
  readonly #byMachine = new Map<string, OpenSeries[]>();
  readonly #byPoint = new Map<string, OpenSeries[]>();
  readonly #units = new Map<string, string>();
  readonly #whole: { readonly machine: string; readonly survey: number; readonly reading: Reading }[] = [];
  readonly #faulty = new Set<string>();
  readonly #pointsDeclared: boolean;
  readonly #pointsBroken: boolean;
  readonly #problems: Problems;
  convention: 'lag' | 'lead' | null = null;

  /** `pointsBroken`: points.csv is there and could not be read, so its readings tell nothing new. */
  constructor(pointsDeclared: boolean, pointsBroken: boolean, problems: Problems) {
    this.#pointsDeclared = pointsDeclared;
    this.#pointsBroken = pointsBroken;
    this.#problems = problems;
  }

  declare(entry: PointEntry, component: string): void {
    const key = seriesKey(entry.machine, entry.point, entry.quantity, entry.detection);
    const known = this.series.get(key);
    if (known === undefined) this.#open(key, { ...entry, component, rows: [entry.row], takes: new Map() });
    else known.rows.push(inUnit(entry.row, entry.unit, known.unit));
  }

  #open(key: string, series: OpenSeries): OpenSeries {
    this.series.set(key, series);
    for (const [map, name] of [
      [this.#byMachine, series.machine],
      [this.#byPoint, `${series.machine}\u0000${series.point}`],
    ] as const) {
      const list = map.get(name);
      if (list === undefined) map.set(name, [series]);
      else list.push(series);
    }
    return series;
  }

  pointsOf(machine: string): string[] {
    return [...new Set((this.#byMachine.get(machine) ?? []).map((s) => s.point))];
  }

  markFaulty(machine: string, point: string): void {
    this.#faulty.add(`${machine}\u0000${point}`);
  }

  isFaulty(machine: string, point: string): boolean {
    return this.#faulty.has(`${machine}\u0000${point}`) && !this.#byPoint.has(`${machine}\u0000${point}`);
  }

  /** True where readings may stand at this point: declared, or no points.csv to declare it. */
  knowsPoint(machine: string, point: string): boolean {
    return !this.#pointsDeclared || this.#byPoint.has(`${machine}\u0000${point}`);
  }

  seriesOf(machine: string): readonly OpenSeries[] {
    return this.#byMachine.get(machine) ?? [];
  }

  /** Joins one row; `machine` and `point` are today's ids, `survey` the index of its survey. */
  join(entry: ReadingEntry, cells: Cells, machine: string, point: string | null, survey: number, surveyDay: Day, component: string): void {
    const day = entry.takenOn ?? surveyDay;
    if (point === null) {
      this.#whole.push({ machine, survey, reading: { ...entry.reading, survey, day } });
      return;
    }
    const series = this.#find(entry, cells, machine, point, component);
    if (series === null) return;
    if (entry.reading.value === null && entry.reading.bound === null && entry.reading.status === 'measured') {
      this.#problems.add(
        'note',
        'blank-value',
        { ...cells.place, column: null },
        'The row has neither a value nor a status; it counts as not read.',
        'Give the value, or say in status why there is none.',
      );
      return;
    }
    const reading = this.#inSeriesUnit(entry, cells, series, survey, day);
    if (reading === null) return;
    const takes = series.takes.get(survey) ?? [];
    const twin = takes.find((t) => t.order === entry.retake);
    if (twin !== undefined) {
      cells.error(
        'duplicate-reading',
        'point',
        `The same reading stands at ${placeText(twin.reading.place)} too.`,
        'Remove one, or mark the later one in "retake".',
      );
      return;
    }
    takes.push({ order: entry.retake, reading });
    series.takes.set(survey, takes);
  }

  #find(entry: ReadingEntry, cells: Cells, machine: string, point: string, component: string): OpenSeries | null {
    const exact = entry.quantity === null ? undefined : this.series.get(seriesKey(machine, point, entry.quantity, entry.detection));
    if (exact !== undefined) return exact;
    const there = this.#byPoint.get(`${machine}\u0000${point}`) ?? [];
    const fitting = there.filter(
      (s) => (entry.quantity === null || s.quantity === entry.quantity) && (entry.detection === null || s.detection === entry.detection),
    );
    if (fitting.length === 1 && (entry.quantity === null || entry.detection === null)) return fitting[0] as OpenSeries;
    if (!this.#pointsDeclared) return this.#bring(entry, cells, machine, point, component);
    if (fitting.length > 1)
      cells.error(
        'which-series',
        entry.quantity === null ? 'quantity' : 'detection',
        `The row does not say which of ${fitting.length} series of this point it is.`,
        'Give quantity and detection.',
      );
    else {
      const known = there.map((s) => (s.detection === null ? s.quantity : `${s.quantity} ${s.detection}`)).join(', ');
      const what = [entry.quantity, entry.detection].filter((t) => t !== null).join(' ');
      cells.error(
        'wrong-detection',
        'detection',
        `points.csv has no ${what} at point "${point}".`,
        known === ''
          ? 'Add it to points.csv.'
          : `It has: ${known}. A reading in another detection is another series; add it to points.csv.`,
      );
    }
    return null;
  }

  /** A series that points.csv does not declare since there is none: what its readings tell is all that is known. */
  #bring(entry: ReadingEntry, cells: Cells, machine: string, point: string, component: string): OpenSeries | null {
    if (this.#pointsBroken) return null;
    const { quantity, detection, unitText } = entry;
    if (quantity === null) {
      cells.error(
        'blank',
        'quantity',
        '"quantity" is blank and no points.csv says what is measured here.',
        'Give velocity, displacement, acceleration or your own word.',
      );
      return null;
    }
    if (isKnownQuantity(quantity) && (detection === null || unitText === null)) {
      const column = detection === null ? 'detection' : 'unit';
      cells.error(
        'blank',
        column,
        `"${column}" is blank; a ${quantity} without it means nothing.`,
        'Give it in the row, or in points.csv.',
      );
      return null;
    }
    const unit = unitOf(cells, 'unit', unitText ?? '', quantity);
    if (unit === null) return null;
    const row = { ...PLAIN_POINT_ROW, place: cells.place };
    return this.#open(seriesKey(machine, point, quantity, detection), {
      machine,
      component,
      point,
      quantity,
      detection,
      unit,
      rows: [row],
      takes: new Map(),
    });
  }

  #inSeriesUnit(entry: ReadingEntry, cells: Cells, series: OpenSeries, survey: number, day: Day): Reading | null {
    const { reading, unitText } = entry;
    const typedUnit = unitText === null ? series.unit : this.#unit(cells, unitText, series);
    if (typedUnit === null) return null;
    const factor = unitFactor(typedUnit, series.unit);
    if (factor === null) return null;
    const { phase } = reading;
    if (phase !== null && !this.#oneConvention(entry, cells)) return null;
    const lagDeg = phase === null ? 0 : turn(entry.convention === 'lead' ? -phase.lagDeg : phase.lagDeg);
    reading.survey = survey;
    reading.day = day;
    if (factor !== 1 && reading.value !== null) reading.value *= factor;
    reading.typedUnit = factor === 1 && (unitText === null || typedUnit === series.unit) ? null : unitText;
    if (phase !== null)
      reading.phase = { amplitude: phase.amplitude === null ? null : phase.amplitude * factor, lagDeg, reference: phase.reference };
    return reading;
  }

  #unit(cells: Cells, text: string, series: OpenSeries): string | null {
    if (!isKnownQuantity(series.quantity)) return text === series.unit ? text : this.#otherUnit(cells, text, series);
    const key = `${series.quantity}\u0000${text}`;
    const kept = this.#units.get(key);
    if (kept !== undefined) return kept;
    const parsed = parseUnit(text);
    if (parsed === null || parsed.quantity !== series.quantity) return unitOf(cells, 'unit', text, series.quantity);
    this.#units.set(key, parsed.symbol);
    return parsed.symbol;
  }

  #otherUnit(cells: Cells, text: string, series: OpenSeries): null {
    cells.error(
      'wrong-unit',
      'unit',
      `The unit "${text}" is not that of ${series.quantity} here, "${series.unit}".`,
      "A plant's own quantity converts to nothing: give it in its own unit, or as a quantity of its own.",
    );
    return null;
  }

  #oneConvention(entry: ReadingEntry, cells: Cells): boolean {
    this.convention ??= entry.convention;
    if (this.convention === entry.convention) return true;
    cells.error(
      'phase-convention',
      'phase_convention',
      `Phase is a ${entry.convention} here and a ${this.convention} elsewhere.`,
      'Keep one convention in a plant.',
    );
    return false;
  }

  /** A row for a whole machine speaks for each series of it that has no reading of its own in that survey. */
  spread(): void {
    for (const { machine, survey, reading } of this.#whole) {
      const all = this.seriesOf(machine);
      if (all.length === 0)
        this.#problems.add(
          'warning',
          'whole-machine-unknown',
          { ...reading.place, column: null },
          `The row speaks for machine "${machine}", of which no point is known.`,
          'Add its points to points.csv.',
        );
      for (const series of all) if (!series.takes.has(survey)) series.takes.set(survey, [{ order: 0, reading }]);
    }
  }

  /** Closed series of a machine, in the order of points.csv, else by name. */
  close(machine: string): Series[] {
    const list = [...this.seriesOf(machine)];
    if (!this.#pointsDeclared)
      list.sort((a, b) => compare(a.point, b.point) || compare(a.quantity, b.quantity) || compare(a.detection ?? '', b.detection ?? ''));
    return list.map((s) => ({
      machine: s.machine,
      component: s.component,
      point: s.point,
      quantity: s.quantity,
      detection: s.detection,
      unit: s.unit,
      rows: s.rows,
      readings: [...s.takes.entries()].sort(([a], [b]) => a - b).map(([, takes]) => lastTake(takes)),
    }));
  }
}

const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

/** 0 ≤ angle < 360. */
const turn = (deg: number): number => ((deg % 360) + 360) % 360;

function lastTake(takes: readonly { readonly order: number; readonly reading: Reading }[]): Reading {
  if (takes.length === 1) return (takes[0] as { reading: Reading }).reading;
  const sorted = [...takes].sort((a, b) => a.order - b.order).map((t) => t.reading);
  const last = sorted.pop() as Reading;
  return { ...last, retakes: sorted };
}
