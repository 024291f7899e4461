import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { aminoAcidShares, clockLogRatio, fisherIndex, indexResolution } from '../../src/beds/index.js';
import type { AminoAcid } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';

const CODES: readonly AminoAcid[] = ['Ile', 'Asx', 'Glx', 'Val'];

interface Drawn {
  /** Standard deviation between shells of each amino acid. */
  readonly scatter?: readonly number[];
  /** How much of the beds' age each one sees. */
  readonly slope?: readonly number[];
  /** Standard deviation between beds that is its own. */
  readonly own?: readonly number[];
  readonly beds?: number;
  readonly shells?: number;
}

function draw(seed: number, options: Drawn = {}) {
  const { scatter = [0.05, 0.05, 0.05, 0.05], beds = 20, shells = 5 } = options;
  const { slope = scatter.map(() => 1), own = scatter.map(() => 0) } = options;
  const random = createRandom(seed);
  const rows: number[][] = [];
  const labels: number[] = [];
  for (let bed = 0; bed < beds; bed++) {
    const age = random.integer(4) * 0.15;
    const wander = own.map((sd) => sd * random.normal());
    for (let shell = 0; shell < shells; shell++) {
      rows.push(scatter.map((sd, i) => -2 - 0.1 * i + slope[i] * age + wander[i] + sd * random.normal()));
      labels.push(bed);
    }
  }
  return { rows, labels, codes: CODES.slice(0, scatter.length) };
}

const indexOf = (seed: number, options: Drawn = {}) => {
  const { rows, labels, codes } = draw(seed, options);
  return fisherIndex(rows, labels, codes);
};

describe('fisherIndex', () => {
  it('weighs amino acids by signal over error variance', () => {
    // slope/scatter²: 400 and 100, so 0.8 and 0.2 for two amino acids of independent error
    const mean = [0, 0];
    for (let seed = 1; seed <= 40; seed++) {
      const index = indexOf(seed, { scatter: [0.05, 0.1], beds: 40 });
      index.shares.forEach((share, i) => {
        mean[i] += share.weight / 40;
      });
    }
    expect(Math.abs(mean[0] - 0.8)).toBeLessThan(0.03);
    expect(mean[0] + mean[1]).toBeCloseTo(1, 10);
  });

  it('gives noise next to no weight', () => {
    const index = indexOf(3, { slope: [1, 1, 0, 0], beds: 30 });
    expect(index.basis).toBe('fisher');
    expect(index.shares[2].weight + index.shares[3].weight).toBeLessThan(0.1);
  });

  it('takes no notice of variance between beds that no other amino acid shares', () => {
    for (let seed = 1; seed <= 10; seed++) {
      const index = indexOf(seed, { slope: [1, 1, 1, 0], own: [0, 0, 0, 0.3], beds: 30 });
      expect(index.shares[3].resolution).toBeGreaterThan(index.shares[0].resolution);
      expect(index.shares[3].weight).toBeLessThan(0.05);
      expect(index.own[3]).toBeGreaterThan(0.03);
    }
  });

  it('lets the best stand alone where no two agree', () => {
    const index = indexOf(2, { slope: [1, 0, 0, 0], own: [0, 0.1, 0.1, 0.1], beds: 40 });
    expect(index.shares.map((share) => share.weight)).toEqual([1, 0, 0, 0]);
  });

  it('is not bent by reworked shells', () => {
    const { rows, labels, codes } = draw(5, { beds: 30 });
    const clean = fisherIndex(rows, labels, codes);
    const spoilt = rows.map((row, at) => (at % 50 === 0 ? row.map((x, i) => x + (i < 2 ? 0.9 : 0.1)) : row));
    const bent = fisherIndex(spoilt, labels, codes);
    clean.shares.forEach((share, i) => {
      expect(Math.abs(bent.shares[i].weight - share.weight)).toBeLessThan(0.05);
    });
  });

  it('does not hang on the order of shells, and goes with that of the amino acids', () => {
    const { rows, labels, codes } = draw(7);
    const index = fisherIndex(rows, labels, codes);
    const back = fisherIndex([...rows].reverse(), [...labels].reverse(), codes);
    const turned = fisherIndex(
      rows.map((row) => [...row].reverse()),
      labels,
      [...codes].reverse(),
    );
    index.shares.forEach((share, i) => {
      expect(back.shares[i].weight).toBeCloseTo(share.weight, 8);
      expect(turned.shares[codes.length - 1 - i].weight).toBeCloseTo(share.weight, 8);
      expect(turned.shares[codes.length - 1 - i].amino_acid).toBe(share.amino_acid);
    });
  });

  it('moves with a shift of one amino acid, as from a standard, without a change of weights', () => {
    const { rows, labels, codes } = draw(8);
    const index = fisherIndex(rows, labels, codes);
    const shifted = fisherIndex(
      rows.map(([first, ...rest]) => [first + 0.3, ...rest]),
      labels,
      codes,
    );
    index.shares.forEach((share, i) => {
      expect(shifted.shares[i].weight).toBeCloseTo(share.weight, 8);
    });
  });

  it('says what stood in where beds or shells are too few', () => {
    expect(indexOf(1, { beds: 2, shells: 1 }).basis).toBe('equal weights');
    expect(indexOf(1, { beds: 3, shells: 6 }).basis).toBe('separate resolutions');
    expect(indexOf(1).basis).toBe('fisher');
  });

  it('never gives NaN, and weights that are not below 0 and sum to 1, whatever comes', () => {
    const value = fc.oneof(fc.double({ min: -3, max: 0, noNaN: true }), fc.constantFrom(-2, -1, Number.NaN));
    const arbitrary = fc.integer({ min: 2, max: 4 }).chain((size) =>
      fc.record({
        size: fc.constant(size),
        duplicate: fc.boolean(),
        rows: fc.array(
          fc.tuple(fc.integer({ min: 0, max: 5 }), fc.array(value, { minLength: size, maxLength: size })),
          {
            maxLength: 30,
          },
        ),
      }),
    );
    fc.assert(
      fc.property(arbitrary, ({ size, duplicate, rows }) => {
        const logs = rows.map(([, row]) => (duplicate ? row.map(() => row[0]) : row));
        const index = fisherIndex(
          logs,
          rows.map(([bed]) => bed),
          CODES.slice(0, size),
        );
        let sum = 0;
        for (const share of index.shares) {
          expect(share.weight).toBeGreaterThanOrEqual(0);
          expect(Number.isFinite(share.resolution)).toBe(true);
          sum += share.weight;
        }
        expect(sum).toBeCloseTo(1, 8);
        for (const row of [
          ...index.within,
          ...index.between,
          ...(index.imputation ? [index.imputation.mean, ...index.imputation.covariance] : []),
        ]) {
          for (const entry of row) expect(Number.isFinite(entry)).toBe(true);
        }
        expect(Number.isFinite(indexResolution(index))).toBe(true);
      }),
      { numRuns: 400, seed: 1 },
    );
  });
});

