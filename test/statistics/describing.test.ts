import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  createRandom,
  median,
  medianAbsoluteDeviation,
  quantile,
  quantileOfSorted,
  robustSd,
  summarise,
} from '../../src/statistics/index.js';

const values = fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 40 });

describe('quantile and median', () => {
  it('interpolate between neighbours in order', () => {
    fc.assert(
      fc.property(values, fc.double({ min: 0, max: 1, noNaN: true }), (list, p) => {
        const frozen = Object.freeze([...list]);
        const sorted = [...list].sort((x, y) => x - y);
        const found = quantile(frozen, p);
        expect(found).toBeGreaterThanOrEqual(sorted[Math.floor((list.length - 1) * p)]);
        expect(found).toBeLessThanOrEqual(sorted[Math.ceil((list.length - 1) * p)]);
        expect(quantileOfSorted(sorted, p)).toBe(found);
        expect(quantile(list, 0)).toBe(sorted[0]);
        expect(quantile(list, 1)).toBe(sorted[list.length - 1]);
        expect(median(frozen)).toBeCloseTo(quantile(list, 0.5), 8);
      }),
    );
    // numbers are sorted as numbers, not as text
    expect(quantile([10, 9, 1, 100], 1)).toBe(100);
  });

  it('refuse nothing, NaN and a wrong p', () => {
    expect(() => quantile([], 0.5)).toThrow(RangeError);
    expect(() => median([])).toThrow(RangeError);
    expect(() => median([1, NaN])).toThrow(RangeError);
    for (const bad of [NaN, -0.1, 1.1]) expect(() => quantile([1], bad)).toThrow(RangeError);
  });
});

describe('robustSd', () => {
  it('estimates the standard deviation of a normal, and shrugs at wild values', () => {
    const random = createRandom(2);
    const normals = Array.from({ length: 20_000 }, () => 5 + 3 * random.normal());
    expect(robustSd(normals)).toBeCloseTo(3, 1);
    const spoilt = normals.map((x, i) => (i % 10 === 0 ? 1e9 : x));
    expect(robustSd(spoilt)).toBeLessThan(4);
  });

  it('moves and stretches with the values', () => {
    fc.assert(
      fc.property(values, (list) => {
        const found = medianAbsoluteDeviation(Object.freeze([...list]));
        expect(medianAbsoluteDeviation(list.map((x) => 10 - 2 * x)) / 2).toBeCloseTo(found, 6);
      }),
    );
    expect(robustSd([4, 4, 4, 9])).toBe(0);
    expect(() => robustSd([Infinity])).toThrow(RangeError);
  });
});

describe('summarise', () => {
  it('keeps digits when the values share a large part', () => {
    const { mean, sd } = summarise([1e12 + 0.25, 1e12 + 0.5, 1e12 + 0.75]);
    expect(mean).toBe(1e12 + 0.5);
    expect(sd).toBe(0.25);
    expect(summarise([3])).toEqual({ mean: 3, sd: 0, n: 1 });
    expect(() => summarise([])).toThrow(RangeError);
  });
});
