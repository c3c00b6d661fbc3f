/**
 * Terms of the trade in the reader's language. In: a word of the record's closed lists, or one of the plant's own. Out: the
 * language's word; the plant's own stays as it is. Dates too: by our own table, never by the runtime's.
 */
import { hasSentence, type Language, sentenceOf } from './sentences.ts';

/** A word of a closed list, such as `velocity` or `not measured`. */
export function term(language: Language, word: string): string {
  const key = `term.${word}`;
  return hasSentence(language, key) ? sentenceOf(language, key) : word;
}

const DETECTIONS = ['calculated peak-to-peak', 'true peak-to-peak', 'calculated peak', 'true peak', 'rms', 'mean'] as const;

/** A unit with its detection behind it, as facts hold it: `mm/s rms`. */
export function unitTerm(language: Language, unit: string): string {
  const detection = DETECTIONS.find((d) => unit.endsWith(` ${d}`));
  return detection === undefined ? unit : `${unit.slice(0, -detection.length)}${term(language, detection)}`;
}

const DAY = /^(\d{4})-(\d{2})-(\d{2})$/;

export const isDate = (text: string): boolean => DAY.test(text);

/** `2026-01-14`; 14.01.2026 in German, 14/01/2026 in Spanish and French. What is no date stays as it is. */
export function formatDate(language: Language, text: string): string {
  if (language === 'en') return text;
  return text.replace(DAY, language === 'de' ? '$3.$2.$1' : '$3/$2/$1');
}
