/**
 * Sentences from facts. In: a language, a key, facts. Out: a sentence. Never: numbers or dates by the runtime's locale.
 */
import type { Facts } from './facts.ts';
import { formatNumber, plainNumber } from './numbers.ts';
import { type Language, sentenceOf } from './sentences.ts';
import { formatDate, term, unitTerm } from './terms.ts';

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

/** Facts whose value is a word of a closed list. */
const TERM_FACTS: ReadonlySet<string> = new Set([
  'quantity',
  'kind',
  'support',
  'place',
  'basis',
  'status',
  'detection',
  'limit_detection',
  'closing',
  'scope',
  'condition',
]);

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

/**
 * The sentence of `key` with its placeholders filled from facts: numbers by the language's own number form, null as the
 * language's word for unknown. Throws (a bug) on a key that does not exist or a fact that was not given.
 */
export function say(language: Language, key: string, facts: Facts = {}): string {
  const id = `${language} ${key}`;
  let parts = parsed.get(id);
  if (parts === undefined) {
    parts = parse(sentenceOf(language, key));
    parsed.set(id, parts);
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
      text +=
        part.one === null || part.many === null
          ? part.plain && typeof value === 'number'
            ? plainNumber(language, value)
            : factText(language, value, part.name)
          : fill(language, key, value === 1 ? part.one : part.many, facts);
    }
  }
  return text;
}

function factText(language: Language, value: Facts[string], name: string): string {
  if (value === null) return sentenceOf(language, 'common.unknown');
  if (typeof value === 'number') return formatNumber(language, value);
  if (typeof value === 'string') return wordText(language, value, name);
  if (typeof value === 'boolean') return sentenceOf(language, value ? 'common.yes' : 'common.no');
  return listText(
    language,
    value.map((item) => factText(language, item, name)),
  );
}

function wordText(language: Language, value: string, name: string): string {
  if (TERM_FACTS.has(name)) return term(language, value);
  return name === 'unit' ? unitTerm(language, value) : formatDate(language, value);
}

/** a; a and b; a, b and c. */
export function listText(language: Language, items: readonly string[]): string {
  if (items.length < 2) return items[0] ?? '';
  return `${items.slice(0, -1).join(', ')} ${sentenceOf(language, 'common.and')} ${items[items.length - 1]}`;
}
