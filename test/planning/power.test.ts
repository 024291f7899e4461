import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chanceFromHere, powerReaches, resolvingPower } from '../../src/planning/power.js';
import { shellsInEach, shellsNeeded } from '../../src/planning/shells-needed.js';
import { createRandom, normalQuantile, studentTQuantile } from '../../src/statistics/index.js';

describe('resolvingPower', () => {
  it('counts the surveys that resolve a pair, with a pooled scatter of few degrees of freedom and spread between beds', () => {
    const random = createRandom(11);
    const design = { gap: 0.25, scatter: 0.07, shells: [3, 6] as const, spreadVariance: 0.01, df: 9 };
    const runs = 40000;
    let resolved = 0;
    for (let run = 0; run < runs; run++) {
      const sampling = 0.07 ** 2 * (1 / 3 + 1 / 6);
      const share = random.gamma(4.5) / 4.5;
      const difference = 0.25 + Math.sqrt(sampling) * random.normal();
      const limit = studentTQuantile(0.95, 9) ** 2 * sampling * share + normalQuantile(0.95) ** 2 * 0.01;
      if (difference > Math.sqrt(limit)) resolved++;
    }
    expect(resolvingPower(design)).toBeCloseTo(resolved / runs, 1.9);
    expect(resolvingPower(design)).toBeGreaterThan(0.3);
    expect(resolvingPower(design)).toBeLessThan(0.97);
  });

  it('grows with every shell and never with the scatter', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 0.5, noNaN: true }),
        fc.double({ min: 0.02, max: 0.2, noNaN: true }),
        fc.integer({ min: 1, max: 20 }),
        fc.integer({ min: 1, max: 20 }),
        fc.integer({ min: 4, max: 200 }),
        (gap, scatter, a, b, df) => {
          const now = resolvingPower({ gap, scatter, shells: [a, b], df });
          expect(now).toBeGreaterThanOrEqual(0);
          expect(now).toBeLessThanOrEqual(1);
          expect(resolvingPower({ gap, scatter, shells: [a + 1, b], df })).toBeGreaterThanOrEqual(now - 1e-9);
          expect(resolvingPower({ gap, scatter: scatter * 1.1, shells: [a, b], df })).toBeLessThanOrEqual(now + 1e-9);
          expect(resolvingPower({ gap: -gap, scatter, shells: [b, a], df })).toBeCloseTo(now, 12);
        },
      ),
      { seed: 3 },
    );
  });

  it('is the level itself where there is no gap', () => {
    expect(resolvingPower({ gap: 0, scatter: 0.07, shells: [5, 5], df: 8 })).toBeCloseTo(0.05, 9);
    expect(resolvingPower({ gap: 0, scatter: 0.07, shells: [5, 5], df: 8 }, { alpha: 0.1, sides: 2 })).toBeCloseTo(
      0.05,
      9,
    );
  });

  it('refuses what is no survey', () => {
    expect(() => resolvingPower({ gap: 1, scatter: 0, shells: [3, 3] })).toThrow(/scatter must be above 0, got 0/);
    expect(() => resolvingPower({ gap: 1, scatter: 1, shells: [0, 3] })).toThrow(/needs a shell/);
    expect(() => resolvingPower({ gap: 1, scatter: 1, shells: [3, 3] }, { alpha: 2 })).toThrow(/alpha/);
  });
});

describe('powerReaches', () => {
  it('is what the power itself says, wherever it lies', () => {
    let reached = 0;
    let missed = 0;
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 0.5, noNaN: true }),
        fc.integer({ min: 1, max: 30 }),
        fc.integer({ min: 1, max: 30 }),
        fc.oneof(fc.integer({ min: 1, max: 400 }), fc.constant(Number.POSITIVE_INFINITY)),
        fc.double({ min: 0, max: 0.01, noNaN: true }),
        fc.double({ min: 0, max: 0.01, noNaN: true }),
        fc.double({ min: -0.02, max: 0.02, noNaN: true }),
        (gap, a, b, df, fixedVariance, spreadVariance, beside) => {
          const design = { gap, scatter: 0.07, shells: [a, b] as const, df, fixedVariance, spreadVariance };
          const power = resolvingPower(design);
          // near the power, where it is hardest to tell, and at the usual one
          for (const wanted of [power + beside, 0.8]) {
            const found = powerReaches(design, wanted);
            expect(found).toBe(power >= wanted);
            if (found) reached++;
            else missed++;
          }
        },
      ),
      { seed: 5, numRuns: 500 },
    );
    expect(Math.min(reached, missed)).toBeGreaterThan(100);
    expect(powerReaches({ gap: 1, scatter: 1, shells: [1, 1], df: 'own' }, 0.01)).toBe(false);
  });
});

