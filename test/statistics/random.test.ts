import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { regularisedGamma } from '../../src/statistics/incomplete-gamma.js';
import { createRandom, normalCdf, type Random } from '../../src/statistics/index.js';
import { kolmogorov } from './kolmogorov.js';

const draw = (n: number, of: () => number) => Array.from({ length: n }, of);
const first = (random: Random) => draw(3, () => random.uniform());

describe('createRandom', () => {
  it('gives the same numbers for the same seed', () => {
    fc.assert(
      fc.property(fc.maxSafeInteger(), (seed) => {
        expect(first(createRandom(seed))).toEqual(first(createRandom(seed)));
      }),
    );
  });

  it('gives these numbers on every machine', () => {
    const random = createRandom(1);
    expect([random.integer(1000), random.integer(1000), random.integer(1000)]).toEqual([265, 294, 891]);
  });

  it('gives unrelated numbers for near seeds, and no two alike', () => {
    const starts = Array.from({ length: 20_000 }, (_, seed) => createRandom(seed - 10_000).uniform());
    expect(new Set(starts).size).toBe(starts.length);
    expect(kolmogorov(starts, (x) => x)).toBeLessThan(1.95);
    let products = 0;
    for (let i = 1; i < starts.length; i++) products += (starts[i] - 0.5) * (starts[i - 1] - 0.5) * 12;
    expect(Math.abs(products) / Math.sqrt(starts.length)).toBeLessThan(3.3);
  });

  it('draws uniforms, normals, exponentials and gammas from their distributions', () => {
    const random = createRandom(20);
    const n = 200_000;
    expect(kolmogorov(draw(n, random.uniform), (x) => x)).toBeLessThan(1.95);
    expect(kolmogorov(draw(n, random.normal), normalCdf)).toBeLessThan(1.95);
    expect(kolmogorov(draw(n, random.exponential), (x) => -Math.expm1(-x))).toBeLessThan(1.95);
    for (const shape of [0.3, 1, 2.5, 40]) {
      const gammas = draw(40_000, () => random.gamma(shape));
      expect(
        kolmogorov(gammas, (x) => regularisedGamma(shape, x).lower),
        `shape ${shape}`,
      ).toBeLessThan(1.95);
    }
  });

  it('draws the far tail of the normal as often as it should', () => {
    const random = createRandom(5);
    const n = 4_000_000;
    const beyond = [0, 0];
    for (let i = 0; i < n; i++) {
      const x = random.normal();
      if (x > 3.6) beyond[0]++;
      if (x < -3.6) beyond[1]++;
    }
    const expected = n * normalCdf(-3.6);
    for (const count of beyond) expect(Math.abs(count - expected)).toBeLessThan(4 * Math.sqrt(expected));
  });

  it('draws whole numbers evenly, also for sizes that are no power of 2', () => {
    const random = createRandom(3);
    const counts = new Array<number>(37).fill(0);
    const n = 370_000;
    for (let i = 0; i < n; i++) counts[random.integer(37)]++;
    const chiSquared = counts.reduce((sum, c) => sum + (c - 10_000) ** 2 / 10_000, 0);
    // 36 degrees of freedom: 0.1 % lie above 67.99
    expect(chiSquared).toBeLessThan(67.99);
    const wide = draw(50_000, () => random.integer(3 * 2 ** 30));
    expect(kolmogorov(wide, (x) => x / (3 * 2 ** 30))).toBeLessThan(1.95);
    expect(random.integer(1)).toBe(0);
  });

  it('forks by seed and label alone', () => {
    fc.assert(
      fc.property(fc.maxSafeInteger(), fc.maxSafeInteger(), fc.nat(20), (seed, label, drawn) => {
        const random = createRandom(seed);
        const fresh = first(random.fork(label));
        draw(drawn, random.normal);
        expect(first(random.fork(label))).toEqual(fresh);
        expect(fresh).not.toEqual(first(createRandom(label)));
        expect(fresh).not.toEqual(first(createRandom(seed)));
        if (label !== seed) expect(fresh).not.toEqual(first(createRandom(label).fork(seed)));
      }),
    );
  });

  it('gives unrelated forks, also forks of forks', () => {
    const random = createRandom(1);
    const starts = new Set<number>();
    for (let a = 0; a < 100; a++) {
      starts.add(random.fork(a).uniform());
      for (let b = 0; b < 100; b++) starts.add(random.fork(a).fork(b).uniform());
    }
    expect(starts.size).toBe(10_100);
    expect(kolmogorov([...starts], (x) => x)).toBeLessThan(1.95);
  });

  it('refuses what is no seed, label, size or shape', () => {
    for (const bad of [NaN, 0.5, Infinity, 2 ** 60]) {
      expect(() => createRandom(bad)).toThrow(RangeError);
      expect(() => createRandom(1).fork(bad)).toThrow(RangeError);
    }
    for (const bad of [NaN, 0, -1, 1.5, 2 ** 33]) expect(() => createRandom(1).integer(bad)).toThrow(RangeError);
    for (const bad of [NaN, 0, -1, Infinity]) expect(() => createRandom(1).gamma(bad)).toThrow(RangeError);
  });
});
