import { describe, expect, test } from 'vitest';
import { freshFolder, swayfolio } from './program.ts';

describe('limits', () => {
  const home = freshFolder();

  test('lists the sets with boundaries, source and how sure they are', () => {
    const run = swayfolio(home, ['limits']);
    expect(run.code).toBe(0);
    expect(run.stdout).toMatch(/ISO 20816-3/);
    // ISO 20816-3 group 2, rigid, velocity: 1.4, 2.8, 4.5 mm/s rms (reference/severity.md).
    expect(run.stdout).toMatch(/mm\/s rms.*A\/B 1\.4, B\/C 2\.8, C\/D 4\.5/);
    expect(run.stdout).toMatch(/recalled/);
  });

  test('--json: all, or the one that is named; text and JSON tell the same sets', () => {
    const all = JSON.parse(swayfolio(home, ['limits', '--json']).stdout);
    expect(all.length).toBeGreaterThan(10);
    for (const set of all) {
      expect(['confirmed', 'one source', 'recalled']).toContain(set.confidence);
      expect(set.boundaries).toHaveProperty('bc');
    }
    const { id } = all[3];
    // A set stands once for each of its quantities: velocity and displacement of one group share the id.
    expect(JSON.parse(swayfolio(home, ['limits', id, '--json']).stdout)).toEqual(all.filter((set: { id: string }) => set.id === id));
    expect(swayfolio(home, ['limits', id]).stdout.split('\n')[0]).toBe(id);
    const heads = swayfolio(home, ['limits'])
      .stdout.split('\n')
      .filter((line) => line !== '' && !line.startsWith(' '));
    expect(heads).toEqual([...new Set(all.map((set: { id: string }) => set.id))]);
  });

  test('an unknown id is wrong usage, with the nearest as hint', () => {
    const [first] = JSON.parse(swayfolio(home, ['limits', '--json']).stdout);
    const run = swayfolio(home, ['limits', `${first.id}x`]);
    expect(run.code).toBe(2);
    expect(run.stderr).toContain(`The nearest is ${first.id}.`);
  });
});
