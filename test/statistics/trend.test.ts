import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  createRandom,
  jonckheereTerpstra,
  kendallInterval,
  kendallTauB,
  mannWhitney,
  normalCdf,
} from '../../src/statistics/index.js';

/** All orders of a list. */
function orders<T>(list: readonly T[]): T[][] {
  if (list.length === 0) return [[]];
  return list.flatMap((head, i) => orders([...list.slice(0, i), ...list.slice(i + 1)]).map((rest) => [head, ...rest]));
}

const split = (list: readonly number[], sizes: readonly number[]) =>
  sizes.map((size, k) => {
    const from = sizes.slice(0, k).reduce((sum, earlier) => sum + earlier, 0);
    return list.slice(from, from + size);
  });

describe('jonckheereTerpstra', () => {
  const sizes = [2, 1, 3] as const;
  const six = fc.array(fc.integer({ min: 0, max: 5 }), { minLength: 6, maxLength: 6 });

  it('has the mean and variance over all deals, ties or not', () => {
    fc.assert(
      fc.property(six, (values) => {
        const found = jonckheereTerpstra(split(Object.freeze(values) as number[], sizes).map((g) => Object.freeze(g)));
        const all = orders(values).map((order) => jonckheereTerpstra(split(order, sizes)).j);
        const mean = all.reduce((sum, j) => sum + j, 0) / all.length;
        const variance = all.reduce((sum, j) => sum + (j - mean) ** 2, 0) / all.length;
        expect(found.z).toBeCloseTo(variance > 1e-9 ? (found.j - mean) / Math.sqrt(variance) : 0, 9);
      }),
      { numRuns: 12 },
    );
  });

  it('is exact without ties', () => {
    const values = [3, 1, 4, 1.5, 9, 2.6];
    const found = jonckheereTerpstra(split(values, sizes));
    const all = orders(values).map((order) => jonckheereTerpstra(split(order, sizes)).j);
    expect(found.exact).toBe(true);
    expect(found.pIncreasing).toBeCloseTo(all.filter((j) => j >= found.j).length / all.length, 12);
    expect(found.pDecreasing).toBeCloseTo(all.filter((j) => j <= found.j).length / all.length, 12);
  });

  it('is Mann–Whitney for two groups', () => {
    const distinct = fc.uniqueArray(fc.integer({ min: 0, max: 99 }), { minLength: 2, maxLength: 20 });
    fc.assert(
      fc.property(distinct, fc.nat(18), (values, at) => {
        const cut = 1 + (at % (values.length - 1));
        const [a, b] = [values.slice(0, cut), values.slice(cut)];
        const found = jonckheereTerpstra([a, b]);
        const two = mannWhitney(b, a);
        expect(found.j).toBe(two.u);
        expect(found.pIncreasing).toBeCloseTo(two.pGreater, 12);
        expect(found.p).toBeCloseTo(two.p, 12);
      }),
    );
  });

  it('turns over with the order of the groups; exact and normal meet', () => {
    const random = createRandom(1);
    const groups = [20, 30, 25, 25].map((n, k) => Array.from({ length: n }, () => 0.15 * k + random.normal()));
    const forth = jonckheereTerpstra(groups);
    const back = jonckheereTerpstra([...groups].reverse());
    expect(back.pDecreasing).toBeCloseTo(forth.pIncreasing, 10);
    expect(back.z).toBeCloseTo(-forth.z, 10);
    expect(forth.exact).toBe(true);
    const approximate = jonckheereTerpstra([...groups.slice(0, 3), [...groups[3], 0.3]]);
    expect(approximate.exact).toBe(false);
    expect(Math.abs(approximate.p - forth.p)).toBeLessThan(0.02);
  });

  it('says nothing when all are equal, and refuses one group, empty groups and NaN', () => {
    expect(jonckheereTerpstra([[1, 1], [1], [1]])).toMatchObject({ z: 0, p: 1 });
    expect(() => jonckheereTerpstra([[1, 2]])).toThrow(RangeError);
    expect(() => jonckheereTerpstra([[1, 2], []])).toThrow(/values in group 1/);
    expect(() => jonckheereTerpstra([[1, 2], [NaN]])).toThrow(RangeError);
  });
});

