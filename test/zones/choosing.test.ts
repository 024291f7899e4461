import { describe, expect, it } from 'vitest';
import { createRandom } from '../../src/statistics/index.js';
import {
  bootstrapLead,
  bootstrapLikelihoodRatio,
  type Comparison,
  choiceSentence,
  chooseModel,
  gapOf,
  gapStatistic,
  groupsByGap,
  meanSilhouette,
  partitionCosts,
  settleChoice,
} from '../../src/zones/index.js';
import { beds, inPlace } from './drawn-beds.js';

describe('chooseModel', () => {
  it('chooses the zones that are there, one zone, or the continuum', () => {
    const three = beds([-2, -1.7, -1.4], 8, 1);
    expect(chooseModel(three.values, three.errors)).toMatchObject({ bestZones: 3, verdict: 'zones' });
    const one = beds([-2], 20, 2);
    expect(chooseModel(one.values, one.errors).verdict).toBe('one zone');
    const random = createRandom(3);
    const even = Array.from({ length: 40 }, () => -2 + 0.8 * random.uniform());
    expect(
      chooseModel(
        even,
        even.map(() => 0.02),
      ).verdict,
    ).toBe('continuum');
  });

  it('says that two beds are too few', () => {
    expect(chooseModel([-2, -1], [0.02, 0.02]).verdict).toBe('too few beds');
  });

  it('does not hang on the order of the beds', () => {
    const { values, errors } = beds([-2, -1.7], 8, 4);
    const forward = chooseModel(values, errors);
    const backward = chooseModel([...values].reverse(), [...errors].reverse());
    forward.bics.forEach((value, at) => {
      expect(backward.bics[at]).toBeCloseTo(value, 5);
    });
  });
});

describe('settleChoice', () => {
  it('runs nothing where BIC is clear', async () => {
    const { values, errors } = beds([-2, -1.7, -1.4], 10, 1);
    const { map, count } = inPlace();
    const choice = chooseModel(values, errors);
    const settled = await settleChoice(choice, values, errors, { alpha: 0.05, seed: 1, map });
    expect(settled.choice).toEqual(choice);
    expect(count.repeats).toBe(0);
  });

  it('gives the same leads however the repeats are shared out', () => {
    const common = { errors: Array.from({ length: 12 }, () => 0.02), seed: 5 };
    const rival = { kind: 'continuum' as const, low: -2, high: -1.5 };
    const whole = bootstrapLead({ ...common, rival, first: 0, repeats: 10 });
    const parts = [0, 5].flatMap((first) => bootstrapLead({ ...common, rival, first, repeats: 5 }));
    expect(parts).toEqual(whole);
  });

  it('gives the same result however the repeats are shared out', () => {
    const common = {
      errors: Array.from({ length: 12 }, () => 0.02),
      simpler: { kind: 'continuum' as const, low: -2, high: -1.5 },
      zones: 2,
      seed: 5,
    };
    const whole = bootstrapLikelihoodRatio({ ...common, first: 0, repeats: 10 });
    const parts = [0, 5].flatMap((first) => bootstrapLikelihoodRatio({ ...common, first, repeats: 5 }));
    expect(parts).toEqual(whole);
  });
});

describe('gapStatistic', () => {
  it('finds well parted groups, and one group in even values', () => {
    const { values } = beds([-2, -1.2, -0.3], 10, 3);
    const options = { seed: 1 };
    expect(
      groupsByGap(
        gapStatistic(
          values,
          values.map(() => 1),
          options,
        ),
      ),
    ).toBe(3);
    const random = createRandom(8);
    const even = Array.from({ length: 50 }, () => random.uniform());
    expect(
      groupsByGap(
        gapStatistic(
          even,
          even.map(() => 1),
          options,
        ),
      ),
    ).toBe(1);
  });

  it('gives no gap where nothing scatters', () => {
    expect(gapStatistic([-1, -1], [1, 1], { seed: 1 })).toEqual([{ gap: null, se: null }]);
    expect(groupsByGap([{ gap: null, se: null }])).toBeNull();
  });

  it('takes very many even values by lots, and is what every cut would give', () => {
    const random = createRandom(5);
    const values = Array.from({ length: 2400 }, (_, i) => -2 + 0.3 * (i % 4) + 0.01 * random.normal());
    const weights = values.map(() => 0.5 + random.uniform());
    const low = Math.min(...values);
    const range = Math.max(...values) - low;
    const references = Array.from({ length: 6 }, (_, at) => {
      const own = createRandom(9).fork(at);
      return partitionCosts(
        values.map(() => low + range * own.uniform()),
        weights,
        6,
      );
    });
    const exact = gapOf(partitionCosts(values, weights, 6), references);
    const lots = gapStatistic(values, weights, { seed: 9, most: 6, references: 6 });
    expect(lots).not.toEqual(exact);
    lots.forEach(({ gap, se }, at) => {
      expect(Math.abs(gap! - exact[at].gap!)).toBeLessThan(0.02 * exact[at].se!);
      expect(se! / exact[at].se!).toBeCloseTo(1, 2);
    });
    expect(groupsByGap(lots)).toBe(4);
  });

  it('is unmoved by a change of scale', () => {
    const { values } = beds([-2, -1.2], 8, 3);
    const gaps = gapStatistic(
      values,
      values.map(() => 1),
      { seed: 1 },
    );
    const other = gapStatistic(
      values.map((v) => 5 * v - 2),
      values.map(() => 7),
      { seed: 1 },
    );
    gaps.forEach(({ gap }, at) => {
      expect(other[at].gap).toBeCloseTo(gap!, 8);
    });
  });
});

