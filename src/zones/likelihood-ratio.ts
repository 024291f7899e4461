import { createRandom, type Random } from '../statistics/index.js';
import { fitContinuum } from './continuum.js';
import { fitMixture } from './mixture.js';

/** The simpler model of a comparison, plain data: what samples are drawn from. */
export type NullModel =
  | {
      readonly kind: 'zones';
      readonly means: readonly number[];
      readonly weights: readonly number[];
      readonly tau: number;
      /** Errors of the beds of each zone in units of those stated. Default 1. */
      readonly scales?: readonly number[];
    }
  | { readonly kind: 'continuum'; readonly low: number; readonly high: number };

/** Argument of {@link bootstrapLikelihoodRatio}: plain data, so that it can go to a worker. */
export interface LikelihoodRatioArgument {
  /** Standard errors of the bed means. */
  readonly errors: readonly number[];
  readonly simpler: NullModel;
  /** Zones of the richer model. */
  readonly zones: number;
  readonly seed: number;
  /** Repeats `first` … `first + repeats − 1`: each draws from a stream of its own, whoever runs it. */
  readonly first: number;
  readonly repeats: number;
}

/** Refits of drawn samples may stop earlier: a likelihood ratio is wanted to a hundredth. */
const QUICK = { tolerance: 1e-5, iterations: 500 };

/**
 * Likelihood ratios 2(ln L richer − ln L simpler) of samples drawn from the simpler model: the yardstick for the ratio
 * of the data, which follows no chi-squared law when numbers of zones are compared (McLachlan 1987, doi:10.2307/2347790).
 * Every sample has as many beds, with the same errors, as the data. A task for the host: pure, from plain data to plain data.
 * @returns one ratio a repeat
 */
export function bootstrapLikelihoodRatio(argument: LikelihoodRatioArgument): number[] {
  const { errors, simpler, zones, first, repeats } = argument;
  const random = createRandom(argument.seed);
  return Array.from({ length: repeats }, (_, at) => {
    const own = random.fork(first + at);
    const values = errors.map((error) => drawBed(simpler, error, own));
    const richer = fitMixture(values, errors, zones, QUICK).logLikelihood;
    return 2 * (richer - simplerLogLikelihood(simpler, values, errors));
  });
}

/** A bed mean drawn from a model. */
export function drawBed(model: NullModel, error: number, random: Random): number {
  if (model.kind === 'continuum') {
    return model.low + (model.high - model.low) * random.uniform() + error * random.normal();
  }
  const u = random.uniform();
  let sum = 0;
  let zone = model.weights.length - 1;
  for (let j = 0; j < model.weights.length; j++) {
    sum += model.weights[j];
    if (u < sum) {
      zone = j;
      break;
    }
  }
  const own = error * (model.scales?.[zone] ?? 1);
  return model.means[zone] + model.tau * random.normal() + own * random.normal();
}

function simplerLogLikelihood(model: NullModel, values: readonly number[], errors: readonly number[]): number {
  if (model.kind === 'continuum') return fitContinuum(values, errors, 1e-6).logLikelihood;
  return fitMixture(values, errors, model.means.length, QUICK).logLikelihood;
}
