import { describe, expect, it } from 'vitest';
import {
  equalDensityCut,
  mannWhitney,
  oneWayAnovaFromSummaries,
  overlapOfNormals,
  rateIncreasePerDegree,
  smallestMannWhitneyP,
  welchFromSummaries,
} from '../../src/statistics/index.js';

describe('four beds of hard-clam shells in Virginia', () => {
  // Mirecki, PhD thesis, University of Delaware, udspace.udel.edu/handle/19716/13230: means, sd and n seen.
  const IIa = { mean: 0.141, sd: 0.026, n: 55 };
  const IIc = { mean: 0.335, sd: 0.028, n: 19 };
  const IId = { mean: 0.471, sd: 0.038, n: 9 };
  const norrisBridge = { mean: 0.473, sd: 0.02, n: 5 };

  it('gives Welch’s t (computed from the summaries)', () => {
    const young = welchFromSummaries(IIa, IIc);
    expect(young.t).toBeCloseTo(-26.5097, 4);
    expect(young.df).toBeCloseTo(29.449, 3);
    const old = welchFromSummaries(IIc, IId);
    expect(old.t).toBeCloseTo(-9.5759, 4);
    expect(old.df).toBeCloseTo(12.283, 3);
    expect(old.p / 4.728e-7).toBeCloseTo(1, 3);
    const same = welchFromSummaries(IId, norrisBridge);
    expect(same.t).toBeCloseTo(-0.129, 4);
    expect(same.p).toBeCloseTo(0.8995, 4);
  });

  it('gives the overlap coefficients (computed)', () => {
    expect(overlapOfNormals(0.141, 0.026, 0.335, 0.028)).toBeCloseTo(0.00033, 5);
    expect(overlapOfNormals(0.335, 0.028, 0.471, 0.038)).toBeCloseTo(0.03881, 5);
    expect(overlapOfNormals(0.471, 0.038, 0.473, 0.02)).toBeCloseTo(0.69875, 5);
  });

  it('gives the analysis of variance of the three Gomez Pit beds (computed)', () => {
    const anova = oneWayAnovaFromSummaries([IIa, IIc, IId]);
    expect([anova.dfBetween, anova.dfWithin]).toEqual([2, 80]);
    expect(anova.f).toBeCloseTo(747.279, 3);
    expect(anova.pooledSd).toBeCloseTo(0.0278765, 7);
  });
});

describe('raised beaches of south-west Britain', () => {
  // Bowen and others 1985, Quaternary Science Reviews 4, 279–318, abstract: means and sd seen.
  const stages = [
    [0.105, 0.016],
    [0.135, 0.014],
    [0.175, 0.014],
  ] as const;

  it('gives overlaps and equal-density cuts (computed)', () => {
    const [young, middle, old] = stages;
    expect(overlapOfNormals(...young, ...middle)).toBeCloseTo(0.3162, 4);
    expect(overlapOfNormals(...middle, ...old)).toBeCloseTo(0.1531, 4);
    expect(overlapOfNormals(...young, ...old)).toBeCloseTo(0.0196, 4);
    expect(equalDensityCut(...young, ...middle)).toBeCloseTo(0.12, 3);
    expect(equalDensityCut(...middle, ...old)).toBeCloseTo(0.155, 12);
  });
});

describe('growth of the rate a degree', () => {
  // Mitterer 1975, Earth and Planetary Science Letters 28, 275–282, seen: 29.4 kcal/mol; factors computed.
  it.each([
    [0, 1.2184],
    [10, 1.2019],
    [20, 1.1872],
  ])('at %d °C', (celsius, factor) => expect(rateIncreasePerDegree(celsius)).toBeCloseTo(factor, 4));
});

describe('what small samples allow', () => {
  // exact two-sided Mann–Whitney, computed
  it.each([
    [2, 2, 0.3333],
    [3, 3, 0.1],
    [3, 4, 0.05714],
    [4, 4, 0.02857],
    [5, 5, 0.00794],
    [6, 6, 0.00216],
  ])('%d + %d', (n1, n2, smallest) => {
    const digits = smallest > 0.2 ? 4 : 5;
    expect(smallestMannWhitneyP(n1, n2)).toBeCloseTo(smallest, digits);
    const apart = mannWhitney(
      Array.from({ length: n1 }, (_, i) => i),
      Array.from({ length: n2 }, (_, i) => 100 + i),
    );
    expect(apart.p).toBeCloseTo(smallest, digits);
    expect(apart.exact).toBe(true);
  });
});
