import type { ClockData, ClockVerdict } from '../model/index.js';
import type { Random } from '../statistics/index.js';
import { type NeighbourTest, testNeighbours, type ZoneForTest } from './adjacent-zones.js';
import type { ZonePriors } from './assignment.js';
import { fitMixture, type Mixture } from './mixture.js';
import { chooseModel, MOST_ZONES, type ModelChoice } from './model-choice.js';
import { unbiasedSpread, zoneErrors } from './zone-errors.js';

/** What a zoning is asked for. */
export interface ZoningOptions {
  readonly alpha: number;
  /** Number of zones to force; null lets the data choose. */
  readonly zones: number | null;
  readonly random: Random;
  /** Parameters counted in every BIC beside the model's own, such as a slope. Default 0. */
  readonly extraParameters?: number;
  /** Repeats behind intervals of overlaps. Default 999. */
  readonly simulations?: number;
  /** Keys of beds of mixed age: no zone is founded on them. Default none. */
  readonly leaveOut?: ReadonlySet<string>;
  /** A choice made already on these beds, such as one that a bootstrap settled. Default: made here by BIC. */
  readonly choice?: ModelChoice;
  /** A choice on nearly the same beds, from which the search among very many beds goes on. Default none. */
  readonly before?: ModelChoice;
}

/** The zones of one clock. Beds are those of ClockData that have a mean and are not of mixed age, in its order. */
export interface Zoning {
  /** Indices into ClockData.beds of the beds that were zoned. */
  readonly beds: readonly number[];
  readonly choice: ModelChoice;
  readonly fit: Mixture;
  readonly priors: ZonePriors;
  /** Degrees of freedom of each zone mean's error. */
  readonly df: readonly number[];
  /** What the data support. */
  readonly verdict: ClockVerdict;
  readonly forced: boolean;
  /** Zones after choice by BIC, before neighbours were joined. */
  readonly zonesBeforeJoining: number;
  /** Spread tau between beds of a zone; null where a continuum leaves it without meaning. */
  readonly spread: number | null;
  /** Tests between neighbours, the youngest pair first. */
  readonly neighbours: readonly NeighbourTest[];
  /** Most probable zone of each bed in `beds`, 0 the youngest. */
  readonly labels: readonly number[];
}

/**
 * Finds the zones of one clock (design 7.3): mixtures and the continuum are compared by BIC; neighbours that the overlap
 * test calls `not distinct` are joined, the least distinct first, until none is left. With `zones` forced, that many are
 * fitted (fewer where a zone would hold no bed) and none joined; `verdict` keeps saying what the data support.
 * @returns null when no bed has a mean
 */
export function findZones(data: ClockData, options: ZoningOptions): Zoning | null {
  const measured = data.beds.flatMap((bed, index) => (bed.n > 0 ? [index] : []));
  const sound = measured.filter((index) => !(options.leaveOut?.has(data.beds[index].key) ?? false));
  const beds = sound.length > 0 ? sound : measured;
  if (beds.length === 0) return null;
  const values = beds.map((index) => data.beds[index].mean);
  const errors = beds.map((index) => data.beds[index].se);
  const choice =
    options.choice ?? chooseModel(values, errors, options.extraParameters ?? 0, MOST_ZONES, options.before);
  const supported = choice.verdict === 'zones' ? choice.bestZones : 1;
  const joined = joinNeighbours(data, beds, choice.mixtures[supported - 1], options);
  const verdict = choice.verdict === 'zones' && joined.fit.k === 1 ? 'one zone' : choice.verdict;
  const forced = options.zones !== null;
  let { fit, neighbours } = joined;
  if (forced) {
    const k = Math.min(options.zones!, beds.length);
    // more than the beds can fill leaves zones without any: they are dropped, and the number in use says so
    fit = withoutEmptyZones(values, errors, choice.mixtures[k - 1] ?? fitMixture(values, errors, k));
    neighbours = testAll(data, beds, fit, options);
  }
  const { se, df } = zoneErrors(fit, errors, data.scatter.df, values);
  const ageMayDiffer = fit.k === 1 && verdict !== 'one zone';
  return {
    beds,
    choice,
    fit,
    priors: { means: fit.means, se, weights: fit.weights, tau: unbiasedSpread(fit, beds.length) },
    df,
    verdict,
    forced,
    zonesBeforeJoining: supported,
    spread: ageMayDiffer ? null : unbiasedSpread(fit, beds.length),
    neighbours,
    labels: bestLabels(fit, beds.length),
  };
}

function joinNeighbours(data: ClockData, beds: readonly number[], start: Mixture, options: ZoningOptions) {
  const values = beds.map((index) => data.beds[index].mean);
  const errors = beds.map((index) => data.beds[index].se);
  let fit = withoutEmptyZones(values, errors, start);
  for (;;) {
    const neighbours = testAll(data, beds, fit, options);
    const joinable = neighbours.flatMap((test, at) => (test.verdict === 'not distinct' ? [at] : []));
    if (joinable.length === 0) return { fit, neighbours };
    const at = joinable.reduce((most, next) => (neighbours[next].overlap > neighbours[most].overlap ? next : most));
    const labels = bestLabels(fit, beds.length).map((label) => (label > at ? label - 1 : label));
    fit = withoutEmptyZones(values, errors, fitMixture(values, errors, fit.k - 1, { start: labels }));
  }
}

/** Zones that are no bed's most probable one are no zones: found again with one fewer until every zone has a bed. */
function withoutEmptyZones(values: readonly number[], errors: readonly number[], start: Mixture): Mixture {
  let fit = start;
  while (fit.k > 1) {
    const labels = bestLabels(fit, values.length);
    const held = [...new Set(labels)].sort((a, b) => a - b);
    if (held.length === fit.k) return fit;
    fit = fitMixture(values, errors, held.length, { start: labels.map((label) => held.indexOf(label)) });
  }
  return fit;
}

function testAll(data: ClockData, beds: readonly number[], fit: Mixture, options: ZoningOptions): NeighbourTest[] {
  if (fit.k === 1) return [];
  const errors = beds.map((index) => data.beds[index].se);
  const values = beds.map((index) => data.beds[index].mean);
  const { se, df } = zoneErrors(fit, errors, data.scatter.df, values);
  const labels = bestLabels(fit, beds.length);
  const zones = fit.means.map((mean, j): ZoneForTest => {
    let count = 0;
    for (let at = 0; at < beds.length; at++) if (labels[at] === j) count += data.beds[beds[at]].n;
    return { mean, se: se[j], df: df[j], count };
  });
  const shellSd = Math.hypot(data.scatter.s, fit.tau);
  return fit.means.slice(1).map((_, j) =>
    testNeighbours(zones[j + 1], zones[j], {
      alpha: options.alpha,
      shellSd,
      scatterDf: data.scatter.df,
      random: options.random.fork(j),
      simulations: options.simulations,
    }),
  );
}

/** Most probable zone of each bed. */
export function bestLabels(fit: Mixture, beds: number): number[] {
  return Array.from({ length: beds }, (_, bed) => {
    let best = 0;
    for (let j = 1; j < fit.k; j++) {
      if (fit.responsibilities[bed * fit.k + j] > fit.responsibilities[bed * fit.k + best]) best = j;
    }
    return best;
  });
}
