import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createRandom, holm } from '../../src/statistics/index.js';
import {
  aminoAcidAgreement,
  bedsAbove,
  confidenceOfReading,
  costOfShell,
  matchZone,
  type OwnBedResidual,
  ownBedResiduals,
  readingOfShell,
  robustScatter,
  statusOfShell,
} from '../../src/superposition/index.js';

const draw = (random: ReturnType<typeof createRandom>, n: number, mean = 0, sd = 0.06) =>
  Array.from({ length: n }, () => mean + sd * random.normal());

describe('robustScatter', () => {
  it('follows shift and scale of the bed and says nothing without repeats', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -3, max: 0, noNaN: true }), { minLength: 8, maxLength: 12 }), (shifts) => {
        const random = createRandom(4);
        const beds = shifts.map(() => draw(random, 5));
        const moved = robustScatter(beds.map((values, b) => values.map((x) => x + shifts[b])));
        expect(moved.s).toBeCloseTo(robustScatter(beds).s, 8);
      }),
      { numRuns: 20 },
    );
    expect(robustScatter([[1], [2]])).toMatchObject({ s: Number.NaN, df: 0 });
    expect(robustScatter([])).toMatchObject({ s: Number.NaN, df: 0 });
  });
});

describe('ownBedResiduals', () => {
  const random = createRandom(2);
  const clean = Array.from({ length: 30 }, (_, bed) => draw(random, 6, -1.5).map((x) => ({ bed, x }))).flat();

  it('finds two odd shells in one bed that mask each other', () => {
    const shells = clean.map((own, i) => (i === 0 || i === 1 ? { ...own, x: own.x + 0.45 } : own));
    const found = ownBedResiduals(shells);
    expect(found.shells.flatMap(({ odd }, i) => (odd ? [i] : []))).toEqual([0, 1]);
    expect(found.shells[0].others).toBe(4);
    expect(found.shells[0].residual).toBeCloseTo(shells[0].x - found.means[0], 10);
  });

  it('does not say which of two is odd, and tests shells that screening left out against the rest', () => {
    const pair = [...clean, { bed: 30, x: -1.5 }, { bed: 30, x: -0.9 }];
    const found = ownBedResiduals(pair).shells.slice(-2);
    expect(found.map(({ odd, others }) => [odd, others])).toEqual([
      [false, 1],
      [false, 1],
    ]);
    expect(found[0].p).toBeLessThan(0.001);
    const screened = ownBedResiduals(pair, new Set([0])).shells;
    expect(screened[0].others).toBe(5);
    expect(screened[1].others).toBe(4);
  });

  it('falls back on a known scatter where repeated shells are too few, and tests nothing without one', () => {
    const few = [0, 0.05, 0.9].map((x) => ({ bed: 0, x }));
    expect(ownBedResiduals(few).shells.map(({ p }) => p)).toEqual([null, null, null]);
    const { shells, s } = ownBedResiduals(few, new Set(), { fallback: { s: 0.07, df: Number.POSITIVE_INFINITY } });
    expect(s).toBe(0.07);
    expect(shells.map(({ odd }) => odd)).toEqual([false, false, true]);
  });

  it('passes over unknown ratios, single shells and empty clocks', () => {
    const { shells, tested } = ownBedResiduals([
      { bed: 0, x: -1 },
      { bed: 1, x: Number.NaN },
    ]);
    expect(shells.map(({ residual, p }) => [residual, p])).toEqual([
      [null, null],
      [null, null],
    ]);
    expect(tested).toBe(0);
    expect(ownBedResiduals([]).shells).toEqual([]);
  });

  it('gives the p of every shell its due also where most shells stand far from their beds', () => {
    // 240 beds of two sound shells and eight screened out far away; the pairs of 12 beds are just so far apart that
    // Holm's rule, with four shells in five far, leaves the p of some of them below 1
    const random = createRandom(17);
    const excluded = new Set<number>();
    const list = Array.from({ length: 240 }, (_, bed) => {
      const half = bed < 12 ? 0.096 + 0.001 * bed : 0.025 * random.normal();
      for (let far = 2; far < 10; far++) excluded.add(10 * bed + far);
      return [half, -half, ...Array.from({ length: 8 }, () => 1.5)].map((x) => ({ bed, x }));
    }).flat();
    const found = ownBedResiduals(list, excluded);
    const adjusted = holm(list.map((_, i) => found.p(i)));
    let between = 0;
    list.forEach((_, i) => {
      const own = found.of(i);
      expect(own.adjusted).toBeCloseTo(adjusted[i], 12);
      if (!excluded.has(i) && own.p! > 4 / list.length && own.adjusted! < 1) between++;
    });
    expect(between).toBeGreaterThan(0);
  });
});

