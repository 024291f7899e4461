import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom, overlapOfNormals } from '../../src/statistics/index.js';
import {
  assignZone,
  equalOverlap,
  fitMixture,
  smallestRankP,
  TOUCHING_OVERLAP,
  testNeighbours,
  unbiasedSpread,
  type ZoneForTest,
  zoneErrors,
} from '../../src/zones/index.js';

const options = { alpha: 0.05, shellSd: 0.05, scatterDf: 100, random: createRandom(1), simulations: 499 };

const zone = (mean: number, count: number, se = 0.01): ZoneForTest => ({ mean, se, df: 40, count });

describe('testNeighbours', () => {
  it('calls zones far apart distinct', () => {
    const test = testNeighbours(zone(-1.7, 30), zone(-2, 30), options);
    expect(test.verdict).toBe('distinct');
    expect(test.difference).toBeCloseTo(0.3, 12);
    expect(test.p_difference).toBeLessThan(1e-6);
    expect(test.overlap).toBeCloseTo(overlapOfNormals(-1.7, 0.05, -2, 0.05), 10);
    expect(test.one_sigma_overlap).toBe(false);
  });

  it('never splits on a small p alone: means that differ surely by less than the shells scatter are not distinct', () => {
    const test = testNeighbours(zone(-1.97, 400, 0.004), zone(-2, 400, 0.004), options);
    expect(test.p_difference).toBeLessThan(0.001);
    expect(test.verdict).toBe('not distinct');
  });

  it('leaves open what 3 and 3 shells can not show, however far apart', () => {
    expect(testNeighbours(zone(-1.5, 3), zone(-2, 3), options).verdict).toBe('not resolved');
    expect(testNeighbours(zone(-1.5, 4), zone(-2, 4), options).verdict).toBe('distinct');
  });

  it('leaves open an overlap whose interval holds the limit', () => {
    const test = testNeighbours(zone(-1.91, 40, 0.02), zone(-2, 40, 0.02), options);
    expect(test.overlap_low).toBeLessThan(TOUCHING_OVERLAP);
    expect(test.overlap_high).toBeGreaterThan(TOUCHING_OVERLAP);
    expect(test.verdict).toBe('not resolved');
  });
});

describe('smallestRankP', () => {
  it('gives what small samples allow', () => {
    // computed, exact two-sided Mann–Whitney: 2+2 0.3333, 3+4 0.05714, 4+4 0.02857, 5+5 0.00794, 6+6 0.00216
    const pairs = [
      [2, 2],
      [3, 4],
      [4, 4],
      [5, 5],
      [6, 6],
    ] as const;
    [0.3333, 0.05714, 0.02857, 0.00794, 0.00216].forEach((p, at) => {
      const [n, m] = pairs[at];
      expect(smallestRankP(n, m)).toBeCloseTo(p, 4);
    });
    expect(smallestRankP(500, 500)).toBeLessThan(1e-10);
  });
});

describe('equalOverlap', () => {
  it('is 2Φ(−1) where ±1 standard deviation ranges touch, 1 at no difference', () => {
    expect(equalOverlap(0.2, 0.1)).toBeCloseTo(TOUCHING_OVERLAP, 12);
    expect(equalOverlap(0, 0.1)).toBe(1);
    expect(equalOverlap(0.1, 0)).toBe(0);
  });
});

describe('assignZone', () => {
  const priors = { means: [-2, -1.7, -1.4], se: [0.01, 0.01, 0.02], weights: [0.3, 0.4, 0.3], tau: 0.02 };

  it('gives probabilities that sum to 1, the best first, and marks what straddles', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -100, max: 100, noNaN: true }),
        fc.double({ min: 0, max: 10, noNaN: true }),
        (x, error) => {
          const found = assignZone(x, error, priors);
          expect(found.probabilities.reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 8);
          expect(found.probability).toBe(Math.max(...found.probabilities));
          expect(found.secondProbability!).toBeLessThanOrEqual(found.probability);
          expect(found.straddles).toBe(found.probability < 0.9);
        },
      ),
      { numRuns: 300, seed: 1 },
    );
    expect(assignZone(-1.85, 0.05, priors).straddles).toBe(true);
    expect(assignZone(-2, 0.02, priors)).toMatchObject({ zone: 0, second: 1, straddles: false });
  });

  it('knows no second zone where there is one', () => {
    expect(assignZone(-1, 0.1, { means: [-2], se: [0], weights: [1], tau: 0 })).toMatchObject({
      zone: 0,
      probability: 1,
      second: null,
      secondProbability: null,
      straddles: false,
    });
  });
});

describe('zoneErrors', () => {
  it('is that of a weighted mean where zones stand apart and no spread was found', () => {
    const values = [-2.001, -2, -1.999, -1.001, -1];
    const errors = [0.02, 0.03, 0.02, 0.02, 0.02];
    const fit = fitMixture(values, errors, 2);
    expect(fit.tau).toBe(0);
    const { se, df } = zoneErrors(fit, errors, 24, values);
    expect(se[0]).toBeCloseTo(1 / Math.sqrt(0.02 ** -2 + 0.03 ** -2 + 0.02 ** -2), 8);
    expect(df).toEqual([24, 24]);
  });

  it('has the degrees of freedom of the spread where one was found, and its n/(n − K)', () => {
    const values = [-2.1, -2, -1.9, -1.1, -1, -0.9];
    const errors = values.map(() => 0.01);
    const fit = fitMixture(values, errors, 2);
    expect(unbiasedSpread(fit, 6)).toBeCloseTo(fit.tau * Math.sqrt(6 / 4), 12);
    const { se, df } = zoneErrors(fit, errors, 24, values);
    expect(df).toEqual([4, 4]);
    // squares left 0.04 over 4 degrees of freedom: sd 0.1, so 0.1/√3 for three beds
    expect(se[0]).toBeCloseTo(0.1 / Math.sqrt(3), 3);
  });
});
