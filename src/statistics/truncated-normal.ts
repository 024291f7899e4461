import { requireThat } from './check.js';
import type { Random } from './random.js';

const SQRT_TWO_PI = 2.5066282746310002;
const SQRT_E = 1.6487212707001282;

/**
 * One draw from a normal cut to [low, high], exact wherever the interval lies, also far in a tail or very narrow.
 *
 * Robert (1995, 10.1007/BF00143942): the plain normal, a uniform or an exponential is drawn and accepted with the right
 * chance, whichever is cheapest there. Draws are kept as distances from the nearer end, so that no digit is lost.
 *
 * @param mean mean of the uncut normal
 * @param sd standard deviation of the uncut normal, above 0
 * @param low lower end, −Infinity for none
 * @param high upper end, Infinity for none; equal ends give that value
 * @throws RangeError when low > high, sd is not above 0, or a value is NaN
 * @example
 * ```ts
 * sampleTruncatedNormal(createRandom(1), 0, 1, 2, 2); // => 2
 * ```
 */
export function sampleTruncatedNormal(random: Random, mean: number, sd: number, low: number, high: number): number {
  if (!(sd > 0 && sd < Infinity && Number.isFinite(mean) && low <= high && low < Infinity && high > -Infinity)) {
    refuse(mean, sd, low, high);
  }
  if (low === high) return low;
  const a = (low - mean) / sd;
  const b = (high - mean) / sd;
  const value =
    a >= 0
      ? low + sd * beyond(random, a, (high - low) / sd)
      : b <= 0
        ? high - sd * beyond(random, -b, (high - low) / sd)
        : mean + sd * across(random, a, b);
  return Math.min(Math.max(value, low), high);
}

/** Says which of them is wrong; apart, since draws are made by the million. */
function refuse(mean: number, sd: number, low: number, high: number): void {
  requireThat(sd > 0 && sd < Infinity, 'sampleTruncatedNormal', 'sd above 0', sd);
  requireThat(Number.isFinite(mean), 'sampleTruncatedNormal', 'a finite mean', mean);
  requireThat(false, 'sampleTruncatedNormal', 'low at most high, and something between them', low, high);
}

/** A standard normal cut to [a, b] with a < 0 < b. */
function across(random: Random, a: number, b: number): number {
  if (b - a > SQRT_TWO_PI) {
    for (;;) {
      const z = random.normal();
      if (z >= a && z <= b) return z;
    }
  }
  for (;;) {
    const z = a + (b - a) * random.uniform();
    if (atMostExp(random.uniform(), 0.5 * z * z)) return z;
  }
}

/** Distance beyond `start` ≥ 0 of a standard normal cut to [start, start + width]. */
function beyond(random: Random, start: number, width: number): number {
  if (start === Infinity) return 0;
  if (start < 0.45 && width > SQRT_TWO_PI) {
    for (;;) {
      const distance = Math.abs(random.normal()) - start;
      if (distance >= 0 && distance <= width) return distance;
    }
  }
  const rate = 0.5 * (start + Math.sqrt(start * start + 4));
  const reach = rate * width;
  // Below this reach a uniform is accepted more often than the exponential; the limit lies between 1 and √e.
  if (reach < 1 || (reach < SQRT_E && reach < Math.exp(0.5 * start * (start - rate) + 0.5))) {
    for (;;) {
      const distance = width * random.uniform();
      if (atMostExp(random.uniform(), distance * (start + 0.5 * distance))) return distance;
    }
  }
  // above 40 the rest is lost in rounding
  const share = reach > 40 ? 1 : -Math.expm1(-reach);
  for (;;) {
    const distance = -Math.log1p(-random.uniform() * share) / rate;
    const gap = start + distance - rate;
    if (atMostExp(random.uniform(), 0.5 * gap * gap)) return distance;
  }
}

/** Whether u ≤ exp(−y), for y ≥ 0; mostly told without the exponential, which is never below 1 − y. */
const atMostExp = (u: number, y: number): boolean => u <= 1 - y || u <= Math.exp(-y);
