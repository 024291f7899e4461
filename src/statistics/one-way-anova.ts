import type { Numbers } from './check.js';
import { requireThat } from './check.js';
import { fUpperTail } from './f-distribution.js';
import { momentsOf, requireSummary, type Summary } from './summary.js';

/** Outcome of the analysis of variance of one factor. */
export interface OneWayAnova {
  readonly f: number;
  readonly p: number;
  readonly dfBetween: number;
  readonly dfWithin: number;
  readonly sumOfSquaresBetween: number;
  readonly sumOfSquaresWithin: number;
  readonly meanSquareBetween: number;
  readonly meanSquareWithin: number;
  /** Standard deviation within groups, all groups together. */
  readonly pooledSd: number;
}

/**
 * One-way analysis of variance: do groups of equal scatter have the same mean (Fisher 1925)?
 *
 * @param groups at least 2 groups of at least one value, one of them with more
 * @throws RangeError when groups or values are too few, or a value is not finite
 * @example
 * ```ts
 * oneWayAnova([[1, 2, 3], [2, 3, 4], [5, 6, 7]]).f; // => 13
 * ```
 */
export function oneWayAnova(groups: ArrayLike<Numbers>): OneWayAnova {
  return compare(
    'oneWayAnova',
    Array.from(groups, (group) => momentsOf('oneWayAnova', group)),
  );
}

/**
 * {@link oneWayAnova} from the mean, standard deviation and number of each group.
 *
 * @throws RangeError when groups are too few, a mean is not finite, an sd is below 0 or an n is not a whole number above 0
 * @example
 * ```ts
 * oneWayAnovaFromSummaries([{ mean: 2, sd: 1, n: 3 }, { mean: 3, sd: 1, n: 3 }, { mean: 6, sd: 1, n: 3 }]).f; // => 13
 * ```
 */
export function oneWayAnovaFromSummaries(summaries: readonly Summary[]): OneWayAnova {
  for (const summary of summaries) requireSummary('oneWayAnovaFromSummaries', summary, 1);
  return compare(
    'oneWayAnovaFromSummaries',
    summaries.map(({ mean, sd, n }) => ({ mean, squares: (n - 1) * sd * sd, n })),
  );
}

function compare(who: string, groups: readonly { mean: number; squares: number; n: number }[]): OneWayAnova {
  requireThat(groups.length >= 2, who, 'at least 2 groups', groups.length);
  const total = groups.reduce((sum, { n }) => sum + n, 0);
  const dfBetween = groups.length - 1;
  const dfWithin = total - groups.length;
  requireThat(dfWithin > 0, who, 'a group of at least 2 values', `${total} values in ${groups.length} groups`);
  const rough = groups.reduce((sum, { mean, n }) => sum + n * mean, 0) / total;
  const grand = rough + groups.reduce((sum, { mean, n }) => sum + n * (mean - rough), 0) / total;
  const sumOfSquaresBetween = groups.reduce((sum, { mean, n }) => sum + n * (mean - grand) ** 2, 0);
  const sumOfSquaresWithin = groups.reduce((sum, { squares }) => sum + squares, 0);
  const meanSquareBetween = sumOfSquaresBetween / dfBetween;
  const meanSquareWithin = sumOfSquaresWithin / dfWithin;
  // Groups without scatter: the means differ for certain, or not at all.
  const f = meanSquareBetween === 0 ? 0 : meanSquareBetween / meanSquareWithin;
  return {
    f,
    p: fUpperTail(f, dfBetween, dfWithin),
    dfBetween,
    dfWithin,
    sumOfSquaresBetween,
    sumOfSquaresWithin,
    meanSquareBetween,
    meanSquareWithin,
    pooledSd: Math.sqrt(meanSquareWithin),
  };
}
