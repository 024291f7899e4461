/** What is left of a network under a flow: whom can more flow reach? */
export interface ResidualNetwork {
  /** Marks nodes that can be reached from any of the roots. */
  readonly reachedFrom: (roots: readonly number[]) => Uint8Array;
  /** Marks nodes from which the root can be reached. */
  readonly reaching: (root: number) => Uint8Array;
  /** Number of the strong component of each node. */
  readonly components: () => Int32Array;
}

/**
 * The residual network of a flow with whole-number capacities: an arc is open forwards while it is not full, and
 * backwards while it carries something.
 *
 * @param nodes Number of nodes.
 * @param arcs From, to and capacity of each arc.
 * @param flow Flow in each arc.
 */
export function residualNetwork(
  nodes: number,
  arcs: { readonly from: readonly number[]; readonly to: readonly number[]; readonly capacity: readonly number[] },
  flow: Float64Array,
): ResidualNetwork {
  const tails: number[] = [];
  const heads: number[] = [];
  arcs.from.forEach((from, index) => {
    if (arcs.capacity[index] - flow[index] > 0.5) {
      tails.push(from);
      heads.push(arcs.to[index]);
    }
    if (flow[index] > 0.5) {
      tails.push(arcs.to[index]);
      heads.push(from);
    }
  });
  const forward = adjacency(nodes, tails, heads);
  return {
    reachedFrom: (roots) => reach(nodes, forward, roots),
    reaching: (root) => reach(nodes, adjacency(nodes, heads, tails), [root]),
    components: () => strongComponents(nodes, forward),
  };
}

interface Adjacency {
  readonly start: Int32Array;
  readonly next: Int32Array;
}

function adjacency(nodes: number, tails: readonly number[], heads: readonly number[]): Adjacency {
  const start = new Int32Array(nodes + 1);
  for (const tail of tails) start[tail + 1]++;
  for (let v = 0; v < nodes; v++) start[v + 1] += start[v];
  const fill = start.slice(0, nodes);
  const next = new Int32Array(tails.length);
  tails.forEach((tail, index) => {
    next[fill[tail]++] = heads[index];
  });
  return { start, next };
}

function reach(nodes: number, { start, next }: Adjacency, roots: readonly number[]): Uint8Array {
  const seen = new Uint8Array(nodes);
  const stack = [...roots];
  for (const root of roots) seen[root] = 1;
  for (let node = stack.pop(); node !== undefined; node = stack.pop()) {
    for (let at = start[node]; at < start[node + 1]; at++) {
      if (seen[next[at]]) continue;
      seen[next[at]] = 1;
      stack.push(next[at]);
    }
  }
  return seen;
}

/** Strong components (Tarjan 1972, 10.1137/0201010), without recursion. */
function strongComponents(nodes: number, { start, next }: Adjacency): Int32Array {
  const order = new Int32Array(nodes).fill(-1);
  const low = new Int32Array(nodes);
  const component = new Int32Array(nodes).fill(-1);
  const cursor = start.slice(0, nodes);
  const open: number[] = [];
  const path: number[] = [];
  let visited = 0;
  let found = 0;
  for (let root = 0; root < nodes; root++) {
    if (order[root] >= 0) continue;
    path.push(root);
    while (path.length > 0) {
      const node = path[path.length - 1];
      if (order[node] < 0) {
        order[node] = low[node] = visited++;
        open.push(node);
      }
      if (cursor[node] < start[node + 1]) {
        const other = next[cursor[node]++];
        if (order[other] < 0) path.push(other);
        else if (component[other] < 0) low[node] = Math.min(low[node], order[other]);
        continue;
      }
      path.pop();
      if (path.length > 0) low[path[path.length - 1]] = Math.min(low[path[path.length - 1]], low[node]);
      if (low[node] === order[node]) {
        for (let member = open.pop(); member !== undefined; member = open.pop()) {
          component[member] = found;
          if (member === node) break;
        }
        found++;
      }
    }
  }
  return component;
}
