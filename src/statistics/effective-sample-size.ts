import { allEqual, chainVariances, rankNormalised, splitChains } from './chains.js';
import type { Numbers } from './check.js';

/** Options of the checks of sampled chains. */
export interface ChainOptions {
  /** Judge normal scores of the ranks instead of the draws themselves, so that heavy tails don't blind it. Default true. */
  readonly rankNormalise?: boolean;
}

/**
 * Number of independent draws that would estimate a mean as well as these chains do ("bulk" effective sample size).
 *
 * Vehtari and others 2021 (10.1214/20-BA1221): split chains, rank-normalised unless told otherwise, autocorrelations
 * combined over chains and summed by Geyer's initial monotone sequence (1992, 10.1214/ss/1177011137); at most
 * S log10(S) for S draws. Chains that never move from one common value give S.
 *
 * @param chains one list of draws a chain, all of one length, at least 4 draws each
 * @throws RangeError when there is no chain, lengths differ, draws are too few or not finite
 * @example
 * ```ts
 * effectiveSampleSize([[1, 1, 1, 1]]); // => 4
 * ```
 */
export function effectiveSampleSize(chains: ArrayLike<Numbers>, options: ChainOptions = {}): number {
  const halves = splitChains('effectiveSampleSize', chains);
  const draws = halves.length * halves[0].length;
  if (allEqual(halves)) return draws;
  const judged = (options.rankNormalise ?? true) ? rankNormalised(halves) : halves;
  const length = autocorrelationLength(judged);
  return draws / Math.max(length, 1 / Math.log10(draws));
}

/** −1 + 2 Σ ρ over the initial monotone sequence of pairs. */
function autocorrelationLength(chains: readonly Float64Array[]): number {
  const n = chains[0].length;
  const { within, whole } = chainVariances(chains);
  const centred = chains.map((chain) => {
    const mean = chain.reduce((sum, x) => sum + x, 0) / n;
    return chain.map((x) => x - mean);
  });
  const correlation = (lag: number): number => {
    if (lag === 0) return 1;
    if (lag >= n) return 0;
    let sum = 0;
    for (const chain of centred) for (let i = lag; i < n; i++) sum += chain[i] * chain[i - lag];
    return 1 - (within - sum / n / chains.length) / whole;
  };
  let total = -1;
  let previous = Infinity;
  for (let lag = 0; ; lag += 2) {
    const even = correlation(lag);
    const pair = even + correlation(lag + 1);
    if (!(pair > 0) || lag >= n) return total + Math.max(even, 0);
    previous = Math.min(previous, pair);
    total += 2 * previous;
  }
}
