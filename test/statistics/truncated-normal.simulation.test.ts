import { describe, expect, it } from 'vitest';
import { createRandom, normalCdf, sampleTruncatedNormal } from '../../src/statistics/index.js';
import { kolmogorov } from './kolmogorov.js';

/** Distribution function of a standard normal cut to [a, b], taken in the tail where it is precise. */
function cutCdf(a: number, b: number): (z: number) => number {
  if (a > 0) {
    const mirrored = cutCdf(-b, -a);
    return (z) => 1 - mirrored(-z);
  }
  const below = normalCdf(a);
  return (z) => (normalCdf(z) - below) / (normalCdf(b) - below);
}

describe('sampleTruncatedNormal', () => {
  const regimes: [number, number][] = [
    [-Infinity, Infinity],
    [-1, 2],
    [-0.3, 0.5],
    [0, Infinity],
    [0.2, 4],
    [0.4, Infinity],
    [0.5, Infinity],
    [0.5, 0.9],
    [2, Infinity],
    [3, 3.2],
    [3, 5],
    [8, Infinity],
    [20, Infinity],
    [20, 20.01],
    [-Infinity, -6],
    [-5, -4.9],
    [-9, -1],
    [-Infinity, 1.5],
    [-4, 0],
    [-0.001, 7],
    [0.44, 3.1],
    [1, 1.0001],
  ];

  it.each(regimes)('follows the cut normal on [%d, %d]', (a, b) => {
    const random = createRandom(11);
    const mean = 3;
    const sd = 0.25;
    const draws = Array.from({ length: 40_000 }, () => {
      return sampleTruncatedNormal(random, mean, sd, mean + sd * a, mean + sd * b);
    });
    const cdf = cutCdf(a, b);
    expect(kolmogorov(draws, (x) => cdf((x - mean) / sd))).toBeLessThan(1.95);
  });

  it.each([
    [0, Infinity],
    [-1, 0.5],
    [4, Infinity],
    [2, 2.5],
    [-3, -2],
  ])('has the moments of the cut normal on [%d, %d]', (a, b) => {
    // Johnson, Kotz and Balakrishnan 1994, Continuous Univariate Distributions 1, 13.10.1
    const density = (z: number) => Math.exp(-0.5 * z * z) / Math.sqrt(2 * Math.PI);
    const mass = a > 0 ? normalCdf(-a) - normalCdf(-b) : normalCdf(b) - normalCdf(a);
    const end = (z: number) => (Number.isFinite(z) ? z * density(z) : 0);
    const mean = (density(a) - density(b)) / mass;
    const variance = 1 + (end(a) - end(b)) / mass - mean * mean;
    const random = createRandom(12);
    const n = 100_000;
    const draws = Array.from({ length: n }, () => sampleTruncatedNormal(random, 0, 1, a, b));
    const found = draws.reduce((sum, z) => sum + z, 0) / n;
    const spread = draws.reduce((sum, z) => sum + (z - mean) ** 2, 0) / n;
    expect(Math.abs(found - mean) / Math.sqrt(variance / n)).toBeLessThan(3.5);
    expect(spread / variance).toBeGreaterThan(0.96);
    expect(spread / variance).toBeLessThan(1.04);
  });
});
