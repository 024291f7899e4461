import { maximumFlow } from '../statistics/index.js';
import { residualNetwork } from './residual-network.js';
import type { ShellConflicts } from './shell-conflicts.js';

/** The least costly shells that leave no conflict. */
export interface ShellsToSetAside {
  /** Indices of the shells, rising. */
  readonly shells: readonly number[];
  /** Their cost together, after rounding each to a thousandth. */
  readonly cost: number;
  /** Whether no other set of so few shells costs as little. */
  readonly unique: boolean;
  /** Shells that every least costly set holds. */
  readonly inAll: readonly number[];
  /** Shells that some but not all least costly sets hold. */
  readonly inSome: readonly number[];
  /** Another least costly set, where there is one. */
  readonly alternative: readonly number[] | null;
}

/**
 * The least costly set of shells whose removal leaves no conflict (design 7.8), exact; among equal costs the fewest
 * shells.
 *
 * Conflicts are a strict partial order, so shells that may stay together are an antichain, and the cheapest set to
 * remove is the complement of the heaviest antichain. By the weighted form of Dilworth's theorem that is a minimum
 * cut: every shell is split in two, its lower half fed by the source and its upper half drained to the sink at its
 * cost; a conflict leads from the lower half of one shell to the upper half of the other without limit. The shells
 * above by more than the limit are a tail of each bed sorted by ratio, so one chain of nodes a bed stands for all its
 * pairs.
 *
 * All minimum cuts are the closed sets of the residual network (Picard and Queyranne 1980, 10.1007/BFb0120902); from
 * its strong components follows for each shell whether every, some or no least costly set holds it.
 *
 * Sources: Dilworth 1950, Annals of Mathematics 51, 161–166, 10.2307/1969503; Ford and Fulkerson 1962, Flows in
 * Networks.
 *
 * @param conflicts From `findShellConflicts`.
 * @param costs Cost of each shell, above 0; rounded to thousandths (at least 0.001), so that sums are exact.
 * @throws RangeError when a cost is not above 0.
 */
export function shellsToSetAside(conflicts: ShellConflicts, costs: readonly number[]): ShellsToSetAside {
  const { asLower, asUpper } = conflicts;
  const involved: number[] = [];
  for (let index = 0; index < costs.length; index++) if (asLower[index] + asUpper[index] > 0) involved.push(index);
  if (involved.length === 0) return { shells: [], cost: 0, unique: true, inAll: [], inSome: [], alternative: null };
  const thousandths = new Float64Array(costs.length);
  for (const index of involved) {
    const cost = costs[index];
    if (!(cost > 0 && cost < Number.POSITIVE_INFINITY)) {
      throw new RangeError(`shellsToSetAside: every cost must be above 0 and finite, got ${cost} for shell ${index}`);
    }
    thousandths[index] = Math.max(1, Math.round(1000 * cost));
  }
  const network = buildNetwork(conflicts, involved, thousandths);
  const { flow } = maximumFlow(network.nodes, network.arcs, network.source, network.sink);
  const residual = residualNetwork(network.nodes, network.arcs, flow);
  const fromSource = residual.reachedFrom([network.source]);
  const toSink = residual.reaching(network.sink);
  const component = residual.components();

  const keptIn = (side: Uint8Array, place: number) => side[2 * place] === 1 && side[2 * place + 1] === 0;
  const setAsideIn = (side: Uint8Array) => involved.filter((_, place) => !keptIn(side, place));
  const shells = setAsideIn(fromSource);
  const inAll: number[] = [];
  const inSome: number[] = [];
  let alternative: number[] | null = null;
  involved.forEach((shell, place) => {
    const [lowerHalf, upperHalf] = [2 * place, 2 * place + 1];
    const canStay = !fromSource[upperHalf] && !toSink[lowerHalf] && component[lowerHalf] !== component[upperHalf];
    const canGo = !toSink[upperHalf] || !fromSource[lowerHalf];
    if (!canStay) inAll.push(shell);
    if (!(canStay && canGo)) return;
    inSome.push(shell);
    if (alternative !== null) return;
    // The other state of this shell: close the cut under what follows from moving one of its halves.
    const half = keptIn(fromSource, place) ? upperHalf : lowerHalf;
    alternative = setAsideIn(residual.reachedFrom([network.source, half]));
  });
  const cost = shells.reduce((sum, shell) => sum + thousandths[shell], 0) / 1000;
  return { shells, cost, unique: inSome.length === 0, inAll, inSome, alternative };
}

interface Network {
  readonly nodes: number;
  readonly arcs: { from: number[]; to: number[]; capacity: number[] };
  readonly source: number;
  readonly sink: number;
}

/** Nodes: lower half of the k-th shell 2k, its upper half 2k + 1, then the chains of the beds, source and sink. */
function buildNetwork(conflicts: ShellConflicts, involved: readonly number[], cost: Float64Array): Network {
  const place = new Int32Array(conflicts.asLower.length);
  involved.forEach((shell, at) => {
    place[shell] = at;
  });
  const from: number[] = [];
  const to: number[] = [];
  const capacity: number[] = [];
  const arc = (a: number, b: number, limit: number) => {
    from.push(a);
    to.push(b);
    capacity.push(limit);
  };
  let nodes = 2 * involved.length;
  // Positions of a chain below the least `from` are never entered.
  const first = new Map<number, number>();
  for (const { bed, from: start } of conflicts.conflicts) {
    const known = first.get(bed);
    if (known === undefined || start < known) first.set(bed, start);
  }
  const chain = new Int32Array(conflicts.sorted.length);
  for (const [bed, start] of first) {
    const members = conflicts.sorted[bed];
    chain[bed] = nodes - start;
    for (let at = start; at < members.length; at++) {
      arc(nodes, 2 * place[members[at]] + 1, Number.POSITIVE_INFINITY);
      if (at + 1 < members.length) arc(nodes, nodes + 1, Number.POSITIVE_INFINITY);
      nodes++;
    }
  }
  for (const { lower, bed, from: start } of conflicts.conflicts) {
    arc(2 * place[lower], chain[bed] + start, Number.POSITIVE_INFINITY);
  }
  const [source, sink] = [nodes, nodes + 1];
  // Equal costs: the fewest shells. One unit a shell can never outweigh a thousandth of cost.
  const unit = involved.length + 1;
  involved.forEach((shell, at) => {
    const limit = cost[shell] * unit + 1;
    arc(source, 2 * at, limit);
    arc(2 * at + 1, sink, limit);
    arc(2 * at + 1, 2 * at, Number.POSITIVE_INFINITY);
  });
  return { nodes: nodes + 2, arcs: { from, to, capacity }, source, sink };
}
