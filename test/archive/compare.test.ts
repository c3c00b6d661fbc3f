/** Ten years of records: compare finds each planted fact, and nothing else. */
import { describe, expect, it } from 'vitest';
import { compareRecords } from '../../src/archive/compare.ts';
import { exceeds } from '../../src/assess/exceeds.ts';
import { COMPARISON, writeComparison } from '../../src/record/comparison.ts';
import { comparisonCsv } from '../../src/table/comparison.ts';
import { recordOf } from '../assess/folder.ts';
import { DATES, folderAt, PLANTED } from './ten-years.ts';

const records = DATES.map((date, i) => ({ name: `issued/${date}`, record: recordOf(folderAt(i), date) }));
const compared = (given = records) => compareRecords(given, { today: null, toolVersion: 'test', exceeds, notes: [] });
const c = compared();
const at = (i: number): string => DATES[i] as string;

describe('ten years', () => {
  it('one restated reading, with both values and both places', () => {
    expect(c.restated).toHaveLength(1);
    const file = `surveys/${at(PLANTED.restated.survey)}/readings.csv`;
    expect(c.restated[0]).toMatchObject({
      machine: 'P-2',
      point: '1H',
      survey: at(20),
      before: '1.02 mm/s',
      after: '1.52 mm/s',
      before_record: `issued/${at(25)}`,
      before_file: file,
      before_line: 4,
      record: `issued/${at(26)}`,
      file,
      line: 4,
      instrument: 'VM-1',
      person: 'A. Analyst',
    });
  });

  it('verdicts that differ are those of the machine whose limits changed, before the change that matters', () => {
    const differing = c.verdicts.filter((v) => v.why !== null);
    expect(differing.map((v) => `${v.machine} ${v.survey} ${v.issued} ${v.today}`)).toEqual(
      DATES.slice(0, PLANTED.limits[1])
        .filter((_, i) => i !== PLANTED.unmeasured)
        .map((date) => `P-1 ${date} A B`),
    );
    expect(differing[0]?.why).toContain('4.5/7.1/11');
    expect(differing[0]?.why).toContain('2.5/7.1/11');
    expect(c.verdicts).toHaveLength(120);
  });

  it('changes: two of limits, one id, one analyst, one calibration, and no others', () => {
    expect(c.changes.map(({ kind, of, since, by, record }) => [kind, of, since, by, record])).toEqual([
      ['id', 'point of P-2', '2019-01-01', 'C. Chief', `issued/${at(12)}`],
      ['limits', 'works velocity rms', '2019-10-01', 'O. Owner, 2019-09-20', `issued/${at(15)}`],
      ['person', 'A. Analyst', at(24), 'C. Chief', `issued/${at(24)}`],
      ['person', 'B. Analyst', at(24), 'C. Chief', `issued/${at(24)}`],
      ['limits', 'works velocity rms', '2023-07-01', 'O. Owner, 2023-06-20', `issued/${at(30)}`],
      ['calibration', 'VM-1', at(35), 'C. Chief', `issued/${at(35)}`],
    ]);
    expect(c.vanished).toEqual([]);
  });

  it('the lapsed calibration, by survey and number of readings', () => {
    expect(c.past_due).toMatchObject([
      { kind: 'calibration', of: 'VM-1', ended: '2024-06-30', survey: at(34), readings: 5, file: `surveys/${at(34)}/readings.csv` },
    ]);
  });

  it('the quarter in which a critical machine was not measured', () => {
    expect(c.coverage.map((m) => [m.machine, m.quarters_missed])).toEqual([
      ['P-1', ['2020 Q2']],
      ['P-2', []],
      ['P-3', []],
    ]);
    expect(c.coverage[0]).toMatchObject({ from: '2020-01-12', to: '2020-07-12', longest_days: 182 });
    expect(c.coverage[0]?.surveys[PLANTED.unmeasured]).toMatchObject({ status: 'not measured', why: 'no access' });
  });

  it('the action that came back, and what was found the first time', () => {
    expect(c.actions.map((a) => [a.action, a.status, a.verification, a.days_open, a.flags])).toEqual([
      ['A-1', 'done', 'verified', 159, []],
      ['A-2', 'ordered', 'not yet measured', 1004, ['never closed', 'recurs: A-1 was closed on 2018-06-20']],
    ]);
    expect(c.as_found).toMatchObject([{ action: 'A-1', as_found: 'loose foot bolt' }]);
    expect(c.forecasts).toEqual([]);
  });

  it('the same bytes whatever the order of the records, whole by its schema, the cautions in the last column', () => {
    const text = writeComparison(c);
    expect(writeComparison(compared([...records].reverse()))).toBe(text);
    expect(COMPARISON.parse(JSON.parse(text))).toEqual(c);
    const csv = comparisonCsv(c);
    expect(csv.split('\r\n')[0]).toMatch(/,caution$/);
    for (const line of csv.trim().split('\r\n').slice(1))
      expect(line).toMatch(/"This is screening by overall values, not a diagnosis\..*"$/);
  });
});

