import { describe, expect, it } from 'vitest';
import { type BedMean, checkRelations, type RelationToCheck } from '../../src/superposition/relation-checks.js';

function bed(key: string, mean: number, se = 0.03, n = 5): BedMean {
  return { key, section: key.slice(0, key.indexOf('/')), n, mean, se };
}

function relation(lower: string, upper: string, kind: 'older' | 'same' = 'older'): RelationToCheck {
  return { lower, upper, kind, basis: 'superposition', certainty: 'certain' };
}

describe('checkRelations', () => {
  it('keeps false reversals at alpha when all beds are of one age', () => {
    // 10 independent pairs a survey, no difference anywhere: P(any reversed) <= 0.05.
    let state = 1;
    const uniform = () => {
      state = (state * 48271) % 2147483647;
      return state / 2147483647;
    };
    const normal = () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
    let any = 0;
    for (let run = 0; run < 2000; run++) {
      const some: BedMean[] = [];
      const pairs: RelationToCheck[] = [];
      for (let i = 0; i < 10; i++) {
        some.push(bed(`S${i}/1`, 0.03 * normal()), bed(`S${i}/2`, 0.03 * normal()));
        pairs.push(relation(`S${i}/1`, `S${i}/2`));
      }
      if (checkRelations(pairs, some).some((check) => check.verdict === 'reversed')) any++;
    }
    expect(any / 2000).toBeGreaterThan(0.035);
    expect(any / 2000).toBeLessThan(0.065);
  });
});
