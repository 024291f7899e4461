import { describe, expect, it } from 'vitest';
import type { Task } from '../../src/model/index.js';
import { createRandom, normalCdf, studentTCdf } from '../../src/statistics/index.js';
import { runTask } from '../../src/tasks.js';
import {
  adjacentZonesRows,
  assignerOverDraws,
  assignZone,
  bestLabels,
  bootstrapLead,
  bootstrapLikelihoodRatio,
  bootstrapP,
  bootstrapZones,
  chooseModel,
  equalOverlap,
  findZones,
  fitContinuum,
  fitMixture,
  gapOf,
  gapStatistic,
  goldenSection,
  groupsByGap,
  leadOfZones,
  type Mixture,
  partition,
  partitionCosts,
  rankTest,
  sameZone,
  settleChoice,
  smallestRankP,
  stabilityOf,
  stabilityTasks,
  testNeighbours,
  unbiasedSpread,
  type ZoneForTest,
  zoneErrors,
  zoneMeanErrors,
} from '../../src/zones/index.js';
import { smallClock, twoZones } from './small-clock.js';

// Numbers of one small example to six digits or more. What they should be like is held against definitions and
// simulations in the other files; they were computed with this code once those had passed.
const near = (value: number, digits = 6) => expect.closeTo(value, digits);
const nears = (values: readonly number[], digits = 6) => values.map((value) => near(value, digits));

const values = [-2.04, -1.98, -2.0, -1.93, -1.72, -1.66, -1.7, -1.69, -1.41, -1.3, -1.36, -1.44, -1.38];
const errors = [0.02, 0.03, 0.02, 0.04, 0.02, 0.03, 0.02, 0.02, 0.03, 0.05, 0.02, 0.02, 0.03];
const map = async (tasks: readonly Task[]) => tasks.map(runTask);

describe('fitMixture', () => {
  it('fits one to four zones', () => {
    const fits = [1, 2, 3, 4].map((k) => fitMixture(values, errors, k));
    expect(fits.map(({ k }) => k)).toEqual([1, 2, 3, 4]);
    expect(fits.map(({ logLikelihood }) => logLikelihood)).toEqual(
      nears([-0.7038653928, 0.5706152732, 11.14484808, 12.32148568]),
    );
    expect(fits.map(({ tau }) => tau)).toEqual(nears([0.25355444, 0.1333760038, 0.01915269141, 0], 5));
    expect(fits[0]).toMatchObject({ means: nears([-1.662942217]), weights: [1] });
    expect(fits[1].means).toEqual(nears([-1.853805447, -1.419337369], 5));
    expect(fits[1].weights).toEqual(nears([0.560517703, 0.439482297], 5));
    expect([...fits[1].responsibilities.slice(8, 12)]).toEqual(
      nears([0.9034401786, 0.09655982142, 0.6873822573, 0.3126177427], 5),
    );
    expect(fits[2].means).toEqual(nears([-2.000201071, -1.696057979, -1.39056919]));
    expect(fits[3].means).toEqual(nears([-2.005051548, -1.69774194, -1.431114062, -1.364895301], 5));
  });

  it('comes to the same from a bad start, and from near the answer in any order', () => {
    const best = fitMixture(values, errors, 2);
    const start = fitMixture(values, errors, 2, { start: values.map((_, at) => at % 2) });
    expect(start.logLikelihood).toBeCloseTo(best.logLikelihood, 5);
    const three = fitMixture(values, errors, 3);
    // a weight of 0 is lifted, from which it could not rise; zones come out by their means
    const again = fitMixture(values, errors, 3, { near: { means: [-1.4, -2, -1.7], weights: [0, 0.5, 0.5], tau: 0 } });
    expect(again.means).toEqual(nears(three.means, 4));
    expect(again.weights).toEqual(nears(three.weights, 4));
    expect(bestLabels(again, values.length)).toEqual([0, 0, 0, 0, 1, 1, 1, 1, 2, 2, 2, 2, 2]);
    // few steps stop short
    const short = fitMixture(values, errors, 3, {
      near: { means: [-1.9, -1.6, -1.5], weights: [0.3, 0.3, 0.4], tau: 0.1 },
      iterations: 1,
    });
    expect(short.logLikelihood).toBeLessThan(three.logLikelihood - 0.5);
  });

  it('searches very many beds on some of them, and ends on a peak of all', () => {
    const random = createRandom(9);
    const many = Array.from({ length: 700 }, (_, at) => [-2, -1.8, -1.5][at % 3] + 0.04 * random.normal());
    const fit = fitMixture(
      many,
      many.map((_, at) => 0.02 + 0.01 * (at % 2)),
      3,
    );
    expect(fit.means).toEqual(nears([-2.003843539, -1.803764537, -1.501933429], 3));
    expect(fit.tau).toBeCloseTo(0.0316905954, 3);
    expect(fit.logLikelihood).toBeCloseTo(498.8314837, 1);
  });
});

