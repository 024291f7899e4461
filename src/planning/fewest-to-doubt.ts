/** The smallest sets of things that hold every conflict between them. */
export interface FewestToDoubt {
  /** Size of a smallest set. */
  readonly fewest: number;
  /** Members of at least one smallest set, and of every one, ascending. */
  readonly inSome: readonly number[];
  readonly inEvery: readonly number[];
}

/**
 * The fewest things that, left out, leave no conflict. Conflicts must be transitive: where i conflicts with j and j with
 * k, so does i with k, as it is when i should be older than j but is dated younger. Then the smallest set has as many
 * members as a largest matching between the two ends of the conflicts, which is a minimum cut of unit capacities; which
 * members it may or must hold follows from the sizes with one member left out, or kept in.
 *
 * Source: Dilworth 1950, Annals of Mathematics 51, 161–166, 10.2307/1969503; Fulkerson 1956, Proceedings of the American
 * Mathematical Society 7, 701–702.
 *
 * @param size number of things
 * @param conflicts pairs of their indices, the first to the second
 * @example
 * ```ts
 * fewestToDoubt(4, [[0, 2], [1, 2]]).inEvery; // => [2]
 * fewestToDoubt(4, [[0, 2]]).inSome; // => [0, 2]
 * ```
 */
export function fewestToDoubt(size: number, conflicts: readonly (readonly [number, number])[]): FewestToDoubt {
  const next: number[][] = Array.from({ length: size }, () => []);
  const beside: Set<number>[] = Array.from({ length: size }, () => new Set());
  for (const [from, to] of conflicts) {
    next[from].push(to);
    beside[from].add(to);
    beside[to].add(from);
  }
  const fewest = largestMatching(next, new Set());
  const inSome: number[] = [];
  const inEvery: number[] = [];
  for (let one = 0; one < size; one++) {
    if (beside[one].size === 0) continue;
    if (1 + largestMatching(next, new Set([one])) > fewest) continue;
    inSome.push(one);
    const without = beside[one].size + largestMatching(next, new Set([one, ...beside[one]]));
    if (without > fewest) inEvery.push(one);
  }
  return { fewest, inSome, inEvery };
}

/** Size of a largest matching of arcs, no two with the same first or the same second end (augmenting paths). */
function largestMatching(next: readonly (readonly number[])[], leftOut: ReadonlySet<number>): number {
  const partner = new Array<number>(next.length).fill(-1);
  const augment = (from: number, seen: Set<number>): boolean => {
    for (const to of next[from]) {
      if (leftOut.has(to) || seen.has(to)) continue;
      seen.add(to);
      if (partner[to] === -1 || augment(partner[to], seen)) {
        partner[to] = from;
        return true;
      }
    }
    return false;
  };
  let size = 0;
  for (let from = 0; from < next.length; from++) if (!leftOut.has(from) && augment(from, new Set())) size++;
  return size;
}
