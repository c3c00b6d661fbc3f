/**
 * `npm run bench [-- --machines 500 --points 8 --surveys 12 --runs 3]`: makes a plant, runs each stage and the whole in fresh processes, prints
 * one table. In: sizes. Out: wall seconds and peak memory, medians of the runs. Never a test: times depend on the machine.
 */
import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { parseArgs } from 'node:util';
import { build } from 'esbuild';
import { firstPaint } from './first-paint.ts';
import { benchPlant, type PlantSize } from './plant.ts';

interface Measured {
  readonly seconds: number;
  readonly megabytes: number;
}

const count = (text: string): number => Math.max(1, Math.floor(Number(text)) || 1);
const { values } = parseArgs({
  options: {
    machines: { type: 'string', default: '500' },
    points: { type: 'string', default: '8' },
    surveys: { type: 'string', default: '12' },
    runs: { type: 'string', default: '3' },
  },
});
const size: PlantSize = { machines: count(values.machines), points: count(values.points), surveys: count(values.surveys) };
const runs = count(values.runs);
const root = mkdtempSync(join(tmpdir(), 'swayfolio-bench-'));
// Below node_modules, so that the bundle finds the packages it leaves out.
const stageProgram = join(process.cwd(), 'node_modules/.cache/swayfolio-bench/stage.mjs');

function writePlant(folder: string, of: PlantSize): string {
  for (const file of benchPlant(of)) {
    mkdirSync(dirname(join(folder, file.path)), { recursive: true });
    writeFileSync(join(folder, file.path), file.bytes);
  }
  return folder;
}

function median(measured: readonly Measured[]): Measured {
  const middle = (numbers: number[]): number => numbers.sort((a, b) => a - b)[Math.floor(numbers.length / 2)] ?? Number.NaN;
  return { seconds: middle(measured.map((one) => one.seconds)), megabytes: middle(measured.map((one) => one.megabytes)) };
}

const repeat = (measure: () => Measured): Measured => median(Array.from({ length: runs }, measure));

function node(args: readonly string[]): { stdout: string; stderr: string; seconds: number } {
  const begin = performance.now();
  const run = spawnSync(process.execPath, args, { encoding: 'utf8', maxBuffer: 1 << 28 });
  if (run.status !== 0) throw new Error(`node ${args.join(' ')} ended with ${run.status}:\n${run.stderr}`);
  return { stdout: run.stdout, stderr: run.stderr, seconds: (performance.now() - begin) / 1000 };
}

const stage = (name: string, plant: string): Measured => repeat(() => JSON.parse(node([stageProgram, name, plant, root]).stdout));

/** The real program, whole process; its peak memory is told by a hook at its exit. */
const hook = 'data:text/javascript,process.on("exit",()=>process.stderr.write("\\npeak "+process.resourceUsage().maxRSS))';
const program = (...args: string[]): Measured =>
  repeat(() => {
    const run = node(['--import', hook, 'dist/main.js', ...args]);
    return { seconds: run.seconds, megabytes: Number(/peak (\d+)/.exec(run.stderr)?.[1]) / 1024 };
  });

function print(name: string, measured: Measured, machines: number, note = ''): void {
  const perMachine = ((measured.seconds * 1000) / machines).toFixed(2);
  process.stdout.write(
    `${name.padEnd(34)}${measured.seconds.toFixed(3).padStart(8)} s ${perMachine.padStart(7)} ms a machine ${measured.megabytes.toFixed(0).padStart(5)} MB  ${note}\n`,
  );
}

async function main(): Promise<void> {
  await build({
    entryPoints: ['test/bench/stage.ts'],
    outfile: stageProgram,
    bundle: true,
    format: 'esm',
    platform: 'node',
    target: 'node20.19',
    packages: 'external',
    logLevel: 'warning',
  });
  node(['.tools/build.mjs']);
  const { machines } = size;
  const plant = writePlant(join(root, 'plant'), size);
  const twice = writePlant(join(root, 'twice'), { ...size, machines: 2 * machines });
  process.stdout.write(
    `${machines} machines × ${size.points} points × ${size.surveys} surveys; median of ${runs} runs, Node ${process.versions.node}\n\nstages, each in a process of its own (start-up and what stands before it not counted in the time; memory is the process's)\n`,
  );
  const seen = new Map<string, Measured>();
  for (const name of ['survey', 'assess', 'record', 'work list', 'PDF, tagged', 'PDF, untagged', 'site']) {
    seen.set(name, stage(name, plant));
    print(`  ${name}`, seen.get(name) as Measured, machines);
  }
  const start = program('--version');
  const whole = program('report', plant, '--out', join(root, 'report'), '--quiet');
  const double = program('report', twice, '--out', join(root, 'report-twice'), '--quiet');
  process.stdout.write('\nthe program, whole process\n');
  print('  start-up (--version)', start, machines);
  print(
    '  report, tagged PDF and site',
    whole,
    machines,
    `start-up apart ${(((whole.seconds - start.seconds) * 1000) / machines).toFixed(2)} ms a machine (aim 8, later 5), aim 300 MB`,
  );
  print(
    `  report of ${2 * machines} machines`,
    double,
    2 * machines,
    `${((double.seconds - start.seconds) / (whole.seconds - start.seconds)).toFixed(2)} times the time (aim 2.1)`,
  );
  print('  check', program('check', plant), machines);
  process.stdout.write('\nfloors\n');
  const parsed = stage('csv-parse alone', plant);
  const checked = stage('check', plant);
  print('  the CSV files split by hand', stage('split by hand', plant), machines);
  print(
    '  csv-parse alone',
    parsed,
    machines,
    `check reaches ${(parsed.seconds / checked.seconds).toFixed(2)} of its speed (aim 0.3; ${checked.seconds.toFixed(3)} s, start-up apart)`,
  );
  print("  the PDF's content, deflate alone", stage('the PDF as raw strings', plant), machines);
  const paint = await firstPaint(2000, join(root, 'site'));
  process.stdout.write(
    `\nthe site\n  list of 2000 machines, ${paint.kilobytes.toFixed(0)} kB: first paint ${paint.paintMs.toFixed(0)} ms (aim 1000), loaded ${paint.loadedMs.toFixed(0)} ms\n`,
  );
}

try {
  await main();
} finally {
  rmSync(root, { recursive: true, force: true });
}