describe('fitContinuum', () => {
  it('finds the two ends', () => {
    const fit = fitContinuum(values, errors);
    expect(fit.low).toBeCloseTo(-2.057930313, 6);
    expect(fit.high).toBeCloseTo(-1.301854476, 6);
    expect(fit.logLikelihood).toBeCloseTo(2.693372383, 8);
  });

  it('shrinks to a point where errors explain all', () => {
    const fit = fitContinuum([-2, -1.9, -1.95], [0.2, 0.1, 0.3]);
    const w = [25, 100, 1 / 0.09];
    const mean = -(2 * w[0] + 1.9 * w[1] + 1.95 * w[2]) / (w[0] + w[1] + w[2]);
    expect(fit.low).toBeCloseTo(mean, 4);
    expect(fit.high - fit.low).toBeLessThan(1e-4);
    expect(fit.logLikelihood).toBeCloseTo(2.254588373, 5);
  });
});

describe('goldenSection', () => {
  it('closes in on the top from both sides, and on an end where there is none between', () => {
    expect(goldenSection((x) => -((x - 0.3) ** 2), 0, 1, 1e-6)).toBeCloseTo(0.3, 6);
    expect(goldenSection((x) => -((x - 0.8) ** 2), 0, 1, 1e-6)).toBeCloseTo(0.8, 6);
    expect(goldenSection((x) => x, -1, 2, 1e-6)).toBeCloseTo(2, 5);
    expect(goldenSection((x) => -x, -1, 2, 1e-6)).toBeCloseTo(-1, 5);
    // level ground goes to the lower end, and no step is made when the ends are near enough
    expect(goldenSection(() => 0, 0, 1, 1e-3)).toBeLessThan(1e-3);
    let asked = 0;
    expect(
      goldenSection(
        (x) => {
          asked++;
          return x;
        },
        0,
        1,
        1,
      ),
    ).toBe(0.5);
    expect(asked).toBe(2);
  });
});

describe('partition', () => {
  it('gives the costs of the example, and refuses what is no number of groups', () => {
    const costs = partitionCosts([0, 1, 10, 11, 30], [1, 1, 1, 1, 2], 5);
    expect(costs).toEqual(nears([2022 - 82 ** 2 / 6, 101, 1, 0.5, 0], 6));
    expect(partition([30, 0, 11, 1, 10], [2, 1, 1, 1, 1], 3)).toEqual([2, 0, 1, 0, 1]);
    for (const bad of [0, 6, 1.5, Number.NaN]) {
      expect(() => partition([0, 1, 10, 11, 30], [1, 1, 1, 1, 2], bad)).toThrow(
        new RangeError(`partition wants a whole number of groups from 1 to 5, got ${bad}`),
      );
      expect(() => partitionCosts([0, 1, 10, 11, 30], [1, 1, 1, 1, 2], bad)).toThrow(
        new RangeError(`partitionCosts wants a whole number of groups from 1 to 5, got ${bad}`),
      );
    }
  });
});

describe('chooseModel', () => {
  it('holds all numbers of zones and the continuum against each other', () => {
    const { bics, continuumBic, bestZones, verdict, mixtures } = chooseModel(values, errors);
    expect(bics.slice(0, 5)).toEqual(nears([6.537629501, 9.118566883, -6.900000025, -4.12337651, 0.1854976787], 4));
    expect(continuumBic).toBeCloseTo(-0.2568460513, 6);
    expect([bestZones, verdict, mixtures.length]).toEqual([3, 'zones', 10]);
  });

  it('counts parameters that were fitted beside, and no more zones than asked for or than values differ', () => {
    const { bics, continuumBic } = chooseModel(values, errors, 1, 3);
    expect(bics).toEqual(nears([9.102578858, 11.68351624, -4.335050667], 4));
    expect(continuumBic).toBeCloseTo(2.308103306, 6);
    expect(chooseModel([-1, -1, -2, -2, -3], [0.1, 0.1, 0.1, 0.1, 0.1]).mixtures).toHaveLength(3);
    expect(chooseModel([-1], [0.1])).toMatchObject({ verdict: 'too few beds', bestZones: 1 });
  });
});

describe('samples of a model without zones', () => {
  const zones = { kind: 'zones' as const, means: [-2, -1.5], weights: [0.4, 0.6], tau: 0.03 };
  const even = { kind: 'continuum' as const, low: -2, high: -1.3 };

  it('have these leads', () => {
    expect(leadOfZones(values, errors)).toBeCloseTo(8.902956444, 3);
    expect(bootstrapLead({ errors, rival: zones, seed: 4, first: 2, repeats: 2 })).toEqual(
      nears([15.02752857, 19.71351036], 3),
    );
    expect(bootstrapLead({ errors, rival: even, seed: 4, first: 0, repeats: 2 })).toEqual(
      nears([0.3206971764, -4.543175006], 3),
    );
  });

  it('have these likelihood ratios, also where zones scatter unequally', () => {
    const common = { errors, seed: 4, first: 1, repeats: 2 };
    const drawn = (simpler: Parameters<typeof bootstrapLikelihoodRatio>[0]['simpler'], k: number) =>
      bootstrapLikelihoodRatio({ ...common, simpler, zones: k });
    expect(drawn(zones, 3)).toEqual(nears([2.004553397, 4.947201479], 3));
    expect(drawn({ ...zones, scales: [1, 1] }, 3)).toEqual(nears([2.004553397, 4.947201479], 3));
    expect(drawn({ ...zones, scales: [2, 0.5] }, 3)).toEqual(nears([3.948594215, 2.464280823], 3));
    expect(drawn(even, 2)).toEqual(nears([-0.5431783597, -1.840133575], 3));
  });

  it('give p with the data counted in', () => {
    expect(bootstrapP(3, [1, 2, 3, 4])).toBe(0.6);
    expect(bootstrapP(3, [])).toBe(1);
    expect(bootstrapP(9, [1, 2, 3])).toBe(0.25);
  });
});

