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

const REWORKED = 'all shells of A/2 reworked from an older deposit';
const CONTAMINATED = 'A/1 contaminated by younger amino acids';
const HEAT = 'different temperature history or shallow burial';
const FIELD = 'the field relation itself (overturned, slumped or mislabelled)';
const CHANCE = 'too few shells';

/** What speaks for and against one explanation. */
function weigh(name: string, given: Partial<ReversedRelation>) {
  const { explanations } = readReversedRelation({
    relation: { lower: 'A/1', upper: 'A/2', kind: 'older', basis: 'superposition', certainty: 'certain' },
    check: { difference: -0.31, z: -5.2, p_reversed: 1e-6, verdict: 'reversed' },
    lower: facts('A/1'),
    upper: facts('A/2'),
    differences: [],
    ...given,
  });
  expect(explanations.map((explanation) => explanation.name)).toContain(name);
  const { speaksFor, speaksAgainst } = explanations.find((explanation) => explanation.name === name)!;
  return [speaksFor, speaksAgainst];
}

const differ = (...differences: [number, number][]) =>
  differences.map(([difference, se], at) => ({ amino_acid: (['Asx', 'Val'] as const)[at], difference, se }));

describe('a whole bed reworked', () => {
  it('is weighed by what the upper bed says elsewhere', () => {
    expect(weigh(REWORKED, {})).toEqual([[], []]);
    expect(weigh(REWORKED, { upper: facts('A/2', { otherReversed: 1, otherAgree: 4 }) })).toEqual([
      ['A/2 is too high in 1 relation more'],
      [],
    ]);
    expect(weigh(REWORKED, { upper: facts('A/2', { otherReversed: 2 }) })[0]).toEqual([
      'A/2 is too high in 2 relations more',
    ]);
    expect(weigh(REWORKED, { upper: facts('A/2', { otherAgree: 1 }) })).toEqual([
      [],
      ['A/2 agrees with 1 relation more'],
    ]);
  });

  it('is weighed by the amino acids, of which one within its error does not dissent', () => {
    const all = 'all amino acids show the reversal';
    const not = 'the amino acids do not all show the reversal';
    expect(weigh(REWORKED, { differences: differ([-0.3, 0.05], [-0.2, 0.05]) })).toEqual([[all], []]);
    expect(weigh(REWORKED, { differences: differ([-0.3, 0.05], [0.05, 0.05]) })).toEqual([[all], []]);
    expect(weigh(REWORKED, { differences: differ([-0.3, 0.05], [0.06, 0.05]) })).toEqual([[], [not]]);
    expect(weigh(REWORKED, { differences: differ([-0.3, 0.05]) })).toEqual([[], []]);
    expect(weigh(CONTAMINATED, { differences: differ([-0.3, 0.05], [0.06, 0.05]) })).toEqual([[not], []]);
    expect(weigh(CONTAMINATED, { differences: differ([-0.3, 0.05], [-0.2, 0.05]) })).toEqual([[], []]);
  });

  it('is weighed by a zone of the upper bed that is not that of the lower', () => {
    const zones = (lower: string | null, upper: string | null) =>
      weigh(REWORKED, { lower: facts('A/1', { zone: lower }), upper: facts('A/2', { zone: upper }) });
    expect(zones('Z1', 'Z2')).toEqual([['its ratio is that of Z2, which the survey holds elsewhere'], []]);
    for (const [lower, upper] of [
      ['Z2', 'Z2'],
      [null, 'Z2'],
      ['Z1', null],
    ])
      expect(zones(lower, upper)).toEqual([[], []]);
  });
});

