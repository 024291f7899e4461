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
  const order = Uint32Array.from({ length: values.length }, (_, i) => i).sort((i, j) => values[i] - values[j]);
  const ranks = new Array<number>(values.length);
  for (let from = 0; from < order.length; ) {
    let to = from + 1;
    while (to < order.length && values[order[to]] === values[order[from]]) to++;
    for (let i = from; i < to; i++) ranks[order[i]] = (from + to + 1) / 2;
    from = to;
  }
  return ranks;
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
