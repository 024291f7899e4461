import { normalQuantile } from '../statistics/index.js';
import type { BedOnClock, ClockInView } from './bed-on-clock.js';
import type { KnownOrder } from './known-order.js';
import { chanceFromHere, resolvingLimit } from './power.js';

/** A pair of beds of one clock whose order is not known. */
export interface UnresolvedPair {
  readonly a: BedOnClock;
  readonly b: BedOnClock;
  /** The gap of a over b that, from means alone, would give the probability that the order gives. */
  readonly gap: number;
}

/** More shells by bed. */
export type MoreShells = ReadonlyMap<BedOnClock, number>;

/** The unresolved pairs of one clock, looked up by bed. */
export interface UnresolvedPairs {
  /** The pairs that a bed, or the deposit it belongs to, stands in; the deposit is `a`. */
  readonly of: (bed: BedOnClock) => readonly UnresolvedPair[];
  /** Expected number of pairs that the shells newly resolve in the whole order of the clock. */
  readonly gained: (more: MoreShells) => number;
  /** Chance that the shells resolve one pair; the variance for spread is that of the clock unless given. */
  readonly chance: (pair: UnresolvedPair, more: MoreShells, spreadVariance?: number) => number;
}

/**
 * All pairs of deposits whose order is not known at 1 − alpha, and what more shells would do to them: each pair's chance by
 * {@link chanceFromHere}, summed.
 *
 * @param view with beds stated to be as old joined into deposits
 */
export function unresolvedPairs(view: ClockInView, known: KnownOrder, alpha: number): UnresolvedPairs {
  const limit = resolvingLimit(1 - alpha, view.df);
  const heavier = limit / normalQuantile(1 - alpha);
  const index = new Map(view.beds.map((bed) => [bed, known.indexOf.get(bed.key)!]));
  const depositOf = new Map(view.beds.flatMap((bed) => bed.members.map((key) => [key, bed] as const)));
  const found = new Map<BedOnClock, readonly UnresolvedPair[]>();
  const of = (asked: BedOnClock): readonly UnresolvedPair[] => {
    const bed = depositOf.get(asked.key)!;
    const own = found.get(bed) ?? pairsOf(bed);
    found.set(bed, own);
    return own;
  };
  const pairsOf = (bed: BedOnClock): UnresolvedPair[] => {
    const at = index.get(bed)!;
    const open: UnresolvedPair[] = [];
    for (const other of view.beds) {
      const to = index.get(other)!;
      const p = known.olderThan(at, to);
      if (at === to || !(p < 1 - alpha && known.olderThan(to, at) < 1 - alpha) || known.asOld(at, to)) continue;
      // scaled so that a gap at the limit stands for a probability at the limit
      const z = normalQuantile(Math.max(p, alpha));
      const variance =
        heavier * heavier * (varianceWith(bed, 0) + varianceWith(other, 0)) + view.spreadVariance(bed, other);
      open.push({ a: bed, b: other, gap: z * Math.sqrt(variance) });
    }
    return open;
  };
  const chance = ({ a, b, gap }: UnresolvedPair, more: MoreShells, spreadVariance = view.spreadVariance(a, b)) =>
    chanceFromHere(
      {
        gap,
        variance: varianceWith(a, 0) + varianceWith(b, 0),
        varianceAfter: varianceWith(a, more.get(a) ?? 0) + varianceWith(b, more.get(b) ?? 0),
        spreadVariance,
        limit,
      },
      alpha,
    );
  return {
    of,
    chance,
    gained: (asked) => {
      const more = new Map([...asked].map(([bed, count]) => [depositOf.get(bed.key)!, count]));
      let sum = 0;
      const done = new Set<BedOnClock>();
      for (const bed of more.keys()) {
        for (const pair of of(bed)) if (!done.has(pair.b)) sum += chance(pair, more);
        done.add(bed);
      }
      return sum;
    },
  };
}

/** Variance of a bed's mean with more shells. */
export function varianceWith(bed: BedOnClock, more: number): number {
  return (bed.shellVariance * bed.shells) / (bed.shells + more) + bed.otherVariance;
}
