/**
 * The decimal sign of a column. In: all cells of a column. Out: dot or comma where one reading is possible, else both readings.
 * Never: a guess from one cell where another says otherwise.
 */
const BY_COMMA = /^[1-9]\d{0,2}(?:,\d{3})+$/;
const BY_DOT = /^[1-9]\d{0,2}(?:\.\d{3})+$/;
const BY_SPACE = /^[1-9]\d{0,2}(?:[ '\u00a0\u202f\u2019]\d{3})+(?:[.,]\d+)?$/;

export type DecimalSign = 'dot' | 'comma';

/** `either`: every cell reads both ways; `mixed`: cells contradict each other; with the row that shows it. */
export type ColumnSign =
  | { readonly sign: DecimalSign }
  | { readonly doubt: 'either' | 'mixed'; readonly row: number; readonly text: string };

/** Digits and signs of a cell: no bound, sign or blank around. */
const bare = (text: string): string => text.trim().replace(/^[<>≤≥]?\s*[+-]?\s*/, '');

/** What one cell says: its sign, `either`, or null for nothing. `foreign`: the file is not in the plain form, so a lone dot may part thousands. */
function says(text: string, foreign: boolean): DecimalSign | 'either' | null {
  const [comma, dot] = [text.indexOf(','), text.indexOf('.')];
  if (comma < 0 && dot < 0) return null;
  if (!/^[\d.,\s'\u00a0\u202f\u2019]+$/.test(text)) return null;
  if (comma >= 0 && dot >= 0) return text.lastIndexOf(',') > text.lastIndexOf('.') ? 'comma' : 'dot';
  if (comma >= 0) return BY_COMMA.test(text) ? (text.lastIndexOf(',') === comma ? 'either' : 'dot') : 'comma';
  if (!BY_DOT.test(text)) return 'dot';
  if (text.lastIndexOf('.') !== dot) return 'comma';
  return foreign ? 'either' : null;
}

export function columnSign(cells: Iterable<string>, foreign: boolean): ColumnSign {
  let found: DecimalSign | null = null;
  let either: { row: number; text: string } | null = null;
  let row = 0;
  for (const cell of cells) {
    const text = bare(cell);
    const said = says(text, foreign);
    if (said === 'either') either ??= { row, text };
    else if (said !== null) {
      if (found !== null && found !== said) return { doubt: 'mixed', row, text };
      found = said;
    }
    row += 1;
  }
  if (found !== null) return { sign: found };
  return either === null ? { sign: 'dot' } : { doubt: 'either', ...either };
}

/** A number as it is written in the plain form: thousands signs gone, a dot as decimal sign. What is not well formed stays, and is refused later. */
export function plainForm(text: string, sign: DecimalSign): string {
  const head = text.length - bare(text).length;
  let digits = text.slice(head);
  const spaced = BY_SPACE.test(digits);
  if (spaced) digits = digits.replace(/[ '\u00a0\u202f\u2019]/g, '');
  const [decimal, thousands] = sign === 'comma' ? [',', '.'] : ['.', ','];
  const at = digits.indexOf(decimal);
  const whole = at < 0 ? digits : digits.slice(0, at);
  const grouped = (thousands === '.' ? BY_DOT : BY_COMMA).test(whole);
  const plain = grouped ? whole.replaceAll(thousands, '') : whole;
  if (sign === 'comma' && !grouped && whole.includes('.')) return text;
  return `${text.slice(0, head).replaceAll(' ', '')}${plain}${at < 0 ? '' : `.${digits.slice(at + 1)}`}`;
}

/** Both readings of a cell that reads two ways, for a message. */
export function bothReadings(text: string): string {
  const joined = text.replace(/[.,]/g, '');
  const decimal = text.replace(',', '.');
  const sign = text.includes(',') ? 'comma' : 'dot';
  return `"${text}" is ${decimal} where the ${sign} is the decimal sign, and ${joined} where it parts thousands`;
}
