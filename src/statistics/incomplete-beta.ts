import { requireThat } from './check.js';
import { logBeta } from './log-gamma.js';

const TINY = 1e-300;
const MOST_STEPS = 1_000_000;

/**
 * Regularised incomplete beta function I_x(a, b) and its complement, both with full relative precision in their tails.
 *
 * The continued fraction of DiDonato and Morris (1992, 10.1145/131766.131776), summed by Lentz's method (1976,
 * 10.1364/AO.15.000668), on the side where it converges fast.
 *
 * @param x 0 to 1
 * @param y 1 − x, asked for by itself since the caller often knows it more precisely
 * @param a above 0
 * @param b above 0
 * @returns lower = I_x(a, b) and upper = 1 − I_x(a, b)
 * @throws RangeError when an argument is out of range, or the fraction does not settle
 * @example
 * ```ts
 * regularisedBeta(0.25, 0.75, 2, 3).lower; // => 0.26171875
 * ```
 */
export function regularisedBeta(x: number, y: number, a: number, b: number): { lower: number; upper: number } {
  requireThat(a > 0 && b > 0, 'regularisedBeta', 'a and b above 0', a, b);
  requireThat(x >= 0 && x <= 1 && y >= 0 && y <= 1, 'regularisedBeta', 'x from 0 to 1', x);
  if (x === 0) return { lower: 0, upper: 1 };
  if (y === 0) return { lower: 1, upper: 0 };
  // The more precise of x and y carries the logarithm of the other.
  const logX = x < 0.5 ? Math.log(x) : Math.log1p(-y);
  const logY = y < 0.5 ? Math.log(y) : Math.log1p(-x);
  const front = Math.exp(a * logX + b * logY - logBeta(a, b));
  if (x * (a + b) <= a) {
    const lower = Math.min(front * betaFraction(x, y, a, b), 1);
    return { lower, upper: 1 - lower };
  }
  const upper = Math.min(front * betaFraction(y, x, b, a), 1);
  return { lower: 1 - upper, upper };
}

/** The continued fraction for I_x(a, b) / (x^a y^b / B(a, b)), fast for x ≤ a / (a + b). */
function betaFraction(x: number, y: number, a: number, b: number): number {
  const lambda = a * y - b * x;
  let denominator = (a * (lambda + 1)) / (a + 1);
  let c = denominator;
  let d = 0;
  for (let n = 1; n < MOST_STEPS; n++) {
    const twice = a + 2 * n - 1;
    const alpha = (((a + n - 1) * (a + b + n - 1) * n * (b - n)) / (twice * twice)) * x * x;
    const beta = n + (n * (b - n) * x) / twice + ((a + n) * (lambda + 1 + n * (1 + y))) / (twice + 2);
    d = beta + alpha * d;
    if (Math.abs(d) < TINY) d = TINY;
    c = beta + alpha / c;
    if (Math.abs(c) < TINY) c = TINY;
    d = 1 / d;
    const factor = c * d;
    denominator *= factor;
    if (Math.abs(factor - 1) < 4e-16) return 1 / denominator;
  }
  throw new RangeError(`regularisedBeta did not settle for x = ${x}, a = ${a}, b = ${b}`);
}
