/**
 * Photos and logos. In: JPEG or PNG bytes. Out: an image XObject. JPEG data go in as they are, without their metadata (a
 * photo knows where it was taken) and turned upright; PNG pixels are packed anew. Never: an image that is decoded in part.
 */
import { deflateSync, inflateSync } from 'node:zlib';
import { exifOrientation } from '../page/exif.ts';
import type { PackedDocument, Reference } from './document.ts';

export interface PdfImage {
  readonly name: string;
  /** Upright size in pixels. */
  readonly width: number;
  readonly height: number;
  /** Operands of `cm` that put the upright picture into a box, y down. */
  matrix(x: number, y: number, width: number, height: number): string;
  write(document: PackedDocument): Reference;
}

export class ImageError extends Error {}

const n = (value: number): string => String(Math.round(value * 1000) / 1000);

/** Throws ImageError for what is neither a baseline or progressive JPEG nor a plain PNG. */
export function imageOf(bytes: Uint8Array, name: string): PdfImage {
  if (bytes[0] === 0xff && bytes[1] === 0xd8) return jpegImage(bytes, name);
  if (bytes[0] === 0x89 && bytes[1] === 0x50) return pngImage(bytes, name);
  throw new ImageError('it is neither JPEG nor PNG');
}

interface Jpeg {
  readonly width: number;
  readonly height: number;
  readonly components: number;
  readonly orientation: number;
  readonly stripped: Uint8Array;
}

const word = (bytes: Uint8Array, at: number): number => ((bytes[at] ?? 0) << 8) | (bytes[at + 1] ?? 0);

/** Walks the segments of a JPEG: size from its frame header, orientation from Exif; application segments but Adobe's are dropped. */
function readJpeg(bytes: Uint8Array): Jpeg {
  const kept: Uint8Array[] = [bytes.subarray(0, 2)];
  let frame: { width: number; height: number; components: number } | null = null;
  let orientation = 1;
  let at = 2;
  while (at + 4 <= bytes.length) {
    if (bytes[at] !== 0xff) throw new ImageError('the JPEG is broken');
    if (bytes[at + 1] === 0xff) {
      at += 1;
      continue;
    }
    const marker = bytes[at + 1] as number;
    const length = word(bytes, at + 2);
    if (length < 2) throw new ImageError('the JPEG is broken');
    const segment = bytes.subarray(at, at + 2 + length);
    if (marker === 0xda) {
      kept.push(bytes.subarray(at));
      break;
    }
    if (marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker)) {
      frame = { height: word(bytes, at + 5), width: word(bytes, at + 7), components: bytes[at + 9] ?? 3 };
    }
    if (marker === 0xe1) orientation = exifOrientation(segment) ?? orientation;
    const isMetadata = (marker >= 0xe0 && marker <= 0xef && marker !== 0xee) || marker === 0xfe;
    if (!isMetadata) kept.push(segment);
    at += 2 + length;
  }
  if (frame === null || frame.width === 0 || frame.height === 0) throw new ImageError('the JPEG has no size');
  if (frame.components !== 1 && frame.components !== 3) throw new ImageError('the JPEG is in four colours, for a printing press');
  const stripped = concatenated(kept);
  return { ...frame, orientation, stripped };
}

/** Image space (unit square, y up) to an upright box (y down) for each Exif orientation. */
function turned(orientation: number, x: number, y: number, w: number, h: number): string {
  const matrices: Readonly<Record<number, readonly number[]>> = {
    1: [w, 0, 0, -h, x, y + h],
    2: [-w, 0, 0, -h, x + w, y + h],
    3: [-w, 0, 0, h, x + w, y],
    4: [w, 0, 0, h, x, y],
    5: [0, h, -w, 0, x + w, y],
    6: [0, h, w, 0, x, y],
    7: [0, -h, w, 0, x, y + h],
    8: [0, -h, -w, 0, x + w, y + h],
  };
  return (matrices[orientation] ?? (matrices[1] as readonly number[])).map(n).join(' ');
}

