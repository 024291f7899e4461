import { describe, expect, it } from 'vitest';
import { createRandom, holm, studentTCdf } from '../../src/statistics/index.js';
import {
  type Agreement,
  aminoAcidAgreement,
  type BedMean,
  checkRelations,
  checkSections,
  mixedAgeBeds,
  type OwnBedResidual,
  ownBedResiduals,
  type RelationToCheck,
  robustScatter,
} from '../../src/superposition/index.js';

// Numbers of small examples to eight digits. What they should be like is held against definitions and simulations in the
// other files; they were computed with this code once those had passed, and say that it still gives the same.
const close = (value: number | null) => (value === null ? null : expect.closeTo(value, 8));
const beds = [[-1.02, -0.98, -1.05, -1.0], [-1.5, -1.46, -1.51], [-1.3], [], [-1.2, -1.24, -0.7, -1.22, -1.19]];
const shells = beds.flatMap((values, bed) => values.map((x) => ({ bed, x })));

describe('robustScatter', () => {
  it('weighs down the one odd shell of thirteen', () => {
    const { s, df, means } = robustScatter(beds);
    expect(s).toBeCloseTo(0.02665968418275393, 8);
    expect(df).toBeCloseTo(5.397209626913161, 6);
    const wanted = [-1.0124816509843055, -1.4900179046780062, -1.3, Number.NaN, -1.212494057972839];
    wanted.forEach((mean, bed) => {
      if (Number.isNaN(mean)) expect(means[bed]).toBeNaN();
      else expect(means[bed]).toBeCloseTo(mean, 8);
    });
  });

  it('takes scatter below the rounding of tables for rounding', () => {
    expect(robustScatter([[-1, -1, -1, -1, -1], [-2, -2, -2], [-1]])).toMatchObject({ s: 1e-6, means: [-1, -2, -1] });
    // two shells of one bed are worth one degree of freedom at most
    expect(robustScatter([[-1, -1.05]]).df).toBeLessThanOrEqual(1);
    expect(robustScatter([[-1, -1.05]]).df).toBeGreaterThan(0.9);
  });
});

