import { beginTasks } from '../model/begin-tasks.js';
import type { Host, TaskMapper } from '../model/index.js';
import { effectiveSampleSize, splitRHat } from '../statistics/index.js';
import type { ChainDraws } from './chain-draws.js';
import type { OrderModel } from './gibbs-chain.js';

/** How the posterior is sampled. */
export interface PosteriorOptions {
  readonly seed: number;
  /** Runs the chains, which are tasks named `chainDraws`. */
  readonly map: TaskMapper;
  /** Begins with them where others can; see {@link Host}. */
  readonly begin?: Host['begin'];
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

/** Draws times beds of one chain that are worth a thread: a twentieth of a second. */
const HEAVY = 1e5;

/**
 * Samples the order of all beds under superposition (design 7.6) and reports how well the chains have settled: smallest
 * effective sample size and largest split R-hat over beds. While fewer than 400 effective draws or an R-hat of 1.01 or more
 * are seen, the chains run again with twice the sweeps between draws.
 */
export const samplePosterior = (model: OrderModel, options: PosteriorOptions): Promise<OrderPosterior> =>
  beginPosterior(model, options)();

/** Begins with {@link samplePosterior} on other threads, where there are any; what is returned gives it, and is called once. */
export function beginPosterior(model: OrderModel, options: PosteriorOptions): () => Promise<OrderPosterior> {
  const beds = model.means.length;
  const { nodes } = model.graph;
  const { seed, map, chains = 4, onProgress } = options;
  const draws = options.draws ?? Math.max(100, Math.min(1000, Math.floor(2.4e6 / (chains * Math.max(1, beds)))));
  const most = beds > 1000 ? 1 : (options.thinning ?? 16);
  const step = Math.max(1, Math.ceil(nodes / WATCHED));
  const watched = Array.from({ length: Math.ceil(nodes / step) }, (_, at) => at * step);
  const tasks = (thinning: number) =>
    Array.from({ length: chains }, (_, chain) => {
      const argument = { model, seed, chain, draws, thinning, watched };
      return { name: 'chainDraws', argument, heavy: beds * draws * thinning > HEAVY };
    });
  const onDone = (done: number) => onProgress?.(done / chains);
  const first = beginTasks(options, tasks(1), onDone);
  return async () => {
    let drawn = await first();
    for (let thinning = 1; ; thinning *= 2) {
      if (thinning > 1) drawn = await map(tasks(thinning), onDone);
      const judged = judge(drawn as ChainDraws[], watched.length);
      const converged = judged.essMin >= ENOUGH_DRAWS && judged.rhatMax < SETTLED;
      if (converged || thinning * 2 > most) {
        const ranks = joinRanks(drawn as ChainDraws[], beds, draws);
        return { beds, draws: draws * chains, ranks, chains, converged, ...judged };
      }
    }
  };
}

function judge(drawn: readonly ChainDraws[], watched: number): { essMin: number; rhatMax: number } {
  let essMin = Number.POSITIVE_INFINITY;
  let rhatMax = 1;
  for (let at = 0; at < watched; at++) {
    const traces = drawn.map((chain) => chain.traces[at]);
    essMin = Math.min(essMin, effectiveSampleSize(traces, PLAIN));
    rhatMax = Math.max(rhatMax, splitRHat(traces, PLAIN));
  }
  return { essMin, rhatMax };
}

/** The draws of all chains one after the other, for each bed. */
function joinRanks(drawn: readonly ChainDraws[], beds: number, draws: number): Uint32Array {
  const total = draws * drawn.length;
  const ranks = new Uint32Array(beds * total);
  for (let chain = 0; chain < drawn.length; chain++)
    turnOver(drawn[chain].ranks, beds, draws, ranks, chain * draws, total);
  return ranks;
}

/** Side of a square of ranks that fits into a processor's nearest memory with the square it goes to. */
const SQUARE = 16;

/** Ranks by draw into ranks by bed, those of a bed from `first` on and `stride` from bed to bed, a square at a time. */
function turnOver(
  from: Uint32Array,
  beds: number,
  draws: number,
  to: Uint32Array,
  first: number,
  stride: number,
): void {
  for (let bed = 0; bed < beds; bed += SQUARE) {
    const lastBed = Math.min(beds, bed + SQUARE);
    for (let draw = 0; draw < draws; draw += SQUARE) {
      const lastDraw = Math.min(draws, draw + SQUARE);
      for (let b = bed; b < lastBed; b++) {
        for (let d = draw; d < lastDraw; d++) to[b * stride + first + d] = from[d * beds + b];
      }
    }
  }
}