describe('aminoAcidAgreement', () => {
  const weights = [0.4, 0.3, 0.2, 0.1];
  const slopes = [1, 0.8, 1.3, 1];
  const random = createRandom(5);
  const survey = (count: number) => {
    const bed = Array.from({ length: count }, (_, i) => i % 30);
    const logs = bed.map((b) => {
      const shared = random.normal();
      return slopes.map((slope) => slope * 0.1 * b + 0.05 * (0.8 * shared + 0.6 * random.normal()));
    });
    return { bed, logs };
  };
  const xOf = (row: readonly number[]) => row.reduce((sum, value, a) => sum + weights[a] * value, 0);
  const agree = (logs: readonly (readonly number[])[], bed: readonly number[]) =>
    aminoAcidAgreement(logs, logs.map(xOf), bed, weights);

  it('gives sound shells a uniform p although their errors go together', () => {
    const { bed, logs } = survey(900);
    const p = agree(logs, bed).map((answer) => answer?.p ?? Number.NaN);
    for (const level of [0.01, 0.1, 0.5]) {
      const share = p.filter((value) => value <= level).length / p.length;
      expect(Math.abs(share - level)).toBeLessThan(3.5 * Math.sqrt((level * (1 - level)) / p.length) + 0.2 * level);
    }
  });

  it('agrees on a shell from far along the curve, and not on one that is off it', () => {
    const { bed, logs } = survey(300);
    const moved = logs.map((row, i) =>
      i === 10
        ? row.map((value, a) => value + slopes[a] * 0.7)
        : i === 11
          ? row.map((value, a) => value + 0.7 * a)
          : row,
    );
    const answers = agree(moved, bed);
    expect(answers[10]?.p).toBeGreaterThan(0.01);
    expect(answers[11]?.p).toBeLessThan(1e-6);
    expect(answers[11]?.deviations[3]).toBeGreaterThan(5);
  });

  it('does not hang on the weights of x', () => {
    const { bed, logs } = survey(300);
    const other = aminoAcidAgreement(
      logs,
      logs.map((row) => row[2]),
      bed,
      [0, 0, 1, 0],
    );
    const answers = agree(logs, bed);
    const near = answers.filter((answer, i) => Math.abs((answer?.p ?? 0) - (other[i]?.p ?? 1)) < 0.15).length;
    expect(near / answers.length).toBeGreaterThan(0.9);
  });

  it('is not known with one amino acid, a missing one, or too few shells', () => {
    const { bed, logs } = survey(60);
    expect(
      aminoAcidAgreement(
        logs.map((row) => [row[0]]),
        logs.map((row) => row[0]),
        bed,
        [1],
      )[0],
    ).toBeNull();
    const gap = logs.map((row, i) => (i === 0 ? [Number.NaN, ...row.slice(1)] : row));
    const answers = aminoAcidAgreement(gap, logs.map(xOf), bed, weights);
    expect(answers[0]).toBeNull();
    expect(answers[1]).not.toBeNull();
    // an amino acid measured on one shell in five takes no part, and costs nobody an answer
    const rare = logs.map((row, i) => [...row, i % 5 === 0 ? -1 : Number.NaN]);
    const five = aminoAcidAgreement(rare, logs.map(xOf), bed, [...weights, 0]);
    expect(five.map((answer) => answer?.p)).toEqual(agree(logs, bed).map((answer) => answer?.p));
    expect(five[0]?.deviations[4]).toBeNaN();
    expect(agree(logs.slice(0, 13), bed.slice(0, 13)).every((answer) => answer === null)).toBe(true);
  });
});

