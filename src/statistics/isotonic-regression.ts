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
  const means = new Float64Array(n);
  const masses = new Float64Array(n);
  const ends = new Int32Array(n);
  let blocks = 0;
  for (let i = 0; i < n; i++) {
    means[blocks] = values[i];
    masses[blocks] = weights ? weights[i] : 1;
    ends[blocks] = i + 1;
    blocks++;
    while (blocks > 1 && means[blocks - 2] >= means[blocks - 1]) {
      const mass = masses[blocks - 2] + masses[blocks - 1];
      means[blocks - 2] += (masses[blocks - 1] / mass) * (means[blocks - 1] - means[blocks - 2]);
      masses[blocks - 2] = mass;
      ends[blocks - 2] = ends[blocks - 1];
      blocks--;
    }
  }
  const fitted = new Array<number>(n);
  for (let block = 0, i = 0; block < blocks; block++) for (; i < ends[block]; i++) fitted[i] = means[block];
  return fitted;
}
