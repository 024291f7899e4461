/**
 * How many choices of `size` of the numbers have each sum: entry t counts those whose sum lies t above the smallest
 * possible one. Shift algorithm of Streitberg and Röhmel (1986, Statistical Software Newsletter 12, 10–17). Counts above
 * 2⁵³ are rounded, to about 1e-14 relative.
 *
 * @param sorted whole numbers in increasing order
 * @param size how many to choose, 0 to all
 * @param most entries above this are not wanted, and not worked out. Default: all are
 * @example
 * ```ts
 * [...waysToDeal([1, 2, 3, 4], 2)]; // => [1, 1, 2, 1, 1]
 * ```
 */
export function waysToDeal(sorted: readonly number[], size: number, most = Number.POSITIVE_INFINITY): Float64Array {
  const n = sorted.length;
  const widths: number[] = [0];
  for (let j = 1; j <= size; j++) widths.push(widths[j - 1] + sorted[n - j] - sorted[j - 1]);
  // sums only grow as values are added, so what lies above stays above
  const ways = widths.map((width) => new Float64Array(Math.min(width, most) + 1));
  ways[0][0] = 1;
  // Largest sum above the smallest reached so far, for each number of values chosen.
  const reached = new Array<number>(size + 1).fill(-1);
  reached[0] = 0;
  for (let k = 0; k < n; k++) {
    for (let j = Math.min(size, k + 1); j >= 1; j--) {
      if (reached[j - 1] < 0) continue;
      const shift = sorted[k] - sorted[j - 1];
      const from = ways[j - 1];
      const to = ways[j];
      const top = Math.min(reached[j - 1], to.length - 1 - shift);
      for (let t = 0; t <= top; t++) to[t + shift] += from[t];
      reached[j] = Math.max(reached[j], top + shift);
    }
  }
  return ways[size];
}
