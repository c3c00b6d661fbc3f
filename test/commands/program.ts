/** Runs the real program in fresh folders. In: arguments and a plant's files. Out: exit code and texts. Never imports the program. */
import { type SpawnSyncReturns, spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, realpathSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';

export const MAIN = join(process.cwd(), 'dist/main.js');

export interface Run {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

export function freshFolder(): string {
  return realpathSync(mkdtempSync(join(tmpdir(), 'swayfolio-run-')));
}

export interface Circumstances {
  readonly env?: Readonly<Record<string, string>>;
  /** Arguments of node itself. */
  readonly node?: readonly string[];
}

export function swayfolio(cwd: string, args: readonly string[], { env = {}, node = [] }: Circumstances = {}): Run {
  const done: SpawnSyncReturns<string> = spawnSync(process.execPath, [...node, MAIN, ...args], {
    cwd,
    encoding: 'utf8',
    env: { ...process.env, ...env },
    maxBuffer: 1 << 28,
  });
  return { code: done.status, stdout: done.stdout, stderr: done.stderr };
}

export type Files = Readonly<Record<string, string>>;

export function write(folder: string, files: Files): void {
  for (const [path, text] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, path)), { recursive: true });
    writeFileSync(join(folder, path), text);
  }
}

/** Path → bytes as text, of every file below a folder. */
export function contents(folder: string): Readonly<Record<string, string>> {
  const found: Record<string, string> = {};
  for (const path of readdirSync(folder, { recursive: true, encoding: 'utf8' }).sort()) {
    const full = join(folder, path);
    if (statSync(full).isFile()) found[path] = readFileSync(full, 'latin1');
  }
  return found;
}

/** Two machines, three surveys, the last of them raising one: small, plain, whole. */
export const SMALL_PLANT: Files = {
  'plant.yaml': 'plant: Test Works\n',
  'machines.csv': 'machine,name,area,criticality,interval_days\nP-1,Feed pump,North,critical,60\nP-2,Drain pump,North,general,60\n',
  'components.csv':
    'machine,component,kind,power_kw,speed_rpm,drive,support,bearings,pump_category\nP-1,pump,pump,75,1480,fixed,rigid,rolling,II\nP-2,pump,pump,75,1480,fixed,rigid,rolling,II\n',
  'points.csv':
    'machine,component,point,location,direction,measured_on,quantity,unit,detection,low_hz,high_hz\n' +
    'P-1,pump,DE-H,pump DE,horizontal,bearing housing,velocity,mm/s,rms,10,1000\nP-2,pump,DE-H,pump DE,horizontal,bearing housing,velocity,mm/s,rms,10,1000\n',
  'surveys/2025-09-10/readings.csv': readings(['P-1,DE-H,velocity,rms,2.1,mm/s,1480', 'P-2,DE-H,velocity,rms,1.8,mm/s,1480']),
  'surveys/2025-11-10/readings.csv': readings(['P-1,DE-H,velocity,rms,2.2,mm/s,1480', 'P-2,DE-H,velocity,rms,1.9,mm/s,1480']),
  'surveys/2026-01-14/readings.csv': readings(['P-1,DE-H,velocity,rms,8.9,mm/s,1480', 'P-2,DE-H,velocity,rms,1.8,mm/s,1480']),
};

export function readings(rows: readonly string[]): string {
  return ['machine,point,quantity,detection,value,unit,speed_rpm', ...rows, ''].join('\n');
}

/** A fresh folder holding `plant/`: the small plant, with files changed, added, or (null) left out. */
export function plantFolder(changes: Readonly<Record<string, string | null>> = {}): string {
  const home = freshFolder();
  const files = Object.entries({ ...SMALL_PLANT, ...changes }).filter((entry): entry is [string, string] => entry[1] !== null);
  write(join(home, 'plant'), Object.fromEntries(files));
  return home;
}

/** What a stack trace looks like on the terminal. */
export const STACK = /^\s+at .*[:(]/m;
