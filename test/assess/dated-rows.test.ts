/**
 * `valid_from`: the row in force on the day of a reading judges that reading (the contract of the plant folder). Each case
 * leaves one dated row alone in its file, where a choice made once for all days would show.
 */
import { expect, it } from 'vitest';
import { folder, GROUPS, measurementOf, recordOf } from './folder.ts';

const values = [2.0, 2.1, 2.0, 2.1];
const motor = { machine: 'M', columns: { ...GROUPS.G2R, interval_days: '91' }, series: [{ point: 'P1', values }] };
const zones = (record: ReturnType<typeof recordOf>): unknown[] => record.surveys.map((s) => s.conditions.M);

it('own limits that begin later leave the earlier surveys to the standard', () => {
  const limits =
    'limit_set,title,basis,quantity,unit,detection,ab,bc,cd,applies_machine,valid_from\nown,Own,owner,velocity,mm/s,rms,0.5,1,1.5,M,2023-07-11\n';
  const record = recordOf(folder([motor], { 'limits.csv': limits }));
  expect(zones(record)).toEqual(['B', 'B', 'D', 'D']);
  expect(measurementOf(record, 'M', 'P1').limits?.of).toMatchObject({ bc: 1 });
});

it('a pump at a ratio to its motor is judged at the speed its motor has on the day (ISO 20816-3 shaft: 9000/√n, 13200/√n)', () => {
  const record = recordOf({
    'plant.yaml': 'plant: Test works\n',
    'machines.csv': 'machine,interval_days\nM,91\n',
    'components.csv':
      'machine,component,kind,power_kw,shaft_height_mm,speed_rpm,speed_ratio,support,bearings,valid_from\nM,motor,motor,400,355,3000,,rigid,plain,\nM,motor,motor,400,355,1200,,rigid,plain,2023-07-11\nM,wheel,compressor,400,,,1,rigid,plain,\n',
    'points.csv':
      'machine,component,point,direction,measured_on,quantity,unit,detection,low_hz,high_hz\nM,wheel,W1,radial,shaft relative,displacement,µm,true peak-to-peak,2,1000\n',
    'surveys/history.csv': [
      'survey_date,machine,point,quantity,detection,value,unit',
      ...['2023-01-10', '2023-04-11', '2023-07-11', '2023-10-10'].map((d) => `${d},M,W1,displacement,true peak-to-peak,200,µm`),
    ].join('\n'),
  });
  // A/B is 4800/√n, B/C 9000/√n, C/D 13200/√n: 164 and 241 µm at 3000 r/min, 260 and 381 at 1200.
  expect(zones(record)).toEqual(['C', 'C', 'B', 'B']);
  expect(measurementOf(record, 'M', 'W1', 'displacement').limits?.of.bc).toBeCloseTo(9000 / Math.sqrt(1200), 6);
});
