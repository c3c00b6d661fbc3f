/**
 * The data of the demo plant bear their cases: the rules of sections 7, 10 and 11 worked straight from the committed CSV files,
 * with nothing of the program between. Formulas: one sinusoid, v = 2πf d, a = 2πf v (textbook).
 */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { describe, expect, it } from 'vitest';

type Line = Readonly<Record<string, string>>;

const folder = new URL('../../demo-survey', import.meta.url).pathname;
const table = (path: string): Line[] => parse(readFileSync(join(folder, path)), { columns: true }) as Line[];

/** Every reading with its survey. */
const readings: Line[] = [
  ...readdirSync(join(folder, 'surveys'))
    .filter((f) => f.endsWith('.csv'))
    .flatMap((f) => table(`surveys/${f}`)),
  ...readdirSync(join(folder, 'surveys'))
    .filter((f) => !f.endsWith('.csv'))
    .flatMap((s) => table(`surveys/${s}/readings.csv`).map((row) => ({ survey_date: s, ...row }))),
];
const NOW = '2026-01-14';

function lineOf(machine: string, point: string, quantity = 'velocity', survey = NOW, detection = 'rms'): Line {
  const found = readings.find(
    (r) =>
      r['machine'] === machine &&
      r['point'] === point &&
      r['quantity'] === quantity &&
      r['survey_date'] === survey &&
      r['detection'] === detection,
  );
  if (found === undefined) throw new Error(`${machine} ${point} ${quantity} ${survey} is not in the data`);
  return found;
}
const read = (...key: Parameters<typeof lineOf>): number => Number(lineOf(...key)['value']);
const db = (ratio: number): number => 20 * Math.log10(ratio);
const w = 2 * Math.PI;

/** Apparent frequencies, Hz, of a point: from velocity and displacement, from acceleration and velocity. */
function apparent(machine: string, point: string, survey = NOW): [number, number] {
  const [d, v, a] = [
    read(machine, point, 'displacement', survey),
    read(machine, point, 'velocity', survey),
    read(machine, point, 'acceleration', survey),
  ];
  return [(1000 * v) / (w * d), (1000 * a) / (w * v)];
}

describe('one frequency', () => {
  it.each([
    ['I1', 'LK-01', '3H', 1480, 0.8, 1.2],
    ['I2', 'CW-1', '2H', 985, 1.7, 2.3],
    ['I3', 'AF-03', '1H', 1470, 0, 0.8],
  ] as const)('%s: %s %s', (_, machine, point, rpm, low, high) => {
    const [fromD, fromA] = apparent(machine, point);
    expect(fromA / fromD).toBeLessThanOrEqual(1.25);
    for (const hz of [fromD, fromA]) {
      expect((hz * 60) / rpm).toBeGreaterThanOrEqual(low);
      expect((hz * 60) / rpm).toBeLessThanOrEqual(high);
    }
  });

  it('is impossible at CW-1 in February 2025', () => {
    const [fromD, fromA] = apparent('CW-1', '2H', '2025-02-19');
    expect(fromD).toBeGreaterThan(1.1 * fromA);
  });
});

