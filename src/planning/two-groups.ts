import type { Findings } from '../model/index.js';
import { type BedOnClock, bedKey, type ClockInView } from './bed-on-clock.js';

/** Shells of either group of a mixed bed, for a mean of its own. */
const A_GROUP = 3;

/**
 * More shells of a bed of mixed age, so that with the asked chance at least three are of its rarer group, if that group
 * has the share among new shells that it has now (the sharpest division of the present ones into two).
 *
 * @param most Most shells of a bed.
 * @returns 0 where both groups have three now
 */
export function shellsForBothGroups(
  findings: Findings,
  view: ClockInView,
  bed: BedOnClock,
  chance: number,
  most: number,
): number {
  const ratios = findings.shells
    .filter((row) => row.clock === view.clock && bedKey(row) === bed.key)
    .map((row) => row.log_ratio)
    .sort((a, b) => a - b);
  if (ratios.length < 2) return A_GROUP;
  const below = sharpestDivision(ratios);
  const rarer = Math.min(below, ratios.length - below);
  if (rarer >= A_GROUP) return 0;
  const share = rarer / ratios.length;
  for (let more = A_GROUP - rarer; more <= most - bed.shells; more++) {
    if (chanceOfAtLeast(A_GROUP - rarer, more, share) >= chance) return more;
  }
  return Math.max(0, most - bed.shells);
}

/**
 * Number of the sorted values in the lower of two groups, divided where the squares within groups are least (Fisher 1958,
 * Journal of the American Statistical Association 53, 789–798, 10.1080/01621459.1958.10501479).
 *
 * @example
 * ```ts
 * sharpestDivision([0, 0.1, 1, 1.1, 1.2]); // => 2
 * ```
 */
export function sharpestDivision(sorted: readonly number[]): number {
  const total = sorted.reduce((sum, x) => sum + x, 0);
  let best = 1;
  let most = Number.NEGATIVE_INFINITY;
  let below = 0;
  for (let count = 1; count < sorted.length; count++) {
    below += sorted[count - 1];
    const between = below ** 2 / count + (total - below) ** 2 / (sorted.length - count);
    if (between > most) [best, most] = [count, between];
  }
  return best;
}

/**
 * Chance of at least so many successes in n tries.
 *
 * @example
 * ```ts
 * chanceOfAtLeast(1, 2, 0.5); // => 0.75
 * ```
 */
export function chanceOfAtLeast(wanted: number, n: number, share: number): number {
  let term = (1 - share) ** n;
  let fewer = 0;
  for (let count = 0; count < wanted; count++) {
    fewer += term;
    term *= ((n - count) / (count + 1)) * (share / (1 - share));
  }
  return 1 - fewer;
}
