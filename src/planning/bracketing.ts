import { type BitSet, emptySet, include, includeAll, onesIn } from './bit-set.js';

/** Who is known to be older and younger than whom, as sets. */
export interface OlderAndYounger {
  /** Beds known to be younger than each bed, and those known to be older. */
  readonly younger: readonly BitSet[];
  readonly older: readonly BitSet[];
}

/** How many beds some dates bound. */
export interface Bounded {
  /** Beds, themselves undated, with a dated bed known to be older and a dated bed known to be younger. */
  readonly bracketed: number;
  /** Beds, themselves undated, with at least one of the two. */
  readonly bounded: number;
}

/**
 * Counts the beds that dating the chosen ones would bracket or bound.
 *
 * @param chosen indices of the beds to date
 * @example
 * ```ts
 * // a is older than b, and b older than c
 * const [a, b, c] = [1, 2, 4].map((bits) => Uint32Array.of(bits));
 * const chain = { younger: [Uint32Array.of(6), c, Uint32Array.of(0)], older: [Uint32Array.of(0), a, Uint32Array.of(3)] };
 * boundedBy(chain, [0, 2]).bracketed; // => 1
 * ```
 */
export function boundedBy(known: OlderAndYounger, chosen: readonly number[]): Bounded {
  const size = known.younger.length;
  const below = emptySet(size);
  const above = emptySet(size);
  const dated = emptySet(size);
  for (const bed of chosen) {
    includeAll(below, known.younger[bed]);
    includeAll(above, known.older[bed]);
    include(dated, bed);
  }
  let bracketed = 0;
  let bounded = 0;
  for (let i = 0; i < below.length; i++) {
    bracketed += onesIn(below[i] & above[i] & ~dated[i]);
    bounded += onesIn((below[i] | above[i]) & ~dated[i]);
  }
  return { bracketed, bounded };
}
