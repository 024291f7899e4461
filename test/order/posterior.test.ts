import { describe, expect, it } from 'vitest';
import type { RelationRecord } from '../../src/model/index.js';
import { probabilityOlder, rankBeds, relationGraph, samplePosterior } from '../../src/order/index.js';
import { normalCdf } from '../../src/statistics/index.js';
import { runTask } from '../../src/tasks.js';

const map = async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask);

const older = (lower: string, upper: string, kind: 'older' | 'same' = 'older'): RelationRecord => ({
  lower,
  upper,
  basis: 'superposition',
  kind,
  certainty: 'certain',
  row: null,
});

function model(
  beds: { key: string; mean: number; se: number; section: number }[],
  relations: RelationRecord[],
  tau = 0,
) {
  return {
    means: beds.map((bed) => bed.mean),
    se: beds.map((bed) => bed.se),
    section: beds.map((bed) => bed.section),
    sections: Math.max(...beds.map((bed) => bed.section)) + 1,
    graph: relationGraph(
      beds.map((bed) => bed.key),
      relations,
    ),
    tau,
    scatterDf: 1e6,
  };
}

const beds = [
  { key: 'A/1', mean: -1.0, se: 0.1, section: 0 },
  { key: 'A/2', mean: -0.95, se: 0.05, section: 0 },
  { key: 'B/1', mean: -0.9, se: 0.08, section: 1 },
];

describe('samplePosterior', () => {
  it('gives the closed form without relations', async () => {
    const posterior = await samplePosterior(model(beds, []), { seed: 3, map, draws: 10_000 });
    expect(probabilityOlder(posterior, 2, 0)).toBeCloseTo(normalCdf(0.1 / Math.hypot(0.1, 0.08)), 2);
    expect(posterior.converged).toBe(true);
  });

  it('gives beds tied by `same` one rank, and the pooled mean decides', async () => {
    const graphModel = model(beds, [older('A/1', 'B/1', 'same')]);
    const posterior = await samplePosterior(graphModel, { seed: 2, map, draws: 4000 });
    const ranking = rankBeds(posterior, graphModel.graph.node);
    expect(ranking.rank[0]).toBe(ranking.rank[2]);
    const [w0, w2] = [1 / 0.01, 1 / 0.0064];
    const pooled = (w0 * -1.0 + w2 * -0.9) / (w0 + w2);
    const sd = Math.hypot(Math.sqrt(1 / (w0 + w2)), 0.05);
    expect(probabilityOlder(posterior, 0, 1)).toBeCloseTo(normalCdf((pooled + 0.95) / sd), 1.7);
  });

  it('widens with few degrees of freedom behind the scatter', async () => {
    const wide = await samplePosterior({ ...model(beds, []), scatterDf: 3 }, { seed: 3, map, draws: 8000 });
    const narrow = await samplePosterior(model(beds, []), { seed: 3, map, draws: 8000 });
    expect(probabilityOlder(wide, 2, 0)).toBeLessThan(probabilityOlder(narrow, 2, 0));
  });

  it('gives the same draws for the same seed', async () => {
    const once = await samplePosterior(model(beds, []), { seed: 9, map, draws: 50 });
    const twice = await samplePosterior(model(beds, []), { seed: 9, map, draws: 50 });
    expect([...once.ranks]).toEqual([...twice.ranks]);
  });
});

describe('rankBeds', () => {
  it('orders by mean rank, and its intervals hold 95 % of the draws', async () => {
    const posterior = await samplePosterior(model(beds, []), { seed: 4, map, draws: 2000 });
    const { sequence, rank, rankLow, rankHigh, rankMean } = rankBeds(posterior, [0, 1, 2]);
    expect(sequence).toEqual([2, 1, 0]);
    expect(sequence.map((bed) => rank[bed])).toEqual([1, 2, 3]);
    for (let bed = 0; bed < 3; bed++) {
      const own = posterior.ranks.slice(bed * posterior.draws, (bed + 1) * posterior.draws);
      const inside = own.filter((value) => value >= rankLow[bed] && value <= rankHigh[bed]).length / own.length;
      expect(inside).toBeGreaterThanOrEqual(0.95);
      expect(rankMean[bed]).toBeGreaterThanOrEqual(rankLow[bed]);
      expect(rankMean[bed]).toBeLessThanOrEqual(rankHigh[bed]);
    }
  });
});
