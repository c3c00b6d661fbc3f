import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { listText, say } from '../../src/words/say.ts';
import { hasSentence } from '../../src/words/sentences.ts';

const home = fileURLToPath(new URL('../../templates/words/en', import.meta.url));
const files = readdirSync(home).map((name) => ({
  name,
  sentences: JSON.parse(readFileSync(join(home, name), 'utf8')) as Record<string, string>,
}));

/** Names of the facts of a sentence, those of the plural forms too. */
const factsOf = (sentence: string): string[] => [...sentence.matchAll(/\{([A-Za-z_][\w]*)(?:[}|:])/g)].map((m) => m[1] as string);

describe('sentences', () => {
  it('lists are joined as a person writes them', () => {
    expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map((items) => listText('en', items))).toEqual(['', 'a', 'a and b', 'a, b and c']);
  });

  it('an unknown key, also one of every object, and a missing fact are bugs', () => {
    expect(() => say('en', 'no.such.sentence')).toThrow(/no\.such\.sentence/);
    expect(() => say('en', 'toString')).toThrow(/toString/);
    expect(hasSentence('en', 'constructor')).toBe(false);
    expect(hasSentence('en', 'common.unknown')).toBe(true);
    const [key, sentence] = files.flatMap((f) => Object.entries(f.sentences)).find(([, text]) => factsOf(text).length > 0) ?? ['', ''];
    expect(sentence).not.toBe('');
    expect(() => say('en', key, {})).toThrow(/was not given/);
  });

  it('each language has its own word for unknown', () => {
    expect(say('de', 'common.unknown')).toBe('unbekannt');
  });

  it('a key stands in one file alone', () => {
    const keys = files.flatMap((f) => Object.keys(f.sentences));
    expect(new Set(keys).size).toBe(keys.length);
  });

  it.each(files.flatMap((f) => Object.entries(f.sentences).map(([key, sentence]) => [f.name, key, sentence] as const)))(
    '%s %s: filled with its facts it leaves no brace and no double blank',
    (_, key, sentence) => {
      for (const value of [1, 2.5, null, 'P-101', '2026-01-14', ['1H', '1V']] as const) {
        const text = say('en', key, Object.fromEntries(factsOf(sentence).map((name) => [name, value])));
        expect(text).not.toMatch(/[{}|]|undefined|NaN| {2}/);
        expect(text.trim()).toBe(text);
      }
    },
  );
});
