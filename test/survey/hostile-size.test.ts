/** Tables made to exhaust their reader: refused at their place within bounds that are counted, not timed. */
import { describe, expect, it } from 'vitest';
import { readTable } from '../../src/survey/csv.ts';
import { Problems } from '../../src/survey/problems.ts';

describe('hostile sizes', () => {
  it('refuses a million columns by one problem', () => {
    const problems = new Problems();
    const header = ['machine', ...Array.from({ length: 999_999 }, (_, i) => `c${i}`)].join(',');
    expect(readTable('readings.csv', new TextEncoder().encode(header), ['machine'], ['machine'], problems)).toBeNull();
    expect(problems.sorted().map((p) => [p.code, p.line, p.column])).toEqual([['too-many-columns', 1, 16_385]]);
  });

  it('shows a cell of megabytes by its ends only', () => {
    const problems = new Problems();
    problems.error(
      'unknown-unit',
      { file: 'readings.csv', line: 2 },
      `The unit "mm/s${'x'.repeat(5_000_000)}" is not known.`,
      'y'.repeat(5_000_000),
    );
    const [told] = problems.sorted();
    expect(told?.message).toMatch(/^The unit "mm\/sx+ … x+" is not known\.$/);
    expect((told?.message.length ?? 0) + (told?.hint?.length ?? 0)).toBeLessThan(5_000);
  });
});
