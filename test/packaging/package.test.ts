import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, symlinkSync } from 'node:fs';
import { join } from 'node:path';
import Ajv2020 from 'ajv/dist/2020.js';
import { beforeAll, describe, expect, test } from 'vitest';
import { contents, freshFolder, plantFolder, swayfolio } from '../commands/program.ts';

const json = (path: string): Record<string, unknown> => JSON.parse(readFileSync(path, 'utf8'));

describe('the README', () => {
  const readme = readFileSync('README.md', 'utf8');

  test('opens with the job and then the two commands', () => {
    expect(readme).toMatch(/^# swayfolio\n\nswayfolio is a static report generator for periodic vibration surveys: /);
    expect(readme.indexOf('npm ci && npm run demo')).toBeLessThan(readme.indexOf('## Cautions'));
    expect(readme).toContain('npm cit');
  });

  test('carries every caution of the report', () => {
    const cautions = Object.entries(json('templates/words/en/assess.json')).filter(([key]) => key.startsWith('assess.caution.'));
    expect(cautions.length).toBeGreaterThanOrEqual(9);
    for (const [, sentence] of cautions) expect(readme).toContain(sentence);
  });
});

describe('package.json', () => {
  const manifest = json('package.json') as { dependencies: Record<string, string>; devDependencies: Record<string, string> };

  test('pins exact versions, and the seven named packages are in use', () => {
    for (const version of Object.values({ ...manifest.dependencies, ...manifest.devDependencies }))
      expect(version).toMatch(/^\d+\.\d+\.\d+$/);
    const sources = readdirSync('src', { recursive: true, encoding: 'utf8' })
      .filter((path) => path.endsWith('.ts'))
      .map((path) => readFileSync(join('src', path), 'utf8'))
      .join('\n');
    for (const name of ['handlebars', 'pdfkit', 'csv-parse', 'd3-scale', 'd3-shape', 'yargs'])
      expect(sources).toMatch(new RegExp(`(from|import\\() ?'${name}[/']`));
  });

  test('every package that the program loads is a dependency', () => {
    const built = readdirSync('dist', { recursive: true, encoding: 'utf8' })
      .filter((path) => path.endsWith('.js'))
      .map((path) => readFileSync(join('dist', path), 'utf8'))
      .join('\n');
    const loaded = [...built.matchAll(/(?:from ?|import ?\(? ?)"((?:@[\w.-]+\/)?[\w.-]+)[^"]*"/g)]
      .map((match) => match[1] ?? '')
      .filter((name) => !name.startsWith('.') && !name.startsWith('node'));
    expect(loaded).toContain('pdfkit');
    for (const name of new Set(loaded)) expect(Object.keys(manifest.dependencies)).toContain(name);
  });
});

describe('the packed program', () => {
  const elsewhere = freshFolder();
  beforeAll(() => {
    // The files that npm would pack, in a folder that has the dependencies and nothing else of ours: .ci/run installs the real tarball.
    const packed = JSON.parse(
      spawnSync('npm', ['pack', '--dry-run', '--json', '--ignore-scripts'], { encoding: 'utf8' }).stdout,
    ) as readonly { files: readonly { path: string }[] }[];
    for (const { path } of packed[0]?.files ?? []) {
      const target = join(elsewhere, 'swayfolio', path);
      mkdirSync(join(target, '..'), { recursive: true });
      spawnSync('cp', [path, target]);
    }
    symlinkSync(join(process.cwd(), 'node_modules'), join(elsewhere, 'swayfolio/node_modules'));
  });

  test('holds the program, the templates, the schemas, README and LICENSE, and nothing of ours besides', () => {
    const top = readdirSync(join(elsewhere, 'swayfolio')).sort();
    expect(top).toEqual(['LICENSE', 'README.md', 'dist', 'node_modules', 'package.json', 'templates']);
    for (const path of [
      'dist/main.js',
      'dist/schemas/plant.schema.json',
      'dist/schemas/record.schema.json',
      'templates/words/en/assess.json',
    ])
      expect(existsSync(join(elsewhere, 'swayfolio', path))).toBe(true);
    expect(statSync(join(elsewhere, 'swayfolio/dist/main.js')).mode & 0o111).not.toBe(0);
  });

  test('runs from another folder', () => {
    const run = (...args: string[]) =>
      spawnSync(process.execPath, [join(elsewhere, 'swayfolio/dist/main.js'), ...args], { cwd: elsewhere, encoding: 'utf8' });
    expect(run('new', 'works').status).toBe(0);
    const reported = run('report', 'works', '--out', 'report');
    expect(reported.stderr).not.toMatch(/\bat /);
    expect(reported.status).toBe(0);
    expect(Object.keys(contents(join(elsewhere, 'report')))).toContain('site/index.html');
  });
});

describe('the schemas', () => {
  test('the published record schema takes the record that the program writes, and refuses one that is broken', () => {
    const home = plantFolder();
    expect(swayfolio(home, ['report', 'plant', '--out', 'out']).code).toBe(0);
    const validate = new Ajv2020({ strict: false, allErrors: true }).compile(json('dist/schemas/record.schema.json'));
    const record = json(join(home, 'out/record.json'));
    expect(validate(record) ? [] : validate.errors).toEqual([]);
    expect(validate({ ...record, machines: 'none' })).toBe(false);
  });

  test('the plant schema takes a plain plant.yaml and refuses a wrong word', () => {
    const validate = new Ajv2020({ strict: false }).compile(json('dist/schemas/plant.schema.json'));
    expect(validate({ plant: 'Test Works', paper: 'A4', peak_means: 'true' })).toBe(true);
    expect(validate({ plant: 'Test Works', paper: 'A3' })).toBe(false);
  });
});
