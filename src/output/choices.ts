import type {
  AdjacentVerdict,
  AminoAcid,
  BedMark,
  ClockVerdict,
  Confidence,
  Fraction,
  InputFile,
  RelationBasis,
  RelationVerdict,
  SectionRow,
  ShellMark,
  ShellReading,
  ShellStatus,
} from '../model/index.js';

/* The closed vocabularies of the tables: every word with its meaning. */

type Words<T extends string> = Readonly<Record<T, string>>;

/** Fractions in words. */
export const FRACTIONS: Words<Fraction> = {
  THAA: 'total hydrolysable amino acids',
  FAA: 'free amino acids',
};

/** Amino acids by their codes. */
export const AMINO_ACID_NAMES: Words<AminoAcid> = {
  Asx: 'aspartic acid with asparagine',
  Glx: 'glutamic acid with glutamine',
  Ser: 'serine',
  Ala: 'alanine',
  Val: 'valine',
  Phe: 'phenylalanine',
  Leu: 'leucine',
  Ile: 'isoleucine, as D-alloisoleucine/L-isoleucine (A/I)',
  Tyr: 'tyrosine',
  Met: 'methionine',
};

/** Verdicts on a clock in words. */
export const CLOCK_VERDICTS: Words<ClockVerdict> = {
  zones: 'the ratios fall into separate zones',
  'one zone': 'all beds agree with a single zone',
  continuum: 'the ratios run on without gaps; no zones are supported',
  'too few beds': 'too few beds to tell',
};

/** Verdicts on neighbouring zones in words. */
export const ADJACENT_VERDICTS: Words<AdjacentVerdict> = {
  distinct: 'the zones differ and hardly overlap',
  'not distinct': 'the zones do not differ, or overlap too much',
  'not resolved': 'too few shells or beds for any test to decide',
};

/** Marks on a bed in words. */
export const BED_MARKS: Words<BedMark> = {
  'shallow burial': 'covered by less than the limit, so warmed by the sun',
  provisional: 'fewer shells than a bed should have',
  'mixed age': 'shells scatter more than one age allows',
  'one shell': 'a single shell stands for the bed',
  'near equilibrium': 'the ratio is so near equilibrium that order is hardly resolved',
  'no place in section': 'neither level, height nor depth is known, and no relation to another bed of its section',
  'assumed scatter': 'the scatter between shells is assumed, not measured',
  'converted taxon': 'the mean rests on shells of another taxon, converted to the reference taxon',
};

/** Statuses of a shell in words. */
export const SHELL_STATUSES: Words<ShellStatus> = {
  kept: 'counts in the means',
  doubtful: 'counts in the means, but is named',
  'set aside': 'left out of the means for a stated reason',
};

/** Marks on a shell in words. */
export const SHELL_MARKS: Words<ShellMark> = {
  'high serine': 'L-Ser/L-Asp at or above the limit: younger amino acids have come in',
  'discordant ratios': 'off the line that two amino acids of the taxon share',
  'rate order': 'a slow amino acid is ahead of a fast one',
  'free below total': 'the free ratio is below the total one',
  'replicates disagree': 'preparations or injections of the shell differ too much',
  'low yield': 'concentrations are far below the median of the taxon',
};

/** Readings of a shell in words. */
export const SHELL_READINGS: Words<ShellReading> = {
  none: 'nothing odd',
  'reworked from an older deposit': 'high ratio, amino acids agree, screening clean',
  altered: 'high ratio, amino acids disagree: heated or leached',
  'intruded from a younger deposit': 'low ratio, amino acids agree, screening clean',
  'contaminated by younger amino acids': 'low ratio, amino acids disagree or serine is high',
  'reworked or altered': 'high ratio; one amino acid alone cannot tell which',
  'intruded or contaminated': 'low ratio; one amino acid alone cannot tell which',
};

/** How sure a reading is, in words. */
export const CONFIDENCES: Words<Confidence> = {
  high: 'several independent facts agree',
  moderate: 'the main facts agree',
  low: 'one fact, or facts that disagree',
};

/** What a relation rests on, in words. */
export const BASES: Words<RelationBasis> = {
  superposition: 'one bed lies on the other',
  'cross-cutting': 'one deposit cuts the other',
  inset: 'one deposit is set into the other',
  staircase: 'on a rising coast the higher terrace is the older',
  inclusion: 'one deposit holds pieces of the other',
  marker: 'a marker bed ties them',
};

/** Kinds of relation in words. */
export const RELATION_KINDS: Words<'older' | 'same'> = {
  older: 'lower is older than upper',
  same: 'both are as old',
};

/** How sure a relation is, in words. */
export const CERTAINTIES: Words<'certain' | 'probable'> = {
  certain: 'binds the order',
  probable: 'is checked, but does not bind the order',
};

/** Verdicts on a relation in words. */
export const RELATION_VERDICTS: Words<RelationVerdict> = {
  agrees: 'the ratios say the same',
  tied: 'the ratios cannot tell the two beds apart',
  reversed: 'the ratios say the opposite',
  'not tested': 'a bed has no mean on this clock',
};

/** Verdicts on a section in words. */
export const SECTION_VERDICTS: Words<SectionRow['verdict']> = {
  consistent: 'the ratios of the section agree with its order',
  inconsistent: 'the ratios of the section contradict its order',
  'not tested': 'fewer than two beds with a mean',
};

/** Severities of a problem in words. */
export const SEVERITIES: Words<'error' | 'warning'> = {
  error: 'refuses the survey',
  warning: 'lets the survey through',
};

/** Parts of the input files in words. */
export const INPUT_ROLES: Words<InputFile['role']> = {
  shells: 'laboratory data',
  beds: 'places and heights of the beds',
  relations: 'field relations between beds',
  standards: 'interlaboratory standards',
  aliases: 'other names of taxa',
  settings: 'settings',
  dates: 'independent dates',
};
