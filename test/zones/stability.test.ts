import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import {
  assignerOverDraws,
  assignZone,
  type BootstrapZonesArgument,
  bestLabels,
  bootstrapZones,
  fitMixture,
  sameZone,
  stabilityOf,
  stabilityTasks,
  zoneMeanErrors,
} from '../../src/zones/index.js';

function argumentFor(
  zones: readonly number[],
  each: number,
  error: number,
): Omit<BootstrapZonesArgument, 'first' | 'repeats'> {
  const random = createRandom(6);
  const values = zones.flatMap((mean) => Array.from({ length: each }, () => mean + error * random.normal()));
  const errors = values.map(() => error);
  const { means, weights, tau, ...rest } = fitMixture(values, errors, zones.length);
  const labels = bestLabels({ means, weights, tau, ...rest }, values.length);
  return { values, errors, shells: values.map(() => 5), residuals: [], fit: { means, weights, tau }, labels, seed: 3 };
}

describe('bootstrapZones', () => {
  it('finds zones that stand apart again and again, and doubts those that run together', () => {
    const apart = stabilityOf(bootstrapZones({ ...argumentFor([-2, -1.5, -1], 6, 0.02), first: 0, repeats: 100 }));
    for (const value of apart) expect(value).toBeGreaterThan(0.99);
    const close = stabilityOf(bootstrapZones({ ...argumentFor([-2, -1.95], 10, 0.02), first: 0, repeats: 100 }));
    for (const value of close) expect(value).toBeLessThan(0.85);
  });

  it('does not hang on how the repeats are shared out', () => {
    const common = argumentFor([-2, -1.9], 8, 0.02);
    const whole = bootstrapZones({ ...common, first: 0, repeats: 120 });
    const parts = stabilityTasks(common, 120).flatMap(({ name, argument }) => {
      expect(name).toBe('bootstrapZones');
      return bootstrapZones(structuredClone(argument) as BootstrapZonesArgument);
    });
    expect(parts).toEqual(whole);
  });

  it('draws the shells from the residuals it is given', () => {
    const common = argumentFor([-2, -1.8], 8, 0.02);
    const wild = common.values.flatMap((_, at) => [at % 2 === 0 ? 0.5 : -0.5, 0.4, -0.4]);
    const calm = stabilityOf(bootstrapZones({ ...common, first: 0, repeats: 60 }));
    const shaken = stabilityOf(bootstrapZones({ ...common, residuals: wild, first: 0, repeats: 60 }));
    expect(shaken[0]!).toBeLessThan(calm[0]! - 0.1);
  });
});

describe('stabilityOf', () => {
  it('passes over bootstraps in which no bed of the zone was drawn', () => {
    const priors = { means: [-1], weights: [1], tau: 0, se: [0] };
    expect(stabilityOf([{ jaccard: [null], priors }])).toEqual([null]);
    expect(stabilityOf([])).toEqual([]);
  });
});

describe('sameZone, assignerOverDraws and zoneMeanErrors', () => {
  const common = argumentFor([-2, -1.9], 8, 0.02);
  const { values, errors } = common;
  const bootstraps = bootstrapZones({ ...common, first: 0, repeats: 100 });

  it('gives each pair a probability, the same both ways round, near 1 for neighbours and near 0 across zones', () => {
    const same = sameZone(values, errors, bootstraps);
    const n = values.length;
    for (let a = 0; a < n; a++) {
      expect(same[a * n + a]).toBe(1);
      for (let b = 0; b < n; b++) {
        expect(same[a * n + b]).toBe(same[b * n + a]);
        expect(same[a * n + b]).toBeGreaterThanOrEqual(0);
        expect(same[a * n + b]).toBeLessThanOrEqual(1 + 1e-9);
      }
    }
    const order = values.map((_, at) => at).sort((a, b) => values[a] - values[b]);
    expect(same[order[0] * n + order[1]]).toBeGreaterThan(0.9);
    expect(same[order[0] * n + order[n - 1]]).toBeLessThan(0.01);
  });

  it('is less sure between zones than the fit alone', () => {
    const middle = (common.fit.means[0] + common.fit.means[1]) / 2 + 0.012;
    const alone = assignZone(middle, 0.01, { ...common.fit, se: [0, 0] });
    const averaged = assignerOverDraws(bootstraps)(middle, 0.01);
    expect(averaged.zone).toBe(alone.zone);
    expect(averaged.probability).toBeLessThan(alone.probability);
    expect(averaged.probabilities.reduce((sum, p) => sum + p, 0)).toBeCloseTo(1, 8);
  });

  it('never gives a zone mean less error than fixed zones have', () => {
    const se = [0.005, 0.9];
    const wider = zoneMeanErrors(se, bootstraps);
    expect(wider[0]).toBeGreaterThanOrEqual(0.005);
    expect(wider[1]).toBe(0.9);
    expect(zoneMeanErrors(se, [])).toEqual(se);
  });
});
