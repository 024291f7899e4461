import { describe, expect, it } from 'vitest';
import type { RelationRecord } from '../../src/model/index.js';
import { keptRelations } from '../../src/order/index.js';

const chain = (...beds: string[]): RelationRecord[] =>
  beds.slice(1).map((upper, at) => ({
    lower: beds[at],
    upper,
    basis: 'superposition',
    kind: 'older',
    certainty: 'certain',
    row: null,
  }));
const text = (relations: readonly RelationRecord[]) => relations.map(({ lower, upper }) => `${lower}>${upper}`).sort();

describe('keptRelations', () => {
  it('keeps what a reversed relation carried over', () => {
    const relations = chain('p', 'a', 'b', 'c');
    const kept = keptRelations(relations, [false, true, false], () => false);
    expect(text(kept)).toEqual(['a>c', 'b>c', 'p>a', 'p>b']);
  });

  it('carries over no relation that the ratios contradict, but reaches further', () => {
    const relations = chain('a', 'b', 'c', 'd');
    const kept = keptRelations(relations, [true, false, false], (lower, upper) => lower === 'a' && upper === 'c');
    expect(text(kept)).toEqual(['a>d', 'b>c', 'c>d']);
  });

  it('never keeps a probable relation', () => {
    const relations = chain('a', 'b').map((relation) => ({ ...relation, certainty: 'probable' as const }));
    expect(keptRelations(relations, [false], () => false)).toEqual([]);
  });
});
