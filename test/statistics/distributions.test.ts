import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { regularisedBeta } from '../../src/statistics/incomplete-beta.js';
import { regularisedGamma } from '../../src/statistics/incomplete-gamma.js';
import {
  chiSquaredCdf,
  chiSquaredQuantile,
  fCdf,
  fUpperTail,
  logNormalDensity,
  noncentralT,
  normalCdf,
  normalQuantile,
  studentTCdf,
  studentTQuantile,
} from '../../src/statistics/index.js';
import { logBeta, logGamma } from '../../src/statistics/log-gamma.js';
import { solveIncreasing } from '../../src/statistics/solve-increasing.js';

const real = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const near = (actual: number, wanted: number, relative: number) =>
  expect(Math.abs(actual - wanted)).toBeLessThanOrEqual(relative * Math.abs(wanted) + 1e-300);

describe('normal', () => {
  it('quantile undoes the distribution function', () => {
    fc.assert(
      fc.property(real(-37, 5), (z) => {
        expect(Math.abs(normalQuantile(normalCdf(z)) - z)).toBeLessThan(
          1e-13 * Math.max(1, Math.exp(z * z * 0.5 * (z > 0 ? 1 : 0))),
        );
      }),
    );
  });

  it('is symmetric, rises, and ends at 0 and 1', () => {
    fc.assert(
      fc.property(real(-40, 40), real(0, 3), (z, step) => {
        near(normalCdf(z) + normalCdf(-z), 1, 1e-15);
        expect(normalCdf(z + step)).toBeGreaterThanOrEqual(normalCdf(z));
      }),
    );
    expect([normalCdf(-Infinity), normalCdf(Infinity), normalCdf(0)]).toEqual([0, 1, 0.5]);
    expect([normalQuantile(0), normalQuantile(1), normalQuantile(0.5)]).toEqual([-Infinity, Infinity, 0]);
  });

  it('has a density that is the slope of the distribution function', () => {
    for (const x of [-2, 0.3, 1.7]) {
      const slope = (normalCdf((x + 1e-5 - 1) / 2) - normalCdf((x - 1e-5 - 1) / 2)) / 2e-5;
      near(Math.exp(logNormalDensity(x, 1, 2)), slope, 1e-8);
    }
  });

  it('refuses NaN, a wrong probability and sd 0', () => {
    expect(() => normalCdf(NaN)).toThrow(RangeError);
    for (const bad of [NaN, -0.1, 1.1]) expect(() => normalQuantile(bad)).toThrow(/normalQuantile needs a probability/);
    expect(() => logNormalDensity(0, 0, 0)).toThrow(RangeError);
  });
});

describe('Student’s t', () => {
  it('quantile undoes the distribution function, for any df', () => {
    fc.assert(
      fc.property(real(1e-12, 0.5), real(0.2, 1e5), (p, df) => {
        near(studentTCdf(studentTQuantile(p, df), df), p, 1e-11);
        near(studentTQuantile(1 - p, df), -studentTQuantile(1 - (1 - p), df), 1e-9);
      }),
    );
  });

  it('has the closed forms of 1 and 2 degrees of freedom', () => {
    fc.assert(
      fc.property(real(-1e3, 1e3), (t) => {
        near(studentTCdf(t, 1), 0.5 + Math.atan(t) / Math.PI, 1e-10);
        near(studentTCdf(t, 2), 0.5 + t / (2 * Math.sqrt(2 + t * t)), 1e-9);
      }),
    );
  });

  it('comes to the normal', () => {
    expect(studentTCdf(-3, Infinity)).toBe(normalCdf(-3));
    near(studentTCdf(-3, 1e12), normalCdf(-3), 1e-10);
    expect([studentTCdf(-Infinity, 3), studentTCdf(Infinity, 3), studentTQuantile(0.5, 3)]).toEqual([0, 1, 0]);
    expect([studentTQuantile(0, 3), studentTQuantile(1, 3)]).toEqual([-Infinity, Infinity]);
  });

  it('refuses what it can’t answer', () => {
    expect(() => studentTCdf(NaN, 3)).toThrow(RangeError);
    for (const df of [0, -1, NaN]) {
      expect(() => studentTCdf(1, df)).toThrow(RangeError);
      expect(() => studentTQuantile(0.1, df)).toThrow(RangeError);
    }
    expect(() => studentTQuantile(1.1, 3)).toThrow(RangeError);
  });
});

