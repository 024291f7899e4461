import { createRandom } from '../statistics/index.js';
import { gibbsChain, type OrderModel } from './gibbs-chain.js';
import { fallingSorter } from './sort-falling.js';

/** Argument of {@link chainDraws}: plain data, so that it can go to a worker. */
export interface ChainDrawsArgument {
  readonly model: OrderModel;
  readonly seed: number;
  /** Number of the chain: each draws from a stream of its own. */
  readonly chain: number;
  readonly draws: number;
  /** Sweeps between two draws that are kept. */
  readonly thinning: number;
  /** Deposits whose draws are kept for judging the chains. */
  readonly watched: readonly number[];
}

/** What one chain gives. */
export interface ChainDraws {
  /** Rank of bed b in draw d at `d * beds + b`, so that a draw is written in one go; 1 is the oldest, beds of one deposit share a rank. */
  readonly ranks: Uint32Array;
  /** Draws of each watched deposit. */
  readonly traces: readonly Float64Array[];
}

/** One chain of the posterior from its start, the first quarter (50 sweeps at least) not kept. A task for the host. */
export function chainDraws({ model, seed, chain, draws, thinning, watched }: ChainDrawsArgument): ChainDraws {
  const { graph } = model;
  const beds = model.means.length;
  const running = gibbsChain(model, createRandom(seed).fork(chain));
  for (let sweep = 0; sweep < Math.max(50, (draws * thinning) / 4); sweep++) running.next();
  const ranks = new Uint32Array(beds * draws);
  const traces = watched.map(() => new Float64Array(draws));
  const sizes = new Float64Array(graph.nodes);
  for (const deposit of graph.node) sizes[deposit]++;
  const sort = fallingSorter(graph.nodes);
  const node = Uint32Array.from(graph.node);
  const rankOf = new Uint32Array(graph.nodes);
  for (let draw = 0; draw < draws; draw++) {
    let theta = running.next();
    for (let extra = 1; extra < thinning; extra++) theta = running.next();
    const now = theta;
    for (let at = 0; at < watched.length; at++) traces[at][draw] = now[watched[at]];
    const order = sort(now);
    let rank = 1;
    for (let at = 0; at < order.length; at++) {
      rankOf[order[at]] = rank;
      rank += sizes[order[at]];
    }
    for (let bed = 0, at = draw * beds; bed < beds; bed++, at++) ranks[at] = rankOf[node[bed]];
  }
  return { ranks, traces };
}
