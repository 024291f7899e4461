import { describe, expect, it } from 'vitest';
import { type BedFacts, type ReversedRelation, readReversedRelation } from '../../src/superposition/index.js';

const facts = (key: string, given: Partial<BedFacts> = {}): BedFacts => ({
  key,
  section: key.split('/')[0],
  shells: 6,
  zone: null,
  marks: [],
  otherReversed: 0,
  otherAgree: 0,
  highSerine: 0,
  serineMeasured: 0,
  cmat_c: null,
  ...given,
});

const reversed = (given: Partial<ReversedRelation> = {}): ReversedRelation => ({
  relation: { lower: 'A/1', upper: 'A/2', kind: 'older', basis: 'superposition', certainty: 'certain' },
  check: { difference: -0.31, z: -5.2, p_reversed: 1e-6, verdict: 'reversed' },
  lower: facts('A/1'),
  upper: facts('A/2'),
  differences: [],
  ...given,
});

describe('readReversedRelation', () => {
  it('weighs all five explanations, each with for and against', () => {
    const { explanations, sentences } = readReversedRelation(reversed());
    expect(explanations).toHaveLength(5);
    expect(sentences).toHaveLength(6);
    expect(sentences[0]).toBe(
      'A/1 lies below A/2, but its mean log ratio is lower by 0.31 (5.2 standard errors, p = 0.000001).',
    );
    for (const sentence of sentences.slice(1)) expect(sentence).toMatch(/for it.*against it/);
  });

  it('favours reworking where the upper bed is too high against others too', () => {
    const { reading } = readReversedRelation(
      reversed({
        upper: facts('A/2', { otherReversed: 2 }),
        lower: facts('A/1', { otherAgree: 3, serineMeasured: 6 }),
      }),
    );
    expect(reading).toBe('best supported: all shells of A/2 reworked from an older deposit');
  });

  it('favours contamination where serine is high and amino acids disagree', () => {
    const { reading } = readReversedRelation(
      reversed({
        lower: facts('A/1', { highSerine: 2, serineMeasured: 6, otherReversed: 1 }),
        differences: [
          { amino_acid: 'Asx', difference: -0.4, se: 0.05 },
          { amino_acid: 'Val', difference: 0.2, se: 0.05 },
        ],
      }),
    );
    expect(reading).toBe('best supported: A/1 contaminated by younger amino acids');
  });

  it('favours heat where the upper bed was buried shallowly', () => {
    const { reading } = readReversedRelation(
      reversed({ upper: facts('A/2', { marks: ['shallow burial'], otherAgree: 1 }) }),
    );
    expect(reading).toBe('best supported: different temperature history or shallow burial');
  });

  it('favours the field relation where it is probable and all else agrees', () => {
    const { reading } = readReversedRelation(
      reversed({
        relation: { lower: 'A/1', upper: 'B/2', kind: 'older', basis: 'marker', certainty: 'probable' },
        lower: facts('A/1', { otherAgree: 3, cmat_c: 12 }),
        upper: facts('B/2', { otherAgree: 2, cmat_c: 12 }),
      }),
    );
    expect(reading).toBe('best supported: the field relation itself (overturned, slumped or mislabelled)');
  });

  it('leaves reworking and an exchanged pair level in a section that is sound but for one relation', () => {
    const { reading } = readReversedRelation(
      reversed({
        upper: facts('A/2', { otherAgree: 1, zone: 'Z2' }),
        lower: facts('A/1', { otherAgree: 1, serineMeasured: 6, zone: 'Z1' }),
        differences: [
          { amino_acid: 'Asx', difference: -0.3, se: 0.05 },
          { amino_acid: 'Val', difference: -0.3, se: 0.05 },
        ],
      }),
    );
    expect(reading).toMatch(/^equally supported: /);
    expect(reading).toMatch(/all shells of A\/2 reworked/);
    expect(reading).toMatch(/the field relation itself/);
  });

  it('says so where nothing known favours one', () => {
    const { reading } = readReversedRelation(
      reversed({ lower: facts('A/1', { otherAgree: 1 }), upper: facts('A/2', { otherAgree: 0 }) }),
    );
    expect(reading).toBe('reversed; nothing known favours one explanation');
  });

  it('turns a `same` relation to whichever bed is the higher', () => {
    const relation = { lower: 'A/1', upper: 'B/2', kind: 'same', basis: 'marker', certainty: 'certain' } as const;
    const check = { difference: 0.3, z: 5, p_reversed: 1e-6, verdict: 'reversed' } as const;
    const { explanations, sentences } = readReversedRelation(
      reversed({ relation, check, lower: facts('A/1', { cmat_c: 14 }), upper: facts('B/2', { cmat_c: 11 }) }),
    );
    expect(sentences[0]).toContain('are said to be of one age');
    expect(explanations.some(({ name }) => name === 'all shells of A/1 reworked from an older deposit')).toBe(true);
    expect(explanations.find(({ name }) => name.startsWith('different'))?.speaksFor).toEqual([
      'A/1 lies where it is 3 °C warmer',
    ]);
  });
});
