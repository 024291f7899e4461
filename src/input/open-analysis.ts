import type { AminoAcid, Analysis } from '../model/index.js';

/** Numbers an amino acid while a row is read. */
export type Numbers = Partial<Record<AminoAcid, number>>;

/** Analyses are built here and are readonly afterwards. */
export type OpenAnalysis = { -readonly [K in keyof Analysis]: Analysis[K] } & {
  ratios: Numbers;
  concentrations: Numbers;
};
