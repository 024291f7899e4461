import type { Numbers } from './check.js';
import { requireThat } from './check.js';
import { studentTCdf, studentTQuantile } from './student-t.js';
import { momentsOf } from './summary.js';

/** Options of the test for one outlier. */
export interface GrubbsOptions {
  /** Which values may be the odd one: the farthest on either side, only the largest, or only the smallest. Default both. */
  readonly side?: 'both' | 'high' | 'low';
  /** Chance of calling an outlier where there is none, default 0.05. */
  readonly alpha?: number;
}

/** Outcome of the test for one outlier. */
export interface Grubbs {
  /** Distance of the odd value from the mean in standard deviations. */
  readonly g: number;
  /** Place of the odd value in the list. */
  readonly index: number;
  /** g must be above this for an outlier, on the side asked for. */
  readonly limit: number;
  /** Upper bound of the chance of such a g with no outlier; exact when small. */
  readonly p: number;
  readonly outlier: boolean;
}

/**
 * Is the most extreme of some normal values an outlier? Grubbs (1950, 10.1214/aoms/1177729885; 1969,
 * 10.1080/00401706.1969.10490657). Good for one outlier: for several use {@link generalizedEsd}.
 *
 * @param values at least 3
 * @throws RangeError when values are too few or not finite, or alpha is not between 0 and 1
 * @example
 * ```ts
 * grubbs([1, 2, 3, 4, 20]).limit; // => 1.7150373
 * grubbs([1, 2, 3, 4, 20]).outlier; // => true
 * ```
 */
export function grubbs(values: Numbers, { side = 'both', alpha = 0.05 }: GrubbsOptions = {}): Grubbs {
  const n = values.length;
  requireThat(n >= 3, 'grubbs', 'at least 3 values', n);
  requireThat(alpha > 0 && alpha < 1, 'grubbs', 'an alpha between 0 and 1', alpha);
  const { g, index } = farthest('grubbs', values, side);
  const chances = side === 'both' ? 2 * n : n;
  const t = -studentTQuantile(alpha / chances, n - 2);
  const limit = ((n - 1) / Math.sqrt(n)) * Math.sqrt((t * t) / (n - 2 + t * t));
  // The largest possible g leaves nothing below the fraction line.
  const room = (n - 1) ** 2 - n * g * g;
  const tOfG = room > 0 ? Math.sqrt((n * (n - 2) * g * g) / room) : Infinity;
  return { g, index, limit, p: Math.min(1, chances * studentTCdf(-tOfG, n - 2)), outlier: g > limit };
}

/**
 * The value farthest from the mean on the sides asked for, and its distance in standard deviations (0 when nothing
 * varies). At least 2 values.
 */
export function farthest(who: string, values: Numbers, side: 'both' | 'high' | 'low'): { g: number; index: number } {
  const { mean, squares, n } = momentsOf(who, values);
  let index = 0;
  let most = -Infinity;
  for (let i = 0; i < n; i++) {
    const above = values[i] - mean;
    const distance = side === 'high' ? above : side === 'low' ? -above : Math.abs(above);
    if (distance > most) {
      most = distance;
      index = i;
    }
  }
  const sd = Math.sqrt(squares / (n - 1));
  return { g: sd > 0 ? most / sd : 0, index };
}
