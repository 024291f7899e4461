const LOG_ROOT_TWO_PI = 0.9189385332046727;

/** exp of less than this is lost beside 1. */
const LOST = -40;

/** Bed means with known errors. */
export interface MixtureData {
  readonly values: readonly number[];
  readonly variances: Float64Array;
  /** Smallest total variance of a bed. */
  readonly floor: number;
}

/** Parameters of a mixture with one spread. */
export interface MixtureState {
  readonly means: Float64Array;
  readonly weights: Float64Array;
  readonly tau2: number;
}

/**
 * Expectation: fills `responsibilities` (zone j of bed b at `b * k + j`) for the parameters and gives their log-likelihood.
 */
export function expectation(
  { values, variances, floor }: MixtureData,
  state: MixtureState,
  responsibilities: Float64Array,
): number {
  const { means, weights, tau2 } = state;
  const k = means.length;
  const logWeights = weights.map((weight) => (weight > 0 ? Math.log(weight) : Number.NEGATIVE_INFINITY));
  let total = 0;
  let variance = Number.NaN;
  let half = 0;
  let constant = 0;
  for (let bed = 0, at = 0; bed < values.length; bed++, at += k) {
    const own = Math.max(tau2 + variances[bed], floor);
    // many beds have equally many shells, and so the same error as the bed before
    if (own !== variance) {
      variance = own;
      half = 0.5 / own;
      constant = -LOG_ROOT_TWO_PI - 0.5 * Math.log(own);
    }
    let largest = Number.NEGATIVE_INFINITY;
    for (let j = 0; j < k; j++) {
      const d = values[bed] - means[j];
      const log = logWeights[j] - half * d * d;
      responsibilities[at + j] = log;
      if (log > largest) largest = log;
    }
    let sum = 0;
    for (let j = 0; j < k; j++) {
      const below = responsibilities[at + j] - largest;
      const share = below === 0 ? 1 : below < LOST ? 0 : Math.exp(below);
      responsibilities[at + j] = share;
      sum += share;
    }
    if (sum !== 1) for (let j = 0; j < k; j++) responsibilities[at + j] /= sum;
    total += largest + constant + (sum === 1 ? 0 : Math.log(sum));
  }
  return total;
}

/**
 * Conditional maximisation: weights, then means at the last spread, then the spread at these means. A zone that no bed belongs to
 * keeps its mean.
 */
export function maximisation(data: MixtureData, last: MixtureState, responsibilities: Float64Array): MixtureState {
  const { values, variances, floor } = data;
  const n = values.length;
  const k = last.means.length;
  const sumR = new Float64Array(k);
  const sumRW = new Float64Array(k);
  const sumRWX = new Float64Array(k);
  for (let bed = 0, at = 0; bed < n; bed++, at += k) {
    const w = 1 / Math.max(last.tau2 + variances[bed], floor);
    const wx = w * values[bed];
    for (let j = 0; j < k; j++) {
      const r = responsibilities[at + j];
      if (r === 0) continue;
      sumR[j] += r;
      sumRW[j] += r * w;
      sumRWX[j] += r * wx;
    }
  }
  const means = last.means.map((mean, j) => (sumRW[j] > 0 ? sumRWX[j] / sumRW[j] : mean));
  return { means, weights: sumR.map((sum) => sum / n), tau2: spreadGiven(data, means, responsibilities, last.tau2) };
}

/**
 * The spread tau² that maximises the expected log-likelihood for given responsibilities and means:
 * the root of Σ (D_b − tau² − se_b²)/(tau² + se_b²)², D_b the expected squared distance of bed b from its zone; 0 when
 * the slope at 0 is not upward.
 */
function spreadGiven(
  { values, variances, floor }: MixtureData,
  means: Float64Array,
  responsibilities: Float64Array,
  last: number,
): number {
  const n = values.length;
  const k = means.length;
  const distances = new Float64Array(n);
  let high = 0;
  for (let bed = 0, at = 0; bed < n; bed++, at += k) {
    let sum = 0;
    for (let j = 0; j < k; j++) {
      const r = responsibilities[at + j];
      if (r !== 0) sum += r * (values[bed] - means[j]) ** 2;
    }
    distances[bed] = sum;
    if (sum > high) high = sum;
  }
  let low = 0;
  // Newton's steps from the last spread, halving the bracket where a step would leave it.
  let tau2 = 0;
  for (let step = 0; step < 60 && high - low > 1e-13 * (1 + high); step++) {
    let slope = 0;
    let bend = 0;
    for (let bed = 0; bed < n; bed++) {
      const inverse = 1 / Math.max(tau2 + variances[bed], floor);
      const ratio = distances[bed] * inverse;
      slope += (ratio - 1) * inverse;
      bend += (1 - 2 * ratio) * inverse * inverse;
    }
    if (slope > 0) low = tau2;
    else if (tau2 === 0) return 0;
    else high = tau2;
    const newton = tau2 - slope / bend;
    const next = step === 0 && last > 0 ? last : newton > low && newton < high ? newton : (low + high) / 2;
    if (step > 1 && Math.abs(next - tau2) <= 1e-10 * (1e-6 + tau2)) return next;
    tau2 = next;
  }
  return tau2;
}
