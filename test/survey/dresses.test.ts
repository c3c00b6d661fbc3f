/** The same values in eight dresses give one record: only what names the files differs. */
import { describe, expect, it } from 'vitest';
import { assess } from '../../src/assess/assess.ts';
import { writeRecord } from '../../src/record/write.ts';
import { type ReadingShell, readPlant } from '../../src/survey/read.ts';

type Files = Readonly<Record<string, string | Uint8Array>>;

const shellOf = (files: Files): ReadingShell => ({
  list: () => ({ files: Object.keys(files).sort(), refused: [] }),
  read: (path) => {
    const file = files[path.slice('plant/'.length)];
    if (file === undefined) throw new Error(path);
    return typeof file === 'string' ? new TextEncoder().encode(file) : file;
  },
  exists: (path) => Object.hasOwn(files, path.slice('plant/'.length)),
});

const HOME = 'surveys/2026-01-14/';
const MACHINES =
  'machine,kind,power_kw,speed_rpm,drive,support,shaft_height_mm\nLüfter-1,fan,90,1480,fixed,rigid,\nPUMP-2,pump,55,2960,fixed,rigid,\n';
const POINTS = `machine,point,measured_on,quantity,unit,detection,low_hz,high_hz\n${['Lüfter-1,1H', 'Lüfter-1,1V', 'PUMP-2,1H', 'PUMP-2,1V'].map((p) => `${p},bearing housing,velocity,mm/s,rms,10,1000\n`).join('')}`;
const PLANT = 'plant: Case works\n';

const plant = (mapping: string, name: string, file: string | Uint8Array): Files => ({
  'machines.csv': MACHINES,
  'points.csv': POINTS,
  'plant.yaml':
    mapping === ''
      ? PLANT
      : `${PLANT}import:\n  files:\n    - file: ${HOME}${name}\n${mapping
          .split('\n')
          .map((line) => `      ${line}\n`)
          .join('')}`,
  [HOME + name]: file,
});
const utf16 = (text: string): Uint8Array => Buffer.from(`\ufeff${text}`, 'utf16le');
const latin = (text: string): Uint8Array => Buffer.from(text, 'latin1');

const LONG = 'machine,point,value\nLüfter-1,1H,1.8\nLüfter-1,1V,12.25\nPUMP-2,1H,<0.2\nPUMP-2,1V,STBY\n';
const COLUMNS = 'columns: { machine: Asset, point: Place, value: Vel (mm/s RMS) }';
const HEAD = 'Asset,Place,Vel (mm/s RMS)';
const named = LONG.replace('machine,point,value', HEAD);

const dresses: Readonly<Record<string, Files>> = {
  'the plain form': plant('', 'readings.csv', LONG),
  'semicolons and decimal commas': plant('', 'readings.csv', LONG.replaceAll(',', ';').replaceAll('.', ',')),
  'UTF-16 with tabs and CRLF': plant(COLUMNS, 'export.txt', utf16(named.replaceAll(',', '\t').replaceAll('\n', '\r\n'))),
  'Windows-1252 with bars and CR': plant(
    `encoding: windows-1252\n${COLUMNS}`,
    'export.txt',
    latin(named.replaceAll(',', '|').replaceAll('\n', '\r')),
  ),
  'a preamble and a footer': plant(`footer: Total\n${COLUMNS}`, 'export.csv', `Route of the works\n\n${named}Total,4\n`),
  'wide, a column a point': plant(
    'columns: { machine: Asset }\nwide: { 1H: { point: 1H }, 1V: { point: 1V } }',
    'export.csv',
    'Asset,1H,1V\nLüfter-1,1.8,12.25\nPUMP-2,<0.2,STBY\n',
  ),
  'wide, a column a direction, with units below': plant(
    'units_row: yes\ncolumns: { machine: Asset }\nwide: { Horizontal: { point: "{Pos}H" }, Vertical: { point: "{Pos}V" } }',
    'export.csv',
    'Asset,Pos,Horizontal,Vertical\n,,mm/s rms,mm/s rms\nLüfter-1,1,"1,8","12,25"\nPUMP-2,1,"<0,2",STBY\n',
  ),
  'ids put together, names and states by tables': {
    ...plant(
      'columns: { machine: "{Type} {No}", point: Place, value: Overall }\nconstants: { unit: mm/s, detection: rms }\nnames:\n  machine: { Fan 1: Lüfter-1, Pump 2: PUMP-2 }\n  point: { Hor: 1H, Ver: 1V }',
      'export.csv',
      'Type,No,Place,Overall\nFan,1,Hor,1.8\nFan,1,Ver,12.25\nPump,2,Hor,<0.2\nPump,2,Ver,in Ruhe\n',
    ),
  },
};

const WHERE = ['inputs', 'file', 'line'];

/** Without files, their hashes and lines, which must differ. */
function recordOf(name: string): unknown {
  const files = dresses[name] as Files;
  const states = name.startsWith('ids')
    ? { ...files, 'plant.yaml': `${files['plant.yaml'] as string}  states: { in Ruhe: stopped }\n` }
    : files;
  const { plant: read, problems } = readPlant(shellOf(states), 'plant');
  if (read === null) throw new Error(JSON.stringify(problems));
  return JSON.parse(writeRecord(assess(read, { survey: null, toolVersion: 'test' })), (key, value: unknown) =>
    WHERE.includes(key) ? null : value,
  );
}

describe('the same values in eight dresses', () => {
  const plain = recordOf('the plain form');
  expect(JSON.stringify(plain)).toContain('12.25');
  it.each(Object.keys(dresses).slice(1))('%s', (name) => {
    expect(recordOf(name)).toEqual(plain);
  });
});
