import { describe, expect, it } from 'vitest';
import {
  createRandom,
  powerTTest,
  studentTQuantile,
  summarise,
  varianceComponents,
} from '../../src/statistics/index.js';

describe('varianceComponents', () => {
  it('finds the variances that made the data, on average, with groups of any sizes', () => {
    const random = createRandom(8);
    let between = 0;
    let within = 0;
    const rounds = 3000;
    for (let round = 0; round < rounds; round++) {
      const groups = [1, 2, 3, 8, 5].map((n) => {
        const centre = 2 * random.normal();
        return Array.from({ length: n }, () => centre + random.normal());
      });
      const found = varianceComponents(groups);
      between += found.betweenUnclipped / rounds;
      within += found.within / rounds;
    }
    expect(between).toBeGreaterThan(3.8);
    expect(between).toBeLessThan(4.2);
    expect(within).toBeCloseTo(1, 1);
  });
});

describe('power of the t test', () => {
  it('is how often a simulated test finds the difference', () => {
    const random = createRandom(9);
    const rounds = 20_000;
    for (const [n1, n2, sides] of [
      [5, 9, 2],
      [4, 4, 1],
    ] as const) {
      const limit = -studentTQuantile(0.05 / sides, n1 + n2 - 2);
      let found = 0;
      for (let round = 0; round < rounds; round++) {
        const a = summarise(Array.from({ length: n1 }, () => 1.3 + random.normal()));
        const b = summarise(Array.from({ length: n2 }, () => random.normal()));
        const pooled = Math.sqrt(((n1 - 1) * a.sd ** 2 + (n2 - 1) * b.sd ** 2) / (n1 + n2 - 2));
        const t = (a.mean - b.mean) / pooled / Math.sqrt(1 / n1 + 1 / n2);
        if (sides === 2 ? Math.abs(t) > limit : t > limit) found++;
      }
      const power = powerTTest({ delta: 1.3, sd: 1, sides }, n1, n2);
      expect(Math.abs(found / rounds - power)).toBeLessThan(4 * Math.sqrt((power * (1 - power)) / rounds));
    }
  });
});
