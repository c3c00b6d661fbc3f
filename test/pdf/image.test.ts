/** Pictures in a PDF: upright, without metadata, nothing decoded in part. Formats: Exif 2.32 (orientation, tag 0x0112), PNG specification, third edition. */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { crc32, deflateSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { imageOf } from '../../src/pdf/image.ts';
import { pdf } from './document.ts';

const chunk = (kind: string, data: Uint8Array): Buffer => {
  const body = Buffer.concat([Buffer.from(kind, 'latin1'), data]);
  const out = Buffer.alloc(body.length + 8);
  out.writeUInt32BE(data.length, 0);
  body.copy(out, 4);
  out.writeUInt32BE(crc32(body), body.length + 4);
  return out;
};

function png(
  width: number,
  height: number,
  depth: number,
  colour: number,
  rows: readonly (readonly number[])[],
  more: readonly Buffer[] = [],
  interlace = 0,
): Uint8Array {
  const head = Buffer.alloc(13);
  head.writeUInt32BE(width, 0);
  head.writeUInt32BE(height, 4);
  head.set([depth, colour, 0, 0, interlace], 8);
  const raw = Buffer.from(rows.flatMap((row) => [0, ...row]));
  return new Uint8Array(
    Buffer.concat([
      Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
      chunk('IHDR', head),
      ...more,
      chunk('IDAT', deflateSync(raw)),
      chunk('IEND', Buffer.alloc(0)),
    ]),
  );
}

const SECTION = '<section><figure data-photo="a.png" data-alt="a picture"><figcaption>Picture</figcaption></figure></section>';
const folder = mkdtempSync(join(tmpdir(), 'swayfolio-image-'));
const has = (command: string): boolean => spawnSync(command, ['-v']).status === 0;
const canSee = has('pdftoppm');
if (!canSee) console.warn('pdftoppm is not on this machine: pictures are not looked at.');

/** Colour at a share of the width and height of the picture on the page, as poppler draws it. */
async function seen(bytes: Uint8Array): Promise<(across: number, down: number) => number[]> {
  const path = join(folder, 'seen.pdf');
  writeFileSync(path, (await pdf(SECTION, { picture: () => bytes, mark: null })).bytes);
  execFileSync('pdftoppm', ['-r', '72', '-singlefile', path, join(folder, 'seen')]);
  const ppm = readFileSync(join(folder, 'seen.ppm'));
  const [, width] = /^P6\s+(\d+)\s+(\d+)\s+255\s/.exec(ppm.subarray(0, 30).toString('latin1')) ?? [];
  const start = ppm.length - Number(width) * 842 * 3;
  // The square picture stands at the upper left of the text area, 190 points high.
  return (across, down) => {
    const at = start + (Math.round(66 + 190 * down) * Number(width) + Math.round(52 + 190 * across)) * 3;
    return [...ppm.subarray(at, at + 3)];
  };
}

function near(colour: readonly number[], wanted: readonly number[]): void {
  for (const [i, c] of colour.entries()) expect(Math.abs(c - (wanted[i] as number)), `${colour} for ${wanted}`).toBeLessThan(12);
}

describe('PNG', () => {
  const cases: [string, Uint8Array, number[], number[]][] = [
    [
      'true colour',
      png(2, 2, 8, 2, [
        [255, 0, 0, 0, 0, 255],
        [255, 0, 0, 0, 0, 255],
      ]),
      [255, 0, 0],
      [0, 0, 255],
    ],
    [
      'true colour of 16 bits',
      png(2, 2, 16, 2, [
        [255, 1, 0, 0, 0, 0, 0, 0, 0, 0, 255, 1],
        [255, 1, 0, 0, 0, 0, 0, 0, 0, 0, 255, 1],
      ]),
      [255, 0, 0],
      [0, 0, 255],
    ],
    ['grey of one bit', png(2, 2, 1, 0, [[0b01000000], [0b01000000]]), [0, 0, 0], [255, 255, 255]],
    [
      'a palette of four bits with a clear entry',
      png(2, 2, 4, 3, [[0x01], [0x01]], [chunk('PLTE', Buffer.from([0, 128, 0, 9, 9, 9])), chunk('tRNS', Buffer.from([255, 0]))]),
      [0, 128, 0],
      [255, 255, 255],
    ],
    [
      'half clear on white',
      png(2, 2, 8, 6, [
        [0, 0, 0, 128, 0, 0, 0, 255],
        [0, 0, 0, 128, 0, 0, 0, 255],
      ]),
      [127, 127, 127],
      [0, 0, 0],
    ],
    [
      'a clear colour',
      png(
        2,
        2,
        8,
        2,
        [
          [1, 2, 3, 200, 0, 0],
          [1, 2, 3, 200, 0, 0],
        ],
        [chunk('tRNS', Buffer.from([0, 1, 0, 2, 0, 3]))],
      ),
      [255, 255, 255],
      [200, 0, 0],
    ],
  ];
  for (const [what, bytes, left, right] of cases) {
    it.skipIf(!canSee)(what, async () => {
      const colours = await seen(bytes);
      near(colours(0.2, 0.5), left);
      near(colours(0.8, 0.5), right);
    });
  }

  it('gives the same bytes twice', async () => {
    const bytes = cases[4]?.[1] as Uint8Array;
    const twice = [await pdf(SECTION, { picture: () => bytes }), await pdf(SECTION, { picture: () => bytes })];
    expect(
      Buffer.compare(Buffer.from((twice[0] as { bytes: Uint8Array }).bytes), Buffer.from((twice[1] as { bytes: Uint8Array }).bytes)),
    ).toBe(0);
  });

  for (const [what, bytes, told] of [
    [
      'interlaced',
      png(
        2,
        2,
        8,
        2,
        [
          [255, 0, 0, 0, 0, 255],
          [255, 0, 0, 0, 0, 255],
        ],
        [],
        1,
      ),
      /a\.png.*interlaced/,
    ],
    ['cut short', png(2, 9, 8, 2, [[255, 0, 0, 0, 0, 255]]), /a\.png.*cut short/],
    ['no picture at all', new TextEncoder().encode('GIF89a and more of it, and more of it, and more'), /a\.png.*neither JPEG nor PNG/],
  ] as const) {
    it(`${what} is refused by the picture's name`, async () => {
      await expect(pdf(SECTION, { picture: () => bytes })).rejects.toThrow(told);
    });
  }
});

const canMake = has('convert') || spawnSync('convert', ['-version']).status === 0;
if (!canMake) console.warn('imagemagick is not on this machine: JPEG is not tested.');

/** A JPEG of four fields as stored: red, green above; blue, white below; with an Exif block that names its orientation and a place. */
function jpeg(orientation: number): Uint8Array {
  const path = join(folder, 'plain.jpg');
  const row = (a: string, b: string): string[] => ['(', '-size', '32x32', `xc:${a}`, `xc:${b}`, '+append', ')'];
  execFileSync('convert', [...row('rgb(255,0,0)', 'rgb(0,255,0)'), ...row('rgb(0,0,255)', 'white'), '-append', '-quality', '95', path]);
  const plain = readFileSync(path);
  const tiff = Buffer.from([0x4d, 0x4d, 0, 42, 0, 0, 0, 8, 0, 1, 0x01, 0x12, 0, 3, 0, 0, 0, 1, 0, orientation, 0, 0, 0, 0, 0, 0]);
  const exif = Buffer.concat([Buffer.from('Exif\0\0', 'latin1'), tiff, Buffer.from('SECRET PLACE', 'latin1')]);
  const size = Buffer.alloc(2);
  size.writeUInt16BE(exif.length + 2);
  return new Uint8Array(Buffer.concat([plain.subarray(0, 2), Buffer.from([0xff, 0xe1]), size, exif, plain.subarray(2)]));
}

describe('JPEG', () => {
  // Exif 2.32, 4.6.4 A, from memory: where the first row and the first column of the stored picture are seen.
  const sides: [number, string, string][] = [
    [1, 'top', 'left'],
    [2, 'top', 'right'],
    [3, 'bottom', 'right'],
    [4, 'bottom', 'left'],
    [5, 'left', 'top'],
    [6, 'right', 'top'],
    [7, 'right', 'bottom'],
    [8, 'left', 'bottom'],
  ];
  const share = (side: string): number => (side === 'left' || side === 'top' ? 0.25 : 0.75);
  for (const [orientation, row, column] of sides) {
    it.skipIf(!canMake || !canSee)(`orientation ${orientation}: first row ${row}, first column ${column}`, async () => {
      const colours = await seen(jpeg(orientation));
      const isUpright = row === 'top' || row === 'bottom';
      const [across, down] = isUpright ? [share(column), share(row)] : [share(row), share(column)];
      near(colours(across, down), [254, 0, 0]);
      near(colours(1 - across, 1 - down), [255, 255, 255]);
      near(isUpright ? colours(1 - across, down) : colours(across, 1 - down), [0, 255, 0]);
    });
  }

  it.skipIf(!canMake)('is embedded without its metadata', async () => {
    const { bytes } = await pdf(SECTION, { picture: () => jpeg(6) });
    const text = Buffer.from(bytes).toString('latin1');
    expect(text).toContain('DCTDecode');
    expect(text).not.toContain('SECRET PLACE');
    expect(text).not.toContain('Exif');
  });

  it.skipIf(!canMake)('of four colours is refused', () => {
    const path = join(folder, 'press.jpg');
    execFileSync('convert', ['-size', '8x8', 'xc:red', '-colorspace', 'CMYK', path]);
    expect(() => imageOf(new Uint8Array(readFileSync(path)), 'I1')).toThrow(/four colours/);
  });
});
