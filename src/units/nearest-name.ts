/**
 * The name a person most likely meant, or null when none is near: at most a third of the letters wrong, counting
 * a swap of neighbours as one (optimal string alignment distance; Damerau 1964). Case does not count.
 */
export function nearestName(written: string, names: Iterable<string>): string | null {
  const wanted = written.slice(0, LONGEST).toLowerCase();
  let best: string | null = null;
  let bestDistance = Math.max(1, Math.floor(wanted.length / 3)) + 1;
  for (const name of names) {
    if (name === written || Math.abs(name.length - wanted.length) >= bestDistance) continue;
    const distance = editDistance(wanted, name.toLowerCase());
    // One wrong letter out of one is no likeness.
    if (distance < bestDistance && distance < Math.max(name.length, wanted.length)) {
      best = name;
      bestDistance = distance;
    }
  }
  return best;
}

const LONGEST = 80;

/** Fewest insertions, deletions, substitutions and swaps of neighbours that turn `a` into `b`. */
export function editDistance(a: string, b: string): number {
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const substitution = last[j - 1] + (a[i - 1] === b[j - 1] ? 0 : 1);
      row[j] = Math.min(last[j] + 1, row[j - 1] + 1, substitution);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        row[j] = Math.min(row[j], beforeLast[j - 2] + 1);
    }
    beforeLast = last;
    last = row;
  }
  return last[b.length];
}
