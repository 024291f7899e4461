import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { adjustedRandIndex, equalDensityCut, overlapOfNormals } from '../../src/statistics/index.js';

describe('adjustedRandIndex', () => {
  const labels = fc.array(fc.tuple(fc.nat(3), fc.nat(3)), { minLength: 2, maxLength: 25 });

  it('is what counting pairs gives', () => {
    fc.assert(
      fc.property(labels, (pairs) => {
        const a = Object.freeze(pairs.map(([x]) => x));
        const b = Object.freeze(pairs.map(([, y]) => y));
        let both = 0;
        let inA = 0;
        let inB = 0;
        let all = 0;
        for (let i = 0; i < a.length; i++) {
          for (let j = 0; j < i; j++) {
            all++;
            if (a[i] === a[j]) inA++;
            if (b[i] === b[j]) inB++;
            if (a[i] === a[j] && b[i] === b[j]) both++;
          }
        }
        const chance = (inA * inB) / all;
        const room = (inA + inB) / 2 - chance;
        const found = adjustedRandIndex(a, b);
        if (room === 0) expect(found).toBe(1);
        else expect(found).toBeCloseTo((both - chance) / room, 10);
        expect(adjustedRandIndex(b, a)).toBeCloseTo(found, 12);
        expect(
          adjustedRandIndex(
            a.map((x) => `zone ${9 - x}`),
            b,
          ),
        ).toBe(found);
        expect(adjustedRandIndex(a, a)).toBe(1);
      }),
    );
  });

  it('gives 1 to groupings that can only agree, and refuses unequal lists', () => {
    expect(adjustedRandIndex([1, 1, 1], ['a', 'a', 'a'])).toBe(1);
    expect(adjustedRandIndex([1, 2, 3], [3, 1, 2])).toBe(1);
    expect(adjustedRandIndex([1], [2])).toBe(1);
    expect(() => adjustedRandIndex([1, 2], [1])).toThrow(RangeError);
    expect(() => adjustedRandIndex([], [])).toThrow(RangeError);
  });
});

describe('overlapOfNormals', () => {
  const mean = fc.double({ min: -5, max: 5, noNaN: true });
  const sd = fc.double({ min: 0.05, max: 4, noNaN: true });
  const density = (x: number, m: number, s: number) => Math.exp(-0.5 * ((x - m) / s) ** 2) / s / Math.sqrt(2 * Math.PI);

  it('is the area under the lower curve', () => {
    fc.assert(
      fc.property(mean, sd, mean, sd, (m1, s1, m2, s2) => {
        let area = 0;
        const step = 0.002;
        const from = Math.min(m1 - 9 * s1, m2 - 9 * s2);
        const to = Math.max(m1 + 9 * s1, m2 + 9 * s2);
        for (let x = from; x < to; x += step) area += step * Math.min(density(x, m1, s1), density(x, m2, s2));
        expect(overlapOfNormals(m1, s1, m2, s2)).toBeCloseTo(area, 4);
      }),
      { numRuns: 40 },
    );
  });

  it('does not hang on order, place or unit', () => {
    fc.assert(
      fc.property(mean, sd, mean, sd, fc.double({ min: 0.1, max: 10, noNaN: true }), (m1, s1, m2, s2, unit) => {
        const found = overlapOfNormals(m1, s1, m2, s2);
        expect(found).toBeGreaterThanOrEqual(0);
        expect(found).toBeLessThanOrEqual(1);
        expect(overlapOfNormals(m2, s2, m1, s1)).toBeCloseTo(found, 12);
        expect(overlapOfNormals(7 - unit * m1, unit * s1, 7 - unit * m2, unit * s2)).toBeCloseTo(found, 9);
      }),
    );
  });

  it('comes smoothly to equal standard deviations', () => {
    const equal = overlapOfNormals(0, 1, 2, 1);
    for (const tiny of [1e-4, 1e-8, 1e-12, 1e-15]) {
      expect(Math.abs(overlapOfNormals(0, 1, 2, 1 + tiny) - equal)).toBeLessThan(tiny + 1e-15);
    }
    expect(overlapOfNormals(0, 1, 2, 1)).toBeCloseTo(0.3173105078629141, 14);
    expect(overlapOfNormals(1, 2, 1, 2)).toBe(1);
    expect(overlapOfNormals(1, 2, 1, 2 + 1e-9)).toBeCloseTo(1, 8);
  });

  it('keeps far overlaps small but real, and spikes apart', () => {
    expect(overlapOfNormals(0, 1, 20, 1)).toBeCloseTo(2 * 7.619853024160527e-24, 30);
    expect(overlapOfNormals(1, 0, 1, 0)).toBe(1);
    expect(overlapOfNormals(1, 0, 1, 2)).toBe(0);
    for (const bad of [NaN, -1, Infinity]) expect(() => overlapOfNormals(0, bad, 0, 1)).toThrow(RangeError);
    expect(() => overlapOfNormals(NaN, 1, 0, 1)).toThrow(RangeError);
  });

  it('cuts where both curves are equally high, between the means', () => {
    fc.assert(
      fc.property(mean, sd, mean, sd, (m1, s1, m2, s2) => {
        const cut = equalDensityCut(m1, s1, m2, s2);
        // one curve is the higher at both means, as far as rounding tells curves that are nearly the same apart
        const higher = (h: number, other: number) => h > other * (1 - 1e-12);
        const lower1 =
          higher(density(m2, m1, s1), density(m2, m2, s2)) || higher(density(m1, m2, s2), density(m1, m1, s1));
        if (cut === null) {
          expect(m1 === m2 || lower1).toBe(true);
          return;
        }
        expect(cut).toBeGreaterThanOrEqual(Math.min(m1, m2) - 1e-9);
        expect(cut).toBeLessThanOrEqual(Math.max(m1, m2) + 1e-9);
        const [h1, h2] = [density(cut, m1, s1), density(cut, m2, s2)];
        if (h1 > 1e-200) expect(h2 / h1).toBeCloseTo(1, 6);
      }),
    );
    expect(equalDensityCut(1, 1, 1, 2)).toBeNull();
    expect(equalDensityCut(0, 1, 0.1, 5)).toBeNull();
    expect(() => equalDensityCut(0, 0, 1, 1)).toThrow(RangeError);
  });
});
