/** A set of whole numbers from 0, 32 to a word. */
export type BitSet = Uint32Array;

/** An empty set with room for the numbers 0 to size − 1. */
export const emptySet = (size: number): BitSet => new Uint32Array(Math.ceil(size / 32));

/** Puts a number into the set, in place. */
export function include(set: BitSet, value: number): void {
  set[value >>> 5] |= 1 << (value & 31);
}

/** Whether the number is in the set. */
export const includes = (set: BitSet, value: number): boolean => (set[value >>> 5] & (1 << (value & 31))) !== 0;

/** Adds all of `from` to `to`, in place. */
export function includeAll(to: BitSet, from: BitSet): void {
  for (let i = 0; i < to.length; i++) to[i] |= from[i];
}

/**
 * Number of ones in a 32-bit word.
 *
 * Source: Warren 2013, Hacker's Delight, 2nd ed., section 5-1.
 *
 * @example
 * ```ts
 * onesIn(0b1011); // => 3
 * ```
 */
export function onesIn(word: number): number {
  let v = word - ((word >>> 1) & 0x55555555);
  v = (v & 0x33333333) + ((v >>> 2) & 0x33333333);
  return Math.imul((v + (v >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}

/** Number of members. */
export function sizeOf(set: BitSet): number {
  let count = 0;
  for (let i = 0; i < set.length; i++) count += onesIn(set[i]);
  return count;
}
