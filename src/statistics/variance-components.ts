import type { Numbers } from './check.js';
import { requireThat } from './check.js';
import { oneWayAnova } from './one-way-anova.js';

/** Variance between and within groups. */
export interface VarianceComponents {
  /** Variance between groups beyond what scatter within them gives; 0 where the estimate is below 0. */
  readonly between: number;
  /** The same before it is held at 0. */
  readonly betweenUnclipped: number;
  /** Variance within groups. */
  readonly within: number;
  /** Share of the variance that lies between groups, 0 to 1 (intraclass correlation). NaN when nothing varies. */
  readonly share: number;
  /** Effective number of values a group: the common size when all are equal. */
  readonly groupSize: number;
  readonly f: number;
  readonly p: number;
}

/**
 * Variance between and within groups of any sizes, by equating mean squares to their expectations (Searle, Casella and
 * McCulloch 1992, Variance Components, chapter 3, 10.1002/9780470316856).
 *
 * @param groups at least 2 groups of at least one value, one of them with more
 * @throws RangeError when groups or values are too few, or a value is not finite
 * @example
 * ```ts
 * varianceComponents([[1, 3], [5, 7], [9, 11]]).between; // => 15
 * ```
 */
export function varianceComponents(groups: ArrayLike<Numbers>): VarianceComponents {
  requireThat(groups.length >= 2, 'varianceComponents', 'at least 2 groups', groups.length);
  const { f, p, meanSquareBetween, meanSquareWithin: within } = oneWayAnova(groups);
  const sizes = Array.from(groups, (group) => group.length);
  const total = sizes.reduce((sum, n) => sum + n, 0);
  const groupSize = (total - sizes.reduce((sum, n) => sum + n * n, 0) / total) / (sizes.length - 1);
  const betweenUnclipped = (meanSquareBetween - within) / groupSize;
  const between = Math.max(0, betweenUnclipped);
  return { between, betweenUnclipped, within, share: between / (between + within), groupSize, f, p };
}
