import type { SectionRow } from '../model/index.js';
import {
  chiSquaredUpperTail,
  emptyPools,
  fUpperTail,
  holm,
  isotonicRegression,
  poolAdjacent,
  type Random,
} from '../statistics/index.js';

/** One bed of a section with its place in the order. */
export interface PlacedBed {
  /** Upwards from the lowest bed: a bed of smaller rank is older. Beds of equal rank are not ordered. */
  readonly rank: number;
  /** Mean log ratio and its standard error; a bed with NaN is passed over. */
  readonly mean: number;
  readonly se: number;
}

/** The beds of one section. */
export interface SectionOfBeds {
  readonly section: string;
  readonly beds: readonly PlacedBed[];
}

/** Options of {@link checkSections}. */
export interface SectionCheckOptions {
  /** Level of the test over all sections together. Default 0.05. */
  readonly alpha?: number;
  /**
   * Degrees of freedom of the pooled scatter behind the standard errors; Infinity where it is known. Default Infinity.
   */
  readonly df?: number;
  /** Draws at equal means a section. Default 999. */
  readonly simulations?: number;
}

/** Whether the means of one section can have risen downwards throughout. */
export interface SectionCheck {
  readonly section: string;
  /** Beds that have a mean. */
  readonly beds: number;
  /** Σ w (m − m*)² over the levels; null with fewer than two levels. */
  readonly statistic: number | null;
  /**
   * Probability of so large a statistic, or a larger one, where all beds are of one age: the case hardest to tell from
   * order.
   */
  readonly p_order: number | null;
  readonly verdict: SectionRow['verdict'];
  /** Isotonic mean m* of each bed in input order; NaN where the bed has no mean. */
  readonly fitted: readonly number[];
}

/**
 * Tests for every section whether its bed means, taken together, can be in order: log ratios that do not fall
 * downwards. The statistic is Σ w (m − m*)² with w = 1/se² and m* the isotonic regression; beds that share a rank are
 * averaged first, since nothing orders them among themselves.
 *
 * At equal means (the least favourable case of the hypothesis of order) the statistic follows a mixture of chi-squares
 * with k − l degrees of freedom, l being the number of distinct values in m*; the weights of the mixture are simulated
 * from the seeded generator, so p has no floor at 1/simulations. Where the scatter was estimated on df degrees of
 * freedom, F distributions take the place of chi-squares. A section is `inconsistent` where its p, adjusted by Holm
 * over the sections tested, is at most alpha: the chance that any section in order is so called is at most alpha.
 *
 * Sources: Barlow, Bartholomew, Bremner and Brunk 1972, Statistical Inference under Order Restrictions; Robertson,
 * Wright and Dykstra 1988, Order Restricted Statistical Inference, chapter 2; Holm 1979, Scandinavian Journal of
 * Statistics 6, 65–70.
 *
 * @param random Seeded generator; each pattern of weights draws from a fork of its own.
 * @throws RangeError when alpha, df or simulations make no sense.
 * @example
 * const beds = [{ rank: 1, mean: -0.9, se: 0.03 }, { rank: 2, mean: -0.6, se: 0.03 }, { rank: 3, mean: -1.2, se: 0.03 }];
 * checkSections([{ section: 'Cove', beds }], createRandom(1))[0]?.verdict // => 'inconsistent'
 */
