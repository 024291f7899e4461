import { studentTQuantile } from '../statistics/index.js';
import { chooseModel, fitContinuum, fitMixture, type ModelChoice, partition } from '../zones/index.js';

/** The slope of log ratios along a gradient, and whether the data support one. */
export interface GradientFit {
  /** Change of the log ratio per unit of the column; of either sign. */
  readonly slope: number;
  /** 95 % interval from the profile of the likelihood. */
  readonly low: number;
  readonly high: number;
  /** BIC of the best model with and without the slope, which counts as one parameter. */
  readonly bicWith: number;
  readonly bicWithout: number;
  /** Whether the BIC is lower with the slope: else none is taken out. */
  readonly used: boolean;
}

/** Slopes tried on the coarse grid. */
const GRID = 241;

/**
 * Fits x = μ_zone + β (g − ḡ) + error with one slope for all zones (design 7.11), the isochrons of a coast along which the
 * temperature changes. For every slope of a grid the beds are partitioned exactly after the slope is taken out and the
 * models are compared by BIC on their classification likelihood (Symons 1981, doi:10.2307/2530520); the best slopes are
 * refined with the full mixtures and the continuum, and the interval is where the profile of the likelihood stays within
 * t²/2 of its top, t the 97.5 % point of Student's t on beds less zones less 1: 1.92 with very many beds, more with few.
 * @param values bed means of log ratios
 * @param errors their standard errors
 * @param gradient value of the column less its mean, one a bed
 * @returns null when the column does not vary over the beds
 */
export function fitGradient(
  values: readonly number[],
  errors: readonly number[],
  gradient: readonly number[],
): GradientFit | null {
  const reach = Math.max(...gradient) - Math.min(...gradient);
  if (!(reach > 0) || values.length < 4) return null;
  const without = bestOf(chooseModel(values, errors));
  const range = Math.max(...values) - Math.min(...values);
  const limit = (1.5 * Math.max(range, 4 * Math.max(...errors))) / reach;
  const step = (2 * limit) / (GRID - 1);
  const grid = Array.from({ length: GRID }, (_, at) => -limit + at * step);
  const scores = grid.map((slope) => roughBic(takeOut(values, gradient, slope), errors));
  let best = { slope: 0, bic: without.bic + Math.log(values.length), model: without.model };
  for (const at of lowPoints(scores).slice(0, 4)) {
    const candidate = refine(values, errors, gradient, grid[at], step);
    if (candidate.bic < best.bic) best = candidate;
  }
  const profile = (slope: number): number => logLikelihood(takeOut(values, gradient, slope), errors, best.model);
  const centre = climb(profile, best.slope, step);
  const top = profile(centre);
  const bicWith = best.bic - 2 * Math.max(0, top - profile(best.slope));
  const df = Math.max(2, values.length - 1 - (best.model === 'continuum' ? 2 : best.model));
  const drop = studentTQuantile(0.975, df) ** 2 / 2;
  return {
    slope: centre,
    low: profileEnd(profile, centre, top - drop, -step),
    high: profileEnd(profile, centre, top - drop, step),
    bicWith,
    bicWithout: without.bic,
    used: bicWith < without.bic,
  };
}

const takeOut = (values: readonly number[], gradient: readonly number[], slope: number): number[] =>
  values.map((value, at) => value - slope * gradient[at]);

/** Number of zones of the best model, or the continuum. */
type Model = number | 'continuum';

function bestOf(choice: ModelChoice): { readonly bic: number; readonly model: Model } {
  const mixture = choice.bics[choice.bestZones - 1];
  return mixture <= choice.continuumBic
    ? { bic: mixture, model: choice.bestZones }
    : { bic: choice.continuumBic, model: 'continuum' };
}

function logLikelihood(values: readonly number[], errors: readonly number[], model: Model): number {
  return model === 'continuum'
    ? fitContinuum(values, errors).logLikelihood
    : fitMixture(values, errors, model, { tolerance: 1e-7 }).logLikelihood;
}