describe('settleChoice', () => {
  it('holds zones of a small lead against both models without zones', async () => {
    const wide = errors.map((error) => 2 * error);
    const choice = chooseModel(values, wide);
    const { choice: settled, comparisons } = await settleChoice(choice, values, wide, {
      alpha: 0.05,
      seed: 3,
      simulations: 19,
      map,
    });
    expect([choice.verdict, settled.verdict, settled.bestZones]).toEqual(['zones', 'zones', 3]);
    const common = { of: 'any', statistic: near(7.131628259, 3), level: 0.05, repeats: 19, zones: 3 };
    expect(comparisons).toEqual([
      { ...common, p: 0.05, simpler: 'continuum' },
      { ...common, p: 0.05, simpler: '1' },
    ]);
  });

  /** A choice of given BICs over real fits, and a host that answers every repeat with one statistic. */
  function scripted(
    bics: readonly number[],
    continuumBic: number,
    verdict: 'zones' | 'one zone' | 'continuum',
    beds = 13,
  ) {
    const own = Array.from({ length: beds }, (_, at) => values[at % 13] + 1e-4 * Math.floor(at / 13));
    const wide = own.map(() => 0.04);
    const mixtures = bics.map((_, at) => ({ ...fitMixture(own, wide, at + 1), logLikelihood: 10 * at }));
    const continuum = { ...fitContinuum(own, wide), logLikelihood: -5 };
    const bestZones = 1 + bics.reduce((least, bic, at) => (bic < bics[least] ? at : least), 0);
    const choice = { mixtures, continuum, bics, continuumBic, bestZones, verdict };
    return async (statistic: number, options: { alpha?: number; simulations?: number } = {}) => {
      const names: string[] = [];
      const host = async (tasks: readonly Task[]) =>
        tasks.map(({ name, argument }) => {
          names.push(name);
          return new Array<number>((argument as { repeats: number }).repeats).fill(statistic);
        });
      const found = await settleChoice(choice, own, wide, { alpha: 0.05, seed: 1, map: host, ...options });
      const told = found.comparisons.map(({ of, simpler, zones, p, level, repeats }) =>
        [of, simpler, zones, Number(p.toPrecision(3)), Number(level.toPrecision(3)), repeats].join(' '),
      );
      return { verdict: found.choice.verdict, zones: found.choice.bestZones, told, names: [...new Set(names)] };
    };
  }
  const [LOW, HIGH] = [-1e9, 1e9];

  it('tests one zone more and one fewer where BIC is near', async () => {
    // 3 zones lead 2 by 9.9 and 4 by 1.9, all else by far
    const run = scripted([40, 9.9, 0, 1.9], 30, 'zones');
    const upTo3 = 'these 2 3 0.002 0.025 500';
    expect(await run(LOW)).toEqual({
      verdict: 'zones',
      zones: 3,
      told: [upTo3, 'these 3 4 0.002 0.025 500'],
      names: ['bootstrapLikelihoodRatio'],
    });
    // the simpler stands: nothing is left between 2 and none
    expect(await run(HIGH)).toMatchObject({ verdict: 'zones', zones: 2, told: ['these 2 3 1 0.025 100'] });
    const clear = scripted([40, 10, 0, 2], 30, 'zones');
    expect(await clear(HIGH)).toMatchObject({ zones: 3, told: [] });
  });

  it('goes down step by step, never below two', async () => {
    const run = scripted([40, 4, 2, 0], 30, 'zones');
    expect(await run(HIGH)).toMatchObject({ zones: 2, told: ['these 3 4 1 0.025 100', 'these 2 3 1 0.025 100'] });
    expect((await run(LOW)).told).toEqual(['these 3 4 0.002 0.025 500']);
  });

  it('asks whether there are zones where a model without is near: the better one, and the other within 6', async () => {
    const both = scripted([5, 0, 20], 9, 'zones');
    expect((await both(LOW)).told).toEqual(['any 1 2 0.00332 0.05 300', 'any continuum 2 0.00332 0.05 300']);
    expect(await both(HIGH)).toEqual({
      verdict: 'one zone',
      zones: 2,
      told: ['any 1 2 1 0.05 100'],
      names: ['bootstrapLead'],
    });
    const one = scripted([9, 0, 20], 3, 'zones');
    expect((await one(LOW)).told).toEqual(['any continuum 2 0.00332 0.05 300']);
    expect(await one(HIGH)).toMatchObject({ verdict: 'continuum', told: ['any continuum 2 1 0.05 100'] });
    const clear = scripted([10, 0, 20], 30, 'zones');
    expect(await clear(HIGH)).toMatchObject({ verdict: 'zones', told: [] });
  });

  it('takes zones that BIC is against at a stricter level, and only where they lead', async () => {
    const against = scripted([30, 1, 9], 0, 'continuum');
    expect(await against(LOW)).toMatchObject({ verdict: 'zones', zones: 2, told: ['any continuum 2 0.002 0.03 500'] });
    expect(await against(HIGH)).toMatchObject({ verdict: 'continuum', told: ['any continuum 2 1 0.03 100'] });
    const many = scripted([30, 1, 9], 0, 'continuum', 401);
    expect(await many(LOW)).toMatchObject({ verdict: 'continuum', told: [] });
  });

  it('holds fewer than 10 beds against fitted models by the likelihood ratio at alpha itself', async () => {
    const few = scripted([5, 0, 3], 9, 'zones', 9);
    expect(await few(LOW)).toMatchObject({
      verdict: 'zones',
      told: ['these 1 2 0.00332 0.05 300', 'these continuum 2 0.00332 0.05 300'],
    });
    // one zone is no rival of three
    const three = scripted([5, 12, 0], 9, 'zones', 9);
    expect((await three(LOW)).told).toEqual(['these continuum 3 0.00332 0.05 300']);
    const none = scripted([5, 1, 3], 0, 'continuum', 9);
    expect(await none(LOW)).toMatchObject({ verdict: 'continuum', told: [] });
    const ten = scripted([5, 0, 3], 9, 'zones', 10);
    expect((await ten(LOW)).told[0]).toBe('any 1 2 0.00332 0.05 300');
  });

  it('hands out what samples are drawn from, and the statistic of the data', async () => {
    const wide = values.slice(0, 9).map(() => 0.04);
    const own = values.slice(0, 9);
    const [one, two] = [1, 2].map((k) => ({ ...fitMixture(own, wide, k), logLikelihood: 10 * k }));
    const continuum = { ...fitContinuum(own, wide), logLikelihood: 5 };
    const choice = {
      mixtures: [one, two],
      continuum,
      bics: [5, 0],
      continuumBic: 4,
      bestZones: 2,
      verdict: 'zones' as const,
    };
    const asked: Task[] = [];
    const host = async (tasks: readonly Task[]) => {
      asked.push(...tasks);
      return tasks.map(({ argument }) => new Array<number>((argument as { repeats: number }).repeats).fill(LOW));
    };
    const { comparisons } = await settleChoice(choice, own, wide, { alpha: 0.05, seed: 8, simulations: 70, map: host });
    expect(comparisons.map(({ simpler, statistic }) => [simpler, statistic])).toEqual([
      ['continuum', 30],
      ['1', 20],
    ]);
    const common = { errors: wide, zones: 2, seed: 8 };
    const even = { kind: 'continuum', low: continuum.low, high: continuum.high };
    const zone = { kind: 'zones', means: one.means, weights: one.weights, tau: one.tau };
    expect(asked).toEqual(
      [
        { ...common, simpler: even, first: 0, repeats: 50 },
        { ...common, simpler: even, first: 50, repeats: 20 },
        { ...common, simpler: zone, first: 0, repeats: 50 },
        { ...common, simpler: zone, first: 50, repeats: 20 },
      ].map((argument) => ({ name: 'bootstrapLikelihoodRatio', argument })),
    );
  });

  it('repeats until p is plain, 999 times at most, 199 above 400 beds', async () => {
    const run = scripted([40, 9, 0], 30, 'zones');
    const long = scripted([40, 9, 0], 30, 'zones', 401);
    expect((await run(LOW, { simulations: 60 })).told).toEqual([
      expect.stringMatching(/^these 2 3 0\.0164 0\.025 60$/),
    ]);
    expect((await run(LOW)).told).toEqual(['these 2 3 0.002 0.025 500']);
    expect((await long(LOW)).told).toEqual(['these 2 3 0.005 0.025 199']);
    expect((await run(LOW, { alpha: 0.2 })).told).toEqual(['these 2 3 0.0099 0.1 100']);
  });

  it('has nothing to ask of too few beds, or of one number of zones', async () => {
    expect(await scripted([0, 0.5], 0.2, 'zones', 2)(LOW)).toMatchObject({ verdict: 'zones', told: [] });
    expect(await scripted([0], 0.2, 'one zone')(LOW)).toMatchObject({ verdict: 'one zone', told: [] });
  });
});

