import type { Random } from '../statistics/index.js';

/** A list of numbers parted in two. */
export interface Split {
  readonly lower: readonly number[];
  readonly upper: readonly number[];
  /** Share of the sum of squares that lies between the two groups, 0 to 1. */
  readonly share: number;
}

/** Fewest members of a group: one alone is an odd shell, not a group. */
const FEWEST = 2;

/**
 * The split of at least four numbers into two groups of at least two that puts the largest share of the sum of squares
 * between the groups (the clustering criterion of Engelman and Hartigan 1969, Journal of the American Statistical
 * Association 64, 1647–1648).
 *
 * @example
 * bestSplit([5, 1, 1, 5]).share // => 1
 */
export function bestSplit(values: readonly number[]): Split {
  const sorted = [...values].sort((a, b) => a - b);
  const n = sorted.length;
  const total = sorted.reduce((sum, x) => sum + x, 0);
  const mean = total / n;
  const all = sorted.reduce((sum, x) => sum + (x - mean) ** 2, 0);
  let best = -1;
  let cut = FEWEST;
  let running = sorted[0];
  for (let k = FEWEST; k <= n - FEWEST; k++) {
    running += sorted[k - 1];
    const between = k * (running / k - mean) ** 2 + (n - k) * ((total - running) / (n - k) - mean) ** 2;
    if (between > best) [best, cut] = [between, k];
  }
  return { lower: sorted.slice(0, cut), upper: sorted.slice(cut), share: all > 0 ? best / all : 0 };
}

/**
 * Probability that a normal sample of n numbers splits as clearly as `share` or more clearly: parametric bootstrap,
 * (1 + hits)/(1 + draws), so never 0.
 *
 * @param cache Shares drawn before, by n; added to.
 */
export function splitTest(
  share: number,
  n: number,
  cache: Map<number, Float64Array>,
  random: Random,
  simulations: number,
): number {
  let shares = cache.get(n);
  if (shares === undefined) {
    const own = random.fork(n);
    shares = Float64Array.from(
      { length: simulations },
      () => bestSplit(Array.from({ length: n }, () => own.normal())).share,
    );
    cache.set(n, shares);
  }
  const hits = shares.reduce((count, drawn) => count + (drawn >= share ? 1 : 0), 0);
  return (1 + hits) / (1 + shares.length);
}
