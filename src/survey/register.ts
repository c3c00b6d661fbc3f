/**
 * The register: machines, components and points, declared or brought by readings. In: tables. Out: something to join
 * readings to, and at the end the machines.
 */
import type { Component, ComponentRow, Machine, MachineRow } from '../plant/types.ts';
import { Cells } from './cells.ts';
import { componentRow, implicitComponent, inOrder, machineRow, NO_MACHINE_ROW } from './machines.ts';
import { Joiner } from './merge.ts';
import { type Names, tellCaseTwins, tellUnknown } from './names.ts';
import { pointEntries } from './points.ts';
import type { Problems } from './problems.ts';
import type { PeakMeans } from './quantities.ts';
import type { Tables } from './read.ts';

interface OpenMachine {
  readonly rows: MachineRow[];
  readonly ownComponent: ComponentRow[];
  readonly components: Map<string, ComponentRow[]>;
}

export class Register {
  readonly machines = new Map<string, OpenMachine>();
  readonly joiner: Joiner;
  readonly machinesDeclared: boolean;
  readonly #problems: Problems;

  constructor(machinesDeclared: boolean, points: 'declared' | 'broken' | 'absent', problems: Problems) {
    this.machinesDeclared = machinesDeclared;
    this.joiner = new Joiner(points === 'declared', points === 'broken', problems);
    this.#problems = problems;
  }

  /** The machine of an id; brought in where machines.csv is absent, else null when it is unknown. */
  machine(id: string): OpenMachine | null {
    const known = this.machines.get(id);
    if (known !== undefined) return known;
    return this.machinesDeclared ? null : this.open(id);
  }

  open(id: string): OpenMachine {
    const opened = this.machines.get(id) ?? { rows: [], ownComponent: [], components: new Map() };
    this.machines.set(id, opened);
    return opened;
  }

  componentIds(id: string): string[] {
    const components = this.machines.get(id)?.components;
    return components === undefined || components.size === 0 ? [id] : [...components.keys()];
  }

  close(): Machine[] {
    const ids = [...this.machines.keys()].sort((a, b) => (a < b ? -1 : 1));
    tellCaseTwins(this.#problems, this.machinesDeclared ? 'machines.csv' : 'surveys', 'machine', ids);
    return ids.map((id) => {
      const open = this.machines.get(id) as OpenMachine;
      const rows = inOrder(open.rows, `Machine "${id}"`, this.#problems);
      const components: Component[] = [...open.components.entries()].map(([name, list]) => ({
        id: name,
        implicit: false,
        rows: inOrder(list, `Component "${name}" of "${id}"`, this.#problems),
      }));
      const series = this.joiner
        .close(id)
        .map((s) => ({ ...s, rows: inOrder(s.rows, `Point "${s.point}" of "${id}" (${s.quantity})`, this.#problems) }));
      return {
        id,
        rows: rows.length === 0 ? [NO_MACHINE_ROW] : rows,
        components:
          components.length === 0 ? [implicitComponent(id, inOrder(open.ownComponent, `Machine "${id}"`, this.#problems))] : components,
        series,
        declared: this.machinesDeclared,
      };
    });
  }
}

/** A table that could not be read declares nothing: its own problem is told, not one for each id it would have held. */
export function registerOf(hasPoints: boolean, tables: Tables, peakMeans: PeakMeans, names: Names, problems: Problems): Register {
  const register = new Register(
    tables['machines.csv'] !== null,
    tables['points.csv'] !== null ? 'declared' : hasPoints ? 'broken' : 'absent',
    problems,
  );
  readMachines(register, tables, problems);
  readComponents(register, tables, problems);
  readPoints(register, tables, peakMeans, names, problems);
  return register;
}

function readMachines(register: Register, tables: Tables, problems: Problems): void {
  const table = tables['machines.csv'];
  if (table === null) return;
  const cells = new Cells(table, problems);
  while (cells.next()) {
    const id = cells.required('machine');
    const [row, component] = [machineRow(cells), componentRow(cells)];
    if (id === null) continue;
    const open = register.open(id);
    open.rows.push(row);
    open.ownComponent.push(component);
  }
}

function readComponents(register: Register, tables: Tables, problems: Problems): void {
  const table = tables['components.csv'];
  if (table === null) return;
  const cells = new Cells(table, problems);
  while (cells.next()) {
    const [machine, id] = [cells.required('machine'), cells.required('component')];
    const row = componentRow(cells);
    if (machine === null || id === null) continue;
    const open = register.machine(machine);
    if (open === null)
      tellUnknown(problems, { ...cells.place, column: table.column('machine') + 1 }, 'machine', machine, 'in machines.csv', [
        ...register.machines.keys(),
      ]);
    else open.components.set(id, [...(open.components.get(id) ?? []), row]);
  }
}

function readPoints(register: Register, tables: Tables, peakMeans: PeakMeans, names: Names, problems: Problems): void {
  const table = tables['points.csv'];
  if (table === null) return;
  const points = new Set<string>();
  const { entries, faulty } = pointEntries(table, peakMeans, problems);
  for (const { machine, point } of faulty) register.joiner.markFaulty(machine, point);
  for (const entry of entries) {
    const place = { ...entry.cells, column: table.column('machine') + 1 };
    const machine = names.machine(entry.machine, null, () => true);
    if (register.machine(machine) === null) {
      tellUnknown(problems, place, 'machine', machine, 'in machines.csv', [...register.machines.keys()]);
      continue;
    }
    const component = componentFor(
      register,
      machine,
      entry.component,
      { ...place, column: table.column('component') + 1 || null },
      problems,
    );
    if (component === null) {
      register.joiner.markFaulty(machine, entry.point);
      continue;
    }
    const point = names.inner('point', machine, entry.point, null, () => true);
    points.add(`${machine} ${point}`);
    register.joiner.declare({ ...entry, machine, point }, component);
  }
  tellCaseTwins(problems, 'points.csv', 'point', points);
}

/** The component that a point belongs to; the machine itself where it has none of its own. */
function componentFor(
  register: Register,
  machine: string,
  typed: string | null,
  place: { file: string; line: number; column: number | null },
  problems: Problems,
): string | null {
  const ids = register.componentIds(machine);
  const implicit = (register.machines.get(machine)?.components.size ?? 0) === 0;
  if (typed !== null && ids.includes(typed)) return typed;
  if (implicit) {
    if (typed !== null)
      problems.add(
        'warning',
        'no-components',
        place,
        `The component "${typed}" of machine "${machine}" is in no components.csv; the machine is taken as one.`,
        'Add its components to components.csv.',
      );
    return machine;
  }
  if (typed === null && ids.length === 1) return ids[0] as string;
  if (typed === null)
    problems.error(
      'blank',
      place,
      `"component" is blank; machine "${machine}" has ${ids.length}: ${ids.join(', ')}.`,
      'Say which one the point belongs to.',
    );
  else tellUnknown(problems, place, 'component', typed, `of machine "${machine}" in components.csv`, ids);
  return null;
}
