import { spawnSync } from 'node:child_process';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  realpathSync,
  symlinkSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeEach, describe, expect, test } from 'vitest';
import { claimFolder, createFolder, MARKER, replaceFolder } from '../../src/shell/replace.ts';
import type { UserError } from '../../src/shell/types.ts';

let home = '';
beforeEach(() => {
  home = realpathSync(mkdtempSync(join(tmpdir(), 'swayfolio-replace-')));
});

const at = (path: string): string => join(home, path);
const text = (path: string): string => readFileSync(at(path), 'utf8');
/** A process number that surely belongs to nobody: of a child that has ended. */
const deadPid = (): number => spawnSync(process.execPath, ['-e', '']).pid;

function refusal(attempt: () => void): UserError {
  try {
    attempt();
  } catch (error) {
    return error as UserError;
  }
  throw new Error('It was not refused.');
}

function made(folder: string, content: string): void {
  mkdirSync(at(folder), { recursive: true });
  writeFileSync(at(`${folder}/${MARKER}`), '');
  writeFileSync(at(`${folder}/report.pdf`), content);
}

describe('replaceFolder', () => {
  test('writes a new folder, also below folders that are not there, and replaces it whole', () => {
    replaceFolder(at('a/b/out'), [
      { path: 'site/index.html', bytes: 'one' },
      { path: 'old.txt', bytes: 'x' },
    ]);
    replaceFolder(at('a/b/out'), [{ path: 'site/index.html', bytes: new Uint8Array([50]) }]);
    expect(readdirSync(at('a/b/out')).sort()).toEqual([MARKER, 'site']);
    expect(text('a/b/out/site/index.html')).toBe('2');
    expect(readdirSync(at('a/b'))).toEqual(['out']);
  });

  test('takes an empty folder, and a link to one', () => {
    mkdirSync(at('real'));
    symlinkSync(at('real'), at('link'));
    replaceFolder(at('link'), [{ path: 'f', bytes: '1' }]);
    expect(text('real/f')).toBe('1');
    expect(readdirSync(home).sort()).toEqual(['link', 'real']);
  });

  test('refuses a folder that holds anything it did not make, and a file, and touches neither', () => {
    mkdirSync(at('mine'));
    writeFileSync(at('mine/thesis.txt'), 'dear');
    writeFileSync(at('file'), 'f');
    for (const path of ['mine', 'file']) {
      const error = refusal(() => replaceFolder(at(path), [{ path: 'f', bytes: '1' }]));
      expect(error.exitCode).toBe(2);
      expect(error.hint).toMatch(/made by swayfolio/);
    }
    expect(text('mine/thesis.txt')).toBe('dear');
    expect(readdirSync(home).sort()).toEqual(['file', 'mine']);
  });

  test('leaves the old folder whole when a file cannot be made', () => {
    made('out', 'old');
    function* failing(): Generator<{ path: string; bytes: string }> {
      yield { path: 'report.pdf', bytes: 'new' };
      throw new Error('template broken');
    }
    expect(() => replaceFolder(at('out'), failing())).toThrow('template broken');
    expect(text('out/report.pdf')).toBe('old');
    expect(readdirSync(home)).toEqual(['out']);
  });

  test.each(['../up', '/root', 'a/../b', 'a//b', 'c:x', 'nul\u0000', 'a\\b', 'trailing.', ''])('never writes to %j', (path) => {
    expect(() => replaceFolder(at('out'), [{ path, bytes: '' }])).toThrow('not a safe relative path');
    expect(readdirSync(home)).toEqual([]);
  });

  test('refuses two files that are one on a disk that ignores case', () => {
    expect(() =>
      replaceFolder(at('out'), [
        { path: 'A', bytes: '' },
        { path: 'a', bytes: '' },
      ]),
    ).toThrow('ignores case');
  });
});

describe('left-overs of a run that was killed', () => {
  test('while writing: the unfinished folder is dropped, the old one stands', () => {
    made('out', 'old');
    made(`out.new-${deadPid()}`, 'half');
    claimFolder(at('out'));
    expect(readdirSync(home)).toEqual(['out']);
    expect(text('out/report.pdf')).toBe('old');
  });

  test('between the two renames: the old folder comes back', () => {
    const pid = deadPid();
    made(`out.old-${pid}`, 'old');
    made(`out.new-${pid}`, 'new');
    claimFolder(at('out'));
    expect(readdirSync(home)).toEqual(['out']);
    expect(text('out/report.pdf')).toBe('old');
  });

  test('before the old one was removed: the new one stands', () => {
    made('out', 'new');
    made(`out.old-${deadPid()}`, 'old');
    claimFolder(at('out'));
    expect(readdirSync(home)).toEqual(['out']);
    expect(text('out/report.pdf')).toBe('new');
  });

  test('of a run that is still at work: refused; an hour later the number is somebody else’s', () => {
    made(`out.new-${process.ppid}`, 'half');
    expect(refusal(() => claimFolder(at('out'))).message).toMatch(/Another swayfolio/);
    const old = Date.now() / 1000 - 7200;
    utimesSync(at(`out.new-${process.ppid}`), old, old);
    claimFolder(at('out'));
    expect(readdirSync(home)).toEqual([]);
  });

  test('a folder of the user’s with such a name stays', () => {
    mkdirSync(at('out.new-1'));
    writeFileSync(at('out.new-1/notes.txt'), 'dear');
    const old = Date.now() / 1000 - 7200;
    utimesSync(at('out.new-1'), old, old);
    claimFolder(at('out'));
    expect(text('out.new-1/notes.txt')).toBe('dear');
  });
});

describe('createFolder', () => {
  test('writes into a new or an empty folder', () => {
    createFolder(at('plant'), [{ path: 'surveys/x/readings.csv', bytes: 'a' }]);
    expect(text('plant/surveys/x/readings.csv')).toBe('a');
  });

  test('refuses one that is not empty', () => {
    made('plant', 'p');
    expect(refusal(() => createFolder(at('plant'), [{ path: 'report.pdf', bytes: 'q' }])).exitCode).toBe(2);
    expect(text('plant/report.pdf')).toBe('p');
  });

  test('leaves nothing when it fails', () => {
    expect(() =>
      createFolder(at('plant'), [
        { path: 'a', bytes: '' },
        { path: '../b', bytes: '' },
      ]),
    ).toThrow();
    expect(existsSync(at('plant'))).toBe(false);
  });
});