describe('chi-squared and F', () => {
  it('quantile undoes the distribution function', () => {
    fc.assert(
      fc.property(real(1e-9, 1 - 1e-9), real(0.1, 3000), (p, df) => {
        near(chiSquaredCdf(chiSquaredQuantile(p, df), df), p, 1e-10);
      }),
    );
    expect([chiSquaredQuantile(0, 3), chiSquaredQuantile(1, 3)]).toEqual([0, Infinity]);
  });

  it('chi-squared with 2 degrees of freedom is exponential, with 1 the square of a normal', () => {
    fc.assert(
      fc.property(real(0, 600), (x) => {
        near(chiSquaredCdf(x, 2), -Math.expm1(-x / 2), 1e-13);
        expect(Math.abs(chiSquaredCdf(x, 1) - (1 - 2 * normalCdf(-Math.sqrt(x))))).toBeLessThan(1e-13);
      }),
    );
  });

  it('F of 1 and n degrees of freedom is the square of t, and turns over with its degrees of freedom', () => {
    fc.assert(
      fc.property(real(0, 300), real(0.5, 500), real(0.5, 500), (f, df1, df2) => {
        near(fUpperTail(f, 1, df2), 2 * studentTCdf(-Math.sqrt(f), df2), 1e-9);
        if (f > 0) expect(Math.abs(fCdf(f, df1, df2) - fUpperTail(1 / f, df2, df1))).toBeLessThan(1e-11);
      }),
    );
  });

  it('refuses what it can’t answer', () => {
    for (const bad of [-1, NaN]) {
      expect(() => chiSquaredCdf(bad, 2)).toThrow(RangeError);
      expect(() => fCdf(bad, 2, 3)).toThrow(RangeError);
    }
    expect(() => chiSquaredCdf(1, 0)).toThrow(RangeError);
    expect(() => fCdf(1, 2, NaN)).toThrow(RangeError);
    expect(() => chiSquaredQuantile(2, 2)).toThrow(RangeError);
  });
});

describe('noncentral t', () => {
  it('has tails that sum to 1 and fall with the noncentrality', () => {
    fc.assert(
      fc.property(real(-20, 20), real(0.5, 300), real(-15, 15), (t, df, ncp) => {
        const { lower, upper } = noncentralT(t, df, ncp);
        near(lower + upper, 1, 1e-11);
        expect(noncentralT(t, df, ncp + 0.5).lower).toBeLessThanOrEqual(lower + 1e-12);
        near(noncentralT(-t, df, -ncp).upper, lower, 1e-9);
      }),
      { numRuns: 25 },
    );
  });
});

describe('functions behind them', () => {
  it('gamma: factorials, the half, and the recurrence', () => {
    let factorial = 1;
    for (let n = 1; n < 25; n++) {
      near(Math.exp(logGamma(n)), factorial, 1e-13);
      factorial *= n;
    }
    near(logGamma(0.5), 0.5 * Math.log(Math.PI), 1e-14);
    fc.assert(
      fc.property(real(1e-6, 1e6), (x) => {
        expect(Math.abs(logGamma(x + 1) - logGamma(x) - Math.log(x))).toBeLessThan(
          1e-14 * (10 + Math.abs(logGamma(x))),
        );
      }),
    );
    expect(() => logGamma(0)).toThrow(RangeError);
  });

  it('beta: gammas, and no cancelling', () => {
    fc.assert(
      fc.property(real(0.1, 50), real(0.1, 50), (a, b) => {
        expect(Math.abs(logBeta(a, b) - (logGamma(a) + logGamma(b) - logGamma(a + b)))).toBeLessThan(1e-12);
        expect(logBeta(a, b)).toBe(logBeta(b, a));
      }),
    );
    // B(n, 1/2) comes to sqrt(pi / n) (1 + 1/(8n))
    near(logBeta(1e8, 0.5), 0.5 * Math.log(Math.PI / 1e8) + 1 / 8e8, 1e-14);
  });

  it('incomplete beta: binomial tails and the other side', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 30 }), fc.nat(29), real(0.01, 0.99), (n, k, x) => {
        fc.pre(k < n);
        // P(at least k + 1 of n) = I_x(k + 1, n − k)
        let tail = 0;
        for (let i = k + 1; i <= n; i++)
          tail += Math.exp(-Math.log(n + 1) - logBeta(i + 1, n - i + 1)) * x ** i * (1 - x) ** (n - i);
        near(regularisedBeta(x, 1 - x, k + 1, n - k).lower, tail, 1e-11);
        near(regularisedBeta(1 - x, x, n - k, k + 1).upper, tail, 1e-9);
      }),
    );
    expect(regularisedBeta(0, 1, 2, 3)).toEqual({ lower: 0, upper: 1 });
    expect(regularisedBeta(1, 0, 2, 3)).toEqual({ lower: 1, upper: 0 });
    expect(() => regularisedBeta(NaN, 1, 2, 3)).toThrow(RangeError);
  });

  it('incomplete gamma: Poisson tails', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), real(0.01, 120), (a, x) => {
        let upper = 0;
        for (let i = 0; i < a; i++) upper += Math.exp(i * Math.log(x) - x - logGamma(i + 1));
        near(regularisedGamma(a, x).upper, upper, 1e-10);
      }),
    );
    expect(regularisedGamma(2, 0)).toEqual({ lower: 0, upper: 1 });
    expect(regularisedGamma(2, Infinity)).toEqual({ lower: 1, upper: 0 });
  });

  it('root of an increasing function, from any start', () => {
    fc.assert(
      fc.property(real(-50, 50), real(-50, 50), (root, start) => {
        const found = solveIncreasing(
          (u) => ({ value: Math.sinh((u - root) / 20), slope: Math.cosh((u - root) / 20) / 20 }),
          start,
        );
        expect(Math.abs(found - root)).toBeLessThan(1e-12 * 50);
      }),
    );
    expect(() => solveIncreasing(() => ({ value: -1, slope: 0 }), 0)).toThrow(RangeError);
  });
});