/** Least BIC over numbers of zones with every bed given to its own zone: quick, and good enough to find the valleys. */
function roughBic(values: readonly number[], errors: readonly number[]): number {
  const n = values.length;
  const weights = errors.map((se) => 1 / Math.max(se * se, 1e-12));
  let least = Number.POSITIVE_INFINITY;
  let worse = 0;
  for (let k = 1; k <= Math.min(10, n - 1) && worse < 3; k++) {
    const score = classificationBic(values, errors, partition(values, weights, k), k);
    if (score < least) least = score;
    else worse++;
  }
  return least;
}

function classificationBic(
  values: readonly number[],
  errors: readonly number[],
  labels: readonly number[],
  k: number,
): number {
  const n = values.length;
  const sums = new Float64Array(k);
  const counts = new Float64Array(k);
  labels.forEach((label, at) => {
    sums[label] += values[at];
    counts[label]++;
  });
  let excess = 0;
  labels.forEach((label, at) => {
    excess += (values[at] - sums[label] / counts[label]) ** 2 - errors[at] ** 2;
  });
  const tau2 = Math.max(0, excess / n);
  let total = 0;
  labels.forEach((label, at) => {
    const variance = Math.max(tau2 + errors[at] ** 2, 1e-12);
    const d = values[at] - sums[label] / counts[label];
    total += Math.log(counts[label] / n) - 0.5 * Math.log(2 * Math.PI * variance) - (0.5 * d * d) / variance;
  });
  return -2 * total + 2 * k * Math.log(n);
}

/** Grid points lower than their neighbours, the lowest first. */
function lowPoints(scores: readonly number[]): number[] {
  return scores
    .map((_, at) => at)
    .filter(
      (at) =>
        scores[at] <= (scores[at - 1] ?? Number.POSITIVE_INFINITY) &&
        scores[at] <= (scores[at + 1] ?? Number.POSITIVE_INFINITY),
    )
    .sort((a, b) => scores[a] - scores[b] || a - b);
}

function refine(
  values: readonly number[],
  errors: readonly number[],
  gradient: readonly number[],
  start: number,
  step: number,
) {
  let { model } = bestOf(chooseModel(takeOut(values, gradient, start), errors));
  let slope = start;
  let bic = Number.POSITIVE_INFINITY;
  // the best number of zones may change as the slope settles, and the slope with it
  for (let round = 0; round < 3; round++) {
    slope = climb((at) => logLikelihood(takeOut(values, gradient, at), errors, model), slope, step);
    const next = bestOf(chooseModel(takeOut(values, gradient, slope), errors, 1));
    bic = next.bic;
    if (next.model === model) break;
    model = next.model;
  }
  return { slope, bic, model };
}

/** Top of a function near a start: steps uphill to bracket it, then halves by golden sections. */
function climb(f: (x: number) => number, start: number, step: number): number {
  let [low, high] = [start - step, start + step];
  for (let turn = 0; turn < 40 && f(low) > f((low + high) / 2); turn++) low -= step;
  for (let turn = 0; turn < 40 && f(high) > f((low + high) / 2); turn++) high += step;
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [left, right] = [high - ratio * (high - low), low + ratio * (high - low)];
  let [fLeft, fRight] = [f(left), f(right)];
  for (let turn = 0; turn < 60 && high - low > 1e-4 * step; turn++) {
    if (fLeft >= fRight) {
      [high, right, fRight] = [right, left, fLeft];
      left = high - ratio * (high - low);
      fLeft = f(left);
    } else {
      [low, left, fLeft] = [left, right, fRight];
      right = low + ratio * (high - low);
      fRight = f(right);
    }
  }
  return (low + high) / 2;
}

/** Where the profile has fallen to a level, going outwards from its top. */
function profileEnd(profile: (slope: number) => number, centre: number, level: number, step: number): number {
  let inside = centre;
  let outside = centre + step / 4;
  for (let turn = 0; turn < 200 && profile(outside) > level; turn++) {
    inside = outside;
    outside += (step / 4) * (1 + turn / 4);
  }
  for (let turn = 0; turn < 40 && Math.abs(outside - inside) > 1e-5 * Math.abs(step); turn++) {
    const middle = (inside + outside) / 2;
    if (profile(middle) > level) inside = middle;
    else outside = middle;
  }
  return (inside + outside) / 2;
}
