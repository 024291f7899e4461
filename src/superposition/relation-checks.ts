import type { RelationRecord, RelationVerdict } from '../model/index.js';
import { benjaminiHochberg, normalCdf, studentTCdf } from '../statistics/index.js';

/** A relation as the checks need it; {@link RelationRecord} fits. */
export type RelationToCheck = Pick<RelationRecord, 'lower' | 'upper' | 'kind' | 'basis' | 'certainty'>;

/** A bed as the checks need it; {@link ClockBed} fits. */
export interface BedMean {
  /** `section/bed`. */
  readonly key: string;
  readonly section: string;
  /** Shells behind the mean; 0 where there is none. */
  readonly n: number;
  /** Mean log ratio. */
  readonly mean: number;
  /** Its standard error. */
  readonly se: number;
}

/** Options of {@link checkRelations}. */
export interface RelationCheckOptions {
  /** Level of the tests. Default 0.05. */
  readonly alpha?: number;
  /**
   * Degrees of freedom of the pooled scatter behind the standard errors; Infinity where the scatter was assumed or is
   * taken as known. Default Infinity.
   */
  readonly df?: number;
  /** Spread tau between the beds of one zone, log ratios. Default 0. */
  readonly spread?: number;
}

/** What the ratios say of one relation; all null where a bed has no mean. */
export interface RelationCheck {
  /** Mean log ratio of lower minus upper. */
  readonly difference: number | null;
  /** The difference over its standard error. */
  readonly z: number | null;
  /**
   * Of `older`: one-sided probability of so low a difference, or a lower one, between beds of equal age. Of `same`:
   * two-sided probability of so large a difference. Not adjusted for the number of relations; the verdict is.
   */
  readonly p_reversed: number | null;
  readonly verdict: RelationVerdict;
}

const NOT_TESTED: RelationCheck = { difference: null, z: null, p_reversed: null, verdict: 'not tested' };

/**
 * Holds each field relation against the two unconstrained bed means (design 7.7). The older bed should have the higher
 * ratio. Two beds of one section share one temperature history, so only the errors of their means count; between
 * sections the spread tau of either bed joins. Probabilities are of Student's t at the degrees of freedom of the pooled
 * scatter, so few shells make them honest.
 *
 * Verdicts of `older`: `reversed` where the Benjamini–Hochberg adjusted p is at most alpha (over all different pairs of
 * beds tested, so at most alpha of the reversals told of are expected to be chance); `agrees` where the difference is
 * positive and differs from zero at alpha, one-sided; `tied` otherwise. Verdicts of `same`: `reversed` where the two
 * beds differ at alpha after adjustment (they contradict the statement), else `agrees`: a failure to differ is all
 * that ratios can say for equal age. `not tested` where a bed has no mean on this clock.
 *
 * Source: Benjamini and Hochberg 1995, Journal of the Royal Statistical Society B 57, 289–300,
 * 10.1111/j.2517-6161.1995.tb02031.x.
 *
 * @param relations Statements to check; the answers come in the same order.
 * @param beds Beds of one clock. A bed named by a relation but missing here counts as one without a mean.
 * @throws RangeError when alpha is not between 0 and 1, df is not above 0, or spread is negative.
 * @example
 * const beds = [
 *   { key: 'Cove/low', section: 'Cove', n: 5, mean: -0.8, se: 0.03 },
 *   { key: 'Cove/top', section: 'Cove', n: 5, mean: -0.6, se: 0.03 },
 * ];
 * const relation = { lower: 'Cove/low', upper: 'Cove/top', kind: 'older', basis: 'superposition', certainty: 'certain' } as const;
 * checkRelations([relation], beds, { df: 8 })[0]?.verdict // => 'reversed'
 */
export function checkRelations(
  relations: readonly RelationToCheck[],
  beds: readonly BedMean[],
  options: RelationCheckOptions = {},
): RelationCheck[] {
  const alpha = options.alpha ?? 0.05;
  const df = options.df ?? Number.POSITIVE_INFINITY;
  const spread = options.spread ?? 0;
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`checkRelations: alpha must lie between 0 and 1, got ${alpha}`);
  if (!(df > 0)) throw new RangeError(`checkRelations: df must be above 0, got ${df}`);
  if (!(spread >= 0)) throw new RangeError(`checkRelations: spread must not be negative, got ${spread}`);

  const byKey = new Map(beds.map((bed) => [bed.key, bed]));
  const tests = relations.map((relation) => {
    const lower = byKey.get(relation.lower);
    const upper = byKey.get(relation.upper);
    if (!hasMean(lower) || !hasMean(upper)) return null;
    const difference = lower.mean - upper.mean;
    const between = lower.section === upper.section ? 0 : 2 * spread * spread;
    const se = Math.sqrt(lower.se * lower.se + upper.se * upper.se + between);
    const z = difference === 0 ? 0 : difference / se;
    const below = tailBelow(z, df);
    const p = relation.kind === 'same' ? 2 * tailBelow(-Math.abs(z), df) : below;
    return { difference, z, p, above: tailBelow(-z, df) };
  });
  const adjusted = adjustOverPairs(relations, tests);
  return tests.map((test, index) => {
    if (test === null) return NOT_TESTED;
    const differs = (adjusted[index] ?? 1) <= alpha;
    const fits = relations[index]?.kind === 'same' || (test.difference > 0 && test.above <= alpha);
    const verdict = differs ? 'reversed' : fits ? 'agrees' : 'tied';
    return { difference: test.difference, z: test.z, p_reversed: test.p, verdict };
  });
}

function hasMean(bed: BedMean | undefined): bed is BedMean {
  return bed !== undefined && bed.n > 0 && Number.isFinite(bed.mean) && bed.se >= 0;
}

/** P(T ≤ z); an infinite z comes from means without any error. */
function tailBelow(z: number, df: number): number {
  if (z === Number.NEGATIVE_INFINITY) return 0;
  if (z === Number.POSITIVE_INFINITY) return 1;
  return Number.isFinite(df) ? studentTCdf(z, df) : normalCdf(z);
}

/** A pair stated twice (say as superposition and as a marker) is one test, so it counts once in the adjustment. */
function adjustOverPairs(
  relations: readonly RelationToCheck[],
  tests: readonly ({ readonly p: number } | null)[],
): (number | null)[] {
  const slots = new Map<string, number>();
  const p: number[] = [];
  const slotOf = tests.map((test, index) => {
    const relation = relations[index];
    if (test === null || relation === undefined) return null;
    const ends = [relation.lower, relation.upper];
    const name = JSON.stringify([relation.kind, ...(relation.kind === 'same' ? ends.sort() : ends)]);
    const known = slots.get(name);
    if (known !== undefined) return known;
    slots.set(name, p.length);
    return p.push(test.p) - 1;
  });
  const adjusted = benjaminiHochberg(p);
  return slotOf.map((slot) => (slot === null ? null : (adjusted[slot] ?? 1)));
}
