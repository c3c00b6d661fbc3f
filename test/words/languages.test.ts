/** Each language has every sentence, with the same facts, and none that nobody says. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { POLICY_DEFAULTS } from '../../src/plant/policy.ts';
import { say } from '../../src/words/say.ts';
import { formatDate, term, unitTerm } from '../../src/words/terms.ts';

const root = fileURLToPath(new URL('../..', import.meta.url));
const words = join(root, 'templates/words');
const LANGUAGES = readdirSync(words).sort();
const sentences = (language: string, file: string): Record<string, string> => JSON.parse(readFileSync(join(words, language, file), 'utf8'));
const FILES = readdirSync(join(words, 'en'));
const factsOf = (sentence: string): string[] =>
  [...new Set([...sentence.matchAll(/\{([A-Za-z_]\w*)(?=[}|:])/g)].map((m) => m[1] as string))].sort();

/** Sources of the program and its templates, as one text. */
function sources(): string {
  const below = (folder: string): string[] =>
    readdirSync(join(root, folder), { recursive: true, encoding: 'utf8' })
      .filter((f) => /\.(ts|hbs)$/.test(f))
      .map((f) => readFileSync(join(root, folder, f), 'utf8'));
  return [...below('src'), ...below('templates')].join('\n');
}

describe('languages', () => {
  const others = LANGUAGES.filter((l) => l !== 'en').flatMap((language) => FILES.map((file) => [language, file] as const));
  it.each(others)('%s %s: no key is missing, none is too many, and each names the facts of the English one', (language, file) => {
    const [english, other] = [sentences('en', file), sentences(language, file)];
    expect(Object.keys(other).sort()).toEqual(Object.keys(english).sort());
    for (const [key, sentence] of Object.entries(english)) expect(factsOf(other[key] ?? ''), key).toEqual(factsOf(sentence));
  });

  it('the words of templates and terms are all said somewhere', () => {
    const text = sources();
    for (const key of Object.keys(sentences('en', 'page.json')))
      expect(text.includes(`[[${key.slice(5)}]]`) || text.includes(`'${key}'`), key).toBe(true);
    for (const key of Object.keys(sentences('en', 'view.json'))) {
      // Keys that end in a code are said as view.urgency.${…}: their head must stand there.
      const head = key.slice(0, key.lastIndexOf('.') + 1);
      expect(text.includes(`'${key}'`) || text.includes(`\`${key}\``) || text.includes(`\`${head}\${`), key).toBe(true);
    }
  });

  it('most sentences differ from the English ones: nothing was left untranslated by mistake', () => {
    for (const [language, file] of others) {
      const [english, other] = [sentences('en', file), sentences(language, file)];
      for (const [key, sentence] of Object.entries(english))
        if (/[a-z]{3}.* .*[a-z]{3}/.test(sentence.replace(/\{\w+(:plain)?\}/g, '')))
          expect(other[key], `${language} ${key}`).not.toBe(sentence);
    }
  });

  it('what each policy default does stands in English as the policy itself has it, and in every other language', () => {
    expect(sentences('en', 'policy.json')).toEqual(
      Object.fromEntries(Object.entries(POLICY_DEFAULTS).map(([id, line]) => [`policy.${id}`, line.about])),
    );
  });

  it('numbers, dates and terms of facts follow the language', () => {
    expect(formatDate('de', '2026-01-14')).toBe('14.01.2026');
    expect(formatDate('fr', '2026-01-14')).toBe('14/01/2026');
    expect(formatDate('es', 'P-101')).toBe('P-101');
    expect(term('de', 'velocity')).toBe('Schwinggeschwindigkeit');
    expect(term('de', 'wear particles')).toBe('wear particles');
    expect(unitTerm('de', 'mm/s calculated peak')).toBe('mm/s berechneter Spitzenwert');
    const facts = { point: '1H', quantity: 'velocity', value: 5.25, unit: 'mm/s rms', condition: 'D', limit_words: 'x', travel_words: 'y' };
    expect(say('de', 'assess.reason.zone', facts)).toBe('1H Schwinggeschwindigkeit 5,25 mm/s Effektivwert: Zone D, x; y.');
    expect(say('de', 'assess.doubt.date.future', { date: '2026-02-01', from: '2026-01-12', to: '2026-01-14' })).toContain(
      '12.01.2026 bis 14.01.2026',
    );
  });
});
