import { requireThat } from './check.js';
import { noncentralT } from './noncentral-t.js';
import { studentTQuantile } from './student-t.js';

/** A comparison of two means that is being planned. */
export interface PowerDesign {
  /** True difference of the two means. */
  readonly delta: number;
  /** Standard deviation within groups, above 0. */
  readonly sd: number;
  /** Level of the test, default 0.05. */
  readonly alpha?: number;
  /** Two-sided (2, the default) or in the direction of delta (1). */
  readonly sides?: 1 | 2;
}

/**
 * Chance that the t test of two groups with pooled scatter finds a difference of delta, by the noncentral t distribution
 * (Cohen 1988, Statistical Power Analysis, chapter 2). Rejections in the wrong direction of a two-sided test count.
 *
 * @param n1 number in the first group, at least 1 (may be a fraction while planning)
 * @param n2 number in the second, default as many; at least 3 together
 * @throws RangeError when the design or the numbers are out of range
 * @example
 * ```ts
 * powerTTest({ delta: 1, sd: 1 }, 20); // => 0.868953
 * powerTTest({ delta: 1, sd: 1 }, 10, 40); // => 0.791451
 * ```
 */
export function powerTTest(design: PowerDesign, n1: number, n2 = n1): number {
  const { delta, sd, alpha = 0.05, sides = 2 } = design;
  requireThat(Number.isFinite(delta), 'powerTTest', 'a finite delta', delta);
  requireThat(sd > 0 && sd < Infinity, 'powerTTest', 'an sd above 0', sd);
  requireThat(alpha > 0 && alpha < 1, 'powerTTest', 'an alpha between 0 and 1', alpha);
  requireThat(n1 >= 1 && n2 >= 1 && n1 + n2 > 2, 'powerTTest', 'groups of 1 or more, 3 together', n1, n2);
  const df = n1 + n2 - 2;
  const noncentrality = Math.abs(delta) / sd / Math.sqrt(1 / n1 + 1 / n2);
  const limit = -studentTQuantile(alpha / sides, df);
  const right = noncentralT(limit, df, noncentrality).upper;
  return sides === 1 ? right : Math.min(1, right + noncentralT(-limit, df, noncentrality).lower);
}

/**
 * Number needed in each of two equal groups for {@link powerTTest} to reach the power wanted, as a fraction: round it up.
 * At least 2.
 *
 * @param power wanted chance, above alpha and below 1; default 0.8
 * @throws RangeError when delta is 0, or another number is out of range
 * @example
 * ```ts
 * sampleSizeTTest({ delta: 1, sd: 1 }, 0.9); // => 22.02109
 * ```
 */
export function sampleSizeTTest(design: PowerDesign, power = 0.8): number {
  const { delta, alpha = 0.05 } = design;
  requireThat(Math.abs(delta) > 0, 'sampleSizeTTest', 'a delta other than 0', delta);
  requireThat(power > alpha && power < 1, 'sampleSizeTTest', 'a power between alpha and 1', power);
  let low = 2;
  if (powerTTest(design, low) >= power) return low;
  let high = 4;
  while (powerTTest(design, high) < power) {
    low = high;
    high *= 2;
    requireThat(high < 1e12, 'sampleSizeTTest', 'a difference that 1e12 values can show', delta);
  }
  while (high - low > 1e-12 * high) {
    const middle = 0.5 * (low + high);
    if (middle === low || middle === high) break;
    if (powerTTest(design, middle) < power) low = middle;
    else high = middle;
  }
  return 0.5 * (low + high);
}