describe('ownBedResiduals', () => {
  const residual = (given: readonly [number | null, number | null, number, number | null, number | null, boolean]) => {
    const [own, t, others, p, adjusted, odd] = given;
    return { residual: close(own), t: close(t), others, p: close(p), adjusted: close(adjusted), odd };
  };

  it('holds each shell against the other sound ones of its bed', () => {
    const found = ownBedResiduals(shells);
    const wanted = [
      [-0.01, -0.3248445847474325, 3, 0.7575159711163627, 1, false],
      [0.043333333333333446, 1.4076598672388765, 3, 0.2141358185458407, 1, false],
      [-0.05, -1.6242229237371624, 3, 0.1609475095853768, 1, false],
      [0.016666666666666607, 0.5414076412457184, 3, 0.6098239375214709, 1, false],
      [-0.015, -0.4593996174132787, 2, 0.6638626948602319, 1, false],
      [0.045, 1.3781988522398225, 2, 0.22254163103883343, 1, false],
      [-0.03, -0.9187992348265506, 2, 0.3974036262774, 1, false],
      [null, null, 0, null, null, false],
      [0.016666666666666607, 0.5414076412457184, 3, 0.6098239375214709, 1, false],
      [-0.036666666666666625, -1.1910968107405835, 3, 0.28334840511654613, 1, false],
      [0.5125, 17.194274780043738, 4, 0.000006393200185544924, 0.00007671840222653908, true],
      [-0.01, -0.3248445847474325, 3, 0.7575159711163627, 1, false],
      [0.03, 0.9745337542422975, 3, 0.371421527645996, 1, false],
    ] as const;
    expect(found.shells).toEqual(wanted.map(residual));
    expect(found.tested).toBe(12);
    expect(found.s).toBeCloseTo(0.02665968418275393, 8);
    expect(found.means.map((mean) => (Number.isNaN(mean) ? null : mean))).toEqual(
      [-1.0125, -1.49, -1.3, null, -1.2125].map(close),
    );
  });

  it('tests shells that were screened out, but not by each other', () => {
    const found = ownBedResiduals(shells, new Set([0, 10]));
    expect(found.s).toBeCloseTo(0.028326322735781194, 8);
    expect(found.df).toBeCloseTo(4.469446173260241, 6);
    expect([0, 1, 10].map((at) => found.shells[at])).toEqual([
      residual([-0.01, -0.3057316729257254, 3, 0.7735283671878335, 1, false]),
      residual([0.045, 1.297109634895725, 2, 0.25750523210196746, 1, false]),
      residual([0.5125, 16.182613594542705, 4, 0.000038742002537493296, 0.00046490403044991953, true]),
    ]);
    expect(found.means[0]).toBeCloseTo(-1.01, 12);
  });

  it('takes the scatter it is given where its own is worth under 2 degrees of freedom, and the level it is given', () => {
    const few = [0, 0.05, 0.4].map((x) => ({ bed: 0, x }));
    const fallback = { s: 0.1, df: 12 };
    const found = ownBedResiduals(few, new Set(), { fallback });
    expect(found).toMatchObject({ s: 0.1, df: 12, tested: 3 });
    // (0.4 − 0.025) / (0.1 √1.5), two-sided with 12 degrees of freedom, three shells
    const t = 0.375 / (0.1 * Math.sqrt(1.5));
    const last: OwnBedResidual = found.shells[2];
    expect(last.t).toBeCloseTo(t, 10);
    expect(last.adjusted).toBeCloseTo(3 * last.p!, 12);
    expect(last.odd).toBe(true);
    expect(ownBedResiduals(few, new Set(), { fallback, alpha: last.adjusted! - 1e-9 }).shells[2].odd).toBe(false);
    expect(ownBedResiduals(few, new Set(), { fallback: { s: 0, df: 3 } }).shells[2]).toMatchObject({
      t: null,
      p: null,
    });
    expect(ownBedResiduals(few, new Set(), { fallback: { s: 1, df: 0 } }).shells[2]).toMatchObject({
      t: null,
      p: null,
    });
  });
});

describe('ownBedResiduals of many shells', () => {
  const random = createRandom(71);
  const shells = Array.from({ length: 2400 }, (_, i) => ({ bed: i % 300, x: 0.05 * random.normal() }));
  /** p of every shell from its t, and Holm over all of them: nothing is left out. */
  const inFull = ({ shells: found, df }: ReturnType<typeof ownBedResiduals>) => {
    const p = found.map(({ t }) => 2 * studentTCdf(-Math.abs(t!), df));
    return { p, adjusted: holm(p) };
  };

  it.each([
    ['a few of which are odd', 30],
    ['most of which are odd', 1700],
  ])('gives the p and the levels that all of them together give, %s', (_, odd) => {
    const mixed = shells.map(({ bed, x }, i) => ({ bed, x: i < odd ? x + (i % 2 === 0 ? 0.6 : -0.6) : x }));
    const found = ownBedResiduals(mixed);
    const { p, adjusted } = inFull(found);
    expect(found.tested).toBe(2400);
    found.shells.forEach((shell, i) => {
      expect(shell.p).toBe(p[i]);
      expect(shell.adjusted).toBe(adjusted[i]);
      expect(found.p(i)).toBe(p[i]);
      expect(found.apart(i)).toBe(p[i] <= 0.01);
    });
    const said = found.shells.filter((shell) => shell.odd).length;
    expect(said).toBeGreaterThan(25);
    expect(said).toBeLessThan(odd + 1);
  });
});

