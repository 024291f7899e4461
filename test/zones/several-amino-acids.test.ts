import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import {
  aminoAcidVotes,
  equilibriumLimit,
  isNearEquilibrium,
  kmeansCheck,
  nearEquilibriumRatio,
} from '../../src/zones/index.js';
import { clockOf, shellsOf, voting } from './voting-shells.js';

const CODES = ['Ile', 'Val', 'Glx'] as const;

describe('aminoAcidVotes', () => {
  const agreed = Object.fromEntries(
    [-2, -1.8, -1.6, -1.4].map((x, at) => [`B${at + 1}`, { Ile: x, Val: x - 0.2, Glx: x + 0.1 }]),
  );

  it('is silent where all amino acids see one order', () => {
    expect(aminoAcidVotes(voting(shellsOf(agreed, 1), CODES), { clock: 'index', alpha: 0.05 })).toEqual([]);
  });

  it('shows the two beds that one amino acid turns round, with every vote', () => {
    const spoilt = { ...agreed, B2: { ...agreed.B2, Val: agreed.B2.Val + 0.4 } };
    const found = aminoAcidVotes(voting(shellsOf(spoilt, 1), CODES), { clock: 'index', alpha: 0.05 });
    const pairs = found.map(({ bed_a, bed_b }) => `${bed_a} ${bed_b}`);
    // B2's Val now stands between those of B3 and B4: only B2 and B3 are turned round
    expect(pairs).toEqual(['S1/B2 S1/B3']);
    const votes = Object.fromEntries(found[0].votes.map((vote) => [vote.amino_acid, vote.older]));
    expect(votes).toEqual({ Ile: 'S1/B3', Glx: 'S1/B3', Val: 'S1/B2' });
    for (const { p } of found[0].votes) expect(p).toBeLessThan(0.01);
  });

  it('needs two amino acids, and gives no more pairs than asked for', () => {
    const turned = Object.fromEntries(
      [-2, -1.8, -1.6, -1.4, -1.2].map((x, at) => [`B${at + 1}`, { Ile: x, Val: -x - 4 }]),
    );
    const shells = shellsOf(turned, 2);
    expect(aminoAcidVotes(voting(shells, ['Ile']), { clock: 'index', alpha: 0.05 })).toEqual([]);
    expect(aminoAcidVotes(voting(shells, ['Ile', 'Val']), { clock: 'index', alpha: 0.05 })).toHaveLength(10);
    expect(aminoAcidVotes(voting(shells, ['Ile', 'Val']), { clock: 'index', alpha: 0.05, most: 3 })).toHaveLength(3);
  });
});

describe('kmeansCheck', () => {
  const random = createRandom(4);
  const labels = Array.from({ length: 24 }, (_, at) => at % 3);
  const means = labels.map((zone) => [-2 + 0.3 * zone, -1.5 + 0.2 * zone].map((x) => x + 0.02 * random.normal()));
  const within = [
    [0.0025, 0.001],
    [0.001, 0.0016],
  ];

  it('agrees with zones that are there, groups numbered from the smallest ratios up', () => {
    const check = kmeansCheck({ means, within, labels, seed: 1 })!;
    expect(check.rand).toBe(1);
    expect(check.groups).toEqual(labels);
  });

  it('disagrees with zones that are not', () => {
    const wrong = labels.map((_, at) => Math.floor(at / 8));
    expect(kmeansCheck({ means, within, labels: wrong, seed: 1 })!.rand).toBeLessThan(0.2);
  });

  it('is the same for the same seed, and no worse than any single start', () => {
    const once = kmeansCheck({ means, within, labels, seed: 9 });
    expect(kmeansCheck({ means, within, labels, seed: 9 })).toEqual(once);
    for (let seed = 20; seed < 30; seed++) {
      const single = kmeansCheck({ means, within, labels, seed, starts: 1 })!;
      expect(once!.withinSum).toBeLessThanOrEqual(single.withinSum + 1e-9);
    }
  });

  it('leaves out beds without an amino acid, and has nothing to say of one zone or of too few beds', () => {
    const gaps = means.map((row, at) => (at === 5 ? [Number.NaN, row[1]] : row));
    expect(kmeansCheck({ means: gaps, within, labels, seed: 1 })!.groups[5]).toBeNull();
    expect(kmeansCheck({ means, within, labels: labels.map(() => 0), seed: 1 })).toBeNull();
    expect(kmeansCheck({ means: [means[0], means[0]], within, labels: [0, 1], seed: 1 })).toBeNull();
    expect(kmeansCheck({ means: [], within, labels: [], seed: 1 })).toBeNull();
  });
});

describe('near equilibrium', () => {
  it('is above 1.1 for A/I and above 0.9 for the others; an index joins its limits by weight', () => {
    expect(nearEquilibriumRatio('Ile')).toBe(1.1);
    expect(nearEquilibriumRatio('Asx')).toBe(0.9);
    expect(isNearEquilibrium(clockOf('Ile'), Math.log(1.12))).toBe(true);
    expect(isNearEquilibrium(clockOf('Ile'), Math.log(1.08))).toBe(false);
    expect(isNearEquilibrium(clockOf('Val'), Math.log(0.92))).toBe(true);
    expect(equilibriumLimit(clockOf('Ile', 'Val'))).toBeCloseTo((Math.log(1.1) + Math.log(0.9)) / 2, 12);
  });
});
