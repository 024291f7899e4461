import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { mannWhitney, midranks, smallestMannWhitneyP } from '../../src/statistics/index.js';
import { tieSizes } from '../../src/statistics/ranks.js';
import { waysToDeal } from '../../src/statistics/ways-to-deal.js';

const frozen = <T>(values: T[]): readonly T[] => Object.freeze(values);

/** Every choice of `size` of the first n whole numbers. */
function choices(n: number, size: number): number[][] {
  if (size === 0) return [[]];
  if (n < size) return [];
  return [...choices(n - 1, size), ...choices(n - 1, size - 1).map((chosen) => [...chosen, n - 1])];
}

const pairsAbove = (a: readonly number[], b: readonly number[]) =>
  a.reduce((sum, x) => sum + b.reduce((s, y) => s + (x > y ? 1 : x === y ? 0.5 : 0), 0), 0);

describe('mannWhitney', () => {
  const few = fc.array(fc.integer({ min: 0, max: 6 }), { minLength: 1, maxLength: 5 });

  it('is what counting all deals gives, with and without ties', () => {
    fc.assert(
      fc.property(few, few, (a, b) => {
        const found = mannWhitney(frozen(a), frozen(b));
        const pooled = [...a, ...b];
        const u = pairsAbove(a, b);
        let less = 0;
        let greater = 0;
        const all = choices(pooled.length, a.length);
        for (const chosen of all) {
          const inside = chosen.map((i) => pooled[i]);
          const outside = pooled.filter((_, i) => !chosen.includes(i));
          const other = pairsAbove(inside, outside);
          if (other <= u) less++;
          if (other >= u) greater++;
        }
        expect(found.exact).toBe(true);
        expect(found.u).toBe(u);
        expect(found.pLess).toBeCloseTo(less / all.length, 12);
        expect(found.pGreater).toBeCloseTo(greater / all.length, 12);
        expect(found.p).toBeCloseTo(Math.min(1, (2 * Math.min(less, greater)) / all.length), 12);
      }),
      { numRuns: 40 },
    );
  });

  it('turns over with its groups, and sees only the order', () => {
    const many = fc.array(fc.integer({ min: 0, max: 99 }), { minLength: 1, maxLength: 70 });
    fc.assert(
      fc.property(many, many, (a, b) => {
        const forth = mannWhitney(a, b);
        const back = mannWhitney(b, a);
        expect(forth.u + back.u).toBe(a.length * b.length);
        expect(back.pLess).toBeCloseTo(forth.pGreater, 12);
        expect(back.p).toBeCloseTo(forth.p, 12);
        const stretched = mannWhitney(
          a.map((x) => Math.exp(x / 10)),
          b.map((x) => Math.exp(x / 10)),
        );
        expect(stretched).toEqual(forth);
      }),
    );
  });

  it('comes to the normal approximation as groups grow', () => {
    const a = Array.from({ length: 50 }, (_, i) => (i * 37) % 101);
    const b = Array.from({ length: 50 }, (_, i) => ((i * 53) % 103) + 12);
    const exact = mannWhitney(a, b);
    const approximate = mannWhitney([...a, 50], b);
    expect([exact.exact, approximate.exact]).toEqual([true, false]);
    expect(Math.abs(exact.p - approximate.p)).toBeLessThan(0.02);
  });

  it('says nothing when all values are equal', () => {
    expect(mannWhitney([1, 1, 1], [1, 1]).p).toBe(1);
    expect(mannWhitney(new Float64Array(60), new Float64Array(60)).p).toBe(1);
  });

  it('refuses empty groups and NaN', () => {
    expect(() => mannWhitney([], [1])).toThrow(/at least 1 values in the first group, got 0/);
    expect(() => mannWhitney([1], [2, NaN])).toThrow(/got NaN at index 1/);
    for (const bad of [0, 1.5, NaN]) expect(() => smallestMannWhitneyP(bad, 3)).toThrow(RangeError);
  });

  it('knows the smallest p it can reach', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 15 }), fc.integer({ min: 1, max: 15 }), (n1, n2) => {
        const low = Array.from({ length: n1 }, (_, i) => i);
        const high = Array.from({ length: n2 }, (_, i) => n1 + i);
        expect(mannWhitney(low, high).p).toBeCloseTo(smallestMannWhitneyP(n1, n2), 12);
      }),
    );
  });
});

describe('what it rests on', () => {
  it('midranks: mean place of the equals', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -3, max: 3 })), (values) => {
        const wanted = values.map((x) => {
          const below = values.filter((y) => y < x).length;
          const equal = values.filter((y) => y === x).length;
          return below + (equal + 1) / 2;
        });
        expect(midranks(frozen(values))).toEqual(wanted);
      }),
    );
    expect(midranks([0, -0, 1])).toEqual([1.5, 1.5, 3]);
    expect(() => midranks([NaN])).toThrow(RangeError);
  });

  it('ties: sizes of the groups of equals', () => {
    expect(tieSizes([3, 1, 3, 2, 2, 3, -0, 0])).toEqual([2, 2, 3]);
    expect(tieSizes([])).toEqual([]);
  });

  it('deals: every sum counted', () => {
    const whole = fc.array(fc.integer({ min: 0, max: 9 }), { minLength: 1, maxLength: 9 });
    fc.assert(
      fc.property(whole, fc.nat(9), (values, size) => {
        fc.pre(size <= values.length);
        const sorted = [...values].sort((x, y) => x - y);
        const sums = choices(sorted.length, size).map((chosen) => chosen.reduce((sum, i) => sum + sorted[i], 0));
        const lowest = Math.min(...sums);
        const ways = waysToDeal(frozen(sorted), size);
        expect([...ways]).toEqual(Array.from(ways, (_, t) => sums.filter((sum) => sum - lowest === t).length));
        expect(ways.reduce((total, w) => total + w, 0)).toBe(sums.length);
        const half = Math.floor((ways.length - 1) / 2);
        expect([...waysToDeal(sorted, size, half)]).toEqual([...ways.slice(0, half + 1)]);
      }),
    );
  });
});
