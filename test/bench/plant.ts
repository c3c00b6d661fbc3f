/** A plant for measuring: any size, the same bytes for the same size. In: counts. Out: the files of a plant folder. Not realistic in its stories, only in its mass. */
import { dayOf, dayText } from '../../src/plant/day.ts';
import type { OutputFile } from '../../src/shell/types.ts';

export interface PlantSize {
  readonly machines: number;
  readonly points: number;
  readonly surveys: number;
}

/** Park and Miller's minimal standard generator (1988): 16807 x mod (2³¹ − 1), exact in doubles. */
function uniform(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 16807) % 2147483647;
    return state / 2147483647;
  };
}

const PLACES = ['motor NDE', 'motor DE', 'pump DE', 'pump NDE'];
const DIRECTIONS = ['horizontal', 'vertical', 'axial'];
const id = (machine: number): string => `P-${String(machine + 1).padStart(4, '0')}`;
const componentOf = (point: number): 'motor' | 'pump' => (point % 4 < 2 ? 'motor' : 'pump');

export function benchPlant(size: PlantSize): OutputFile[] {
  const numbers = Array.from({ length: size.machines }, (_, machine) => machine);
  const points = Array.from({ length: size.points }, (_, point) => point);
  const name = (point: number): string =>
    `${PLACES[point % 4]?.replace(/[a-z ]+(N?DE)/, (word, end: string) => `${word[0]?.toUpperCase()}${end}`)}-${DIRECTIONS[Math.floor(point / 4) % 3]?.[0]?.toUpperCase()}${point >= 12 ? point : ''}`;
  const machineRow = (m: number): string =>
    `${id(m)},Transfer pump ${m + 1},Area ${1 + (m % 9)},${['critical', 'essential', 'general'][m % 3]},60`;
  const componentRows = (m: number): string =>
    `${id(m)},motor,motor,75,1480,fixed,rigid,280,rolling,\n${id(m)},pump,pump,75,1480,fixed,rigid,,rolling,II`;
  const pointRow = (m: number, p: number): string =>
    `${id(m)},${componentOf(p)},${name(p)},${PLACES[p % 4]},${DIRECTIONS[Math.floor(p / 4) % 3]},bearing housing,velocity,mm/s,rms,10,1000`;
  return [
    { path: 'plant.yaml', bytes: 'plant: Bench Works\nclient: Bench Works\n' },
    { path: 'machines.csv', bytes: table('machine,name,area,criticality,interval_days', numbers.map(machineRow)) },
    {
      path: 'components.csv',
      bytes: table(
        'machine,component,kind,power_kw,speed_rpm,drive,support,shaft_height_mm,bearings,pump_category',
        numbers.map(componentRows),
      ),
    },
    {
      path: 'points.csv',
      bytes: table(
        'machine,component,point,location,direction,measured_on,quantity,unit,detection,low_hz,high_hz',
        numbers.flatMap((m) => points.map((p) => pointRow(m, p))),
      ),
    },
    ...surveys(size, numbers, points, name),
  ];
}

function surveys(size: PlantSize, numbers: readonly number[], points: readonly number[], name: (point: number) => string): OutputFile[] {
  const random = uniform(20260114);
  // 1.2 to 2.6 mm/s to begin with; one machine in twelve grows by 12 % a survey, one in twenty has stepped up by half at the end.
  const start = numbers.map(() => points.map(() => 1.2 + 1.4 * random()));
  const first = dayOf(2024, 1, 15) ?? 0;
  return Array.from({ length: size.surveys }, (_, survey) => {
    const rows = numbers.flatMap((m) =>
      points.map((p) => {
        const growth = m % 12 === 5 ? 1 + 0.12 * survey : m % 20 === 7 && survey >= size.surveys - 2 ? 1.5 : 1;
        const value = (start[m]?.[p] ?? 1) * growth * (0.93 + 0.14 * random());
        return `${id(m)},${name(p)},velocity,rms,${value.toFixed(2)},mm/s,1480,full load,measured,A1`;
      }),
    );
    const date = dayText(first + 60 * survey);
    return {
      path: `surveys/${date}/readings.csv`,
      bytes: table('machine,point,quantity,detection,value,unit,speed_rpm,state,status,instrument', rows),
    };
  });
}

const table = (header: string, rows: readonly string[]): string => `${header}\n${rows.join('\n')}\n`;
