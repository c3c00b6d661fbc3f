/** `new --from`: exports in several shapes and languages. Where nothing is in question the folder is read at once; else each doubt is asked. */
import { describe, expect, it } from 'vitest';
import { type ReadingShell, readPlant } from '../../src/survey/read.ts';
import { plantFrom } from '../../src/survey/from.ts';

const bytesOf = (file: string | Uint8Array): Uint8Array => (typeof file === 'string' ? new TextEncoder().encode(file) : file);

function made(text: string | Uint8Array, name = 'export.csv') {
  const { files, questions } = plantFrom([{ name, bytes: bytesOf(text) }], 'Works');
  const byPath = new Map(files.map((file) => [file.path, bytesOf(file.bytes)]));
  const shell: ReadingShell = {
    list: () => ({ files: [...byPath.keys()].sort(), refused: [] }),
    read: (path) => byPath.get(path.slice(2)) as Uint8Array,
    exists: () => true,
  };
  const { plant, problems } = readPlant(shell, 'p');
  const readings =
    plant?.machines.flatMap((m) =>
      m.series.flatMap((s) =>
        s.readings.map((r) => [m.id, s.point, s.quantity, s.detection, plant.surveys[r.survey]?.id, r.status, r.value, s.unit].join(' ')),
      ),
    ) ?? null;
  return { questions, readings, problems };
}

const SURE: Readonly<Record<string, readonly [string | Uint8Array, string]>> = {
  English: ['Route 7\n\nAsset,Point,Date,Vel (mm/s RMS)\nFAN-1,1H,14/01/2026 09:30,1.8\nFAN-1,2H,14/01/2026 09:31,STBY\n', 'export.csv'],
  German: [
    'Maschine;Messpunkt;Datum;Messwert;Einheit\nFAN-1;1H;14.01.2026 09:30;1,8;mm/s eff\nFAN-1;2H;14.01.2026 09:31;steht;mm/s eff\n',
    'export.csv',
  ],
  Spanish: [
    Buffer.from(
      '\ufeffMáquina\tPunto\tFecha\tValor (mm/s rms)\r\nFAN-1\t1H\t14/01/2026\t1,8\r\nFAN-1\t2H\t14/01/2026\tparado\r\n',
      'utf16le',
    ),
    'export.txt',
  ],
  'French, a column a direction, units below': [
    'Équipement|Palier|Date|Horizontal\n|||mm/s rms\nFAN-1|1|14/01/2026|1,8\nFAN-1|2|14/01/2026|hors service\nFin de liste|||\n',
    'export.txt',
  ],
  'a day in the name of the file': [
    'machine,point,value,unit,detection\nFAN-1,1H,1.8,mm/s,rms\nFAN-1,2H,OFF,mm/s,rms\n',
    'route 2026-01-14.csv',
  ],
};

describe('new --from', () => {
  it.each(Object.keys(SURE))('nothing is in question, the folder is read at once: %s', (name) => {
    const [text, file] = SURE[name] as readonly [string, string];
    const { questions, readings, problems } = made(text, file);
    expect(questions).toEqual([]);
    expect(problems.filter((p) => p.severity === 'error')).toEqual([]);
    expect(readings).toEqual(['FAN-1 1H velocity rms 2026-01-14 measured 1.8 mm/s', 'FAN-1 2H velocity rms 2026-01-14 stopped  mm/s']);
  });

  it('asks for each thing that reads in more than one way', () => {
    const { questions } = made('Asset;Point;Date;Overall\nFAN-1;1H;01/02/2026;1,234\nFAN-1;2H;03/02/2026;2,345\n');
    expect(questions.join('\n')).toMatch(/In which unit/);
    expect(questions.join('\n')).toMatch(/decimal sign\? "1,234" is 1\.234 .* and 1234/);
    expect(questions.join('\n')).toMatch(/"01\/02\/2026" is 2026-02-01 by dmy, or 2026-01-02 by mdy/);
  });

  it('asks which peak, which day, and for columns it does not know', () => {
    expect(made('Asset,Point,Vel (mm/s pk)\nFAN-1,1H,1.8\n').questions.join('\n')).toMatch(/calculated from r\.m\.s\.[\s\S]*On which day/);
    expect(made('Foo,Point,Value (g rms),Date\nFAN-1,1H,1.8,2026-01-14\n').questions.join('\n')).toMatch(/Which column names the machine/);
    expect(made('Machine,1H,2H\nFAN-1,1.2,1.4\n').questions[0]).toMatch(
      /Are the columns 1H, 2H points[\s\S]*wide: \{ 1H: \{ point: 1H \}, 2H: \{ point: 2H \} \}/,
    );
    expect(made(Buffer.from('Gerät,Wert\nx,1\n', 'latin1')).questions.join('\n')).toMatch(/Windows-1252 this line reads: Gerät,Wert/);
  });

  it('writes a plant.yaml whose texts stay texts, whatever the columns are called', () => {
    const { questions, readings } = made(
      '"Asset: {x} # ""1""",Machine,Point,"Value (mm/s RMS)",Date\na,FAN-1,1H,1.8,2026-01-14\n',
      'a #1: x.csv',
    );
    expect(questions).toEqual([]);
    expect(readings).toHaveLength(1);
  });
});
