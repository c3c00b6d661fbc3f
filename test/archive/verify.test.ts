/** Every change of an issued folder is found and named; what comes out again is told from what does not. */
import { generateKeyPairSync } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { readIssue } from '../../src/archive/chain.ts';
import { sha256 } from '../../src/archive/manifest.ts';
import { field } from '../../src/archive/ssh-fields.ts';
import type { SigningKey } from '../../src/archive/ssh-key.ts';
import { type Question, type Verdict, verifyIssue } from '../../src/archive/verify.ts';
import { assess } from '../../src/assess/assess.ts';
import { writeRecord } from '../../src/record/write.ts';
import { readPlant } from '../../src/survey/read.ts';
import { SMALL_PLANT } from '../commands/program.ts';
import { issueInMemory, type Memory, memoryShell, putPlant } from './memory.ts';

const PEOPLE = 'people:\n  - name: A. Analyst\n    category: ISO 18436-2 category II\n';
const PLANT: Readonly<Record<string, string>> = {
  ...SMALL_PLANT,
  'surveys/2025-11-10/survey.yaml': PEOPLE,
  'surveys/2026-01-14/survey.yaml': PEOPLE,
};

function newKey(): SigningKey {
  const { privateKey, publicKey } = generateKeyPairSync('ed25519');
  const raw = publicKey.export({ format: 'der', type: 'spki' }).subarray(-32);
  return { key: privateKey, publicBlob: Buffer.concat([field('ssh-ed25519'), field(raw)]) };
}

const KEY = newKey();

/** Three issues: one unsigned, two signed, the last of them a revision. */
function archive(): Memory {
  const files: Memory = new Map();
  putPlant(files, '/p', PLANT);
  issueInMemory(files, '/p', '2025-11-10');
  issueInMemory(files, '/p', '2026-01-14', { key: KEY });
  issueInMemory(files, '/p', '2026-01-14', { key: KEY, reason: 'a word was wrong' });
  return files;
}

/** For tests of the files alone: whatever record stands there comes out again, so that the hashes must find what was altered. */
const asFrozen =
  (files: Memory): Question['assessAgain'] =>
  (inputs) => ({ text: new TextDecoder().decode(files.get(inputs.replace(/inputs$/, 'record.json'))) });

function verifyAll(files: Memory, assessAgain: Question['assessAgain'] | null = null, keys: Question['keys'] = null): Verdict[] {
  const shell = memoryShell(files);
  const folders = shell.folders('/p/issued').map((name) => `/p/issued/${name}`);
  const neighbour = (folder: string) => {
    const [manifest, issue] = [files.get(`${folder}/manifest.sha256`), files.get(`${folder}/issue.json`)];
    const file = issue === undefined ? null : readIssue(Buffer.from(issue).toString());
    return manifest === undefined || file === null ? [] : [{ manifestHash: sha256(manifest), previous: file.previous_manifest }];
  };
  return folders.map((folder) =>
    verifyIssue(
      {
        folder,
        inArchive: true,
        keys,
        assessAgain: assessAgain ?? asFrozen(files),
        neighbours: folders.filter((other) => other !== folder).flatMap(neighbour),
      },
      shell,
    ),
  );
}

/** Numbers that look random and come again: mulberry32. */
function seeded(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) % below;
  };
}

/** Changes one thing; returns the paths that must be named, relative to their issue. */
function alter(
  files: Memory,
  issued: readonly string[],
  random: (below: number) => number,
  turn: number,
): readonly [string, readonly string[]] {
  const path = issued[random(issued.length)] as string;
  const [, folder, name] = /^(\/p\/issued\/[^/]+)\/(.+)$/.exec(path) as unknown as [string, string, string];
  const bytes = files.get(path) as Uint8Array;
  const other = random(3) === 0 ? `.hidden${turn}` : `site/more${turn}.html`;
  if (turn % 4 === 0) {
    const changed = Uint8Array.from(bytes);
    const at = random(bytes.length);
    changed[at] = ((changed[at] as number) + 1 + random(255)) % 256;
    files.set(path, changed);
    return [folder, [name]];
  }
  if (turn % 4 === 1) {
    files.delete(path);
    return [folder, [name]];
  }
  if (turn % 4 === 2) {
    files.set(`${folder}/${other}`, random(2) === 0 ? bytes : new Uint8Array());
    return [folder, [other]];
  }
  files.delete(path);
  files.set(`${folder}/${other}`, bytes);
  return [folder, [name, other]];
}

