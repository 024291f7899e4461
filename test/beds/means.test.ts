import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { averageAnalyses, clockData, logSummary, pooledScatter } from '../../src/beds/index.js';
import type { AminoAcid, Analysis, Clock } from '../../src/model/index.js';

const row = (given: Partial<Analysis>): Analysis => ({
  section: 'S1',
  bed: 'B1',
  taxon: 'Invenus',
  fraction: 'THAA',
  shell: '1',
  preparation: null,
  injection: null,
  lab_id: null,
  lab: null,
  method: null,
  ratios: {},
  concentrations: {},
  serine_ratio: null,
  summary: null,
  file: 'shells.csv',
  line: 2,
  ...given,
});

const clock = (...codes: AminoAcid[]): Clock => ({
  name: 'clock',
  taxon: 'Invenus',
  fraction: 'THAA',
  amino_acids: codes,
  weights: codes.map(() => 1 / codes.length),
  main: true,
});

describe('averageAnalyses', () => {
  it('averages injections to preparations before preparations to the shell', () => {
    const { shells } = averageAnalyses([
      row({ preparation: 'a', injection: '1', ratios: { Ile: 0.1 }, lab_id: 'L1' }),
      row({ preparation: 'a', injection: '2', ratios: { Ile: 0.2 }, lab_id: 'L1' }),
      row({ preparation: 'b', injection: '1', ratios: { Ile: 0.3 }, lab_id: 'L2' }),
    ]);
    expect(shells).toHaveLength(1);
    // (0.15 + 0.3)/2, not the mean 0.2 of the three rows
    expect(shells[0].ratios.Ile).toBeCloseTo(0.225, 12);
    expect(shells[0].preparations).toBe(2);
    expect(shells[0].lab_ids).toEqual(['L1', 'L2']);
  });

  it('takes rows with neither preparation nor injection as preparations, and long rows of one as one', () => {
    expect(averageAnalyses([row({ ratios: { Ile: 0.1 } }), row({ ratios: { Ile: 0.2 } })]).shells[0].preparations).toBe(
      2,
    );
    const long = averageAnalyses([row({ ratios: { Ile: 0.1 } }), row({ ratios: { Val: 0.05 } })]).shells[0];
    expect(long.preparations).toBe(1);
    expect(long.ratios).toEqual({ Ile: 0.1, Val: 0.05 });
  });

  it('knows a shell by section, bed, taxon, fraction and number together', () => {
    const { shells } = averageAnalyses([
      row({ ratios: { Ile: 0.1 } }),
      row({ bed: 'B2', ratios: { Ile: 0.2 } }),
      row({ taxon: 'Altera', ratios: { Ile: 0.3 } }),
      row({ fraction: 'FAA', ratios: { Ile: 0.4 } }),
      row({ shell: '2', ratios: { Ile: 0.5 } }),
    ]);
    expect(shells.map((shell) => shell.ratios.Ile)).toEqual([0.1, 0.2, 0.3, 0.4, 0.5]);
  });

  it('makes one summary an amino acid, and no shell, of a published row', () => {
    const { shells, summaries } = averageAnalyses([
      row({ shell: '', ratios: { Ile: 0.141, Val: 0.1 }, summary: { n: 55, sd: { Ile: 0.026 } } }),
    ]);
    expect(shells).toHaveLength(0);
    expect(summaries.map(({ amino_acid, mean, sd, n }) => ({ amino_acid, mean, sd, n }))).toEqual([
      { amino_acid: 'Val', mean: 0.1, sd: null, n: 55 },
      { amino_acid: 'Ile', mean: 0.141, sd: 0.026, n: 55 },
    ]);
  });

  it('works L-Ser/L-Asp out of concentrations and ratios where the table does not give it', () => {
    const made = row({ ratios: { Ser: 0.4, Asx: 0.25 }, concentrations: { Ser: 2100, Asx: 6000 } });
    // L is 1/(1 + D/L) of the whole: 2100/1.4 over 6000/1.25
    expect(averageAnalyses([made]).shells[0].serine_ratio).toBeCloseTo(1500 / 4800, 12);
    expect(averageAnalyses([{ ...made, serine_ratio: 0.9 }]).shells[0].serine_ratio).toBe(0.9);
    expect(averageAnalyses([row({ ratios: { Ser: 0.4 } })]).shells[0].serine_ratio).toBeNull();
  });
});

