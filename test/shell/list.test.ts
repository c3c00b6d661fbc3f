import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { beforeEach, expect, test } from 'vitest';
import { realShell } from '../../src/shell/shell.ts';
import { UserError } from '../../src/shell/types.ts';

let home = '';
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'swayfolio-list-'));
});

function put(path: string): void {
  mkdirSync(dirname(join(home, path)), { recursive: true });
  writeFileSync(join(home, path), path);
}

test('lists by code unit, without hidden files, drafts, issued reports and folders that swayfolio made', () => {
  for (const path of [
    'b.csv',
    'B.csv',
    'ä.csv',
    'surveys/2/x',
    'surveys/10/x',
    '.hidden',
    '.git/x',
    'out/2026/record.json',
    'issued/1/record.json',
    'elsewhere/.swayfolio',
    'elsewhere/work-list.csv',
    'surveys/out/x',
  ])
    put(path);
  expect(realShell.list(home)).toEqual({ files: ['B.csv', 'b.csv', 'surveys/10/x', 'surveys/2/x', 'surveys/out/x', 'ä.csv'], refused: [] });
});

test('follows a link to a file of the folder, and refuses one that leaves it, one to a folder, a dead one and a pipe', () => {
  put('machines.csv');
  const outside = mkdtempSync(join(tmpdir(), 'swayfolio-outside-'));
  writeFileSync(join(outside, 'secret'), 's');
  symlinkSync('machines.csv', join(home, 'inside.csv'));
  symlinkSync(join(outside, 'secret'), join(home, 'leaves.csv'));
  symlinkSync('.', join(home, 'loop'));
  symlinkSync('nowhere', join(home, 'dead'));
  spawnSync('mkfifo', [join(home, 'pipe')]);
  expect(realShell.list(home)).toEqual({ files: ['inside.csv', 'machines.csv'], refused: ['dead', 'leaves.csv', 'loop', 'pipe'] });
});

test.each([
  ['nowhere', /does not exist/],
  ['.', /no file/],
  ['plant.yaml/x', /not a folder|not exist/],
])('reading %s is an error with a hint', (path, why) => {
  put('plant.yaml');
  try {
    realShell.read(join(home, path));
    expect.unreachable();
  } catch (error) {
    expect(error).toBeInstanceOf(UserError);
    expect((error as UserError).message).toMatch(why);
    expect((error as UserError).hint).not.toBeNull();
  }
});

test('listing a folder that is not there is an error the user can mend', () => {
  expect(() => realShell.list(join(home, 'nowhere'))).toThrow(UserError);
  expect(realShell.today()).toMatch(/^20\d\d-\d\d-\d\d$/);
});
