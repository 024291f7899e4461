import type { AdjacentVerdict } from '../model/index.js';
import { type MannWhitney, mannWhitney, normalCdf, quantile, type Random, studentTCdf } from '../statistics/index.js';

/** Overlap of two equal normals whose ±1 standard deviation ranges just touch: 2Φ(−1). */
export const TOUCHING_OVERLAP = 0.31731050786291415;

/** One zone as the tests between neighbours see it. */
export interface ZoneForTest {
  /** Mean log ratio, its standard error with bed-level errors, and the degrees of freedom of that. */
  readonly mean: number;
  readonly se: number;
  readonly df: number;
  /** Number of shells behind the zone, published ones included. */
  readonly count: number;
}

/** What is common to the zones of a clock. */
export interface NeighbourOptions {
  readonly alpha: number;
  /** Standard deviation of a shell about its zone's mean: sqrt(s² + tau²), and the degrees of freedom of s. */
  readonly shellSd: number;
  readonly scatterDf: number;
  readonly random: Random;
  /** Repeats behind the interval of the overlap. Default 999. */
  readonly simulations?: number;
}

/** The tests of design 7.4 between two neighbouring zones. */
export interface NeighbourTest {
  readonly difference: number;
  readonly p_difference: number;
  readonly overlap: number;
  readonly overlap_low: number;
  readonly overlap_high: number;
  readonly one_sigma_overlap: boolean;
  readonly verdict: AdjacentVerdict;
}

/**
 * Are two neighbouring zones really distinct? (design 7.4)
 *
 * `difference` and its p rest on bed-level errors (Welch's t with Satterthwaite's degrees of freedom). The overlap
 * coefficient of the two shell distributions is that of normals of equal scatter, 2Φ(−|δ|/2σ) (Inman and Bradley 1989,
 * doi:10.1080/03610928908830127), with a 95 % interval from a parametric bootstrap of bed-level means and scatter.
 *
 * `distinct`: p at most alpha and overlap at most 2Φ(−1). `not distinct`: the whole interval of the overlap lies above that,
 * or the means do not differ at alpha though the samples could have shown it. Everything else is `not resolved`: an overlap
 * whose interval holds the limit, or samples in which no ranking could reach alpha. Groups found in the same data flatter
 * the p-values; the number of zones rests on the choice among models, not on them.
 */
export function testNeighbours(older: ZoneForTest, younger: ZoneForTest, options: NeighbourOptions): NeighbourTest {
  const { alpha, shellSd, random, scatterDf, simulations = 999 } = options;
  const difference = older.mean - younger.mean;
  const se = Math.hypot(older.se, younger.se);
  const df = se ** 4 / (older.se ** 4 / older.df + younger.se ** 4 / younger.df);
  const p = se > 0 ? 2 * studentTCdf(-Math.abs(difference) / se, df) : difference === 0 ? 1 : 0;
  const overlap = equalOverlap(difference, shellSd);
  const drawn = Array.from({ length: simulations }, () => {
    const scale = scatterDf > 0 ? Math.sqrt(scatterDf / (2 * random.gamma(scatterDf / 2))) : 1;
    return equalOverlap(difference + se * random.normal(), shellSd * scale);
  });
  const [low, high] = [quantile(drawn, 0.025), quantile(drawn, 0.975)];
  const powerless = smallestRankP(older.count, younger.count) > alpha;
  return {
    difference,
    p_difference: p,
    overlap,
    overlap_low: low,
    overlap_high: high,
    one_sigma_overlap: overlap > TOUCHING_OVERLAP,
    verdict: verdictOf(powerless, p <= alpha, overlap, low),
  };

  function verdictOf(weak: boolean, differs: boolean, value: number, lower: number): AdjacentVerdict {
    if (weak) return 'not resolved';
    if (lower > TOUCHING_OVERLAP || !differs) return 'not distinct';
    return value <= TOUCHING_OVERLAP ? 'distinct' : 'not resolved';
  }
}

/**
 * Mann–Whitney U of the log ratios of the shells of two zones, the older one first. It decides nothing, and is worked out
 * for zones that are reported.
 * @returns null where only summaries are known of a zone
 */
export function rankTest(older: readonly number[], younger: readonly number[]): MannWhitney | null {
  return older.length > 0 && younger.length > 0 ? mannWhitney(older, younger) : null;
}

/** Overlap coefficient of two normals of one standard deviation, `difference` apart. */
export function equalOverlap(difference: number, sd: number): number {
  if (!(sd > 0)) return difference === 0 ? 1 : 0;
  return 2 * normalCdf(-Math.abs(difference) / (2 * sd));
}

/**
 * Smallest two-sided p that a comparison of ranks of n and m shells can reach: 2/C(n + m, n).
 * @example
 * smallestRankP(3, 3) // => 0.1
 */
export function smallestRankP(n: number, m: number): number {
  let ways = 1;
  for (let i = 1; i <= n; i++) {
    ways *= (m + i) / i;
    if (ways > 1e12) return 2e-12;
  }
  return Math.min(1, 2 / ways);
}
