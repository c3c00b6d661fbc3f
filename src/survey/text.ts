import type { Problems } from './problems.ts';

export const ENCODINGS = ['utf-8', 'utf-16le', 'utf-16be', 'windows-1252'] as const;
export type Encoding = (typeof ENCODINGS)[number];

/**
 * Text of a file without its byte order mark; null with a problem when it is none. UTF-16 is told by its mark or by the zero in
 * each pair of its first letters; a code page of eight bits must be stated, since every byte reads in each of them.
 */
export function textOf(file: string, bytes: Uint8Array, problems: Problems, stated: Encoding | null = null): string | null {
  const encoding = stated ?? utf16(bytes) ?? 'utf-8';
  try {
    const text = new TextDecoder(encoding, { fatal: true }).decode(bytes);
    // The five unused places of Windows-1252 decode to control characters: no file in that encoding has them.
    if (encoding !== 'windows-1252' || !/[\u0080-\u009f]/.test(text)) return text;
  } catch {
    if (encoding === 'utf-8' && stated === null) {
      tellNotUtf8(file, bytes, problems);
      return null;
    }
  }
  problems.error(
    'wrong-encoding',
    { file, line: null },
    `The file is not ${encoding} text.`,
    'State its encoding in the import section of plant.yaml, or save it as UTF-8.',
  );
  return null;
}

function tellNotUtf8(file: string, bytes: Uint8Array, problems: Problems): void {
  const line = lineOfBadByte(bytes);
  const reading = new TextDecoder('windows-1252').decode(bytes).split('\n')[line - 1] ?? '';
  problems.error(
    'not-utf-8',
    { file, line },
    'The file is not UTF-8 text.',
    `In Windows-1252 this line reads: ${reading.trim().slice(0, 80)}. If that is right, state encoding: windows-1252 for the file in the import section of plant.yaml; else save it as UTF-8.`,
  );
}

function utf16(bytes: Uint8Array): Encoding | null {
  const [a, b, c, d] = bytes;
  if (a === 0xff && b === 0xfe) return 'utf-16le';
  if (a === 0xfe && b === 0xff) return 'utf-16be';
  if (bytes.length < 4 || bytes.length % 2 !== 0) return null;
  if (a !== 0 && b === 0 && c !== 0 && d === 0) return 'utf-16le';
  return a === 0 && b !== 0 && c === 0 && d !== 0 ? 'utf-16be' : null;
}

/** Line of the first byte that is no UTF-8. */
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
