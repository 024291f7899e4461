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
  /** Stop when the log-likelihood gains less than this in an iteration. Default 1e-9. */
  readonly tolerance?: number;
  /** Default 2000. */
  readonly iterations?: number;
  /** A partition to start from beside those of the design (labels 0..k-1). Default none. */
  readonly start?: readonly number[];
  /** Parameters near the answer, in place of all other starts: one climb, for refits of drawn samples. Default none. */
  readonly near?: Pick<Mixture, 'means' | 'weights' | 'tau'>;
}

const LOG_ROOT_TWO_PI = 0.9189385332046727;

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
  const variances = Float64Array.from(errors, (se) => se * se);
  const floor = varianceFloor(values);
  if (options.near !== undefined) return climbFrom(options.near, values, variances, floor, options);
  const starts = options.start === undefined ? [] : [options.start];
  starts.push(
    partition(
      values,
      Array.from(variances, (v) => 1 / Math.max(v, floor)),
      k,
    ),
  );
  const flat = partition(values, new Array<number>(values.length).fill(1), k);
  if (flat.some((label, bed) => label !== starts[starts.length - 1][bed])) starts.push(flat);
  let best: Mixture | null = null;
  for (const start of starts) {
    const fit = maximise(values, variances, k, start, floor, options);
    if (best === null || fit.logLikelihood > best.logLikelihood) best = fit;
  }
  return best!;
}

/** Smallest total variance: without errors (published means alone) a zone of one bed would have none. */
function varianceFloor(values: readonly number[]): number {
  const range = Math.max(...values) - Math.min(...values);
  return Math.max(1e-12, (1e-6 * range) ** 2);
}

/** From a partition. */
function maximise(
  values: readonly number[],
  variances: Float64Array,
  k: number,
  start: readonly number[],
  floor: number,
  options: MixtureOptions,
): Mixture {
  const responsibilities = new Float64Array(values.length * k);
  start.forEach((label, bed) => {
    responsibilities[bed * k + label] = 1;
  });
  const tau2 = startingSpread(values, variances, start, k);
  return climb({ k, means: new Float64Array(k), tau2, responsibilities }, values, variances, floor, options);
}

/** From parameters. Weights are kept off 0, from which they could not rise. */
function climbFrom(
  near: NonNullable<MixtureOptions['near']>,
  values: readonly number[],
  variances: Float64Array,
  floor: number,
  options: MixtureOptions,
): Mixture {
  const k = near.means.length;
  const means = Float64Array.from(near.means);
  const weights = Float64Array.from(near.weights, (weight) => Math.max(weight, 0.5 / values.length));
  const responsibilities = new Float64Array(values.length * k);
  expectation(values, variances, means, weights, near.tau ** 2, floor, responsibilities);
  return climb({ k, means, tau2: near.tau ** 2, responsibilities }, values, variances, floor, options);
}

function climb(
  start: { k: number; means: Float64Array; tau2: number; responsibilities: Float64Array },
  values: readonly number[],
  variances: Float64Array,
  floor: number,
  { tolerance = 1e-9, iterations = 2000 }: MixtureOptions,
): Mixture {
  const n = values.length;
  const { k, means, responsibilities } = start;
  let { tau2 } = start;
  const weights = new Float64Array(k);
  let logLikelihood = Number.NEGATIVE_INFINITY;
  for (let iteration = 0; iteration < iterations; iteration++) {
    for (let j = 0; j < k; j++) {
      let sumR = 0;
      let sumRW = 0;
      let sumRWX = 0;
      for (let bed = 0; bed < n; bed++) {
        const r = responsibilities[bed * k + j];
        const w = r / Math.max(tau2 + variances[bed], floor);
        sumR += r;
        sumRW += w;
        sumRWX += w * values[bed];
      }
      weights[j] = sumR / n;
      if (sumRW > 0) means[j] = sumRWX / sumRW;
    }
    tau2 = spreadGiven(values, variances, means, responsibilities, k, floor, tau2);
    const next = expectation(values, variances, means, weights, tau2, floor, responsibilities);
    if (next - logLikelihood < tolerance && iteration > 2) {
      logLikelihood = Math.max(next, logLikelihood);
      break;
    }
    logLikelihood = next;
  }
  return sorted({ k, means: [...means], weights: [...weights], tau: Math.sqrt(tau2), logLikelihood, responsibilities });
}

