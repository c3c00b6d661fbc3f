/**
 * Ten years of a small invented plant: forty quarterly surveys, each with the folder as it stood on its day. Seeded; what is planted in it is listed
 * in PLANTED. Scatter is small, so that nothing else is raised.
 */
import type { Files } from '../assess/folder.ts';

export const DATES: readonly string[] = Array.from(
  { length: 40 },
  (_, i) => `${2016 + Math.floor(i / 4)}-${['01', '04', '07', '10'][i % 4]}-12`,
);

export const PLANTED = {
  limits: [15, 30],
  restated: { survey: 20, since: 26, before: '1.02', after: '1.52' },
  renamed: 12,
  analyst: 24,
  lapsed: 34,
  recalibrated: 35,
  unmeasured: 17,
  repaired: 10,
} as const;

/** Numbers that look random and come again: mulberry32. */
function seeded(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const LEVELS: Readonly<Record<string, number>> = { 'P-1 1H': 3.1, 'P-1 2H': 3.0, 'P-2 1H': 1.0, 'P-2 2V': 0.9, 'P-3 1H': 1.1 };

/** Three figures, 3 % of scatter. */
const VALUES: readonly Readonly<Record<string, string>>[] = (() => {
  const random = seeded(20160112);
  return DATES.map(() =>
    Object.fromEntries(Object.entries(LEVELS).map(([key, level]) => [key, (level * (0.97 + 0.06 * random())).toFixed(2)])),
  );
})();

function readings(i: number, at: number): string {
  const rows = Object.entries(VALUES[i] ?? {}).map(([key, value]) => {
    const [machine = '', point = ''] = key.split(' ');
    if (machine === 'P-1' && i === PLANTED.unmeasured) return `${machine},${point},velocity,rms,,mm/s,,no access`;
    const isRestated = key === 'P-2 1H' && i === PLANTED.restated.survey;
    const shown = isRestated ? (at >= PLANTED.restated.since ? PLANTED.restated.after : PLANTED.restated.before) : value;
    const id = key === 'P-2 2V' && i >= PLANTED.renamed ? '2R' : point;
    return `${machine},${id},velocity,rms,${shown},mm/s,1480,measured`;
  });
  return ['machine,point,quantity,detection,value,unit,speed_rpm,status', ...rows, ''].join('\n');
}

function surveyYaml(i: number): string {
  const person = i < PLANTED.analyst ? 'A. Analyst' : 'B. Analyst';
  const [on, due] = i < PLANTED.recalibrated ? ['2015-06-30', '2024-06-30'] : ['2024-09-01', '2027-09-01'];
  return `people:\n  - name: ${person}\n    category: ISO 18436-2 category II\n    expires: 2030-01-01\ninstruments:\n  - id: VM-1\n    serial: S-1\n    calibrated_on: ${on}\n    calibration_due: ${due}\napproved_by: C. Chief\n`;
}

const SETS = [
  'works,Works limits,owner,works rule,1,velocity,mm/s,rms,4.5,7.1,11,P-1,,O. Owner,2015-12-01',
  'works,Works limits,owner,works rule,2,velocity,mm/s,rms,3.5,7.1,11,P-1,2019-10-01,O. Owner,2019-09-20',
  'works,Works limits,owner,works rule,3,velocity,mm/s,rms,2.5,7.1,11,P-1,2023-07-01,O. Owner,2023-06-20',
];

function actions(at: number): string {
  const rows: string[] = [];
  if (at >= 8)
    rows.push(
      at >= PLANTED.repaired
        ? 'A-1,P-1,2018-01-12,Tighten the foot,done,2018-06-20,M. Fitter,loose foot bolt,1H,3.6'
        : 'A-1,P-1,2018-01-12,Tighten the foot,open,,,,1H,3.6',
    );
  if (at >= 28) rows.push('A-2,P-1,2023-01-12,Tighten the foot again,ordered,,,,1H,3.6');
  return ['action,machine,raised,recommendation,status,closed,closed_by,as_found,verify_point,verify_below', ...rows, ''].join('\n');
}

/** The plant folder on the day of survey `at`. */
export function folderAt(at: number): Files {
  const second = at >= PLANTED.renamed ? '2R' : '2V';
  const point = (machine: string, id: string): string => `${machine},pump,${id},${id},horizontal,bearing housing,velocity,mm/s,rms,10,1000`;
  return {
    'plant.yaml': 'plant: Ten Year Works\n',
    'machines.csv':
      'machine,name,area,criticality,interval_days\nP-1,Feed pump,North,critical,91\nP-2,Drain pump,North,general,91\nP-3,Sump pump,North,critical,91\n',
    'components.csv': `machine,component,kind,power_kw,speed_rpm,drive,support,bearings,pump_category\n${['P-1', 'P-2', 'P-3'].map((m) => `${m},pump,pump,75,1480,fixed,rigid,rolling,II\n`).join('')}`,
    'points.csv': `machine,component,point,location,direction,measured_on,quantity,unit,detection,low_hz,high_hz\n${[point('P-1', '1H'), point('P-1', '2H'), point('P-2', '1H'), point('P-2', second), point('P-3', '1H')].join('\n')}\n`,
    'limits.csv': `limit_set,title,basis,source,edition,quantity,unit,detection,ab,bc,cd,applies_machine,valid_from,approved_by,approved_on\n${SETS.slice(0, 1 + PLANTED.limits.filter((i) => at >= i).length).join('\n')}\n`,
    'actions.csv': actions(at),
    ...(at >= PLANTED.renamed ? { 'renames.csv': 'kind,machine,old,new,since\npoint,P-2,2V,2R,2019-01-01\n' } : {}),
    ...Object.fromEntries(
      DATES.slice(0, at + 1).flatMap((date, i) => [
        [`surveys/${date}/survey.yaml`, surveyYaml(i)],
        [`surveys/${date}/readings.csv`, readings(i, at)],
      ]),
    ),
  };
}