describe('kendallTauB', () => {
  const pairs = fc.array(fc.tuple(fc.integer({ min: 0, max: 6 }), fc.integer({ min: 0, max: 6 })), {
    minLength: 2,
    maxLength: 15,
  });

  it('does not hang on the order of the points, and turns over with a list', () => {
    fc.assert(
      fc.property(pairs, (points) => {
        const x = Object.freeze(points.map(([a]) => a));
        const y = Object.freeze(points.map(([, b]) => b));
        const found = kendallTauB(x, y);
        if (Number.isNaN(found.tau)) {
          expect(new Set(x).size === 1 || new Set(y).size === 1).toBe(true);
          return;
        }
        const back = kendallTauB(
          y,
          x.map((a) => -a),
        );
        expect(back.tau).toBeCloseTo(-found.tau, 12);
        expect(back.p).toBeCloseTo(found.p, 10);
        expect(back.low).toBeCloseTo(-found.high, 8);
        expect(kendallTauB([...x].reverse(), [...y].reverse())).toEqual(found);
        expect(found.low).toBeLessThanOrEqual(found.tau + 1e-9);
        expect(found.high).toBeGreaterThanOrEqual(found.tau - 1e-9);
        expect(Math.abs(found.tau)).toBeLessThanOrEqual(1 + 1e-12);
      }),
    );
  });

  it('has the exact p of all orders', () => {
    const x = [1, 2, 3, 4, 5, 6];
    const all = orders(x).map((y) => kendallTauB(x, y).tau);
    for (const y of [
      [1, 2, 3, 4, 6, 5],
      [2, 1, 5, 3, 4, 6],
      [6, 5, 4, 3, 2, 1],
    ]) {
      const { tau, p, exact } = kendallTauB(x, y);
      expect(exact).toBe(true);
      expect(p).toBeCloseTo(all.filter((t) => Math.abs(t) >= Math.abs(tau) - 1e-12).length / all.length, 12);
    }
  });

  it('does not shrink to a point at 1', () => {
    const { low, high } = kendallInterval(5, 1);
    expect(high).toBe(1);
    expect(low).toBeGreaterThan(0);
    expect(low).toBeLessThan(0.7);
    expect(kendallInterval(5, -1).low).toBe(-1);
    const many = kendallInterval(200, 1);
    expect(many.high).toBe(1);
    expect(many.low).toBeLessThan(1);
    expect(kendallInterval(2, 1).low).toBeLessThan(-0.5);
    expect(kendallInterval(20, 0.4, 0.99).low).toBeLessThan(kendallInterval(20, 0.4, 0.9).low);
  });

  it('says nothing for a list of one value, and refuses bad lists', () => {
    expect(kendallTauB([1, 1, 1], [1, 2, 3])).toMatchObject({ tau: NaN, low: -1, high: 1, p: 1 });
    expect(() => kendallTauB([1, 2], [1])).toThrow(RangeError);
    expect(() => kendallTauB([1], [1])).toThrow(RangeError);
    expect(() => kendallTauB([1, 2], [1, NaN])).toThrow(RangeError);
    expect(() => kendallInterval(5, NaN)).toThrow(RangeError);
    expect(() => kendallInterval(5, 0.2, 1)).toThrow(RangeError);
  });

  it('has the variance of its score over all orders, with ties in both lists', () => {
    for (const [x, y] of [
      [
        [1, 1, 1, 2, 3, 3],
        [2, 1, 2, 2, 4, 5],
      ],
      [
        [1, 2, 2, 2, 3, 4],
        [5, 5, 5, 1, 1, 2],
      ],
      [
        [1, 1, 2, 3, 4, 5],
        [1, 2, 3, 4, 6, 5],
      ],
    ]) {
      const { concordant, discordant, p, exact } = kendallTauB(x, y);
      const scores = orders(y).map((order) => {
        const other = kendallTauB(x, order);
        return other.concordant - other.discordant;
      });
      const variance = scores.reduce((sum, score) => sum + score * score, 0) / scores.length;
      expect(exact).toBe(false);
      expect(p).toBeCloseTo(2 * normalCdf(-Math.abs(concordant - discordant) / Math.sqrt(variance)), 10);
    }
    // two pairs tied in one list
    expect(kendallTauB([1, 1], [1, 2])).toMatchObject({ tau: NaN, p: 1, concordant: 0, discordant: 0 });
  });

  it('counts each pair once', () => {
    expect(kendallTauB([1, 2, 3, 4], [1, 3, 2, 4])).toMatchObject({ concordant: 5, discordant: 1, tau: 4 / 6 });
    expect(kendallTauB([1, 2, 2, 4], [1, 3, 2, 1])).toMatchObject({ concordant: 2, discordant: 2, tau: 0 });
  });

  it('goes over to Fisher’s z above 100 values', () => {
    const by = (n: number, tau: number, level: number, z: number) => {
      const { low, high } = kendallInterval(n, tau, level);
      const reach = z * Math.sqrt(0.437 / (n - 4));
      expect(low).toBeCloseTo(Math.tanh(Math.atanh(tau) - reach), 8);
      expect(high).toBeCloseTo(Math.tanh(Math.atanh(tau) + reach), 8);
    };
    by(101, 0.4, 0.95, 1.959963984540054);
    by(200, -0.7, 0.9, 1.6448536269514722);
    // at 100 it is still the one of discordant pairs, which does not lie about the tau of z
    const { low, high } = kendallInterval(100, 0.4);
    expect(Math.abs((Math.atanh(low) + Math.atanh(high)) / 2 - Math.atanh(0.4))).toBeGreaterThan(1e-3);
    // −1 and 1 are ends, and their other ends mirror each other
    expect(kendallInterval(150, -1).low).toBe(-1);
    expect(kendallInterval(150, -1).high).toBeCloseTo(-kendallInterval(150, 1).low, 10);
    expect(kendallInterval(150, -1).high).toBeLessThan(-0.9);
  });

  it('has tails of half of what the level leaves', () => {
    // 4 values in perfect order: the Mallows model with chance 0.025 of no discordant pair; its chances of 0 … 6 discordant
    // pairs are as 1, 3, 5, 6, 5, 3, 1 times q^d, so tau = 1 − 2 mean / 6 where 1 / Σ = 0.025
    const weights = [1, 3, 5, 6, 5, 3, 1];
    const { low } = kendallInterval(4, 1);
    let [from, to] = [0.01, 100];
    for (let i = 0; i < 200; i++) {
      const q = Math.sqrt(from * to);
      if (1 / weights.reduce((sum, w, d) => sum + w * q ** d, 0) > 0.025) from = q;
      else to = q;
    }
    const all = weights.reduce((sum, w, d) => sum + w * from ** d, 0);
    const mean = weights.reduce((sum, w, d) => sum + d * w * from ** d, 0) / all;
    expect(low).toBeCloseTo(1 - mean / 3, 8);
  });
});
