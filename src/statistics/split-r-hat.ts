import { allEqual, chainVariances, rankNormalised, splitChains } from './chains.js';
import type { Numbers } from './check.js';
import type { ChainOptions } from './effective-sample-size.js';
import { medianOfSorted } from './quantile.js';

/**
 * Do the chains agree? The potential scale reduction of split chains: near 1 (below 1.01) when they do.
 *
 * Vehtari and others 2021 (10.1214/20-BA1221): by default the larger of two values, one on normal scores of the ranks,
 * which sees different centres, and one on normal scores of the distances from the median, which sees different spreads.
 * With `rankNormalise: false` the plain split value on the draws themselves. Chains that never move from one common
 * value give 1; chains that each stand still at different values give Infinity.
 *
 * @param chains one list of draws a chain, all of one length, at least 4 draws each
 * @throws RangeError when there is no chain, lengths differ, draws are too few or not finite
 * @example
 * ```ts
 * splitRHat([[1, 1, 1, 1]]); // => 1
 * ```
 */
export function splitRHat(chains: ArrayLike<Numbers>, options: ChainOptions = {}): number {
  const halves = splitChains('splitRHat', chains);
  if (!(options.rankNormalise ?? true)) return scaleReduction(halves);
  const all = Float64Array.from(halves.flatMap((half) => [...half])).sort();
  const middle = medianOfSorted(all);
  const folded = halves.map((half) => half.map((x) => Math.abs(x - middle)));
  return Math.max(scaleReduction(rankNormalised(halves)), scaleReduction(rankNormalised(folded)));
}

function scaleReduction(chains: readonly Float64Array[]): number {
  if (allEqual(chains)) return 1;
  const { within, whole } = chainVariances(chains);
  return Math.sqrt(whole / within);
}
