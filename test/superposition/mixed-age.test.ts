import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { bestSplit, mixedAgeBeds } from '../../src/superposition/index.js';

describe('mixedAgeBeds', () => {
  const random = createRandom(1);
  const bed = (...means: number[]) => means.map((mean) => mean + 0.05 * random.normal());
  const clean = Array.from({ length: 30 }, () => bed(0, 0, 0, 0, 0, 0, 0));
  const zones = [
    { name: 'Z1', mean: -1.9, sd: 0, weight: 0.5 },
    { name: 'Z2', mean: -1.3, sd: 0, weight: 0.5 },
  ];

  it('tells a bed of two groups from its neighbours, with the zones they fit', () => {
    const mixed = [-1.32, -1.28, -1.31, -1.27, -1.92, -1.88, -1.93];
    const found = mixedAgeBeds([...clean, mixed], createRandom(1), { zones });
    expect(found.slice(0, 30).every(({ verdict }) => verdict === 'none')).toBe(true);
    expect(found[30]).toMatchObject({
      verdict: 'mixed age',
      reading: 'mixed age: 3 shells about 0.15 (Z1) and 4 shells about 0.27 (Z2)',
    });
    expect(found[30].sentences).toHaveLength(3);
  });

  it('calls a bed that is wide without two groups wide, and does not test under 4 shells', () => {
    const found = mixedAgeBeds([...clean, [-0.6, -0.4, -0.2, 0, 0.2, 0.4, 0.6], [-1, 1, 0]], createRandom(1));
    expect(found[30]).toMatchObject({ verdict: 'wide scatter', reading: 'wide scatter' });
    expect(found[31]).toMatchObject({ verdict: 'not tested', p: null, adjusted: null, p_groups: null });
  });
});

describe('bestSplit', () => {
  it('never leaves one alone', () => {
    expect(bestSplit([0, 0.01, 0.02, 9])).toMatchObject({ lower: [0, 0.01], upper: [0.02, 9] });
    expect(bestSplit([5, 1, 1, 5, 5])).toEqual({ lower: [1, 1], upper: [5, 5, 5], share: 1 });
    expect(bestSplit([1, 1, 1, 1]).share).toBe(0);
  });
});
