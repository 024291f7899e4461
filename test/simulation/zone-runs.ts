import { type ClockSet, chooseClocks } from '../../src/beds/choose-clocks.js';
import { averageAnalyses, clockData } from '../../src/beds/index.js';
import type { Clock, ClockData } from '../../src/model/index.js';
import { adjustedRandIndex, createRandom } from '../../src/statistics/index.js';
import { findZones, type Zoning } from '../../src/zones/index.js';
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

/** Draws a coast and finds its zones the way a run does, without screening. Repeats behind overlaps are few, for speed. */
export function zoneCoast(coast: CoastOptions, { clock, zones }: ZoneRunOptions = {}): ZoneRun {
  const { survey, truth } = simulateCoast(coast);
  const { shells, summaries } = averageAnalyses(survey.analyses);
  const [set] = chooseClocks(shells, summaries, { taxon: null, fraction: null, amino_acid: null });
  const chosen = clock === undefined ? set.main : clock(set);
  const data = clockData({ clock: chosen, shells, summaries, imputation: set.index?.imputation });
  const random = createRandom(coast.seed ?? 1);
  const zoning = findZones(data, { alpha: 0.05, zones: zones ?? null, random, simulations: 199 })!;
  const beds = zoning.beds.map((index) => truth.beds.get(data.beds[index].key)!);
  const rand = adjustedRandIndex(
    zoning.labels,
    beds.map((bed) => bed.zone),
  );
  return { data, zoning, truth: beds, rand };
}

/** The same coast over many seeds, from 1 upwards. */
export function zoneCoasts(seeds: number, coast: CoastOptions, options: ZoneRunOptions = {}): ZoneRun[] {
  return Array.from({ length: seeds }, (_, i) => zoneCoast({ ...coast, seed: i + 1 }, options));
}

export const meanOf = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / values.length;

export const shareOf = <T>(values: readonly T[], test: (value: T) => boolean): number =>
  values.filter(test).length / values.length;