describe('what is missing to an action', () => {
  const [first, second] = [records[38] as (typeof records)[number], records[39] as (typeof records)[number]];
  const ended = (result: 'not verified' | 'not yet measured' | 'verified' | null, status: 'done' | 'rejected' = 'done') => {
    const actions = second.record.actions
      .filter((a) => a.action === 'A-2')
      .map((a) => ({
        ...a,
        status,
        closed: '2025-09-01',
        closed_by: 'M. Fitter',
        verification: result === null || a.verification === null ? null : { ...a.verification, result },
      }));
    return compared([first, { ...second, record: { ...second.record, actions } }]).actions.find((a) => a.action === 'A-2')?.flags;
  };
  it.each([
    ['not yet measured', 'done', ['closed without a reading after']],
    [null, 'done', ['closed without a reading after']],
    ['not verified', 'done', ['closed, not verified by the reading after']],
    ['verified', 'done', []],
    ['not yet measured', 'rejected', ['rejected by M. Fitter']],
  ] as const)('%s, %s', (result, status, flags) => {
    expect(ended(result, status)?.filter((flag) => !flag.startsWith('recurs'))).toEqual(flags);
  });

  it('an open action that the next record does not have is told', () => {
    const flags = compared([first, { ...second, record: { ...second.record, actions: [] } }]).actions.find(
      (a) => a.action === 'A-2',
    )?.flags;
    expect(flags).toContain(`no longer reported after issued/${at(38)}, never closed`);
  });
});

describe('other changes of a later record', () => {
  const [first, second] = [records[38] as (typeof records)[number], records[39] as (typeof records)[number]];

  it('a unit that is converted restates nothing; a point that went is told', () => {
    const inInches = second.record.measurements.map((m) =>
      m.machine === 'P-3'
        ? {
            ...m,
            unit: 'in/s',
            history: { ...m.history, value: m.history.value.map((v) => (v === null ? null : Number((v / 25.4).toPrecision(12)))) },
          }
        : m,
    );
    const c2 = compared([first, { ...second, record: { ...second.record, measurements: inInches.filter((m) => m.point !== '2R') } }]);
    expect(c2.restated).toEqual([]);
    expect(c2.changes.map((x) => [x.kind, x.of, x.before, x.after])).toEqual([
      ['point', 'P-2 2R velocity rms', 'measured', 'gone'],
      ['unit', 'P-3 1H velocity rms', 'mm/s', 'in/s'],
    ]);
    expect(c2.vanished.map((v) => `${v.machine} ${v.point}`)).toEqual(['P-2 2R']);
  });

  it('a forecast stands beside the first reading above its boundary', () => {
    const { record } = first;
    const forecast = { boundary: 'B/C', earliest: '2025-08-01', likely: '2025-10-01', latest: '2026-01-01', range: 0.8 };
    const measurements = record.measurements.map((m) => (m.machine === 'P-3' ? { ...m, forecast } : m));
    const crossed = second.record.measurements.map((m) =>
      m.machine === 'P-3' ? { ...m, history: { ...m.history, value: m.history.value.map((v, i) => (i === 39 ? 99 : v)) } } : m,
    );
    const outcome = (later: typeof measurements) =>
      compared([
        { ...first, record: { ...record, measurements } },
        { ...second, record: { ...second.record, measurements: later } },
      ]).forecasts.map((f) => f.outcome);
    expect(outcome(crossed)).toEqual(['within the range']);
    expect(outcome([...second.record.measurements])).toEqual(['not crossed so far']);
  });
});
