import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom, yorkLine } from '../../src/statistics/index.js';

/** Weighted sum of squares at the best intercept of a slope, written from its definition. */
function misfit(x: number[], y: number[], wx: number[], wy: number[], r: number[], slope: number): number {
  const w = x.map((_, i) => 1 / (1 / wy[i] + slope ** 2 / wx[i] - (2 * slope * r[i]) / Math.sqrt(wx[i] * wy[i])));
  const mass = w.reduce((sum, v) => sum + v, 0);
  const intercept = w.reduce((sum, v, i) => sum + v * (y[i] - slope * x[i]), 0) / mass;
  return w.reduce((sum, v, i) => sum + v * (y[i] - slope * x[i] - intercept) ** 2, 0);
}

describe('yorkLine', () => {
  const real = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  const point = fc.tuple(real(-1, 1), real(-1, 1), real(20, 200), real(20, 200), real(-0.8, 0.8));
  const points = fc.tuple(fc.array(point, { minLength: 4, maxLength: 10 }), real(-3, 3));

  const lists = (list: [number, number, number, number, number][], slope: number) => ({
    x: list.map(([u], i) => i + 0.2 * u),
    y: list.map(([, v], i) => 1 + slope * i + 0.2 * v),
    wx: list.map(([, , w]) => w),
    wy: list.map(([, , , w]) => w),
    r: list.map(([, , , , r]) => r),
  });

  it('has the least misfit of all lines near it, with correlated errors', () => {
    fc.assert(
      fc.property(points, ([list, slope]) => {
        const { x, y, wx, wy, r } = lists(list, slope);
        const line = yorkLine(Object.freeze(x), Object.freeze(y), Object.freeze(wx), Object.freeze(wy), {
          correlation: r,
        });
        const at = (b: number) => misfit(x, y, wx, wy, r, b);
        expect(at(line.slope)).toBeCloseTo(line.chiSquared, 8);
        for (const off of [1e-3, 0.01, 0.1]) {
          expect(at(line.slope + off)).toBeGreaterThan(line.chiSquared - 1e-9);
          expect(at(line.slope - off)).toBeGreaterThan(line.chiSquared - 1e-9);
        }
        expect(line.df).toBe(list.length - 2);
      }),
    );
  });

  it('is the same line with x and y exchanged', () => {
    fc.assert(
      fc.property(points, ([list, slope]) => {
        fc.pre(Math.abs(slope) > 0.5);
        const { x, y, wx, wy, r } = lists(list, slope);
        const forth = yorkLine(x, y, wx, wy, { correlation: r });
        const back = yorkLine(y, x, wy, wx, { correlation: r });
        expect(back.slope * forth.slope).toBeCloseTo(1, 6);
        expect(back.chiSquared).toBeCloseTo(forth.chiSquared, 6);
      }),
    );
  });

  it('states errors as large as they are', () => {
    const random = createRandom(7);
    const rounds = 2000;
    const slopes: number[] = [];
    const intercepts: number[] = [];
    let chi = 0;
    let last = yorkLine([0, 1], [0, 1], [1, 1], [1, 1]);
    for (let round = 0; round < rounds; round++) {
      const truth = [0, 1, 2, 3, 4, 5];
      const shared = truth.map(() => random.normal());
      const x = truth.map((t, i) => t + 0.1 * shared[i]);
      const y = truth.map((t, i) => 2 + 0.7 * t + 0.15 * (0.6 * shared[i] + 0.8 * random.normal()));
      const wx = truth.map(() => 100);
      const wy = truth.map(() => 1 / 0.15 ** 2);
      last = yorkLine(x, y, wx, wy, { correlation: 0.6 });
      slopes.push(last.slope);
      intercepts.push(last.intercept);
      chi += last.chiSquared / rounds;
    }
    const spread = (list: number[], centre: number) =>
      Math.sqrt(list.reduce((sum, v) => sum + (v - centre) ** 2, 0) / list.length);
    expect(spread(slopes, 0.7) / last.slopeSe).toBeCloseTo(1, 1);
    expect(spread(intercepts, 2) / last.interceptSe).toBeCloseTo(1, 1);
    expect(chi).toBeCloseTo(4, 0);
    const covariance = slopes.reduce((sum, s, i) => sum + (s - 0.7) * (intercepts[i] - 2), 0) / rounds;
    expect(covariance / last.covariance).toBeGreaterThan(0.85);
    expect(covariance / last.covariance).toBeLessThan(1.15);
  });

  it('fits only the intercept to a given slope, from one point on', () => {
    const line = yorkLine([1, 2, 3], [2.1, 2.9, 4.2], [4, 4, 4], [4, 4, 4], { slope: 1 });
    expect(line).toMatchObject({ slope: 1, slopeSe: 0, covariance: 0, df: 2 });
    expect(line.intercept).toBeCloseTo(3.2 / 3, 12);
    expect(line.interceptSe).toBeCloseTo(Math.sqrt(0.5 / 3), 12);
    expect(yorkLine([1], [3], [1], [1], { slope: 1 })).toMatchObject({ intercept: 2, df: 0, p: 1 });
  });

  it('goes through two points, and a level line', () => {
    const line = yorkLine([1, 3], [2, 6], [1, 5], [2, 9]);
    expect(line).toMatchObject({ df: 0, p: 1 });
    expect(line.slope).toBeCloseTo(2, 12);
    expect(yorkLine([1, 2, 3], [4, 4, 4], [1, 1, 1], [1, 1, 1]).slope).toBe(0);
  });

  it('refuses what makes no line', () => {
    const one = [1, 1, 1];
    expect(() => yorkLine([1, 1, 1], [1, 2, 3], one, one)).toThrow(/x values that differ/);
    expect(() => yorkLine([1, 2, 3], [1, 2, 3], [1, 0, 1], one)).toThrow(/weights above 0, got 0, 1/);
    expect(() => yorkLine([1, 2, 3], [1, 2, 3], [Infinity, 1, 1], [Infinity, 1, 1])).toThrow(
      /error in x or y of every point/,
    );
    expect(() => yorkLine([1, 2, 3], [1, 2], one, one)).toThrow(RangeError);
    expect(() => yorkLine([1, NaN, 3], [1, 2, 3], one, one)).toThrow(RangeError);
    expect(() => yorkLine([1, 2, 3], [1, 2, 3], one, one, { correlation: 1 })).toThrow(RangeError);
    expect(() => yorkLine([1, 2, 3], [1, 2, 3], one, one, { slope: NaN })).toThrow(RangeError);
    expect(() => yorkLine([1], [1], [1], [1])).toThrow(RangeError);
  });
});
