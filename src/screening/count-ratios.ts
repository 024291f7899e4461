import { AMINO_ACIDS, type AminoAcid, type ByAminoAcid } from '../model/index.js';

/**
 * On how many shells each amino acid was measured.
 * @param shells Any that have ratios.
 * @example
 * countRatios([{ ratios: { Ile: 0.2 } }, { ratios: { Ile: 0.3, Asx: 0.5 } }]).get('Ile') // => 2
 */
export function countRatios(shells: Iterable<{ readonly ratios: ByAminoAcid }>): Map<AminoAcid, number> {
  // a shell has few of the ten, so it is asked for those it has
  const counts: Partial<Record<AminoAcid, number>> = {};
  for (const { ratios } of shells) {
    for (const code in ratios) {
      if (ratios[code as AminoAcid] !== undefined) counts[code as AminoAcid] = (counts[code as AminoAcid] ?? 0) + 1;
    }
  }
  return new Map(AMINO_ACIDS.map((code) => [code, counts[code] ?? 0]));
}
