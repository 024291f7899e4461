/**
 * The amino acids whose D/L ratios bedorder reads, by their usual three-letter codes.
 * Asx and Glx are aspartic and glutamic acid together with the asparagine and glutamine that hydrolysis turns into them.
 * For Ile the ratio is D-alloisoleucine over L-isoleucine (A/I).
 */
export const AMINO_ACIDS = ['Asx', 'Glx', 'Ser', 'Ala', 'Val', 'Phe', 'Leu', 'Ile', 'Tyr', 'Met'] as const;

/** One of {@link AMINO_ACIDS}. */
export type AminoAcid = (typeof AMINO_ACIDS)[number];

/** A number an amino acid; an amino acid that was not measured is absent. */
export type ByAminoAcid = Readonly<Partial<Record<AminoAcid, number>>>;

/** Total hydrolysable or free amino acids. */
export type Fraction = 'THAA' | 'FAA';
