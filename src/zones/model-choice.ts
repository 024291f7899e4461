import type { ClockVerdict } from '../model/index.js';
import { type Continuum, fitContinuum } from './continuum.js';
import { bic, fitMixture, MANY_BEDS, type Mixture } from './mixture.js';

/** Every model that was held against the bed means, and what they say. */
export interface ModelChoice {
  /** Mixtures of 1 … Kmax zones. */
  readonly mixtures: readonly Mixture[];
  readonly continuum: Continuum;
  /** BIC of each mixture, and of the continuum. */
  readonly bics: readonly number[];
  readonly continuumBic: number;
  /** Number of zones of the best mixture. */
  readonly bestZones: number;
  readonly verdict: ClockVerdict;
}

/** Beds under which nothing is said of zones. */
export const FEWEST_BEDS = 3;

/** Most zones looked for unless the user asks for more. */
export const MOST_ZONES = 10;

/**
 * Holds mixtures of 1 … Kmax zones and the continuum against the bed means; the lowest BIC wins, with 2K parameters for K
 * zones and 2 for the continuum (design 7.3). Between one zone and the continuum, which both say that no zones are
 * supported, the continuum is named only when its BIC is lower by 2 or more ("positive" in Kass and Raftery 1995,
 * doi:10.1080/01621459.1995.10476572): with a small spread the two are the same model.
 * @param values bed means of log ratios
 * @param errors their standard errors
 * @param extraParameters counted beside those of every model, such as a slope. Default 0
 * @param most largest number of zones tried
 * @param before a choice on nearly the same beds: with very many, the search is not made again but goes on from there
 */
export function chooseModel(
  values: readonly number[],
  errors: readonly number[],
  extraParameters = 0,
  most = MOST_ZONES,
  before?: ModelChoice,
): ModelChoice {
  const n = values.length;
  const largest = Math.max(1, Math.min(most, n, new Set(values).size));
  const mixtures: Mixture[] = [];
  for (let k = 1; k <= largest; k++) {
    const near = n > MANY_BEDS ? before?.mixtures[k - 1] : undefined;
    mixtures.push(fitMixture(values, errors, k, { near }));
  }
  const continuum = fitContinuum(values, errors);
  const bics = mixtures.map((fit) => bic(fit.logLikelihood, 2 * fit.k + extraParameters, n));
  const continuumBic = bic(continuum.logLikelihood, 2 + extraParameters, n);
  const best = bics.reduce((least, value, at) => (value < bics[least] ? at : least), 0);
  return {
    mixtures,
    continuum,
    bics,
    continuumBic,
    bestZones: best + 1,
    verdict: verdictOf(n, best + 1, bics, continuumBic),
  };
}

function verdictOf(n: number, best: number, bics: readonly number[], continuumBic: number): ClockVerdict {
  if (n < FEWEST_BEDS) return 'too few beds';
  if (best > 1 && bics[best - 1] < continuumBic) return 'zones';
  return withoutZones(bics[0], continuumBic);
}

/** What is said where there are no zones. */
export const withoutZones = (oneZoneBic: number, continuumBic: number): 'continuum' | 'one zone' =>
  continuumBic < oneZoneBic - 2 ? 'continuum' : 'one zone';