describe('solveIncreasing', () => {
  /** The root from a start, and how often the function was asked. */
  const solve = (f: (u: number) => number, slope: (u: number) => number, start: number) => {
    let asked = 0;
    const root = solveIncreasing((u) => {
      asked++;
      return { value: f(u), slope: slope(u) };
    }, start);
    return { root, asked };
  };

  it('comes by Newton’s steps, from both sides', () => {
    for (const start of [0, 3, -2]) {
      const { root, asked } = solve((u) => Math.exp(u) - 2, Math.exp, start);
      near(root, Math.LN2, 1e-14);
      expect(asked).toBeLessThan(20);
    }
    expect(
      solve(
        (u) => u - 5,
        () => 1,
        5,
      ),
    ).toEqual({ root: 5, asked: 3 });
  });

  it('halves the bracket where a step would leave it, and where the slope is no help', () => {
    const bend = solve(
      (u) => Math.atan(u - 3),
      (u) => 1 / (1 + (u - 3) ** 2),
      40,
    );
    near(bend.root, 3, 1e-14);
    expect(bend.asked).toBeLessThan(60);
    for (const slope of [Number.NaN, 0, Infinity, -1]) {
      const found = solve(
        (u) => u ** 3 - 7,
        () => slope,
        0,
      );
      near(found.root, Math.cbrt(7), 1e-14);
      expect(found.asked).toBeLessThan(90);
    }
  });

  it('settles on a root near 0, and on a step', () => {
    expect(
      Math.abs(
        solve(
          (u) => u ** 3 + u - 1e-9,
          (u) => 3 * u * u + 1,
          2,
        ).root - 1e-9,
      ),
    ).toBeLessThan(1e-18);
    const step = solve(
      (u) => (u < 1.25 ? -1 : 1),
      () => 0,
      -10,
    );
    expect(Math.abs(step.root - 1.25)).toBeLessThan(1e-15);
    expect(step.asked).toBeLessThan(90);
  });
});

describe('quantiles on a grid', () => {
  it('undo chi-squared and are symmetric for Student’s t, wherever p and df lie', () => {
    for (const df of [0.3, 1, 4, 30, 900]) {
      for (const p of [1e-9, 0.01, 0.3, 0.5, 0.9, 1 - 1e-9]) {
        near(chiSquaredCdf(chiSquaredQuantile(p, df), df), p, 1e-11);
        if (p < 0.5) near(studentTQuantile(1 - p, df), -studentTQuantile(p, df), 1e-6);
      }
    }
    expect(studentTQuantile(0.3, Infinity)).toBe(normalQuantile(0.3));
    expect(studentTQuantile(0, Infinity)).toBe(-Infinity);
    expect(studentTQuantile(1, Infinity)).toBe(Infinity);
  });
});
