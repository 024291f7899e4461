import { describe, expect, it } from 'vitest';
import type { Task } from '../../src/model/index.js';
import {
  type ChainDraws,
  type ChainDrawsArgument,
  chainDraws,
  gibbsChain,
  type OrderModel,
  relationGraph,
  samplePosterior,
} from '../../src/order/index.js';
import { createRandom } from '../../src/statistics/index.js';

const NAMES = ['A/1', 'A/2', 'B/1', 'B/2', 'C/1'];

/** Five beds of three sections: A/1 below A/2, B/1 below B/2, A/2 below C/1, B/2 as old as C/1 unless `own`. */
function model(tau: number, own = false): OrderModel {
  const relation = (lower: string, upper: string, kind: 'older' | 'same' = 'older') =>
    ({ lower, upper, basis: 'superposition', kind, certainty: 'certain', row: null }) as const;
  const relations = [relation('A/1', 'A/2'), relation('B/1', 'B/2'), relation('A/2', 'C/1')];
  if (!own) relations.push(relation('B/2', 'C/1', 'same') as never);
  return {
    means: [-1, -1.1, -0.9, -1.3, -1.25],
    se: [0.1, 0.05, 0.08, 0.1, 0.06],
    section: [0, 0, 1, 1, 2],
    sections: 3,
    graph: relationGraph(NAMES, relations),
    tau,
    scatterDf: 12,
  };
}

// The draws themselves are judged in posterior.test.ts against closed forms and plain rejection. Sums of 40 sweeps,
// computed with this code once those had passed, say that the same seed goes the same way.
describe('gibbsChain', () => {
  const sums = (given: OrderModel) => {
    const chain = gibbsChain(given, createRandom(7));
    const sum = new Float64Array(given.graph.nodes);
    for (let sweep = 0; sweep < 40; sweep++) {
      const theta = chain.next();
      for (let node = 0; node < sum.length; node++) sum[node] += theta[node];
      // always inside the cone of the relations
      given.graph.younger.forEach((targets, from) => {
        for (const to of targets) expect(theta[from]).toBeGreaterThanOrEqual(theta[to]);
      });
    }
    return [...sum];
  };
  const close = (found: readonly number[], wanted: readonly number[]) =>
    expect(found).toEqual(wanted.map((value) => expect.closeTo(value, 8)));

  it('goes the same way always, without a shift of sections', () => {
    close(sums(model(0)), [-39.21550542513214, -43.8972942701207, -35.18622573396923, -50.78552859420744]);
  });

  it('goes the same way always, with a shift of sections and deposits that two sections share', () => {
    close(sums(model(0.1)), [-37.0751648686077, -44.2350418528701, -35.104158149893145, -51.45094458982363]);
  });

  it('goes the same way always, with sections that share no deposit', () => {
    close(
      sums(model(0.1, true)),
      [-37.971174463248495, -42.82028238794392, -35.52184168707081, -50.90784057442892, -51.79583760300496],
    );
  });

  it('takes a scatter of unknown degrees of freedom for one of 1, and beds without error as they are', () => {
    close(sums({ ...model(0), scatterDf: 0 }), sums({ ...model(0), scatterDf: 1 }));
    const exact = { ...model(0), se: [0, 0, 0, 0, 0], means: [-1, -1.1, -0.9, -1.3, -1.3] };
    const theta = gibbsChain(exact, createRandom(1)).next();
    exact.means.forEach((mean, bed) => {
      expect(theta[exact.graph.node[bed]]).toBeCloseTo(mean, 6);
    });
  });
});

describe('chainDraws', () => {
  const argument = (own: Partial<ChainDrawsArgument>): ChainDrawsArgument => {
    return { model: model(0.1), seed: 3, chain: 0, draws: 6, thinning: 1, watched: [0, 2], ...own };
  };

  it('ranks beds by their true log ratio, the largest first, and gives beds of one deposit one rank', () => {
    const { ranks, traces } = chainDraws(argument({ draws: 200, watched: [0, 1, 2, 3] }));
    const { graph } = model(0.1);
    for (let draw = 0; draw < 200; draw++) {
      const theta = NAMES.map((_, bed) => traces[graph.node[bed]][draw]);
      NAMES.forEach((_, bed) => {
        expect(ranks[draw * NAMES.length + bed]).toBe(1 + theta.filter((other) => other > theta[bed]).length);
      });
      expect(ranks[draw * NAMES.length + 3]).toBe(ranks[draw * NAMES.length + 4]);
    }
  });

  it('keeps every thinning-th sweep after a quarter of all, 50 at least, from a stream a chain', () => {
    const run = (chain: number, sweeps: readonly number[]) => {
      const running = gibbsChain(model(0.1), createRandom(3).fork(chain));
      const kept: number[] = [];
      for (let sweep = 1; sweep <= sweeps[sweeps.length - 1]; sweep++) {
        const theta = running.next();
        if (sweeps.includes(sweep)) kept.push(theta[0]);
      }
      return kept;
    };
    expect([...chainDraws(argument({})).traces[0]]).toEqual(run(0, [51, 52, 53, 54, 55, 56]));
    expect([...chainDraws(argument({ chain: 2, thinning: 3 })).traces[0]]).toEqual(run(2, [53, 56, 59, 62, 65, 68]));
    const long = chainDraws(argument({ draws: 120, thinning: 2 })).traces[0];
    expect([...long.slice(0, 2)]).toEqual(run(0, [62, 64]));
  });
});

