import { requireThat } from './check.js';

const HALF_LOG_TWO_PI = 0.9189385332046728;

/**
 * What Stirling's formula lacks: ln Γ(x) − ((x − ½) ln x − x + ½ ln 2π), for x ≥ 10, to full precision
 * (Abramowitz and Stegun 1964, 6.1.40).
 *
 * @example
 * ```ts
 * stirlingRemainder(10); // => 0.00833056343336287
 * ```
 */
export function stirlingRemainder(x: number): number {
  const w = 1 / (x * x);
  return (
    (1 / 12 - w * (1 / 360 - w * (1 / 1260 - w * (1 / 1680 - w * (1 / 1188 - w * (691 / 360360 - w * (1 / 156))))))) / x
  );
}

/**
 * Natural logarithm of the gamma function for x > 0: Stirling's series from 10 upwards, and the recurrence
 * Γ(x + 1) = x Γ(x) below.
 *
 * @throws RangeError when x is not above 0
 * @example
 * ```ts
 * logGamma(5); // => 3.1780538303479458
 * ```
 */
export function logGamma(x: number): number {
  requireThat(x > 0, 'logGamma', 'x > 0', x);
  let product = 1;
  let shifted = x;
  while (shifted < 10) {
    product *= shifted;
    shifted += 1;
  }
  return (
    (shifted - 0.5) * Math.log(shifted) - shifted + HALF_LOG_TWO_PI + stirlingRemainder(shifted) - Math.log(product)
  );
}

/**
 * Natural logarithm of the beta function, written so that large arguments do not cancel.
 *
 * @throws RangeError when an argument is not above 0
 * @example
 * ```ts
 * logBeta(2, 3); // => -2.484906649788
 * ```
 */
export function logBeta(a: number, b: number): number {
  const p = Math.min(a, b);
  const q = Math.max(a, b);
  requireThat(p > 0, 'logBeta', 'arguments above 0', p);
  if (q < 10) return logGamma(p) + logGamma(q) - logGamma(p + q);
  const share = p / (p + q);
  const remainder = stirlingRemainder(q) - stirlingRemainder(p + q);
  if (p < 10) return logGamma(p) + remainder + p - p * Math.log(p + q) + (q - 0.5) * Math.log1p(-share);
  return (
    HALF_LOG_TWO_PI -
    0.5 * Math.log(q) +
    stirlingRemainder(p) +
    remainder +
    (p - 0.5) * Math.log(share) +
    q * Math.log1p(-share)
  );
}
