/**
 * Real readings from outside: bearing run-to-failure data of the Center for Intelligent Maintenance Systems, University of
 * Cincinnati (2004), test 2, through NASA's prognostics data repository. Skipped, saying so, where the environment does not
 * name the folder (SWAYFOLIO_REAL_DATA); never copied into the project.
 */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { URGENCIES } from '../../src/plant/types.ts';
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
    const ratios = record.measurements.filter((m) => m.detection === 'rms').map((m) => ({ point: m.point, ratio: (m.value ?? 0) / (m.baseline?.value ?? 1), slope: m.trend?.db_per_year ?? 0 }));
    const [first, ...others] = ratios.sort((a, b) => b.ratio - a.ratio);
    expect(first?.point).toBe('Bearing 1');
    for (const other of others) {
      expect(other.ratio).toBeLessThan((first?.ratio ?? 0) / 2);
      expect(other.slope).toBeLessThan(first?.slope ?? 0);
    }
    expect(record.actions[0]?.points).toEqual(['Bearing 1']);
  });

  it('nothing is raised above watch before survey 21', () => {
    const surveys = recordOf(files).surveys.map((s) => s.id);
    for (const survey of surveys.slice(0, 20)) {
      const record = recordOf(files, survey);
      for (const m of record.machines) expect(m.urgency === null || URGENCIES.indexOf(m.urgency) >= URGENCIES.indexOf('watch')).toBe(true);
    }
  });

  it('a fall in the middle of the failure is no recovery', () => {
    const surveys = recordOf(files).surveys.map((s) => s.id);
    for (const survey of surveys.slice(30, 33)) {
      const record = recordOf(files, survey);
      expect(record.machines[0]?.urgency).not.toBeNull();
      expect(record.measurements.every((m) => m.travel !== 'falling')).toBe(true);
    }
  });
});
