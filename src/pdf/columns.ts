/** Column widths. In: what each column needs at least and would like, the width of the table. Out: widths that fill it. */
export type Kind = 'text' | 'number' | 'mark' | 'chart';

export interface Need {
  readonly kind: Kind;
  /** Widest word, and widest line, points without padding. */
  least: number;
  natural: number;
}

/** A column of one very long word may be broken in it: it asks for no more than this share of the table. */
const LONGEST_WORD = 0.28;
/** Marks and numbers stay on one line up to this width, points. */
const UNBROKEN = 70;
/** A text column in a crowded table keeps room for a few letters, points. */
const NARROWEST = 30;

export function columnWidths(needs: readonly Need[], available: number, padding: number): number[] {
  const natural = needs.map((n) => n.natural + padding);
  const total = natural.reduce((a, b) => a + b, 0);
  if (total <= available) return withRest(needs, natural, available - total);
  const least = needs.map(
    (n) => (n.kind === 'text' ? Math.min(n.least, available * LONGEST_WORD) : Math.max(n.least, Math.min(n.natural, UNBROKEN))) + padding,
  );
  const sum = least.reduce((a, b) => a + b, 0);
  if (sum >= available) return shrunk(needs, least, sum - available);
  return shared(natural, least, available - sum);
}

/** Text columns give way first, the widest before the others, down to a few letters; then all. */
function shrunk(needs: readonly Need[], least: readonly number[], excess: number): number[] {
  const levelled = (most: number): number[] =>
    least.map((w, i) => (needs[i]?.kind === 'text' ? Math.min(w, Math.max(most, NARROWEST)) : w));
  const saved = (most: number): number => least.reduce((sum, w, i) => sum + w - (levelled(most)[i] as number), 0);
  let [low, high] = [NARROWEST, Math.max(...least)];
  for (let round = 0; round < 40; round += 1) {
    const middle = (low + high) / 2;
    if (saved(middle) >= excess) low = middle;
    else high = middle;
  }
  const widths = levelled(low);
  const left = excess - saved(low);
  if (left <= 0.001) return widths;
  const sum = widths.reduce((a, b) => a + b, 0);
  return widths.map((w) => (w * (sum - left)) / sum);
}

/** Room that is left goes to the text columns, by their share; a table without text stays as narrow as it is. */
function withRest(needs: readonly Need[], natural: readonly number[], rest: number): number[] {
  const texts = needs.reduce((sum, n, i) => sum + (n.kind === 'text' ? (natural[i] as number) : 0), 0);
  return natural.map((w, i) => (texts > 0 && needs[i]?.kind === 'text' ? w + (rest * w) / texts : w));
}

/** Every column gets its least; what is left is shared by how much more each would like. */
function shared(natural: readonly number[], least: readonly number[], rest: number): number[] {
  const widths = [...least];
  let left = rest;
  for (let round = 0; round < 8 && left > 0.01; round += 1) {
    const wants = natural.map((w, i) => Math.max(0, w - (widths[i] as number)));
    const sum = wants.reduce((a, b) => a + b, 0);
    if (sum === 0) break;
    let given = 0;
    wants.forEach((want, i) => {
      const more = Math.min((left * want) / sum, Math.max(0, (natural[i] as number) - (widths[i] as number)));
      widths[i] = (widths[i] as number) + more;
      given += more;
    });
    left -= given;
  }
  return widths;
}
