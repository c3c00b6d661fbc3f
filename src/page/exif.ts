/** Orientation tag (0x0112) of a JPEG's application segment, 1 to 8; null where it is no Exif block or has none. */
export function exifOrientation(segment: Uint8Array): number | null {
  if (segment.length < 18 || String.fromCharCode(...segment.subarray(4, 8)) !== 'Exif') return null;
  const view = new DataView(segment.buffer, segment.byteOffset + 10, segment.length - 10);
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
