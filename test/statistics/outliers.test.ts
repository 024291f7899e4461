import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { generalizedEsd, grubbs } from '../../src/statistics/index.js';

const values = fc.array(fc.double({ min: -50, max: 50, noNaN: true }), { minLength: 3, maxLength: 20 });

describe('grubbs', () => {
  it('calls an outlier exactly when p is below alpha, while p is small', () => {
    fc.assert(
      fc.property(values, fc.constantFrom('both' as const, 'high' as const, 'low' as const), (list, side) => {
        const found = grubbs(Object.freeze([...list]), { side });
        fc.pre(Math.abs(found.g - found.limit) > 1e-9);
        expect(found.outlier).toBe(found.p < 0.05);
      }),
    );
  });

  it('takes the farthest value on the side asked for', () => {
    const list = [-30, 1, 2, 3, 2, 1, 20];
    expect(grubbs(list).index).toBe(0);
    expect(grubbs(list, { side: 'high' }).index).toBe(6);
    expect(grubbs(list, { side: 'low' }).index).toBe(0);
  });

  it('finds nothing where nothing varies, survives the largest possible g, and refuses too few', () => {
    expect(grubbs([2, 2, 2, 2])).toMatchObject({ g: 0, outlier: false, p: 1 });
    expect(grubbs([0, 0, 0, 0, 1])).toMatchObject({ outlier: true });
    expect(grubbs([0, 0, 0, 0, 1]).p).toBeLessThan(1e-6);
    expect(() => grubbs([1, 2])).toThrow(/at least 3 values, got 2/);
    expect(() => grubbs([1, 2, NaN])).toThrow(RangeError);
    expect(() => grubbs([1, 2, 3], { alpha: NaN })).toThrow(RangeError);
  });
});

describe('generalizedEsd', () => {
  it('is Grubbs’ two-sided test for one outlier', () => {
    fc.assert(
      fc.property(values, (list) => {
        const esd = generalizedEsd(Object.freeze([...list]), 1);
        const one = grubbs(list);
        expect(esd.steps[0].statistic).toBeCloseTo(one.g, 12);
        expect(esd.steps[0].limit).toBeCloseTo(one.limit, 10);
        expect(esd.steps[0].index).toBe(one.index);
        expect(esd.outliers.length).toBe(one.outlier ? 1 : 0);
      }),
    );
  });

  it('finds outliers that hide each other', () => {
    const list = [50, 10.1, 9.9, 10, 10.2, 9.8, 10.1, 9.9, 10, 10.3, 9.7, 10.1, 9.9, 51];
    expect(grubbs(list).outlier).toBe(false);
    expect([...generalizedEsd(list, 4).outliers].sort((a, b) => a - b)).toEqual([0, 13]);
  });

  it('refuses more outliers than it can test, and finds nothing where nothing varies', () => {
    expect(generalizedEsd([1, 1, 1, 1, 1], 3).outliers).toEqual([]);
    for (const bad of [0, 1.5, NaN, 4]) expect(() => generalizedEsd([1, 2, 3, 4, 5], bad)).toThrow(/from 1 to 3/);
    expect(() => generalizedEsd([1, 2, NaN], 1)).toThrow(RangeError);
    expect(() => generalizedEsd([1, 2, 3], 1, 1)).toThrow(RangeError);
  });
});
