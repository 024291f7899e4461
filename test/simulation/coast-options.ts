import type { AminoAcid, BedPlace } from '../../src/model/index.js';

/** How one amino acid of a simulated coast behaves. */
export interface SimulatedAminoAcid {
  readonly code: AminoAcid;
  /** How its log ratio grows per unit of the common extent. Default 1. */
  readonly slope?: number;
  /** Standard deviation of its log ratio between shells of one bed. Default: the coast's `scatter`. */
  readonly scatter?: number;
  /** D/L in the youngest zone. Default: exp(youngest) for the first amino acid, a plausible number for the others. */
  readonly youngest?: number;
  /** Carries no signal: its ratios scatter about one value whatever the bed's age. Default false. */
  readonly noise?: boolean;
}

/** A second taxon beside the first: its log ratio is `offset + slope · x` where x is the first taxon's. */
export interface SimulatedTaxon {
  readonly name?: string;
  /** Default 0.2. */
  readonly offset?: number;
  /** Default 1. */
  readonly slope?: number;
  /** Number of beds that hold both taxa. Default 8. */
  readonly paired?: number;
  /** Number of beds that hold the second taxon only. Default 0. */
  readonly alone?: number;
}

/** Numbers of odd shells; a bed gets one at most. */
export interface OddShells {
  /** Takes the extent of an older zone; all amino acids agree. */
  readonly reworked?: number;
  /** Takes the extent of a younger zone; all amino acids agree. */
  readonly intruded?: number;
  /** Modern amino acids mixed in, unequally: ratios low, L-Ser/L-Asp above 0.8. */
  readonly contaminated?: number;
  /** Heated or leached: ratios high, amino acids disagree. */
  readonly altered?: number;
}

/** A slope of all log ratios along the coast. */
export interface SimulatedGradient {
  /** Change of the log ratio per unit of the column. */
  readonly slope: number;
  /** Name of the column of the beds table. Default `cmat_c`. */
  readonly column?: string;
  /** Difference of the column between the two ends of the coast. Default 8. */
  readonly range?: number;
}

/** What a simulated coast is like. */
export interface CoastOptions {
  /** Default 1. The same seed gives the same coast; options that only add odd shells leave the clean shells as they were. */
  readonly seed?: number;
  /** Default 10. */
  readonly sections?: number;
  /** Default 30, dealt out evenly over the sections. */
  readonly beds?: number;
  /** Number of zones, or `continuum` for ages spread evenly. Default 4. */
  readonly zones?: number | 'continuum';
  /** Step of the log ratio between zones. Default ln 1.3. */
  readonly spacing?: number;
  /** Log ratio of the youngest zone, or of the young end of the continuum. Default ln 0.12. */
  readonly youngest?: number;
  /** Length of the continuum in log ratios. Default 3 times the spacing. */
  readonly continuumRange?: number;
  /** Fewest and most shells a bed. Default [4, 8]. */
  readonly shells?: readonly [number, number];
  /** Standard deviation of the log ratio between shells of a bed. Default 0.05. */
  readonly scatter?: number;
  /** Preparations a shell. Default 1. */
  readonly preparations?: number;
  /** Standard deviation of the log ratio between preparations of one shell. Default 0. */
  readonly withinShell?: number;
  /** tau: standard deviation of the log ratio between beds of one zone, not an age difference. Default 0. */
  readonly spread?: number;
  /** Standard deviation of a shift that all beds of one section share. Default 0. */
  readonly sectionEffect?: number;
  /** Default Ile alone. The first is the main one. */
  readonly aminoAcids?: readonly SimulatedAminoAcid[];
  /** Correlation of the errors between amino acids of one shell, 0 to 1. Default 0. */
  readonly correlation?: number;
  /** Number of pairs of neighbouring beds, different in age, whose logged places are swapped. Default 0. */
  readonly upsideDown?: number;
  readonly odd?: OddShells;
  readonly gradient?: SimulatedGradient;
  readonly taxon?: string;
  readonly secondTaxon?: SimulatedTaxon;
  /** How places are logged. Default `level`. */
  readonly place?: BedPlace['kind'];
  /** `ratio` gives L-Ser/L-Asp itself; `concentrations` gives D/L Ser and [Ser] and leaves it to be worked out. Default `ratio`. */
  readonly serine?: 'ratio' | 'concentrations';
}