describe('gap statistic', () => {
  it('has the numbers of the example, by either rule', () => {
    const weights = errors.map((error) => error ** -2);
    const gaps = gapStatistic(values, weights, { seed: 3, most: 5, references: 20 });
    expect(gaps.map(({ gap }) => gap)).toEqual(
      nears([-0.4679228227, -0.8178195775, 0.9374139396, 0.7259411612, 0.4218078013]),
    );
    expect(gaps.map(({ se }) => se)).toEqual(
      nears([0.3723179199, 0.3357544799, 0.3392544909, 0.4224078321, 0.4394842067]),
    );
    expect(groupsByGap(gaps)).toBe(3);
    expect(groupsByGap(gaps, 'first')).toBe(1);
    expect(gapStatistic(values, weights, { seed: 3, references: 2 })).toHaveLength(10);
    expect(gapStatistic([1, 2, 2, 3], [1, 1, 1, 1], { seed: 3, references: 2 })).toHaveLength(2);
  });

  it('is the mean log cost of the references less that of the values', () => {
    const [one, two] = gapOf(
      [2, 0],
      [
        [4, 1],
        [8, 2],
      ],
    );
    const [a, b] = [Math.log(4), Math.log(8)];
    expect(one.gap).toBeCloseTo((a + b) / 2 - Math.log(2), 12);
    expect(one.se).toBeCloseTo(((b - a) / 2) * Math.sqrt(1.5), 12);
    expect(two).toEqual({ gap: null, se: null });
  });

  it('takes the smallest number within one error of the largest gap, or the first that the next does not beat', () => {
    const gaps = [0.1, 0.5, 0.6, 0.4].map((gap) => ({ gap, se: 0.1 }));
    expect(groupsByGap(gaps)).toBe(2);
    expect(groupsByGap(gaps.map(({ gap }) => ({ gap, se: 0.09 })))).toBe(3);
    expect(groupsByGap(gaps, 'first')).toBe(2);
    expect(
      groupsByGap(
        [0.1, 0.3, 0.6].map((gap) => ({ gap, se: 0.1 })),
        'first',
      ),
    ).toBe(3);
    const unknown = [
      { gap: null, se: null },
      { gap: 0.5, se: 0.1 },
    ];
    expect(groupsByGap(unknown)).toBe(2);
    expect(groupsByGap(unknown, 'first')).toBe(2);
  });
});

