import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  oneWayAnova,
  oneWayAnovaFromSummaries,
  powerTTest,
  rateIncreasePerDegree,
  sampleSizeTTest,
  studentTCdf,
  summarise,
  varianceComponents,
  welchFromSummaries,
  welchTTest,
} from '../../src/statistics/index.js';

const group = fc.array(fc.double({ min: -100, max: 100, noNaN: true }), { minLength: 2, maxLength: 9 });

describe('welchTTest', () => {
  it('turns over with its groups, and is the summaries’ test', () => {
    fc.assert(
      fc.property(group, group, (a, b) => {
        fc.pre(summarise(a).sd + summarise(b).sd > 1e-3);
        const forth = welchTTest(Object.freeze([...a]), Object.freeze([...b]));
        const back = welchTTest(b, a);
        expect(back.t).toBeCloseTo(-forth.t, 10);
        expect(back.p).toBeCloseTo(forth.p, 10);
        expect(back.low).toBeCloseTo(-forth.high, 8);
        expect(welchFromSummaries(summarise(a), summarise(b))).toEqual(forth);
        // the interval leaves out 0 exactly when p is below its level
        expect(forth.low > 0 || forth.high < 0).toBe(forth.p < 0.05);
      }),
    );
  });

  it('is the pooled test when sizes and scatter are equal', () => {
    const welch = welchFromSummaries({ mean: 1, sd: 2, n: 6 }, { mean: 3, sd: 2, n: 6 });
    expect(welch.df).toBeCloseTo(10, 12);
    expect(welch.t).toBeCloseTo(-2 / (2 * Math.sqrt(2 / 6)), 12);
  });

  it('answers groups without scatter, and refuses what it can’t use', () => {
    expect(welchTTest([1, 1], [1, 1])).toMatchObject({ t: 0, p: 1, difference: 0 });
    expect(welchTTest([1, 1], [2, 2])).toMatchObject({ t: -Infinity, p: 0, difference: -1 });
    expect(() => welchTTest([1], [1, 2])).toThrow(/whole n of at least 2, got 1/);
    expect(() => welchTTest([1, NaN], [1, 2])).toThrow(RangeError);
    expect(() => welchFromSummaries({ mean: 1, sd: NaN, n: 3 }, { mean: 1, sd: 1, n: 3 })).toThrow(RangeError);
    expect(() => welchTTest([1, 2], [1, 2], { level: 1 })).toThrow(RangeError);
  });
});

describe('oneWayAnova', () => {
  it('is the pooled t test squared for two groups', () => {
    fc.assert(
      fc.property(group, group, (a, b) => {
        const [sa, sb] = [summarise(a), summarise(b)];
        fc.pre(sa.sd + sb.sd > 1e-3);
        const df = sa.n + sb.n - 2;
        const pooled = Math.sqrt(((sa.n - 1) * sa.sd ** 2 + (sb.n - 1) * sb.sd ** 2) / df);
        const t = (sa.mean - sb.mean) / pooled / Math.sqrt(1 / sa.n + 1 / sb.n);
        const anova = oneWayAnova(Object.freeze([Object.freeze([...a]), Object.freeze([...b])]));
        expect(anova.f / (t * t + 1e-12)).toBeCloseTo(t * t > 1e-6 ? 1 : anova.f / (t * t + 1e-12), 5);
        expect(anova.p).toBeCloseTo(2 * studentTCdf(-Math.abs(t), df), 6);
        expect(anova.pooledSd).toBeCloseTo(pooled, 8);
      }),
    );
  });

  it('splits the whole sum of squares, and is the same from summaries', () => {
    fc.assert(
      fc.property(fc.array(group, { minLength: 2, maxLength: 5 }), (groups) => {
        const anova = oneWayAnova(groups);
        const all = summarise(groups.flat());
        const whole = all.sd ** 2 * (all.n - 1);
        expect(anova.sumOfSquaresBetween + anova.sumOfSquaresWithin).toBeCloseTo(whole, 6);
        const again = oneWayAnovaFromSummaries(groups.map(summarise));
        if (anova.sumOfSquaresWithin > 1e-6)
          expect(again.f / (anova.f + 1e-9)).toBeCloseTo(anova.f / (anova.f + 1e-9), 6);
      }),
    );
  });

  it('answers groups without scatter, and refuses what it can’t use', () => {
    expect(
      oneWayAnova([
        [1, 1],
        [1, 1],
      ]),
    ).toMatchObject({ f: 0, p: 1 });
    expect(
      oneWayAnova([
        [1, 1],
        [2, 2],
      ]),
    ).toMatchObject({ f: Infinity, p: 0 });
    expect(() => oneWayAnova([[1, 2]])).toThrow(/at least 2 groups, got 1/);
    expect(() => oneWayAnova([[1], [2]])).toThrow(/group of at least 2 values/);
    expect(() => oneWayAnova([[1, 2], []])).toThrow(RangeError);
    expect(() =>
      oneWayAnovaFromSummaries([
        { mean: 1, sd: -1, n: 2 },
        { mean: 1, sd: 1, n: 2 },
      ]),
    ).toThrow(RangeError);
  });
});