export function checkSections(
  sections: readonly SectionOfBeds[],
  random: Random,
  options: SectionCheckOptions = {},
): SectionCheck[] {
  const alpha = options.alpha ?? 0.05;
  const df = options.df ?? Number.POSITIVE_INFINITY;
  const simulations = options.simulations ?? 999;
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`checkSections: alpha must lie between 0 and 1, got ${alpha}`);
  if (!(df > 0)) throw new RangeError(`checkSections: df must be above 0, got ${df}`);
  if (!(simulations >= 1)) throw new RangeError(`checkSections: simulations must be at least 1, got ${simulations}`);

  // Sections of equally weighted beds share the weights of the mixture, which alone are simulated. These hardly hang on how
  // the beds are weighted: weights are taken to a tenth, which moves them by far less than the simulation leaves open.
  const mixtures = new Map<string, readonly number[]>();
  const mixtureOf = (weights: readonly number[]): readonly number[] => {
    const steps = weights.map((weight) => Math.round(10 * Math.log(weight / weights[0])));
    const key = steps.join(' ');
    let known = mixtures.get(key);
    if (known === undefined) {
      const rounded = steps.map((step) => Math.exp(step / 10));
      known = simulateDistinct(rounded, random.fork(mixtures.size), simulations);
      mixtures.set(key, known);
    }
    return known;
  };
  const tests = sections.map((section) => testSection(section, mixtureOf, df));
  const tested = tests.filter((test) => test.p !== null);
  const adjusted = holm(tested.map((test) => test.p ?? 1));
  const adjustedOf = new Map(tested.map((test, index) => [test, adjusted[index] ?? 1]));
  return tests.map((test, index) => {
    const p = adjustedOf.get(test);
    const verdict = p === undefined ? 'not tested' : p <= alpha ? 'inconsistent' : 'consistent';
    const section = sections[index]?.section ?? '';
    return { section, beds: test.beds, statistic: test.statistic, p_order: test.p, verdict, fitted: test.fitted };
  });
}

interface SectionTest {
  readonly beds: number;
  readonly statistic: number | null;
  readonly p: number | null;
  readonly fitted: readonly number[];
}

function testSection(
  section: SectionOfBeds,
  mixtureOf: (weights: readonly number[]) => readonly number[],
  df: number,
): SectionTest {
  const ranks = [...new Set(section.beds.filter(hasMean).map((bed) => bed.rank))].sort((a, b) => a - b);
  const levels = ranks.map((rank) => levelMean(section.beds.filter((bed) => bed.rank === rank && hasMean(bed))));
  const beds = section.beds.filter(hasMean).length;
  // Ratios fall upwards, so the regression rises along minus the mean.
  const weights = levels.map((level) => level.weight);
  const fit = isotonicRegression(
    levels.map((level) => -level.mean),
    weights,
  ).map((value) => -value);
  const fitted = section.beds.map((bed) => (hasMean(bed) ? (fit[ranks.indexOf(bed.rank)] ?? Number.NaN) : Number.NaN));
  if (levels.length < 2) return { beds, statistic: null, p: null, fitted };
  const statistic = levels.reduce(
    (sum, level, i) => sum + level.weight * (level.mean - (fit[i] ?? level.mean)) ** 2,
    0,
  );
  const p = statistic > 0 ? tailProbability(statistic, mixtureOf(weights), df) : 1;
  return { beds, statistic, p, fitted };
}

function hasMean(bed: PlacedBed): boolean {
  return Number.isFinite(bed.mean) && bed.se > 0;
}

function levelMean(beds: readonly PlacedBed[]): { mean: number; weight: number } {
  const weight = beds.reduce((sum, bed) => sum + 1 / (bed.se * bed.se), 0);
  return { mean: beds.reduce((sum, bed) => sum + bed.mean / (bed.se * bed.se), 0) / weight, weight };
}

/** Share of draws at equal means whose isotonic regression has l distinct values, at index l. */
function simulateDistinct(weights: readonly number[], random: Random, simulations: number): number[] {
  const shares = new Array<number>(weights.length + 1).fill(0);
  const sd = weights.map((weight) => 1 / Math.sqrt(weight));
  const drawn = new Float64Array(sd.length);
  const pools = emptyPools(sd.length);
  for (let draw = 0; draw < simulations; draw++) {
    for (let at = 0; at < drawn.length; at++) drawn[at] = sd[at] * random.normal();
    shares[poolAdjacent(drawn, weights, pools)] += 1 / simulations;
  }
  return shares;
}

/**
 * P(statistic ≥ observed) at equal means: Σ over l of P(l distinct values) · P(χ² with k − l degrees of freedom ≥
 * observed).
 */
function tailProbability(statistic: number, shares: readonly number[], df: number): number {
  const k = shares.length - 1;
  let p = 0;
  for (let distinct = 1; distinct < k; distinct++) {
    if (shares[distinct] === 0) continue;
    const free = k - distinct;
    p +=
      shares[distinct] *
      (Number.isFinite(df) ? fUpperTail(statistic / free, free, df) : chiSquaredUpperTail(statistic, free));
  }
  return Math.min(1, Math.max(0, p));
}
