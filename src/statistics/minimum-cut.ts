import { type Arcs, type Residual, saturate } from './maximum-flow.js';

/** A cheapest cut and its sides. */
export interface MinimumCut {
  /** Capacity of the cut, which is the greatest flow. */
  readonly value: number;
  /** The smallest source side of any least cut: sourceSide[v] is 1 when node v is in it. */
  readonly sourceSide: Uint8Array;
  /** The largest source side of any least cut; it holds the smallest one. */
  readonly largestSourceSide: Uint8Array;
  /** Is there only one least cut? True when the two sides above are the same. */
  readonly unique: boolean;
}

/**
 * Cheapest set of arcs that parts the sink from the source (Ford and Fulkerson 1956, 10.4153/CJM-1956-045-5), by the
 * greatest flow. All least cuts lie between two of them, one with the smallest and one with the largest source side
 * (Picard and Queyranne 1980, 10.1007/BFb0120902); a node that only the larger one holds is one on which equal solutions differ.
 *
 * Real capacities work; what is left of an arc at or below 1e-12 of the widest limited one counts as nothing.
 *
 * @param nodes number of nodes
 * @param arcs from, to and capacity of each arc, three lists; Infinity for an arc that may not be cut
 * @throws RangeError when a node or capacity is out of range, source and sink are the same, or every cut is infinite
 * @example
 * ```ts
 * const cut = minimumCut(3, { from: [0, 1], to: [1, 2], capacity: [5, 3] }, 0, 2);
 * cut.value; // => 3
 * [...cut.sourceSide]; // => [1, 1, 0]
 * cut.unique; // => true
 * ```
 */
export function minimumCut(nodes: number, arcs: Arcs, source: number, sink: number): MinimumCut {
  const residual = saturate('minimumCut', nodes, arcs, source, sink);
  const sourceSide = reached(nodes, residual, source, false);
  const sinkSide = reached(nodes, residual, sink, true);
  const largestSourceSide = sinkSide.map((inside) => 1 - inside);
  const unique = sourceSide.every((inside, v) => inside === largestSourceSide[v]);
  return { value: residual.value, sourceSide, largestSourceSide, unique };
}

/** Nodes that can be reached over what is left of the network, or from which `root` can be reached. */
function reached(
  nodes: number,
  { start, head, mate, left, dust }: Residual,
  root: number,
  backwards: boolean,
): Uint8Array {
  const inside = new Uint8Array(nodes);
  inside[root] = 1;
  const stack = [root];
  for (let node = stack.pop(); node !== undefined; node = stack.pop()) {
    for (let at = start[node]; at < start[node + 1]; at++) {
      const open = left[backwards ? mate[at] : at] > dust;
      if (open && !inside[head[at]]) {
        inside[head[at]] = 1;
        stack.push(head[at]);
      }
    }
  }
  return inside;
}