describe('altered folders', () => {
  test('as issued, the whole archive is sound', () => {
    const verdicts = verifyAll(archive());
    expect(verdicts.map((verdict) => [verdict.isSound, verdict.chain, verdict.signature.state])).toEqual([
      [true, 'first', 'none'],
      [true, 'linked', 'good'],
      [true, 'linked', 'good'],
    ]);
  });

  test('ten thousand random single-byte changes, deletions, additions and renames: each is found and named, and nothing else is', () => {
    const whole = archive();
    const issued = [...whole.keys()].filter((path) => path.startsWith('/p/issued/'));
    const random = seeded(20_260_114);
    const missed: string[] = [];
    for (let turn = 0; turn < 10_000; turn += 1) {
      const files = new Map(whole);
      const [folder, paths] = alter(files, issued, random, turn);
      const verdicts = verifyAll(files);
      const named = verdicts.find((verdict) => verdict.folder === folder);
      const unsound = named?.isSound === false;
      const all = paths.every((path) => named?.alterations.some((alteration) => alteration.path === path));
      const blamed = verdicts.some((verdict) => verdict.folder !== folder && verdict.alterations.length > 0);
      // A manifest that nobody vouches for is named beside the file: which of the two was touched cannot be told.
      const besides =
        named?.alterations.filter((alteration) => !paths.includes(alteration.path) && !alteration.path.startsWith('manifest.sha256')) ?? [];
      const explained = paths.some((path) => /^(?:manifest\.sha256|issue\.json|record\.json)/.test(path)) || besides.length === 0;
      if (!unsound || !all || blamed || !explained)
        missed.push(`${turn} ${folder} ${paths.join(' ')}: ${JSON.stringify(named?.alterations)}`);
    }
    expect(missed).toEqual([]);
  }, 300_000);

  test('where a signature or a later issue vouches for the manifest, a changed file alone is blamed', () => {
    const files = archive();
    for (const issue of ['2025-001', '2026-001-r1']) files.set(`/p/issued/${issue}/report.pdf`, Buffer.from('%PDF other'));
    const names = verifyAll(files).map((verdict) => verdict.alterations.map((alteration) => alteration.path));
    expect(names).toEqual([['report.pdf'], [], ['report.pdf']]);
  });

  test('an issue that is gone breaks the chain of the next; so does one that was made anew in its place', () => {
    const gone = archive();
    for (const path of [...gone.keys()]) if (path.startsWith('/p/issued/2025-001/')) gone.delete(path);
    expect(verifyAll(gone).map((verdict) => verdict.chain)).toEqual(['broken', 'linked']);
    const anew = new Map(gone);
    const other: Memory = new Map();
    putPlant(other, '/p', {
      ...PLANT,
      'surveys/2025-11-10/readings.csv': (PLANT['surveys/2025-11-10/readings.csv'] as string).replace('2.2', '1.2'),
    });
    issueInMemory(other, '/p', '2025-11-10');
    for (const [path, bytes] of other) if (path.startsWith('/p/issued/')) anew.set(path, bytes);
    expect(verifyAll(anew).map((verdict) => [verdict.alterations.length, verdict.chain, verdict.isSound])).toEqual([
      [0, 'first', true],
      [0, 'broken', false],
      [0, 'linked', true],
    ]);
  });

  test("another's signature over the same manifest is told, and one that is not the key given", () => {
    const files = archive();
    expect(verifyAll(files, null, [KEY.publicBlob]).map((verdict) => verdict.signature.state)).toEqual(['bad', 'good', 'good']);
    expect(verifyAll(files, null, [newKey().publicBlob]).map((verdict) => verdict.isSound)).toEqual([false, false, false]);
    const forged = new Map(files);
    const target = issueInMemory(removed(forged, '2026-001-r1'), '/p', '2026-01-14', { key: newKey(), reason: 'a word was wrong' });
    files.set(`${target}/manifest.sha256.sig`, forged.get(`${target}/manifest.sha256.sig`) as Uint8Array);
    expect(verifyAll(files)[2]?.alterations.map((alteration) => alteration.path)).toEqual(['manifest.sha256.sig']);
  });
});

function removed(files: Memory, issue: string): Memory {
  for (const path of [...files.keys()]) if (path.startsWith(`/p/issued/${issue}/`)) files.delete(path);
  return files;
}

describe('the record again', () => {
  const again =
    (files: Memory, version = '0.1.0'): Question['assessAgain'] =>
    (inputs, frozen) => {
      const { plant } = readPlant(memoryShell(files), inputs);
      return plant === null
        ? { none: 'errors' }
        : { text: writeRecord({ ...assess(plant, { survey: frozen.survey, toolVersion: version }), issue: frozen.issue }) };
    };

  test('comes out byte for byte; under another version that alone differs', () => {
    const files = archive();
    expect(verifyAll(files, again(files)).map((verdict) => verdict.reproduction)).toEqual(
      Array(3).fill({ result: 'reproduced', wording: [], versions: [] }),
    );
    const later = verifyAll(files, again(files, '0.2.0'))[2];
    expect(later?.reproduction).toMatchObject({
      result: 'reproduced',
      versions: [{ path: 'tool version', before: '"0.1.0"', after: '"0.2.0"' }],
    });
  });

  test('a policy that changed is named with the figures that follow from it, wording apart', () => {
    const files = archive();
    const yaml = Buffer.from('plant: Test Works\npolicy: { 4.baseline.count: 2 }\n');
    const changed: Question['assessAgain'] = (inputs, frozen) => again(new Map(files).set(`${inputs}/plant.yaml`, yaml))(inputs, frozen);
    const { reproduction } = verifyAll(files, changed)[2] as Verdict;
    if (reproduction.result !== 'differs') throw new Error(reproduction.result);
    expect(reproduction.differences.map((difference) => `${difference.kind} ${difference.path}`)).toEqual(
      expect.arrayContaining(['policy policy_hash', 'policy policy 4.baseline.count: value', 'input inputs plant.yaml: sha256']),
    );
    expect(reproduction.differences.every((difference) => difference.kind !== 'wording')).toBe(true);
  });

  test('a figure forged with its whole manifest does not come out again', () => {
    const files = archive();
    const path = '/p/issued/2026-001-r1/record.json';
    const forged = Buffer.from(files.get(path) as Uint8Array)
      .toString()
      .replaceAll('"value":8.9', '"value":2.9');
    files.set(path, Buffer.from(forged));
    const { reproduction } = verifyAll(files, again(files))[2] as Verdict;
    if (reproduction.result !== 'differs') throw new Error(reproduction.result);
    expect(reproduction.differences).toContainEqual({
      kind: 'figure',
      path: 'measurements P-1 DE-H velocity rms: value',
      before: '2.9',
      after: '8.9',
    });
  });
});