function jpegImage(bytes: Uint8Array, name: string): PdfImage {
  const jpeg = readJpeg(bytes);
  const swapped = jpeg.orientation >= 5;
  return {
    name,
    width: swapped ? jpeg.height : jpeg.width,
    height: swapped ? jpeg.width : jpeg.height,
    matrix: (x, y, width, height) => turned(jpeg.orientation, x, y, width, height),
    write(document) {
      return imageObject(document, jpeg.width, jpeg.height, jpeg.components === 1 ? 'DeviceGray' : 'DeviceRGB', 'DCTDecode', jpeg.stripped);
    },
  };
}

function imageObject(document: PackedDocument, width: number, height: number, space: string, filter: string, data: Uint8Array): Reference {
  const ref = document.ref({
    Type: 'XObject',
    Subtype: 'Image',
    Width: width,
    Height: height,
    ColorSpace: space,
    BitsPerComponent: 8,
    Filter: filter,
  });
  ref.end(data);
  return ref;
}

/** Channels and bits a channel of each colour type (PNG specification, third edition, table 11.1). */
const CHANNELS: Readonly<Record<number, number>> = { 0: 1, 2: 3, 3: 1, 4: 2, 6: 4 };
const DEPTHS: Readonly<Record<number, readonly number[]>> = { 0: [1, 2, 4, 8, 16], 2: [8, 16], 3: [1, 2, 4, 8], 4: [8, 16], 6: [8, 16] };

interface Png {
  readonly width: number;
  readonly height: number;
  readonly depth: number;
  readonly colour: number;
  readonly palette: Uint8Array;
  /** Opacity of palette entries, or the colour that is clear. */
  readonly clear: Uint8Array;
  readonly data: Uint8Array;
}

function readPng(bytes: Uint8Array): Png {
  if (bytes.length < 33) throw new ImageError('the PNG is broken');
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const [width, height, depth, colour, interlace] = [
    view.getUint32(16),
    view.getUint32(20),
    bytes[24] as number,
    bytes[25] as number,
    bytes[28],
  ];
  if (DEPTHS[colour]?.includes(depth) !== true || width === 0 || height === 0) throw new ImageError('the PNG is broken');
  if (interlace !== 0) throw new ImageError('the PNG is interlaced');
  const data: Uint8Array[] = [];
  let palette = new Uint8Array();
  let clear = new Uint8Array();
  for (let at = 8; at + 8 <= bytes.length; ) {
    const length = view.getUint32(at);
    const kind = String.fromCharCode(...bytes.subarray(at + 4, at + 8));
    if (kind === 'IDAT') data.push(bytes.subarray(at + 8, at + 8 + length));
    if (kind === 'PLTE') palette = bytes.slice(at + 8, at + 8 + length);
    if (kind === 'tRNS') clear = bytes.slice(at + 8, at + 8 + length);
    at += 12 + length;
  }
  return { width, height, depth, colour, palette, clear, data: concatenated(data) };
}

function pngImage(bytes: Uint8Array, name: string): PdfImage {
  const png = readPng(bytes);
  // Unpacked at once, so that a broken file is told by its name.
  const packed = deflateSync(pngPixels(png), { level: 6 });
  return {
    name,
    width: png.width,
    height: png.height,
    matrix: (x, y, w, h) => turned(1, x, y, w, h),
    write: (document) => imageObject(document, png.width, png.height, 'DeviceRGB', 'FlateDecode', packed),
  };
}

