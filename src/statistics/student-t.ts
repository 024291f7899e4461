import { requireThat } from './check.js';
import { regularisedBeta } from './incomplete-beta.js';
import { logBeta } from './log-gamma.js';
import { normalCdf, normalQuantile } from './normal.js';
import { solveIncreasing } from './solve-increasing.js';

/**
 * Probability that Student's t with df degrees of freedom lies below t; df may be a fraction or Infinity. Precise also
 * far down the lower tail: for an upper tail take `studentTCdf(-t, df)`.
 *
 * Abramowitz and Stegun 1964, 26.7.1, through the incomplete beta function.
 *
 * @throws RangeError when t is NaN or df is not above 0
 * @example
 * ```ts
 * studentTCdf(-2.5, 7.3); // => 0.0198251173328002
 * ```
 */
export function studentTCdf(t: number, df: number): number {
  requireThat(!Number.isNaN(t), 'studentTCdf', 'a number as t', t);
  requireThat(df > 0, 'studentTCdf', 'df above 0', df);
  if (df === Infinity) return normalCdf(t);
  const tail = 0.5 * upperBoth(Math.abs(t), df);
  return t > 0 ? 1 - tail : tail;
}

/** P(|T| > t) for t ≥ 0. */
function upperBoth(t: number, df: number): number {
  const ratio = (t / df) * t;
  if (ratio === Infinity) return 0;
  return regularisedBeta(1 / (1 + ratio), ratio / (1 + ratio), df / 2, 0.5).lower;
}

/**
 * The t below which Student's t with df degrees of freedom lies with probability p.
 *
 * @throws RangeError when p is not from 0 to 1 or df is not above 0
 * @example
 * ```ts
 * studentTQuantile(0.975, 4); // => 2.77644510519779
 * ```
 */
export function studentTQuantile(p: number, df: number): number {
  requireThat(p >= 0 && p <= 1, 'studentTQuantile', 'a probability from 0 to 1', p);
  requireThat(df > 0, 'studentTQuantile', 'df above 0', df);
  if (p === 0.5) return 0;
  if (p === 0 || p === 1 || df === Infinity) return normalQuantile(p);
  const tail = Math.min(p, 1 - p);
  // On logarithms of both t and tail the curve is nearly straight, so Newton's steps hold from end to end.
  const logSize = solveIncreasing(
    (u) => {
      const t = Math.exp(u);
      const above = 0.5 * upperBoth(t, df);
      const density = Math.exp(-0.5 * (df + 1) * Math.log1p((t / df) * t) - 0.5 * Math.log(df) - logBeta(df / 2, 0.5));
      return { value: Math.log(tail) - Math.log(above), slope: (density * t) / above };
    },
    Math.log(Math.max(-normalQuantile(tail), 1e-3)),
  );
  return p < 0.5 ? -Math.exp(logSize) : Math.exp(logSize);
}
