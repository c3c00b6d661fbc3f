/** The committed demo plant is what its maker makes, and its record says each story as the rules, worked by hand, want it. */
import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import type { Doubt, RecordMeasurement, SwayfolioRecord } from '../../src/record/types.ts';
import { realShell } from '../../src/shell/shell.ts';
import { readPlant } from '../../src/survey/read.ts';
import { demoFiles } from './folder.ts';
import { INDICATIONS, QUIET, STORIES, type Story } from './stories.ts';

const folder = new URL('../../demo-survey', import.meta.url).pathname;
const { plant, problems } = readPlant(realShell, folder);
const records = new Map<string, SwayfolioRecord>();

function recordOf(survey: string | undefined): SwayfolioRecord {
  if (plant === null) throw new Error('the demo plant has errors');
  const key = survey ?? 'last';
  const record = records.get(key) ?? assess(plant, { survey: survey ?? null, toolVersion: 'test' });
  records.set(key, record);
  return record;
}

function readingOf(record: SwayfolioRecord, story: Story): RecordMeasurement | null {
  const { at } = story;
  if (at === undefined) return null;
  const found = record.measurements.find(
    (m) =>
      m.machine === story.machine &&
      m.point === at.point &&
      m.quantity === (at.quantity ?? 'velocity') &&
      (at.detection === undefined || m.detection === at.detection),
  );
  if (found === undefined) throw new Error(`${story.machine} ${at.point} is not in the record`);
  return found;
}

const committed = (below: string): string[] =>
  readdirSync(join(folder, below)).flatMap((name) => {
    const path = below === '' ? name : `${below}/${name}`;
    if (path === 'out') return [];
    return statSync(join(folder, path)).isDirectory() ? committed(path) : [path];
  });

const bears = (doubts: readonly Doubt[], kind: string, effect: string | undefined): boolean =>
  doubts.some((d) => d.kind === kind && (effect === undefined || d.effect === effect));

describe('the folder', () => {
  it('is byte for byte what its maker makes', () => {
    const made = demoFiles();
    expect(committed('').sort()).toEqual(made.map((f) => f.path).sort());
    for (const { path, bytes } of made) expect(readFileSync(join(folder, path)).equals(Buffer.from(bytes)), path).toBe(true);
  });

  it('has no problem', () => {
    expect(problems).toEqual([]);
  });

  it('has ten routine surveys and one re-measurement, about forty machines and two to three hundred series', () => {
    const record = recordOf(undefined);
    expect(record.surveys.map((s) => s.kind).sort()).toEqual(['re-measurement', ...Array.from({ length: 10 }, () => 'routine')]);
    expect(plant?.machines.length).toBe(39);
    const series = plant?.machines.reduce((sum, m) => sum + m.series.length, 0) ?? 0;
    expect(series).toBeGreaterThanOrEqual(200);
    expect(series).toBeLessThanOrEqual(300);
    expect(record.measurements.some((m) => m.machine === 'BC-05')).toBe(false);
    expect(record.coverage.some((c) => c.machine === 'BC-05')).toBe(false);
  });
});

describe('the manager', () => {
  it('finds three things to do this week, six within a month', () => {
    const urgent = (urgency: string): string[] =>
      recordOf(undefined)
        .machines.filter((m) => m.urgency === urgency)
        .map((m) => m.machine)
        .sort();
    expect(urgent('now')).toEqual(['JP-1C']);
    expect(urgent('within a week')).toEqual(['BFP-A', 'SB-02']);
    expect(urgent('within a month')).toEqual(['BFP-B', 'DR-01', 'EV-02', 'LK-01', 'PW-02', 'SN-03']);
    expect(urgent('next planned stop')).toEqual(['CP-03', 'CR-01', 'GP-01', 'JP-1A', 'MA-01']);
    expect(urgent('watch')).toEqual(['AC-01', 'AF-03', 'CF-4', 'FD-01', 'RF-01', 'TG-01']);
  });

  it('sees the overdue action first in its level', () => {
    const stop = recordOf(undefined)
      .actions.filter((a) => a.urgency === 'next planned stop')
      .map((a) => a.machine);
    expect(stop[0]).toBe('CR-01');
  });
});

describe('each story', () => {
  for (const story of STORIES) {
    it(`${story.machine}${story.at === undefined ? '' : ` ${story.at.point}`}${story.survey === undefined ? '' : ` at ${story.survey}`}: ${story.because}`, () => {
      const record = recordOf(story.survey);
      const machine = record.machines.find((m) => m.machine === story.machine);
      if (story.says !== undefined) expect(machine).toMatchObject(story.says);
      const reading = readingOf(record, story);
      if (story.reading !== undefined) expect(reading).toMatchObject(story.reading);
      for (const [name, value] of Object.entries(story.boundaries ?? {}))
        expect(reading?.limits?.[name as 'bc'], name).toBeCloseTo(value, 2);
      const said = reading?.doubts ?? record.measurements.filter((m) => m.machine === story.machine).flatMap((m) => m.doubts);
      for (const [kind, effect] of story.doubts ?? [])
        expect(bears(said, kind, effect), `${kind} among ${said.map((d) => d.kind).join(', ')}`).toBe(true);
      for (const [survey, word] of Object.entries(story.hollow ?? {})) {
        expect(reading?.history.why[String(record.surveys.findIndex((s) => s.id === survey))], survey).toContain(word);
      }
      if (story.action !== undefined) {
        const action = record.actions.find((a) => a.machine === story.machine);
        const { result, ...plain } = story.action;
        expect(action).toMatchObject(plain);
        if (result !== undefined) expect(action?.verification?.result).toBe(result);
      }
    });
  }
});

describe('indications', () => {
  for (const { rule, machine, survey } of INDICATIONS) {
    it(`${rule} at ${machine}${survey === undefined ? '' : ` of ${survey}`}`, () => {
      const found = recordOf(survey).machines.find((m) => m.machine === machine);
      expect(found?.indications.map((i) => i.rule)).toContain(rule);
    });
  }

  it('leave quiet machines alone', () => {
    for (const machine of QUIET) expect(recordOf(undefined).machines.find((m) => m.machine === machine)?.indications, machine).toEqual([]);
  });
});
