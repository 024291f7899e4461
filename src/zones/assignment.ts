/** Probability under which a bed's best zone is said to straddle. */
export const STRADDLE = 0.9;

/** What assignment needs to know of the zones in use. */
export interface ZonePriors {
  /** Mean log ratio of each zone, youngest first. */
  readonly means: readonly number[];
  /** Standard error of each mean. */
  readonly se: readonly number[];
  /** Share of the beds in each zone. */
  readonly weights: readonly number[];
  /** Spread between beds of one zone. */
  readonly tau: number;
}

/** Most and second most probable zone (0 is the youngest). */
export interface Assignment {
  readonly probabilities: readonly number[];
  readonly zone: number;
  readonly probability: number;
  /** null with one zone. */
  readonly second: number | null;
  readonly secondProbability: number | null;
  readonly straddles: boolean;
}

/**
 * Posterior probability of each zone for a log ratio with a known error: π_k N(x; μ_k, tau² + error² + se(μ_k)²)
 * (design 7.5). The error of a bed is that of its mean, that of a shell the scatter.
 * @example
 * assignZone(-1.6, 0.05, { means: [-2, -1.6], se: [0, 0], weights: [0.5, 0.5], tau: 0 }).zone // => 1
 */
export function assignZone(x: number, error: number, priors: ZonePriors): Assignment {
  return zoneAssigner(priors)(x, error);
}

/** {@link assignZone} for many values: what hangs on the error alone is kept from one to the next. */
export function zoneAssigner({ means, se, weights, tau }: ZonePriors): (x: number, error: number) => Assignment {
  const variances = new Float64Array(means.length);
  const heights = new Float64Array(means.length);
  const logs = new Float64Array(means.length);
  let lastError = Number.NaN;
  const prepare = (error: number) => {
    for (let j = 0; j < means.length; j++) {
      variances[j] = Math.max(tau ** 2 + error ** 2 + se[j] ** 2, 1e-18);
      heights[j] = Math.log(Math.max(weights[j], 1e-300)) - 0.5 * Math.log(variances[j]);
    }
    lastError = error;
  };
  return (x, error) => {
    if (error !== lastError) prepare(error);
    let largest = Number.NEGATIVE_INFINITY;
    for (let j = 0; j < means.length; j++) {
      logs[j] = heights[j] - (0.5 * (x - means[j]) ** 2) / variances[j];
      if (logs[j] > largest) largest = logs[j];
    }
    let sum = 0;
    for (let j = 0; j < means.length; j++) {
      logs[j] = Math.exp(logs[j] - largest);
      sum += logs[j];
    }
    const probabilities: number[] = [];
    for (let j = 0; j < means.length; j++) probabilities.push(logs[j] / sum);
    return assignmentOf(probabilities);
  };
}

/** Most and second most probable zone from the probabilities of all, a list that is kept. */
export function assignmentOf(probabilities: number[]): Assignment {
  // sums of many rounded shares may end a hair above 1
  for (let j = 0; j < probabilities.length; j++) if (probabilities[j] > 1) probabilities[j] = 1;
  let zone = 0;
  for (let j = 1; j < probabilities.length; j++) if (probabilities[j] > probabilities[zone]) zone = j;
  let second: number | null = null;
  for (let j = 0; j < probabilities.length; j++) {
    if (j !== zone && (second === null || probabilities[j] > probabilities[second])) second = j;
  }
  return {
    probabilities,
    zone,
    probability: probabilities[zone],
    second,
    secondProbability: second === null ? null : probabilities[second],
    straddles: probabilities[zone] < STRADDLE,
  };
}