describe('samplePosterior', () => {
  /** A host that answers with draws made up here, and keeps what it was asked for. */
  function host(trace: (chain: number, draw: number, thinning: number) => number) {
    const asked: Task[][] = [];
    const map = async (tasks: readonly Task[], onDone?: (done: number) => void) => {
      asked.push([...tasks]);
      return tasks.map((task, at): ChainDraws => {
        const { model: own, chain, draws, thinning, watched } = task.argument as ChainDrawsArgument;
        onDone?.(at + 1);
        const ranks = new Uint32Array(own.means.length * draws);
        if (ranks.length < 10_000) for (let i = 0; i < ranks.length; i++) ranks[i] = 1000 * chain + i;
        return {
          ranks,
          traces: watched.map(() => Float64Array.from({ length: draws }, (_, draw) => trace(chain, draw, thinning))),
        };
      });
    };
    return {
      map,
      asked,
      argument: (round: number, chain: number) => asked[round][chain].argument as ChainDrawsArgument,
    };
  }
  const random = createRandom(1);
  const noise = Array.from({ length: 20_000 }, () => random.normal());
  const settled = (chain: number, draw: number) => noise[(1000 * chain + draw) % noise.length];

  it('hands out a task a chain, and joins their draws bed by bed', async () => {
    const { map, asked, argument } = host(settled);
    const told: number[] = [];
    const given = model(0.1);
    const found = await samplePosterior(given, { seed: 5, map, draws: 300, onProgress: (done) => told.push(done) });
    expect(asked.map((tasks) => tasks.map(({ name, heavy }) => [name, heavy]))).toEqual([
      Array.from({ length: 4 }, () => ['chainDraws', false]),
    ]);
    expect(argument(0, 3)).toEqual({ model: given, seed: 5, chain: 3, draws: 300, thinning: 1, watched: [0, 1, 2, 3] });
    expect(told).toEqual([0.25, 0.5, 0.75, 1]);
    expect(found).toMatchObject({ beds: 5, draws: 1200, chains: 4, converged: true });
    expect(found.essMin).toBeGreaterThan(400);
    expect(found.rhatMax).toBeLessThan(1.01);
    expect(found.rhatMax).toBeGreaterThanOrEqual(1);
    expect(found.ranks).toHaveLength(6000);
    // draw d of chain c gives bed b the made-up rank 1000 c + 5 d + b
    found.ranks.forEach((rank, at) => {
      const [bed, draw] = [Math.floor(at / 1200), at % 1200];
      expect(rank).toBe(1000 * Math.floor(draw / 300) + 5 * (draw % 300) + bed);
    });
  });

  it('draws 1,000 a chain where beds are few, fewer where they are many, 100 at least', async () => {
    const draws = async (beds: number, chains?: number) => {
      const { map, argument, asked } = host(settled);
      const flat = { ...model(0), means: new Array<number>(beds).fill(-1) };
      await samplePosterior(flat, { seed: 1, map, chains, thinning: 1 });
      expect(asked[0]).toHaveLength(chains ?? 4);
      return argument(0, 0).draws;
    };
    expect(await draws(600)).toBe(1000);
    expect(await draws(1000)).toBe(600);
    expect(await draws(1000, 2)).toBe(1000);
    expect(await draws(8000)).toBe(100);
    expect(await draws(0)).toBe(1000);
  });

  it('doubles the thinning until the chains have settled', async () => {
    const { map, asked, argument } = host(
      (chain, draw, thinning) => settled(chain, draw) + (thinning < 4 ? 3 * chain : 0),
    );
    const found = await samplePosterior(model(0), { seed: 1, map });
    expect(asked.map((_, round) => argument(round, 0).thinning)).toEqual([1, 2, 4]);
    expect(found.converged).toBe(true);
  });

  it('gives up at the most thinning, or at once above 1,000 beds, and says so', async () => {
    const apart = (chain: number, draw: number) => settled(chain, draw) + 3 * chain;
    const rounds = async (own: OrderModel, thinning?: number) => {
      const { map, asked, argument } = host(apart);
      const found = await samplePosterior(own, { seed: 1, map, draws: 200, thinning });
      expect(found.converged).toBe(false);
      expect(found.rhatMax).toBeGreaterThan(1.5);
      return asked.map((_, round) => argument(round, 0).thinning);
    };
    expect(await rounds(model(0))).toEqual([1, 2, 4, 8, 16]);
    expect(await rounds(model(0), 4)).toEqual([1, 2, 4]);
    expect(await rounds(model(0), 7)).toEqual([1, 2, 4]);
    expect(await rounds({ ...model(0), means: new Array<number>(1001).fill(-1) })).toEqual([1]);
    expect(await rounds({ ...model(0), means: new Array<number>(1000).fill(-1) }, 2)).toEqual([1, 2]);
  });

  it('is not settled by agreement alone where independent draws are too few', async () => {
    const few = await samplePosterior(model(0), { seed: 1, map: host(settled).map, draws: 90, thinning: 1 });
    expect(few.essMin).toBeLessThan(400);
    expect(few.converged).toBe(false);
  });

  it('calls tasks heavy that are worth a thread, and watches 200 deposits at most', async () => {
    const heavy = async (draws: number) => {
      const { map, asked } = host(settled);
      const many = { ...model(0), means: new Array<number>(1000).fill(-1) };
      await samplePosterior(many, { seed: 1, map, draws });
      return asked[0][0].heavy;
    };
    expect(await heavy(100)).toBe(false);
    expect(await heavy(101)).toBe(true);
    const wide = (nodes: number) => ({ ...model(0), graph: { ...model(0).graph, nodes } });
    const watched = async (nodes: number) => {
      const { map, argument } = host(settled);
      await samplePosterior(wide(nodes), { seed: 1, map, draws: 50, thinning: 1 });
      return argument(0, 0).watched;
    };
    expect(await watched(200)).toEqual(Array.from({ length: 200 }, (_, at) => at));
    expect(await watched(401)).toEqual(Array.from({ length: 134 }, (_, at) => 3 * at));
  });
});
