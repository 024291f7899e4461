import { requireThat } from './check.js';

/**
 * Adjusted Rand index of two groupings of the same things: 1 when they agree, near 0 when they agree no better than by
 * chance (Hubert and Arabie 1985, 10.1007/BF01908075). Two groupings that are alike and leave no room for chance (all in
 * one group, or each alone) give 1.
 *
 * @param labelsA group of each thing, numbers or names
 * @param labelsB the same things in the same order
 * @throws RangeError when the lists differ in length or are empty
 * @example
 * ```ts
 * adjustedRandIndex([0, 0, 1, 1], [0, 0, 1, 2]); // => 0.5714285714285714
 * ```
 */
export function adjustedRandIndex(labelsA: ArrayLike<number | string>, labelsB: ArrayLike<number | string>): number {
  const n = labelsA.length;
  requireThat(n > 0 && n === labelsB.length, 'adjustedRandIndex', 'two lists of one length', n, labelsB.length);
  const inA = new Map<number | string, number>();
  const inB = new Map<number | string, number>();
  const inBoth = new Map<number | string, Map<number | string, number>>();
  for (let i = 0; i < n; i++) {
    count(inA, labelsA[i]);
    count(inB, labelsB[i]);
    const row = inBoth.get(labelsA[i]) ?? new Map<number | string, number>();
    inBoth.set(labelsA[i], row);
    count(row, labelsB[i]);
  }
  const together = [...inBoth.values()].reduce((sum, row) => sum + pairs(row), 0);
  const togetherA = pairs(inA);
  const togetherB = pairs(inB);
  const expected = n > 1 ? (togetherA * togetherB) / ((n * (n - 1)) / 2) : 0;
  const room = (togetherA + togetherB) / 2 - expected;
  return room === 0 ? 1 : (together - expected) / room;
}

function count(counts: Map<number | string, number>, label: number | string): void {
  counts.set(label, (counts.get(label) ?? 0) + 1);
}

function pairs(counts: ReadonlyMap<number | string, number>): number {
  let sum = 0;
  for (const size of counts.values()) sum += (size * (size - 1)) / 2;
  return sum;
}
