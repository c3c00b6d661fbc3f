/** Shapes of a history: steps to a level, dips in a rise, spikes that went, classes of speed (project rules; the method of steps is held in test/published). */
import { describe, expect, it } from 'vitest';
import { folder, GROUPS, machineOf, measurementOf, QUARTERS, recordOf } from './folder.ts';

const MORE = ['2026-01-06', '2026-04-07', '2026-07-07', '2026-10-06'];
const record = (values: readonly (number | string)[], columns = {}) =>
  recordOf(
    folder(
      [
        {
          machine: 'M',
          columns: { ...GROUPS.G2R, criticality: 'critical', interval_days: '91', ...columns },
          series: [{ point: 'P', values }],
        },
      ],
      {},
      [...QUARTERS, ...MORE],
    ),
  );

describe('a step to a level', () => {
  const values = [1.0, 1.05, 0.98, 1.02, 1.0, 1.7, 1.72, 1.68, 1.71, 1.7];

  it('is named so, with its day and size, long after it came, and is carried by the change against the baseline', () => {
    const m = measurementOf(record(values), 'M', 'P');
    expect(m.trend).toMatchObject({ kind: 'plateau', changed_on: QUARTERS[5] });
    expect(m.trend?.changed_by).toBeCloseTo(1.7 / 1.01, 1);
    expect(m.travel).toBe('step');
    expect(m.notes.join(' ')).toContain(`A step: from ${QUARTERS[5]} on`);
    expect(m.forecast).toHaveProperty('none');
  });

  it('that rises again is rising', () => {
    expect(measurementOf(record([...values, 2.3]), 'M', 'P').travel).toBe('rising');
  });

  it('is none in a rise that goes on', () => {
    const m = measurementOf(record([1, 1.06, 1.13, 1.2, 1.27, 1.35, 1.43, 1.52, 1.61, 1.7]), 'M', 'P');
    expect([m.trend?.kind, m.travel, m.trend?.changed_on]).toEqual(['ramp', 'rising', null]);
  });
});

describe('a dip inside a rise', () => {
  it('is no recovery: the level stands and the reading is doubted', () => {
    const up = [1.5, 1.7, 1.9, 2.2, 2.5, 2.9, 3.3];
    const dipped = record([...up, 1.9]);
    expect(machineOf(dipped, 'M').urgency).toBe(machineOf(record(up), 'M').urgency);
    expect(measurementOf(dipped, 'M', 'P')).toMatchObject({ travel: 'held' });
  });

  it('of a little is none either: after it the rise is found again', () => {
    expect(measurementOf(record([1, 1.1, 1.2, 1.32, 1.2, 1.45, 1.6, 1.75]), 'M', 'P').trend?.kind).toBe('ramp');
  });
});

describe('a spike that went', () => {
  it('is told as such once a second reading is back, and raises nothing then', () => {
    const m = measurementOf(record([1, 1.05, 0.98, 1.02, 1, 2.4, 1.02, 1.01]), 'M', 'P');
    expect(m.notes.join(' ')).toContain(`It was high on ${QUARTERS[5]}, 2.40 mm/s, and is back`);
    expect(m.urgency).toBeNull();
  });

  it('two high ones in a row are no spike', () => {
    expect(measurementOf(record([1, 1.05, 0.98, 1.02, 1, 2.4, 2.3, 1.02, 1.01]), 'M', 'P').notes.join(' ')).not.toContain('It was high');
  });
});

describe('classes of speed', () => {
  const slow = [1.0, '', 1.02, '', 0.99, '', 1.01, ''];
  const fast = ['', 2.0, '', 2.05, '', 1.98, '', 2.02];
  const rows = (values: readonly (number | string)[], rpm: number): string[] =>
    values.flatMap((v, i) => (v === '' ? [] : [`${QUARTERS[i]},M,P,velocity,rms,${v},mm/s,${rpm}`]));
  const plant = folder(
    [{ machine: 'M', columns: { ...GROUPS.G1F, drive: 'variable', interval_days: '91' }, series: [{ point: 'P', values: [] }] }],
    {
      'surveys/history.csv': [
        'survey_date,machine,point,quantity,detection,value,unit,speed_rpm',
        ...rows(slow, 900),
        ...rows(fast, 1480),
        '',
      ].join('\n'),
    },
  );

  it('each has its own history, baseline and comparison, and print names it', () => {
    const m = measurementOf(recordOf(plant), 'M', 'P');
    expect(m.previous).toEqual({ value: 1.98, date: QUARTERS[5] });
    expect(m.baseline?.value).toBeCloseTo(2.0, 10);
    expect(m.travel).toBe('steady');
    expect(m.notes.join(' ')).toContain('Compared among readings at 1406 to 1554 r/min: 3 of 7 earlier ones.');
    const before = measurementOf(recordOf(plant, QUARTERS[6]), 'M', 'P');
    expect([before.previous?.value, before.baseline?.value]).toEqual([0.99, 1.0]);
  });
});

it('an older survey of the same level changes no verdict', () => {
  const values = [1.2, 1.25, 1.18, 1.22, 1.2, 1.21];
  const now = record(['', '', ...values]);
  const longer = record([1.2, 1.22, ...values]);
  const told = (r: typeof now) => [machineOf(r, 'M').condition, machineOf(r, 'M').urgency, measurementOf(r, 'M', 'P').travel];
  expect(told(longer)).toEqual(told(now));
});

it('the plant over time: open, repeated and closed actions, and how long the closing took', () => {
  const actions =
    'action,machine,raised,recommendation,status,closed\nM/1,M,2023-01-10,balance,done,2023-06-01\nM/2,M,2023-01-10,align,done,2023-04-20\nM/3,M,2023-04-11,look,open,\n';
  const plant = folder(
    [{ machine: 'M', columns: { ...GROUPS.G2R, interval_days: '91' }, series: [{ point: 'P', values: [1, 1, 1, 1] }] }],
    { 'actions.csv': actions },
  );
  const lines = recordOf(plant).plant_over_time.map((l) => [l.open_actions, l.repeats, l.closed_actions, l.closure_days]);
  // Raised to closed: 142 and 100 days, both between the second survey and the third.
  expect(lines).toEqual([
    [2, 0, 0, null],
    [3, 2, 0, null],
    [1, 1, 2, 121],
    [1, 1, 2, null],
  ]);
});
