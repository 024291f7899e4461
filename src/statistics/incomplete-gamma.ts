import { requireThat } from './check.js';
import { logGamma, stirlingRemainder } from './log-gamma.js';

const TINY = 1e-300;
const MOST_STEPS = 1_000_000;

/**
 * Regularised incomplete gamma functions P(a, x) (lower) and Q(a, x) (upper), each precise in its own tail: the power
 * series below a + 1, the continued fraction by Lentz's method above (Abramowitz and Stegun 1964, 6.5.29 and 6.5.31;
 * Lentz 1976, 10.1364/AO.15.000668).
 *
 * @throws RangeError when a is not above 0 or x is below 0
 * @example
 * ```ts
 * regularisedGamma(1, 2).upper; // => 0.1353352832366127
 * ```
 */
export function regularisedGamma(a: number, x: number): { lower: number; upper: number } {
  requireThat(a > 0 && a < Infinity, 'regularisedGamma', 'a above 0', a);
  requireThat(x >= 0, 'regularisedGamma', 'x from 0 upwards', x);
  if (x === 0) return { lower: 0, upper: 1 };
  if (x === Infinity) return { lower: 1, upper: 0 };
  const front = gammaFront(a, x);
  if (x < a + 1) {
    const lower = Math.min((front / a) * gammaSeries(a, x), 1);
    return { lower, upper: 1 - lower };
  }
  const upper = Math.min(front * gammaFraction(a, x), 1);
  return { lower: 1 - upper, upper };
}

/** x^a e^−x / Γ(a); for large a through the small difference of x and a, so that nothing large cancels. */
function gammaFront(a: number, x: number): number {
  if (a < 10) return Math.exp(a * Math.log(x) - x - logGamma(a));
  const mu = (x - a) / a;
  return Math.sqrt(a / (2 * Math.PI)) * Math.exp(-a * excess(mu) - stirlingRemainder(a));
}

/** mu − ln(1 + mu), precise for small mu. */
function excess(mu: number): number {
  if (Math.abs(mu) > 0.1) return mu - Math.log1p(mu);
  let sum = 0;
  let power = mu * mu;
  for (let k = 2; k < 40; k++) {
    sum += (k % 2 === 0 ? power : -power) / k;
    power *= mu;
  }
  return sum;
}

function gammaSeries(a: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let n = 1; n < MOST_STEPS; n++) {
    term *= x / (a + n);
    sum += term;
    if (term < sum * 1e-17) return sum;
  }
  throw new RangeError(`regularisedGamma did not settle for a = ${a}, x = ${x}`);
}

function gammaFraction(a: number, x: number): number {
  let b = x + 1 - a;
  let c = 1 / TINY;
  let d = 1 / b;
  let value = d;
  for (let n = 1; n < MOST_STEPS; n++) {
    const alpha = -n * (n - a);
    b += 2;
    d = alpha * d + b;
    if (Math.abs(d) < TINY) d = TINY;
    c = b + alpha / c;
    if (Math.abs(c) < TINY) c = TINY;
    d = 1 / d;
    const factor = c * d;
    value *= factor;
    if (Math.abs(factor - 1) < 4e-16) return value;
  }
  throw new RangeError(`regularisedGamma did not settle for a = ${a}, x = ${x}`);
}
