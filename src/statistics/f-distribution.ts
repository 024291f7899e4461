import { requireThat } from './check.js';
import { regularisedBeta } from './incomplete-beta.js';

/**
 * Probability that Fisher's F with df1 and df2 degrees of freedom lies below f (Abramowitz and Stegun 1964, 26.6.2).
 *
 * @throws RangeError when f is below 0 or a df is not above 0
 * @example
 * ```ts
 * fCdf(3.1, 4, 12); // => 0.942705143438342
 * ```
 */
export function fCdf(f: number, df1: number, df2: number): number {
  return both(f, df1, df2, 'fCdf').lower;
}

/**
 * Probability that Fisher's F lies above f, precise also when it is tiny.
 *
 * @throws RangeError when f is below 0 or a df is not above 0
 * @example
 * ```ts
 * fUpperTail(3.1, 4, 12); // => 0.0572948565616577
 * ```
 */
export function fUpperTail(f: number, df1: number, df2: number): number {
  return both(f, df1, df2, 'fUpperTail').upper;
}

function both(f: number, df1: number, df2: number, who: string): { lower: number; upper: number } {
  requireThat(f >= 0, who, 'f from 0 upwards', f);
  requireThat(df1 > 0 && df2 > 0 && df1 < Infinity && df2 < Infinity, who, 'both df above 0', df1, df2);
  const ratio = (df1 / df2) * f;
  if (ratio === Infinity) return { lower: 1, upper: 0 };
  return regularisedBeta(ratio / (1 + ratio), 1 / (1 + ratio), df1 / 2, df2 / 2);
}
