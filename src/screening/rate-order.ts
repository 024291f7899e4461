import type { ScreeningLimits, ScreeningMark, Shell } from '../model/index.js';
import { type PairCurve, pairCurvesByGroup } from './pair-curves.js';
import { shown } from './rule.js';
import { widenedLimit } from './widened-limit.js';

/** Share of a taxon's shells that must show the same order before it counts as the taxon's order. */
const TYPICAL = 0.9;
/** Robust standard deviations by which a reversed pair must miss what is usual. */
const MISS = 3;

/**
 * Marks shells in which a slow amino acid is ahead of a fast one. Which is the faster is learned from the shells of
 * the taxon and fraction themselves, since it depends on both: a pair counts where at least 90 % of at least 10 shells
 * agree, and the curve of the pair expects that order at the shell's own ratios. The shell must reverse it and miss
 * what is usual by 3 robust standard deviations, widened for the number of pairs. The mark is never a refusal.
 *
 * Published order in *Mercenaria* and *Anadara*: Asp ≥ Ala > Leu > Val (Mirecki, MS thesis, University of Delaware,
 * udspace.udel.edu/handle/19716/13229).
 *
 * @param curves Pairs of amino acids of each taxon and fraction; worked out from the shells when absent.
 */
export function rateOrder(
  shells: readonly Shell[],
  _limits: ScreeningLimits,
  curves: readonly (readonly PairCurve[])[] = pairCurvesByGroup(shells),
): ScreeningMark[] {
  const found = new Map<number, { readonly excess: number; readonly evidence: string }>();
  for (const pairs of curves) {
    for (const { first, second, curve, points } of pairs) {
      const ahead = points.filter((point) => point.difference > 0).length / points.length;
      if (ahead < TYPICAL && ahead > 1 - TYPICAL) continue;
      const sign = ahead >= TYPICAL ? 1 : -1;
      const [fast, slow] = sign > 0 ? [first, second] : [second, first];
      const limit = widenedLimit(MISS, pairs.length, curve.df);
      for (const { shell, difference, expected, sd } of points) {
        const miss = (sign * (expected - difference)) / sd;
        if (!(sign * difference < 0 && sign * expected > 0 && miss >= limit)) continue;
        const excess = -sign * difference;
        if (excess <= (found.get(shell)?.excess ?? 0)) continue;
        const share = Math.round(100 * Math.max(ahead, 1 - ahead));
        const evidence = `${slow} is ahead of ${fast} by ${shown(100 * Math.expm1(excess))} %; in ${share} % of the taxon's shells ${fast} is the faster`;
        found.set(shell, { excess, evidence });
      }
    }
  }
  return [...found]
    .sort(([a], [b]) => a - b)
    .map(([shell, { evidence }]) => ({ shell, mark: 'rate order' as const, evidence }));
}
