import type { Random } from '../../src/statistics/random.js';

/** What became of a shell. */
export type ShellKind = 'clean' | 'reworked' | 'intruded' | 'contaminated' | 'altered';

/** D/L of amino acids in a living shell. */
const MODERN_RATIO = 0.02;

/**
 * The ratios and the L-Ser/L-Asp of a shell after what happened to it. A reworked or intruded shell is spoilt in nothing:
 * its ratios are those of the bed it came from.
 */
export function spoil(
  kind: ShellKind,
  ratios: readonly number[],
  serine: number,
  random: Random,
): { ratios: number[]; serine: number } {
  if (kind === 'contaminated') {
    // modern L and D mixed in: an amount of modern amino acid for each unit of the shell's own L, unequal between amino acids
    const amount = 0.35 + 0.35 * random.uniform();
    const mixed = ratios.map((ratio) => {
      const own = amount * (0.4 + 1.2 * random.uniform());
      return (ratio + own * MODERN_RATIO) / (1 + own);
    });
    return { ratios: mixed, serine: 0.85 + 0.6 * random.uniform() };
  }
  if (kind === 'altered') {
    // heat or leaching: the rise runs from next to nothing to twice the mean, dealt out over the amino acids at random
    const rise = 0.3 + 0.25 * random.uniform();
    const shares = ratios.map((_, i) => (ratios.length === 1 ? 1 : (2 * i) / (ratios.length - 1)));
    for (let i = shares.length - 1; i > 0; i--) {
      const j = random.integer(i + 1);
      [shares[i], shares[j]] = [shares[j], shares[i]];
    }
    return { ratios: ratios.map((ratio, i) => ratio * Math.exp(rise * shares[i])), serine };
  }
  return { ratios: [...ratios], serine };
}
