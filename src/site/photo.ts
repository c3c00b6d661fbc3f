/**
 * Photos for the site. In: JPEG or PNG bytes. Out: the same picture without what it tells about where and when: the Exif
 * block is replaced by one that holds the orientation alone, text chunks are left out. No pixel is encoded anew.
 */
import { exifOrientation } from '../page/exif.ts';

const word = (bytes: Uint8Array, at: number): number => ((bytes[at] ?? 0) << 8) | (bytes[at + 1] ?? 0);

export function withoutMetadata(bytes: Uint8Array): Uint8Array {
  if (bytes[0] === 0xff && bytes[1] === 0xd8) return cleanJpeg(bytes);
  return bytes[0] === 0x89 && bytes[1] === 0x50 ? cleanPng(bytes) : bytes;
}

function cleanJpeg(bytes: Uint8Array): Uint8Array {
  const kept: Uint8Array[] = [bytes.subarray(0, 2)];
  let at = 2;
  while (at + 4 <= bytes.length && bytes[at] === 0xff) {
    const marker = bytes[at + 1] as number;
    const end = at + 2 + word(bytes, at + 2);
    if (marker === 0xda) break;
    const segment = bytes.subarray(at, end);
    const orientation = marker === 0xe1 ? exifOrientation(segment) : null;
    if (orientation !== null && orientation !== 1) kept.push(orientationSegment(orientation));
    const isMetadata = (marker >= 0xe1 && marker <= 0xef && marker !== 0xee) || marker === 0xfe;
    if (!isMetadata) kept.push(segment);
    at = end;
  }
  return Buffer.concat([...kept, bytes.subarray(at)]);
}

/** A big-endian Exif segment with one entry. */
function orientationSegment(orientation: number): Uint8Array {
  const tiff = [0x4d, 0x4d, 0, 42, 0, 0, 0, 8, 0, 1, 0x01, 0x12, 0, 3, 0, 0, 0, 1, 0, orientation, 0, 0, 0, 0, 0, 0];
  const body = [0x45, 0x78, 0x69, 0x66, 0, 0, ...tiff];
  return new Uint8Array([0xff, 0xe1, 0, body.length + 2, ...body]);
}

const KEPT_CHUNKS: ReadonlySet<string> = new Set(['IHDR', 'PLTE', 'tRNS', 'IDAT', 'IEND', 'gAMA', 'sRGB', 'cHRM', 'pHYs']);

function cleanPng(bytes: Uint8Array): Uint8Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
  const kept: Uint8Array[] = [bytes.subarray(0, 8)];
  for (let at = 8; at + 12 <= bytes.length; ) {
    const end = at + 12 + view.getUint32(at);
    if (KEPT_CHUNKS.has(String.fromCharCode(...bytes.subarray(at + 4, at + 8)))) kept.push(bytes.subarray(at, end));
    at = end;
  }
  return Buffer.concat(kept);
}
