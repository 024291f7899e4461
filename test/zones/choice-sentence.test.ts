import { describe, expect, it } from 'vitest';
import { type Comparison, type Criteria, choiceSentence } from '../../src/zones/index.js';

const base: Criteria = {
  verdict: 'zones',
  zones: 3,
  forced: null,
  byBic: 3,
  continuumByBic: false,
  beforeJoining: 3,
  byGap: 3,
  bySilhouette: 3,
  comparisons: [],
};
const test = (own: Partial<Comparison>): Comparison => {
  return { of: 'any', simpler: 'continuum', zones: 3, statistic: 12, p: 0.0123, level: 0.05, repeats: 199, ...own };
};
const say = (own: Partial<Criteria>) => choiceSentence({ ...base, ...own });
const SUPPORT = 'The data support 3 zones.';
const ALL = 'BIC, the gap statistic and the silhouette agree.';
const AGAIN = 'A bootstrap that makes the whole choice again in samples without zones';

describe('choiceSentence, word for word', () => {
  it('says what is supported', () => {
    expect(say({})).toBe(`${SUPPORT} ${ALL}`);
    expect(say({ verdict: 'one zone', zones: 1, byBic: 1, byGap: 1, bySilhouette: 2, beforeJoining: 1 })).toBe(
      'The data support no division into zones: one zone explains all beds. BIC and the gap statistic agree.',
    );
    expect(say({ verdict: 'continuum', zones: 1, continuumByBic: true, byGap: 2, beforeJoining: 1 })).toBe(
      'The data support no zones: the beds spread evenly over their range. BIC agrees. The gap statistic prefers 2 zones.',
    );
    expect(say({ verdict: 'too few beds', zones: 1, byBic: 1 })).toBe('There are too few beds to look for zones.');
    expect(say({ verdict: 'too few beds', forced: 1 })).toBe(
      'There are too few beds to look for zones. One zone is used, as you asked.',
    );
  });

  it('passes over what is not to be had, and says nothing of agreement where nobody agrees', () => {
    expect(say({ byGap: null, bySilhouette: null })).toBe(`${SUPPORT} BIC agrees.`);
    expect(say({ byBic: 4, byGap: 1, bySilhouette: 2 })).toBe(
      `${SUPPORT} BIC prefers 4 zones. The gap statistic prefers one zone. The silhouette prefers 2 zones.`,
    );
    expect(say({ continuumByBic: true, byGap: null })).toBe(
      `${SUPPORT} The silhouette agrees. BIC prefers a continuum.`,
    );
  });

  it('tells of neighbours that were joined, in zones only', () => {
    const joined = 'Neighbours that the overlap test does not tell apart were joined.';
    expect(say({ beforeJoining: 4 })).toBe(`${SUPPORT} ${ALL} ${joined}`);
    expect(say({ beforeJoining: 3 })).not.toContain(joined);
    expect(say({ verdict: 'one zone', zones: 1, beforeJoining: 2 })).not.toContain(joined);
  });

  it('tells what decided whether there are zones', () => {
    expect(say({ comparisons: [test({})] })).toBe(
      `${SUPPORT} ${ALL} ${AGAIN} finds a continuum (p = 0.012, 199 simulations) unlikely.`,
    );
    expect(say({ comparisons: [test({}), test({ simpler: '1', p: 0.00012, repeats: 999 })] })).toBe(
      `${SUPPORT} ${ALL} ${AGAIN} finds a continuum (p = 0.012, 199 simulations) and one zone (p = 1e-4, 999 simulations) unlikely.`,
    );
    expect(say({ byBic: 1, comparisons: [test({ p: 0.05 })] })).toContain(
      `${AGAIN} finds a continuum (p = 0.05, 199 simulations) unlikely, and decides for zones.`,
    );
    expect(say({ continuumByBic: true, comparisons: [test({ p: 0.001 })] })).toContain(
      'finds a continuum (p = 0.001, 199 simulations) unlikely, and decides for zones.',
    );
    const none = { verdict: 'one zone', zones: 1, byGap: 1, beforeJoining: 1 } as const;
    expect(say({ ...none, comparisons: [test({}), test({ simpler: '1', p: 0.051 })] })).toBe(
      `The data support no division into zones: one zone explains all beds. The gap statistic agrees. BIC prefers 3 zones. ${AGAIN} does not rule out one zone (p = 0.051, 199 simulations), so no zones are taken.`,
    );
    expect(say({ ...none, byBic: 1, comparisons: [test({ p: Number.NaN })] })).toContain(
      `${AGAIN} does not rule out a continuum (p = NaN, 199 simulations).`,
    );
  });

  it('tells of one number of zones against another', () => {
    const these = (own: Partial<Comparison>) => say({ comparisons: [test({ of: 'these', simpler: '2', ...own })] });
    const gives = 'gives p = 0.012, 199 simulations';
    expect(these({})).toBe(`${SUPPORT} ${ALL} A bootstrap of 3 zones against 2 zones ${gives}.`);
    expect(these({ simpler: 'continuum' })).toContain(`A bootstrap of 3 zones against a continuum ${gives}.`);
    expect(these({ simpler: '1', zones: 2 })).toContain(`A bootstrap of 2 zones against one zone ${gives}.`);
    const simpler =
      'A bootstrap of 4 zones against 3 zones gives p = 0.012, 199 simulations; BIC asks for more, so the simpler stands.';
    expect(these({ simpler: '3', zones: 4 })).toContain(simpler);
    expect(these({ simpler: '3', zones: 4, p: 0.05, level: 0.05 })).toContain('so the simpler stands');
    expect(these({ simpler: '3', zones: 4, p: 0.06, level: 0.05 })).not.toContain('so the simpler stands');
    expect(these({ simpler: '2', zones: 4 })).not.toContain('so the simpler stands');
  });

  it('closes with the number that was asked for', () => {
    expect(say({ forced: 5 })).toBe(`${SUPPORT} ${ALL} 5 zones are used, as you asked.`);
    expect(say({ forced: 1 })).toBe(`${SUPPORT} ${ALL} One zone is used, as you asked.`);
  });
});
