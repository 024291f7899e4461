import { describe, expect, it } from 'vitest';
import { clockData } from '../../src/beds/index.js';
import type { AminoAcid, Clock, Shell } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';
import { aminoAcidVotes } from '../../src/zones/index.js';

const clockOf = (...codes: AminoAcid[]): Clock => ({
  name: `Invenus THAA ${codes.join(' ')}`,
  taxon: 'Invenus',
  fraction: 'THAA',
  amino_acids: codes,
  weights: codes.map(() => 1 / codes.length),
  main: true,
});

/** Shells of beds with a true log ratio an amino acid, 5 % scatter, 6 shells a bed. */
function shellsOf(beds: Readonly<Record<string, Partial<Record<AminoAcid, number>>>>, seed: number): Shell[] {
  const random = createRandom(seed);
  return Object.entries(beds).flatMap(([bed, logs]) =>
    Array.from({ length: 6 }, (_, at): Shell => {
      const ratios = Object.fromEntries(
        Object.entries(logs).map(([code, log]) => [code, Math.exp(log + 0.05 * random.normal())]),
      );
      return {
        section: 'S1',
        bed,
        taxon: 'Invenus',
        fraction: 'THAA',
        shell: String(at),
        lab_ids: [],
        labs: [],
        methods: [],
        preparations: 1,
        ratios,
        replicates: [],
        concentrations: {},
        serine_ratio: null,
        file: 'shells.csv',
        line: 2,
      };
    }),
  );
}

const voting = (shells: readonly Shell[], codes: readonly AminoAcid[]) =>
  codes.map((aminoAcid) => ({
    aminoAcid,
    data: clockData({ clock: clockOf(aminoAcid), shells, summaries: [] }),
    spread: 0,
  }));

const CODES = ['Ile', 'Val', 'Glx'] as const;

describe('aminoAcidVotes', () => {
  it('stays rare where beds are of one age: under 5 % of coasts show a pair', () => {
    const same = Object.fromEntries(
      Array.from({ length: 10 }, (_, at) => [`B${at}`, { Ile: -2, Val: -2.2, Glx: -1.9 }]),
    );
    let coasts = 0;
    for (let seed = 1; seed <= 100; seed++) {
      const found = aminoAcidVotes(voting(shellsOf(same, seed), CODES), { clock: 'index', alpha: 0.05 });
      if (found.length > 0) coasts++;
    }
    expect(coasts).toBeLessThanOrEqual(5);
  });
});
