/** Edits (insert, delete, replace, exchange of neighbours) from one word to another. */
function distance(a: string, b: string): number {
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const now = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const same = a[i - 1] === b[j - 1];
      let best = Math.min((last[j] as number) + 1, (now[j - 1] as number) + 1, (last[j - 1] as number) + (same ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) best = Math.min(best, (before[j - 2] as number) + 1);
      now.push(best);
    }
    before = last;
    last = now;
  }
  return last[b.length] as number;
}

/** The word of a list nearest to what was typed, for hints: at most a third of its letters wrong (at least one); null when none is. */
export function nearestWord(text: string, words: readonly string[]): string | null {
  const typed = text.trim().toLowerCase();
  let found: string | null = null;
  let least = Math.max(1, Math.floor(typed.length / 3)) + 1;
  for (const word of words) {
    if (Math.abs(word.length - typed.length) >= least) continue;
    const edits = distance(typed, word.toLowerCase());
    if (edits < least) {
      found = word;
      least = edits;
    }
  }
  return found;
}
