import { AMINO_ACIDS, type AminoAcid, type ScreeningLimits, type ScreeningMark, type Shell } from '../model/index.js';
import { chiSquaredQuantile, median } from '../statistics/index.js';
import { groupsOfShells, shown } from './rule.js';
import { widenedLimit } from './widened-limit.js';

/** Fewest shells with replicates from which the usual disagreement is learned. */
const FEWEST_WITH_REPLICATES = 8;

/**
 * Marks shells whose preparations disagree: the widest difference of log ratios between two of them is beyond the
 * limit (settings key `screening.replicates`, default 3.5) times the standard deviation of such a difference. That is
 * √2 times the within-shell standard deviation, learned for each taxon, fraction and amino acid as a median over
 * shells, which a few bad shells do not move. The limit is widened for few shells, for the number of amino acids and
 * for the number of pairs of preparations. Needs 8 shells with at least two preparations.
 *
 * Source of the rule: Kosnik and Kaufman 2008, Quaternary Geochronology 3, 328–341, 10.1016/j.quageo.2008.03.001.
 */
export function replicatesDisagree(shells: readonly Shell[], limits: ScreeningLimits): ScreeningMark[] {
  const found = new Map<number, { readonly size: number; readonly evidence: string }>();
  for (const group of groupsOfShells(shells)) {
    const members = group.filter((shell) => shells[shell].replicates.length > 1);
    const tested = AMINO_ACIDS.flatMap((code) => {
      const sets = replicateSets(shells, members, code);
      return sets.length < FEWEST_WITH_REPLICATES ? [] : [{ code, sets, ...usualVariance(sets) }];
    }).filter(({ variance }) => variance > 0);
    for (const { code, sets, variance, df } of tested) {
      for (const { shell, logs } of sets) {
        const pairs = (logs.length * (logs.length - 1)) / 2;
        const limit = widenedLimit(limits.replicates, tested.length * pairs, df);
        const range = Math.max(...logs) - Math.min(...logs);
        const size = range / Math.sqrt(2 * variance);
        if (!(size >= limit) || size <= (found.get(shell)?.size ?? 0)) continue;
        const evidence = `preparations of ${code} differ by ${shown(100 * Math.expm1(range))} %, ${shown(size)} times what is usual between two preparations, limit ${shown(limit)}`;
        found.set(shell, { size, evidence });
      }
    }
  }
  return [...found]
    .sort(([a], [b]) => a - b)
    .map(([shell, { evidence }]) => ({ shell, mark: 'replicates disagree' as const, evidence }));
}

interface ReplicateSet {
  readonly shell: number;
  readonly logs: readonly number[];
}

function replicateSets(shells: readonly Shell[], members: readonly number[], code: AminoAcid): ReplicateSet[] {
  const sets: ReplicateSet[] = [];
  for (const shell of members) {
    const logs = shells[shell].replicates.flatMap((ratios) =>
      ratios[code] === undefined ? [] : [Math.log(ratios[code])],
    );
    if (logs.length >= 2) sets.push({ shell, logs });
  }
  return sets;
}

/** Median over shells of their sums of squares, each over the median of its chi-square. */
function usualVariance(sets: readonly ReplicateSet[]): { variance: number; df: number } {
  const medians = new Map<number, number>();
  const scaled = sets.map(({ logs }) => {
    const mean = logs.reduce((sum, value) => sum + value, 0) / logs.length;
    const free = logs.length - 1;
    const middle = medians.get(free) ?? chiSquaredQuantile(0.5, free);
    medians.set(free, middle);
    return logs.reduce((sum, value) => sum + (value - mean) ** 2, 0) / middle;
  });
  const free = sets.reduce((sum, { logs }) => sum + logs.length - 1, 0);
  return { variance: median(scaled), df: Math.max(1, 0.37 * free) };
}
