import type { AminoAcid, ByAminoAcid, Fraction } from './amino-acid.js';
import type { Problem } from './problem.js';

/** Place of a row in an input file. */
export interface RowPlace {
  readonly file: string;
  /** Line of the row, from 1. */
  readonly line: number;
}

/**
 * Place of a bed in its section. `level` counts upwards from the lowest bed, `height_m` is the height of the
 * bed's base above a datum in metres (higher is younger), `depth_m` the depth below the surface in metres (deeper is older).
 */
export interface BedPlace {
  readonly kind: 'level' | 'height_m' | 'depth_m';
  readonly value: number;
}

/** A published summary in place of single shells: `sd` is the standard deviation between shells of D/L. */
export interface SummaryOfShells {
  /** Number of shells; 1 where a mean alone was given. */
  readonly n: number;
  /** Standard deviation between shells an amino acid, on the D/L scale. */
  readonly sd: ByAminoAcid;
}

/** One row of laboratory data: a preparation or an injection of one shell, or a published summary of a bed. */
export interface Analysis extends RowPlace {
  readonly section: string;
  readonly bed: string;
  /** Name of the taxon after aliases. */
  readonly taxon: string;
  readonly fraction: Fraction;
  /** Specimen; empty on a summary row. A shell is known by section, bed, taxon and shell together. */
  readonly shell: string;
  readonly preparation: string | null;
  readonly injection: string | null;
  readonly lab_id: string | null;
  readonly lab: string | null;
  readonly method: string | null;
  /** D/L an amino acid; every number is finite and above 0. */
  readonly ratios: ByAminoAcid;
  /** Concentrations of the L+D amino acid in one unit of the file's own; empty when not measured. */
  readonly concentrations: ByAminoAcid;
  /** L-Ser/L-Asp where the table gives the ratio itself. */
  readonly serine_ratio: number | null;
  /** Set on a summary row only. */
  readonly summary: SummaryOfShells | null;
}

/** All that is known of one bed from the shells and the beds tables. */
export interface BedRecord {
  readonly section: string;
  readonly bed: string;
  readonly place: BedPlace | null;
  /** Elevation of the deposit above present sea level, metres. */
  readonly elevation_m: number | null;
  /** WGS 84, decimal degrees. */
  readonly latitude: number | null;
  readonly longitude: number | null;
  /** Distance along the coast, kilometres. */
  readonly coast_km: number | null;
  /** Current mean annual temperature, degrees Celsius. */
  readonly cmat_c: number | null;
  /** Thickness of the cover above the sampled shells, metres. */
  readonly burial_m: number | null;
  readonly note: string | null;
  /** Every numeric column of the beds table by its header as written, for `--gradient`. */
  readonly columns: Readonly<Record<string, number>>;
}

/** On what a relation between two beds rests. `staircase`: on a rising coast the higher terrace is the older one. */
export type RelationBasis = 'superposition' | 'cross-cutting' | 'inset' | 'staircase' | 'inclusion' | 'marker';

/** A field statement that `lower` is older than `upper`, or as old (`same`). Beds are named `section/bed`. */
export interface RelationRecord {
  readonly lower: string;
  readonly upper: string;
  readonly basis: RelationBasis;
  readonly kind: 'older' | 'same';
  readonly certainty: 'certain' | 'probable';
  /** Null for a relation derived from places within a section. */
  readonly row: RowPlace | null;
}

/** One interlaboratory standard as one laboratory measured it. */
export interface StandardRecord extends RowPlace {
  readonly lab: string;
  readonly standard: string;
  readonly amino_acid: AminoAcid;
  readonly dl: number;
}

/** One input file: its part, its name without folders, and the SHA-256 of its bytes in lower-case hexadecimal. */
export interface InputFile {
  readonly role: 'shells' | 'beds' | 'relations' | 'standards' | 'aliases' | 'settings' | 'dates';
  readonly file: string;
  readonly sha256: string;
  readonly rows: number;
}

/** All that was read. */
export interface Survey {
  readonly inputs: readonly InputFile[];
  readonly analyses: readonly Analysis[];
  /** One record a bed, in order of first appearance in the shells table, then the beds table. */
  readonly beds: readonly BedRecord[];
  /** The relations table only; superposition within sections is derived from places by `order/`. */
  readonly relations: readonly RelationRecord[];
  readonly standards: readonly StandardRecord[];
  /** Warnings only: a survey with errors is never made. */
  readonly problems: readonly Problem[];
}