describe('contamination', () => {
  it('is weighed by serine and by what the lower bed says elsewhere', () => {
    expect(weigh(CONTAMINATED, {})).toEqual([[], []]);
    expect(weigh(CONTAMINATED, { lower: facts('A/1', { highSerine: 2, serineMeasured: 5 }) })).toEqual([
      ['serine is high in 2 of 5 of its shells'],
      [],
    ]);
    expect(weigh(CONTAMINATED, { lower: facts('A/1', { serineMeasured: 5 }) })).toEqual([
      [],
      ['serine is not high in any of the 5 shells measured'],
    ]);
    expect(weigh(CONTAMINATED, { lower: facts('A/1', { otherReversed: 3, otherAgree: 1 }) })).toEqual([
      ['A/1 is too low in 3 relations more'],
      [],
    ]);
    expect(weigh(CONTAMINATED, { lower: facts('A/1', { otherAgree: 2 }) })).toEqual([
      [],
      ['A/1 agrees with 2 relations more'],
    ]);
  });
});

describe('heat', () => {
  const bed = (key: string, cmat_c: number | null, shallow = false) =>
    facts(key, { cmat_c, marks: shallow ? ['shallow burial'] : [] });
  const between = (lower: BedFacts, upper: BedFacts) => weigh(HEAT, { lower, upper });

  it('is weighed by burial, whichever bed it is', () => {
    expect(between(bed('A/1', null), bed('A/2', null, true))).toEqual([
      ['A/2 was buried shallowly, where summers are hot'],
      [],
    ]);
    expect(between(bed('A/1', null, true), bed('A/2', null))).toEqual([
      [],
      ['A/1, the bed with the lower ratio, is the one buried shallowly', 'both beds lie in one section'],
    ]);
  });

  it('is weighed by a temperature that differs by a degree or more', () => {
    expect(between(bed('A/1', 10), bed('B/2', 11))).toEqual([['B/2 lies where it is 1 °C warmer'], []]);
    expect(between(bed('A/1', 10), bed('B/2', 12.345))).toEqual([['B/2 lies where it is 2.3 °C warmer'], []]);
    expect(between(bed('A/1', 10), bed('B/2', 9))).toEqual([[], ['B/2 lies where it is 1 °C colder']]);
    for (const near of [9.1, 10, 10.9]) expect(between(bed('A/1', 10), bed('B/2', near))).toEqual([[], []]);
  });

  it('is weighed by the sections where temperatures are not known', () => {
    const unknown = ['they lie in two sections, whose temperatures are not given'];
    expect(between(bed('A/1', null), bed('B/2', null))).toEqual([unknown, []]);
    expect(between(bed('A/1', 10), bed('B/2', null))).toEqual([unknown, []]);
    expect(between(bed('A/1', null), bed('B/2', 10))).toEqual([unknown, []]);
    expect(between(bed('A/1', null), bed('A/2', null))).toEqual([[], ['both beds lie in one section']]);
    // within a section, too, what is known counts
    expect(between(bed('A/1', 10), bed('A/2', 13))).toEqual([['A/2 lies where it is 3 °C warmer'], []]);
  });
});

describe('the field relation', () => {
  const relation = (given: Partial<ReversedRelation['relation']>) =>
    ({ lower: 'A/1', upper: 'A/2', kind: 'older', basis: 'superposition', certainty: 'certain', ...given }) as const;

  it('is weighed by what it rests on', () => {
    expect(weigh(FIELD, {})).toEqual([[], []]);
    expect(weigh(FIELD, { relation: relation({ certainty: 'probable' }) })).toEqual([
      ['it was called probable only'],
      [],
    ]);
    const misjudged = (what: string) => [[`it rests on ${what}, which can be misjudged`], []];
    expect(weigh(FIELD, { relation: relation({ basis: 'marker' }) })).toEqual(misjudged('a marker'));
    expect(weigh(FIELD, { relation: relation({ basis: 'staircase' }) })).toEqual(misjudged('a staircase'));
    expect(weigh(FIELD, { relation: relation({ kind: 'same' }) })).toEqual(misjudged('a correlation'));
  });

  it('is weighed by all else that the two beds agree with', () => {
    const others = (lower: Partial<BedFacts>, upper: Partial<BedFacts>) =>
      weigh(FIELD, { lower: facts('A/1', lower), upper: facts('A/2', upper) });
    expect(others({ otherAgree: 1 }, { otherAgree: 1 })).toEqual([
      ['both beds agree with all else (2 relations), as they would with the two exchanged'],
      [],
    ]);
    expect(others({ otherAgree: 1 }, {})).toEqual([[], []]);
    expect(others({ otherAgree: 3, otherReversed: 1 }, { otherAgree: 3 })).toEqual([[], []]);
    expect(others({ otherAgree: 3 }, { otherAgree: 3, otherReversed: 1 })).toEqual([[], []]);
  });
});

