/**
 * Photos and logos. In: JPEG or PNG bytes. Out: an image XObject. JPEG data go in as they are, without their metadata (a
 * photo knows where it was taken) and turned upright; PNG pixels are packed anew. Never: an image that is decoded in part.
 */
import { deflateSync, inflateSync } from 'node:zlib';
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
  throw new ImageError('neither JPEG nor PNG');
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
    if (bytes[at] !== 0xff) throw new ImageError('broken JPEG');
    const marker = bytes[at + 1] as number;
    const length = word(bytes, at + 2);
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
  if (frame === null) throw new ImageError('JPEG without a frame');
  const stripped = new Uint8Array(kept.reduce((sum, k) => sum + k.length, 0));
  let to = 0;
  for (const part of kept) {
    stripped.set(part, to);
    to += part.length;
  }
  return { ...frame, orientation, stripped };
}

/** Orientation tag (0x0112) of an Exif segment, 1 to 8. */
function exifOrientation(segment: Uint8Array): number | null {
  if (String.fromCharCode(...segment.subarray(4, 8)) !== 'Exif') return null;
  const view = new DataView(segment.buffer, segment.byteOffset + 10, segment.length - 10);
  if (view.byteLength < 8) return null;
  const little = view.getUint16(0) === 0x4949;
  const start = view.getUint32(4, little);
  if (start + 2 > view.byteLength) return null;
  const count = view.getUint16(start, little);
  for (let i = 0; i < count; i += 1) {
    const entry = start + 2 + i * 12;
    if (entry + 12 > view.byteLength) return null;
    if (view.getUint16(entry, little) === 0x0112) {
      const value = view.getUint16(entry + 8, little);
      return value >= 1 && value <= 8 ? value : null;
    }
  }
  return null;
}

/** Image space (unit square, y up) to an upright box (y down) for each Exif orientation. */
function turned(orientation: number, x: number, y: number, w: number, h: number): string {
  const matrices: Readonly<Record<number, readonly number[]>> = {
    1: [w, 0, 0, -h, x, y + h],
    2: [-w, 0, 0, -h, x + w, y + h],
    3: [-w, 0, 0, h, x + w, y],
    4: [w, 0, 0, h, x, y],
    5: [0, h, w, 0, x, y],
    6: [0, h, -w, 0, x + w, y],
    7: [0, -h, -w, 0, x + w, y + h],
    8: [0, -h, w, 0, x, y + h],
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
      const space = jpeg.components === 1 ? 'DeviceGray' : jpeg.components === 4 ? 'DeviceCMYK' : 'DeviceRGB';
      if (space === 'DeviceCMYK') throw new ImageError('a JPEG in four colours');
      return imageObject(document, jpeg.width, jpeg.height, space, 'DCTDecode', jpeg.stripped);
    },
  };
}

function imageObject(document: PackedDocument, width: number, height: number, space: string, filter: string, data: Uint8Array): Reference {
  const ref = document.ref({ Type: 'XObject', Subtype: 'Image', Width: width, Height: height, ColorSpace: space, BitsPerComponent: 8, Filter: filter });
  ref.end(data);
  return ref;
}

const CHANNELS: Readonly<Record<number, number>> = { 0: 1, 2: 3, 3: 1, 4: 2, 6: 4 };

function pngImage(bytes: Uint8Array, name: string): PdfImage {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const [width, height, depth, colour, interlace] = [view.getUint32(16), view.getUint32(20), bytes[24], bytes[25] as number, bytes[28]];
  if (depth !== 8 || interlace !== 0 || CHANNELS[colour] === undefined) throw new ImageError('a PNG that is not of 8 bits a channel, or interlaced');
  return {
    name,
    width,
    height,
    matrix: (x, y, w, h) => turned(1, x, y, w, h),
    write: (document) => imageObject(document, width, height, 'DeviceRGB', 'FlateDecode', deflateSync(pngPixels(bytes, view, width, height, colour))),
  };
}

/** Red, green, blue of each pixel, transparency laid on white. */
function pngPixels(bytes: Uint8Array, view: DataView, width: number, height: number, colour: number): Uint8Array {
  const data: Uint8Array[] = [];
  let palette = new Uint8Array();
  for (let at = 8; at + 8 <= bytes.length; ) {
    const length = view.getUint32(at);
    const kind = String.fromCharCode(...bytes.subarray(at + 4, at + 8));
    if (kind === 'IDAT') data.push(bytes.subarray(at + 8, at + 8 + length));
    if (kind === 'PLTE') palette = bytes.slice(at + 8, at + 8 + length);
    at += 12 + length;
  }
  const packed = new Uint8Array(data.reduce((sum, d) => sum + d.length, 0));
  let to = 0;
  for (const part of data) {
    packed.set(part, to);
    to += part.length;
  }
  const channels = CHANNELS[colour] as number;
  const rows = unfiltered(inflateSync(packed), width * channels, height, channels);
  const rgb = new Uint8Array(width * height * 3);
  for (let i = 0; i < width * height; i += 1) {
    const at = i * channels;
    const alpha = colour === 4 ? (rows[at + 1] as number) : colour === 6 ? (rows[at + 3] as number) : 255;
    for (let c = 0; c < 3; c += 1) {
      const value = colour === 3 ? (palette[(rows[at] as number) * 3 + c] ?? 0) : (rows[at + (channels >= 3 ? c : 0)] as number);
      rgb[i * 3 + c] = Math.round((value * alpha + 255 * (255 - alpha)) / 255);
    }
  }
  return rgb;
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
