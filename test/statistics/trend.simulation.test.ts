import { describe, expect, it } from 'vitest';
import { createRandom, kendallTauB } from '../../src/statistics/index.js';

describe('kendallTauB', () => {
  it('has an interval that covers the truth, also for few values and a steep truth', () => {
    const random = createRandom(3);
    for (const truth of [0, 0.5, 0.8]) {
      const r = Math.sin((Math.PI / 2) * truth);
      for (const n of [5, 12, 120]) {
        const rounds = 400;
        let covered = 0;
        for (let round = 0; round < rounds; round++) {
          const x = Array.from({ length: n }, () => random.normal());
          const y = x.map((value) => r * value + Math.sqrt(1 - r * r) * random.normal());
          const { low, high } = kendallTauB(x, y);
          if (low <= truth && truth <= high) covered++;
        }
        expect(covered / rounds, `tau ${truth}, n ${n}`).toBeGreaterThan(0.91);
      }
    }
  });
});
