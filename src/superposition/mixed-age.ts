import { fUpperTail, holm, type Random } from '../statistics/index.js';
import { robustScatter } from './robust-scatter.js';
import { bestSplit, type Split, splitTest } from './two-groups.js';
import { matchZone, type ZoneToMatch } from './zone-match.js';

/** Options of {@link mixedAgeBeds}. */
export interface MixedAgeOptions {
  /** Default 0.05. */
  readonly alpha?: number;
  /** Draws behind the test for two groups. Default 999. */
  readonly simulations?: number;
  /** Zones that the groups may fit. Default none. */
  readonly zones?: readonly ZoneToMatch[];
  /** Scatter to hold beds against where the clock has too few shells and 0.07 is assumed. */
  readonly assumed?: number;
}

/** What the shells of one bed say of its being one age. */
export interface MixedAge {
  /**
   * `mixed age`: scatter beyond s, and two groups; `wide scatter`: scatter beyond s, but no two groups that so few
   * shells could prove; `none`; `not tested` with fewer than 4 shells.
   */
  readonly verdict: 'mixed age' | 'wide scatter' | 'none' | 'not tested';
  /** Probability of so wide a scatter in a bed of one age, and the same adjusted by Holm over the beds tested. */
  readonly p: number | null;
  readonly adjusted: number | null;
  /** Probability of so clear a split in one wide group; null where the scatter gave no cause to ask. */
  readonly p_groups: number | null;
  /** Reading for beds.csv; empty where there is none. */
  readonly reading: string;
  readonly sentences: readonly string[];
}

/** Fewest shells: two groups of two. */
const FEWEST_SHELLS = 4;

/**
 * Tests every bed for mixed age (design 7.9). First its scatter: the sum of squares about its mean against the pooled
 * scatter of the clock, which is robust and so not raised by the bed itself (F test, Holm over beds). Then, only where
 * that is too wide, two groups: the best split into two groups of at least two shells, by the share of the sum of
 * squares that lies between them, against the same share in normal samples of as many shells, simulated. That test
 * scales with the bed's own width, so a bed that is merely wide does not pass for two groups, and with 4 shells it
 * seldom can prove any.
 *
 * @param beds Log ratios of the shells of each bed, without those set aside.
 * @param random Seeded generator.
 */
export function mixedAgeBeds(
  beds: readonly (readonly number[])[],
  random: Random,
  options: MixedAgeOptions = {},
): MixedAge[] {
  const alpha = options.alpha ?? 0.05;
  const robust = robustScatter(beds);
  const [s, df] = options.assumed === undefined ? [robust.s, robust.df] : [options.assumed, Number.POSITIVE_INFINITY];
  const p = beds.map((values) => {
    if (values.length < FEWEST_SHELLS || !(s > 0) || !(df > 0)) return null;
    const free = values.length - 1;
    return fUpperTail(sumOfSquares(values) / free / (s * s), free, Number.isFinite(df) ? df : 1e9);
  });
  const adjustedTested = holm(p.filter((value) => value !== null));
  let at = 0;
  const adjusted = p.map((value) => (value === null ? null : adjustedTested[at++]));
  const nullSplits = new Map<number, Float64Array>();
  return beds.map((values, bed): MixedAge => {
    const level = adjusted[bed];
    const plain = { p: p[bed], adjusted: level, p_groups: null, reading: '', sentences: [] };
    if (level === null) return { ...plain, verdict: 'not tested' };
    if (!(level <= alpha)) return { ...plain, verdict: 'none' };
    const split = bestSplit(values);
    const p_groups = splitTest(split.share, values.length, nullSplits, random, options.simulations ?? 999);
    const times = Math.sqrt(sumOfSquares(values) / (values.length - 1)) / s;
    const wide = `Its ${values.length} shells scatter ${shown(times)} times as widely as those of other beds (p = ${shown(p[bed] ?? 1)}, adjusted for all beds ${shown(level)}).`;
    if (!(p_groups <= alpha)) {
      const doubt = `They form no two groups that ${values.length} shells could prove (p = ${shown(p_groups)}): mixing of ages, uneven heating and contamination all remain possible.`;
      return { ...plain, p_groups, verdict: 'wide scatter', reading: 'wide scatter', sentences: [wide, doubt] };
    }
    const groups = describeGroups(split, s, options.zones ?? []);
    const told = `They fall into two groups, ${groups} (p = ${shown(p_groups)} against one wide group).`;
    const which =
      'Ratios do not say which group is as old as the deposit: shells of the older group may be reworked, or those of the younger one intruded.';
    return {
      ...plain,
      p_groups,
      verdict: 'mixed age',
      reading: `mixed age: ${groups}`,
      sentences: [wide, told, which],
    };
  });
}

function describeGroups(split: Split, s: number, zones: readonly ZoneToMatch[]): string {
  return [split.lower, split.upper]
    .map((group) => {
      const mean = group.reduce((sum, x) => sum + x, 0) / group.length;
      const zone = zones.length > 1 ? matchZone(mean, s / Math.sqrt(group.length), zones) : null;
      return `${group.length} shells about ${shown(Math.exp(mean))}${zone === null ? '' : ` (${zone.zone.name})`}`;
    })
    .join(' and ');
}

function sumOfSquares(values: readonly number[]): number {
  const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
  return values.reduce((sum, x) => sum + (x - mean) ** 2, 0);
}

const shown = (value: number): string => String(Number(value.toPrecision(2)));
