import type { Numbers } from './check.js';
import { requireNumbers, requireThat } from './check.js';
import { normalQuantile } from './normal.js';
import { midranks } from './ranks.js';

/**
 * Each chain cut in two halves (the middle draw of an odd number is left out), so that drift within a chain shows.
 *
 * @param chains one list of draws a chain, all of one length, at least 4 draws
 * @throws RangeError when there is no chain, lengths differ, draws are too few or not finite
 * @example
 * ```ts
 * splitChains('example', [[1, 2, 3, 4, 5]]).map((half) => [...half]); // => [[1, 2], [4, 5]]
 * ```
 */
export function splitChains(who: string, chains: ArrayLike<Numbers>): Float64Array[] {
  requireThat(chains.length > 0, who, 'at least one chain', chains.length);
  const half = Math.floor(chains[0].length / 2);
  const halves: Float64Array[] = [];
  for (let c = 0; c < chains.length; c++) {
    const chain = chains[c];
    requireNumbers(who, `draws in chain ${c}`, chain, 4);
    requireThat(chain.length === chains[0].length, who, 'chains of one length', chains[0].length, chain.length);
    const draws = Float64Array.from(chain);
    halves.push(draws.slice(0, half), draws.slice(draws.length - half));
  }
  return halves;
}

/** Draws replaced by normal scores of their ranks over all chains together (Vehtari and others 2021, equation 14). */
export function rankNormalised(chains: readonly Float64Array[]): Float64Array[] {
  const length = chains[0].length;
  const all = new Float64Array(length * chains.length);
  chains.forEach((chain, c) => {
    all.set(chain, c * length);
  });
  const ranks = midranks(all);
  const scores = Float64Array.from(ranks, (rank) => normalQuantile((rank - 0.375) / (all.length + 0.25)));
  return chains.map((_, c) => scores.subarray(c * length, (c + 1) * length));
}

/** Variance within chains, and the overestimate of the whole variance from within and between. */
export function chainVariances(chains: readonly Float64Array[]): { within: number; whole: number } {
  const n = chains[0].length;
  const means = chains.map((chain) => chain.reduce((sum, x) => sum + x, 0) / n);
  let within = 0;
  chains.forEach((chain, c) => {
    let squares = 0;
    for (const x of chain) squares += (x - means[c]) ** 2;
    within += squares / (n - 1) / chains.length;
  });
  const grand = means.reduce((sum, x) => sum + x, 0) / means.length;
  const between = means.reduce((sum, x) => sum + (x - grand) ** 2, 0) / (means.length - 1);
  return { within, whole: ((n - 1) / n) * within + between };
}

/** Is every draw of every chain the same number? */
export function allEqual(chains: readonly Float64Array[]): boolean {
  return chains.every((chain) => chain.every((x) => x === chains[0][0]));
}
