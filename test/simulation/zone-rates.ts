import type { ClockSet } from '../../src/beds/index.js';
import { studentTQuantile } from '../../src/statistics/index.js';
import { assignerOverDraws, bootstrapZones, zoneMeanErrors } from '../../src/zones/index.js';
import type { CoastOptions, SimulatedAminoAcid } from './coast-options.js';
import { meanOf, shareOf, type ZoneRun, zoneCoast, zoneCoasts } from './zone-runs.js';

/** Bootstraps of zones a coast. */
const REPEATS = 100;

const bootstrapsOf = ({ data, zoning }: ZoneRun) =>
  bootstrapZones({
    values: zoning.beds.map((bed) => data.beds[bed].mean),
    errors: zoning.beds.map((bed) => data.beds[bed].se),
    shells: zoning.beds.map((bed) => data.beds[bed].n),
    residuals: [],
    fit: zoning.fit,
    labels: zoning.labels,
    seed: 1,
    first: 0,
    repeats: REPEATS,
  });

/** Share of coasts on which zones were found although there are none. */
export const falseZones = async (seeds: number, coast: CoastOptions): Promise<number> =>
  shareOf(await zoneCoasts(seeds, coast), ({ zoning }) => zoning.verdict === 'zones');

/** How zones that are there come back. */
export interface Recovery {
  /** Share of coasts with the right number of zones. */
  readonly rightNumber: number;
  /** Mean adjusted Rand index with the truth. */
  readonly rand: number;
}

/** How zones that are there come back. */
export async function recovery(seeds: number, coast: CoastOptions & { zones: number }): Promise<Recovery> {
  const runs = await zoneCoasts(seeds, coast);
  return {
    rightNumber: shareOf(runs, ({ zoning }) => zoning.fit.k === coast.zones),
    rand: meanOf(runs.map(({ rand }) => rand)),
  };
}

/** Beds whose best zone was given a probability within one tenth, and how many of them are right. */
export interface Decile {
  readonly from: number;
  readonly beds: number;
  readonly said: number;
  readonly right: number;
}

/** Of beds given 0.9, are 90 % right? Over coasts on which the number of zones came out right, or was given. */
export async function calibration(
  seeds: number,
  coasts: readonly (CoastOptions & { zones: number })[],
  given = false,
): Promise<Decile[]> {
  const deciles = Array.from({ length: 10 }, () => ({ beds: 0, said: 0, right: 0 }));
  for (const coast of coasts) {
    for (const run of await zoneCoasts(seeds, coast, given ? { zones: coast.zones } : {})) {
      const { data, zoning, truth } = run;
      if (zoning.fit.k !== coast.zones) continue;
      const assign = assignerOverDraws(bootstrapsOf(run));
      zoning.beds.forEach((bed, at) => {
        const { zone, probability } = assign(data.beds[bed].mean, data.beds[bed].se);
        const decile = deciles[Math.min(9, Math.floor(10 * probability))];
        decile.beds++;
        decile.said += probability;
        if (truth[at].zone === zone + 1) decile.right++;
      });
    }
  }
  return deciles.flatMap(({ beds, said, right }, at) =>
    beds > 0 ? [{ from: at / 10, beds, said: said / beds, right: right / beds }] : [],
  );
}

/** Share of zones whose true mean lies within the 95 % interval, on coasts with the right number of zones, or told it. */
export async function coverage(
  seeds: number,
  coasts: readonly (CoastOptions & { zones: number })[],
  given = false,
): Promise<{ zones: number; covered: number }> {
  let zones = 0;
  let hits = 0;
  for (const coast of coasts) {
    for (const run of await zoneCoasts(seeds, coast, given ? { zones: coast.zones } : {})) {
      const { zoning, truth } = run;
      if (zoning.fit.k !== coast.zones) continue;
      const se = zoneMeanErrors(zoning.priors.se, bootstrapsOf(run));
      const means = [...new Set(truth.map((bed) => bed.extent))].sort((a, b) => a - b);
      means.forEach((mean, j) => {
        zones++;
        if (Math.abs(zoning.fit.means[j] - mean) <= studentTQuantile(0.975, zoning.df[j]) * se[j]) hits++;
      });
    }
  }
  return { zones, covered: hits / zones };
}

/** Four amino acids, the last `noise` of which carry nothing of age. */
export const fourAminoAcids = (noise: number): SimulatedAminoAcid[] =>
  (['Ile', 'Asx', 'Glx', 'Val'] as const).map((code, at) => ({ code, noise: at >= 4 - noise }));

/** The index against the best of its amino acids by itself. */
export interface IndexGain {
  readonly index: number;
  /** Mean Rand index of the best single amino acid, the best chosen with the truth at hand. */
  readonly bestSingle: number;
}

/** Mean adjusted Rand index with the truth: of the index, and of the amino acid that does best over all coasts. */
export async function indexGain(seeds: number, coast: CoastOptions): Promise<IndexGain> {
  const useful = coast.aminoAcids!.filter(({ noise }) => !noise).map(({ code }) => code);
  const index: number[] = [];
  const singles = useful.map((): number[] => []);
  for (let seed = 1; seed <= seeds; seed++) {
    index.push((await zoneCoast({ ...coast, seed })).rand);
    for (const [at, code] of useful.entries()) {
      const clock = (set: ClockSet) => set.singles.find(({ amino_acids }) => amino_acids[0] === code)!;
      singles[at].push((await zoneCoast({ ...coast, seed }, { clock })).rand);
    }
  }
  return { index: meanOf(index), bestSingle: Math.max(...singles.map(meanOf)) };
}
