import type { AminoAcid, Shell } from '../../src/model/index.js';
import type { Random } from '../../src/statistics/index.js';

/** A shell with what a test cares for; the rest is filled in. */
export function shell(given: Partial<Shell> = {}): Shell {
  return {
    section: 'Cove',
    bed: '1',
    taxon: 'Invenus',
    fraction: 'THAA',
    shell: 'a',
    lab_ids: [],
    labs: [],
    methods: [],
    preparations: 1,
    ratios: {},
    replicates: [],
    concentrations: {},
    serine_ratio: null,
    file: 'shells.csv',
    line: 2,
    ...given,
  };
}

/** Four amino acids of clean shells in zones from young to old, the fast ones slowing down as they near equilibrium. */
export function cleanShells(random: Random, count: number, zones = 4, scatter = 0.06): Shell[] {
  const rates: [AminoAcid, number][] = [
    ['Asx', 2.2],
    ['Glx', 1],
    ['Ala', 1.4],
    ['Val', 0.6],
  ];
  return Array.from({ length: count }, (_, i) => {
    const extent = 0.12 * 1.45 ** (i % zones);
    const shared = random.normal();
    const ratios = Object.fromEntries(
      rates.map(([code, rate]) => {
        const error = scatter * (0.6 * shared + 0.8 * random.normal());
        return [code, Math.tanh(rate * extent) * Math.exp(error * (1 - Math.tanh(rate * extent) ** 2))];
      }),
    );
    return shell({ bed: String(i % zones), shell: String(i), ratios, line: i + 2 });
  });
}
