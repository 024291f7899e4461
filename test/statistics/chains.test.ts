import { describe, expect, it } from 'vitest';
import { createRandom, effectiveSampleSize, splitRHat } from '../../src/statistics/index.js';

/** Chains in which each draw keeps the share phi of the last one. */
function chains(count: number, length: number, phi: number, seed: number): Float64Array[] {
  const random = createRandom(seed);
  return Array.from({ length: count }, () => {
    let x = random.normal();
    return Float64Array.from({ length }, () => {
      x = phi * x + Math.sqrt(1 - phi * phi) * random.normal();
      return x;
    });
  });
}

describe('effectiveSampleSize', () => {
  it('counts independent draws about whole', () => {
    const found = effectiveSampleSize(chains(4, 2000, 0, 1));
    expect(found).toBeGreaterThan(0.85 * 8000);
    expect(found).toBeLessThan(1.15 * 8000);
  });

  it('is S (1 − phi) / (1 + phi) for an autoregression, above S for negative phi', () => {
    for (const phi of [0.5, 0.9, -0.4]) {
      const found = effectiveSampleSize(chains(4, 5000, phi, 2));
      const wanted = (20_000 * (1 - phi)) / (1 + phi);
      expect(found / wanted).toBeGreaterThan(0.8);
      expect(found / wanted).toBeLessThan(1.2);
    }
  });

  it('is tiny for chains that sit in different places', () => {
    const apart = chains(4, 1000, 0, 3).map((chain, c) => chain.map((x) => x + 20 * c));
    expect(effectiveSampleSize(apart)).toBeLessThan(10);
    expect(
      effectiveSampleSize([
        [1, 1, 1, 1],
        [2, 2, 2, 2],
      ]),
    ).toBeLessThan(5);
  });

  it('sees only the order of draws, unless told otherwise', () => {
    const draws = chains(2, 500, 0.3, 4);
    const stretched = draws.map((chain) => chain.map((x) => Math.exp(3 * x)));
    expect(effectiveSampleSize(stretched)).toBeCloseTo(effectiveSampleSize(draws), 8);
    const plain = { rankNormalise: false };
    expect(effectiveSampleSize(stretched, plain)).not.toBeCloseTo(effectiveSampleSize(draws, plain), 2);
  });
});

describe('splitRHat', () => {
  it('is near 1 for chains that agree, and not for those that differ in place, spread or drift', () => {
    const draws = chains(4, 1000, 0.2, 5);
    expect(splitRHat(draws)).toBeLessThan(1.01);
    expect(splitRHat(draws)).toBeGreaterThan(0.99);
    expect(splitRHat(draws.map((chain, c) => chain.map((x) => x + c)))).toBeGreaterThan(1.2);
    expect(splitRHat(draws.map((chain, c) => chain.map((x) => x * (c + 1))))).toBeGreaterThan(1.05);
    expect(splitRHat(draws.map((chain) => chain.map((x, i) => x + i / 400)))).toBeGreaterThan(1.1);
    const spread = draws.map((chain, c) => chain.map((x) => x * (c + 1)));
    expect(splitRHat(spread, { rankNormalise: false })).toBeLessThan(1.01);
  });

  it('tells chains that stand still together from those that stand still apart', () => {
    expect(
      splitRHat([
        [2, 2, 2, 2],
        [2, 2, 2, 2],
      ]),
    ).toBe(1);
    expect(
      splitRHat([
        [1, 1, 1, 1],
        [2, 2, 2, 2],
      ]),
    ).toBe(Infinity);
    expect(
      effectiveSampleSize([
        [2, 2, 2, 2],
        [2, 2, 2, 2],
      ]),
    ).toBe(8);
  });
});

describe('both', () => {
  it('leave the chains as they were, and refuse bad ones', () => {
    const frozen = Object.freeze([Object.freeze([1, 3, 2, 5, 4, 6, 2]), Object.freeze([2, 4, 3, 1, 5, 2, 6])]);
    for (const judge of [effectiveSampleSize, splitRHat]) {
      expect(Number.isFinite(judge(frozen))).toBe(true);
      expect(() => judge([])).toThrow(/at least one chain/);
      expect(() => judge([[1, 2, 3]])).toThrow(/at least 4 draws in chain 0/);
      expect(() =>
        judge([
          [1, 2, 3, 4],
          [1, 2, 3, 4, 5],
        ]),
      ).toThrow(/chains of one length/);
      expect(() => judge([[1, 2, NaN, 4]])).toThrow(RangeError);
    }
  });
});
