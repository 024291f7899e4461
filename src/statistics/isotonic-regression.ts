import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';

/**
 * The non-decreasing list nearest to the values by weighted least squares, by pooling adjacent violators (Ayer and others
 * 1955, 10.1214/aoms/1177728423; Barlow and others 1972). None gives none.
 *
 * @param weights one a value, above 0; all 1 when absent
 * @throws RangeError when a value is not finite, a weight is not above 0, or the lists differ in length
 * @example
 * ```ts
 * isotonicRegression([1, 0, 4, 3]); // => [0.5, 0.5, 3.5, 3.5]
 * ```
 */
export function isotonicRegression(values: Numbers, weights?: Numbers): number[] {
  requireNumbers('isotonicRegression', 'values', values, 0);
  const n = values.length;
  if (weights) {
    requireThat(weights.length === n, 'isotonicRegression', `${n} weights, one a value`, weights.length);
    requireNumbers('isotonicRegression', 'weights', weights, 0);
    for (let i = 0; i < n; i++) requireThat(weights[i] > 0, 'isotonicRegression', 'weights above 0', weights[i]);
  }
  const pools = emptyPools(n);
  const { means, ends } = pools;
  const blocks = poolAdjacent(values, weights ?? new Float64Array(n).fill(1), pools);
  const fitted = new Array<number>(n);
  for (let block = 0, i = 0; block < blocks; block++) for (; i < ends[block]; i++) fitted[i] = means[block];
  return fitted;
}

/** Room for the pools of a list: mean and weight of each, and the place behind its last value. */
export interface Pools {
  readonly means: Float64Array;
  readonly masses: Float64Array;
  readonly ends: Int32Array;
}

/** Room for the pools of n values, to be used again and again. */
export function emptyPools(n: number): Pools {
  return { means: new Float64Array(n), masses: new Float64Array(n), ends: new Int32Array(n) };
}

/**
 * The pools of {@link isotonicRegression}, their means strictly rising, for those who fit very many short lists.
 * Nothing is checked.
 *
 * @param pools filled up to the number of pools, which is given back
 * @example
 * ```ts
 * poolAdjacent([1, 0, 4, 3], [1, 1, 1, 1], emptyPools(4)); // => 2
 * ```
 */
export function poolAdjacent(values: Numbers, weights: Numbers, { means, masses, ends }: Pools): number {
  let blocks = 0;
  for (let i = 0; i < values.length; i++) {
    let mean = values[i];
    let mass = weights[i];
    while (blocks > 0 && means[blocks - 1] >= mean) {
      blocks--;
      const both = masses[blocks] + mass;
      mean = means[blocks] + (mass / both) * (mean - means[blocks]);
      mass = both;
    }
    means[blocks] = mean;
    masses[blocks] = mass;
    ends[blocks] = i + 1;
    blocks++;
  }
  return blocks;
}
