import { normalQuantile, studentTQuantile } from '../statistics/index.js';

/**
 * How many standard deviations of a difference two shells must contradict superposition by before it is called a
 * conflict: one-sided, Bonferroni over all pairs that superposition orders, so that in a survey where every bed is of
 * one age (the worst case) the chance of any conflict is at most alpha, whatever pairs share shells. Student's t where
 * the scatter rests on few degrees of freedom.
 *
 * @param pairs Pairs of shells that superposition orders; under 1 counts as 1.
 * @param alpha Level over all pairs together. Default 0.05.
 * @param df Degrees of freedom of the scatter. Default Infinity.
 * @throws RangeError when alpha is not between 0 and 1 or df is not above 0.
 * @example
 * conflictThreshold(1) // => 1.644854
 * conflictThreshold(10000) // => 4.417173
 */
export function conflictThreshold(pairs: number, alpha = 0.05, df = Number.POSITIVE_INFINITY): number {
  if (!(alpha > 0 && alpha < 1))
    throw new RangeError(`conflictThreshold: alpha must lie between 0 and 1, got ${alpha}`);
  if (!(df > 0)) throw new RangeError(`conflictThreshold: df must be above 0, got ${df}`);
  const tail = alpha / Math.max(1, pairs);
  return Number.isFinite(df) ? -studentTQuantile(tail, df) : -normalQuantile(tail);
}