describe('meanSilhouette', () => {
  it('agrees with all distances taken one by one', () => {
    const random = createRandom(4);
    const values = Array.from({ length: 40 }, () => random.normal());
    const labels = values.map(() => random.integer(4));
    const mean = (from: number, group: number) => {
      const others = values.filter((_, at) => labels[at] === group && at !== from);
      return others.reduce((sum, other) => sum + Math.abs(values[from] - other), 0) / others.length;
    };
    const direct = values.map((_, at) => {
      const a = mean(at, labels[at]);
      const b = Math.min(...[0, 1, 2, 3].filter((group) => group !== labels[at]).map((group) => mean(at, group)));
      return (b - a) / Math.max(a, b);
    });
    expect(meanSilhouette(values, labels)).toBeCloseTo(direct.reduce((sum, v) => sum + v, 0) / 40, 10);
  });

  it('is null with one group, counts a lone bed as 0, and refuses lists of two lengths', () => {
    expect(meanSilhouette([1, 2], [0, 0])).toBeNull();
    expect(meanSilhouette([1, 5], [0, 1])).toBe(0);
    expect(() => meanSilhouette([1], [0, 1])).toThrow(RangeError);
  });
});

describe('choiceSentence', () => {
  const any = (own: Partial<Comparison>): Comparison => ({
    of: 'any',
    simpler: 'continuum',
    zones: 3,
    statistic: 12,
    p: 0.012,
    level: 0.025,
    repeats: 199,
    ...own,
  });
  const criteria = {
    verdict: 'zones' as const,
    zones: 3,
    forced: null,
    byBic: 3,
    continuumByBic: false,
    beforeJoining: 3,
    byGap: 2,
    bySilhouette: 3,
    comparisons: [],
  };

  it('names who agrees and who does not', () => {
    expect(choiceSentence(criteria)).toBe(
      'The data support 3 zones. BIC and the silhouette agree. The gap statistic prefers 2 zones.',
    );
  });

  it('tells of bootstraps, of joined neighbours and of the number asked for', () => {
    const comparisons = [any({ simpler: 'continuum' }), any({ simpler: '1', p: 0.0004, repeats: 4999 })];
    expect(choiceSentence({ ...criteria, comparisons })).toContain(
      'A bootstrap that makes the whole choice again in samples without zones finds a continuum (p = 0.012, 199 simulations) and one zone (p = 4e-4, 4999 simulations) unlikely.',
    );
    const more = { ...any({ simpler: '2' }), of: 'these' as const };
    expect(choiceSentence({ ...criteria, comparisons: [more] })).toContain(
      'A bootstrap of 3 zones against 2 zones gives p = 0.012, 199 simulations.',
    );
    expect(choiceSentence({ ...criteria, byBic: 4, beforeJoining: 4 })).toContain('were joined');
    expect(choiceSentence({ ...criteria, forced: 5 })).toContain('5 zones are used, as you asked.');
  });

  it('says what decided where BIC and a bootstrap differ', () => {
    const against = { ...criteria, continuumByBic: true, comparisons: [any({})] };
    expect(choiceSentence(against)).toBe(
      'The data support 3 zones. The silhouette agrees. BIC prefers a continuum. The gap statistic prefers 2 zones. A bootstrap that makes the whole choice again in samples without zones finds a continuum (p = 0.012, 199 simulations) unlikely, and decides for zones.',
    );
    const none = { ...criteria, verdict: 'continuum' as const, zones: 1, beforeJoining: 1 };
    expect(choiceSentence({ ...none, comparisons: [any({ p: 0.2 })] })).toContain(
      'BIC prefers 3 zones. The gap statistic prefers 2 zones. A bootstrap that makes the whole choice again in samples without zones does not rule out a continuum (p = 0.2, 199 simulations), so no zones are taken.',
    );
  });

  it('says that none are supported', () => {
    const none = choiceSentence({ ...criteria, verdict: 'continuum', zones: 1, continuumByBic: true });
    expect(none).toContain('The data support no zones');
    expect(none).not.toContain('silhouette');
  });
});
