import { describe, expect, it } from 'vitest';
import type { ScreeningMark } from '../../src/model/index.js';
import { type ShellCase, shellEvidence } from '../../src/superposition/shell-evidence.js';

const own = { residual: 0.3, t: 4.126, others: 6, p: 0.0000123, adjusted: 0.002, odd: true };
const plain: ShellCase = {
  ratio: 0.31249,
  own: { residual: 0.01, t: 0.2, others: 6, p: 0.84, adjusted: 1, odd: false },
  tested: 40,
  direction: 'within',
  reading: 'none',
  agreement: null,
  agree: null,
  aminoAcids: ['Asx', 'Glx', 'Val'],
  marks: [],
  match: null,
  zoned: false,
  ownZone: null,
  sourceBed: null,
  asLower: 0,
  asUpper: 0,
  cut: 'none',
  wholeBed: false,
  crowded: false,
};
const high: ShellCase = { ...plain, own, direction: 'high', reading: 'reworked or altered' };
const low: ShellCase = {
  ...plain,
  own: { ...own, residual: -0.3, t: -4.126 },
  direction: 'low',
  reading: 'intruded or contaminated',
};
const serine = {
  mark: 'high serine',
  evidence: 'serine is 3 times that of its neighbours',
} as unknown as ScreeningMark;
const zone = (name: string) => ({ name, mean: -1, sd: 0.02, weight: 0.5 });
const match = { zone: zone('Z3'), probability: 0.98765, distance: 0.2 };
const missing = 'With amino acids missing on it, or too few complete shells to learn from,';
const apart = `${missing} reworking and alteration can't be told apart.`;
const opening =
  'Its ratio of 0.312 lies 35 % above the mean of the 6 other sound shells of its bed (4.13 standard errors, p = 0.000012; adjusted for 40 shells p = 0.002).';

