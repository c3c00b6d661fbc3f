/** Check value 28: the cases of the csv-spectrum package (RFC 4180), through our own reader of tables. */
import { describe, expect, it } from 'vitest';
import { readTable } from '../../src/survey/csv.ts';
import { Problems } from '../../src/survey/problems.ts';

interface Case {
  readonly name: string;
  readonly csv: Buffer;
  readonly json: Buffer;
}

const cases = await new Promise<Case[]>((resolve, reject) => {
  void import('csv-spectrum').then(({ default: spectrum }) =>
    spectrum((error: Error | null, data: Case[]) => (error === null ? resolve(data) : reject(error))),
  );
});

describe('csv-spectrum', () => {
  it('brings its cases', () => {
    expect(cases.length).toBeGreaterThan(8);
  });

  for (const { name, csv, json } of cases) {
    it(name, () => {
      const expected = [JSON.parse(json.toString()) as Record<string, string>[] | Record<string, string>].flat();
      const problems = new Problems();
      const header = Object.keys(expected[0] ?? {});
      const table = readTable(`${name}.csv`, csv, header, [], problems);
      expect(problems.anyError).toBe(false);
      const rows = table?.rows.map((row) => Object.fromEntries(table.header.map((column, i) => [column, row[i]])));
      // The package's own answer to this case has another phone number than its file: all other columns are held to it.
      const without = (row: Record<string, string | undefined>) =>
        name === 'location_coordinates' ? { ...row, 'Contact Phone Number': '' } : row;
      expect(rows?.map(without)).toEqual(expected.map(without));
    });
  }
});
