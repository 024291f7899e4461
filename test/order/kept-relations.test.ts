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

  it('writes what it carried over as certain superposition, and passes kept relations on as they are', () => {
    const relations = chain('a', 'b', 'c');
    expect(keptRelations(relations, [true, false], () => false)).toEqual([
      relations[1],
      { lower: 'a', upper: 'c', basis: 'superposition', kind: 'older', certainty: 'certain', row: null },
    ]);
    expect(keptRelations(relations, [false, false], () => false)).toEqual(relations);
  });

  it('carries nothing over by probable relations, or for beds of one age', () => {
    const probable = chain('b', 'c').map((relation) => ({ ...relation, certainty: 'probable' as const }));
    expect(text(keptRelations([...chain('a', 'b'), ...probable], [true, false], () => false))).toEqual([]);
    // a probable relation that is reversed is not one that was dropped
    expect(text(keptRelations([...probable, ...chain('c', 'd')], [true, false], () => false))).toEqual(['c>d']);
    const same = chain('b', 'c').map((relation) => ({ ...relation, kind: 'same' as const }));
    expect(text(keptRelations([...chain('a', 'b'), ...same], [true, false], () => false))).toEqual(['b>c']);
    // nor is a `same` that the ratios contradict
    expect(text(keptRelations([...same, ...chain('c', 'd')], [true, false], () => false))).toEqual(['c>d']);
  });

  it('goes every way at a fork, each bed once, also where ways meet again', () => {
    const relations = [...chain('a', 'b'), ...chain('b', 'c', 'e'), ...chain('b', 'd', 'e')];
    const asked: string[] = [];
    const kept = keptRelations(relations, [true, false, false, false, false], (lower, upper) => {
      asked.push(`${lower}>${upper}`);
      return upper === 'c' || upper === 'd';
    });
    expect(text(kept)).toEqual(['a>e', 'b>c', 'b>d', 'c>e', 'd>e']);
    expect(asked.sort()).toEqual(['a>c', 'a>d', 'a>e']);
  });

  it('ends where relations run in a circle', () => {
    const relations = chain('a', 'b', 'c', 'a');
    const kept = keptRelations(relations, [true, false, false], () => true);
    expect(text(kept)).toEqual(['b>c', 'c>a']);
  });
});
