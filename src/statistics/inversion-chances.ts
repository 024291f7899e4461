/**
 * Chance of each number of discordant pairs between two orders of n things that have nothing to do with each other
 * (Kendall 1938, 10.1093/biomet/30.1-2.81).
 *
 * @example
 * ```ts
 * [...inversionChances(3)].map((chance) => 6 * chance); // => [1, 2, 2, 1]
 * ```
 */
export function inversionChances(n: number): Float64Array {
  let chances = Float64Array.of(1);
  for (let k = 2; k <= n; k++) {
    // The k-th thing takes part in 0 to k − 1 of them, all equally likely.
    const next = new Float64Array(chances.length + k - 1);
    for (let d = 0; d < chances.length; d++) {
      const share = chances[d] / k;
      for (let more = 0; more < k; more++) next[d + more] += share;
    }
    chances = next;
  }
  return chances;
}