function startingSpread(
  values: readonly number[],
  variances: Float64Array,
  labels: readonly number[],
  k: number,
): number {
  const sums = new Float64Array(k);
  const counts = new Float64Array(k);
  labels.forEach((label, bed) => {
    sums[label] += values[bed];
    counts[label]++;
  });
  let excess = 0;
  labels.forEach((label, bed) => {
    excess += (values[bed] - sums[label] / counts[label]) ** 2 - variances[bed];
  });
  return Math.max(0, excess / values.length);
}

/** Fills the responsibilities for the present parameters and gives the log-likelihood. */
function expectation(
  values: readonly number[],
  variances: Float64Array,
  means: Float64Array,
  weights: Float64Array,
  tau2: number,
  floor: number,
  responsibilities: Float64Array,
): number {
  const k = means.length;
  let total = 0;
  const logs = new Float64Array(k);
  for (let bed = 0; bed < values.length; bed++) {
    const variance = Math.max(tau2 + variances[bed], floor);
    const constant = -LOG_ROOT_TWO_PI - 0.5 * Math.log(variance);
    let largest = Number.NEGATIVE_INFINITY;
    for (let j = 0; j < k; j++) {
      const d = values[bed] - means[j];
      logs[j] = weights[j] > 0 ? Math.log(weights[j]) + constant - (0.5 * d * d) / variance : Number.NEGATIVE_INFINITY;
      if (logs[j] > largest) largest = logs[j];
    }
    let sum = 0;
    for (let j = 0; j < k; j++) sum += Math.exp(logs[j] - largest);
    for (let j = 0; j < k; j++) responsibilities[bed * k + j] = Math.exp(logs[j] - largest) / sum;
    total += largest + Math.log(sum);
  }
  return total;
}

/**
 * The spread tau² that maximises the expected log-likelihood for given responsibilities and means:
 * the root of Σ (D_b − tau² − se_b²)/(tau² + se_b²)², D_b the expected squared distance of bed b from its zone; 0 when
 * the slope at 0 is not upward.
 */
function spreadGiven(
  values: readonly number[],
  variances: Float64Array,
  means: Float64Array,
  responsibilities: Float64Array,
  k: number,
  floor: number,
  last: number,
): number {
  const n = values.length;
  const distances = new Float64Array(n);
  let largest = 0;
  for (let bed = 0; bed < n; bed++) {
    let sum = 0;
    for (let j = 0; j < k; j++) sum += responsibilities[bed * k + j] * (values[bed] - means[j]) ** 2;
    distances[bed] = sum;
    if (sum > largest) largest = sum;
  }
  let low = 0;
  let high = largest;
  // Newton's steps from the last spread, halving the bracket where a step would leave it.
  let tau2 = 0;
  for (let step = 0; step < 60 && high - low > 1e-13 * (1 + high); step++) {
    let slope = 0;
    let bend = 0;
    for (let bed = 0; bed < n; bed++) {
      const v = Math.max(tau2 + variances[bed], floor);
      const ratio = distances[bed] / v;
      slope += (ratio - 1) / v;
      bend += (1 - 2 * ratio) / (v * v);
    }
    if (slope > 0) low = tau2;
    else if (tau2 === 0) return 0;
    else high = tau2;
    const newton = tau2 - slope / bend;
    const next = step === 0 && last > 0 ? last : newton > low && newton < high ? newton : (low + high) / 2;
    if (step > 1 && Math.abs(next - tau2) <= 1e-12 * (1e-6 + tau2)) return next;
    tau2 = next;
  }
  return tau2;
}

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
