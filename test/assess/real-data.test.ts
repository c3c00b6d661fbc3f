/**
 * Real readings from outside: bearing run-to-failure data of the Center for Intelligent Maintenance Systems, University of
 * Cincinnati (2004), test 2, through NASA's prognostics data repository. Skipped, saying so, where the environment does not
 * name the folder (SWAYFOLIO_REAL_DATA); never copied into the project.
 */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { recordOf } from './folder.ts';

const home = process.env['SWAYFOLIO_REAL_DATA'];
const file = home === undefined ? null : join(home, 'bearing-run-to-failure', 'readings.csv');
const there = file !== null && existsSync(file);
if (!there) console.warn('Real readings are not here (SWAYFOLIO_REAL_DATA): their tests are skipped.');

describe.skipIf(!there)('one rig with four bearings, run until one failed', () => {
  const files = there ? { 'surveys/readings.csv': readFileSync(file, 'utf8') } : {};

  it('bearing 1 stands first at the end, by level, ratio and slope', () => {
    const record = recordOf(files);
    expect(record.machines[0]?.urgency_by?.point).toBe('Bearing 1');
    const ratios = record.measurements
      .filter((m) => m.detection === 'rms')
      .map((m) => ({ point: m.point, ratio: (m.value ?? 0) / (m.baseline?.value ?? 1), slope: m.trend?.db_per_year ?? 0 }));
    const [first, ...others] = ratios.sort((a, b) => b.ratio - a.ratio);
    expect(first?.point).toBe('Bearing 1');
    for (const other of others) {
      expect(other.ratio).toBeLessThan((first?.ratio ?? 0) / 2);
      expect(other.slope).toBeLessThan(first?.slope ?? 0);
    }
    expect(record.actions[0]?.points).toEqual(['Bearing 1']);
  });

  it('at every survey: nothing raised before 21, bearing 1 first from the first alarm on, no level lost at 31 to 33, no word of recovery', () => {
    const surveys = recordOf(files).surveys.map((s) => s.id);
    expect(surveys).toHaveLength(41);
    let alarmed = false;
    surveys.forEach((survey, i) => {
      const record = recordOf(files, survey);
      const number = i + 1;
      const raised = record.actions.filter((a) => a.urgency !== null);
      if (number < 21) expect(raised, survey).toEqual([]);
      alarmed ||= raised.length > 0;
      if (alarmed) expect(raised[0]?.points, survey).toEqual(['Bearing 1']);
      if (number >= 31 && number <= 33) expect(record.machines[0]?.urgency, survey).not.toBeNull();
      expect(
        record.measurements.some((m) => m.travel === 'falling'),
        survey,
      ).toBe(false);
      expect(JSON.stringify([record.machines, record.actions, record.measurements]), survey).not.toMatch(/improved|"verified"/);
    });
    expect(alarmed).toBe(true);
  }, 60_000);

  it('a survey of near zeros at the end is a machine that stood still, not one that recovered', () => {
    const before = recordOf(files);
    const rows = before.measurements.map((m) => `2024-08-06,${m.machine},${m.point},${m.quantity},${m.unit},${m.detection},0.0009`);
    const after = recordOf({ 'surveys/readings.csv': `${(files['surveys/readings.csv'] ?? '').trimEnd()}\n${rows.join('\n')}\n` });
    expect(after.survey.id).toBe('2024-08-06');
    expect(after.machines[0]?.urgency).toBe(before.machines[0]?.urgency);
    expect(after.actions[0]?.points).toEqual(['Bearing 1']);
    expect(
      after.measurements.every((m) => m.travel === 'held' && m.doubts.some((d) => d.kind === 'all-down' || d.kind === 'near-zero')),
    ).toBe(true);
    expect(after.machines[0]?.doubts.map((d) => d.message).join(' ')).toContain('stopped?');
  });
});
