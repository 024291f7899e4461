import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type BedMean, checkRelations, type RelationToCheck } from '../../src/superposition/relation-checks.js';

function bed(key: string, mean: number, se = 0.03, n = 5): BedMean {
  return { key, section: key.slice(0, key.indexOf('/')), n, mean, se };
}

function relation(lower: string, upper: string, kind: 'older' | 'same' = 'older'): RelationToCheck {
  return { lower, upper, kind, basis: 'superposition', certainty: 'certain' };
}

describe('checkRelations', () => {
  const beds = [
    bed('A/1', -0.5),
    bed('A/2', -0.8),
    bed('A/3', -0.81),
    bed('B/1', -0.5),
    bed('A/empty', Number.NaN, Number.NaN, 0),
  ];

  it('gives one answer a relation, in input order, with the right verdicts', () => {
    const checks = checkRelations(
      [
        relation('A/1', 'A/2'),
        relation('A/2', 'A/1'),
        relation('A/2', 'A/3'),
        relation('A/1', 'A/empty'),
        relation('A/1', 'nowhere/1'),
        relation('A/1', 'B/1', 'same'),
        relation('A/2', 'B/1', 'same'),
      ],
      beds,
      { df: 20 },
    );
    expect(checks.map((check) => check.verdict)).toEqual([
      'agrees',
      'reversed',
      'tied',
      'not tested',
      'not tested',
      'agrees',
      'reversed',
    ]);
    expect(checks[3]).toEqual({ difference: null, z: null, p_reversed: null, verdict: 'not tested' });
    expect(checks[0]?.difference).toBeCloseTo(0.3, 12);
    expect(checks[0]?.z).toBeCloseTo(0.3 / (0.03 * Math.SQRT2), 10);
  });

  it('uses Student t at the degrees of freedom of the scatter', () => {
    // R: pt(-2.5, 7.3) = 0.0198251173328002 (computed)
    const [check] = checkRelations([relation('A/a', 'A/b')], [bed('A/a', 0, 0.03), bed('A/b', 0.125, 0.04)], {
      df: 7.3,
    });
    expect(check?.z).toBeCloseTo(-2.5, 12);
    expect(check?.p_reversed).toBeCloseTo(0.0198251173328002, 10);
    // R: pnorm(-2.5) = 0.00620966532577613 (computed)
    const [known] = checkRelations([relation('A/a', 'A/b')], [bed('A/a', 0, 0.03), bed('A/b', 0.125, 0.04)]);
    expect(known?.p_reversed).toBeCloseTo(0.00620966532577613, 10);
  });

  it('adds the spread of both beds between sections only', () => {
    const some = [bed('A/1', -0.6), bed('A/2', -0.5), bed('B/2', -0.5)];
    const [within, between] = checkRelations([relation('A/1', 'A/2'), relation('A/1', 'B/2')], some, { spread: 0.04 });
    expect(within?.z).toBeCloseTo(-0.1 / Math.sqrt(2 * 0.0009), 10);
    expect(between?.z).toBeCloseTo(-0.1 / Math.sqrt(2 * 0.0009 + 2 * 0.0016), 10);
  });

  it('counts a pair stated on two bases once in the adjustment', () => {
    const some = [bed('A/1', 0), bed('A/2', 0.07)];
    const once = checkRelations([relation('A/1', 'A/2')], some);
    const twice = checkRelations([relation('A/1', 'A/2'), { ...relation('A/1', 'A/2'), basis: 'marker' }], some);
    expect(twice).toEqual([once[0], once[0]]);
  });

  it('turns round with the relation: p of one way and of the other add to 1', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -2, max: 0, noNaN: true }),
        fc.double({ min: -2, max: 0, noNaN: true }),
        fc.integer({ min: 1, max: 60 }),
        (a, b, df) => {
          const some = [bed('A/1', a), bed('A/2', b)];
          const [up, down] = checkRelations([relation('A/1', 'A/2'), relation('A/2', 'A/1')], some, { df });
          expect((up?.p_reversed ?? 0) + (down?.p_reversed ?? 0)).toBeCloseTo(1, 9);
          expect(up?.z).toBeCloseTo(-(down?.z ?? 0), 9);
        },
      ),
      { numRuns: 200 },
    );
  });

  it('survives means without error and refuses options that make no sense', () => {
    const exact = [bed('A/1', -0.6, 0), bed('A/2', -0.5, 0), bed('A/3', -0.5, 0)];
    const [reversed, tied] = checkRelations([relation('A/1', 'A/2'), relation('A/2', 'A/3')], exact, { df: 5 });
    expect(reversed?.verdict).toBe('reversed');
    expect(tied?.verdict).toBe('tied');
    expect(() => checkRelations([], [], { alpha: Number.NaN })).toThrow('alpha');
    expect(() => checkRelations([], [], { df: Number.NaN })).toThrow('df');
    expect(() => checkRelations([], [], { spread: -1 })).toThrow('spread');
  });
});
