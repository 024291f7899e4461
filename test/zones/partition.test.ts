import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { partition, partitionCosts } from '../../src/zones/index.js';

const cost = (values: readonly number[], weights: readonly number[], labels: readonly number[]): number => {
  let total = 0;
  for (const label of new Set(labels)) {
    const members = values.map((_, at) => at).filter((at) => labels[at] === label);
    const w = members.reduce((sum, at) => sum + weights[at], 0);
    const mean = members.reduce((sum, at) => sum + weights[at] * values[at], 0) / w;
    total += members.reduce((sum, at) => sum + weights[at] * (values[at] - mean) ** 2, 0);
  }
  return total;
};

/** Least cost over every grouping of the values at all, cuts between neighbours or not. */
function bruteForce(values: readonly number[], weights: readonly number[], k: number): number {
  let least = Number.POSITIVE_INFINITY;
  const labels = new Array<number>(values.length).fill(0);
  const place = (at: number, used: number): void => {
    if (at === values.length) {
      if (used === k) least = Math.min(least, cost(values, weights, labels));
      return;
    }
    for (let label = 0; label <= Math.min(used, k - 1); label++) {
      labels[at] = label;
      place(at + 1, Math.max(used, label + 1));
    }
  };
  place(0, 0);
  return least;
}

const samples = fc
  .array(fc.tuple(fc.double({ min: -3, max: 0, noNaN: true }), fc.double({ min: 0.1, max: 50, noNaN: true })), {
    minLength: 1,
    maxLength: 8,
  })
  .map((pairs) => ({ values: pairs.map(([value]) => value), weights: pairs.map(([, weight]) => weight) }));

describe('partition', () => {
  it('reaches the least cost of all groupings, not only of cuts', () => {
    fc.assert(
      fc.property(samples, fc.integer({ min: 1, max: 4 }), ({ values, weights }, wanted) => {
        const k = Math.min(wanted, values.length);
        const least = bruteForce(values, weights, k);
        expect(cost(values, weights, partition(values, weights, k))).toBeLessThan(least + 1e-9 * (1 + least));
      }),
      { numRuns: 60, seed: 1 },
    );
  });

  it('names every group, the smallest values 0, and cuts values in order', () => {
    fc.assert(
      fc.property(samples, ({ values, weights }) => {
        const k = Math.ceil(values.length / 2);
        const labels = partition(values, weights, k);
        expect([...new Set(labels)].sort()).toEqual(Array.from({ length: k }, (_, j) => j));
        const order = values.map((_, at) => at).sort((a, b) => values[a] - values[b]);
        for (let at = 1; at < order.length; at++) {
          if (values[order[at]] > values[order[at - 1]]) {
            expect(labels[order[at]]).toBeGreaterThanOrEqual(labels[order[at - 1]]);
          }
        }
      }),
      { numRuns: 50, seed: 2 },
    );
  });

  it('gives costs of all numbers of groups that agree with the partitions and never grow', () => {
    fc.assert(
      fc.property(samples, ({ values, weights }) => {
        const costs = partitionCosts(values, weights, values.length);
        costs.forEach((value, at) => {
          expect(Math.abs(value - cost(values, weights, partition(values, weights, at + 1)))).toBeLessThan(1e-8);
          if (at > 0) expect(value).toBeLessThanOrEqual(costs[at - 1] + 1e-12);
        });
      }),
      { numRuns: 40, seed: 3 },
    );
  });

  it('refuses more groups than values, in words', () => {
    expect(() => partition([1, 2], [1, 1], 3)).toThrow(/from 1 to 2, got 3/);
    expect(() => partition([1, 2], [1, 1], Number.NaN)).toThrow(RangeError);
    expect(() => partitionCosts([1, 2], [1, 1], 0)).toThrow(RangeError);
  });
});