describe('shellsNeeded', () => {
  it('gives the fewest shells that reach the power, over every way to share them out', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 8 }),
        fc.integer({ min: 1, max: 8 }),
        fc.double({ min: 0.05, max: 0.2, noNaN: true }),
        (a, b, gap) => {
          const design = { gap, scatter: 0.07, shells: [a, b] as const, df: 30 };
          const found = shellsNeeded(design);
          if (found === null) return;
          expect(found.power).toBeGreaterThanOrEqual(0.8);
          const total = found.more[0] + found.more[1];
          for (let toA = 0; toA < total; toA++) {
            const shells = [a + toA, b + total - 1 - toA] as const;
            expect(resolvingPower({ ...design, shells, df: 30 + total - 1 })).toBeLessThan(0.8);
          }
        },
      ),
      { seed: 4, numRuns: 60 },
    );
  });

  it('gives the shells to the bed that has fewer', () => {
    const [first, second] = shellsNeeded({ gap: 0.1, scatter: 0.07, shells: [2, 9] })?.more ?? [0, 0];
    expect(first).toBeGreaterThan(second);
    expect(shellsNeeded({ gap: 0.5, scatter: 0.07, shells: [5, 5] })?.more).toEqual([0, 0]);
  });

  it('promises nothing where the gap is too small, or the spread between beds hides it', () => {
    expect(shellsNeeded({ gap: 0.02, scatter: 0.07, shells: [5, 5] })).toBeNull();
    expect(shellsNeeded({ gap: 0, scatter: 0.07, shells: [5, 5] })).toBeNull();
    expect(shellsNeeded({ gap: 0.1, scatter: 0.07, shells: [5, 5], spreadVariance: 2 * 0.05 ** 2 })).toBeNull();
  });

  it('starts from a formula that falls short by about the price of not knowing the scatter', () => {
    for (const gap of [0.05, 0.08, 0.1]) {
      const exact = shellsNeeded({ gap, scatter: 0.07, shells: [1, 1], df: 'own' }, { most: 100 });
      expect((exact?.more[0] ?? 0) + 1 - shellsInEach(gap, 0.07)).toBeGreaterThan(-0.5);
      expect((exact?.more[0] ?? 0) + 1 - shellsInEach(gap, 0.07)).toBeLessThan(2);
    }
  });
});

describe('chanceFromHere', () => {
  it('counts the larger surveys that resolve, over what the true gap may be', () => {
    const random = createRandom(12);
    const [gap, s, n, more] = [0.06, 0.07, 4, 5];
    const runs = 40000;
    let resolved = 0;
    for (let run = 0; run < runs; run++) {
      const truth = gap + s * Math.sqrt(2 / n) * random.normal();
      const fresh = truth + s * Math.sqrt(2 / more) * random.normal();
      const all = (n * gap + more * fresh) / (n + more);
      if (Math.abs(all) > normalQuantile(0.95) * s * Math.sqrt(2 / (n + more))) resolved++;
    }
    const pair = { gap, variance: (2 * s * s) / n, varianceAfter: (2 * s * s) / (n + more) };
    expect(chanceFromHere(pair)).toBeCloseTo(resolved / runs, 1.9);
  });

  it('is certain where nothing is added', () => {
    expect(chanceFromHere({ gap: 0.1, variance: 0.001, varianceAfter: 0.001 })).toBe(1);
    expect(chanceFromHere({ gap: 0.01, variance: 0.001, varianceAfter: 0.001 })).toBe(0);
  });
});
