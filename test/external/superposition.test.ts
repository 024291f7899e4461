import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import { checkRelations, checkSections, ownBedResiduals } from '../../src/superposition/index.js';

describe('published values behind superposition', () => {
  // Mercenaria, A/I, mean ± sd between shells, n: Mirecki, PhD thesis, University of Delaware, handle/19716/13230,
  // seen.
  const published = [
    { key: 'Gomez Pit/IIa', mean: 0.141, sd: 0.026, n: 55 },
    { key: 'Gomez Pit/IIc', mean: 0.335, sd: 0.028, n: 19 },
    { key: 'Gomez Pit/IId', mean: 0.471, sd: 0.038, n: 9 },
    { key: 'Norris Bridge/IId', mean: 0.473, sd: 0.02, n: 5 },
  ];
  const beds = published.map(({ key, mean, sd, n }) => ({
    key,
    section: key.split('/')[0],
    n,
    mean: Math.log(mean),
    se: sd / mean / Math.sqrt(n),
  }));

  it('every superposition relation of Gomez Pit agrees, and both IId beds are of one age', () => {
    const base = { basis: 'superposition', certainty: 'certain' } as const;
    const checks = checkRelations(
      [
        { ...base, lower: 'Gomez Pit/IIc', upper: 'Gomez Pit/IIa', kind: 'older' },
        { ...base, lower: 'Gomez Pit/IId', upper: 'Gomez Pit/IIc', kind: 'older' },
        { ...base, lower: 'Gomez Pit/IId', upper: 'Gomez Pit/IIa', kind: 'older' },
        { ...base, lower: 'Gomez Pit/IId', upper: 'Norris Bridge/IId', kind: 'same' },
      ],
      beds,
      { df: 84 },
    );
    expect(checks.map(({ verdict }) => verdict)).toEqual(['agrees', 'agrees', 'agrees', 'agrees']);
  });

  it('the section is consistent as logged and inconsistent upside down', () => {
    const pit = beds.slice(0, 3).map(({ mean, se }, depth) => ({ rank: -depth, mean, se }));
    const turned = pit.map((bed) => ({ ...bed, rank: -bed.rank }));
    const checks = checkSections(
      [
        { section: 'as logged', beds: pit },
        { section: 'upside down', beds: turned },
      ],
      createRandom(1),
      { df: 80 },
    );
    expect(checks.map(({ verdict, p_order }) => [verdict, p_order === 1])).toEqual([
      ['consistent', true],
      ['inconsistent', false],
    ]);
  });

  it('the mass-spectrometer outlier stands apart from its own group', () => {
    // 199.31 … 245.57: NIST/SEMATECH e-Handbook 1.3.5.17.1, from memory; 245.57 is the outlier of Grubbs' test there.
    const values = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57];
    const { shells } = ownBedResiduals(values.map((value) => ({ bed: 0, x: Math.log(value) })));
    expect(shells.map(({ odd }) => odd)).toEqual([false, false, false, false, false, false, false, true]);
    // R: x <- log(c(199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57)); x[8] - mean(x[1:7]) = 0.201074608
    // (computed)
    expect(shells[7].residual).toBeCloseTo(0.201074608, 8);
  });
});
