/** Ledgers and findings held against the register: ids of today, and a problem for each id that nothing bears. */
import type { Day } from '../plant/day.ts';
import type { Place } from '../plant/problem.ts';
import type { Accepted, LedgerAction, LimitRow, Machine, PlantEvent, Survey } from '../plant/types.ts';
import { type Names, tellUnknown } from './names.ts';
import type { Problems } from './problems.ts';
import { placedPhotos } from './surveys.ts';

export interface Ledgers {
  readonly limits: readonly LimitRow[];
  readonly events: readonly PlantEvent[];
  readonly actions: readonly LedgerAction[];
  readonly accepted: readonly Accepted[];
}

export function mendLedgers(
  ledgers: Ledgers,
  machines: readonly Machine[],
  surveys: readonly Survey[],
  names: Names,
  problems: Problems,
): Ledgers & { readonly surveys: readonly Survey[] } {
  const book = new Book(machines, names, problems);
  const ids = new Set<string>();
  for (const { id, place } of ledgers.actions) {
    if (ids.has(id)) problems.error('action-twice', { ...place, column: 1 }, `The action "${id}" is there twice.`, 'Ids are given once.');
    ids.add(id);
  }
  const points = new Map(machines.map((m) => [m.id, [...new Set(m.series.map((s) => s.point))]]));
  for (const row of ledgers.limits)
    if (row.appliesMachine !== null && row.place !== null) book.machine(row.appliesMachine, row.validFrom, row.place);
  return {
    limits: ledgers.limits,
    events: ledgers.events
      .map((e) => ({ ...e, ...book.inside(e.machine, e.component, e.point, e.day, e.place) }))
      .sort((a, b) => a.day - b.day || a.place.line - b.place.line),
    actions: ledgers.actions.map((a) => {
      const { machine, point } = book.inside(a.machine, null, a.verifyPoint, a.raised, a.place);
      return { ...a, machine, verifyPoint: point };
    }),
    accepted: ledgers.accepted.map((a) => {
      const { machine, point } = book.inside(a.machine, null, a.point, null, a.place);
      return { ...a, machine, point };
    }),
    surveys: placedPhotos(surveys, points, problems).map((survey) => ({
      ...survey,
      findings: survey.findings.map((f) => {
        const { machine, component } = book.inside(f.machine, f.component, null, survey.day, f.place);
        return { ...f, machine, component, points: f.points.map((p) => book.inside(f.machine, null, p, survey.day, f.place).point ?? p) };
      }),
    })),
  };
}

class Book {
  readonly #byId: ReadonlyMap<string, Machine>;
  readonly #names: Names;
  readonly #problems: Problems;

  constructor(machines: readonly Machine[], names: Names, problems: Problems) {
    this.#byId = new Map(machines.map((m) => [m.id, m]));
    this.#names = names;
    this.#problems = problems;
  }

  machine(id: string, day: Day | null, place: Place): Machine | null {
    const today = this.#names.machine(id, day, (name) => this.#byId.has(name));
    const found = this.#byId.get(today) ?? null;
    if (found === null) tellUnknown(this.#problems, { ...place, column: null }, 'machine', id, 'in the plant', [...this.#byId.keys()]);
    return found;
  }

  inside(
    machineId: string,
    componentId: string | null,
    pointId: string | null,
    day: Day | null,
    place: Place,
  ): { machine: string; component: string | null; point: string | null } {
    const machine = this.machine(machineId, day, place);
    if (machine === null) return { machine: machineId, component: componentId, point: pointId };
    return {
      machine: machine.id,
      component: this.#component(machine, componentId, day, place),
      point: this.#point(machine, pointId, day, place),
    };
  }

  #component(machine: Machine, id: string | null, day: Day | null, place: Place): string | null {
    if (id === null) return null;
    const ids = machine.components.map((c) => c.id);
    const today = this.#names.inner('component', machine.id, id, day, (name) => ids.includes(name));
    if (!ids.includes(today)) tellUnknown(this.#problems, { ...place, column: null }, 'component', id, `of machine "${machine.id}"`, ids);
    return today;
  }

  #point(machine: Machine, id: string | null, day: Day | null, place: Place): string | null {
    if (id === null) return null;
    const ids = [...new Set(machine.series.map((s) => s.point))];
    const today = this.#names.inner('point', machine.id, id, day, (name) => ids.includes(name));
    if (!ids.includes(today)) tellUnknown(this.#problems, { ...place, column: null }, 'point', id, `of machine "${machine.id}"`, ids);
    return today;
  }
}
