const isDigit = (code: number): boolean => code >= 48 && code <= 57;

/**
 * Natural order of ids: runs of digits compare as numbers, all else by code unit; equal numbers with more zeros stand
 * later, so the order is total.
 */
export function naturalOrder(a: string, b: string): number {
  let i = 0;
  let j = 0;
  while (i < a.length && j < b.length) {
    const [x, y] = [a.charCodeAt(i), b.charCodeAt(j)];
    if (isDigit(x) && isDigit(y)) {
      const [m, n] = [runAt(a, i), runAt(b, j)];
      const [p, q] = [m.replace(/^0+(?=\d)/, ''), n.replace(/^0+(?=\d)/, '')];
      if (p.length !== q.length) return p.length - q.length;
      if (p !== q) return p < q ? -1 : 1;
      i += m.length;
      j += n.length;
    } else if (x !== y) return x - y;
    else {
      i += 1;
      j += 1;
    }
  }
  return a.length - i - (b.length - j) || a.length - b.length || (a < b ? -1 : a > b ? 1 : 0);
}

function runAt(text: string, from: number): string {
  let end = from;
  while (end < text.length && isDigit(text.charCodeAt(end))) end += 1;
  return text.slice(from, end);
}
