import { requireThat } from './check.js';
import { logGamma, stirlingRemainder } from './log-gamma.js';
import { normalCdf } from './normal.js';

/**
 * Probabilities that Student's t with df degrees of freedom and the given noncentrality lies below and above t, each
 * with full relative precision in its own tail.
 *
 * The normal probability is averaged over the chi distribution of the standard deviation on a logarithmic scale by the
 * trapezoidal rule, which converges exponentially there (Trefethen and Weideman 2014, 10.1137/130932132).
 *
 * @throws RangeError when t or the noncentrality is not finite or df is not above 0
 * @example
 * ```ts
 * noncentralT(2, 10, 1).lower; // => 0.80761156253
 * ```
 */
export function noncentralT(t: number, df: number, noncentrality: number): { lower: number; upper: number } {
  requireThat(Number.isFinite(t) && Number.isFinite(noncentrality), 'noncentralT', 'finite t and noncentrality', t);
  requireThat(df > 0 && df < Infinity, 'noncentralT', 'df above 0', df);
  // The step must resolve the narrower of the chi density and the normal's own rise.
  const step = 0.4 * Math.min(1 / Math.sqrt(2 * df), 0.4, 1 / (1 + Math.abs(noncentrality)));
  const from = -(1500 / df + Math.sqrt(1500 / df));
  const to = Math.min(Math.sqrt(750 / df), 5);
  const height = logHeight(df);
  let lower = 0;
  let upper = 0;
  for (let i = Math.floor(from / step); i * step <= to; i++) {
    const logSd = i * step;
    const density = Math.exp(height + 0.5 * df * (2 * logSd - Math.expm1(2 * logSd)));
    if (density === 0) continue;
    const z = t * Math.exp(logSd) - noncentrality;
    lower += density * normalCdf(z);
    upper += density * normalCdf(-z);
  }
  return { lower: Math.min(1, lower * step), upper: Math.min(1, upper * step) };
}

/** Logarithm of the density at 0 of ln(sd / true sd) with df degrees of freedom. */
function logHeight(df: number): number {
  const half = df / 2;
  if (half < 10) return Math.LN2 + half * Math.log(half) - half - logGamma(half);
  return Math.LN2 + 0.5 * Math.log(half) - 0.5 * Math.log(2 * Math.PI) - stirlingRemainder(half);
}