describe('testNeighbours', () => {
  const older: ZoneForTest = { mean: -1.6, se: 0.03, df: 6, count: 5 };
  const younger: ZoneForTest = { mean: -1.75, se: 0.04, df: 9, count: 4 };
  const options = () => ({ alpha: 0.05, shellSd: 0.06, scatterDf: 7, random: createRandom(2), simulations: 199 });

  it('gives Welch’s test of the means, and the overlap with its interval', () => {
    const df = 0.05 ** 4 / (0.03 ** 4 / 6 + 0.04 ** 4 / 9);
    const found = testNeighbours(older, younger, options());
    expect(found).toEqual({
      difference: near(0.15, 12),
      p_difference: near(2 * studentTCdf(-3, df), 12),
      overlap: near(2 * normalCdf(-1.25), 12),
      overlap_low: near(0.01828912246, 8),
      overlap_high: near(0.6973443245, 8),
      one_sigma_overlap: false,
      verdict: 'distinct',
    });
    const known = testNeighbours(older, younger, { ...options(), scatterDf: 0 });
    expect([known.overlap_low, known.overlap_high]).toEqual(nears([0.04237665201, 0.5794956952], 8));
  });

  it('reaches each verdict on its own ground', () => {
    const verdict = (difference: number, se: number, own = {}) =>
      testNeighbours(
        { ...older, mean: younger.mean + difference, se },
        { ...younger, se },
        { ...options(), scatterDf: 1e6, ...own },
      );
    expect(verdict(0.15, 0.001).verdict).toBe('distinct');
    // differs for sure, but the whole interval of the overlap lies above the limit, which is at 2 sd
    expect(verdict(0.1, 0.001).verdict).toBe('not distinct');
    expect(verdict(0.11, 0.02)).toMatchObject({ verdict: 'not resolved', one_sigma_overlap: true });
    expect(verdict(0.05, 0.05).verdict).toBe('not distinct');
    expect(verdict(0.15, 0.001, { alpha: 0.001 }).verdict).toBe('not resolved');
    const few = testNeighbours({ ...older, count: 3 }, { ...younger, count: 3 }, options());
    expect(few.verdict).toBe('not resolved');
  });

  it('ranks the shells, where single ones are known of both zones', () => {
    const above = [-1.55, -1.62, -1.7, -1.58, -1.6];
    const below = [-1.8, -1.72, -1.66, -1.79];
    // 19 of 20 pairs; exact p = 4 / C(9, 4)
    expect(rankTest(above, below)).toMatchObject({ u: 19, p: near(4 / 126, 12) });
    expect([rankTest([], below), rankTest(above, [])]).toEqual([null, null]);
  });

  it('is certain of means without error', () => {
    const exact = (difference: number) =>
      testNeighbours({ ...older, mean: -1.75 + difference, se: 0 }, { ...younger, se: 0 }, options()).p_difference;
    expect(exact(0.1)).toBe(0);
    expect(exact(0)).toBe(1);
  });

  it('knows overlaps of spikes, and the least p of ranks', () => {
    expect([equalOverlap(0, 0), equalOverlap(0.1, 0), equalOverlap(-0.1, 0)]).toEqual([1, 0, 0]);
    expect(equalOverlap(-0.12, 0.06)).toBeCloseTo(2 * normalCdf(-1), 12);
    expect(smallestRankP(1, 1)).toBe(1);
    expect(smallestRankP(0, 5)).toBe(1);
    expect(smallestRankP(3, 4)).toBeCloseTo(2 / 35, 12);
    expect(smallestRankP(30, 30)).toBe(2e-12);
  });
});

