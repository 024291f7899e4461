import type { TaskMapper } from '../model/index.js';
import { bootstrapP, type LikelihoodRatioArgument, nullModel } from './likelihood-ratio.js';
import { FEWEST_BEDS, type ModelChoice } from './model-choice.js';

/** Difference of BIC above which the richer model stands without a bootstrap ("very strong", Kass and Raftery 1995). */
export const CLEAR_BIC = 10;

/** Difference of BIC under which one zone more is tested although BIC is against it ("not worth more than a bare mention"). */
export const NEAR_BIC = 2;

/** One model held against a richer one by a parametric bootstrap of their likelihood ratio. */
export interface Comparison {
  /** `1` … `K`, or `continuum`. */
  readonly simpler: string;
  readonly zones: number;
  /** 2(ln L richer − ln L simpler). */
  readonly ratio: number;
  readonly p: number;
  readonly repeats: number;
}

/** A choice after the bootstraps that were called for. */
export interface SettledChoice {
  readonly choice: ModelChoice;
  /** In the order they were made; empty where BIC was clear. */
  readonly comparisons: readonly Comparison[];
}

/** Options of {@link settleChoice}. */
export interface SettleOptions {
  readonly alpha: number;
  readonly seed: number;
  /** Most repeats a comparison; it stops earlier once p is plainly on one side of alpha. Default 999. */
  readonly simulations?: number;
  readonly map: TaskMapper;
}

/** Repeats a task: enough to be worth handing over, few enough to share out. */
const REPEATS_A_TASK = 50;

/** Tasks between looks at whether the answer is plain already. */
const TASKS_A_ROUND = 4;

/**
 * Where BIC is close, asks a parametric bootstrap of the likelihood ratio (McLachlan 1987, doi:10.2307/2347790).
 *
 * The best number of zones K must hold against K − 1 zones, and against the continuum, wherever the lead in BIC is under
 * 10; with p above alpha the simpler model is taken, and is tested in turn. So the bootstrap can only take zones away, and
 * it runs only where it decides. One zone more is tested where its BIC is within 2 of the best; a small p there is reported
 * and changes nothing, since BIC asks for more than p ≤ 0.05.
 * @param choice by BIC
 * @param errors standard errors of the bed means that were chosen from
 */
export async function settleChoice(
  choice: ModelChoice,
  errors: readonly number[],
  options: SettleOptions,
): Promise<SettledChoice> {
  const comparisons: Comparison[] = [];
  let zones = choice.bestZones;
  let verdict = choice.verdict;
  if (errors.length < FEWEST_BEDS || verdict === 'too few beds') return { choice, comparisons };
  while (verdict === 'zones') {
    if (choice.continuumBic - choice.bics[zones - 1] < CLEAR_BIC) {
      const against = await compare(choice, 'continuum', zones, errors, options);
      comparisons.push(against);
      if (against.p > options.alpha) {
        verdict = choice.continuumBic < choice.bics[0] - 2 ? 'continuum' : 'one zone';
        break;
      }
    }
    if (choice.bics[zones - 2] - choice.bics[zones - 1] >= CLEAR_BIC) break;
    const against = await compare(choice, zones - 1, zones, errors, options);
    comparisons.push(against);
    if (against.p <= options.alpha) break;
    zones--;
    if (zones === 1) verdict = choice.continuumBic < choice.bics[0] - 2 ? 'continuum' : 'one zone';
    // the continuum beats what is left: no zones after all
    else if (choice.continuumBic < choice.bics[zones - 1]) verdict = 'continuum';
  }
  if (verdict === 'zones' && zones === choice.bestZones && zones < choice.bics.length) {
    if (choice.bics[zones] - choice.bics[zones - 1] < NEAR_BIC) {
      comparisons.push(await compare(choice, zones, zones + 1, errors, options));
    }
  }
  const settled = verdict === 'zones' ? { ...choice, bestZones: zones } : { ...choice, verdict };
  return { choice: settled, comparisons };
}

async function compare(
  choice: ModelChoice,
  simpler: number | 'continuum',
  zones: number,
  errors: readonly number[],
  { alpha, seed, simulations = 999, map }: SettleOptions,
): Promise<Comparison> {
  const model = simpler === 'continuum' ? choice.continuum : choice.mixtures[simpler - 1];
  const ratio = 2 * (choice.mixtures[zones - 1].logLikelihood - model.logLikelihood);
  const drawn: number[] = [];
  while (drawn.length < simulations) {
    const round = Math.min(TASKS_A_ROUND * REPEATS_A_TASK, simulations - drawn.length);
    const tasks = Array.from({ length: Math.ceil(round / REPEATS_A_TASK) }, (_, at) => {
      const first = drawn.length + at * REPEATS_A_TASK;
      const repeats = Math.min(REPEATS_A_TASK, round - at * REPEATS_A_TASK);
      const argument: LikelihoodRatioArgument = { errors, simpler: nullModel(model), zones, seed, first, repeats };
      return { name: 'bootstrapLikelihoodRatio', argument };
    });
    drawn.push(...((await map(tasks)) as number[][]).flat());
    const distance = Math.abs(bootstrapP(ratio, drawn) - alpha);
    if (distance > 3 * Math.sqrt((alpha * (1 - alpha)) / drawn.length)) break;
  }
  return { simpler: String(simpler), zones, ratio, p: bootstrapP(ratio, drawn), repeats: drawn.length };
}
