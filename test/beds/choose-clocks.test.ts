import { describe, expect, it } from 'vitest';
import { chooseClocks, SHARE_FOR_INDEX } from '../../src/beds/choose-clocks.js';
import type { AminoAcid, Fraction, PublishedSummary, Shell } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';

const FREE = { taxon: null, fraction: null, amino_acid: null };

/** Shells of five beds; every amino acid is measured on its share of them, the first ones. */
function shells(
  shares: Partial<Record<AminoAcid, number>>,
  { taxon = 'Invenus', fraction = 'THAA' as Fraction, number = 20 } = {},
): Shell[] {
  const random = createRandom(1);
  return Array.from({ length: number }, (_, at) => ({
    section: 'S1',
    bed: String(at % 5),
    taxon,
    fraction,
    shell: String(at),
    lab_ids: [],
    labs: [],
    methods: [],
    preparations: 1,
    ratios: Object.fromEntries(
      Object.entries(shares).flatMap(([code, share]) =>
        at < share * number ? [[code, Math.exp(-2 + 0.1 * (at % 5) + 0.05 * random.normal())]] : [],
      ),
    ),
    replicates: [],
    concentrations: {},
    serine_ratio: null,
    file: 'shells.csv',
    line: at + 2,
  }));
}

const summary = (amino_acid: AminoAcid, bed: string, n: number): PublishedSummary =>
  ({ section: 'S2', bed, taxon: 'Invenus', fraction: 'THAA', amino_acid, mean: 0.3, sd: 0.02, n }) as PublishedSummary;

describe('chooseClocks', () => {
  it('makes the index of the amino acids measured on at least 80 % of the shells the main clock', () => {
    expect(SHARE_FOR_INDEX).toBe(0.8);
    const [set] = chooseClocks(shells({ Asx: 1, Glx: 0.8, Ile: 0.75 }), [], FREE);
    expect(set.main).toMatchObject({ name: 'Invenus THAA index', amino_acids: ['Asx', 'Glx'], main: true });
    expect(set.main.weights).toEqual(set.index!.shares.map(({ weight }) => weight));
    // each amino acid is zoned by itself too, those outside the index as well
    expect(set.singles.map(({ amino_acids, main }) => [amino_acids.join(), main])).toEqual(
      expect.arrayContaining([
        ['Asx', false],
        ['Glx', false],
        ['Ile', false],
      ]),
    );
    expect(set.singles).toHaveLength(3);
  });

  it('takes the single one there is, and does not repeat it', () => {
    const [set] = chooseClocks(shells({ Ile: 1 }), [], FREE);
    expect(set).toEqual({
      main: {
        name: 'Invenus THAA Ile',
        taxon: 'Invenus',
        fraction: 'THAA',
        amino_acids: ['Ile'],
        weights: [1],
        main: true,
      },
      index: null,
      singles: [],
    });
  });

  it('takes the one measured most often where none reaches 80 %', () => {
    const [set] = chooseClocks(shells({ Asx: 0.5, Glx: 0.7, Ile: 0.6 }), [], FREE);
    expect(set.main.amino_acids).toEqual(['Glx']);
    expect(set.singles.map(({ amino_acids }) => amino_acids[0]).sort()).toEqual(['Asx', 'Ile']);
  });

  it('takes what is asked for, in part where not all of it was measured, and no clock where none was', () => {
    const measured = shells({ Asx: 1, Glx: 1, Ile: 0.3 });
    const main = (amino_acid: 'all' | readonly AminoAcid[]) =>
      chooseClocks(measured, [], { ...FREE, amino_acid: amino_acid as unknown as typeof FREE.amino_acid })[0]?.main
        .amino_acids;
    expect(main(['Glx'])).toEqual(['Glx']);
    expect(main(['Ile', 'Val'])).toEqual(['Ile']);
    expect([...main('all')!].sort()).toEqual(['Asx', 'Glx', 'Ile']);
    expect(main(['Val'])).toBeUndefined();
  });

  it('never mixes taxa nor fractions, keeps their order, and leaves out those not asked for', () => {
    const all = [
      ...shells({ Ile: 1 }, { taxon: 'Altera' }),
      ...shells({ Ile: 1 }),
      ...shells({ Ile: 1 }, { fraction: 'FAA' }),
    ];
    const names = (options: Partial<Parameters<typeof chooseClocks>[2]>) =>
      chooseClocks(all, [], { ...FREE, ...options }).map(({ main }) => main.name);
    expect(names({})).toEqual(['Altera THAA Ile', 'Invenus THAA Ile', 'Invenus FAA Ile']);
    expect(names({ taxon: 'Invenus' })).toEqual(['Invenus THAA Ile', 'Invenus FAA Ile']);
    expect(names({ fraction: 'FAA' })).toEqual(['Invenus FAA Ile']);
    expect(names({ taxon: 'Altera', fraction: 'FAA' })).toEqual([]);
  });

  it('counts published shells, and makes no index where no bed has all its amino acids', () => {
    // 40 published shells with Ile alone outweigh 20 with Asx
    const [set] = chooseClocks(shells({ Asx: 1 }), [summary('Ile', 'a', 20), summary('Ile', 'b', 20)], FREE);
    expect(set.main.amino_acids).toEqual(['Ile']);
    // asked for both, but they never stand together: the one measured more often
    const both = chooseClocks(shells({ Asx: 1 }), [summary('Ile', 'a', 5)], {
      ...FREE,
      amino_acid: ['Asx', 'Ile'] as unknown as typeof FREE.amino_acid,
    });
    expect(both[0].main.amino_acids).toEqual(['Asx']);
    expect(both[0].index).toBeNull();
  });
});
