import { createRandom } from '../statistics/index.js';
import { type Continuum, fitContinuum } from './continuum.js';
import { drawBed, type NullModel } from './likelihood-ratio.js';
import { fitMixture, type Mixture } from './mixture.js';
import { MOST_ZONES } from './model-choice.js';
import { unbiasedSpread } from './zone-errors.js';

/** Argument of {@link bootstrapLead}: plain data, so that it can go to a worker. */
export interface LeadArgument {
  /** Standard errors of the bed means. */
  readonly errors: readonly number[];
  /** The model without zones that samples are drawn from. */
  readonly rival: NullModel;
  readonly seed: number;
  /** Repeats `first` … `first + repeats − 1`: each draws from a stream of its own, whoever runs it. */
  readonly first: number;
  readonly repeats: number;
}

/** A lead is wanted to a tenth. The data go through the same fits as the samples, or p would flatter. */
const QUICK = { tolerance: 1e-4, iterations: 200 };

/** Numbers of zones in a row that are no better, after which more are not tried. */
const NO_BETTER = 2;

/**
 * By how much the best mixture of two zones or more leads the better of the two models without zones, one zone and the
 * continuum, in Akaike's criterion (1974, doi:10.1109/TAC.1974.1100705): 2(ln L zones − ln L none) − 2(2K − 2), the largest
 * over K. No threshold of it means anything by itself: it is compared with the leads that coasts without zones show when
 * the same search is made on them, so it holds the price of the search. Of the penalties tried, 2 a parameter tells zones
 * from a continuum better than BIC's log n, which hides zones that a small sample shows, and than none.
 * @param values bed means of log ratios, at least two
 * @param errors their standard errors
 */
export function leadOfZones(values: readonly number[], errors: readonly number[]): number {
  const none = Math.max(
    fitMixture(values, errors, 1, QUICK).logLikelihood,
    fitContinuum(values, errors, QUICK.tolerance).logLikelihood,
  );
  const most = Math.min(MOST_ZONES, new Set(values).size);
  let best = Number.NEGATIVE_INFINITY;
  for (let zones = 2, since = 0; zones <= most && since < NO_BETTER; zones++) {
    const lead = leadOver(none, fitMixture(values, errors, zones, QUICK));
    since = lead > best ? 0 : since + 1;
    best = Math.max(best, lead);
  }
  return best;
}

/** The same from fits that were made already. */
export function leadOfFits(mixtures: readonly Mixture[], continuum: Continuum): number {
  const none = Math.max(mixtures[0].logLikelihood, continuum.logLikelihood);
  return Math.max(...mixtures.slice(1).map((fit) => leadOver(none, fit)));
}

const leadOver = (none: number, fit: Mixture): number => 2 * (fit.logLikelihood - none) - 2 * (2 * fit.k - 2);

/**
 * A fitted model without zones as samples are drawn from it. The likelihood puts the ends of a continuum, and the spread of
 * one zone, too close: of n values spread evenly the outermost are n − 1 of n + 1 parts of the whole length apart.
 */
export function rivalModel(fit: Mixture | Continuum, beds: number): NullModel {
  if (!('low' in fit)) {
    return { kind: 'zones', means: fit.means, weights: fit.weights, tau: unbiasedSpread(fit, beds) };
  }
  const middle = (fit.low + fit.high) / 2;
  const half = (((fit.high - fit.low) / 2) * (beds + 1)) / (beds - 1);
  return { kind: 'continuum', low: middle - half, high: middle + half };
}

/**
 * Leads of zones in samples drawn from a model without any: as many beds as the data have, with the same errors, the whole
 * choice of the number of zones made again in each. A task for the host: pure, from plain data to plain data.
 * @returns one lead a repeat
 */
export function bootstrapLead({ errors, rival, seed, first, repeats }: LeadArgument): number[] {
  const random = createRandom(seed);
  return Array.from({ length: repeats }, (_, at) => {
    const own = random.fork(first + at);
    return leadOfZones(
      errors.map((error) => drawBed(rival, error, own)),
      errors,
    );
  });
}