describe('aminoAcidAgreement', () => {
  const random = createRandom(5);
  const weights = [0.4, 0.3, 0.2, 0.1];
  const bed: number[] = [];
  const rows: number[][] = [];
  for (let b = 0; b < 9; b++) {
    for (let i = 0; i < 5; i++) {
      const extent = -2 + 0.15 * b + 0.05 * random.normal();
      rows.push([1.3, 0.8, 1, 0.5].map((slope, a) => slope * extent - 0.1 * a + 0.03 * random.normal()));
      bed.push(b);
    }
  }
  rows[7][3] += 0.4;
  const x = rows.map((row) => row.reduce((sum, value, a) => sum + weights[a] * value, 0));
  const answer = (p: number, ...deviations: number[]) => ({ p: close(p), deviations: deviations.map(close) });

  it('takes each amino acid along its curve where beds span enough', () => {
    const found = aminoAcidAgreement(rows, x, bed, weights);
    expect([0, 7, 20, 44].map((at) => found[at])).toEqual([
      answer(0.5998794446598141, -1.0236222299445281, 1.0055451438124317, 0.822603940867088, 0),
      answer(1.6578530024530364e-13, -2.299285295193555, -0.6885959872897607, -1.2790777247550034, 13.225976116326876),
      answer(0.40787172822881557, 0.49498403455536943, -0.8190594435601675, 0.7818169686591135, -1.3213359025400744),
      answer(0.24936424541118538, 0, -1.6062995006383336, 0.9731801153606332, 1.028468863282421),
    ]);
  });

  it('takes a step of one for one where beds are few', () => {
    const some = rows.filter((_, at) => bed[at] < 4);
    const found = aminoAcidAgreement(some, x.slice(0, 20), bed.slice(0, 20), weights);
    expect([0, 7, 19].map((at) => found[at])).toEqual([
      answer(0.49532174691026165, -1.265499499620598, 1.8016054965161592, 0.7788500813627734, 0.6405836057776377),
      answer(0.0005731399141062688, -1.3560452158223368, 0.26898973969370915, -1.6236595637695632, 3.452296230222058),
      answer(0.3208524281700212, 0.8792791375253368, -0.5470931080898106, 0.3752897113985976, -1.4381060337371339),
    ]);
  });

  it('needs ten complete shells more than amino acids', () => {
    const known = (count: number) =>
      aminoAcidAgreement(rows.slice(0, count), x.slice(0, count), bed.slice(0, count), weights).every(
        (one: Agreement | null) => one !== null,
      );
    expect(known(14)).toBe(true);
    expect(known(13)).toBe(false);
    // a shell without x takes no part
    const lost = aminoAcidAgreement(rows.slice(0, 15), [Number.NaN, ...x.slice(1, 15)], bed.slice(0, 15), weights);
    expect(lost.map((one) => one === null)).toEqual(lost.map((_, at) => at === 0));
  });
});

