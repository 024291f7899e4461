import { describe, expect, it } from 'vitest';
import type { RelationRecord } from '../../src/model/index.js';
import { probabilityOlder, rankBeds, samplePosterior } from '../../src/order/index.js';
import { createRandom, normalCdf } from '../../src/statistics/index.js';
import { beds, map, model } from './three-beds.js';

const older = (lower: string, upper: string, kind: 'older' | 'same' = 'older'): RelationRecord => ({
  lower,
  upper,
  basis: 'superposition',
  kind,
  certainty: 'certain',
  row: null,
});

describe('samplePosterior', () => {
  it('gives the closed form without relations', async () => {
    const posterior = await samplePosterior(model(beds, []), { seed: 3, map, draws: 10_000 });
    expect(probabilityOlder(posterior, 2, 0)).toBeCloseTo(normalCdf(0.1 / Math.hypot(0.1, 0.08)), 2);
    expect(posterior.converged).toBe(true);
  });

  it('widens with few degrees of freedom behind the scatter', async () => {
    const wide = await samplePosterior({ ...model(beds, []), scatterDf: 3 }, { seed: 3, map, draws: 8000 });
    const narrow = await samplePosterior(model(beds, []), { seed: 3, map, draws: 8000 });
    expect(probabilityOlder(wide, 2, 0)).toBeLessThan(probabilityOlder(narrow, 2, 0));
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

  it('gives the closed form with a shift a section: beds of one section do not gain from it, others lose', async () => {
    const posterior = await samplePosterior(model(beds, [], 0.2), { seed: 3, map, draws: 10_000 });
    expect(probabilityOlder(posterior, 1, 0)).toBeCloseTo(normalCdf(0.05 / Math.hypot(0.1, 0.05)), 2);
    expect(probabilityOlder(posterior, 2, 0)).toBeCloseTo(normalCdf(0.1 / Math.hypot(0.1, 0.08, 0.2, 0.2)), 2);
  });

  it('agrees with plain rejection sampling under a chain and a relation between sections', async () => {
    const relations = [older('A/1', 'A/2'), older('A/1', 'B/1')];
    const tau = 0.06;
    const random = createRandom(11);
    let kept = 0;
    let wins = 0;
    for (let draw = 0; draw < 600_000; draw++) {
      const shifts = [tau * random.normal(), tau * random.normal()];
      const theta = beds.map((bed) => bed.mean - shifts[bed.section] + bed.se * random.normal());
      if (theta[0] < theta[1] || theta[0] < theta[2]) continue;
      kept++;
      if (theta[1] > theta[2]) wins++;
    }
    const posterior = await samplePosterior(model(beds, relations, tau), { seed: 5, map, draws: 15_000 });
    expect(kept).toBeGreaterThan(10_000);
    expect(probabilityOlder(posterior, 1, 2)).toBeCloseTo(wins / kept, 1.7);
    expect(probabilityOlder(posterior, 0, 1)).toBe(1);
    expect(probabilityOlder(posterior, 0, 2)).toBe(1);
  });
});
