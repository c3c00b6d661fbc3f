import { say } from '../words/say.ts';
import type { Language } from '../words/sentences.ts';

/** The cautions of every output (section 12 of the rules), in the plant's language. */
export const CAUTION_KEYS = ['screening', 'maker', 'codes', 'stopping', 'isolate', 'never_reach', 'between', 'recalled', 'only'] as const;

export const cautionsIn = (language: Language): string[] => CAUTION_KEYS.map((key) => say(language, `assess.caution.${key}`, {}));