describe('assignZone', () => {
  it('weighs zones by share, error and distance', () => {
    const priors = { means: [-2, -1.7], se: [0.01, 0.03], weights: [0.3, 0.7], tau: 0.02 };
    const density = (x: number, error: number, j: number) => {
      const variance = 0.02 ** 2 + error ** 2 + priors.se[j] ** 2;
      return (priors.weights[j] / Math.sqrt(variance)) * Math.exp((-0.5 * (x - priors.means[j]) ** 2) / variance);
    };
    for (const [x, error] of [
      [-1.87, 0.05],
      [-1.95, 0.1],
      [-1.6, 0.2],
    ]) {
      const found = assignZone(x, error, priors);
      const [a, b] = [density(x, error, 0), density(x, error, 1)];
      expect(found.probabilities).toEqual(nears([a / (a + b), b / (a + b)], 10));
      expect(found.zone).toBe(a > b ? 0 : 1);
      expect(found.second).toBe(a > b ? 1 : 0);
      expect(found.secondProbability).toBeCloseTo(Math.min(a, b) / (a + b), 10);
    }
    // equal chances go to the younger zone
    const even = assignZone(0, 1, { means: [-1, 1], se: [0, 0], weights: [0.5, 0.5], tau: 0 });
    expect(even).toMatchObject({ zone: 0, second: 1, straddles: true });
  });
});

describe('zoneErrors', () => {
  const mixture = (own: Partial<Mixture>): Mixture => {
    const responsibilities = Float64Array.of(1, 0, 0.5, 0.5, 0, 1, 0, 1);
    return { k: 2, means: [-2, -1], weights: [0.5, 0.5], tau: 0.1, logLikelihood: 0, responsibilities, ...own };
  };
  const some = [0.1, 0.2, 0.1, 0.3];

  it('adds up what each bed tells of each zone', () => {
    const tau2 = 0.1 ** 2 * 2;
    const w = some.map((error) => 1 / (tau2 + error ** 2));
    expect(unbiasedSpread(mixture({}), 4)).toBeCloseTo(0.1 * Math.SQRT2, 12);
    expect(unbiasedSpread(mixture({}), 2)).toBeCloseTo(0.1 * Math.SQRT2, 12);
    expect(zoneErrors(mixture({}), some, 9)).toEqual({
      se: nears([1 / Math.sqrt(w[0] + w[1] / 2), 1 / Math.sqrt(w[1] / 2 + w[2] + w[3])], 10),
      df: [2, 2],
    });
  });

  it('widens them where the beds lie farther off than the fit says', () => {
    const tau2 = 0.1 ** 2 * 2;
    const variance = some.map((error) => tau2 + error ** 2);
    const far = [-2.6, -1.5, -1, -0.2];
    const squares =
      0.36 / variance[0] +
      (0.5 * 0.25) / variance[1] +
      (0.5 * 0.25) / variance[1] +
      0 / variance[2] +
      0.64 / variance[3];
    const plain = zoneErrors(mixture({}), some, 9).se;
    expect(zoneErrors(mixture({}), some, 9, far).se).toEqual(
      nears(
        plain.map((se) => se * Math.sqrt(squares / 2)),
        8,
      ),
    );
    // never narrower, and not at all without a spread
    expect(zoneErrors(mixture({}), [1, 1, 1, 1], 9, far)).toEqual(zoneErrors(mixture({}), [1, 1, 1, 1], 9));
    expect(zoneErrors(mixture({ tau: 0 }), some, 9, far)).toEqual(zoneErrors(mixture({ tau: 0 }), some, 9));
    expect(zoneErrors(mixture({ tau: 0 }), some, 9).df).toEqual([9, 9]);
    expect(zoneErrors(mixture({ tau: 0 }), some, 0).df).toEqual([1, 1]);
  });

  it('has no bound for a zone without beds', () => {
    const responsibilities = Float64Array.of(1, 0, 1, 0, 1, 0, 1, 0);
    expect(zoneErrors(mixture({ responsibilities }), some, 9).se[1]).toBe(Infinity);
  });
});

