import { effectiveSampleSize, type Random, splitRHat } from '../statistics/index.js';
import { type GibbsChain, gibbsChain, type OrderModel } from './gibbs-chain.js';

/** How the posterior is sampled. */
export interface PosteriorOptions {
  readonly random: Random;
  /** Default 4. */
  readonly chains?: number;
  /** Draws kept a chain. Default 1000, fewer where there are very many beds. */
  readonly draws?: number;
  /** Most sweeps between two draws that are kept, reached by doubling while the chains have not settled. Default 16. */
  readonly thinning?: number;
  /** Told how far the sampling is, 0 to 1. */
  readonly onProgress?: (fraction: number) => void;
}

/** Draws of the order. */
export interface OrderPosterior {
  readonly beds: number;
  readonly draws: number;
  /** Rank of bed b in draw d at `b * draws + d`; 1 is the oldest, beds tied by `same` share a rank. */
  readonly ranks: Uint32Array;
  readonly chains: number;
  readonly essMin: number;
  readonly rhatMax: number;
  readonly converged: boolean;
}

/** Convergence limits of Vehtari and others 2021 (doi:10.1214/20-BA1221). */
const ENOUGH_DRAWS = 400;
const SETTLED = 1.01;

/** The draws are means with light tails, so their ranks need not be normalised first. */
const PLAIN = { rankNormalise: false };

/** Deposits watched for convergence; more would cost time and add little. */
const WATCHED = 200;

/**
 * Samples the order of all beds under superposition (design 7.6) and reports how well the chains have settled: smallest
 * effective sample size and largest split R-hat over beds. While fewer than 400 effective draws or an R-hat of 1.01 or more
 * are seen, the chains run on with twice the sweeps between draws.
 */
export function samplePosterior(model: OrderModel, options: PosteriorOptions): OrderPosterior {
  const beds = model.means.length;
  const chains = options.chains ?? 4;
  const draws = options.draws ?? Math.max(100, Math.min(1000, Math.floor(4e6 / (chains * Math.max(1, beds)))));
  const most = beds > 1000 ? 1 : (options.thinning ?? 16);
  const running = Array.from({ length: chains }, (_, at) => gibbsChain(model, options.random.fork(at)));
  for (const chain of running) for (let sweep = 0; sweep < Math.max(50, draws / 4); sweep++) chain.next();
  for (let thinning = 1; ; thinning *= 2) {
    const sample = collect(model, running, draws, thinning, options.onProgress);
    const converged = sample.essMin >= ENOUGH_DRAWS && sample.rhatMax < SETTLED;
    if (converged || thinning * 2 > most) return { beds, draws: draws * chains, chains, converged, ...sample };
  }
}

function collect(
  model: OrderModel,
  chains: readonly GibbsChain[],
  draws: number,
  thinning: number,
  onProgress: PosteriorOptions['onProgress'],
) {
  const { graph } = model;
  const beds = model.means.length;
  const total = draws * chains.length;
  const ranks = new Uint32Array(beds * total);
  const sizes = new Float64Array(graph.nodes);
  for (const node of graph.node) sizes[node]++;
  const step = Math.max(1, Math.ceil(graph.nodes / WATCHED));
  const watched = Array.from({ length: Math.ceil(graph.nodes / step) }, (_, at) => at * step);
  const traces = watched.map(() => chains.map(() => new Float64Array(draws)));
  const order = Array.from({ length: graph.nodes }, (_, node) => node);
  const rankOf = new Uint32Array(graph.nodes);
  chains.forEach((chain, c) => {
    for (let draw = 0; draw < draws; draw++) {
      let theta = chain.next();
      for (let extra = 1; extra < thinning; extra++) theta = chain.next();
      watched.forEach((node, at) => {
        traces[at][c][draw] = theta[node];
      });
      // nearly in order from the draw before, which the sort makes use of
      order.sort((a, b) => theta[b] - theta[a] || a - b);
      let rank = 1;
      for (const node of order) {
        rankOf[node] = rank;
        rank += sizes[node];
      }
      for (let bed = 0; bed < beds; bed++) ranks[bed * total + c * draws + draw] = rankOf[graph.node[bed]];
    }
    onProgress?.((c + 1) / chains.length);
  });
  let essMin = Number.POSITIVE_INFINITY;
  let rhatMax = 1;
  for (const trace of traces) {
    essMin = Math.min(essMin, effectiveSampleSize(trace, PLAIN));
    rhatMax = Math.max(rhatMax, splitRHat(trace, PLAIN));
  }
  return { ranks, essMin, rhatMax };
}
