/** Every rule that may stand beside a verdict, with its mark and a line that says what it does, for the method pages. */
import type { Mark } from '../plant/policy.ts';
import { DOUBT_KINDS, type RuleLine } from '../record/types.ts';
import type { Language } from '../words/sentences.ts';
import { say } from '../words/say.ts';
import { tableRows } from './urgency-table.ts';

const URGENCY = ['F1', 'S1', 'V1', 'R1', 'M1', 'M2', 'M3', 'M4', 'H1', 'K1', 'O1'] as const;
const INDICATIONS = ['I1', 'I2', 'I3', 'I4', 'I5', 'I6', 'I7', 'I8', 'I9', 'I10', 'I11'] as const;

export function ruleLines(language: Language): RuleLine[] {
  const line = (id: string, mark: Mark): RuleLine => ({ id, mark, about: say(language, `assess.rule.${id}`), levels: [] });
  return [
    ...tableRows().map(
      ({ rule, zone, travel, levels }): RuleLine => ({
        id: rule,
        mark: 'own',
        about: say(language, 'assess.rule.table', { zone, travel: say(language, `term.${travel}`) }),
        levels: levels.map((l) => l ?? ''),
      }),
    ),
    ...URGENCY.map((id) => line(id, 'own')),
    ...DOUBT_KINDS.map((id) => line(id, 'own')),
    ...INDICATIONS.map((id) => line(id, 'common practice')),
  ];
}
