import { describe, expect, it } from 'vitest';
import type { RelationRecord } from '../../src/model/index.js';
import { rankBeds, relationGraph, samplePosterior } from '../../src/order/index.js';
import { runTask } from '../../src/tasks.js';

const map = async (tasks: readonly Parameters<typeof runTask>[0][]) => tasks.map(runTask);

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
