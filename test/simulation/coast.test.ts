import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CoastOptions } from './coast.js';
import { simulateCoast, writeCoastCsv } from './coast.js';

const FOUR: CoastOptions['aminoAcids'] = [
  { code: 'Ile' },
  { code: 'Asx', slope: 0.6 },
  { code: 'Glx', slope: 0.8 },
  { code: 'Val' },
];

const mean = (values: readonly number[]) => values.reduce((sum, v) => sum + v, 0) / values.length;
const sd = (values: readonly number[]) =>
  Math.sqrt(values.reduce((sum, v) => sum + (v - mean(values)) ** 2, 0) / (values.length - 1));

const arbitraryCoast = fc.record({
  seed: fc.integer({ min: 1, max: 1e6 }),
  sections: fc.integer({ min: 2, max: 12 }),
  beds: fc.integer({ min: 24, max: 40 }),
  zones: fc.constantFrom<number | 'continuum'>(2, 3, 4, 'continuum'),
  spread: fc.constantFrom(0, 0.03),
  sectionEffect: fc.constantFrom(0, 0.05),
});

describe('simulateCoast', () => {
  it('gives the same coast for the same options and another for another seed', () => {
    expect(simulateCoast({ seed: 7 }).survey).toEqual(simulateCoast({ seed: 7 }).survey);
    expect(simulateCoast({ seed: 7 }).survey).not.toEqual(simulateCoast({ seed: 8 }).survey);
  });

  it('stacks beds in superposition, logs them so, and ranks the oldest first', () => {
    fc.assert(
      fc.property(arbitraryCoast, (options) => {
        const { survey, truth } = simulateCoast(options);
        expect(survey.beds).toHaveLength(options.beds);
        for (const section of new Set(survey.beds.map((bed) => bed.section))) {
          const upwards = survey.beds
            .filter((bed) => bed.section === section)
            .sort((a, b) => a.place!.value - b.place!.value)
            .map((bed) => truth.beds.get(`${section}/${bed.bed}`)!);
          for (let i = 1; i < upwards.length; i++) {
            expect(upwards[i].extent).toBeLessThanOrEqual(upwards[i - 1].extent);
            expect(upwards[i].rankLow).toBeGreaterThan(upwards[i - 1].rankLow);
          }
        }
        for (const bed of truth.beds.values()) expect(bed.rankHigh).toBeGreaterThanOrEqual(bed.rankLow);
        if (options.zones === 'continuum') {
          const ranks = [...truth.beds.values()].sort((a, b) => b.extent - a.extent).map((bed) => bed.rankLow);
          expect(ranks).toEqual(ranks.map((_, i) => i + 1));
        }
      }),
      { numRuns: 60, seed: 1 },
    );
  });

  it('scatters shells about the true log ratio as asked', () => {
    const { survey, truth } = simulateCoast({ beds: 400, sections: 100, shells: [8, 8], scatter: 0.05 });
    const errors = survey.analyses.map((a) => Math.log(a.ratios.Ile!) - truth.beds.get(`${a.section}/${a.bed}`)!.x);
    // 3200 shells: the mean's standard error is 0.0009, that of the standard deviation 0.0006
    expect(Math.abs(mean(errors))).toBeLessThan(0.004);
    expect(Math.abs(sd(errors) - 0.05)).toBeLessThan(0.003);
  });

  it('correlates the errors of the amino acids of one shell as asked', () => {
    const { survey, truth } = simulateCoast({
      beds: 400,
      sections: 100,
      shells: [8, 8],
      correlation: 0.6,
      aminoAcids: [{ code: 'Ile' }, { code: 'Val' }],
    });
    const a = survey.analyses.map((row) => Math.log(row.ratios.Ile!) - truth.beds.get(`${row.section}/${row.bed}`)!.x);
    const b = survey.analyses.map(
      (row) => Math.log(row.ratios.Val! / 0.09) - truth.beds.get(`${row.section}/${row.bed}`)!.x + Math.log(0.12),
    );
    const r = mean(a.map((v, i) => (v - mean(a)) * (b[i] - mean(b)))) / (sd(a) * sd(b));
    expect(Math.abs(r - 0.6)).toBeLessThan(0.05);
  });

  it('swaps the logged places of neighbours of different age, and nothing else', () => {
    const straight = simulateCoast({ seed: 3 });
    const { survey, truth } = simulateCoast({ seed: 3, upsideDown: 3 });
    expect(truth.upsideDown).toHaveLength(3);
    expect(survey.analyses).toEqual(straight.survey.analyses);
    const moved = survey.beds.filter((bed, i) => bed.place!.value !== straight.survey.beds[i].place!.value);
    expect(moved).toHaveLength(6);
    const place = (key: string) => survey.beds.find((bed) => `${bed.section}/${bed.bed}` === key)!.place!.value;
    for (const { lower, upper, difference } of truth.upsideDown) {
      expect(place(upper) - place(lower)).toBe(1);
      expect(truth.beds.get(upper)!.extent).toBeGreaterThan(truth.beds.get(lower)!.extent);
      expect(difference).toBeGreaterThan(0.25);
    }
  });

  it('adds odd shells, one a bed at most, and leaves every clean shell as it was', () => {
    const odd = { reworked: 2, intruded: 2, contaminated: 2, altered: 2 };
    const clean = simulateCoast({ seed: 5, aminoAcids: FOUR });
    const spoilt = simulateCoast({ seed: 5, aminoAcids: FOUR, odd });
    const kinds = [...spoilt.truth.shells.values()].filter((shell) => shell.kind !== 'clean');
    expect(kinds).toHaveLength(8);
    expect(new Set(kinds.map((shell) => shell.bed)).size).toBe(8);
    spoilt.survey.analyses.forEach((row, i) => {
      const before = clean.survey.analyses[i];
      const shell = spoilt.truth.shells.get(`${row.section}/${row.bed}/${row.shell}`)!;
      const shift = Math.log(row.ratios.Ile! / before.ratios.Ile!);
      if (shell.kind === 'clean') expect(row).toEqual(before);
      if (shell.kind === 'reworked') expect(shift).toBeGreaterThan(0.25);
      if (shell.kind === 'intruded') expect(shift).toBeLessThan(-0.25);
      if (shell.kind === 'contaminated') expect(row.serine_ratio).toBeGreaterThan(0.8);
      else expect(row.serine_ratio).toBeLessThanOrEqual(0.6);
    });
  });

  it('shifts all shells along the gradient, about the mean of the beds', () => {
    const flat = simulateCoast({ seed: 2, gradient: { slope: 0 } });
    const warm = simulateCoast({ seed: 2, gradient: { slope: 0.06 } });
    const values = warm.survey.beds.map((bed) => bed.cmat_c!);
    expect(Math.max(...values) - Math.min(...values)).toBeGreaterThan(6);
    warm.survey.analyses.forEach((row, i) => {
      const bed = warm.survey.beds.find((b) => b.section === row.section && b.bed === row.bed)!;
      const shift = Math.log(row.ratios.Ile! / flat.survey.analyses[i].ratios.Ile!);
      expect(shift).toBeCloseTo(0.06 * (bed.cmat_c! - mean(values)), 10);
    });
  });

  it('works L-Ser/L-Asp into the concentrations when asked', () => {
    const as = (serine: 'ratio' | 'concentrations') =>
      simulateCoast({ seed: 4, aminoAcids: FOUR, serine, odd: { contaminated: 3 } }).survey.analyses;
    const given = as('ratio');
    as('concentrations').forEach((row, i) => {
      const lSerine = row.concentrations.Ser! / (1 + row.ratios.Ser!);
      const lAspartic = row.concentrations.Asx! / (1 + row.ratios.Asx!);
      expect(lSerine / lAspartic).toBeCloseTo(given[i].serine_ratio!, 10);
    });
  });

  it('measures a second taxon on the beds asked for', () => {
    const { survey } = simulateCoast({ secondTaxon: { offset: 0.2, slope: 1.1, paired: 6, alone: 4 } });
    const beds = (taxon: string) =>
      new Set(survey.analyses.filter((a) => a.taxon === taxon).map((a) => `${a.section}/${a.bed}`));
    expect(beds('Altera').size).toBe(10);
    expect(beds('Invenus').size).toBe(26);
  });

  it('refuses what there is no room for', () => {
    expect(() => simulateCoast({ zones: 1, odd: { reworked: 1 } })).toThrow(/no bed left for 1 reworked/);
    expect(() => simulateCoast({ zones: 1, upsideDown: 1 })).toThrow(/upside down/);
  });

  it('writes tables with a row a shell and a row a bed', () => {
    const coast = simulateCoast({ aminoAcids: FOUR });
    const { shells, beds } = writeCoastCsv(coast);
    expect(shells.trimEnd().split('\n')).toHaveLength(coast.survey.analyses.length + 1);
    expect(beds.trimEnd().split('\n')).toHaveLength(31);
    expect(shells.split('\n')[0]).toBe(
      'section,bed,taxon,shell,preparation,lab_id,D/L Ile,D/L Asx,D/L Glx,D/L Val,[Ile],[Asx],[Glx],[Val],L-Ser/L-Asp',
    );
  });
});