describe('the table of readings', () => {
  it('holds the words of the design', () => {
    expect(readingOfShell('high', true, [])).toBe('reworked from an older deposit');
    expect(readingOfShell('high', false, [])).toBe('altered');
    expect(readingOfShell('high', true, ['discordant ratios'])).toBe('altered');
    expect(readingOfShell('high', true, ['low yield'])).toBe('reworked or altered');
    expect(readingOfShell('high', null, [])).toBe('reworked or altered');
    expect(readingOfShell('low', true, [])).toBe('intruded from a younger deposit');
    expect(readingOfShell('low', false, [])).toBe('contaminated by younger amino acids');
    expect(readingOfShell('low', true, ['high serine'])).toBe('contaminated by younger amino acids');
    expect(readingOfShell('low', null, [])).toBe('intruded or contaminated');
    expect(readingOfShell('within', null, ['high serine'])).toBe('contaminated by younger amino acids');
    expect(readingOfShell('within', false, ['discordant ratios'])).toBe('none');
  });

  const own = (given: Partial<OwnBedResidual>): OwnBedResidual => ({
    residual: 0.3,
    t: 4,
    others: 6,
    p: 1e-5,
    adjusted: 0.002,
    odd: true,
    ...given,
  });
  const base = { marks: [], reading: 'altered', cut: 'none', wholeBed: false, crowded: false, alpha: 0.05 } as const;

  it('sets aside only what a reading, screening or superposition with the own bed supports', () => {
    expect(statusOfShell({ ...base, own: own({}) })).toBe('set aside');
    expect(statusOfShell({ ...base, own: own({ adjusted: 0.04 }) })).toBe('doubtful');
    expect(statusOfShell({ ...base, own: own({}), crowded: true })).toBe('doubtful');
    expect(statusOfShell({ ...base, own: own({ odd: false, others: 1 }) })).toBe('doubtful');
    const weak = own({ odd: false, p: 0.03, adjusted: 1 });
    expect(statusOfShell({ ...base, own: weak })).toBe('kept');
    expect(statusOfShell({ ...base, own: weak, cut: 'all' })).toBe('set aside');
    expect(statusOfShell({ ...base, own: weak, cut: 'some' })).toBe('doubtful');
    expect(statusOfShell({ ...base, own: weak, cut: 'all', wholeBed: true })).toBe('kept');
    const fine = own({ odd: false, p: 0.6, adjusted: 1 });
    expect(statusOfShell({ ...base, own: fine, reading: 'none', marks: ['high serine'] })).toBe('set aside');
    expect(statusOfShell({ ...base, own: fine, reading: 'none', marks: ['low yield'] })).toBe('doubtful');
    expect(statusOfShell({ ...base, own: fine, reading: 'none', cut: 'all' })).toBe('doubtful');
    expect(statusOfShell({ ...base, own: fine, reading: 'none' })).toBe('kept');
  });

  it('is sure only of what rests on much', () => {
    const sure = {
      own: own({}),
      status: 'set aside',
      reading: 'altered',
      agreementP: 1e-9,
      marks: [],
      sourceFits: false,
      inConflict: false,
    } as const;
    expect(confidenceOfReading(sure)).toBe('high');
    expect(confidenceOfReading({ ...sure, own: own({ others: 2 }) })).toBe('moderate');
    expect(confidenceOfReading({ ...sure, reading: 'reworked or altered', agreementP: null, inConflict: true })).toBe(
      'moderate',
    );
    expect(confidenceOfReading({ ...sure, status: 'doubtful', own: own({ adjusted: 0.3 }) })).toBe('low');
    expect(confidenceOfReading({ ...sure, reading: 'none' })).toBeNull();
  });
});

describe('small helpers', () => {
  it('costs less to give up a shell that is odd in its bed or marked', () => {
    expect(costOfShell(null, false)).toBe(1);
    expect(costOfShell(Number.NaN, false)).toBe(1);
    expect(costOfShell(0.1, false)).toBeCloseTo(0.7, 12);
    expect(costOfShell(0.1, true)).toBeLessThan(0.7);
  });

  it('matches a zone, or none when all are far', () => {
    const zones = [
      { name: 'Z1', mean: -2, sd: 0.02, weight: 0.5 },
      { name: 'Z2', mean: -1.7, sd: 0.02, weight: 0.5 },
    ];
    expect(matchZone(-1.98, 0.06, zones)).toMatchObject({ zone: { name: 'Z1' } });
    expect(matchZone(-1.98, 0.06, zones)?.probability).toBeGreaterThan(0.95);
    expect(matchZone(-1, 0.06, zones)).toBeNull();
    expect(matchZone(Number.NaN, 0.06, zones)).toBeNull();
    expect(matchZone(-2, 0.06, [])).toBeNull();
  });

  it('closes the graph of beds upwards, merged beds together', () => {
    // deposits 0 < 1 < 2, and 3 apart; beds 1 and 2 are one deposit
    const graph = { node: [0, 1, 1, 2, 3], nodes: 4, younger: [[1], [2], [], []], sequence: [0, 1, 2, 3] };
    expect(bedsAbove(graph)).toEqual([[1, 2, 3], [3], [3], [], []]);
  });
});
