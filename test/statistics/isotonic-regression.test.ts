import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { isotonicRegression } from '../../src/statistics/index.js';

describe('isotonicRegression', () => {
  const point = fc.tuple(fc.integer({ min: -9, max: 9 }), fc.integer({ min: 1, max: 5 }));

  it('is the max-min of block means (Robertson, Wright and Dykstra 1988, theorem 1.4.4)', () => {
    fc.assert(
      fc.property(fc.array(point, { maxLength: 12 }), (points) => {
        const values = Object.freeze(points.map(([value]) => value));
        const weights = Object.freeze(points.map(([, weight]) => weight));
        const mean = (from: number, to: number) => {
          let sum = 0;
          let mass = 0;
          for (let i = from; i <= to; i++) {
            sum += weights[i] * values[i];
            mass += weights[i];
          }
          return sum / mass;
        };
        const fitted = isotonicRegression(values, weights);
        expect(fitted.length).toBe(values.length);
        fitted.forEach((value, i) => {
          let best = -Infinity;
          for (let from = 0; from <= i; from++) {
            let least = Infinity;
            for (let to = i; to < values.length; to++) least = Math.min(least, mean(from, to));
            best = Math.max(best, least);
          }
          expect(value).toBeCloseTo(best, 10);
        });
      }),
    );
  });

  it('leaves what is in order, and does nothing twice', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -1e3, max: 1e3, noNaN: true })), (values) => {
        const sorted = [...values].sort((x, y) => x - y);
        expect(isotonicRegression(sorted).every((value, i) => Math.abs(value - sorted[i]) < 1e-12)).toBe(true);
        const once = isotonicRegression(values);
        isotonicRegression(once).forEach((value, i) => {
          expect(value).toBeCloseTo(once[i], 10);
        });
      }),
    );
  });

  it('refuses weights of 0, NaN and lists of unequal length', () => {
    expect(() => isotonicRegression([1, NaN])).toThrow(RangeError);
    expect(() => isotonicRegression([1, 2], [1, 0])).toThrow(RangeError);
    expect(() => isotonicRegression([1, 2], [1])).toThrow(/2 weights, one a value, got 1/);
    expect(isotonicRegression([])).toEqual([]);
  });
});