describe('checkSections', () => {
  it('gives the distance from order and its chance with the degrees of freedom of the scatter', () => {
    const section = (name: string, list: readonly (readonly [number, number])[], down = false) => ({
      section: name,
      beds: list.map(([mean, se], at) => ({ rank: down ? 10 - at : at, mean, se })),
    });
    const sections = [
      section('A', [
        [-0.9, 0.1],
        [-0.5, 0.1],
        [-0.7, 0.1],
      ]),
      section('B', [
        [-0.9, 0.1],
        [-0.5, 0.2],
        [-0.45, 0.05],
        [-0.6, 0.1],
      ]),
      section(
        'C',
        [
          [-0.6, 0.2],
          [-0.5, 0.2],
          [-0.9, 0.2],
        ],
        true,
      ),
    ];
    const check = (name: string, count: number, statistic: number, p: number, verdict: string, fitted: number[]) => {
      const common = { section: name, beds: count, verdict, fitted: fitted.map(close) };
      return { ...common, statistic: close(statistic), p_order: close(p) };
    };
    const fit = -0.5380952380952381;
    expect(checkSections(sections, createRandom(3), { df: 14 })).toEqual([
      check('A', 3, 8, 0.020944203409050146, 'inconsistent', [-0.7, -0.7, -0.7]),
      check('B', 4, 16.238095238095237, 0.005191513422642989, 'inconsistent', [fit, fit, fit, -0.6]),
      check('C', 3, 2.166666666666667, 0.2042844921421746, 'consistent', [-2 / 3, -2 / 3, -2 / 3]),
    ]);
    // adjusted over the sections: 3 p of B is above 0.01, 2 p of A above 0.04
    const verdicts = (alpha: number) =>
      checkSections(sections, createRandom(3), { df: 14, alpha }).map((c) => c.verdict);
    expect(verdicts(0.04)).toEqual(['consistent', 'inconsistent', 'consistent']);
    expect(verdicts(0.01)).toEqual(['consistent', 'consistent', 'consistent']);
  });

  it('pools beds of one level by their errors, and passes over those without one', () => {
    const pair = [
      { rank: 1, mean: -0.6, se: 0.1 },
      { rank: 1, mean: -0.9, se: 0.2 },
      { rank: 2, mean: -0.5, se: 0.1 },
      { rank: 3, mean: -0.1, se: 0 },
      { rank: 4, mean: Number.NaN, se: 0.1 },
    ];
    const [found] = checkSections([{ section: 'A', beds: pair }], createRandom(1));
    // levels of −0.66 (weight 125) and −0.5 (weight 100): pooled to −133/225
    expect(found.beds).toBe(3);
    expect(found.fitted.slice(0, 3)).toEqual([-132.5 / 225, -132.5 / 225, -132.5 / 225].map(close));
    expect(found.fitted.slice(3).every(Number.isNaN)).toBe(true);
    expect(found.statistic).toBeCloseTo(0.16 ** 2 / (1 / 125 + 1 / 100), 10);
  });

  it('refuses in words', () => {
    const check = (options: Parameters<typeof checkSections>[2]) => () => checkSections([], createRandom(1), options);
    expect(check({ alpha: 0 })).toThrow(new RangeError('checkSections: alpha must lie between 0 and 1, got 0'));
    expect(check({ alpha: 1 })).toThrow(new RangeError('checkSections: alpha must lie between 0 and 1, got 1'));
    expect(check({ df: 0 })).toThrow(new RangeError('checkSections: df must be above 0, got 0'));
    expect(check({ simulations: 0 })).toThrow(new RangeError('checkSections: simulations must be at least 1, got 0'));
    expect(checkSections([], createRandom(1), { simulations: 1 })).toEqual([]);
  });
});