describe('pooledScatter', () => {
  it('pools sums of squares by degrees of freedom, published ones too', () => {
    // 0.02 + 0.005 from beds with 2 + 1 degrees of freedom, 0.1² × 4 from a published bed of five
    const scatter = pooledScatter(
      [[-1.1, -1, -0.9], [-2.05, -1.95], [-3]],
      [
        { sd: 0.1, n: 5 },
        { sd: 9, n: 1 },
      ],
    );
    expect(scatter).toMatchObject({ df: 7, assumed: false });
    expect(scatter.s).toBeCloseTo(Math.sqrt((0.02 + 0.005 + 0.04) / 7), 12);
  });

  it('assumes 0.07 with fewer than 4 degrees of freedom, and says so', () => {
    expect(pooledScatter([[-1, -2, -3, -4]])).toEqual({ s: 0.07, df: 3, assumed: true });
    expect(pooledScatter([])).toEqual({ s: 0.07, df: 0, assumed: true });
  });

  it('takes no notice of where beds lie', () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { maxLength: 6 }), { maxLength: 6 }),
        fc.double({ min: -5, max: 5, noNaN: true }),
        (beds, shift) => {
          const moved = beds.map((bed, at) => bed.map((x) => x + shift * at));
          expect(pooledScatter(moved).s).toBeCloseTo(pooledScatter(beds).s, 8);
        },
      ),
      { numRuns: 100, seed: 1 },
    );
  });
});

describe('logSummary', () => {
  it('gives the log scale of log-normal shells', () => {
    const { mean, sd } = logSummary(0.141, 0.026);
    expect(Math.exp(mean + sd! ** 2 / 2)).toBeCloseTo(0.141, 12);
    expect(Math.exp(mean + sd! ** 2 / 2) * Math.sqrt(Math.expm1(sd! ** 2))).toBeCloseTo(0.026, 12);
  });

  it('leaves the spread open where none was published, and refuses a mean that is no ratio', () => {
    expect(logSummary(0.2, null)).toEqual({ mean: Math.log(0.2), sd: null });
    expect(() => logSummary(0, 0.1)).toThrow(/above 0/);
    expect(() => logSummary(Number.NaN, 0.1)).toThrow(RangeError);
  });
});

describe('clockData', () => {
  const ratios = { B1: [0.1, 0.11, 0.12], B2: [0.2, 0.21, 0.19, 0.22] };
  const { shells, summaries } = averageAnalyses(
    Object.entries(ratios).flatMap(([bed, values]) =>
      values.map((Ile, at) => row({ bed, shell: String(at), ratios: { Ile } })),
    ),
  );
  const mean = (values: readonly number[]): number =>
    values.reduce((sum, value) => sum + Math.log(value), 0) / values.length;

  it('gives the mean log ratio of each bed and s over the root of its shells', () => {
    const data = clockData({ clock: clock('Ile'), shells, summaries });
    expect(data.beds.map((bed) => bed.key)).toEqual(['S1/B1', 'S1/B2']);
    expect(data.beds[0].mean).toBeCloseTo(mean(ratios.B1), 12);
    expect(data.scatter.df).toBe(5);
    expect(data.beds[1].se).toBeCloseTo(data.scatter.s / 2, 12);
  });

  it('leaves shells set aside out of means and scatter, and keeps them in the lists', () => {
    const data = clockData({ clock: clock('Ile'), shells, summaries, setAside: new Set([0]) });
    expect(data.shells).toHaveLength(7);
    expect(data.shells[0].setAside).toBe(true);
    expect(data.beds[0]).toMatchObject({ n: 2, shells: [0, 1, 2] });
    expect(data.beds[0].mean).toBeCloseTo(mean([0.11, 0.12]), 12);
    expect(data.scatter.df).toBe(4);
  });

  it('gives a bed whose every shell is set aside no mean', () => {
    const data = clockData({ clock: clock('Ile'), shells, summaries, setAside: new Set([0, 1, 2]) });
    expect(data.beds[0].n).toBe(0);
    expect(data.beds[0].mean).toBeNaN();
  });

  it('takes the slope along a gradient out of bed means', () => {
    const values = new Map([
      ['S1/B1', -2],
      ['S1/B2', 2],
    ]);
    const data = clockData({ clock: clock('Ile'), shells, summaries, gradient: { slope: 0.05, values } });
    expect(data.beds[0].mean).toBeCloseTo(mean(ratios.B1) + 0.1, 12);
    expect(data.beds[1].mean).toBeCloseTo(mean(ratios.B2) - 0.1, 12);
    expect(data.slope).toBe(0.05);
  });

  it('weighs the shells of a published summary with those measured, of its own taxon only', () => {
    const published = averageAnalyses([
      row({ shell: '', ratios: { Ile: 0.13 }, summary: { n: 6, sd: {} } }),
      row({ shell: '', taxon: 'Altera', ratios: { Ile: 0.9 }, summary: { n: 50, sd: {} } }),
    ]).summaries;
    const data = clockData({ clock: clock('Ile'), shells, summaries: published });
    expect(data.beds[0].n).toBe(9);
    const measured = mean(ratios.B1);
    expect(data.beds[0].mean).toBeGreaterThan(measured);
    expect(data.beds[0].mean).toBeLessThan(Math.log(0.13));
  });
});
