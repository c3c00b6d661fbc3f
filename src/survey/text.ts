import type { Problems } from './problems.ts';

/** Text of a UTF-8 file without its byte order mark; null with a problem when it is not UTF-8. */
export function textOf(file: string, bytes: Uint8Array, problems: Problems): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    problems.error('not-utf-8', { file, line: lineOfBadByte(bytes) }, 'The file is not UTF-8 text.', 'Save it as UTF-8, or state its encoding in the import section of plant.yaml.');
    return null;
  }
}

/** Line of the first byte that is no UTF-8, by halving. */
function lineOfBadByte(bytes: Uint8Array): number {
  let line = 1;
  const decoder = new TextDecoder('utf-8', { fatal: true });
  let start = 0;
  for (let i = 0; i <= bytes.length; i += 1) {
    if (i !== bytes.length && bytes[i] !== 10) continue;
    try {
      decoder.decode(bytes.subarray(start, i));
    } catch {
      return line;
    }
    start = i + 1;
    line += 1;
  }
  return line;
}

const isAscii = (text: string): boolean => {
  for (let i = 0; i < text.length; i += 1) if (text.charCodeAt(i) > 127) return false;
  return true;
};

/** A cell as an id or text: trimmed, in Unicode NFC; null when blank. */
export function cellText(cell: string | undefined): string | null {
  if (cell === undefined) return null;
  const trimmed = cell.trim();
  if (trimmed === '') return null;
  return isAscii(trimmed) ? trimmed : trimmed.normalize('NFC');
}