describe('checkRelations', () => {
  const bed = (key: string, mean: number, se: number, n = 4): BedMean => ({ key, section: key[0], n, mean, se });
  const relation = (lower: string, upper: string, kind: 'older' | 'same' = 'older'): RelationToCheck => {
    return { lower, upper, kind, basis: 'superposition', certainty: 'certain' };
  };
  const three = [bed('A/1', -1, 0.05), bed('A/2', -1.2, 0.04), bed('B/1', -1.3, 0.03)];

  it('gives differences in standard errors and their chance', () => {
    const found = checkRelations([relation('A/1', 'A/2'), relation('A/1', 'B/1', 'same')], three, {
      df: 9,
      spread: 0.02,
    });
    expect(found).toEqual([
      {
        difference: close(0.2),
        z: close(3.1234752377721207),
        p_reversed: close(0.9938750909223081),
        verdict: 'agrees',
      },
      {
        difference: close(0.3),
        z: close(4.6291004988627575),
        p_reversed: close(0.0012382529294257788),
        verdict: 'reversed',
      },
    ]);
  });

  it('calls what is neither reversed nor surely in order tied, and one age that of no sure difference', () => {
    const verdict = (lower: number, kind: 'older' | 'same', alpha?: number) =>
      checkRelations([relation('A/1', 'A/2', kind)], [bed('A/1', lower, 0.06), bed('A/2', -1, 0.08)], { alpha })[0]
        .verdict;
    // standard error 0.1: one-sided 5 % at 1.645, two-sided at 1.96
    expect([-0.83, -0.84, -1, -1.16, -1.17].map((mean) => verdict(mean, 'older'))).toEqual([
      'agrees',
      'tied',
      'tied',
      'tied',
      'reversed',
    ]);
    expect([-0.8, -0.81, -1, -1.19, -1.2].map((mean) => verdict(mean, 'same'))).toEqual([
      'reversed',
      'agrees',
      'agrees',
      'agrees',
      'reversed',
    ]);
    expect(verdict(-0.83, 'older', 0.01)).toBe('tied');
    expect(verdict(-1.17, 'older', 0.01)).toBe('tied');
  });

  it('needs a mean with an error on both sides', () => {
    const none = { difference: null, z: null, p_reversed: null, verdict: 'not tested' };
    const lacking = [
      bed('A/2', -1, 0.05, 0),
      bed('A/2', Number.NaN, 0.05),
      bed('A/2', -1, Number.NaN),
      bed('A/3', -1, 0.05),
    ];
    for (const other of lacking) {
      expect(checkRelations([relation('A/1', 'A/2')], [three[0], other])).toEqual([none]);
      expect(checkRelations([relation('A/2', 'A/1')], [three[0], other])).toEqual([none]);
    }
  });

  it('is certain of means without error', () => {
    const exact = [bed('A/1', -1, 0), bed('A/2', -1.1, 0), bed('A/3', -1, 0)];
    const list = [relation('A/1', 'A/2'), relation('A/2', 'A/1'), relation('A/1', 'A/3')];
    expect(checkRelations(list, exact).map(({ z, p_reversed }) => [z, p_reversed])).toEqual([
      [Infinity, 1],
      [-Infinity, 0],
      [0, 0.5],
    ]);
  });

  it('counts a pair of one age once, whichever bed is named first, and apart from an order of the two', () => {
    const p = 2 * 0.0125;
    // two-sided 2.5 % each: one test stands at 5 %, two with one of them at 1 do not
    const sure = 2.2414;
    const pair = [bed('A/1', -1, 0.06), bed('A/2', -1 - 0.1 * sure, 0.08), bed('B/1', -1, 0.06), bed('B/2', -1, 0.08)];
    const verdicts = (list: RelationToCheck[], alpha: number) =>
      checkRelations(list, pair, { alpha }).map((c) => c.verdict);
    const same = relation('A/1', 'A/2', 'same');
    expect(verdicts([same, relation('A/2', 'A/1', 'same')], 1.5 * p)).toEqual(['reversed', 'reversed']);
    expect(verdicts([same, relation('B/1', 'B/2', 'same')], 1.5 * p)).toEqual(['agrees', 'agrees']);
    expect(verdicts([same, relation('A/1', 'A/2')], 1.5 * p)).toEqual(['agrees', 'agrees']);
    expect(verdicts([same, relation('A/1', 'A/2')], 2.5 * p)).toEqual(['reversed', 'agrees']);
  });

  it('refuses in words', () => {
    const check = (options: Parameters<typeof checkRelations>[2]) => () => checkRelations([], [], options);
    expect(check({ alpha: 0 })).toThrow(new RangeError('checkRelations: alpha must lie between 0 and 1, got 0'));
    expect(check({ alpha: 1 })).toThrow(new RangeError('checkRelations: alpha must lie between 0 and 1, got 1'));
    expect(check({ df: 0 })).toThrow(new RangeError('checkRelations: df must be above 0, got 0'));
    expect(check({ spread: -1 })).toThrow(new RangeError('checkRelations: spread must not be negative, got -1'));
  });
});

