/**
 * The sixteen urgency cases of the assessment rules, through the whole program: a plant folder in, the record out.
 * Source: the project's own rules (check value 31: "project rules, no outside source").
 */
import { describe, expect, it } from 'vitest';
import { type Files, folder, GROUPS, type MachineInput, machineOf, measurementOf, recordOf, type SeriesInput } from './folder.ts';

type Group = keyof typeof GROUPS;

const machine = (
  id: string,
  criticality: string,
  group: Group,
  series: readonly SeriesInput[],
  more: Readonly<Record<string, string>> = {},
): MachineInput => ({
  machine: id,
  columns: { criticality, ...GROUPS[group], interval_days: '91', ...more },
  series,
});

const one = (
  criticality: string,
  group: Group,
  values: readonly (number | string)[],
  more: Readonly<Record<string, string>> = {},
): MachineInput => machine('M', criticality, group, [{ point: 'P1', values }], more);

/** Urgency and rule of machine M. */
function level(machines: readonly MachineInput[], more: Files = {}) {
  const { urgency, rule } = machineOf(recordOf(folder(machines, more)), 'M');
  return { urgency, rule };
}

const spare = (values: readonly (number | string)[]): MachineInput =>
  machine('S', 'essential', 'G2R', [{ point: 'P1', values }], { spare_group: 'pair' });
const closed = (date: string): Files => ({
  'actions.csv': `action,machine,raised,recommendation,status,closed,closed_by\nM/2023-07-11/1,M,2023-07-11,balance,done,${date},fitter\n`,
});

