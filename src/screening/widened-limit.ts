import { normalCdf, normalQuantile, studentTQuantile } from '../statistics/index.js';

/**
 * A limit in standard deviations widened so that its chance of marking a clean shell stays the same when a shell is
 * looked at several times (Bonferroni over `looks`), and when the standard deviation itself rests on few shells
 * (Student's t in place of the normal).
 *
 * @param limit Limit in standard deviations for one look with a known standard deviation.
 * @param looks Number of comparisons a shell takes part in; at least 1.
 * @param df Degrees of freedom behind the standard deviation; Infinity where known.
 * @example
 * widenedLimit(3.5, 1, Number.POSITIVE_INFINITY) // => 3.5
 * widenedLimit(3.5, 6, 100) // => 4.122
 */
export function widenedLimit(limit: number, looks: number, df: number): number {
  const tail = normalCdf(-limit) / Math.max(1, looks);
  if (!(tail > 0)) return limit;
  return Number.isFinite(df) ? -studentTQuantile(tail, df) : -normalQuantile(tail);
}
