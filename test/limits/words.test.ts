/** Every reason the code gives has its sentence, and every sentence is given by the code. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import sentences from '../../templates/words/en/limits.json' with { type: 'json' };

const folder = new URL('../../src/limits/', import.meta.url);
const code = readdirSync(folder)
  .map((name) => readFileSync(new URL(name, folder), 'utf8'))
  .join('\n');

/** Keys as by-rule.ts, choose.ts and own.ts write them: whole, or the last word of none(…) and of a group's rule. */
function keysInCode(): Set<string> {
  const keys = new Set<string>();
  for (const [, key] of code.matchAll(/'(limits\.[a-z_.]+)'/g)) keys.add(key as string);
  for (const [, key] of code.matchAll(/\bnone\('([a-z_]+)'/g)) keys.add(`limits.none.${key}`);
  for (const [, key] of code.matchAll(/rowOf\([^;]*?, q, '([a-z_]+)'/g)) keys.add(`limits.rule.${key}`);
  for (const key of ['pump_motor', 'pump', 'shaft_height', 'shaft_height_speed_unknown', 'power', 'power_speed_unknown'])
    if (code.includes(`'${key.replace('_speed_unknown', '')}'`)) keys.add(`limits.rule.${key}`);
  for (const rank of ['point', 'component']) keys.add(`limits.named.${rank}`);
  for (const rank of ['point', 'component', 'machine', 'kind']) keys.add(`limits.own.${rank}`);
  return keys;
}

describe('limits.json', () => {
  it('has each key of the code, and no other', () => {
    expect([...keysInCode()].sort()).toEqual(Object.keys(sentences).sort());
  });

  it('tells whole sentences; what is from memory or our own says so', () => {
    for (const [key, sentence] of Object.entries(sentences)) {
      expect([key, sentence.endsWith('.')]).toEqual([key, true]);
      if (key.startsWith('limits.none.') && key !== 'limits.none.conflict')
        expect([key, sentence]).toEqual([key, expect.stringMatching(/^No published zone: /)]);
    }
    for (const key of ['limits.rule.fan', 'limits.rule.pump_motor', 'limits.none.outside', 'limits.none.reciprocating'] as const)
      expect(sentences[key]).toContain('[recalled]');
  });
});