describe('urgency cases of the rules', () => {
  it('1: a jump into D is now', () => {
    expect(level([one('general', 'G2R', [2.0, 2.1, 2.2, 5.0])])).toEqual({ urgency: 'now', rule: 'D1' });
  });

  it('2: steady in D is now where critical, within a month where general', () => {
    expect(level([one('critical', 'G1R', [7.4, 7.5, 7.3, 7.4])])).toEqual({ urgency: 'now', rule: 'D4' });
    expect(level([one('general', 'G1R', [7.4, 7.5, 7.3, 7.4])])).toEqual({ urgency: 'within a month', rule: 'D4' });
  });

  it('3: rising into D; a proven spare relieves, one last read three intervals ago does not', () => {
    const values = [4.0, 4.2, 4.4, 5.2];
    expect(level([one('essential', 'G2R', values)])).toEqual({ urgency: 'now', rule: 'D2' });
    const paired = one('essential', 'G2R', values, { spare_group: 'pair' });
    expect(level([paired, spare([1.0, 1.1, 1.0, 1.1])])).toEqual({ urgency: 'within a week', rule: 'D2' });
    expect(level([paired, spare([1.0, '', '', ''])])).toEqual({ urgency: 'now', rule: 'D2' });
  });

  it('4: steady in C waits for the next planned stop', () => {
    expect(level([one('essential', 'G2R', [3.2, 3.1, 3.3, 3.2])])).toEqual({ urgency: 'next planned stop', rule: 'C4' });
  });

  it('5: rising into C', () => {
    const values = [1.9, 2.4, 2.6, 3.4];
    expect(level([one('essential', 'G2R', values)])).toEqual({ urgency: 'within a month', rule: 'C2' });
    expect(level([one('essential', 'G2R', values, { spare_group: 'pair' }), spare([1, 1, 1, 1])])).toEqual({
      urgency: 'next planned stop',
      rule: 'C2',
    });
  });

  it('6: small changes in A are none', () => {
    expect(level([one('critical', 'G2R', [0.8, 0.8, 0.9, 1.2])])).toEqual({ urgency: null, rule: null });
  });

  it('7: fast in B', () => {
    expect(level([one('critical', 'G2R', [0.9, 0.9, 1.0, 2.5])])).toEqual({ urgency: 'within a week', rule: 'B1' });
  });

  it('8: a smooth machine that trebled is watched', () => {
    expect(level([one('general', 'G1F', [0.6, 0.6, 0.7, 1.9])])).toEqual({ urgency: 'watch', rule: 'A3' });
  });

  it('9: the first reading ever', () => {
    expect(level([one('essential', 'G2R', [3.3])])).toEqual({ urgency: 'within a month', rule: 'C3' });
    expect(level([one('essential', 'G2R', [2.0])])).toEqual({ urgency: null, rule: null });
  });

  it('10: a plateau is a step, not a rise', () => {
    expect(level([one('critical', 'G2R', [1.2, 1.2, 1.2, 2.3, 2.3, 2.4])])).toEqual({ urgency: 'next planned stop', rule: 'B3' });
  });

  it('11: one quantity alone at a bearing is repeated first; a second one supports it', () => {
    const acceleration: SeriesInput = {
      point: 'P1',
      quantity: 'acceleration',
      unit: 'm/s²',
      values: [5.0, 5.2, 5.1, 34],
      pointColumns: { high_hz: '10000' },
    };
    const flat: SeriesInput = { point: 'P1', values: [1.0, 1.0, 1.0, 1.0] };
    const up: SeriesInput = { point: 'P1', values: [0.8, 0.8, 0.8, 1.36] };
    expect(level([machine('M', 'essential', 'G2R', [acceleration, flat])])).toEqual({ urgency: 'within a week', rule: 'R1' });
    expect(level([machine('M', 'essential', 'G2R', [acceleration, up])])).toEqual({ urgency: 'now', rule: 'D1' });
  });

  it('12: an action closed: not verified stays open, verified ends it', () => {
    const still = recordOf(folder([one('essential', 'G2R', [5.0, 5.1, 5.0, 4.8])], closed('2023-09-01')));
    expect(machineOf(still, 'M')).toMatchObject({ urgency: 'within a week', rule: 'D4' });
    expect(still.actions[0]).toMatchObject({ action: 'M/2023-07-11/1', status: 'open', verification: { result: 'not verified' } });
    const done = recordOf(folder([one('essential', 'G2R', [5.0, 5.1, 5.0, 1.6])], closed('2023-09-01')));
    expect(machineOf(done, 'M')).toMatchObject({ urgency: null, rule: null });
    expect(done.actions[0]).toMatchObject({
      rank: 0,
      status: 'done',
      verification: { result: 'verified', target: { value: 2.52 }, after: { value: 1.6 } },
    });
  });

  it('13: no access once holds the level; three times in a row raises it', () => {
    const c4 = [3.2, 3.1, 3.3, 3.2];
    expect(level([one('critical', 'G2R', [...c4, 'no access'])])).toMatchObject({ urgency: 'within a month' });
    expect(level([one('critical', 'G2R', [...c4, 'no access', 'no access', 'no access'])])).toEqual({
      urgency: 'within a week',
      rule: 'M2',
    });
  });

  it('14: an unexplained fall holds the level until it is seen again', () => {
    const first = recordOf(folder([one('essential', 'G2R', [3.4, 3.5, 3.6, 1.2])]));
    expect(machineOf(first, 'M').urgency).toBe('next planned stop');
    expect(measurementOf(first, 'M', 'P1')).toMatchObject({
      zone: 'A',
      travel: 'held',
      doubts: [{ kind: 'unexplained-fall', effect: 'held' }],
    });
    expect(level([one('essential', 'G2R', [3.4, 3.5, 3.6, 1.2, 1.3])])).toEqual({ urgency: null, rule: null });
  });

  it('15: a factor between units is doubted, never corrected', () => {
    const high = recordOf(folder([one('essential', 'G2R', [2.0, 2.0, 2.1, 53.3])]));
    expect(machineOf(high, 'M')).toMatchObject({ urgency: 'now', rule: 'D1' });
    expect(measurementOf(high, 'M', 'P1')).toMatchObject({
      value: 53.3,
      zone: 'D',
      doubts: [{ kind: 'unit-factor', effect: 're-measure' }],
    });
    const points = ['P1', 'P2', 'P3'].map((point) => ({ point, values: [2.0, 2.0, 2.1, 0.083] }));
    const low = recordOf(folder([machine('M', 'essential', 'G2R', points)]));
    expect(machineOf(low, 'M').urgency).toBeNull();
    expect(measurementOf(low, 'M', 'P1').travel).toBe('held');
    expect(measurementOf(low, 'M', 'P2').doubts.length).toBeGreaterThan(0);
  });

  it('16: all points down at once: stopped, held, never improved', () => {
    const fast = [0.9, 0.9, 1.0, 2.5];
    const points = ['P1', 'P2', 'P3'].map((point) => ({ point, values: [...fast, 0.075] }));
    const record = recordOf(folder([machine('M', 'critical', 'G2R', points)]));
    expect(machineOf(record, 'M').urgency).toBe('within a week');
    for (const { point } of points) {
      const measurement = measurementOf(record, 'M', point);
      expect(measurement.travel).toBe('held');
      expect(measurement.doubts.map((d) => d.kind)).toContain('all-down');
      expect(measurement.doubts.find((d) => d.kind === 'all-down')?.message).toContain('stopped?');
    }
  });
});
