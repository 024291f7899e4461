/**
 * Number of letters to insert, leave out, change or swap with a neighbour to turn one word into the other
 * (optimal string alignment, after Damerau 1964, doi:10.1145/363958.363994); stops at `limit` + 1.
 *
 * @example
 * editDistance('Macoma', 'Macmoa', 3) // => 1
 * @example
 * editDistance('Mya', 'Arctica', 2) // => 3
 */
export function editDistance(a: string, b: string, limit: number): number {
  if (a === b) return 0;
  if (Math.abs(a.length - b.length) > limit) return limit + 1;
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    let least = i;
    for (let j = 1; j <= b.length; j += 1) {
      const change = a[i - 1] === b[j - 1] ? 0 : 1;
      let cost = Math.min(last[j] + 1, row[j - 1] + 1, last[j - 1] + change);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) cost = Math.min(cost, before[j - 2] + 1);
      row.push(cost);
      if (cost < least) least = cost;
    }
    if (least > limit) return limit + 1;
    before = last;
    last = row;
  }
  return Math.min(last[b.length], limit + 1);
}

/** The name nearest to `wrong`, at most two letters (one in a short word) away; null when none is. */
export function nearestName(wrong: string, names: Iterable<string>): string | null {
  const limit = wrong.length < 5 ? 1 : 2;
  let best: string | null = null;
  let bestDistance = limit + 1;
  for (const name of names) {
    const distance = editDistance(wrong.toLowerCase(), name.toLowerCase(), limit);
    if (distance < bestDistance) {
      best = name;
      bestDistance = distance;
    }
  }
  return best;
}
