/**
 * The first rows of an order, without sorting all of them: equal ones as they came, like a stable sort has them.
 * @param most how many at most, 1 or more
 * @example
 * ```ts
 * foremost([3, 1, 2, 1], 3, (a, b) => a - b) // => [1, 1, 2]
 * ```
 */
export function foremost<Row>(rows: readonly Row[], most: number, compare: (a: Row, b: Row) => number): Row[] {
  let kept: Row[] = [];
  let full = false;
  for (const row of rows) {
    // what is no better than the last of the best so far can't be among them
    if (full && compare(kept[most - 1], row) <= 0) continue;
    kept.push(row);
    if (kept.length < 2 * most) continue;
    kept = kept.sort(compare).slice(0, most);
    full = true;
  }
  return kept.sort(compare).slice(0, most);
}
