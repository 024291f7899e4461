import type { RelationGraph } from '../order/index.js';

/**
 * All beds above each bed, directly or through others, from the graph of certain relations. Beds merged by `same`
 * relations share what lies above them.
 *
 * @param graph Graph of the relations that hold for certain, circles excluded.
 * @returns For each bed the indices of the beds above it, rising.
 */
export function bedsAbove(graph: Pick<RelationGraph, 'node' | 'nodes' | 'younger' | 'sequence'>): number[][] {
  const bedsOf = Array.from({ length: graph.nodes }, (): number[] => []);
  graph.node.forEach((node, bed) => {
    bedsOf[node].push(bed);
  });
  const younger = Array.from({ length: graph.nodes }, () => new Set<number>());
  for (const node of [...graph.sequence].reverse()) {
    for (const next of graph.younger[node]) {
      younger[node].add(next);
      for (const further of younger[next]) younger[node].add(further);
    }
  }
  return graph.node.map((node) => [...younger[node]].flatMap((other) => bedsOf[other]).sort((a, b) => a - b));
}
