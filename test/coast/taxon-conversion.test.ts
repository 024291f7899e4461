import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { combineTaxa } from '../../src/coast/combine-taxa.js';
import { type BedOfTaxon, convertLogRatio, taxonConversion } from '../../src/coast/taxon-conversion.js';
import type { Clock, ClockData } from '../../src/model/index.js';
import { yorkLine } from '../../src/statistics/index.js';

const bed = (key: string, mean: number, se = 0.02, n = 5): BedOfTaxon => ({ key, n, mean, se });
const X = [-2.1, -1.8, -1.5, -1.2, -0.9, -0.6];
const NOISE = [0.012, -0.008, 0.005, -0.014, 0.009, -0.002];
const reference = X.map((x, i) => bed(`S/${i}`, 0.1 + 0.9 * x + NOISE[i]));
const other = X.map((x, i) => bed(`S/${i}`, x));

describe('taxonConversion', () => {
  it('is the York line of the pairs, and its error grows away from them', () => {
    const { line, refusal, pairs } = taxonConversion(reference, other);
    const w = X.map(() => 1 / 0.02 ** 2);
    const york = yorkLine(
      X,
      reference.map((b) => b.mean),
      w,
      w,
    );
    expect(refusal).toBeNull();
    expect(pairs).toHaveLength(6);
    expect(line!.slope).toBeCloseTo(york.slope, 10);
    expect(line!.intercept).toBeCloseTo(york.intercept, 10);
    expect(line!.slopeFixed).toBe(false);
    expect(line!.extra).toBe(0);
    const near = convertLogRatio(line!, -1.35, 0.02);
    const far = convertLogRatio(line!, -3.5, 0.02);
    expect(near.se).toBeGreaterThan(0.02 * line!.slope);
    expect(far.se).toBeGreaterThan(near.se);
    expect(near.mean).toBeCloseTo(york.intercept - 1.35 * york.slope, 10);
  });

  it('fixes the slope at 1 under five pairs, with a doubt that grows away from them', () => {
    const { line } = taxonConversion(reference.slice(0, 4), other);
    expect(line!.slopeFixed).toBe(true);
    expect(line!.slope).toBe(1);
    const middle = (X[0] + X[1] + X[2] + X[3]) / 4;
    const at = (x: number) => convertLogRatio(line!, x, 0).se;
    expect(at(middle + 1)).toBeGreaterThan(Math.hypot(at(middle), 0.09));
    expect(at(middle + 1)).toBeLessThan(0.15);
  });

  it('carries the scatter of the pairs beyond their errors', () => {
    const rough = reference.map((b, i) => ({ ...b, mean: b.mean + (i % 2 === 0 ? 0.12 : -0.12) }));
    const { line } = taxonConversion(rough, other);
    expect(line!.chiSquared).toBeGreaterThan(line!.df);
    expect(line!.extra).toBeGreaterThan(0.05);
    expect(convertLogRatio(line!, -1.35, 0.02).se).toBeGreaterThan(line!.extra);
  });

  it.each<[string, BedOfTaxon[], BedOfTaxon[], RegExp]>([
    ['no pair', reference, X.map((x, i) => bed(`T/${i}`, x)), /no bed holds both taxa/],
    ['one pair', reference.slice(0, 1), other, /only one bed holds both/],
    ['pairs of one ratio', reference.slice(0, 2), [...other, bed('T/9', 1)], /span 10 %.*a quarter is needed/],
    ['a falling line', reference.map((b, i) => bed(b.key, -0.5 * X[i])), other, /not above 0/],
    ['a slope unknown by half', reference.map((b) => bed(b.key, b.mean, 1.2)), other, /no better than to half/],
  ])('refuses %s', (_, ref, own, reason) => {
    expect(taxonConversion(ref, own).refusal).toMatch(reason);
  });

  it('refuses few pairs of different amino acids, which no slope of 1 ties', () => {
    expect(taxonConversion(reference.slice(0, 4), other, false).refusal).toMatch(/different amino acids/);
    expect(taxonConversion(reference, other, false).refusal).toBeNull();
  });

  it('moves with a factor on either taxon and with nothing else', () => {
    fc.assert(
      fc.property(fc.double({ min: -1, max: 1, noNaN: true }), fc.double({ min: -1, max: 1, noNaN: true }), (a, b) => {
        const plain = taxonConversion(reference, other).line!;
        const shifted = taxonConversion(
          reference.map((one) => ({ ...one, mean: one.mean + a })),
          other.map((one) => ({ ...one, mean: one.mean + b })),
        ).line!;
        const before = convertLogRatio(plain, -1, 0.03);
        const after = convertLogRatio(shifted, -1 + b, 0.03);
        expect(after.mean - a).toBeCloseTo(before.mean, 8);
        expect(after.se).toBeCloseTo(before.se, 8);
      }),
      { seed: 1, numRuns: 30 },
    );
  });
});

describe('combineTaxa', () => {
  const clock: Clock = { name: 'r', taxon: 'R', fraction: 'THAA', amino_acids: ['Ile'], weights: [1], main: true };
  const data = (taxon: string, beds: readonly BedOfTaxon[]): ClockData => ({
    clock: { ...clock, taxon },
    shells: [],
    beds: beds.map((one) => ({ ...one, section: 'S', bed: one.key.slice(2), shells: [], gradient: 0 })),
    scatter: { s: 0.05, df: 20, assumed: false },
    slope: 0,
  });

  it('counts a bed that holds both once, between its two means and surer than either', () => {
    const alone = bed('S/x', -1.35);
    const conversion = taxonConversion(reference, [...other, alone]);
    const combined = combineTaxa(clock, data('R', reference), [{ data: data('T', [...other, alone]), conversion }]);
    expect(combined.data.beds.map((one) => one.key)).toEqual([...reference.map((one) => one.key), 'S/x']);
    expect(combined.taxa[0]).toEqual(['R', 'T']);
    expect(combined.taxa[6]).toEqual(['T']);
    reference.forEach((own, i) => {
      const both = combined.data.beds[i];
      const moved = convertLogRatio(conversion.line!, X[i], 0.02);
      expect(both.n).toBe(10);
      expect(both.se).toBeLessThan(own.se);
      expect(both.se).toBeGreaterThan(1 / Math.sqrt(1 / own.se ** 2 + 1 / moved.se ** 2));
      const [low, high] = [own.mean, moved.mean].sort((a, b) => a - b);
      expect(both.mean).toBeGreaterThanOrEqual(low - 1e-12);
      expect(both.mean).toBeLessThanOrEqual(high + 1e-12);
    });
  });
});
