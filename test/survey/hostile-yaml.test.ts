/** YAML made to exhaust its reader: each is refused at its place, by the reader's own words, at once. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Problems } from '../../src/survey/problems.ts';
import { readYaml } from '../../src/survey/yaml.ts';

function read(text: string) {
  const problems = new Problems();
  const yaml = readYaml('plant.yaml', new TextEncoder().encode(text), problems);
  return { yaml, told: problems.sorted() };
}

describe('hostile yaml', () => {
  it('refuses aliases that multiply, as in the "billion laughs"', () => {
    const levels = ['a: &a [x, x, x, x, x, x, x, x, x]'];
    for (let i = 1; i < 9; i += 1)
      levels.push(`${'abcdefghi'[i]}: &${'abcdefghi'[i]} [${new Array(9).fill(`*${'abcdefghi'[i - 1]}`).join(', ')}]`);
    const { yaml, told } = read(levels.join('\n'));
    expect(yaml).toBeNull();
    expect(told.map((p) => p.code)).toEqual(['broken-yaml']);
  });

  it.each([
    ['brackets', '['.repeat(100_000)],
    ['list marks', '- '.repeat(100_000)],
    ['maps', '{a: '.repeat(100_000)],
  ])('refuses %s nested a hundred thousand deep, at their line', (_, text) => {
    const { yaml, told } = read(`plant: Invented\nx:\n${text}`);
    expect(yaml).toBeNull();
    expect(told.map((p) => [p.code, p.line])).toEqual([['broken-yaml', 3]]);
  });

  it('reads what nests four hundred deep', () => {
    expect(read(`a: ${'['.repeat(400)}${']'.repeat(400)}`).yaml).not.toBeNull();
  });

  it('ends in a value or a problem with its file for any text', () => {
    const pieces = fc.array(
      fc.constantFrom(
        'a',
        ': ',
        '\n',
        '  ',
        '- ',
        '&a ',
        '*a',
        '[',
        ']',
        '{',
        '}',
        '"',
        "'",
        '|',
        '>',
        '#',
        '? ',
        '!x ',
        '%',
        '---\n',
        '\t',
        '\u0000',
      ),
      { maxLength: 60 },
    );
    fc.assert(
      fc.property(pieces, (list) => {
        const { yaml, told } = read(list.join(''));
        expect(yaml !== null || told.length > 0).toBe(true);
        expect(told.every((p) => p.file === 'plant.yaml')).toBe(true);
      }),
      { numRuns: 500, seed: 7 },
    );
  });
});
