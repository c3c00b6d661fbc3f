import { expect, test } from 'vitest';
import { dueFor, retentionYears } from '../../src/archive/retention.ts';
import type { Issued } from '../../src/archive/chain.ts';

const issued = (name: string, day: string): Issued => ({
  name,
  manifestHash: '',
  file: {
    number: name,
    revision: 0,
    tool: { name: 'swayfolio', version: '1' },
    survey: day,
    issued_on: day,
    replaces: null,
    reason: null,
    previous_manifest: null,
    signed_by: null,
  },
});

test.each([
  ['ten years', 10],
  ['10 years after issue', 10],
  ['zehn Jahre', 10],
  ['5 ans', 5],
  ['veinte años', 20],
  ['for ever', null],
  ['toString years', null],
  ['10', null],
])('%s', (text, years) => {
  expect(retentionYears(text)).toBe(years);
});

test('an issue is due on the day after its anniversary, and not on it', () => {
  const issues = [issued('2016-001', '2016-02-01'), issued('2016-002', '2016-02-02'), issued('2020-001', '2020-02-01')];
  expect(dueFor(issues, 'ten years', '2026-02-02')).toEqual(['2016-001']);
  expect(dueFor(issues, 'as agreed', '2026-02-02')).toBeNull();
});
