const LOG_ROOT_TWO_PI = 0.9189385332046727;

/** exp of less than this is lost beside 1. */
const LOST = -40;

/** Bed means with known errors, made ready for very many steps. */
export interface MixtureData {
  readonly values: Float64Array;
  /** Beds of equally many shells have equal errors: group of each bed, and error variance and beds of each group. */
  readonly group: Int32Array;
  readonly variances: Float64Array;
  readonly counts: Float64Array;
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
 * What maximisation needs to know of an expectation: sums over the beds of group g of their shares r in zone j, of r·d and of
 * r·d², d the distance from the mean of zone j, at `g * k + j`. To be used again and again.
 */
export interface Moments {
  readonly share: Float64Array;
  readonly first: Float64Array;
  readonly second: Float64Array;
  /** Room for one bed. */
  readonly own: Float64Array;
  readonly off: Float64Array;
}

/**
 * @param values bed means of log ratios
 * @param errors their standard errors, 0 or more
 */
export function mixtureData(values: readonly number[], errors: readonly number[]): MixtureData {
  const known = new Map<number, number>();
  const group = new Int32Array(values.length);
  const counts: number[] = [];
  for (let bed = 0; bed < values.length; bed++) {
    const variance = errors[bed] * errors[bed];
    let own = known.get(variance);
    if (own === undefined) {
      own = known.size;
      known.set(variance, own);
      counts.push(0);
    }
    group[bed] = own;
    counts[own]++;
  }
  return {
    values: Float64Array.from(values),
    group,
    variances: Float64Array.from(known.keys()),
    counts: Float64Array.from(counts),
    floor: varianceFloor(values),
  };
}

/** Smallest total variance: without errors (published means alone) a zone of one bed would have none. */
function varianceFloor(values: readonly number[]): number {
  let least = Number.POSITIVE_INFINITY;
  let most = Number.NEGATIVE_INFINITY;
  for (const value of values) {
    if (value < least) least = value;
    if (value > most) most = value;
  }
  return Math.max(1e-12, (1e-6 * (most - least)) ** 2);
}

/** Room for the moments of k zones. */
export function emptyMoments({ variances }: MixtureData, k: number): Moments {
  const size = variances.length * k;
  return {
    share: new Float64Array(size),
    first: new Float64Array(size),
    second: new Float64Array(size),
    own: new Float64Array(k),
    off: new Float64Array(k),
  };
}

/**
 * Expectation: the log-likelihood of the parameters, and the moments that the next maximisation needs.
 * @param responsibilities filled, where given, with the share of zone j in bed b at `b * k + j`
 */
export function expectation(
  { values, group, variances, floor }: MixtureData,
  { means, weights, tau2 }: MixtureState,
  { share, first, second, own, off }: Moments,
  responsibilities?: Float64Array,
): number {
  const k = means.length;
  const logWeights = weights.map((weight) => (weight > 0 ? Math.log(weight) : Number.NEGATIVE_INFINITY));
  const halves = variances.map((variance) => 0.5 / Math.max(tau2 + variance, floor));
  const constants = halves.map((half) => 0.5 * Math.log(2 * half) - LOG_ROOT_TWO_PI);
  share.fill(0);
  first.fill(0);
  second.fill(0);
  let total = 0;
  for (let bed = 0; bed < values.length; bed++) {
    const half = halves[group[bed]];
    let largest = Number.NEGATIVE_INFINITY;
    for (let j = 0; j < k; j++) {
      const d = values[bed] - means[j];
      off[j] = d;
      own[j] = logWeights[j] - half * d * d;
      if (own[j] > largest) largest = own[j];
    }
    let sum = 0;
    for (let j = 0; j < k; j++) {
      const below = own[j] - largest;
      own[j] = below === 0 ? 1 : below < LOST ? 0 : Math.exp(below);
      sum += own[j];
    }
    total += largest + constants[group[bed]];
    if (sum !== 1) total += Math.log(sum);
    for (let j = 0, at = group[bed] * k; j < k; j++, at++) {
      if (own[j] === 0) continue;
      const r = own[j] / sum;
      own[j] = r;
      share[at] += r;
      first[at] += r * off[j];
      second[at] += r * off[j] * off[j];
    }
    responsibilities?.set(own, bed * k);
  }
  return total;
}

/**
 * Conditional maximisation: weights, then means at the last spread, then the spread at these means. A zone that no bed
 * belongs to keeps its mean.
 */
export function maximisation(data: MixtureData, last: MixtureState, moments: Moments): MixtureState {
  const { values, variances, floor } = data;
  const { share, first } = moments;
  const k = last.means.length;
  const means = new Float64Array(k);
  const weights = new Float64Array(k);
  for (let j = 0; j < k; j++) {
    let beds = 0;
    let weight = 0;
    let sum = 0;
    for (let g = 0, at = j; g < variances.length; g++, at += k) {
      const w = 1 / Math.max(last.tau2 + variances[g], floor);
      beds += share[at];
      weight += w * share[at];
      sum += w * first[at];
    }
    means[j] = weight > 0 ? last.means[j] + sum / weight : last.means[j];
    weights[j] = beds / values.length;
  }
  return { means, weights, tau2: spreadGiven(data, squaresAbout(means, last.means, moments, data), last.tau2) };
}

/** Expected sum of squares of the beds of each group about their zones' new means. */
function squaresAbout(
  means: Float64Array,
  before: Float64Array,
  { share, first, second }: Moments,
  { variances }: MixtureData,
): Float64Array {
  const k = means.length;
  const squares = new Float64Array(variances.length);
  for (let g = 0, at = 0; g < squares.length; g++) {
    let sum = 0;
    for (let j = 0; j < k; j++, at++) {
      const step = means[j] - before[j];
      sum += Math.max(0, second[at] - step * (2 * first[at] - step * share[at]));
    }
    squares[g] = sum;
  }
  return squares;
}

/**
 * The spread tau² that maximises the expected log-likelihood for given responsibilities and means:
 * the root of Σ (D_b − tau² − se_b²)/(tau² + se_b²)², D_b the expected squared distance of bed b from its zone; 0 when
 * the slope at 0 is not upward.
 */
function spreadGiven({ variances, counts, floor }: MixtureData, squares: Float64Array, last: number): number {
  let high = 0;
  for (let g = 0; g < squares.length; g++) high = Math.max(high, squares[g] / counts[g]);
  let low = 0;
  // Newton's steps from the last spread, halving the bracket where a step would leave it.
  let tau2 = 0;
  for (let step = 0; step < 60 && high - low > 1e-13 * (1 + high); step++) {
    let slope = 0;
    let bend = 0;
    for (let g = 0; g < squares.length; g++) {
      const inverse = 1 / Math.max(tau2 + variances[g], floor);
      const ratio = squares[g] * inverse;
      slope += (ratio - counts[g]) * inverse;
      bend += (counts[g] - 2 * ratio) * inverse * inverse;
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