/** Red, green, blue of each pixel, transparency laid on white. */
function pngPixels(png: Png): Uint8Array {
  const { width, height, depth, colour } = png;
  const channels = CHANNELS[colour] as number;
  const stride = Math.ceil((width * channels * depth) / 8);
  const raw = inflated(png.data);
  if (raw.length < (stride + 1) * height) throw new ImageError('the PNG is cut short');
  const rows = unfiltered(raw, stride, height, Math.max(1, (channels * depth) / 8));
  const rgb = new Uint8Array(width * height * 3);
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) {
      const [red, green, blue, alpha] = pixelOf(png, sampleOf(rows, y * stride, x * channels, depth), colour, depth);
      const at = (y * width + x) * 3;
      rgb[at] = onWhite(red, alpha);
      rgb[at + 1] = onWhite(green, alpha);
      rgb[at + 2] = onWhite(blue, alpha);
    }
  }
  return rgb;
}

const onWhite = (value: number, alpha: number): number => (alpha === 255 ? value : Math.round((value * alpha + 255 * (255 - alpha)) / 255));

/** Sample number `channel` from the first of a pixel; of 16 bits the upper eight. */
function sampleOf(rows: Uint8Array, row: number, first: number, depth: number): (channel: number) => number {
  if (depth === 8) return (channel) => rows[row + first + channel] as number;
  if (depth === 16) return (channel) => rows[row + (first + channel) * 2] as number;
  return () => {
    const bit = first * depth;
    return ((rows[row + (bit >> 3)] as number) >> (8 - depth - (bit & 7))) & ((1 << depth) - 1);
  };
}

function pixelOf(
  { palette, clear }: Png,
  sample: (channel: number) => number,
  colour: number,
  depth: number,
): readonly [number, number, number, number] {
  const first = sample(0);
  if (colour === 3) return [palette[first * 3] ?? 0, palette[first * 3 + 1] ?? 0, palette[first * 3 + 2] ?? 0, clear[first] ?? 255];
  // tRNS holds 16 bits a channel; of those of 16 bits the upper eight are compared, as they are all that is kept.
  const key = (channel: number): number => clear[channel * 2 + (depth === 16 ? 0 : 1)] ?? -1;
  if (colour === 0 || colour === 4) {
    const grey = depth < 8 ? Math.round((first * 255) / ((1 << depth) - 1)) : first;
    return [grey, grey, grey, colour === 4 ? sample(1) : first === key(0) ? 0 : 255];
  }
  const [green, blue] = [sample(1), sample(2)];
  const isClear = colour === 2 && first === key(0) && green === key(1) && blue === key(2);
  return [first, green, blue, colour === 6 ? sample(3) : isClear ? 0 : 255];
}

function inflated(data: Uint8Array): Uint8Array {
  try {
    return inflateSync(data);
  } catch {
    throw new ImageError('the PNG is broken');
  }
}

function concatenated(parts: readonly Uint8Array[]): Uint8Array {
  const all = new Uint8Array(parts.reduce((sum, p) => sum + p.length, 0));
  let at = 0;
  for (const part of parts) {
    all.set(part, at);
    at += part.length;
  }
  return all;
}

/** Undoes the row filters of PNG. */
function unfiltered(raw: Uint8Array, stride: number, height: number, step: number): Uint8Array {
  const out = new Uint8Array(stride * height);
  for (let row = 0; row < height; row += 1) {
    const filter = raw[row * (stride + 1)];
    for (let i = 0; i < stride; i += 1) {
      const at = row * stride + i;
      const left = i >= step ? (out[at - step] as number) : 0;
      const up = row > 0 ? (out[at - stride] as number) : 0;
      const corner = i >= step && row > 0 ? (out[at - stride - step] as number) : 0;
      const add = filter === 1 ? left : filter === 2 ? up : filter === 3 ? (left + up) >> 1 : filter === 4 ? paeth(left, up, corner) : 0;
      out[at] = (raw[row * (stride + 1) + 1 + i] as number) + add;
    }
  }
  return out;
}

function paeth(a: number, b: number, c: number): number {
  const [pa, pb, pc] = [Math.abs(b - c), Math.abs(a - c), Math.abs(a + b - 2 * c)];
  return pa <= pb && pa <= pc ? a : pb <= pc ? b : c;
}
