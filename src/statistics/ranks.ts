import type { Numbers } from './check.js';
import { requireNumbers } from './check.js';

/**
 * Ranks from 1, tied values sharing the mean of their ranks.
 *
 * @throws RangeError when a value is not finite
 * @example
 * ```ts
 * midranks([3, 1, 3]); // => [2.5, 1, 2.5]
 * ```
 */
export function midranks(values: Numbers): number[] {
  requireNumbers('midranks', 'values', values, 0);
  // numbers sort many times as fast as positions by their numbers; each value then looks up its own place
  const sorted = Float64Array.from(values).sort();
  const shared = new Float64Array(sorted.length);
  for (let from = 0; from < sorted.length; ) {
    let to = from + 1;
    while (to < sorted.length && sorted[to] === sorted[from]) to++;
    shared.fill((from + to + 1) / 2, from, to);
    from = to;
  }
  return Array.from(values, (value) => shared[placeOf(value, sorted)]);
}

/**
 * A place at which a value stands in a rising list that holds it: the last of equal ones.
 *
 * @example
 * ```ts
 * placeOf(3, [1, 3, 3, 4]); // => 2
 * ```
 */
export function placeOf(value: number, sorted: Numbers): number {
  let low = 0;
  let high = sorted.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (sorted[middle] <= value) low = middle;
    else high = middle - 1;
  }
  return low;
}

/**
 * Sizes of the groups of tied values, groups of one left out.
 *
 * @throws RangeError when a value is not finite
 * @example
 * ```ts
 * tieSizes([3, 1, 3]); // => [2]
 * ```
 */
export function tieSizes(values: Numbers): number[] {
  requireNumbers('tieSizes', 'values', values, 0);
  const sorted = Float64Array.from(values).sort();
  const sizes: number[] = [];
  for (let from = 0; from < sorted.length; ) {
    let to = from + 1;
    while (to < sorted.length && sorted[to] === sorted[from]) to++;
    if (to - from > 1) sizes.push(to - from);
    from = to;
  }
  return sizes;
}
