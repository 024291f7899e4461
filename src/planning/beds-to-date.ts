import { emptySet, includeAll, onesIn, sizeOf } from './bit-set.js';
import { type Bounded, boundedBy, type OlderAndYounger } from './bracketing.js';

/** Options of {@link bedsToDate}. */
export interface BedsToDateOptions {
  /** How sound each bed is to date, 0 to 1; of choices that bound as many beds, sounder ones are named. Default all 1. */
  readonly soundness?: readonly number[];
  /**
   * Work that may be done before the search stops with the best so far: choices looked at, times the 32s of beds there are.
   * Default 25 million.
   */
  readonly patience?: number;
}

/** Beds to date, and what they bound. */
export interface BedsToDate extends Bounded {
  /** Indices, the oldest end of the order first where it is known. */
  readonly beds: readonly number[];
  /** No choice of as many beds brackets more; and if none does, none of those that bracket as many bounds more. */
  readonly proven: boolean;
  /** The most that any choice of as many beds could bracket; equal to `bracketed` where proven. */
  readonly most: number;
}

/**
 * The beds to date so that the most others are bracketed; of those choices, one that also bounds the most beds on one
 * side at least; of those, sound ones (by changing one bed at a time). One date brackets nothing: there the second count
 * decides. Exact: every choice is tried but for those that a bound shows to be worse (branch and bound; Land and Doig
 * 1960, Econometrica 28, 497–520, 10.2307/1910129). Where patience runs out, the best choice found comes with the most
 * that could be bracketed.
 *
 * The bound: a bed that now has one side needs one more date, so r more dates bracket at most the sum of the r best;
 * a bed that has neither needs two, one on either side, so they bracket at most the smaller of the two sums over sides.
 *
 * @param budget number of beds to date; more than there are beds dates them all
 * @throws RangeError when the budget is not a whole number above 0
 */
export function bedsToDate(known: OlderAndYounger, budget: number, options: BedsToDateOptions = {}): BedsToDate {
  const size = known.younger.length;
  if (!(Number.isInteger(budget) && budget >= 1)) {
    throw new RangeError(`bedsToDate: the budget must be a whole number above 0, got ${budget}`);
  }
  const picks = Math.min(budget, size);
  const soundness = options.soundness ?? new Array<number>(size).fill(1);
  const worth = (bounded: Bounded) => bounded.bracketed * (size + 1) + bounded.bounded;
  const soundFrom = (beds: readonly number[]) => beds.reduce((sum, bed) => sum + soundness[bed], 0);

  /** Changes one bed at a time while it helps. */
  const improve = (start: readonly number[]): number[] => {
    let best = [...start];
    let bestWorth = worth(boundedBy(known, best));
    for (let better = true; better; ) {
      better = false;
      for (let at = 0; at < best.length; at++) {
        for (let bed = 0; bed < size; bed++) {
          if (best.includes(bed)) continue;
          const tried = best.with(at, bed);
          const triedWorth = worth(boundedBy(known, tried));
          if (triedWorth > bestWorth || (triedWorth === bestWorth && soundFrom(tried) > soundFrom(best) + 1e-9)) {
            best = tried;
            bestWorth = triedWorth;
            better = true;
          }
        }
      }
    }
    return best;
  };

  const start: number[] = [];
  for (let i = 0; i < picks; i++) {
    let next = -1;
    let nextWorth = -1;
    for (let bed = 0; bed < size; bed++) {
      if (start.includes(bed)) continue;
      const w = worth(boundedBy(known, [...start, bed])) + soundness[bed] / 2;
      if (w > nextWorth) [next, nextWorth] = [bed, w];
    }
    start.push(next);
  }
  let best = improve(start);
  let bestWorth = worth(boundedBy(known, best));

  const search = searcher(known, options.patience ?? 2.5e7);
  const found = search(picks, bestWorth);
  if (found.beds !== null) {
    best = improve(found.beds);
    bestWorth = worth(boundedBy(known, best));
  }
  const bounded = boundedBy(known, best);
  const position = (bed: number) => sizeOf(known.older[bed]) - sizeOf(known.younger[bed]);
  return {
    beds: [...best].sort((a, b) => position(a) - position(b) || a - b),
    ...bounded,
    proven: found.finished,
    most: found.finished ? bounded.bracketed : Math.max(bounded.bracketed, found.most),
  };
}

