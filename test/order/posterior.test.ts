import { describe, expect, it } from 'vitest';
import { rankBeds, samplePosterior } from '../../src/order/index.js';
import { beds, map, model } from './three-beds.js';

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
