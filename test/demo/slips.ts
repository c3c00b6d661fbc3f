/**
 * What went wrong when readings were taken or written down. In: a machine's true values. Out: what the crew noted.
 * Each slip is one case of a doubt; most lie in earlier surveys, so that they do not drown the present report.
 */
import { noise } from './noise.ts';
import { type DemoMachine, type DemoSeries, LAST, type Row, SURVEYS, type Told } from './types.ts';

const SCATTER = 0.14;

const quantityOf = (series: DemoSeries): string => series.quantity ?? 'velocity';
const at = (survey: string): number => SURVEYS.indexOf(survey as (typeof SURVEYS)[number]);

/** What the machine did: told, or its level with scatter of 8 % (one standard deviation; even from −14 to +14 %). */
function trueValue(machine: DemoMachine, series: DemoSeries, survey: number): Told {
  const scattered = 1 + SCATTER * noise(`${machine.machine} ${series.point} ${quantityOf(series)} ${survey}`);
  const value = series.values === undefined ? (series.level ?? 1) * scattered : (series.values[survey] ?? null);
  // All points of PW-02 rose together: a common cause.
  return machine.machine === 'PW-02' && survey === LAST && typeof value === 'number' ? value * 1.4 : value;
}

/** Where the value noted under this point came from: points and machines that changed places, a sheet copied from last time. */
function source(
  machine: DemoMachine,
  series: DemoSeries,
  survey: number,
  all: readonly DemoMachine[],
): readonly [DemoMachine, DemoSeries, number] {
  const same = (m: DemoMachine, point: string): DemoSeries =>
    m.series.find((s) => s.point === point && quantityOf(s) === quantityOf(series)) ?? series;
  if (machine.machine === 'FD-01' && survey === at('2024-10-16')) return [machine, series, survey - 1]; // the sheet of January, copied
  if (machine.machine === 'JP-1B' && survey === at('2025-01-15') && quantityOf(series) === 'velocity' && /^3[HA]$/.test(series.point))
    return [machine, same(machine, series.point === '3H' ? '3A' : '3H'), survey];
  const other = machine.machine === 'CF-2' ? 'CF-4' : machine.machine === 'CF-4' ? 'CF-2' : null;
  const twin = other === null || survey !== at('2024-11-20') ? undefined : all.find((m) => m.machine === other);
  return twin === undefined ? [machine, series, survey] : [twin, same(twin, series.point), survey];
}

/** Factor by which the noted value misses the true one. */
function slip(machine: DemoMachine, series: DemoSeries, survey: number): number {
  // r.m.s. values labelled calculated peak: the whole file of the annex is low by √2.
  if (series.unit === 'in/s' && survey === at('2025-11-19')) return 1 / Math.SQRT2;
  // It stood still while it was read, and nobody noted the speed.
  if (machine.machine === 'KB-01' && survey === at('2024-11-20')) return 0.009;
  // A loose plug while running.
  if (machine.machine === 'SF-01' && series.point === '2H' && survey === at('2025-01-15')) return 0.009;
  // Displacement noted at half its size: with velocity and acceleration it cannot be.
  if (machine.machine === 'CW-1' && series.quantity === 'displacement' && survey === at('2025-02-19')) return 0.5;
  return 1;
}

export function notedValue(machine: DemoMachine, series: DemoSeries, survey: number, all: readonly DemoMachine[]): Told {
  const value = trueValue(...source(machine, series, survey, all));
  return typeof value === 'number' ? value * slip(machine, series, survey) : value;
}

/** A second look a week later reads much the same, never the very same. */
export const readAgain = (value: number, point: string): number => value * (1 + 0.03 * noise(`again ${point}`));

/** A reading dated two days before its survey. */
export const takenAt = (machine: string, point: string, survey: number, date: string): string =>
  machine === 'CR-01' && point === '1V' && survey === LAST ? '2026-01-12' : date;

/** A second take that differs from the first by a third. */
export function retakes(survey: number, date: string): Row[] {
  if (survey !== LAST) return [];
  return [
    {
      machine: 'GP-01',
      point: '2H',
      quantity: 'velocity',
      detection: 'rms',
      value: '2.60',
      unit: 'mm/s',
      instrument: 'VM-1',
      measured_by: 'Signe Brødholt',
      taken_at: date,
      retake: 'yes',
      remark: 'magnet slipped at the first take',
    },
  ];
}
