/** The name probably meant by a mistyped one: at most two slips and fewer than half its letters; null when none is near. */
export function nearest(text: string, names: Iterable<string>): string | null {
  const wanted = text.trim().toLowerCase();
  let best: string | null = null;
  let least = Math.min(3, Math.ceil(wanted.length / 2) + 1);
  for (const name of names) {
    const slips = editDistance(wanted, name.toLowerCase());
    if (slips < least) {
      least = slips;
      best = name;
    }
  }
  return best;
}

/** Smallest number of letters to insert, delete or replace between two words (Levenshtein 1966). */
export function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++)
      next.push(Math.min(row[j]! + 1, next[j - 1]! + 1, row[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1)));
    row = next;
  }
  return row[b.length]!;
}
