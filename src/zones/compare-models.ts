import type { TaskMapper } from '../model/index.js';
import { bootstrapInRounds } from './bootstrap-rounds.js';
import type { Continuum } from './continuum.js';
import type { LeadArgument } from './lead-of-zones.js';
import type { LikelihoodRatioArgument, NullModel } from './likelihood-ratio.js';
import type { Mixture } from './mixture.js';

/** One model held against richer ones by a parametric bootstrap. */
export interface Comparison {
  /**
   * `any`: a model without zones against zones in any number, by {@link leadOfZones}. `these`: against this number of zones,
   * by the likelihood ratio 2(ln L richer − ln L simpler).
   */
  readonly of: 'any' | 'these';
  /** `1` … `K`, or `continuum`. */
  readonly simpler: string;
  /** Of the richer model; with `any` the number of lowest BIC. */
  readonly zones: number;
  readonly statistic: number;
  readonly p: number;
  /** The richer model stands when p is at most this. */
  readonly level: number;
  readonly repeats: number;
}

/** What every bootstrap of a comparison needs. */
export interface BootstrapOptions {
  readonly seed: number;
  /** Most repeats. */
  readonly simulations: number;
  readonly map: TaskMapper;
}

type Levelled = BootstrapOptions & { readonly level: number };
/** A comparison without its names. */
export type Test = Omit<Comparison, 'simpler' | 'zones'>;

/** Samples of a model without zones against zones in any number. */
export async function anyNumber(
  rival: NullModel,
  statistic: number,
  errors: readonly number[],
  options: Levelled,
): Promise<Test> {
  const drawn = { errors, rival, seed: options.seed };
  const outcome = await bootstrapInRounds({
    ...options,
    observed: statistic,
    task: (first, repeats) => ({
      name: 'bootstrapLead',
      argument: { ...drawn, first, repeats } satisfies LeadArgument,
    }),
  });
  return { of: 'any', statistic, level: options.level, ...outcome };
}

/** Samples of a fitted model against a richer fit. */
export async function these(
  simpler: NullModel,
  fit: Mixture | Continuum,
  richer: Mixture,
  errors: readonly number[],
  options: Levelled,
): Promise<Test> {
  const statistic = 2 * (richer.logLikelihood - fit.logLikelihood);
  const drawn = { errors, simpler, zones: richer.k, seed: options.seed };
  const outcome = await bootstrapInRounds({
    ...options,
    observed: statistic,
    task: (first, repeats) => ({
      name: 'bootstrapLikelihoodRatio',
      argument: { ...drawn, first, repeats } satisfies LikelihoodRatioArgument,
    }),
  });
  return { of: 'these', statistic, level: options.level, ...outcome };
}

/** A fitted model as samples are drawn from it. */
export function nullModel(fit: Mixture | Continuum): NullModel {
  if ('low' in fit) return { kind: 'continuum', low: fit.low, high: fit.high };
  return zonesModel(fit);
}

/** Fitted zones as samples are drawn from them. */
export const zonesModel = ({ means, weights, tau }: Mixture) => ({ kind: 'zones' as const, means, weights, tau });
