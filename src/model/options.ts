import type { AminoAcid, Fraction } from './amino-acid.js';

/** Limits of the screening rules (settings file, key `screening`). */
export interface ScreeningLimits {
  /** L-Ser/L-Asp at or above this marks a shell `high serine`. Default 0.8. */
  readonly serine_ratio: number;
  /** Distance from the taxon's log-log line between two amino acids, in robust standard deviations. Default 3.5. */
  readonly discordance: number;
  /** Replicate preparations or injections whose log ratios differ by more than this many within-shell standard deviations. Default 3.5. */
  readonly replicates: number;
  /** Total concentration below this fraction of the taxon's median marks a shell `low yield`. Default 0.25. */
  readonly yield: number;
  /** Burial in metres under which a bed is marked `shallow burial`. Default 1. */
  readonly burial_m: number;
  /** Shells under which a bed is called `provisional`. Default 5. */
  readonly shells_a_bed: number;
}

/** Everything a user can ask of a run beyond the input files. */
export interface RunOptions {
  /** Analyse this taxon only; null takes every taxon, each with its own clocks. */
  readonly taxon: string | null;
  /** The main clock: one or more amino acids, `all`, or null for the default of the design (7.10). */
  readonly amino_acid: readonly AminoAcid[] | 'all' | null;
  readonly fraction: Fraction | null;
  /** Forces this number of zones; null lets the data choose. */
  readonly zones: number | null;
  /** Level of every test, 0 to 1. Default 0.05. */
  readonly alpha: number;
  /** Numeric column of the beds table along which ratios may slope; null for none. */
  readonly gradient: string | null;
  readonly reference_taxon: string | null;
  /** Derive `staircase` relations from elevation_m: within each section, or along the whole coast. */
  readonly staircase: 'no' | 'section' | 'coast';
  /** Whether derived staircase relations force the order (they are only checked otherwise). */
  readonly staircase_certain: boolean;
  /** Bootstrap and simulation repeats. Default 999. */
  readonly simulations: number;
  /** Default 1. */
  readonly seed: number;
  readonly screening: ScreeningLimits;
}

/** The defaults of `bedorder run`. */
export const DEFAULT_OPTIONS: RunOptions = {
  taxon: null,
  amino_acid: null,
  fraction: null,
  zones: null,
  alpha: 0.05,
  gradient: null,
  reference_taxon: null,
  staircase: 'no',
  staircase_certain: false,
  simulations: 999,
  seed: 1,
  screening: { serine_ratio: 0.8, discordance: 3.5, replicates: 3.5, yield: 0.25, burial_m: 1, shells_a_bed: 5 },
};
