import { type Explanation, explanationsOf, type ReversedRelation } from './explanations.js';

/** The reading of a reversed relation. */
export interface RelationReading {
  /** For relations.csv. */
  readonly reading: string;
  /** What would explain it, the best supported first. */
  readonly explanations: readonly Explanation[];
  readonly sentences: readonly string[];
}

/**
 * Weighs what would explain a relation that is reversed after odd shells were set aside (design 7.9): each explanation
 * with what speaks for it and against it, the one with most for and least against first. None is proved by ratios
 * alone, so the reading names the one that leads, or says that several stand level.
 */
export function readReversedRelation(reversed: ReversedRelation): RelationReading {
  const explanations = explanationsOf(reversed)
    .map((explanation, order) => ({ explanation, order, score: score(explanation) }))
    .sort((a, b) => b.score - a.score || a.order - b.order);
  const leading = explanations.filter(({ score: points }) => points === explanations[0].score);
  const names = leading.map(({ explanation }) => explanation.name);
  const reading =
    explanations[0].score <= 0
      ? 'reversed; nothing known favours one explanation'
      : names.length === 1
        ? `best supported: ${names[0]}`
        : `equally supported: ${names.join('; ')}`;
  const { relation, check } = reversed;
  const opening =
    relation.kind === 'same'
      ? `${relation.lower} and ${relation.upper} are said to be of one age, but their mean log ratios differ by ${shown(Math.abs(check.difference ?? 0))} (${shown(Math.abs(check.z ?? 0))} standard errors).`
      : `${relation.lower} lies below ${relation.upper}, but its mean log ratio is lower by ${shown(Math.abs(check.difference ?? 0))} (${shown(Math.abs(check.z ?? 0))} standard errors, p = ${shown(check.p_reversed ?? 1)}).`;
  const sentences = explanations.map(({ explanation }) => sentenceOf(explanation));
  return {
    reading,
    explanations: explanations.map(({ explanation }) => explanation),
    sentences: [opening, ...sentences],
  };
}

const score = ({ speaksFor, speaksAgainst }: Explanation): number => speaksFor.length - speaksAgainst.length;

function sentenceOf({ name, speaksFor, speaksAgainst }: Explanation): string {
  const capital = name[0].toUpperCase() + name.slice(1);
  const plus = speaksFor.length === 0 ? 'nothing known speaks for it' : `for it: ${speaksFor.join('; ')}`;
  const minus =
    speaksAgainst.length === 0 ? 'nothing known speaks against it' : `against it: ${speaksAgainst.join('; ')}`;
  return `${capital}: ${plus}; ${minus}.`;
}

const shown = (value: number): string => String(Number(value.toPrecision(2)));
