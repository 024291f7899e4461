import type { AminoAcid, BedMark } from '../model/index.js';
import type { RelationCheck, RelationToCheck } from './relation-checks.js';

/** What is known of a bed when a reversed relation is weighed. */
export interface BedFacts {
  /** `section/bed`. */
  readonly key: string;
  readonly section: string;
  /** Shells behind the mean, those set aside not counted. */
  readonly shells: number;
  readonly zone: string | null;
  readonly marks: readonly BedMark[];
  /** Its other relations on this clock that are reversed, and that agree. */
  readonly otherReversed: number;
  readonly otherAgree: number;
  /** Shells of the bed marked `high serine`, and shells whose serine was measured. */
  readonly highSerine: number;
  readonly serineMeasured: number;
  /** Current mean annual temperature, degrees Celsius. */
  readonly cmat_c: number | null;
}

/** Lower minus upper in one amino acid. */
export interface AminoAcidDifference {
  readonly amino_acid: AminoAcid;
  readonly difference: number;
  readonly se: number;
}

/** A relation that is still reversed, with all that bears on it. */
export interface ReversedRelation {
  readonly relation: RelationToCheck;
  readonly check: RelationCheck;
  readonly lower: BedFacts;
  readonly upper: BedFacts;
  /** One entry an amino acid; empty or one where the clock has a single one. */
  readonly differences: readonly AminoAcidDifference[];
}

/** One thing that would explain a reversal. */
export interface Explanation {
  readonly name: string;
  readonly speaksFor: readonly string[];
  readonly speaksAgainst: readonly string[];
}

/** Number of shells from which a bed mean is not called provisional (common practice). */
const SHELLS_A_BED = 5;

/**
 * The five things that would explain a reversed relation, each with what is known for and against it. Beds that lie
 * elsewhere in the survey count by their own relations, amino acids by whether all show the reversal.
 */
export function explanationsOf(reversed: ReversedRelation): Explanation[] {
  const { relation, lower, upper } = reversed;
  // Of a `same` relation the bed with the higher ratio stands where the upper one stands in a reversed order.
  const turned = relation.kind === 'same' && (reversed.check.difference ?? 0) > 0;
  const [low, high] = turned ? [upper, lower] : [lower, upper];
  const agree = aminoAcidsAgree(reversed);
  return [
    wholeBedReworked(low, high, agree),
    contaminated(low, high, agree),
    heat(low, high),
    field(reversed),
    chance(low, high),
  ];
}

/** Null with fewer than two amino acids. */
function aminoAcidsAgree({ differences, check }: ReversedRelation): boolean | null {
  if (differences.length < 2) return null;
  const side = Math.sign(check.difference ?? 0);
  // One that differs the other way by more than a standard error dissents; one within its error does not.
  return differences.every(({ difference, se }) => Math.sign(difference) === side || Math.abs(difference) <= se);
}

function wholeBedReworked(low: BedFacts, high: BedFacts, agree: boolean | null): Explanation {
  const speaksFor: string[] = [];
  const speaksAgainst: string[] = [];
  if (high.otherReversed > 0) speaksFor.push(`${high.key} is too high in ${relations(high.otherReversed)} more`);
  else if (high.otherAgree > 0) speaksAgainst.push(`${high.key} agrees with ${relations(high.otherAgree)} more`);
  if (agree === true) speaksFor.push('all amino acids show the reversal');
  if (agree === false) speaksAgainst.push('the amino acids do not all show the reversal');
  if (high.zone !== null && low.zone !== null && high.zone !== low.zone)
    speaksFor.push(`its ratio is that of ${high.zone}, which the survey holds elsewhere`);
  return { name: `all shells of ${high.key} reworked from an older deposit`, speaksFor, speaksAgainst };
}

function contaminated(low: BedFacts, _high: BedFacts, agree: boolean | null): Explanation {
  const speaksFor: string[] = [];
  const speaksAgainst: string[] = [];
  if (low.highSerine > 0) speaksFor.push(`serine is high in ${low.highSerine} of ${low.serineMeasured} of its shells`);
  else if (low.serineMeasured > 0)
    speaksAgainst.push(`serine is not high in any of the ${low.serineMeasured} shells measured`);
  if (low.otherReversed > 0) speaksFor.push(`${low.key} is too low in ${relations(low.otherReversed)} more`);
  else if (low.otherAgree > 0) speaksAgainst.push(`${low.key} agrees with ${relations(low.otherAgree)} more`);
  if (agree === false) speaksFor.push('the amino acids do not all show the reversal');
  return { name: `${low.key} contaminated by younger amino acids`, speaksFor, speaksAgainst };
}

function heat(low: BedFacts, high: BedFacts): Explanation {
  const speaksFor: string[] = [];
  const speaksAgainst: string[] = [];
  if (high.marks.includes('shallow burial')) speaksFor.push(`${high.key} was buried shallowly, where summers are hot`);
  if (low.marks.includes('shallow burial'))
    speaksAgainst.push(`${low.key}, the bed with the lower ratio, is the one buried shallowly`);
  const warmer = high.cmat_c !== null && low.cmat_c !== null ? high.cmat_c - low.cmat_c : null;
  if (warmer !== null && warmer >= 1) speaksFor.push(`${high.key} lies where it is ${shown(warmer)} °C warmer`);
  if (warmer !== null && warmer <= -1) speaksAgainst.push(`${high.key} lies where it is ${shown(-warmer)} °C colder`);
  if (low.section === high.section) {
    if (speaksFor.length === 0) speaksAgainst.push('both beds lie in one section');
  } else if (warmer === null) speaksFor.push('they lie in two sections, whose temperatures are not given');
  return { name: 'different temperature history or shallow burial', speaksFor, speaksAgainst };
}

function field({ relation, lower, upper }: ReversedRelation): Explanation {
  const speaksFor: string[] = [];
  const speaksAgainst: string[] = [];
  if (relation.certainty === 'probable') speaksFor.push('it was called probable only');
  if (relation.kind === 'same' || relation.basis === 'marker' || relation.basis === 'staircase') {
    speaksFor.push(
      `it rests on ${relation.basis === 'superposition' ? 'a correlation' : `a ${relation.basis}`}, which can be misjudged`,
    );
  }
  const others = lower.otherReversed + upper.otherReversed;
  const agreeing = lower.otherAgree + upper.otherAgree;
  if (others === 0 && agreeing >= 2) {
    speaksFor.push(`both beds agree with all else (${relations(agreeing)}), as they would with the two exchanged`);
  }
  return { name: 'the field relation itself (overturned, slumped or mislabelled)', speaksFor, speaksAgainst };
}

function chance(low: BedFacts, high: BedFacts): Explanation {
  const few = [low, high].filter((bed) => bed.shells < SHELLS_A_BED);
  const speaksFor = few.map(
    (bed) => `the mean of ${bed.key} rests on ${bed.shells} ${bed.shells === 1 ? 'shell' : 'shells'}`,
  );
  const enough = few.length === 0 ? [`both means rest on ${SHELLS_A_BED} shells or more`] : [];
  return {
    name: 'too few shells',
    speaksFor,
    speaksAgainst: ['the reversal is beyond chance after adjustment', ...enough],
  };
}

const relations = (count: number): string => (count === 1 ? '1 relation' : `${count} relations`);
const shown = (value: number): string => String(Number(value.toPrecision(2)));