/** Branch and bound over all choices; looks for a worth above the given one. */
function searcher(known: OlderAndYounger, patience: number) {
  const size = known.younger.length;
  const words = Math.ceil(size / 32);
  const { younger, older } = known;
  const bracketable = younger.filter((set, bed) => sizeOf(set) > 0 && sizeOf(older[bed]) > 0).length;
  const boundable = younger.filter((set, bed) => sizeOf(set) > 0 || sizeOf(older[bed]) > 0).length;
  return (picks: number, atLeast: number) => {
    let best = atLeast;
    let beds: number[] | null = null;
    let left = patience;
    let most = 0;
    const chosen: number[] = [];
    const levels = Array.from({ length: picks + 1 }, () => [emptySet(size), emptySet(size), emptySet(size)]);

    /** The last date: what each bed would make of what is chosen. */
    const complete = (from: number): void => {
      const [below, above, dated] = levels[picks - 1];
      for (let bed = from; bed < size; bed++) {
        const [down, up] = [younger[bed], older[bed]];
        let bracketed = 0;
        let bounded = 0;
        for (let i = 0; i < words; i++) {
          const free = ~dated[i];
          const [d, u] = [below[i] | down[i], above[i] | up[i]];
          bracketed += onesIn(d & u & free);
          bounded += onesIn((d | u) & free);
        }
        // dated itself, it counts for neither
        const [word, bit] = [bed >>> 5, 1 << (bed & 31)];
        if (below[word] & above[word] & bit) bracketed--;
        if ((below[word] | above[word]) & bit) bounded--;
        const total = bracketed * (size + 1) + bounded;
        if (total > best) {
          best = total;
          beds = [...chosen, bed];
        }
      }
    };

    const descend = (depth: number, from: number): boolean => {
      const [below, above, dated] = levels[depth];
      const rest = picks - depth;
      left -= (size - from) * words;
      if (rest === 1) {
        complete(from);
        return true;
      }
      // per bed that may still be chosen: what it would newly bracket, put on one side, and bound
      const brackets: number[] = [];
      const downs: number[] = [];
      const ups: number[] = [];
      const bounds: number[] = [];
      let nowBracketed = 0;
      let nowBounded = 0;
      for (let i = 0; i < words; i++) {
        nowBracketed += onesIn(below[i] & above[i] & ~dated[i]);
        nowBounded += onesIn((below[i] | above[i]) & ~dated[i]);
      }
      for (let bed = from; bed < size; bed++) {
        let bracket = 0;
        let down = 0;
        let up = 0;
        let bound = 0;
        for (let i = 0; i < words; i++) {
          const free = ~dated[i];
          const d = younger[bed][i] & free;
          const u = older[bed][i] & free;
          const none = ~(below[i] | above[i]);
          bracket += onesIn((d & above[i] & ~below[i]) | (u & below[i] & ~above[i]));
          down += onesIn(d & none);
          up += onesIn(u & none);
          bound += onesIn((d | u) & none);
        }
        brackets.push(bracket);
        downs.push(down);
        ups.push(up);
        bounds.push(bound);
      }
      const bracketedAtMost = Math.min(
        bracketable,
        nowBracketed + sumOfLargest(brackets, rest) + Math.min(sumOfLargest(downs, rest), sumOfLargest(ups, rest)),
      );
      const boundedAtMost = Math.min(size - picks, boundable, nowBounded + sumOfLargest(bounds, rest));
      if (depth === 0) most = bracketedAtMost;
      if (bracketedAtMost * (size + 1) + boundedAtMost <= best) return true;
      if (left <= 0) return false;
      for (let bed = from; bed <= size - rest; bed++) {
        const [nextBelow, nextAbove, nextDated] = levels[depth + 1];
        nextBelow.set(below);
        nextAbove.set(above);
        nextDated.set(dated);
        includeAll(nextBelow, younger[bed]);
        includeAll(nextAbove, older[bed]);
        nextDated[bed >>> 5] |= 1 << (bed & 31);
        chosen.push(bed);
        const finished = descend(depth + 1, bed + 1);
        chosen.pop();
        if (!finished) return false;
      }
      return true;
    };
    const finished = descend(0, 0);
    return { beds, finished, most };
  };
}

function sumOfLargest(values: readonly number[], count: number): number {
  const sorted = [...values].sort((a, b) => b - a);
  let sum = 0;
  for (let i = 0; i < Math.min(count, sorted.length); i++) sum += sorted[i];
  return sum;
}
