import type { Numbers } from './check.js';
import { requireNumbers } from './check.js';
import { median } from './quantile.js';

/**
 * Median distance of the values from their median.
 *
 * @throws RangeError when there is no value or a value is not finite
 * @example
 * ```ts
 * medianAbsoluteDeviation([1, 2, 3, 4, 100]); // => 1
 * ```
 */
export function medianAbsoluteDeviation(values: Numbers): number {
  requireNumbers('medianAbsoluteDeviation', 'values', values);
  const middle = median(values);
  return median(Float64Array.from(values, (x) => Math.abs(x - middle)));
}

/**
 * Standard deviation judged from the median absolute deviation, which a few wild values can't move: 1.4826 times it, so
 * that it estimates the standard deviation of a normal (Hampel 1974, 10.1080/01621459.1974.10482962). 0 when more than half the values are equal.
 *
 * @throws RangeError when there is no value or a value is not finite
 * @example
 * ```ts
 * robustSd([1, 2, 3, 4, 100]); // => 1.482602218505602
 * ```
 */
export function robustSd(values: Numbers): number {
  return 1.482602218505602 * medianAbsoluteDeviation(values);
}
