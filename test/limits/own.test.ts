/** Order of precedence, dated rows, conflicts and names (section 1 of the assessment: our own rules, no outside source). */
import { describe, expect, it } from 'vitest';
import type { LimitRow } from '../../src/plant/types.ts';
import { say } from '../../src/words/say.ts';
import { type Asked, chosen } from './question.ts';

const motor = { kind: 'motor', powerKw: 75, shaftHeightMm: 225, speedRpm: 1480, support: 'rigid' } as const;
const row = (limitSet: string, more: Partial<LimitRow> = {}): Partial<LimitRow> => ({ limitSet, ...more });
const byPoint = row('by-point', { appliesMachine: 'M', appliesPoint: 'P' });
const byComponent = row('by-component', { appliesMachine: 'M', appliesComponent: 'C' });
const byMachine = row('by-machine', { appliesMachine: 'M' });
const byKind = row('by-kind', { appliesKind: 'motor' });
const idOf = (asked: Asked): string | null => chosen(asked).set?.id ?? null;

describe('order', () => {
  const limits = [byKind, byMachine, byComponent, byPoint, row('of-point'), row('of-component')];

  it('limit_set of the point, of the component, rows by point, component, machine, kind, then the published one', () => {
    expect(idOf({ component: { ...motor, limitSet: 'of-component' }, point: { limitSet: 'of-point' }, limits })).toBe('of-point');
    expect(idOf({ component: { ...motor, limitSet: 'of-component' }, limits })).toBe('of-component');
    expect(chosen({ component: motor, limits })).toMatchObject({ set: { id: 'by-point' }, rule: 'limits.own.point' });
    expect(chosen({ component: motor, limits: limits.slice(0, 3) })).toMatchObject({
      set: { id: 'by-component' },
      rule: 'limits.own.component',
    });
    expect(chosen({ component: motor, limits: limits.slice(0, 2) })).toMatchObject({
      set: { id: 'by-machine' },
      rule: 'limits.own.machine',
    });
    expect(chosen({ component: motor, limits: limits.slice(0, 1) })).toMatchObject({ set: { id: 'by-kind' }, rule: 'limits.own.kind' });
    expect(idOf({ component: motor })).toBe('iso20816-3-group2-rigid');
  });

  it('the order of rows in the file changes nothing', () => {
    expect(idOf({ component: motor, limits: [...limits].reverse() })).toBe('by-point');
  });

  it('a row for another machine, component, point or kind does not speak', () => {
    for (const other of [
      { appliesMachine: 'N' },
      { appliesMachine: 'M', appliesComponent: 'D' },
      { appliesMachine: 'M', appliesPoint: 'Q' },
      { appliesKind: 'pump' as const },
      { appliesMachine: 'N', appliesKind: 'motor' as const },
    ]) {
      expect(idOf({ component: motor, limits: [row('other', other)] })).toBe('iso20816-3-group2-rigid');
    }
  });

  it('a row that applies to nothing serves by its name alone', () => {
    expect(idOf({ component: motor, limits: [row('loose')] })).toBe('iso20816-3-group2-rigid');
  });

  it('another quantity or measuring place: the next rank serves; a pipe only where the row says pipe', () => {
    expect(idOf({ component: motor, limits: [byKind, { ...byPoint, quantity: 'acceleration', unit: 'm/s²' }] })).toBe('by-kind');
    expect(idOf({ component: motor, limits: [{ ...byMachine, measuredOn: 'pipe' }] })).toBe('iso20816-3-group2-rigid');
    expect(idOf({ component: motor, point: { measuredOn: 'pipe' }, limits: [{ ...byMachine, measuredOn: 'pipe' }] })).toBe('by-machine');
    expect(idOf({ component: motor, point: { measuredOn: 'pipe' }, limits: [byMachine] })).toBeNull();
  });

  it('own limits serve what no standard does, and keep basis and approval', () => {
    const own = chosen({
      component: { kind: 'screw compressor' },
      limits: [row('maker', { appliesKind: 'screw compressor', basis: 'maker', ab: null, approvedBy: 'R. Example', approvedOn: 19_000 })],
    });
    expect(own.set).toMatchObject({
      id: 'maker',
      basis: 'maker',
      ab: null,
      bc: 2,
      published: false,
      confidence: null,
      approvedBy: 'R. Example',
      approvedOn: 19_000,
    });
  });
});

