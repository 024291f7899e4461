import { type ClockSet, chooseClocks } from '../../src/beds/choose-clocks.js';
import { averageAnalyses, clockData } from '../../src/beds/index.js';
import type { Clock, ClockData } from '../../src/model/index.js';
import { adjustedRandIndex, createRandom, type Random } from '../../src/statistics/index.js';
import { runTask } from '../../src/tasks.js';
import { bedScatters, findZones, settleChoice, type Zoning } from '../../src/zones/index.js';
import type { TrueBed } from './coast.js';
import { type CoastOptions, simulateCoast } from './coast.js';

/** One simulated coast after zoning, with the truth beside it. */
export interface ZoneRun {
  readonly data: ClockData;
  readonly zoning: Zoning;
  /** The truth of each bed that was zoned, in the order of `zoning.beds`. */
  readonly truth: readonly TrueBed[];
  /** Adjusted Rand index of the zones found with the true ones. */
  readonly rand: number;
}

/** What can be asked of a run beside the coast itself. */
export interface ZoneRunOptions {
  /** Which clock of the first taxon. Default the main one. */
  readonly clock?: (set: ClockSet) => Clock;
  readonly zones?: number;
}

/**
 * Draws a coast and finds its zones the way a run does, without screening: by BIC, and on the main clock by bootstraps where
 * BIC is not clear. Repeats are few, for speed.
 */
export async function zoneCoast(coast: CoastOptions, { clock, zones }: ZoneRunOptions = {}): Promise<ZoneRun> {
  const { survey, truth } = simulateCoast(coast);
  const { shells, summaries } = averageAnalyses(survey.analyses);
  const [set] = chooseClocks(shells, summaries, { taxon: null, fraction: null, amino_acid: null });
  const chosen = clock === undefined ? set.main : clock(set);
  const data = clockData({ clock: chosen, shells, summaries, imputation: set.index?.imputation });
  const random = createRandom(coast.seed ?? 1);
  const settled = zones === undefined && clock === undefined;
  const zoning = await (settled ? settledZones(data, random) : zonesByBic(data, random, zones ?? null));
  const beds = zoning.beds.map((index) => truth.beds.get(data.beds[index].key)!);
  const rand = adjustedRandIndex(
    zoning.labels,
    beds.map((bed) => bed.zone),
  );
  return { data, zoning, truth: beds, rand };
}

const ALPHA = 0.05;
const SIMULATIONS = 399;

const zonesByBic = (data: ClockData, random: Random, zones: number | null): Zoning =>
  findZones(data, { alpha: ALPHA, zones, random, simulations: 199 })!;

/** Zones of a clock after the bootstraps that a run makes where BIC is not clear. */
export async function settledZones(data: ClockData, random: Random): Promise<Zoning> {
  const first = zonesByBic(data, random, null);
  const { choice, comparisons } = await settleChoice(
    first.choice,
    first.beds.map((bed) => data.beds[bed].mean),
    first.beds.map((bed) => data.beds[bed].se),
    {
      alpha: ALPHA,
      seed: random.fork(1).integer(2 ** 31),
      simulations: SIMULATIONS,
      map: async (tasks) => tasks.map(runTask),
      scatters: bedScatters(data, first.beds),
    },
  );
  if (comparisons.length === 0) return first;
  return findZones(data, { alpha: ALPHA, zones: null, random, simulations: 199, choice })!;
}

const drawn = new Map<string, ZoneRun[]>();

/** The same coast over many seeds, from 1 upwards. What was run is kept, as several rates are read off the same coasts. */
export async function zoneCoasts(
  seeds: number,
  coast: CoastOptions,
  options: Omit<ZoneRunOptions, 'clock'> = {},
): Promise<ZoneRun[]> {
  const key = JSON.stringify([coast, options]);
  const runs = drawn.get(key) ?? [];
  drawn.set(key, runs);
  while (runs.length < seeds) runs.push(await zoneCoast({ ...coast, seed: runs.length + 1 }, options));
  return runs.slice(0, seeds);
}

export const meanOf = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length;

export const shareOf = <T>(values: readonly T[], test: (value: T) => boolean): number =>
  values.filter(test).length / values.length;
