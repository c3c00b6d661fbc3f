/** Sentences by language and key: templates/words/<language>/*.json. A test holds that each language has the same keys and facts. */
import deAssess from '../../templates/words/de/assess.json' with { type: 'json' };
import deChart from '../../templates/words/de/chart.json' with { type: 'json' };
import deCommon from '../../templates/words/de/common.json' with { type: 'json' };
import deDraft from '../../templates/words/de/draft.json' with { type: 'json' };
import deLimits from '../../templates/words/de/limits.json' with { type: 'json' };
import dePage from '../../templates/words/de/page.json' with { type: 'json' };
import dePolicy from '../../templates/words/de/policy.json' with { type: 'json' };
import deTerms from '../../templates/words/de/terms.json' with { type: 'json' };
import deView from '../../templates/words/de/view.json' with { type: 'json' };
import enAssess from '../../templates/words/en/assess.json' with { type: 'json' };
import enChart from '../../templates/words/en/chart.json' with { type: 'json' };
import enCommon from '../../templates/words/en/common.json' with { type: 'json' };
import enDraft from '../../templates/words/en/draft.json' with { type: 'json' };
import enLimits from '../../templates/words/en/limits.json' with { type: 'json' };
import enPage from '../../templates/words/en/page.json' with { type: 'json' };
import enPolicy from '../../templates/words/en/policy.json' with { type: 'json' };
import enTerms from '../../templates/words/en/terms.json' with { type: 'json' };
import enView from '../../templates/words/en/view.json' with { type: 'json' };
import esAssess from '../../templates/words/es/assess.json' with { type: 'json' };
import esChart from '../../templates/words/es/chart.json' with { type: 'json' };
import esCommon from '../../templates/words/es/common.json' with { type: 'json' };
import esDraft from '../../templates/words/es/draft.json' with { type: 'json' };
import esLimits from '../../templates/words/es/limits.json' with { type: 'json' };
import esPage from '../../templates/words/es/page.json' with { type: 'json' };
import esPolicy from '../../templates/words/es/policy.json' with { type: 'json' };
import esTerms from '../../templates/words/es/terms.json' with { type: 'json' };
import esView from '../../templates/words/es/view.json' with { type: 'json' };
import frAssess from '../../templates/words/fr/assess.json' with { type: 'json' };
import frChart from '../../templates/words/fr/chart.json' with { type: 'json' };
import frCommon from '../../templates/words/fr/common.json' with { type: 'json' };
import frDraft from '../../templates/words/fr/draft.json' with { type: 'json' };
import frLimits from '../../templates/words/fr/limits.json' with { type: 'json' };
import frPage from '../../templates/words/fr/page.json' with { type: 'json' };
import frPolicy from '../../templates/words/fr/policy.json' with { type: 'json' };
import frTerms from '../../templates/words/fr/terms.json' with { type: 'json' };
import frView from '../../templates/words/fr/view.json' with { type: 'json' };

export const LANGUAGES = ['en', 'de', 'es', 'fr'] as const;
export type Language = (typeof LANGUAGES)[number];

type Sentences = Readonly<Record<string, string>>;

const EN: Sentences = { ...enCommon, ...enTerms, ...enChart, ...enLimits, ...enAssess, ...enDraft, ...enPage, ...enPolicy, ...enView };
const DE: Sentences = { ...deCommon, ...deTerms, ...deChart, ...deLimits, ...deAssess, ...deDraft, ...dePage, ...dePolicy, ...deView };
const ES: Sentences = { ...esCommon, ...esTerms, ...esChart, ...esLimits, ...esAssess, ...esDraft, ...esPage, ...esPolicy, ...esView };
const FR: Sentences = { ...frCommon, ...frTerms, ...frChart, ...frLimits, ...frAssess, ...frDraft, ...frPage, ...frPolicy, ...frView };

const BY_LANGUAGE: Readonly<Record<Language, Sentences>> = { en: EN, de: { ...EN, ...DE }, es: { ...EN, ...ES }, fr: { ...EN, ...FR } };

export const hasSentence = (language: Language, key: string): boolean => Object.hasOwn(BY_LANGUAGE[language], key);

/** Throws (a bug) for a key that does not exist. */
export function sentenceOf(language: Language, key: string): string {
  const sentence = BY_LANGUAGE[language][key];
  if (sentence === undefined || !hasSentence(language, key)) throw new Error(`There is no sentence "${key}".`);
  return sentence;
}
