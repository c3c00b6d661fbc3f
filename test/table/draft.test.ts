/**
 * Drafted findings: numbers, place, comparison and dates from the record; a cause only where someone may diagnose. What an
 * exception is asked for is the wording list of the assessment rules (project rules, no outside source).
 */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { findingsHeader, FINDINGS_HEAD } from '../../src/survey/findings.ts';
import { appendRows } from '../../src/table/append.ts';
import { draftRows } from '../../src/table/draft.ts';
import { type Files, folder, GROUPS, recordOf } from '../assess/folder.ts';
import { NEVER } from '../page/never.ts';

const DATES = ['2024-10-08', '2025-01-07', '2025-04-08', '2025-07-08'];
const machine = (id: string, values: readonly (number | string)[], more = {}) => ({
  machine: id,
  columns: { ...GROUPS.G2R, criticality: 'essential', interval_days: '91', bearings: 'rolling' },
  series: [{ point: '1H', values, ...more }],
});
const analyst = (category: string): Files => ({
  'surveys/2025-07-08/survey.yaml': `people:\n  - name: Ada Winterbourne\n    category: ${category}\n`,
});
const CATEGORY_II = analyst('ISO 18436-2 category II');

const rowsOf = (values: readonly (number | string)[], more: Files = CATEGORY_II) =>
  draftRows(recordOf(folder([machine('M', values)], more, DATES)));

describe('a drafted finding', () => {
  it('in D: observation with numbers, place, comparison and dates; a repair by a day, stopped; the target of 0.9 × B/C', () => {
    const [row] = rowsOf([2.0, 2.1, 2.2, 5.0]);
    expect(row?.finding).toBe('M/2025-07-08/1');
    for (const part of [
      '1H velocity 5.00 mm/s rms',
      'zone D',
      '4.50 mm/s',
      '2.20 mm/s rms on 2025-04-08',
      'baseline is 2.10 mm/s rms',
      'since 2024-10-08',
    ])
      expect(row?.['finding_text']).toContain(part);
    expect(row?.['recommendation']).toMatch(/responsible person.*needs a stop.*Today\./);
    expect(row?.['needs_stop']).toBe('yes');
    expect(row?.['check_first']).toMatch(/spectrum.*Isolate by site rules/);
    expect([row?.['verify_point'], row?.['verify_below'], row?.['due']]).toEqual(['1H', '2.52', '2025-07-08']);
    expect(row?.['confidence']).toBe('low');
  });

  it('in A, risen fast: re-measure and find why, not repair; the target of baseline + q', () => {
    const [row] = rowsOf([0.5, 0.5, 0.5, 1.35]);
    expect(row?.['recommendation']).toMatch(/^Re-measure 1H and find why/);
    expect(row?.['needs_stop']).toBe('no');
    expect(Number(row?.['verify_below'])).toBeCloseTo(0.5 + 0.25 * 2.8, 10);
  });

  it('not measured: no cause, no target, the work is to measure it', () => {
    const [row] = rowsOf([3.2, 3.1, 3.3, 'no access']);
    expect(row?.['finding_text']).toContain('last 3.30 mm/s rms, C, on 2025-04-08');
    expect([row?.['likely_cause'], row?.['confidence'], row?.['needs_stop']]).toEqual(['', '', 'no']);
  });

  it('only watched: nothing is drafted', () => {
    expect(rowsOf([0.6, 0.6, 0.65, 0.7])).toEqual([]);
    const general = { ...machine('M', [0.6, 0.6, 0.7, 1.9]), columns: { ...GROUPS.G1F, criticality: 'general', interval_days: '91' } };
    const record = recordOf(folder([general], CATEGORY_II, DATES));
    expect(record.machines[0]?.urgency).toBe('watch');
    expect(draftRows(record)).toEqual([]);
  });
});

describe('a cause', () => {
  const files = (more: Files): Files =>
    folder(
      [
        {
          ...machine('M', [1, 1, 1, 1]),
          series: [
            { point: '1H', values: [1, 1, 1, 1.02] },
            { point: '1H', quantity: 'acceleration', unit: 'm/s²', values: [5, 5.2, 5.1, 34] },
          ],
        },
      ],
      more,
      DATES,
    );

  it('is said as consistent with, and what confirms it, where someone of category II signs', () => {
    const [row] = draftRows(recordOf(files(CATEGORY_II)));
    expect(row?.['likely_cause']).toContain('early bearing damage or poor lubrication');
    expect(row?.['less_likely']).toContain('mounting of the sensor');
    expect(row?.['check_first']).toContain('repeat with the same mount; spectrum');
  });

  it('is not said where nobody of that category signs', () => {
    const [row] = draftRows(recordOf(files(analyst('ISO 18436-2 category I'))));
    expect(row?.['finding_text']).toContain('34.0 m/s²');
    expect([row?.['likely_cause'], row?.['less_likely']]).toEqual(['', '']);
  });
});

describe('drafting again', () => {
  const plant = folder([machine('M', [2.0, 2.1, 2.2, 5.0]), machine('N', [3.2, 3.1, 3.3, 3.2])], CATEGORY_II, DATES);
  const drafted = (files: Files): Files => {
    const at = 'surveys/2025-07-08/findings.csv';
    const before = files[at] === undefined ? null : new TextEncoder().encode(files[at]);
    return {
      ...files,
      [at]: new TextDecoder().decode(appendRows(before, FINDINGS_HEAD, draftRows(recordOf(files)), findingsHeader).bytes),
    };
  };

  it('adds nothing, keeps the actions’ ids and order, and is read as the analyst’s words', () => {
    const once = drafted(plant);
    const [before, after] = [recordOf(plant), recordOf(once)];
    expect(draftRows(after)).toEqual([]);
    expect(after.actions.map((a) => [a.action, a.rank, a.urgency, a.due])).toEqual(
      before.actions.map((a) => [a.action, a.rank, a.urgency, a.due]),
    );
    expect(after.actions.map((a) => a.origin)).toEqual(['analyst', 'analyst']);
  });

  it('a finding of the analyst keeps the draft away from its machine', () => {
    const own = { ...plant, 'surveys/2025-07-08/findings.csv': 'finding,machine,finding\nF-1,M,seen\n' };
    expect(draftRows(recordOf(own)).map((row) => row['machine'])).toEqual(['N']);
  });

  it('says nothing that no output may say', () => {
    for (const row of draftRows(recordOf(plant))) for (const cell of Object.values(row)) expect(cell).not.toMatch(NEVER);
  });
});

it('no template and no sentence of the program says what no output may say', () => {
  const home = new URL('../../templates/', import.meta.url);
  const files = readdirSync(home, { recursive: true, encoding: 'utf8' }).filter((f) => /\.(hbs|json|js)$/.test(f));
  expect(files.length).toBeGreaterThan(15);
  for (const file of files) expect(readFileSync(new URL(file, home), 'utf8'), file).not.toMatch(NEVER);
});
