import { acceleratedClimb } from './accelerated-climb.js';
import { emptyMoments, type MixtureData, type MixtureState, maximisation, mixtureData } from './em-step.js';
import { partition } from './partition.js';

/** A normal mixture with known errors, fitted to bed means. Components go from the smallest mean (youngest) upwards. */
export interface Mixture {
  readonly k: number;
  readonly means: readonly number[];
  readonly weights: readonly number[];
  /** Spread between the beds of one zone beyond their errors, the same for all zones. */
  readonly tau: number;
  readonly logLikelihood: number;
  /** Posterior probability of zone j for bed b at `b * k + j`. */
  readonly responsibilities: Float64Array;
}

/** Options of {@link fitMixture}. */
export interface MixtureOptions {
  /** Stop when the log-likelihood gains less than this in a step. Default 1e-9, more for more than 20 beds. */
  readonly tolerance?: number;
  /** Default 2000. */
  readonly iterations?: number;
  /** A partition to start from beside those of the design (labels 0..k-1). Default none. */
  readonly start?: readonly number[];
  /** Parameters near the answer, in place of all other starts: one climb, for refits of drawn samples. Default none. */
  readonly near?: Pick<Mixture, 'means' | 'weights' | 'tau'>;
}

/**
 * Fits m_b ~ Σ π_k N(μ_k, tau² + se_b²) by expectation and conditional maximisation (Dempster, Laird and Rubin 1977,
 * doi:10.1111/j.2517-6161.1977.tb01600.x; Meng and Rubin 1993, doi:10.1093/biomet/80.2.267), started from the exact
 * weighted partitions of the means without spread and with much spread; the better end wins (design 7.3).
 * @param values bed means of log ratios
 * @param errors their standard errors, 0 or more
 * @param k number of zones, 1 to the number of beds
 */
export function fitMixture(
  values: readonly number[],
  errors: readonly number[],
  k: number,
  options: MixtureOptions = {},
): Mixture {
  const data = mixtureData(values, errors);
  if (options.near !== undefined) return climbFrom(data, options.near, options);
  if (options.start === undefined && values.length > MANY_BEDS) {
    return climbFrom(data, fitThinned(values, errors, k), options);
  }
  const starts = options.start === undefined ? [] : [options.start];
  starts.push(
    partition(
      values,
      errors.map((se) => 1 / Math.max(se * se, data.floor)),
      k,
    ),
  );
  const flat = partition(values, new Array<number>(values.length).fill(1), k);
  if (flat.some((label, bed) => label !== starts[starts.length - 1][bed])) starts.push(flat);
  let best: Mixture | null = null;
  for (const start of starts) {
    const fit = climbFromPartition(data, k, start, options);
    if (best === null || fit.logLikelihood > best.logLikelihood) best = fit;
  }
  return best!;
}

/** Beds above which the search is made on some of them, and all of them only climb from where it ended. */
export const MANY_BEDS = 600;

/** The fit of every second, third … bed in order of value, which spread as all of them do. */
function fitThinned(values: readonly number[], errors: readonly number[], k: number): Mixture {
  const order = values.map((_, bed) => bed).sort((a, b) => values[a] - values[b] || errors[a] - errors[b] || a - b);
  const step = Math.ceil(values.length / (MANY_BEDS / 2));
  const some = order.filter((_, at) => at % step === step >> 1);
  const few = Math.max(k, 1) > some.length ? order : some;
  return fitMixture(
    few.map((bed) => values[bed]),
    few.map((bed) => errors[bed]),
    k,
    // only where to start from
    { tolerance: 1e-3 },
  );
}

/** From a partition. */
function climbFromPartition(data: MixtureData, k: number, labels: readonly number[], options: MixtureOptions): Mixture {
  const { values, group, variances } = data;
  const sums = new Float64Array(k);
  const beds = new Float64Array(k);
  labels.forEach((label, bed) => {
    sums[label] += values[bed];
    beds[label]++;
  });
  const means = sums.map((sum, j) => (beds[j] > 0 ? sum / beds[j] : 0));
  const moments = emptyMoments(data, k);
  let excess = 0;
  labels.forEach((label, bed) => {
    const off = values[bed] - means[label];
    const at = group[bed] * k + label;
    moments.share[at]++;
    moments.first[at] += off;
    moments.second[at] += off * off;
    excess += off * off - variances[group[bed]];
  });
  const blank = { means, weights: new Float64Array(k), tau2: Math.max(0, excess / values.length) };
  return climb(data, maximisation(data, blank, moments), options);
}

/** From parameters. Weights are kept off 0, from which they could not rise. */
function climbFrom(data: MixtureData, near: NonNullable<MixtureOptions['near']>, options: MixtureOptions): Mixture {
  const state = {
    means: Float64Array.from(near.means),
    weights: Float64Array.from(near.weights, (weight) => Math.max(weight, 0.5 / data.values.length)),
    tau2: near.tau ** 2,
  };
  return climb(data, state, options);
}

function climb(
  data: MixtureData,
  start: MixtureState,
  { tolerance = toleranceFor(data.values.length), iterations = 2000 }: MixtureOptions,
): Mixture {
  const { state, logLikelihood, responsibilities } = acceleratedClimb(data, start, tolerance, iterations);
  return sorted({
    k: state.means.length,
    means: [...state.means],
    weights: [...state.weights],
    tau: Math.sqrt(state.tau2),
    logLikelihood,
    responsibilities,
  });
}

/** With very many beds a gain of 0.01 is lost beside the log of their number that BIC asks for each parameter. */
const toleranceFor = (beds: number): number => (beds > MANY_BEDS ? 1e-2 : 1e-9 * Math.max(1, beds / 20));

function sorted(fit: Mixture): Mixture {
  const { k } = fit;
  const order = fit.means.map((_, j) => j).sort((a, b) => fit.means[a] - fit.means[b]);
  if (order.every((j, at) => j === at)) return fit;
  const responsibilities = new Float64Array(fit.responsibilities.length);
  for (let at = 0; at < responsibilities.length; at++) {
    const bed = Math.floor(at / k);
    responsibilities[at] = fit.responsibilities[bed * k + order[at % k]];
  }
  return {
    ...fit,
    means: order.map((j) => fit.means[j]),
    weights: order.map((j) => fit.weights[j]),
    responsibilities,
  };
}

/** Bayesian information criterion (Schwarz 1978, doi:10.1214/aos/1176344136): smaller is better. */
export function bic(logLikelihood: number, parameters: number, observations: number): number {
  return -2 * logLikelihood + parameters * Math.log(observations);
}
