import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';

/**
 * Quantile of a sample by linear interpolation (Hyndman and Fan 1996, 10.1080/00031305.1996.10473566, their type 7,
 * which is R's default).
 *
 * @param p probability, 0 to 1
 * @throws RangeError when there is no value, a value is not finite, or p is not from 0 to 1
 * @example
 * ```ts
 * quantile([1, 2, 3, 4], 0.25); // => 1.75
 * ```
 */
export function quantile(values: Numbers, p: number): number {
  requireNumbers('quantile', 'values', values);
  return quantileOfSorted(Float64Array.from(values).sort(), p);
}

/**
 * Like {@link quantile}, for values already in increasing order (which is trusted): several quantiles of one long list
 * need only one sort.
 *
 * @throws RangeError when there is no value or p is not from 0 to 1
 * @example
 * ```ts
 * quantileOfSorted([1, 2, 3, 4], 0.25); // => 1.75
 * ```
 */
export function quantileOfSorted(sorted: Numbers, p: number): number {
  requireThat(sorted.length > 0, 'quantileOfSorted', 'at least one value', sorted.length);
  requireThat(p >= 0 && p <= 1, 'quantileOfSorted', 'a probability from 0 to 1', p);
  const place = (sorted.length - 1) * p;
  const below = Math.floor(place);
  const share = place - below;
  return share === 0 ? sorted[below] : sorted[below] + share * (sorted[below + 1] - sorted[below]);
}

/**
 * Middle value, or the mean of the two middle ones.
 *
 * @throws RangeError when there is no value or a value is not finite
 * @example
 * ```ts
 * median([3, 1, 2, 10]); // => 2.5
 * ```
 */
export function median(values: Numbers): number {
  requireNumbers('median', 'values', values);
  return medianOfSorted(Float64Array.from(values).sort());
}

/** {@link median} of values already in increasing order, of which there is at least one. */
export function medianOfSorted(sorted: Numbers): number {
  const half = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2;
}
