import { clockData } from '../../src/beds/index.js';
import type { AminoAcid, Clock, Shell } from '../../src/model/index.js';
import { createRandom } from '../../src/statistics/index.js';

export const clockOf = (...codes: AminoAcid[]): Clock => ({
  name: `Invenus THAA ${codes.join(' ')}`,
  taxon: 'Invenus',
  fraction: 'THAA',
  amino_acids: codes,
  weights: codes.map(() => 1 / codes.length),
  main: true,
});

/** Shells of beds with a true log ratio an amino acid, 5 % scatter, 6 shells a bed. */
export function shellsOf(beds: Readonly<Record<string, Partial<Record<AminoAcid, number>>>>, seed: number): Shell[] {
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

export const voting = (shells: readonly Shell[], codes: readonly AminoAcid[]) =>
  codes.map((aminoAcid) => ({
    aminoAcid,
    data: clockData({ clock: clockOf(aminoAcid), shells, summaries: [] }),
    spread: 0,
  }));