describe('stability', () => {
  const fit = fitMixture(values, errors, 3);
  const { means, weights, tau } = fit;
  const argument = {
    values,
    errors,
    shells: values.map((_, at) => 2 + (at % 4)),
    residuals: [],
    fit: { means, weights, tau },
    labels: bestLabels(fit, values.length),
    seed: 6,
    first: 1,
    repeats: 2,
  };

  it('finds these zones in two samples of beds', () => {
    const drawn = bootstrapZones(argument);
    expect(drawn.map(({ jaccard }) => jaccard)).toEqual([
      [1, 1, 1],
      [1, 1, 1],
    ]);
    expect(drawn[0].priors.means).toEqual(nears([-2.008606746, -1.688372068, -1.365613274], 4));
    expect(drawn[0].priors.weights).toEqual(nears([0.3076918993, 0.384615793, 0.3076923077], 4));
    expect(drawn[0].priors.tau).toBeCloseTo(0.02595429382, 4);
    expect(drawn[0].priors.se).toEqual([0, 0, 0]);
    expect(drawn[1].priors.means).toEqual(nears([-1.978601494, -1.71333479, -1.396421504], 4));
    expect(drawn[1].priors.tau).toBeCloseTo(0.03032168976, 4);
  });

  it('counts shared beds over all beds of either zone', () => {
    // two zones of the fit that the samples find as one and a half: labels turned against the fit
    const turned = bootstrapZones({ ...argument, labels: argument.labels.map((label) => (label === 2 ? 1 : label)) });
    for (const { jaccard } of turned) {
      expect(jaccard[0]).toBe(1);
      expect(jaccard[1]).toBeGreaterThan(0.4);
      expect(jaccard[1]).toBeLessThan(0.8);
      expect(jaccard[2]).toBeNull();
    }
  });

  it('shares the repeats out in four parts or more, of fifty at most', () => {
    const { first: _, repeats: __, ...common } = argument;
    const tasks = (repeats?: number) =>
      stabilityTasks(common, repeats).map(({ argument: own }) => {
        const { first, repeats: count } = own as { first: number; repeats: number };
        return [first, count];
      });
    expect(tasks(18)).toEqual([
      [0, 5],
      [5, 5],
      [10, 5],
      [15, 3],
    ]);
    expect(tasks(1)).toEqual([[0, 1]]);
    expect(tasks(230).map(([first]) => first)).toEqual([0, 50, 100, 150, 200]);
    expect(tasks()).toEqual([0, 50, 100, 150].map((first) => [first, 50]));
  });

  const priors = (a: number, b: number) => ({ means: [a, b], se: [0, 0], weights: [0.5, 0.5], tau: 0.05 });
  const two = [
    { jaccard: [0.5, null], priors: priors(-2, -1.9) },
    { jaccard: [1, 0.8], priors: priors(-2.1, -1.8) },
  ];

  it('averages over samples', () => {
    expect(stabilityOf(two)).toEqual([0.75, 0.8]);
    const [x, error] = [-1.94, 0.03];
    const chances = two.map((draw) => assignZone(x, error, draw.priors).probabilities);
    const mean = [0, 1].map((j) => (chances[0][j] + chances[1][j]) / 2);
    expect(assignerOverDraws(two)(x, error).probabilities).toEqual(nears(mean, 12));
    const other = two.map((draw) => assignZone(-2, 0.02, draw.priors).probabilities);
    const both = [0, 1].map((at) => chances[at][0] * other[at][0] + chances[at][1] * other[at][1]);
    const same = sameZone([x, -2], [error, 0.02], two);
    expect([...same]).toEqual(nears([1, (both[0] + both[1]) / 2, (both[0] + both[1]) / 2, 1], 12));
  });

  it('halves the variance over samples with that of fixed zones', () => {
    // means −2 and −2.1: variance 0.005
    expect(zoneMeanErrors([0.03, 0.5], two)).toEqual(nears([Math.sqrt((0.03 ** 2 + 0.005) / 2), 0.5], 12));
    expect(zoneMeanErrors([0.03, 0.5], two.slice(0, 1))).toEqual([0.03, 0.5]);
  });
});

