import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitGradient } from '../../src/coast/gradient.js';
import { sectionWidening } from '../../src/coast/section-widening.js';
import { createRandom } from '../../src/statistics/index.js';
import { bic, fitContinuum, fitMixture } from '../../src/zones/index.js';

/** Beds of three zones along a column, warmer beds ahead by `slope` a unit. */
function beds(slope: number, seed = 1, n = 24) {
  const random = createRandom(seed);
  const gradient = Array.from({ length: n }, (_, i) => (8 * i) / (n - 1) - 4);
  const values = gradient.map((g) => -2 + 0.4 * random.integer(3) + slope * g + 0.02 * random.normal());
  return { values, errors: values.map(() => 0.02), gradient };
}
const fitted = ({ values, errors, gradient }: ReturnType<typeof beds>) => fitGradient(values, errors, gradient)!;

describe('fitGradient', () => {
  it('finds a slope, surely', () => {
    const found = fitted(beds(0.06));
    expect(found.used).toBe(true);
    expect(found.low).toBeLessThan(0.06);
    expect(found.high).toBeGreaterThan(0.06);
    expect(found.high - found.low).toBeLessThan(0.02);
    expect(found.bicWith).toBeLessThan(found.bicWithout);
  });

  it('takes none out where there is none', () => {
    const found = fitted(beds(0));
    expect(found.used).toBe(false);
    expect(found.low).toBeLessThan(0);
    expect(found.high).toBeGreaterThan(0);
  });

  it('has the interval where the likelihood of the mixture has fallen by t²/2 or a little further out, and BIC with one parameter more', () => {
    const data = beds(0.06, 3);
    const found = fitted(data);
    const at = (slope: number) => data.values.map((v, i) => v - slope * data.gradient[i]);
    const best = [1, 2, 3, 4]
      .map((k) => fitMixture(at(found.slope), data.errors, k).logLikelihood)
      .map((likelihood, i) => bic(likelihood, 2 * (i + 1) + 1, 24));
    const continuum = bic(fitContinuum(at(found.slope), data.errors).logLikelihood, 3, 24);
    expect(found.bicWith).toBeCloseTo(Math.min(...best, continuum), 3);
    const k = best.indexOf(Math.min(...best)) + 1;
    const profile = (slope: number) => fitMixture(at(slope), data.errors, k).logLikelihood;
    // qt(0.975, 24 - 1 - 3) = 2.085963 (computed in R)
    expect(k).toBe(3);
    const inner = 2.085963 ** 2 / 2;
    expect(profile(found.slope) - profile(found.low)).toBeGreaterThan(inner - 0.01);
    expect(profile(found.slope) - profile(found.high)).toBeGreaterThan(inner - 0.01);
    expect(profile(found.slope) - profile(found.low)).toBeLessThan(1.8 * inner);
  });

  it('turns with the sign and the unit of the column, and with the order of the beds not at all', () => {
    fc.assert(
      fc.property(fc.constantFrom(-100, -1, 0.01, 5), fc.integer({ min: 1, max: 50 }), (unit, seed) => {
        const data = beds(0.05, seed);
        const plain = fitted(data);
        const turned = fitted({
          values: [...data.values].reverse(),
          errors: data.errors,
          gradient: data.gradient.map((g) => g * unit).reverse(),
        });
        expect(turned.slope * unit).toBeCloseTo(plain.slope, 3);
        expect((unit > 0 ? turned.low : turned.high) * unit).toBeCloseTo(plain.low, 3);
        expect(turned.used).toBe(plain.used);
      }),
      { seed: 1, numRuns: 12 },
    );
  });

  it('says nothing with fewer than 4 beds, or of a column that does not vary', () => {
    expect(fitGradient([-2, -1.9, -1.8], [0.02, 0.02, 0.02], [-1, 0, 1])).toBeNull();
    expect(fitGradient([-2, -1.9, -1.8, -1.7], [0.02, 0.02, 0.02, 0.02], [0, 0, 0, 0])).toBeNull();
  });

  it('stays quick with very many beds, and as right', () => {
    const data = beds(0.06, 5, 800);
    const before = performance.now();
    const found = fitted(data);
    expect(performance.now() - before).toBeLessThan(20_000);
    expect(found.low).toBeLessThan(0.06);
    expect(found.high).toBeGreaterThan(0.06);
    expect(found.high - found.low).toBeLessThan(0.004);
  });
});

describe('sectionWidening', () => {
  /** Eight sections of four beds, zones known. */
  function drawn(seed: number, own: number) {
    const random = createRandom(seed);
    const sections = Array.from({ length: 32 }, (_, i) => Math.floor(i / 4));
    const shared = Array.from({ length: 8 }, () => own * random.normal());
    const gradient = sections.map((section) => section - 3.5);
    const labels = sections.map(() => random.integer(3));
    const values = labels.map((zone, i) => -2 + 0.4 * zone + shared[sections[i]] + 0.02 * random.normal());
    // the slope is left to the linear model: any one gives the same residuals
    const data = { values, errors: values.map(() => 0.02), gradient };
    return sectionWidening(data, labels, own, 0.1, sections);
  }
  const mean = (list: readonly number[]) => list.reduce((sum, value) => sum + value, 0) / list.length;
  const seeds = Array.from({ length: 60 }, (_, i) => i + 1);

  it('finds what the beds of one section share, without bias, and widens by it', () => {
    const found = seeds.map((seed) => drawn(seed, 0.05));
    expect(Math.abs(mean(found.map(({ sharedSd }) => sharedSd ** 2)) / 0.05 ** 2 - 1)).toBeLessThan(0.2);
    // sections of four: twice the error of 32 beds that stand by themselves, and fewer degrees of freedom
    expect(mean(found.map(({ factor }) => factor))).toBeGreaterThan(1.7);
  });

  it('widens little where there is nothing shared, and not at all with two sections', () => {
    const found = seeds.map((seed) => drawn(seed, 0));
    expect(mean(found.map(({ sharedSd }) => sharedSd))).toBeLessThan(0.008);
    expect(mean(found.map(({ factor }) => factor))).toBeLessThan(1.3);
    const two = { values: [0, 0.1, 0.02, 0.3, 0.4, 0.31], errors: [1, 1, 1, 1, 1, 1].map((e) => 0.02 * e) };
    const gradient = [-1, -1, -1, 1, 1, 1];
    expect(sectionWidening({ ...two, gradient }, [0, 1, 0, 0, 1, 0], 0.1, 0, [0, 0, 0, 1, 1, 1]).sharedSd).toBe(0);
  });
});