describe('clockLogRatio', () => {
  it('puts a missing amino acid where the others expect it, so that a gap does not shift the index', () => {
    const { rows, labels, codes } = draw(9, { beds: 40 });
    const index = fisherIndex(rows, labels, codes);
    const clock = {
      name: 'index',
      taxon: 'Invenus',
      fraction: 'THAA' as const,
      amino_acids: codes,
      weights: index.shares.map((share) => share.weight),
      main: true,
    };
    let shift = 0;
    for (const row of rows) {
      const all = Object.fromEntries(codes.map((code, i) => [code, Math.exp(row[i])]));
      const { Glx: _, ...some } = all;
      shift += clockLogRatio(some, clock, index.imputation)! - clockLogRatio(all, clock)!;
    }
    expect(Math.abs(shift / rows.length)).toBeLessThan(0.003);
    expect(clockLogRatio({ Ile: 0.2 }, clock)).toBeNull();
    expect(clockLogRatio({}, clock, index.imputation)).toBeNull();
  });
});

describe('aminoAcidShares', () => {
  it('says who carries the resolution and who adds noise', () => {
    const verdicts = aminoAcidShares(indexOf(4, { slope: [1, 1, 0, 0], beds: 30 }), 'index').map((s) => s.verdict);
    expect(verdicts).toEqual(['carries the resolution', 'carries the resolution', 'adds noise', 'adds noise']);
  });

  it('says that a weak amino acid helps', () => {
    const shares = aminoAcidShares(indexOf(4, { scatter: [0.05, 0.05, 0.13], beds: 40, shells: 8 }), 'index');
    expect(shares[2].verdict).toBe('helps');
    expect(shares[0].verdict).toBe('carries the resolution');
  });
});

describe('indexResolution', () => {
  it('adds up over amino acids of independent error, and falls when one is left out', () => {
    const index = indexOf(6, { beds: 60 });
    const whole = indexResolution(index);
    const sum = index.shares.reduce((total, share) => total + share.resolution, 0);
    expect(Math.abs(whole / sum - 1)).toBeLessThan(0.15);
    for (let i = 0; i < 4; i++) expect(indexResolution(index, i)).toBeLessThan(whole);
  });
});
