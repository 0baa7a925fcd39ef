/** The number of letters to insert, drop, replace or exchange with a neighbour that lead from a to b; stops above `most`. */
function distance(a: string, b: string, most: number): number {
  if (Math.abs(a.length - b.length) > most) return most + 1;
  let before: number[] = [];
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1];
      let best = Math.min(row[j]! + 1, next[j - 1]! + 1, row[j - 1]! + (same ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) best = Math.min(best, before[j - 2]! + 1);
      next.push(best);
    }
    before = row;
    row = next;
  }
  return row[b.length]!;
}

/** The known word nearest to a mistyped one (one slip, two in words of six letters or more), or null. O(words × length²). */
export function nearest(word: string, known: Iterable<string>): string | null {
  const most = word.length >= 6 ? 2 : 1;
  if (word.length < 3 || word.length > 20) return null;
  let best: string | null = null;
  let least = most + 1;
  for (const candidate of known) {
    const d = distance(word, candidate, most);
    if (d < least) [best, least] = [candidate, d];
  }
  return best;
}
