import { requireThat } from './check.js';
import { regularisedGamma } from './incomplete-gamma.js';
import { logGamma } from './log-gamma.js';
import { normalQuantile } from './normal.js';
import { solveIncreasing } from './solve-increasing.js';

/**
 * Probability that chi-squared with df degrees of freedom lies below x (Abramowitz and Stegun 1964, 26.4.19).
 *
 * @throws RangeError when x is below 0 or df is not above 0
 * @example
 * ```ts
 * chiSquaredCdf(3.2, 2); // => 0.798103482005345
 * ```
 */
export function chiSquaredCdf(x: number, df: number): number {
  return both(x, df, 'chiSquaredCdf').lower;
}

/**
 * Probability that chi-squared with df degrees of freedom lies above x, precise also when it is tiny.
 *
 * @throws RangeError when x is below 0 or df is not above 0
 * @example
 * ```ts
 * chiSquaredUpperTail(100, 2); // => 1.92874984796392e-22
 * ```
 */
export function chiSquaredUpperTail(x: number, df: number): number {
  return both(x, df, 'chiSquaredUpperTail').upper;
}

function both(x: number, df: number, who: string): { lower: number; upper: number } {
  requireThat(x >= 0, who, 'x from 0 upwards', x);
  requireThat(df > 0 && df < Infinity, who, 'df above 0', df);
  return regularisedGamma(df / 2, x / 2);
}

/**
 * The x below which chi-squared with df degrees of freedom lies with probability p.
 *
 * @throws RangeError when p is not from 0 to 1 or df is not above 0
 * @example
 * ```ts
 * chiSquaredQuantile(0.95, 1); // => 3.84145882069412
 * ```
 */
export function chiSquaredQuantile(p: number, df: number): number {
  requireThat(p >= 0 && p <= 1, 'chiSquaredQuantile', 'a probability from 0 to 1', p);
  requireThat(df > 0 && df < Infinity, 'chiSquaredQuantile', 'df above 0', df);
  if (p === 0) return 0;
  if (p === 1) return Infinity;
  const a = df / 2;
  // First guess: Wilson and Hilferty's cube of a normal, or the power law of the lower end where that fails.
  const cube = 1 - 2 / (9 * df) + normalQuantile(p) * Math.sqrt(2 / (9 * df));
  const lowEnd = (Math.log(p) + logGamma(a + 1)) / a;
  const start = cube > 0.2 ? Math.log((df * cube ** 3) / 2) : lowEnd;
  const u = solveIncreasing((v) => {
    const x = Math.exp(v);
    const { lower, upper } = regularisedGamma(a, x);
    const density = Math.exp(a * v - x - logGamma(a));
    return p < 0.5
      ? { value: Math.log(lower) - Math.log(p), slope: density / lower }
      : { value: Math.log1p(-p) - Math.log(upper), slope: density / upper };
  }, start);
  return 2 * Math.exp(u);
}