describe('varianceComponents', () => {
  it('holds a negative estimate at 0 and says so', () => {
    const found = varianceComponents([
      [1, 9],
      [2, 8],
    ]);
    expect(found.betweenUnclipped).toBeLessThan(0);
    expect([found.between, found.share]).toEqual([0, 0]);
    expect(() => varianceComponents([[1, 2]])).toThrow(RangeError);
  });
});

describe('power of the t test', () => {
  it('is the level without a difference, grows with number and difference, and is undone by the number needed', () => {
    expect(powerTTest({ delta: 0, sd: 1 }, 7)).toBeCloseTo(0.05, 10);
    expect(powerTTest({ delta: 0, sd: 1, alpha: 0.2, sides: 1 }, 3, 5)).toBeCloseTo(0.2, 10);
    const real = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(real(0.2, 3), real(0.5, 2), real(0.1, 0.99), (delta, sd, power) => {
        const n = sampleSizeTTest({ delta, sd }, power);
        if (n > 2) expect(powerTTest({ delta, sd }, n)).toBeCloseTo(power, 8);
        expect(powerTTest({ delta: -delta, sd }, 5, 9)).toBeCloseTo(powerTTest({ delta, sd }, 9, 5), 10);
        expect(powerTTest({ delta, sd }, 6)).toBeGreaterThanOrEqual(powerTTest({ delta, sd }, 5));
      }),
      { numRuns: 6 },
    );
  });

  it('comes to the rule n = 2 (z_alpha + z_beta)² s² / delta² for many', () => {
    const n = sampleSizeTTest({ delta: 0.05, sd: 1 }, 0.9);
    expect(n / (2 * ((1.959963984540054 + 1.2815515655446004) / 0.05) ** 2)).toBeCloseTo(1, 3);
  });

  it('refuses a design out of range', () => {
    expect(() => powerTTest({ delta: NaN, sd: 1 }, 5)).toThrow(RangeError);
    expect(() => powerTTest({ delta: 1, sd: 0 }, 5)).toThrow(RangeError);
    expect(() => powerTTest({ delta: 1, sd: 1 }, 1)).toThrow(/groups of 1 or more, 3 together/);
    expect(() => powerTTest({ delta: 1, sd: 1, alpha: 0 }, 5)).toThrow(RangeError);
    expect(() => sampleSizeTTest({ delta: 0, sd: 1 })).toThrow(RangeError);
    expect(() => sampleSizeTTest({ delta: 1, sd: 1 }, 0.04)).toThrow(RangeError);
  });
});

describe('rateIncreasePerDegree', () => {
  it('falls with temperature, rises with energy, and refuses absolute zero', () => {
    expect(rateIncreasePerDegree(0)).toBeGreaterThan(rateIncreasePerDegree(20));
    expect(rateIncreasePerDegree(10, 33)).toBeGreaterThan(rateIncreasePerDegree(10, 28));
    for (const bad of [NaN, -274, Infinity]) expect(() => rateIncreasePerDegree(bad)).toThrow(RangeError);
    expect(() => rateIncreasePerDegree(10, 0)).toThrow(RangeError);
  });
});
