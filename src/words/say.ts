/**
 * Sentences from facts. In: a language, a key, facts. Out: a sentence. Never: numbers or dates by the runtime's locale.
 */
import assess from '../../templates/words/en/assess.json' with { type: 'json' };
import chart from '../../templates/words/en/chart.json' with { type: 'json' };
import common from '../../templates/words/en/common.json' with { type: 'json' };
import draft from '../../templates/words/en/draft.json' with { type: 'json' };
import limits from '../../templates/words/en/limits.json' with { type: 'json' };
import page from '../../templates/words/en/page.json' with { type: 'json' };
import units from '../../templates/words/en/units.json' with { type: 'json' };
import type { Facts } from './facts.ts';
import { formatNumber, plainNumber } from './numbers.ts';

export type Language = 'en' | 'de' | 'es' | 'fr';

/** Sentences by key; a language without a file of its own speaks English. */
const SENTENCES: Readonly<Record<string, string>> = { ...common, ...units, ...chart, ...limits, ...assess, ...draft, ...page };

/** A sentence taken apart once: text, or a placeholder with its plural forms. */
type Part = string | Placeholder;

interface Placeholder {
  readonly name: string;
  /** As it was given, without three significant digits: counts, ratings, speeds. */
  readonly plain: boolean;
  readonly one: readonly Part[] | null;
  readonly many: readonly Part[] | null;
}

const parsed = new Map<string, readonly Part[]>();

/** `{name}`, `{name:plain}` or `{name|one|many}`, where the forms may hold placeholders of their own. */
function parse(sentence: string): readonly Part[] {
  const parts: Part[] = [];
  let text = '';
  for (let i = 0; i < sentence.length; i += 1) {
    if (sentence[i] !== '{') {
      text += sentence[i];
      continue;
    }
    let depth = 1;
    let end = i + 1;
    while (depth > 0 && end < sentence.length) {
      if (sentence[end] === '{') depth += 1;
      if (sentence[end] === '}') depth -= 1;
      end += 1;
    }
    if (text !== '') parts.push(text);
    text = '';
    parts.push(placeholder(sentence.slice(i + 1, end - 1)));
    i = end - 1;
  }
  if (text !== '') parts.push(text);
  return parts;
}

function placeholder(inside: string): Part {
  const bar = inside.indexOf('|');
  if (bar < 0) return { name: inside.replace(/:plain$/, ''), plain: inside.endsWith(':plain'), one: null, many: null };
  const forms = inside.slice(bar + 1);
  const second = forms.indexOf('|');
  return { name: inside.slice(0, bar), plain: false, one: parse(forms.slice(0, second)), many: parse(forms.slice(second + 1)) };
}

export const hasSentence = (_language: Language, key: string): boolean => Object.hasOwn(SENTENCES, key);

/**
 * The sentence of `key` with its placeholders filled from facts: numbers by the language's own number form, null as the
 * language's word for unknown. Throws (a bug) on a key that does not exist or a fact that was not given.
 */
export function say(language: Language, key: string, facts: Facts = {}): string {
  let parts = parsed.get(key);
  if (parts === undefined) {
    const sentence = SENTENCES[key];
    if (sentence === undefined || !Object.hasOwn(SENTENCES, key)) throw new Error(`There is no sentence "${key}".`);
    parts = parse(sentence);
    parsed.set(key, parts);
  }
  return fill(language, key, parts, facts);
}

function fill(language: Language, key: string, parts: readonly Part[], facts: Facts): string {
  let text = '';
  for (const part of parts) {
    if (typeof part === 'string') text += part;
    else {
      const value = facts[part.name];
      if (value === undefined) throw new Error(`The sentence "${key}" names the fact "${part.name}", which was not given.`);
      text += part.one === null || part.many === null ? (part.plain && typeof value === 'number' ? plainNumber(language, value) : factText(language, value)) : fill(language, key, value === 1 ? part.one : part.many, facts);
    }
  }
  return text;
}

function factText(language: Language, value: Facts[string]): string {
  if (value === null) return SENTENCES['common.unknown'] ?? 'unknown';
  if (typeof value === 'number') return formatNumber(language, value);
  if (typeof value === 'string') return value;
  if (typeof value === 'boolean') return (value ? SENTENCES['common.yes'] : SENTENCES['common.no']) ?? String(value);
  return listText(value.map((item) => factText(language, item)));
}

/** a; a and b; a, b and c. */
export function listText(items: readonly string[]): string {
  if (items.length < 2) return items[0] ?? '';
  return `${items.slice(0, -1).join(', ')} ${SENTENCES['common.and'] ?? 'and'} ${items[items.length - 1]}`;
}
