import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';
import { normalCdf } from './normal.js';
import { tieSizes } from './ranks.js';
import { waysToDeal } from './ways-to-deal.js';

/** Up to this many values, none tied, the exact distribution is worked out. */
const EXACT_UP_TO = 100;

/** Outcome of the test for a trend over ordered groups. */
export interface JonckheereTerpstra {
  /** Pairs of values in which the later group's is the larger; ties count one half. */
  readonly j: number;
  /** Standardised j, its variance corrected for ties, no continuity correction. */
  readonly z: number;
  /** Standardised j by the variance that holds without ties, as older tables print it. */
  readonly zWithoutTies: number;
  /** Two-sided: twice the smaller of the two below, at most 1. */
  readonly p: number;
  /** Small when values rise from group to group. */
  readonly pIncreasing: number;
  /** Small when values fall from group to group. */
  readonly pDecreasing: number;
  readonly exact: boolean;
}

/**
 * Do values rise (or fall) over groups that have an order? Terpstra (1952), Jonckheere (1954, 10.1093/biomet/41.1-2.133);
 * variance with ties from Hollander and Wolfe (1999, Nonparametric Statistical Methods, 6.2). Exact up to 100 values
 * without ties, else normal.
 *
 * @param groups at least 2, in their order, each with at least one value
 * @throws RangeError when groups are too few or empty, or a value is not finite
 * @example
 * ```ts
 * jonckheereTerpstra([[1, 2], [3, 4], [5, 6]]).j; // => 12
 * ```
 */
export function jonckheereTerpstra(groups: ArrayLike<Numbers>): JonckheereTerpstra {
  requireThat(groups.length >= 2, 'jonckheereTerpstra', 'at least 2 groups', groups.length);
  const lists = Array.from(groups, (group, k) => {
    requireNumbers('jonckheereTerpstra', `values in group ${k}`, group);
    return Float64Array.from(group).sort();
  });
  let j = 0;
  for (let a = 0; a < lists.length; a++) {
    for (let b = a + 1; b < lists.length; b++) j += pairsRising(lists[a], lists[b]);
  }
  const pooled = lists.flatMap((list) => [...list]);
  const sizes = lists.map((list) => list.length);
  const ties = tieSizes(pooled);
  const n = pooled.length;
  const middle = (n * n - sum(sizes, (m) => m * m)) / 4;
  const plainSd = Math.sqrt(variance(n, sizes, []));
  const sd = Math.sqrt(variance(n, sizes, ties));
  const z = sd > 0 ? (j - middle) / sd : 0;
  const exact = ties.length === 0 && n <= EXACT_UP_TO;
  const [pDecreasing, pIncreasing] = exact ? exactTails(sizes, j) : [normalCdf(z), normalCdf(-z)];
  const p = Math.min(1, 2 * Math.min(pIncreasing, pDecreasing));
  return { j, z, zWithoutTies: (j - middle) / plainSd, p, pIncreasing, pDecreasing, exact };
}

/** Pairs with a < b, ties one half, of two sorted lists. */
function pairsRising(a: Float64Array, b: Float64Array): number {
  let below = 0;
  let upTo = 0;
  let pairs = 0;
  for (const value of b) {
    while (below < a.length && a[below] < value) below++;
    while (upTo < a.length && a[upTo] <= value) upTo++;
    pairs += (below + upTo) / 2;
  }
  return pairs;
}

function variance(n: number, sizes: readonly number[], ties: readonly number[]): number {
  const first = (m: number) => m * (m - 1) * (2 * m + 5);
  const second = (m: number) => m * (m - 1) * (m - 2);
  const third = (m: number) => m * (m - 1);
  let value = (first(n) - sum(sizes, first) - sum(ties, first)) / 72;
  if (n > 2) value += (sum(sizes, second) * sum(ties, second)) / (36 * second(n));
  return value + (sum(sizes, third) * sum(ties, third)) / (8 * third(n));
}

function sum(values: readonly number[], of: (m: number) => number): number {
  return values.reduce((total, m) => total + of(m), 0);
}

/** P(J ≤ j) and P(J ≥ j): J is a sum of independent Mann–Whitney counts, each group against all earlier ones. */
function exactTails(sizes: readonly number[], j: number): [number, number] {
  let chances = Float64Array.of(1);
  let earlier = sizes[0];
  for (const size of sizes.slice(1)) {
    const ranks = Array.from({ length: earlier + size }, (_, i) => i);
    const ways = waysToDeal(ranks, Math.min(size, earlier));
    const all = ways.reduce((total, w) => total + w, 0);
    const next = new Float64Array(chances.length + ways.length - 1);
    for (let s = 0; s < chances.length; s++) {
      for (let t = 0; t < ways.length; t++) next[s + t] += (chances[s] * ways[t]) / all;
    }
    chances = next;
    earlier += size;
  }
  const below = chances.subarray(0, j + 1).reduce((total, c) => total + c, 0);
  const above = chances.subarray(j).reduce((total, c) => total + c, 0);
  return [Math.min(1, below), Math.min(1, above)];
}
