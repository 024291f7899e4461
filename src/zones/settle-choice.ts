import type { ClockVerdict, TaskMapper } from '../model/index.js';
import { anyNumber, type Comparison, nullModel, these, zonesModel } from './compare-models.js';
import { leadOfFits, leadOfZones, rivalModel } from './lead-of-zones.js';
import { FEWEST_BEDS, type ModelChoice, withoutZones } from './model-choice.js';
import { type BedScatter, zoneScales } from './zone-scales.js';

/** Difference of BIC above which the richer model stands without a bootstrap ("very strong", Kass and Raftery 1995). */
export const CLEAR_BIC = 10;

/** Difference of BIC under which one zone more is tested although BIC is against it ("not worth more than a bare mention"). */
export const NEAR_BIC = 2;

/** Zones that BIC is against are taken at this share of alpha: 0.03 where alpha is 0.05. */
export const STRICTER = 0.6;

/** One zone more is taken at this share of alpha, since the number is the best of several tried: 0.025 where alpha is 0.05. */
export const ONE_MORE = 0.5;

/** Of the two models without zones the worse is held against zones too where its BIC is as near as this ("strong" beyond). */
const NEAR_RIVAL = 6;

/**
 * Beds under which a search over every number of zones nearly always ends near one zone a bed, so that its lead tells nothing:
 * the number of lowest BIC is tested by itself, at alpha.
 */
const FEWEST_TO_SEARCH = 10;

/** Beds above which BIC misses little and is not overruled in favour of zones, and repeats, which take long, are fewer. */
const MANY_BEDS = 400;
const FEW_REPEATS = 199;

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
  /** Most repeats a comparison; it stops earlier once p is plainly on one side of the level. Default 999. */
  readonly simulations?: number;
  readonly map: TaskMapper;
  /** Scatter of the shells of each bed, for zones that scatter unequally. Default: all scatter as their errors say. */
  readonly scatters?: readonly BedScatter[];
}

type Limited = SettleOptions & { readonly simulations: number };

/** Bed means of log ratios and their standard errors. */
interface Beds {
  readonly values: readonly number[];
  readonly errors: readonly number[];
}

/**
 * Where BIC is not clear, asks parametric bootstraps (McLachlan 1987, doi:10.2307/2347790): first whether there are zones at
 * all, then how many.
 *
 * *Whether*: unless the best mixture of two zones or more leads the continuum and the single zone by 10 or more in BIC, its
 * lead is compared with those in samples of the better of these two (of both where they are near each other), in which the
 * number of zones is chosen anew. Zones that BIC is for stand when p ≤ alpha, those that it is against when p ≤ 0.6 alpha: it
 * asks so much more of three zones than of a continuum that it misses many that are there, and with a dozen beds it sees
 * many that are not. The stricter level leaves room for the ends of the rival being estimates, so that no more than about
 * alpha of coasts without zones are given some. Nothing is drawn where BIC is against zones and they do not even lead in Akaike's criterion. Fewer than 10
 * beds keep the number that BIC chose when it holds against the continuum by itself with p ≤ alpha; BIC is not overruled in
 * favour of zones there, nor with more than 400 beds.
 *
 * *How many*: K zones, the lowest BIC, must hold against K − 1 with p ≤ alpha/2 (alpha under 10 beds) wherever their lead in
 * BIC is under 10; else K − 1 are taken and tested in turn. The samples of K − 1 zones scatter as the shells of each zone do,
 * for a zone whose shells scatter more than all others would else be split in two. One zone more is tested where its BIC is
 * within 2 of the best; a small p there is reported and changes nothing, since BIC asks for more.
 * @param choice by BIC
 * @param values bed means that were chosen from
 * @param errors their standard errors
 */
export async function settleChoice(
  choice: ModelChoice,
  values: readonly number[],
  errors: readonly number[],
  options: SettleOptions,
): Promise<SettledChoice> {
  const { bics, mixtures } = choice;
  if (values.length < FEWEST_BEDS || choice.verdict === 'too few beds' || mixtures.length < 2) {
    return { choice, comparisons: [] };
  }
  const few = values.length > MANY_BEDS ? FEW_REPEATS : Number.POSITIVE_INFINITY;
  const limited = { ...options, simulations: Math.min(options.simulations ?? 999, few) };
  const beds = { values, errors };
  const best = 2 + bics.slice(1).reduce((least, bic, at, rest) => (bic < rest[least] ? at : least), 0);
  const { zones: supported, comparisons } = await anyZones(choice, best, beds, limited);
  if (!supported) return { choice: { ...choice, verdict: withoutZones(bics[0], choice.continuumBic) }, comparisons };
  let zones = best;
  while (zones > 2 && bics[zones - 2] - bics[zones - 1] < CLEAR_BIC) {
    const against = await oneMore(choice, zones, errors, limited);
    comparisons.push(against);
    if (against.p <= against.level) break;
    zones--;
  }
  if (zones === best && zones < bics.length && bics[zones] - bics[zones - 1] < NEAR_BIC) {
    comparisons.push(await oneMore(choice, zones + 1, errors, limited));
  }
  return { choice: { ...choice, bestZones: zones, verdict: 'zones' satisfies ClockVerdict }, comparisons };
}

async function anyZones(choice: ModelChoice, best: number, { values, errors }: Beds, options: Limited) {
  const { mixtures, continuum, bics, continuumBic } = choice;
  const rivals = [
    { simpler: 'continuum', bic: continuumBic, model: continuum },
    { simpler: '1', bic: bics[0], model: mixtures[0] },
  ].sort((a, b) => a.bic - b.bic);
  const comparisons: Comparison[] = [];
  if (rivals[0].bic - bics[best - 1] >= CLEAR_BIC) return { zones: true, comparisons };
  const few = values.length < FEWEST_TO_SEARCH;
  const near = few
    ? rivals.filter(({ simpler, bic }) => (simpler === 'continuum' || best === 2) && bic - bics[best - 1] < CLEAR_BIC)
    : rivals.filter(({ bic }) => bic - rivals[0].bic < NEAR_RIVAL);
  if (choice.verdict !== 'zones') {
    const hopeless = few || values.length > MANY_BEDS || !(leadOfFits(mixtures, continuum) > 0);
    if (hopeless) return { zones: false, comparisons };
  }
  const level = (few || choice.verdict === 'zones' ? 1 : STRICTER) * options.alpha;
  const lead = few ? 0 : leadOfZones(values, errors);
  for (const { simpler, model } of near) {
    const against = few
      ? await these(nullModel(model), model, mixtures[best - 1], errors, { ...options, level })
      : await anyNumber(rivalModel(model, values.length), lead, errors, { ...options, level });
    comparisons.push({ ...against, simpler, zones: best });
    if (!(against.p <= level)) return { zones: false, comparisons };
  }
  return { zones: true, comparisons };
}

async function oneMore({ mixtures }: ModelChoice, zones: number, errors: readonly number[], options: Limited) {
  const model = mixtures[zones - 2];
  const scales = options.scatters === undefined ? undefined : zoneScales(model, options.scatters);
  const level = (errors.length < FEWEST_TO_SEARCH ? 1 : ONE_MORE) * options.alpha;
  const test = await these({ ...zonesModel(model), scales }, model, mixtures[zones - 1], errors, { ...options, level });
  return { ...test, simpler: String(zones - 1), zones };
}
