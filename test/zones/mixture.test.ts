import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom, logNormalDensity } from '../../src/statistics/index.js';
import { bic, fitContinuum, fitMixture, type Mixture } from '../../src/zones/index.js';

/** Beds about given zone means, `each` a zone, with errors between 0.01 and 0.03. */
function drawBeds(means: readonly number[], each: number, tau: number, seed: number) {
  const random = createRandom(seed);
  const errors: number[] = [];
  const values = means.flatMap((mean) =>
    Array.from({ length: each }, () => {
      const error = 0.01 + 0.02 * random.uniform();
      errors.push(error);
      return mean + Math.hypot(tau, error) * random.normal();
    }),
  );
  return { values, errors };
}

const logLikelihood = (fit: Pick<Mixture, 'means' | 'weights' | 'tau'>, values: number[], errors: number[]): number =>
  values.reduce((total, value, bed) => {
    const sd = Math.hypot(fit.tau, errors[bed]);
    const density = fit.means.reduce(
      (sum, mean, j) => sum + fit.weights[j] * Math.exp(logNormalDensity(value, mean, sd)),
      0,
    );
    return total + Math.log(density);
  }, 0);

describe('fitMixture', () => {
  it('states the likelihood of the parameters it gives, and stands on a peak of it', () => {
    for (const seed of [1, 2, 3]) {
      const { values, errors } = drawBeds([-2, -1.8, -1.5], 8, 0.02, seed);
      const fit = fitMixture(values, errors, 3);
      expect(fit.logLikelihood).toBeCloseTo(logLikelihood(fit, values, errors), 6);
      for (const step of [-0.003, 0.003]) {
        for (let j = 0; j < 3; j++) {
          const means = fit.means.map((mean, at) => (at === j ? mean + step : mean));
          expect(logLikelihood({ ...fit, means }, values, errors)).toBeLessThan(fit.logLikelihood);
        }
        const tau = Math.abs(fit.tau + step);
        expect(logLikelihood({ ...fit, tau }, values, errors)).toBeLessThan(fit.logLikelihood + 1e-9);
      }
    }
  });

  it('finds the zones that were drawn, from the youngest upwards, and their spread', () => {
    const { values, errors } = drawBeds([-2, -1.7, -1.4], 60, 0.04, 5);
    const fit = fitMixture(values, errors, 3);
    [-2, -1.7, -1.4].forEach((mean, j) => {
      expect(Math.abs(fit.means[j] - mean)).toBeLessThan(0.02);
    });
    expect(Math.abs(fit.tau - 0.04)).toBeLessThan(0.01);
  });

  it('gives one zone the weighted mean where errors explain all scatter', () => {
    const values = [-1.01, -1, -0.99];
    const errors = [0.1, 0.05, 0.1];
    const fit = fitMixture(values, errors, 1);
    expect(fit.tau).toBe(0);
    const w = errors.map((error) => error ** -2);
    const mean = values.reduce((sum, value, i) => sum + w[i] * value, 0) / w.reduce((a, b) => a + b);
    expect(fit.means[0]).toBeCloseTo(mean, 10);
  });

  it('climbs from nearby parameters to the same peak', () => {
    const { values, errors } = drawBeds([-2, -1.7, -1.4], 10, 0.02, 9);
    const fit = fitMixture(values, errors, 3);
    const near = { means: fit.means.map((mean) => mean + 0.01), weights: [0.3, 0.3, 0.4], tau: 0.03 };
    const again = fitMixture(values, errors, 3, { near });
    expect(again.logLikelihood).toBeCloseTo(fit.logLikelihood, 5);
  });

  it('never gives NaN: equal values, no errors, as many zones as beds', () => {
    fc.assert(
      fc.property(
        fc.array(fc.constantFrom(-2, -1.9, -1.5, -1), { minLength: 1, maxLength: 7 }),
        fc.constantFrom(0, 1e-9, 0.05),
        fc.integer({ min: 1, max: 4 }),
        (values, error, wanted) => {
          const k = Math.min(wanted, values.length);
          const fit = fitMixture(
            values,
            values.map(() => error),
            k,
          );
          for (const value of [...fit.means, ...fit.weights, fit.tau, fit.logLikelihood, ...fit.responsibilities]) {
            expect(Number.isFinite(value)).toBe(true);
          }
          expect(fit.weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1, 8);
        },
      ),
      { numRuns: 80, seed: 4 },
    );
  });

  it('moves with the scale: shifted and stretched beds give shifted and stretched zones', () => {
    const { values, errors } = drawBeds([-2, -1.6], 10, 0.03, 3);
    const fit = fitMixture(values, errors, 2);
    const other = fitMixture(
      values.map((v) => 3 * v + 1),
      errors.map((e) => 3 * e),
      2,
    );
    expect(other.tau).toBeCloseTo(3 * fit.tau, 5);
    other.means.forEach((mean, j) => {
      expect(mean).toBeCloseTo(3 * fit.means[j] + 1, 5);
    });
    expect(other.logLikelihood).toBeCloseTo(fit.logLikelihood - values.length * Math.log(3), 5);
  });
});

describe('bic', () => {
  it('adds ln n a parameter to −2 ln L', () => {
    expect(bic(-100, 4, 30)).toBeCloseTo(200 + 4 * Math.log(30), 12);
  });
});

describe('fitContinuum', () => {
  it('finds the two ends of values spread evenly', () => {
    const random = createRandom(11);
    const errors = Array.from({ length: 300 }, () => 0.02);
    const values = errors.map((error) => -2 + 0.8 * random.uniform() + error * random.normal());
    const fit = fitContinuum(values, errors);
    expect(Math.abs(fit.low + 2)).toBeLessThan(0.02);
    expect(Math.abs(fit.high + 1.2)).toBeLessThan(0.02);
  });

  it('is no worse than any pair of ends on a grid', () => {
    const { values, errors } = drawBeds([-2, -1.9], 6, 0, 2);
    const fit = fitContinuum(values, errors);
    const at = (low: number, high: number) => {
      let total = 0;
      for (let bed = 0; bed < values.length; bed++) {
        // the mass between the ends by the midpoint rule
        let sum = 0;
        for (let i = 0; i < 400; i++) {
          const x = low + ((i + 0.5) / 400) * (high - low);
          sum += Math.exp(logNormalDensity(values[bed], x, errors[bed])) / 400;
        }
        total += Math.log(sum);
      }
      return total;
    };
    expect(at(fit.low, fit.high)).toBeCloseTo(fit.logLikelihood, 2);
    for (let low = -2.1; low < -1.9; low += 0.02) {
      for (let high = -1.95; high < -1.8; high += 0.02) {
        if (high > low + 0.01) expect(at(low, high)).toBeLessThan(fit.logLikelihood + 0.01);
      }
    }
  });

  it('stands for one bed, and for beds all alike', () => {
    for (const values of [[-1], [-1, -1, -1]]) {
      expect(
        Number.isFinite(
          fitContinuum(
            values,
            values.map(() => 0.03),
          ).logLikelihood,
        ),
      ).toBe(true);
    }
  });
});