describe('shellEvidence', () => {
  it('is silent of a shell that fits everywhere', () => {
    expect(shellEvidence(plain)).toEqual([]);
    expect(shellEvidence({ ...plain, crowded: true, own: { ...plain.own, others: 0 } })).toEqual([]);
  });

  it('begins with the own bed: how far, which way, against how many, and how sure', () => {
    expect(shellEvidence(high)).toEqual([opening, apart]);
    expect(shellEvidence(low)[0]).toBe(
      'Its ratio of 0.312 lies 25.9 % below the mean of the 6 other sound shells of its bed (4.13 standard errors, p = 0.000012; adjusted for 40 shells p = 0.002).',
    );
    expect(shellEvidence({ ...high, own: { ...own, p: 9e-7, adjusted: null } })[0]).toBe(
      'Its ratio of 0.312 lies 35 % above the mean of the 6 other sound shells of its bed (4.13 standard errors, p under 0.000001).',
    );
    expect(shellEvidence({ ...high, own: { ...own, p: 1e-6, adjusted: null } })[0]).toContain('p = 0.000001)');
    for (const unknown of ['residual', 't', 'p'])
      expect(shellEvidence({ ...high, own: { ...own, [unknown]: null } })[0]).toBe('Its ratio is 0.312.');
  });

  it('says that one neighbour, or none, cannot tell', () => {
    expect(shellEvidence({ ...high, own: { ...own, others: 1 } })).toEqual([
      'Its ratio of 0.312 lies 35 % above the one other sound shell of its bed (4.13 standard errors, p = 0.000012; adjusted for 40 shells p = 0.002).',
      apart,
      'Its bed has one other shell only, so the bed cannot tell which of the two is the odd one.',
    ]);
    expect(shellEvidence({ ...high, own: { ...own, residual: null, others: 0 } })).toEqual([
      'Its ratio is 0.312.',
      apart,
      'It has no other sound shell beside it, so its own bed cannot say whether it belongs.',
    ]);
  });

  it('tells what screening found, and nothing of amino acids where the reading needs none', () => {
    const fine =
      'Its ratio of 0.312 lies 1.01 % above the mean of the 6 other sound shells of its bed (0.2 standard errors, p = 0.84; adjusted for 40 shells p = 1).';
    const told = 'Screening: serine is 3 times that of its neighbours.';
    expect(shellEvidence({ ...plain, marks: [serine] })).toEqual([fine, told]);
    expect(
      shellEvidence({ ...plain, marks: [serine], reading: 'contaminated by younger amino acids', sourceBed: 'A/2' }),
    ).toEqual([fine, told, `${missing} intrusion and contamination can't be told apart.`]);
  });

  it('says what the amino acids can decide', () => {
    const second = (shell: ShellCase) => shellEvidence(shell)[1];
    expect(second({ ...high, aminoAcids: ['Ile'] })).toBe(
      "With one amino acid measured, reworking and alteration can't be told apart.",
    );
    expect(second({ ...high, reading: 'altered' })).toBe(apart);
    expect(second(low)).toBe(`${missing} intrusion and contamination can't be told apart.`);
    const deviations = [0.5, -3.456, Number.NaN];
    expect(second({ ...high, agree: true, agreement: { p: 0.4321, deviations } })).toBe(
      'Its 2 amino acids tell the same extent of racemization (p = 0.43).',
    );
    expect(second({ ...high, agree: false, agreement: { p: 0.001, deviations } })).toBe(
      'Its 2 amino acids disagree (p = 0.001): Glx stands out, too low by 3.46 standard deviations for the rest.',
    );
    expect(second({ ...high, agree: false, agreement: { p: 0.001, deviations: [Number.NaN, 1, 5] } })).toBe(
      'Its 2 amino acids disagree (p = 0.001): Val stands out, too high by 5 standard deviations for the rest.',
    );
  });

  it('names a bed from which the shell may come where there are no zones, or the amino acids disagree', () => {
    const below = 'It would fit in A/1, which lies below its bed.';
    expect(shellEvidence({ ...high, sourceBed: 'A/1' })).toEqual([opening, apart, below]);
    expect(shellEvidence({ ...low, sourceBed: 'A/4' })[2]).toBe('It would fit in A/4, which lies above its bed.');
    const disagree = { ...high, zoned: true, match, agree: false, agreement: { p: 0.001, deviations: [3, 0, 0] } };
    expect(shellEvidence(disagree)).toHaveLength(2);
    expect(shellEvidence({ ...disagree, sourceBed: 'A/1' })[2]).toBe(below);
  });

  it('names the zone that the ratio fits, or that it fits none', () => {
    const third = (shell: Partial<ShellCase>) => shellEvidence({ ...high, zoned: true, ...shell })[2];
    expect(third({})).toBe(
      'Its ratio fits no zone: an older deposit that the survey does not hold, or something else.',
    );
    expect(third({ direction: 'low' })).toBe(
      'Its ratio fits no zone: a younger deposit that the survey does not hold, or something else.',
    );
    expect(third({ match, ownZone: 'Z1' })).toBe('Its ratio fits Z3 (probability 0.988), not Z1, the zone of its bed.');
    expect(third({ match })).toBe('Its ratio fits Z3 (probability 0.988).');
    expect(third({ match, ownZone: 'Z3' })).toBe(
      'Its ratio still fits Z3, the zone of its own bed (probability 0.988).',
    );
    expect(third({ match, ownZone: 'Z1', sourceBed: 'A/1' })).toBe(
      'Its ratio fits Z3 (probability 0.988), not Z1, the zone of its bed. It would fit in A/1, which lies below its bed.',
    );
    expect(third({ match, ownZone: 'Z3', sourceBed: 'A/1' })).toMatch(
      /0\.988\)\. It would fit in A\/1, which lies below/,
    );
  });

  it('tells of superposition, and what giving up the fewest shells says', () => {
    const rest = (shell: Partial<ShellCase>) => shellEvidence({ ...plain, ...shell }).slice(1);
    const blame = 'No least costly set of shells that would remove all conflicts holds it: other shells are to blame.';
    expect(rest({ asLower: 1 })).toEqual([
      'It is lower than 1 shell of beds above it by more than chance allows.',
      blame,
    ]);
    expect(rest({ asUpper: 2 })).toEqual([
      'It is higher than 2 shells of beds below it by more than chance allows.',
      blame,
    ]);
    expect(rest({ asUpper: 2, cut: 'all' })[1]).toBe(
      'Every least costly set of shells that would remove all conflicts holds it.',
    );
    expect(rest({ asLower: 2, cut: 'some' })[1]).toBe(
      'Some, but not all, of the least costly sets of shells that would remove all conflicts hold it: another shell could be to blame instead.',
    );
    expect(rest({ asLower: 2, cut: 'all', wholeBed: true })[1]).toBe(
      'Its bed as a whole contradicts superposition: that is a matter of the bed or of the relation, not of this shell.',
    );
  });

  it('says that a crowded bed sets nothing aside for its ratio alone', () => {
    expect(shellEvidence({ ...high, crowded: true })).toEqual([
      opening,
      apart,
      'More than a third of the shells of this bed stand apart, so the bed may be of mixed age and none is set aside for its ratio alone.',
    ]);
  });
});