describe('findZones', () => {
  const options = { alpha: 0.05, zones: null, simulations: 99 };
  const find = (data: ReturnType<typeof twoZones>, own = {}) =>
    findZones(data, { ...options, random: createRandom(1), ...own })!;

  it('finds two zones and tests them', () => {
    const found = find(twoZones());
    expect(found).toMatchObject({
      beds: [0, 1, 2, 3, 4, 5, 6, 7],
      df: [12, 12],
      verdict: 'zones',
      forced: false,
      zonesBeforeJoining: 2,
      spread: 0,
      labels: [0, 0, 0, 0, 1, 1, 1, 1],
    });
    expect(found.priors).toEqual({
      means: nears([-1.995, -1.5]),
      se: nears([0.05 / Math.sqrt(20), 0.05 / Math.sqrt(20)]),
      weights: nears([0.5, 0.5]),
      tau: 0,
    });
    expect(found.neighbours).toHaveLength(1);
    expect(found.neighbours[0]).toMatchObject({
      difference: near(0.495),
      overlap: near(7.421348159e-7, 10),
      overlap_low: near(1.520089286e-12, 14),
      overlap_high: near(0.003854990484, 6),
      verdict: 'distinct',
    });
    expect(adjacentZonesRows(twoZones(), found)[0]).toMatchObject({ older: 'Z2', younger: 'Z1', mann_whitney_u: 400 });
    // the shells that ranks are taken of have the gradient taken out
    const sloping = twoZones(0.3);
    expect(adjacentZonesRows(sloping, find(sloping))[0].mann_whitney_u).toBe(400);
  });

  it('founds no zone on beds of mixed age or without a mean, unless there is nothing else', () => {
    expect(find(twoZones(), { leaveOut: new Set(['North/1', 'South/2']) })).toMatchObject({
      beds: [2, 3, 4, 5, 6, 7],
      labels: [0, 0, 1, 1, 1, 1],
      priors: { means: nears([-1.985, -1.5]) },
    });
    const some = smallClock([
      { level: -2, offsets: [0, 0.1] },
      { level: -1, offsets: [] },
      { level: -1.5, offsets: [0.1] },
    ]);
    expect(find(some).beds).toEqual([0, 2]);
    expect(find(some, { leaveOut: new Set(['S/1', 'S/3']) }).beds).toEqual([0, 2]);
    expect(findZones(smallClock([{ level: -1, offsets: [] }]), { ...options, random: createRandom(1) })).toBeNull();
  });

  it('takes the number asked for, without zones that no bed is in', () => {
    const one = find(twoZones(), { zones: 1 });
    expect(one).toMatchObject({ forced: true, verdict: 'zones', neighbours: [], labels: [0, 0, 0, 0, 0, 0, 0, 0] });
    // one zone by order, although ages may differ: its spread means nothing
    expect(one.spread).toBeNull();
    const many = find(twoZones(), { zones: 3 });
    expect(many).toMatchObject({ forced: true, zonesBeforeJoining: 2 });
    expect(new Set(many.labels).size).toBe(many.fit.k);
    expect(find(twoZones(), { zones: 99 }).fit.k).toBeLessThanOrEqual(8);
  });

  it('joins zones that shells do not tell apart', () => {
    const close = smallClock(
      [-2.0, -1.995, -2.005, -1.99, -1.95, -1.945, -1.955, -1.94].map((level) => ({
        level,
        offsets: [0.1, -0.1, 0.08, -0.09, 0.01],
      })),
    );
    const data = {
      ...close,
      beds: close.beds.map((bed) => ({ ...bed, se: 0.003 })),
      scatter: { s: 0.1, df: 30, assumed: false },
    };
    const found = find(data);
    expect(found.choice.verdict).toBe('zones');
    expect(found).toMatchObject({ verdict: 'one zone', zonesBeforeJoining: 2, labels: [0, 0, 0, 0, 0, 0, 0, 0] });
    expect(found.spread).toBeCloseTo(0.02719768898, 5);
    // forced apart they stay so
    expect(find(data, { zones: 2 })).toMatchObject({ forced: true, labels: [0, 0, 0, 0, 1, 1, 1, 1] });
  });

  it('joins the two that overlap most, and leaves a third where it is', () => {
    const shells = [0.1, -0.1, 0.08, -0.09, 0.01];
    const three = (levels: readonly number[]) => {
      const plain = smallClock(
        levels.flatMap((level) => [0, 0.005, -0.005, 0.01].map((off) => ({ level: level + off, offsets: shells }))),
      );
      return {
        ...plain,
        beds: plain.beds.map((bed) => ({ ...bed, se: 0.003 })),
        scatter: { s: 0.1, df: 30, assumed: false },
      };
    };
    const [young, old] = [find(three([-2, -1.95, -1])), find(three([-3, -2, -1.95]))];
    expect(young).toMatchObject({ verdict: 'zones', zonesBeforeJoining: 3 });
    expect(young.labels).toEqual([0, 0, 0, 0, 0, 0, 0, 0, 1, 1, 1, 1]);
    expect(old).toMatchObject({ verdict: 'zones', zonesBeforeJoining: 3 });
    expect(old.labels).toEqual([0, 0, 0, 0, 1, 1, 1, 1, 1, 1, 1, 1]);
    // all three run together: the nearer two first
    expect(find(three([-2, -1.95, -1.88])).labels).toEqual(new Array<number>(12).fill(0));
  });

  it('counts parameters beside, or takes a choice made before', () => {
    const plain = find(twoZones());
    const more = find(twoZones(), { extraParameters: 1 });
    expect(more.choice.bics[0] - plain.choice.bics[0]).toBeCloseTo(Math.log(8), 10);
    const choice = { ...plain.choice, verdict: 'continuum' as const };
    const given = find(twoZones(), { choice });
    expect(given.choice).toBe(choice);
    expect(given).toMatchObject({ verdict: 'continuum', zonesBeforeJoining: 1, spread: null, neighbours: [] });
  });
});
