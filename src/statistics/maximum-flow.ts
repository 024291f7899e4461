import type { Numbers } from './check.js';
import { requireThat } from './check.js';

/** Arcs of a network, the same place in each list for one arc. Lists may be typed arrays. */
export interface Arcs {
  /** Node each arc leaves, from 0. */
  readonly from: Numbers;
  /** Node each arc enters, from 0. */
  readonly to: Numbers;
  /** Most that can flow through each arc, 0 or more; Infinity for no limit. */
  readonly capacity: Numbers;
}

/** What is left of a network once no more can flow: positions are grouped by node, one for each end of each arc. */
export interface Residual {
  readonly value: number;
  /** Positions of node v run from start[v] to start[v + 1] − 1. */
  readonly start: Int32Array;
  readonly head: Int32Array;
  /** Position of the same arc seen from its other end. */
  readonly mate: Int32Array;
  /** What can still flow away through each position. */
  readonly left: Float64Array;
  /** Position of each arc at the node it leaves. */
  readonly place: Int32Array;
  /** What is left at or below this counts as nothing (rounding of real capacities). */
  readonly dust: number;
}

/**
 * Greatest flow from source to sink, and the flow in each arc.
 *
 * @param nodes number of nodes
 * @throws RangeError when a node or capacity is out of range, source and sink are the same, or the flow has no limit
 * @example
 * ```ts
 * const flow = maximumFlow(3, { from: [0, 1], to: [1, 2], capacity: [5, 3] }, 0, 2);
 * flow.value; // => 3
 * ```
 */
export function maximumFlow(
  nodes: number,
  arcs: Arcs,
  source: number,
  sink: number,
): { readonly value: number; readonly flow: Float64Array } {
  const { value, mate, left, place } = saturate('maximumFlow', nodes, arcs, source, sink);
  return { value, flow: Float64Array.from(place, (at) => left[mate[at]]) };
}

/**
 * Fills a network to its limit by shortest augmenting paths, a whole level graph at a time (Dinitz 1970, Soviet
 * Mathematics Doklady 11, 1277–1280), with levels counted from the sink so that paths run into few dead ends.
 */
export function saturate(who: string, nodes: number, arcs: Arcs, source: number, sink: number): Residual {
  const network = layOut(who, nodes, arcs, source, sink);
  const { start, head, mate, left, dust } = network;
  const level = new Int32Array(nodes);
  const queue = new Int32Array(nodes);
  const next = new Int32Array(nodes);
  const path = new Int32Array(nodes);
  let value = 0;
  while (levelsFromSink(network, source, sink, level, queue)) {
    next.set(start.subarray(0, nodes));
    let depth = 0;
    let node = source;
    for (;;) {
      if (node === sink) {
        let least = Infinity;
        let narrow = 0;
        for (let i = 0; i < depth; i++) {
          if (left[path[i]] < least) {
            least = left[path[i]];
            narrow = i;
          }
        }
        requireThat(least < Infinity, who, 'a limit on every way from source to sink', 'a way without any limit');
        for (let i = 0; i < depth; i++) {
          left[path[i]] -= least;
          left[mate[path[i]]] += least;
        }
        value += least;
        depth = narrow;
        node = head[mate[path[narrow]]];
        continue;
      }
      let at = next[node];
      const end = start[node + 1];
      const wanted = level[node] - 1;
      while (at < end && !(left[at] > dust && level[head[at]] === wanted)) at++;
      next[node] = at;
      if (at < end) {
        path[depth++] = at;
        node = head[at];
      } else if (depth > 0) {
        // A dead end: step back, and past the arc that led here.
        node = head[mate[path[--depth]]];
        next[node]++;
      } else break;
    }
  }
  return { ...network, value };
}

/** Distance of every node to the sink over arcs that still can carry something, −1 for none. */
function levelsFromSink(
  { start, head, mate, left, dust }: Omit<Residual, 'value'>,
  source: number,
  sink: number,
  level: Int32Array,
  queue: Int32Array,
): boolean {
  level.fill(-1);
  level[sink] = 0;
  queue[0] = sink;
  for (let first = 0, last = 1; first < last; first++) {
    const node = queue[first];
    if (node === source) return true;
    for (let at = start[node]; at < start[node + 1]; at++) {
      const other = head[at];
      if (level[other] < 0 && left[mate[at]] > dust) {
        level[other] = level[node] + 1;
        queue[last++] = other;
      }
    }
  }
  return false;
}

function layOut(who: string, nodes: number, arcs: Arcs, source: number, sink: number): Omit<Residual, 'value'> {
  requireThat(Number.isInteger(nodes) && nodes >= 2, who, 'at least 2 nodes', nodes);
  const isNode = (v: number) => Number.isInteger(v) && v >= 0 && v < nodes;
  requireThat(isNode(source) && isNode(sink) && source !== sink, who, 'two nodes as ends', source, sink);
  const count = arcs.from.length;
  const sameLength = arcs.to.length === count && arcs.capacity.length === count;
  requireThat(sameLength, who, 'lists of one length', count, arcs.to.length, arcs.capacity.length);
  // Copies of one known kind: the loops below stay fast whatever kinds of lists were seen before.
  const from = copyOf(arcs.from);
  const to = copyOf(arcs.to);
  const capacity = copyOf(arcs.capacity);
  const start = new Int32Array(nodes + 1);
  let widest = 0;
  for (let e = 0; e < count; e++) {
    requireThat(isNode(from[e]) && isNode(to[e]), who, 'arcs between its nodes', from[e], to[e]);
    requireThat(capacity[e] >= 0, who, 'capacities from 0 upwards', capacity[e]);
    if (capacity[e] < Infinity && capacity[e] > widest) widest = capacity[e];
    start[from[e] + 1]++;
    start[to[e] + 1]++;
  }
  for (let v = 0; v < nodes; v++) start[v + 1] += start[v];
  const fill = start.slice(0, nodes);
  const head = new Int32Array(2 * count);
  const mate = new Int32Array(2 * count);
  const left = new Float64Array(2 * count);
  const place = new Int32Array(count);
  for (let e = 0; e < count; e++) {
    const out = fill[from[e]]++;
    const back = fill[to[e]]++;
    head[out] = to[e];
    head[back] = from[e];
    mate[out] = back;
    mate[back] = out;
    left[out] = capacity[e];
    place[e] = out;
  }
  return { start, head, mate, left, place, dust: 1e-12 * widest };
}

function copyOf(values: Numbers): Float64Array {
  const copy = new Float64Array(values.length);
  copy.set(values);
  return copy;
}
