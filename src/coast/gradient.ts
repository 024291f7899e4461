import { studentTQuantile } from '../statistics/index.js';
import { bestLabels, bic, fitContinuum, fitMixture, MOST_ZONES } from '../zones/index.js';
import { sectionWidening } from './section-widening.js';
import { type BedsOnGradient, climb, type Model, profileEnd, slopeProfile, takeOut } from './slope-profile.js';
import { slopeValleys } from './slope-valleys.js';

/** The slope of log ratios along a gradient, and whether the data support one. */
export interface GradientFit {
  /** Change of the log ratio per unit of the column; of either sign. */
  readonly slope: number;
  /** 95 % interval from the profile of the likelihood, widened for what the beds of one section share. */
  readonly low: number;
  readonly high: number;
  /** BIC of the best model with and without the slope, which counts as one parameter. */
  readonly bicWith: number;
  readonly bicWithout: number;
  /** Whether the BIC is lower with the slope and the interval leaves 0 out: else none is taken out. */
  readonly used: boolean;
}

/** Beds under which no slope is fitted. */
export const FEWEST_BEDS_FOR_SLOPE = 4;

/** Beds on which the valleys of the slope are looked for; of more, an even choice of this many. */
const MOST_BEDS_IN_SEARCH = 300;

/** Valleys that are refined. */
const VALLEYS = 4;

/**
 * Fits x = μ_zone + β (g − ḡ) + error with one slope for all zones (design 7.11), the isochrons of a coast along which the
 * temperature changes. For every slope of a grid the beds are partitioned exactly after the slope is taken out; the best
 * slopes are refined with the full mixtures and the continuum, compared by BIC in which the slope counts as one parameter;
 * the interval is where the profile of the likelihood stays within t²/2 of its top (Pawitan 2001, In All Likelihood,
 * chapter 2, from memory), t the 97.5 % point of Student's t on beds less zones less 1: 1.92 with very many beds, more
 * with few. Beds of one section share one temperature history, so the interval is widened by what sections are found
 * to have of their own (`sectionWidening`).
 * @param values bed means of log ratios
 * @param errors their standard errors
 * @param gradient value of the column less its mean, one a bed
 * @param sections number of the section of each bed. Default: each bed stands by itself
 * @returns null with fewer than 4 beds, or when the column does not vary over them
 * @example
 * fitGradient([-2, -1.9, -1.8], [0.02, 0.02, 0.02], [-1, 0, 1]) // => null
 */
export function fitGradient(
  values: readonly number[],
  errors: readonly number[],
  gradient: readonly number[],
  sections: readonly number[] = values.map((_, at) => at),
): GradientFit | null {
  const reach = spanOf(gradient);
  if (!(reach > 0) || values.length < FEWEST_BEDS_FOR_SLOPE) return null;
  const all: BedsOnGradient = { values, errors, gradient };
  const chosen = evenChoice(values.length);
  const few = chosen === null ? all : picked(all, chosen);
  const limit = (1.5 * Math.max(spanOf(values), 4 * Math.max(...errors))) / reach;
  const { valleys, step } = slopeValleys(few, limit);
  const flat = bestModel(few, 0, null);
  let best = { slope: 0, bic: flat.bic, model: flat.model };
  for (const valley of valleys.slice(0, VALLEYS)) {
    const candidate = refine(few, valley.slope, valley.zones, step);
    if (candidate.bic < best.bic) best = candidate;
  }
  const bicWithout = few === all ? flat.bic : bestModel(all, 0, flat.model).bic;
  // on the thinned beds the number of zones may come out too low: look about it once more with all of them
  const { model } = few === all ? best : bestModel(all, best.slope, best.model);
  const profile = slopeProfile(all, model, step);
  const slope = climb(profile, best.slope, few === all ? step / 20 : step / 5, 1e-4 * step);
  const top = profile(slope);
  const df = Math.max(2, values.length - 1 - (model === 'continuum' ? 2 : model));
  const drop = studentTQuantile(0.975, df) ** 2 / 2;
  const n = values.length;
  const bicWith = bicOf(top, model, n) + Math.log(n);
  const width = step / 8;
  const ofSections = chosen === null ? sections : chosen.map((at) => sections[at]);
  const wider = model === 'continuum' ? 1 : widening(few, model, slope, ofSections);
  const low = slope - wider * (slope - profileEnd(profile, slope, top - drop, -width));
  const high = slope + wider * (profileEnd(profile, slope, top - drop, width) - slope);
  return { slope, low, high, bicWith, bicWithout, used: bicWith < bicWithout && (low > 0 || high < 0) };
}

function widening(beds: BedsOnGradient, zones: number, slope: number, sections: readonly number[]): number {
  const { values, errors } = beds;
  const fit = fitMixture(takeOut(beds, slope), errors, Math.min(zones, values.length), { tolerance: 1e-7 });
  return sectionWidening(beds, bestLabels(fit, values.length), fit.tau, slope, sections).factor;
}

const spanOf = (values: readonly number[]): number => {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of values) [low, high] = [Math.min(low, value), Math.max(high, value)];
  return high - low;
};

/** An even choice of beds that keeps to no rhythm of sections and levels: multiples of the golden ratio, modulo 1. */
function evenChoice(n: number): number[] | null {
  if (n <= MOST_BEDS_IN_SEARCH) return null;
  const golden = (Math.sqrt(5) - 1) / 2;
  return Array.from({ length: n }, (_, at) => at).filter((at) => (at * golden) % 1 < MOST_BEDS_IN_SEARCH / n);
}

function picked({ values, errors, gradient }: BedsOnGradient, chosen: readonly number[]): BedsOnGradient {
  const of = (list: readonly number[]): number[] => chosen.map((at) => list[at]);
  return { values: of(values), errors: of(errors), gradient: of(gradient) };
}

const bicOf = (logLikelihood: number, model: Model, n: number): number =>
  bic(logLikelihood, model === 'continuum' ? 2 : 2 * model, n);

/** The model of lowest BIC at one slope, the slope not counted: all of them, or those about a guess. */
function bestModel(beds: BedsOnGradient, slope: number, guess: Model | null): { bic: number; model: Model } {
  const values = takeOut(beds, slope);
  const n = values.length;
  const continuum = fitContinuum(values, beds.errors, 1e-7);
  let best: { bic: number; model: Model } = { bic: bicOf(continuum.logLikelihood, 'continuum', n), model: 'continuum' };
  const most = Math.min(MOST_ZONES, new Set(values).size);
  const [from, to] = typeof guess === 'number' ? [Math.max(1, guess - 1), Math.min(most, guess + 1)] : [1, most];
  let least = Number.POSITIVE_INFINITY;
  let worse = 0;
  for (let k = from; k <= to && worse < 3; k++) {
    const score = bicOf(fitMixture(values, beds.errors, k, { tolerance: 1e-7 }).logLikelihood, k, n);
    if (score < least) [least, worse] = [score, 0];
    else worse++;
    if (score < best.bic) best = { bic: score, model: k };
  }
  return best;
}

/** Follows a valley down: the best number of zones may change as the slope settles, and the slope with it. */
function refine(beds: BedsOnGradient, start: number, zones: number, step: number) {
  const penalty = Math.log(beds.values.length);
  let { model } = bestModel(beds, start, zones);
  let slope = start;
  for (let round = 0; ; round++) {
    slope = climb(slopeProfile(beds, model, step), slope, step / 2, step / 50);
    const next = bestModel(beds, slope, model);
    if (next.model === model || round === 2) return { slope, bic: next.bic + penalty, model: next.model };
    model = next.model;
  }
}