describe('too few shells', () => {
  it('is weighed by means of fewer than 5 shells', () => {
    const beyond = 'the reversal is beyond chance after adjustment';
    const shells = (lower: number, upper: number) =>
      weigh(CHANCE, { lower: facts('A/1', { shells: lower }), upper: facts('A/2', { shells: upper }) });
    expect(shells(5, 6)).toEqual([[], [beyond, 'both means rest on 5 shells or more']]);
    expect(shells(4, 5)).toEqual([['the mean of A/1 rests on 4 shells'], [beyond]]);
    expect(shells(2, 1)).toEqual([['the mean of A/1 rests on 2 shells', 'the mean of A/2 rests on 1 shell'], [beyond]]);
  });
});

describe('readReversedRelation in words', () => {
  const base: ReversedRelation = {
    relation: { lower: 'A/1', upper: 'A/2', kind: 'older', basis: 'superposition', certainty: 'certain' },
    check: { difference: -0.3141, z: -5.231, p_reversed: 0.000321, verdict: 'reversed' },
    lower: facts('A/1', { shells: 3, otherAgree: 1, highSerine: 1, serineMeasured: 4 }),
    upper: facts('A/2', { otherReversed: 1 }),
    differences: [],
  };

  it('tells the relation, then each explanation, the best supported first and equals in the order of the design', () => {
    const { reading, sentences } = readReversedRelation(base);
    expect(reading).toBe(`best supported: ${REWORKED}`);
    expect(sentences).toEqual([
      'A/1 lies below A/2, but its mean log ratio is lower by 0.31 (5.2 standard errors, p = 0.00032).',
      'All shells of A/2 reworked from an older deposit: for it: A/2 is too high in 1 relation more; nothing known speaks against it.',
      'A/1 contaminated by younger amino acids: for it: serine is high in 1 of 4 of its shells; against it: A/1 agrees with 1 relation more.',
      'The field relation itself (overturned, slumped or mislabelled): nothing known speaks for it; nothing known speaks against it.',
      'Too few shells: for it: the mean of A/1 rests on 3 shells; against it: the reversal is beyond chance after adjustment.',
      'Different temperature history or shallow burial: nothing known speaks for it; against it: both beds lie in one section.',
    ]);
  });

  it('names all that are supported equally', () => {
    const upper = facts('A/2', { otherReversed: 1, marks: ['shallow burial'] });
    expect(readReversedRelation({ ...base, upper }).reading).toBe(`equally supported: ${REWORKED}; ${HEAT}`);
  });

  it('tells of a `same` relation which way it differs, and turns the beds to it', () => {
    const relation = { ...base.relation, kind: 'same', basis: 'marker' } as const;
    const lower = { ...base, relation, lower: facts('A/1'), upper: facts('A/2') };
    const { sentences } = readReversedRelation(lower);
    expect(sentences[0]).toBe(
      'A/1 and A/2 are said to be of one age, but their mean log ratios differ by 0.31 (5.2 standard errors).',
    );
    const names = (difference: number | null) =>
      readReversedRelation({ ...lower, check: { ...base.check, difference } }).explanations.map(({ name }) => name);
    expect(names(-0.3)).toContain(REWORKED);
    expect(names(0.3)).toContain('all shells of A/1 reworked from an older deposit');
    expect(names(0.3)).toContain('A/2 contaminated by younger amino acids');
    expect(names(null)).toContain(REWORKED);
  });

  it('does without a difference', () => {
    const check = { difference: null, z: null, p_reversed: null, verdict: 'reversed' } as const;
    expect(readReversedRelation({ ...base, check }).sentences[0]).toBe(
      'A/1 lies below A/2, but its mean log ratio is lower by 0 (0 standard errors, p = 1).',
    );
  });
});