describe('mixedAgeBeds', () => {
  const zones = [
    { name: 'Z1', mean: -1.9, sd: 0.02, weight: 0.5 },
    { name: 'Z2', mean: -1.3, sd: 0.02, weight: 0.5 },
  ];
  const clean = Array.from({ length: 6 }, (_, b) => [0, 0.03, -0.02, 0.01, -0.04].map((off) => off * (1 + b / 10)));
  const surveyed = [
    [-1.3, -1.28, -1.9, -1.93, -1.27],
    [-0.6, -0.31, 0.05, 0.3],
    [-1, -1.02, -0.97, -1.01],
    [-1, -2, -1],
    ...clean,
  ];
  const which =
    'Ratios do not say which group is as old as the deposit: shells of the older group may be reworked, or those of the younger one intruded.';

  it('tells of two groups, of a wide bed, and is silent else', () => {
    const found = mixedAgeBeds(surveyed, createRandom(2), { zones });
    expect(found.slice(0, 4)).toEqual([
      {
        verdict: 'mixed age',
        p: expect.closeTo(3.849697427609235e-16, 18),
        adjusted: expect.closeTo(3.079757942087388e-15, 17),
        p_groups: 0.001,
        reading: 'mixed age: 2 shells about 0.15 (Z1) and 3 shells about 0.28 (Z2)',
        sentences: [
          'Its 5 shells scatter 11 times as widely as those of other beds (p = 3.8e-16, adjusted for all beds 3.1e-15).',
          'They fall into two groups, 2 shells about 0.15 (Z1) and 3 shells about 0.28 (Z2) (p = 0.001 against one wide group).',
          which,
        ],
      },
      {
        verdict: 'wide scatter',
        p: expect.closeTo(1.5125327778990574e-16, 18),
        adjusted: expect.closeTo(1.3612795001091515e-15, 17),
        p_groups: 0.244,
        reading: 'wide scatter',
        sentences: [
          'Its 4 shells scatter 12 times as widely as those of other beds (p = 1.5e-16, adjusted for all beds 1.4e-15).',
          'They form no two groups that 4 shells could prove (p = 0.24): mixing of ages, uneven heating and contamination all remain possible.',
        ],
      },
      { verdict: 'none', p: close(0.7135569454), adjusted: 1, p_groups: null, reading: '', sentences: [] },
      { verdict: 'not tested', p: null, adjusted: null, p_groups: null, reading: '', sentences: [] },
    ]);
    expect(found.slice(4).map(({ verdict }) => verdict)).toEqual(clean.map(() => 'none'));
  });

  it('holds beds against an assumed scatter, at the level given, with no zone to name', () => {
    const found = mixedAgeBeds(surveyed, createRandom(2), { assumed: 0.07, alpha: 0.1, simulations: 199 });
    expect(found[0].p_groups).toBe(0.005);
    expect(found[0].reading).toBe('mixed age: 2 shells about 0.15 and 3 shells about 0.28');
    expect(found[0].sentences[0]).toBe(
      'Its 5 shells scatter 4.9 times as widely as those of other beds (p = 2.8e-20, adjusted for all beds 2.2e-19).',
    );
    expect(found[2].p).toBeCloseTo(0.9626924584925, 7);
    // one zone is none to tell apart
    const one = mixedAgeBeds(surveyed, createRandom(2), { assumed: 0.07, zones: zones.slice(0, 1), simulations: 99 });
    expect(one[0].reading).toBe('mixed age: 2 shells about 0.15 and 3 shells about 0.28');
    expect(mixedAgeBeds(surveyed, createRandom(2), { assumed: 0.07, alpha: 0.001, simulations: 99 })[0].verdict).toBe(
      'wide scatter',
    );
  });

  it('tests nothing where nothing repeats or scatters', () => {
    expect(mixedAgeBeds([[-1], [-2]], createRandom(1)).map(({ verdict }) => verdict)).toEqual([
      'not tested',
      'not tested',
    ]);
    expect(mixedAgeBeds([[-1, -1.1, -1, -1]], createRandom(1), { assumed: 0 })[0].verdict).toBe('not tested');
  });
});
