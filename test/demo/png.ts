import { zlibSync } from 'fflate';

function crc(bytes: Uint8Array): number {
  let c = 0xffffffff;
  for (const byte of bytes) {
    c ^= byte;
    for (let k = 0; k < 8; k += 1) c = c & 1 ? (c >>> 1) ^ 0xedb88320 : c >>> 1;
  }
  return (c ^ 0xffffffff) >>> 0;
}

function chunk(kind: string, data: Uint8Array): Uint8Array {
  const bytes = new Uint8Array(12 + data.length);
  const view = new DataView(bytes.buffer);
  view.setUint32(0, data.length);
  for (let i = 0; i < 4; i += 1) bytes[4 + i] = kind.charCodeAt(i);
  bytes.set(data, 8);
  view.setUint32(8 + data.length, crc(bytes.subarray(4, 8 + data.length)));
  return bytes;
}

/** A drawn picture of 8 bits a channel; `at` gives the grey of a pixel, 0 to 255. */
export function greyPng(width: number, height: number, at: (x: number, y: number) => number): Uint8Array {
  const rows = new Uint8Array((width + 1) * height);
  for (let y = 0; y < height; y += 1) for (let x = 0; x < width; x += 1) rows[y * (width + 1) + 1 + x] = at(x, y);
  const head = new Uint8Array(13);
  const view = new DataView(head.buffer);
  view.setUint32(0, width);
  view.setUint32(4, height);
  head[8] = 8;
  const parts = [
    new Uint8Array([137, 80, 78, 71, 13, 10, 26, 10]),
    chunk('IHDR', head),
    chunk('IDAT', zlibSync(rows, { level: 9 })),
    chunk('IEND', new Uint8Array()),
  ];
  const all = new Uint8Array(parts.reduce((sum, p) => sum + p.length, 0));
  let to = 0;
  for (const part of parts) {
    all.set(part, to);
    to += part.length;
  }
  return all;
}

/** Two hubs of a coupling seen from the side, one a little lower than the other: drawn, not of any real plant. */
export const couplingPicture = (): Uint8Array =>
  greyPng(240, 150, (x, y) => {
    const shaft = Math.abs(y - (x < 120 ? 75 : 80)) < 12;
    const hub = Math.abs(y - (x < 120 ? 75 : 80)) < 42 && Math.abs(x - (x < 120 ? 98 : 142)) < 17;
    return hub ? 120 : shaft ? 165 : 236 - Math.floor(y / 12);
  });

/** A fan wheel with deposits on a few of its blades. */
export const wheelPicture = (): Uint8Array =>
  greyPng(200, 200, (x, y) => {
    const [dx, dy] = [x - 100, y - 100];
    const r = Math.hypot(dx, dy);
    const sector = Math.floor(((Math.atan2(dy, dx) + Math.PI) / (2 * Math.PI)) * 12);
    if (r > 92 || r < 18) return r < 18 ? 90 : 238;
    return sector % 2 === 0 ? (sector < 4 && r > 60 ? 60 : 140) : 205;
  });
