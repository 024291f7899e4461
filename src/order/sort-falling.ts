/** Values in one bucket beyond which sorting by comparison is the faster. */
const CROWDED = 32;

/**
 * A sorter of positions by their values, largest first, equal values by position: for the same number of values again
 * and again. Values are thrown into as many buckets as there are two times, which leaves little to compare; where they crowd in
 * few of them it sorts by comparison.
 *
 * @param n number of values
 * @returns fills one list, which is used again, with the positions of the values it is given
 * @example
 * [...fallingSorter(3)([0.2, 0.9, 0.5])] // => [1, 2, 0]
 */
export function fallingSorter(n: number): (values: ArrayLike<number>) => Uint32Array {
  const order = new Uint32Array(n);
  const buckets = 2 * n;
  const bucket = new Uint32Array(n);
  const start = new Uint32Array(buckets + 1);
  return (values) => {
    let least = Number.POSITIVE_INFINITY;
    let most = Number.NEGATIVE_INFINITY;
    for (let i = 0; i < n; i++) {
      if (values[i] < least) least = values[i];
      if (values[i] > most) most = values[i];
    }
    const scale = most > least ? (buckets - 1) / (most - least) : 0;
    start.fill(0);
    for (let i = 0; i < n; i++) {
      bucket[i] = (most - values[i]) * scale;
      start[bucket[i] + 1]++;
    }
    let fullest = 0;
    for (let b = 0; b < buckets; b++) {
      if (start[b + 1] > fullest) fullest = start[b + 1];
      start[b + 1] += start[b];
    }
    for (let i = 0; i < n; i++) order[start[bucket[i]]++] = i;
    if (fullest > CROWDED) return order.sort((a, b) => values[b] - values[a] || a - b);
    // only neighbours of one bucket can still stand the wrong way round
    for (let at = 1; at < n; at++) {
      const own = order[at];
      let to = at;
      while (to > 0 && values[order[to - 1]] < values[own]) {
        order[to] = order[to - 1];
        to--;
      }
      order[to] = own;
    }
    return order;
  };
}
