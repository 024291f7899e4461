import { describe, expect, it } from 'vitest';
import { regularisedGamma } from '../../src/statistics/incomplete-gamma.js';
import { createRandom, normalCdf } from '../../src/statistics/index.js';
import { kolmogorov } from './kolmogorov.js';

const draw = (n: number, of: () => number) => Array.from({ length: n }, of);

describe('createRandom', () => {
  it('draws uniforms, normals, exponentials and gammas from their distributions', () => {
    const random = createRandom(20);
    const n = 200_000;
    expect(kolmogorov(draw(n, random.uniform), (x) => x)).toBeLessThan(1.95);
    expect(kolmogorov(draw(n, random.normal), normalCdf)).toBeLessThan(1.95);
    expect(kolmogorov(draw(n, random.exponential), (x) => -Math.expm1(-x))).toBeLessThan(1.95);
    for (const shape of [0.3, 1, 2.5, 40]) {
      const gammas = draw(40_000, () => random.gamma(shape));
      expect(
        kolmogorov(gammas, (x) => regularisedGamma(shape, x).lower),
        `shape ${shape}`,
      ).toBeLessThan(1.95);
    }
  });

  it('draws the far tail of the normal as often as it should', () => {
    const random = createRandom(5);
    const n = 4_000_000;
    const beyond = [0, 0];
    for (let i = 0; i < n; i++) {
      const x = random.normal();
      if (x > 3.6) beyond[0]++;
      if (x < -3.6) beyond[1]++;
    }
    const expected = n * normalCdf(-3.6);
    for (const count of beyond) expect(Math.abs(count - expected)).toBeLessThan(4 * Math.sqrt(expected));
  });

  it('draws whole numbers evenly, also for sizes that are no power of 2', () => {
    const random = createRandom(3);
    const counts = new Array<number>(37).fill(0);
    const n = 370_000;
    for (let i = 0; i < n; i++) counts[random.integer(37)]++;
    const chiSquared = counts.reduce((sum, c) => sum + (c - 10_000) ** 2 / 10_000, 0);
    // 36 degrees of freedom: 0.1 % lie above 67.99
    expect(chiSquared).toBeLessThan(67.99);
    const wide = draw(50_000, () => random.integer(3 * 2 ** 30));
    expect(kolmogorov(wide, (x) => x / (3 * 2 ** 30))).toBeLessThan(1.95);
    expect(random.integer(1)).toBe(0);
  });
});
