/**
 * Workbooks made here part by part as ECMA-376 describes them (from memory of its examples), and what is read of them. Dates:
 * serial 43831 is 2020-01-01 in the 1900 system and 1904's counts 1462 fewer (ECMA-376 part 1, 18.17.4.1; Microsoft's support pages, from memory).
 */
import { strToU8, zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { Problems } from '../../src/survey/problems.ts';
import { isDateFormat, serialText } from '../../src/survey/workbook-dates.ts';
import { workbookGrid } from '../../src/survey/workbook.ts';
import { measurementOf, recordOf } from '../assess/folder.ts';
import { readPlant } from '../../src/survey/read.ts';
import { assess } from '../../src/assess/assess.ts';

const MAIN =
  'xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"';

interface Made {
  readonly sheets?: readonly { readonly name: string; readonly rows: string; readonly state?: string; readonly after?: string }[];
  readonly strings?: string;
  readonly styles?: string;
  readonly date1904?: boolean;
  readonly more?: Readonly<Record<string, string>>;
}

/** A workbook of these sheets; `rows` is the inside of sheetData. */
function workbook({
  sheets = [],
  strings = '',
  styles = '<cellXfs><xf numFmtId="0"/><xf numFmtId="14"/><xf numFmtId="22"/></cellXfs>',
  date1904 = false,
  more = {},
}: Made): Uint8Array {
  const parts: Record<string, string> = {
    'xl/workbook.xml': `<?xml version="1.0"?><workbook ${MAIN}><workbookPr${date1904 ? ' date1904="1"' : ''}/><sheets>${sheets.map((s, i) => `<sheet name="${s.name}" sheetId="${i + 1}"${s.state === undefined ? '' : ` state="${s.state}"`} r:id="rId${i + 1}"/>`).join('')}</sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': `<Relationships>${sheets.map((_, i) => `<Relationship Id="rId${i + 1}" Target="worksheets/sheet${i + 1}.xml"/>`).join('')}</Relationships>`,
    'xl/sharedStrings.xml': `<sst ${MAIN}>${strings}</sst>`,
    'xl/styles.xml': `<styleSheet ${MAIN}>${styles}</styleSheet>`,
    ...Object.fromEntries(
      sheets.map((s, i) => [
        `xl/worksheets/sheet${i + 1}.xml`,
        `<worksheet ${MAIN}><sheetData>${s.rows}</sheetData>${s.after ?? ''}</worksheet>`,
      ]),
    ),
    ...more,
  };
  return zipSync(Object.fromEntries(Object.entries(parts).map(([path, text]) => [path, strToU8(text)])));
}

function read(made: Made | Uint8Array, sheet: string | null = null) {
  const problems = new Problems();
  const grid = workbookGrid('export.xlsx', made instanceof Uint8Array ? made : workbook(made), sheet, problems);
  return { grid, told: problems.sorted().map((p) => `${p.severity} ${p.code}`), problems: problems.sorted() };
}

describe('cells', () => {
  it('shared, rich and inline text, numbers in their shortest form, dates, booleans, blanks between', () => {
    const strings = '<si><t>plain</t></si><si><r><t>rich </t></r><r><t>&amp; text</t></r><rPh><t>no</t></rPh></si>';
    const rows =
      '<row r="2"><c r="A2" t="s"><v>0</v></c><c r="B2" t="s"><v>1</v></c><c r="D2" t="inlineStr"><is><t>in line</t></is></c></row>' +
      '<row r="5"><c r="A5"><v>2.3500000000000001</v></c><c r="B5" s="1"><v>43831</v></c><c r="C5" s="2"><v>43831.5</v></c><c r="D5" t="b"><v>1</v></c><c r="E5" t="e"><v>#N/A</v></c></row>';
    const { grid, told } = read({ sheets: [{ name: 'Readings', rows }], strings });
    expect(grid).toEqual({
      plain: true,
      rows: [
        { line: 2, cells: ['plain', 'rich & text', '', 'in line'] },
        { line: 5, cells: ['2.35', '2020-01-01', '2020-01-01T12:00', 'TRUE', '#N/A'] },
      ],
    });
    expect(told).toEqual([]);
  });

  it('a formula gives its last value, and is told; one without a value is an error at its cell', () => {
    const { grid, told, problems } = read({
      sheets: [{ name: 'S', rows: '<row r="1"><c r="A1"><f>1+1</f><v>2</v></c><c r="B1"><f>X</f></c></row>' }],
    });
    expect(grid?.rows[0]?.cells[0]).toBe('2');
    expect(told).toEqual(['warning formula-cells', 'error formula-without-value']);
    expect(problems.find((p) => p.severity === 'error')).toMatchObject({ line: 1, column: 2 });
  });

  it('merged ranges are told', () => {
    expect(
      read({
        sheets: [
          { name: 'S', rows: '<row r="1"><c r="A1"><v>1</v></c></row>', after: '<mergeCells><mergeCell ref="A1:B1"/></mergeCells>' },
        ],
      }).told,
    ).toEqual(['note merged-cells']);
  });
});

describe('dates', () => {
  it('both systems, the day that never was, times alone', () => {
    expect(serialText(43831, false)).toBe('2020-01-01');
    expect(serialText(43831 - 1462, true)).toBe('2020-01-01');
    expect(serialText(1, false)).toBe('1900-01-01');
    expect(serialText(59, false)).toBe('1900-02-28');
    expect(serialText(60, false)).toBe('60');
    expect(serialText(61, false)).toBe('1900-03-01');
    expect(serialText(0, true)).toBe('1904-01-01');
    expect(serialText(0.5, false)).toBe('12:00');
    expect(serialText(43831 + 1 - 1e-9, false)).toBe('2020-01-02');
  });

  it('a format is a date by its number or by its letters, not by those in quotes or brackets', () => {
    for (const id of [14, 17, 22, 45, 57]) expect(isDateFormat(id, undefined), String(id)).toBe(true);
    for (const id of [0, 1, 2, 9, 12, 49]) expect(isDateFormat(id, undefined), String(id)).toBe(false);
    for (const code of ['yyyy-mm-dd', 'dd/mm/yy hh:mm', '[$-409]d\\-mmm\\-yy', 'h:mm']) expect(isDateFormat(164, code), code).toBe(true);
    for (const code of ['0.00', '0.00" mm/s"', '[Red]0.0', 'General', '0.0\\s']) expect(isDateFormat(164, code), code).toBe(false);
  });
});

describe('sheets', () => {
  const two = {
    sheets: [
      { name: 'Cover', rows: '' },
      { name: 'Data', rows: '<row r="1"><c r="A1"><v>7</v></c></row>' },
      { name: 'Old', rows: '', state: 'hidden' },
    ],
  };

  it('several visible ones are not guessed among; named, one is read, a hidden one too', () => {
    expect(read(two).told).toEqual(['error workbook-which-sheet']);
    expect(read(two, 'Data').grid?.rows[0]?.cells).toEqual(['7']);
    expect(read(two, 'Old').grid?.rows).toEqual([]);
    expect(read(two, 'Nothing').problems[0]?.hint).toContain('"Cover", "Data"');
  });
});

describe('hostile', () => {
  const sheet = { name: 'S', rows: '<row r="1"><c r="A1"><v>1</v></c></row>' };

  it('what is no zip, no workbook, or damaged', () => {
    const sound = workbook({ sheets: [sheet] });
    for (const bytes of [
      new Uint8Array(),
      strToU8('a,b\n1,2\n'),
      sound.slice(0, sound.length >> 1),
      zipSync({ 'other.txt': strToU8('x') }),
    ])
      expect(read(bytes).told).toEqual(['error workbook-broken']);
  });

  it('a document type, with or without entities, is refused', () => {
    const bomb = '<!DOCTYPE x [<!ENTITY a "aaaa"><!ENTITY b "&a;&a;&a;">]><sst><si><t>&b;</t></si></sst>';
    expect(read({ sheets: [sheet], more: { 'xl/sharedStrings.xml': bomb } }).told).toEqual(['error workbook-broken']);
  });

  it('a part that unpacks to far more than it should is not unpacked', () => {
    const bomb = `<sst><si><t>${'0'.repeat(30_000_000)}</t></si></sst>`;
    const before = process.memoryUsage().arrayBuffers;
    expect(read({ sheets: [sheet], more: { 'xl/sharedStrings.xml': bomb } }).told).toEqual(['error workbook-too-large']);
    expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(100_000_000);
  });

  it('thousands of parts, cells far out, references that are none', () => {
    expect(read({ sheets: [sheet], more: Object.fromEntries(Array.from({ length: 2100 }, (_, i) => [`x/${i}`, ''])) }).told).toEqual([
      'error workbook-too-large',
    ]);
    const far = Array.from({ length: 600 }, (_, i) => `<row r="${i + 1}"><c r="XFD${i + 1}"><v>1</v></c></row>`).join('');
    expect(read({ sheets: [{ name: 'S', rows: far }] }).told).toEqual(['error workbook-too-large']);
    expect(read({ sheets: [{ name: 'S', rows: '<row r="1"><c r="ZZZZ1"><v>1</v></c></row>' }] }).told).toEqual([
      'error workbook-too-large',
    ]);
    expect(read({ sheets: [{ name: 'S', rows: '<row r="1"><c r="11"><v>1</v></c></row>' }] }).told).toEqual(['error workbook-broken']);
  });
});

it('a workbook gives the record of the same readings as CSV', () => {
  const yaml = (file: string, more: string): string =>
    `plant: Test works\nimport:\n  files:\n    - file: ${file}\n${more}      columns:\n        machine: Machine\n        point: Point\n        value: Value\n        survey_date: Date\n      constants:\n        quantity: velocity\n        unit: mm/s\n        detection: rms\n`;
  const csv = recordOf({
    'plant.yaml': yaml('surveys/export.csv', '      dates: ymd\n'),
    'surveys/export.csv': 'Machine,Point,Value,Date\nM,1H,2.35,2020-01-01\n',
  });
  const head = ['Machine', 'Point', 'Value', 'Date'].map((t, i) => `<c r="${'ABCD'[i]}1" t="inlineStr"><is><t>${t}</t></is></c>`).join('');
  const rows = `<row r="1">${head}</row><row r="2"><c r="A2" t="inlineStr"><is><t>M</t></is></c><c r="B2" t="inlineStr"><is><t>1H</t></is></c><c r="C2"><v>2.3500000000000001</v></c><c r="D2" s="1"><v>43831</v></c></row>`;
  const files = new Map<string, Uint8Array>([
    ['plant.yaml', strToU8(yaml('surveys/export.xlsx', '      sheet: Data\n'))],
    [
      'surveys/export.xlsx',
      workbook({
        sheets: [
          { name: 'Cover', rows: '' },
          { name: 'Data', rows },
        ],
      }),
    ],
  ]);
  const shell = {
    list: () => ({ files: [...files.keys()], refused: [] }),
    read: (path: string) => files.get(path.replace('plant/', '')) as Uint8Array,
    exists: () => true,
  };
  const { plant, problems } = readPlant(shell, 'plant');
  expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
  if (plant === null) throw new Error('no plant');
  const record = assess(plant, { survey: null, toolVersion: 'test' });
  const bare = (m: ReturnType<typeof measurementOf>) => ({ ...m, source: null, history: null });
  expect(bare(record.measurements[0] as ReturnType<typeof measurementOf>)).toEqual(bare(measurementOf(csv, 'M', '1H')));
});

describe('a row whose number is none', () => {
  it.each(['x', '-1', '1.5', '', '1e99'])('is refused: r="%s"', (r) => {
    const { grid, told } = read({ sheets: [{ name: 'A', rows: `<row r="${r}"><c r="A1" t="x"><v>1</v></c></row>` }] });
    expect(grid).toBeNull();
    expect(told).toEqual(['error workbook-broken']);
  });
});