describe('other indications', () => {
  it('I4: acceleration 4 to 14 at BFP-A, velocity still', () => {
    expect(read('BFP-A', '4H', 'acceleration') / read('BFP-A', '4H', 'acceleration', '2023-10-18')).toBeGreaterThan(1.6);
    expect(Math.abs(read('BFP-A', '4H') - read('BFP-A', '4H', 'velocity', '2023-10-18'))).toBeLessThan(1.25);
  });

  it('I5: axial at CR-01 over half of the larger radial, and risen by more than q of category II', () => {
    expect(read('CR-01', '2A')).toBeGreaterThanOrEqual(0.5 * Math.max(read('CR-01', '2H'), read('CR-01', '2V')));
    expect(read('CR-01', '2A') - read('CR-01', '2A', 'velocity', '2023-10-18')).toBeGreaterThan(5.1 / 4);
  });

  it('I6: vertical overtook horizontal at DR-01', () => {
    expect(read('DR-01', '2V')).toBeGreaterThan(1.2 * read('DR-01', '2H'));
    expect(read('DR-01', '2V', 'velocity', '2025-10-15')).toBeLessThanOrEqual(read('DR-01', '2H', 'velocity', '2025-10-15'));
    expect(read('DR-01', '2V') - read('DR-01', '2V', 'velocity', '2025-10-15')).toBeGreaterThan(2.8 / 4);
  });

  it('I7: four times at MA-01', () => {
    expect(read('MA-01', '1H') / read('MA-01', '1V')).toBeGreaterThanOrEqual(4);
  });

  it('I8: three quarters of PW-02 changed by one ratio', () => {
    const now = readings.filter((r) => r['machine'] === 'PW-02' && r['survey_date'] === NOW);
    const ratios = now.map((r) => Number(r['value']) / read('PW-02', String(r['point']), 'velocity', '2025-11-19')).sort((x, y) => x - y);
    const middle = ((ratios[4] ?? 0) + (ratios[5] ?? 0)) / 2;
    expect(ratios.filter((x) => Math.abs(x / middle - 1) <= 0.2).length).toBeGreaterThanOrEqual(0.75 * ratios.length);
    expect(middle).toBeGreaterThan(1.3);
  });

  it('I9: a quarter turn between the directions at LK-01, 1× over 0.8 of the overall', () => {
    const [h, v] = [lineOf('LK-01', '3H'), lineOf('LK-01', '3V')];
    expect(Math.abs(Number(v['phase_deg']) - Number(h['phase_deg']) - 90)).toBeLessThanOrEqual(30);
    for (const line of [h, v]) expect(Number(line['amplitude_1x'])).toBeGreaterThanOrEqual(0.8 * Number(line['value']));
  });

  it('I10: the vector of TG-01 moved by 38.4 µm, its level by less than q', () => {
    const [now, before] = [NOW, '2025-11-19'].map((s) => lineOf('TG-01', 'T1X', 'displacement', s, 'true peak-to-peak')) as [Line, Line];
    const [a, b] = [Number(now['amplitude_1x']), Number(before['amplitude_1x'])];
    const angle = ((Number(now['phase_deg']) - Number(before['phase_deg'])) * Math.PI) / 180;
    const moved = Math.sqrt(a * a + b * b - 2 * a * b * Math.cos(angle));
    const q = 9000 / Math.sqrt(8000) / 4;
    expect(moved).toBeCloseTo(38.36, 1);
    expect(moved).toBeGreaterThan(q);
    expect(Math.abs(Number(now['value']) - Number(before['value']))).toBeLessThan(q);
  });

  it('I11: true peak over r.m.s. at GP-01 from at most 4 to over 6', () => {
    const crest = (survey: string): number =>
      read('GP-01', '3H', 'acceleration', survey, 'true peak') / read('GP-01', '3H', 'acceleration', survey);
    expect(crest('2023-10-18')).toBeLessThanOrEqual(4);
    expect(crest(NOW)).toBeGreaterThanOrEqual(6);
  });
});

describe('slips', () => {
  it('the annex file of 2025-11-19 is low by √2 as a whole', () => {
    const slipped = table('surveys/packing-annex-2025-11-19.csv').filter((r) => r['unit'] === 'in/s');
    const ratios = slipped
      .map((r) => Number(r['value']) / read(String(r['machine']), String(r['point']), 'velocity', '2025-10-15', 'calculated peak'))
      .sort((x, y) => x - y);
    expect(ratios.length).toBeGreaterThanOrEqual(8);
    expect(Math.abs((ratios[Math.floor(ratios.length / 2)] ?? 0) * Math.SQRT2 - 1)).toBeLessThan(0.05);
  });

  it('CF-2 and CF-4, and 3H and 3A of JP-1B, once changed places', () => {
    expect(db(read('CF-2', '1H', 'velocity', '2024-11-20') / read('CF-2', '1H', 'velocity', '2024-10-16'))).toBeGreaterThan(4);
    expect(db(read('CF-4', '1H', 'velocity', '2024-10-16') / read('CF-4', '1H', 'velocity', '2024-11-20'))).toBeGreaterThan(4);
    expect(db(read('JP-1B', '3H', 'velocity', '2024-11-20') / read('JP-1B', '3H', 'velocity', '2025-01-15'))).toBeGreaterThan(4);
    expect(db(read('JP-1B', '3A', 'velocity', '2025-01-15') / read('JP-1B', '3A', 'velocity', '2024-11-20'))).toBeGreaterThan(4);
  });

  it('FD-01 in October 2024 is January copied', () => {
    const sheet = (survey: string): string[] =>
      readings.filter((r) => r['machine'] === 'FD-01' && r['survey_date'] === survey).map((r) => String(r['value']));
    expect(sheet('2024-10-16')).toEqual(sheet('2024-01-17'));
    expect(sheet('2024-10-16')).not.toEqual(sheet('2024-11-20'));
  });

  it('all of KB-01 was down by more than 95 %, and SF-01 2H at a fiftieth or less', () => {
    for (const point of ['1H', '2H', '3H', '3V'])
      expect(read('KB-01', point, 'velocity', '2024-11-20') / read('KB-01', point, 'velocity', '2024-10-16')).toBeLessThan(0.05);
    expect(read('SF-01', '2H', 'velocity', '2025-01-15') / read('SF-01', '2H', 'velocity', '2024-11-20')).toBeLessThan(0.02);
  });

  it('DG-01 was stopped at nine of ten', () => {
    expect(readings.filter((r) => r['machine'] === 'DG-01' && r['point'] === '1H' && r['status'] === 'stopped').length).toBe(9);
  });

  it('names carry ø, é, Ω and Cyrillic', () => {
    const all = ['machines.csv', 'limits.csv', `surveys/${NOW}/survey.yaml`].map((f) => readFileSync(join(folder, f), 'utf8')).join('');
    for (const letter of ['ø', 'é', 'Ω', 'Н', 'å']) expect(all.toLowerCase()).toContain(letter.toLowerCase());
  });
});
