import type { AminoAcid, ByAminoAcid, Fraction } from './amino-acid.js';

/** One specimen in one fraction: injections averaged to preparations, preparations to the shell, on the D/L scale. */
export interface Shell {
  readonly section: string;
  readonly bed: string;
  readonly taxon: string;
  readonly fraction: Fraction;
  readonly shell: string;
  /** All lab_id of its rows, without repeats, in order of appearance. */
  readonly lab_ids: readonly string[];
  readonly labs: readonly string[];
  readonly methods: readonly string[];
  readonly preparations: number;
  /** Arithmetic mean D/L an amino acid. */
  readonly ratios: ByAminoAcid;
  /** D/L of each preparation an amino acid (means of its injections), for the rule on replicates; empty where one row is all there is. */
  readonly replicates: readonly ByAminoAcid[];
  /** Mean concentrations an amino acid; empty when not measured. */
  readonly concentrations: ByAminoAcid;
  /** L-Ser/L-Asp: as given, else worked out from concentrations and D/L where both are there; else null. */
  readonly serine_ratio: number | null;
  readonly file: string;
  /** Line of its first row. */
  readonly line: number;
}

/** A published summary of the shells of one bed for one amino acid. */
export interface PublishedSummary {
  readonly section: string;
  readonly bed: string;
  readonly taxon: string;
  readonly fraction: Fraction;
  readonly amino_acid: AminoAcid;
  /** Arithmetic mean of D/L. */
  readonly mean: number;
  /** Standard deviation between shells of D/L; null where a mean alone was given. */
  readonly sd: number | null;
  readonly n: number;
  readonly labs: readonly string[];
  readonly methods: readonly string[];
  readonly file: string;
  readonly line: number;
}
