/** Rows after those of a user's file: what stood there stays byte for byte. csv-parse reads the whole back. */
import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findingsHeader } from '../../src/survey/findings.ts';
import { appendRows } from '../../src/table/append.ts';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
const text = (of: Uint8Array): string => new TextDecoder('utf-8', { ignoreBOM: true }).decode(of);
const plain = (head: readonly string[]): readonly string[] => head;

describe('rows are appended', () => {
  for (const [what, before, after] of [
    ['to a file with a byte order mark and CRLF', '\ufeffa,b\r\n1,2\r\n', '\ufeffa,b\r\n1,2\r\n"x,y",z\r\n'],
    ['to one whose last line has no end', 'a,b\n1,2', 'a,b\n1,2\n"x,y",z\n'],
    ['in the separator of the file', 'a;b\n"1;1";2\n', 'a;b\n"1;1";2\nx,y;z\n'],
    ['in the order of its columns, others left blank', 'b,c,a\n', 'b,c,a\nz,,"x,y"\n'],
    ['under a head of their own where there is no file', null, 'a,b\n"x,y",z\n'],
    ['under a head of their own where the file is empty', '', 'a,b\n"x,y",z\n'],
  ] as const) {
    it(what, () =>
      expect(text(appendRows(before === null ? null : bytes(before), ['a', 'b'], [{ a: 'x,y', b: 'z' }], plain).bytes)).toBe(after),
    );
  }

  it('the second column "finding" is the text, the first the id', () => {
    const { bytes: out } = appendRows(
      bytes('finding,machine,finding\nF1,M,old\n'),
      [],
      [{ finding: 'F2', machine: 'M', finding_text: 'new' }],
      findingsHeader,
    );
    expect(text(out)).toBe('finding,machine,finding\nF1,M,old\nF2,M,new\n');
  });

  it('text without a column is told, and only that', () => {
    expect(appendRows(bytes('a\n'), [], [{ a: '1', b: '2', c: '' }], plain).lacking).toEqual(['b']);
  });

  it('what is not UTF-8 is refused', () => {
    expect(() => appendRows(Uint8Array.of(0x61, 0xe9, 0x0a), ['a'], [{ a: '1' }], plain)).toThrow(TypeError);
  });

  it('property: any cells come back by csv-parse, and what stood before is untouched', () => {
    const cell = fc.string({ unit: 'grapheme' }).filter((t) => !t.includes('\ufeff'));
    fc.assert(
      fc.property(fc.array(fc.record({ a: cell, b: cell }), { minLength: 1, maxLength: 4 }), fc.constantFrom('\n', '\r\n'), (rows, end) => {
        const before = bytes(`a,b${end}"q""q",2${end}`);
        const { bytes: out } = appendRows(before, [], rows, plain);
        expect(out.subarray(0, before.length)).toEqual(before);
        const read = parse(text(out), { columns: true, skip_empty_lines: false }) as unknown[];
        expect(read.slice(1)).toEqual(rows);
      }),
    );
  });
});