describe('dates', () => {
  const dated = [row('own', { appliesMachine: 'M', bc: 2 }), row('own', { appliesMachine: 'M', bc: 2.5, validFrom: 20_000 })];

  it('the row in force on the day judges: the new one from its own day on', () => {
    expect(chosen({ component: motor, limits: dated, day: 19_999 }).set?.bc).toBe(2);
    expect(chosen({ component: motor, limits: dated, day: 20_000 }).set?.bc).toBe(2.5);
  });

  it('not yet in force: the next in order; by name, none, and said', () => {
    const late = [row('late', { appliesMachine: 'M', validFrom: 20_001 })];
    expect(idOf({ component: motor, limits: late })).toBe('iso20816-3-group2-rigid');
    const named = chosen({ component: { ...motor, limitSet: 'late' }, limits: [row('late', { validFrom: 20_001 })] });
    expect(named).toMatchObject({ set: null, rule: 'limits.none.named', conflict: null });
    expect(say('en', named.rule, named.facts)).toContain('in force');
  });
});

describe('conflicts', () => {
  it('two in force at one rank, of two names or of one', () => {
    for (const second of [row('second', { appliesMachine: 'M', bc: 2.5 }), row('by-machine', { appliesMachine: 'M', bc: 2.5 })]) {
      const choice = chosen({ component: motor, limits: [byMachine, second] });
      expect(choice).toMatchObject({ set: null, rule: 'limits.none.conflict' });
      expect(choice.conflict).toMatch(/two limits .* by-machine \(1\/2\/3 mm\/s\)/);
      expect(say('en', choice.rule, choice.facts)).toContain('by-machine');
    }
  });

  it('a conflict at a lower rank does not matter where a higher one speaks', () => {
    expect(idOf({ component: motor, limits: [byPoint, byMachine, row('second', { appliesMachine: 'M' })] })).toBe('by-point');
  });

  it('a name that no set bears', () => {
    expect(chosen({ component: { ...motor, limitSet: 'nowhere' } }).conflict).toBe('no limit set is called "nowhere"');
    expect(chosen({ component: { ...motor, limitSet: 'constructor' } }).conflict).not.toBeNull();
  });
});

describe('published sets by name', () => {
  it('classes and acceptance limits, in a survey of any kind; the plant’s own set of that name comes first', () => {
    expect(idOf({ component: { ...motor, limitSet: 'iso10816-1-class2' } })).toBe('iso10816-1-class2');
    for (const surveyKind of ['routine', 'acceptance'] as const)
      expect(idOf({ component: { ...motor, limitSet: 'api610-preferred' }, surveyKind })).toBe('api610-preferred');
    expect(chosen({ component: { ...motor, limitSet: 'iso10816-1-class2' }, limits: [row('iso10816-1-class2', { bc: 9 })] }).set?.bc).toBe(
      9,
    );
  });

  it('a set without a row for the quantity gives none, with the name', () => {
    expect(
      chosen({ component: { ...motor, limitSet: 'iso10816-1-class2' }, series: { quantity: 'displacement', unit: 'µm' } }),
    ).toMatchObject({ set: null, rule: 'limits.none.named', facts: { limit_set: 'iso10816-1-class2' } });
  });

  it('the shaft formulas at the rated speed; where that is unknown, the reason, and no talk of an unknown name', () => {
    const shaft = {
      point: { measuredOn: 'shaft relative', limitSet: 'iso20816-3-shaft' },
      series: { quantity: 'displacement', unit: 'µm', detection: 'true peak-to-peak' },
    } as const;
    expect(chosen({ component: { kind: 'other', speedRpm: 3600 }, ...shaft }).set?.ab).toBeCloseTo(80, 9);
    expect(chosen({ component: { kind: 'other' }, ...shaft })).toMatchObject({
      set: null,
      rule: 'limits.none.shaft_speed',
      conflict: null,
    });
  });
});
