import { describe, expect, it } from 'vitest';
import { requireNumbers, requireThat } from '../../src/statistics/check.js';
import { regularisedBeta } from '../../src/statistics/incomplete-beta.js';
import { regularisedGamma } from '../../src/statistics/incomplete-gamma.js';
import {
  adjustedRandIndex,
  benjaminiHochberg,
  chiSquaredCdf,
  chiSquaredQuantile,
  chiSquaredUpperTail,
  createRandom,
  effectiveSampleSize,
  equalDensityCut,
  fCdf,
  fUpperTail,
  generalizedEsd,
  grubbs,
  holm,
  isotonicRegression,
  jonckheereTerpstra,
  kendallInterval,
  kendallTauB,
  logNormalDensity,
  mannWhitney,
  maximumFlow,
  median,
  medianAbsoluteDeviation,
  midranks,
  minimumCut,
  noncentralT,
  normalCdf,
  normalQuantile,
  oneWayAnova,
  oneWayAnovaFromSummaries,
  overlapOfNormals,
  powerTTest,
  quantile,
  quantileOfSorted,
  rateIncreasePerDegree,
  robustSd,
  sampleSizeTTest,
  sampleTruncatedNormal,
  smallestMannWhitneyP,
  splitRHat,
  studentTCdf,
  studentTQuantile,
  summarise,
  varianceComponents,
  welchFromSummaries,
  welchTTest,
  yorkLine,
} from '../../src/statistics/index.js';
import { logBeta, logGamma } from '../../src/statistics/log-gamma.js';
import { tieSizes } from '../../src/statistics/ranks.js';
import { solveIncreasing } from '../../src/statistics/solve-increasing.js';

const random = createRandom(1);
const one = { mean: 1, sd: 1, n: 3 };
const arcs = (from: number[], to: number[], capacity: number[]) => ({ from, to, capacity });
const design = { delta: 1, sd: 1 };
const ones = [1, 1, 1];

/** What is called wrongly, and the whole message: who speaks, what was wanted, what came, and where. */
const refusals: readonly (readonly [string, () => unknown])[] = [
  ['here needs at least 1 values, got 0', () => requireNumbers('here', 'values', [])],
  ['here needs at least 3 ages, got 2', () => requireNumbers('here', 'ages', [1, 2], 3)],
  ['here needs finite numbers as ages, got NaN at index 1', () => requireNumbers('here', 'ages', [1, NaN])],
  ['here needs finite numbers as ages, got -Infinity at index 0', () => requireNumbers('here', 'ages', [-Infinity, 1])],
  ['here needs a < b, got 2, 1', () => requireThat(false, 'here', 'a < b', 2, 1)],

  ['adjustedRandIndex needs two lists of one length, got 0, 0', () => adjustedRandIndex([], [])],
  ['adjustedRandIndex needs two lists of one length, got 2, 1', () => adjustedRandIndex([1, 2], [1])],
  ['benjaminiHochberg needs p-values from 0 to 1, got 1.1', () => benjaminiHochberg([0.5, 1.1])],
  ['benjaminiHochberg needs p-values from 0 to 1, got -0.1', () => benjaminiHochberg([-0.1])],
  ['holm needs p-values from 0 to 1, got NaN', () => holm([NaN])],
  ['rateIncreasePerDegree needs a temperature above -273.15, got -273.15', () => rateIncreasePerDegree(-273.15)],
  ['rateIncreasePerDegree needs a temperature above -273.15, got Infinity', () => rateIncreasePerDegree(Infinity)],
  ['rateIncreasePerDegree needs an energy above 0, got 0', () => rateIncreasePerDegree(10, 0)],
  ['rateIncreasePerDegree needs an energy above 0, got Infinity', () => rateIncreasePerDegree(10, Infinity)],
  ['effectiveSampleSize needs at least one chain, got 0', () => effectiveSampleSize([])],
  ['effectiveSampleSize needs at least 4 draws in chain 0, got 3', () => effectiveSampleSize([[1, 2, 3]])],
  ['splitRHat needs chains of one length, got 4, 5', () => splitRHat([ones.concat(2), [1, 2, 3, 4, 5]])],
  [
    'splitRHat needs finite numbers as draws in chain 1, got NaN at index 3',
    () =>
      splitRHat([
        [1, 2, 3, 4],
        [1, 2, 3, NaN],
      ]),
  ],

  ['chiSquaredCdf needs x from 0 upwards, got -1', () => chiSquaredCdf(-1, 2)],
  ['chiSquaredUpperTail needs x from 0 upwards, got NaN', () => chiSquaredUpperTail(NaN, 2)],
  ['chiSquaredUpperTail needs df above 0, got 0', () => chiSquaredUpperTail(1, 0)],
  ['chiSquaredCdf needs df above 0, got Infinity', () => chiSquaredCdf(1, Infinity)],
  ['chiSquaredQuantile needs a probability from 0 to 1, got -0.1', () => chiSquaredQuantile(-0.1, 2)],
  ['chiSquaredQuantile needs a probability from 0 to 1, got 1.1', () => chiSquaredQuantile(1.1, 2)],
  ['chiSquaredQuantile needs df above 0, got 0', () => chiSquaredQuantile(0.5, 0)],
  ['chiSquaredQuantile needs df above 0, got Infinity', () => chiSquaredQuantile(0.5, Infinity)],
  ['fCdf needs f from 0 upwards, got -1', () => fCdf(-1, 2, 3)],
  ['fUpperTail needs both df above 0, got 0, 3', () => fUpperTail(1, 0, 3)],
  ['fUpperTail needs both df above 0, got 2, 0', () => fUpperTail(1, 2, 0)],
  ['fUpperTail needs both df above 0, got Infinity, 3', () => fUpperTail(1, Infinity, 3)],
  ['fUpperTail needs both df above 0, got 2, Infinity', () => fUpperTail(1, 2, Infinity)],
  ['noncentralT needs finite t and noncentrality, got Infinity', () => noncentralT(Infinity, 3, 1)],
  ['noncentralT needs finite t and noncentrality, got 1', () => noncentralT(1, 3, NaN)],
  ['noncentralT needs df above 0, got 0', () => noncentralT(1, 0, 1)],
  ['noncentralT needs df above 0, got Infinity', () => noncentralT(1, Infinity, 1)],
  ['normalCdf needs a number, got NaN', () => normalCdf(NaN)],
  ['normalQuantile needs a probability from 0 to 1, got -0.1', () => normalQuantile(-0.1)],
  ['normalQuantile needs a probability from 0 to 1, got 1.1', () => normalQuantile(1.1)],
  ['logNormalDensity needs sd above 0, got 0', () => logNormalDensity(0, 0, 0)],
  ['studentTCdf needs a number as t, got NaN', () => studentTCdf(NaN, 3)],
  ['studentTCdf needs df above 0, got 0', () => studentTCdf(1, 0)],
  ['studentTQuantile needs a probability from 0 to 1, got -0.1', () => studentTQuantile(-0.1, 3)],
  ['studentTQuantile needs a probability from 0 to 1, got 1.1', () => studentTQuantile(1.1, 3)],
  ['studentTQuantile needs df above 0, got 0', () => studentTQuantile(0.5, 0)],
  ['regularisedBeta needs a and b above 0, got 0, 1', () => regularisedBeta(0.5, 0.5, 0, 1)],
  ['regularisedBeta needs a and b above 0, got 1, 0', () => regularisedBeta(0.5, 0.5, 1, 0)],
  ['regularisedBeta needs x from 0 to 1, got -0.1', () => regularisedBeta(-0.1, 1, 1, 1)],
  ['regularisedBeta needs x from 0 to 1, got 1.1', () => regularisedBeta(1.1, 0, 1, 1)],
  ['regularisedBeta needs x from 0 to 1, got 1', () => regularisedBeta(1, -0.1, 1, 1)],
  ['regularisedBeta needs x from 0 to 1, got 0', () => regularisedBeta(0, 1.1, 1, 1)],
  ['regularisedGamma needs a above 0, got 0', () => regularisedGamma(0, 1)],
  ['regularisedGamma needs a above 0, got Infinity', () => regularisedGamma(Infinity, 1)],
  ['regularisedGamma needs x from 0 upwards, got -1', () => regularisedGamma(1, -1)],
  ['logGamma needs x > 0, got 0', () => logGamma(0)],
  ['logBeta needs arguments above 0, got 0', () => logBeta(3, 0)],
  ['solveIncreasing found no root within 1e6 of its start', () => solveIncreasing(() => ({ value: 1, slope: 0 }), 0)],
  ['solveIncreasing found no root within 1e6 of its start', () => solveIncreasing(() => ({ value: -1, slope: 0 }), 0)],

  ['quantile needs at least 1 values, got 0', () => quantile([], 0.5)],
  ['quantileOfSorted needs at least one value, got 0', () => quantileOfSorted([], 0.5)],
  ['quantileOfSorted needs a probability from 0 to 1, got -0.1', () => quantileOfSorted([1], -0.1)],
  ['quantileOfSorted needs a probability from 0 to 1, got 1.1', () => quantile([1], 1.1)],
  ['median needs at least 1 values, got 0', () => median([])],
  ['midranks needs finite numbers as values, got NaN at index 0', () => midranks([NaN])],
  ['tieSizes needs finite numbers as values, got NaN at index 0', () => tieSizes([NaN])],
  ['medianAbsoluteDeviation needs at least 1 values, got 0', () => medianAbsoluteDeviation([])],
  ['medianAbsoluteDeviation needs finite numbers as values, got Infinity at index 0', () => robustSd([Infinity])],
  ['summarise needs at least 1 values, got 0', () => summarise([])],

  ['grubbs needs at least 3 values, got 2', () => grubbs([1, 2])],
  ['grubbs needs finite numbers as values, got NaN at index 2', () => grubbs([1, 2, NaN])],
  ['grubbs needs an alpha between 0 and 1, got 0', () => grubbs([1, 2, 3], { alpha: 0 })],
  ['grubbs needs an alpha between 0 and 1, got 1', () => grubbs([1, 2, 3], { alpha: 1 })],
  ['generalizedEsd needs at least 3 values, got 2', () => generalizedEsd([1, 2], 1)],
  ['generalizedEsd needs a whole maxOutliers from 1 to 2, got 3', () => generalizedEsd([1, 2, 3, 4], 3)],
  ['generalizedEsd needs a whole maxOutliers from 1 to 2, got 0', () => generalizedEsd([1, 2, 3, 4], 0)],
  ['generalizedEsd needs an alpha between 0 and 1, got 0', () => generalizedEsd([1, 2, 3], 1, 0)],
  ['generalizedEsd needs an alpha between 0 and 1, got 1', () => generalizedEsd([1, 2, 3], 1, 1)],

  ['isotonicRegression needs finite numbers as values, got NaN at index 0', () => isotonicRegression([NaN])],
  ['isotonicRegression needs 2 weights, one a value, got 1', () => isotonicRegression([1, 2], [1])],
  [
    'isotonicRegression needs finite numbers as weights, got Infinity at index 1',
    () => isotonicRegression([1, 2], [1, Infinity]),
  ],
  ['isotonicRegression needs weights above 0, got 0', () => isotonicRegression([1, 2], [1, 0])],
  ['jonckheereTerpstra needs at least 2 groups, got 1', () => jonckheereTerpstra([[1, 2]])],
  ['jonckheereTerpstra needs at least 1 values in group 1, got 0', () => jonckheereTerpstra([[1], []])],
  ['kendallInterval needs a whole n of at least 2, got 1', () => kendallInterval(1, 0)],
  ['kendallInterval needs a whole n of at least 2, got 2.5', () => kendallInterval(2.5, 0)],
  ['kendallInterval needs a tau from -1 to 1, got 1.1', () => kendallInterval(5, 1.1)],
  ['kendallInterval needs a level between 0 and 1, got 0', () => kendallInterval(5, 0, 0)],
  ['kendallInterval needs a level between 0 and 1, got 1', () => kendallInterval(5, 0, 1)],
  ['kendallTauB needs at least 2 x, got 1', () => kendallTauB([1], [1, 2])],
  ['kendallTauB needs at least 2 y, got 1', () => kendallTauB([1, 2], [1])],
  ['kendallTauB needs two lists of one length, got 2, 3', () => kendallTauB([1, 2], ones)],
  ['kendallTauB needs a level between 0 and 1, got 0', () => kendallTauB([1, 1], [1, 2], { level: 0 })],
  ['kendallTauB needs a level between 0 and 1, got 1', () => kendallTauB([1, 1], [1, 2], { level: 1 })],
  ['mannWhitney needs at least 1 values in the first group, got 0', () => mannWhitney([], [1])],
  ['mannWhitney needs at least 1 values in the second group, got 0', () => mannWhitney([1], [])],
  ['smallestMannWhitneyP needs two whole sizes above 0, got 0, 3', () => smallestMannWhitneyP(0, 3)],
  ['smallestMannWhitneyP needs two whole sizes above 0, got 3, 0', () => smallestMannWhitneyP(3, 0)],
  ['smallestMannWhitneyP needs two whole sizes above 0, got 1.5, 3', () => smallestMannWhitneyP(1.5, 3)],
  ['smallestMannWhitneyP needs two whole sizes above 0, got 3, 1.5', () => smallestMannWhitneyP(3, 1.5)],

  ['maximumFlow needs at least 2 nodes, got 1', () => maximumFlow(1, arcs([], [], []), 0, 0)],
  ['maximumFlow needs at least 2 nodes, got 2.5', () => maximumFlow(2.5, arcs([], [], []), 0, 1)],
  ['minimumCut needs two nodes as ends, got 1, 1', () => minimumCut(2, arcs([], [], []), 1, 1)],
  ['minimumCut needs two nodes as ends, got -1, 1', () => minimumCut(2, arcs([], [], []), -1, 1)],
  ['minimumCut needs two nodes as ends, got 0, 2', () => minimumCut(2, arcs([], [], []), 0, 2)],
  ['minimumCut needs two nodes as ends, got 0, 0.5', () => minimumCut(2, arcs([], [], []), 0, 0.5)],
  ['maximumFlow needs lists of one length, got 1, 0, 1', () => maximumFlow(2, arcs([0], [], [1]), 0, 1)],
  ['maximumFlow needs lists of one length, got 1, 1, 0', () => maximumFlow(2, arcs([0], [1], []), 0, 1)],
  ['maximumFlow needs arcs between its nodes, got 2, 1', () => maximumFlow(2, arcs([2], [1], [1]), 0, 1)],
  ['maximumFlow needs arcs between its nodes, got 0, -1', () => maximumFlow(2, arcs([0], [-1], [1]), 0, 1)],
  ['maximumFlow needs capacities from 0 upwards, got -1', () => maximumFlow(2, arcs([0], [1], [-1]), 0, 1)],
  [
    'maximumFlow needs a limit on every way from source to sink, got a way without any limit',
    () => maximumFlow(2, arcs([0], [1], [Infinity]), 0, 1),
  ],

  ['oneWayAnova needs at least 1 values, got 0', () => oneWayAnova([[1, 2], []])],
  ['oneWayAnova needs at least 2 groups, got 1', () => oneWayAnova([[1, 2]])],
  ['oneWayAnova needs a group of at least 2 values, got 2 values in 2 groups', () => oneWayAnova([[1], [2]])],
  ['oneWayAnovaFromSummaries needs at least 2 groups, got 1', () => oneWayAnovaFromSummaries([one])],
  [
    'oneWayAnovaFromSummaries needs a finite mean, got NaN',
    () => oneWayAnovaFromSummaries([one, { ...one, mean: NaN }]),
  ],
  [
    'oneWayAnovaFromSummaries needs an sd from 0 upwards, got -1',
    () => oneWayAnovaFromSummaries([{ ...one, sd: -1 }, one]),
  ],
  [
    'oneWayAnovaFromSummaries needs an sd from 0 upwards, got Infinity',
    () => oneWayAnovaFromSummaries([one, { ...one, sd: Infinity }]),
  ],
  [
    'oneWayAnovaFromSummaries needs a whole n of at least 1, got 0',
    () => oneWayAnovaFromSummaries([one, { ...one, n: 0 }]),
  ],
  [
    'oneWayAnovaFromSummaries needs a whole n of at least 1, got 1.5',
    () => oneWayAnovaFromSummaries([one, { ...one, n: 1.5 }]),
  ],
  ['varianceComponents needs at least 2 groups, got 1', () => varianceComponents([[1, 2]])],
  ['summarise needs at least 1 values, got 0', () => welchTTest([], [1, 2])],
  ['welchFromSummaries needs a whole n of at least 2, got 1', () => welchFromSummaries({ ...one, n: 1 }, one)],
  ['welchFromSummaries needs a finite mean, got Infinity', () => welchFromSummaries(one, { ...one, mean: Infinity })],
  ['welchFromSummaries needs a level between 0 and 1, got 0', () => welchFromSummaries(one, one, { level: 0 })],
  ['welchFromSummaries needs a level between 0 and 1, got 1', () => welchTTest([1, 2], [1, 2], { level: 1 })],

  ['overlapOfNormals needs finite means, got NaN, 1', () => overlapOfNormals(NaN, 1, 1, 1)],
  ['overlapOfNormals needs finite means, got 1, Infinity', () => overlapOfNormals(1, 1, Infinity, 1)],
  ['overlapOfNormals needs standard deviations from 0 upwards, got -1, 1', () => overlapOfNormals(1, -1, 2, 1)],
  ['overlapOfNormals needs standard deviations from 0 upwards, got 1, -1', () => overlapOfNormals(1, 1, 2, -1)],
  [
    'overlapOfNormals needs standard deviations from 0 upwards, got Infinity, 1',
    () => overlapOfNormals(1, Infinity, 2, 1),
  ],
  [
    'overlapOfNormals needs standard deviations from 0 upwards, got 1, Infinity',
    () => overlapOfNormals(1, 1, 2, Infinity),
  ],
  ['equalDensityCut needs finite means, got 1, NaN', () => equalDensityCut(1, 1, NaN, 1)],
  ['equalDensityCut needs standard deviations above 0, got 0, 1', () => equalDensityCut(1, 0, 2, 1)],
  ['equalDensityCut needs standard deviations above 0, got 1, 0', () => equalDensityCut(1, 1, 2, 0)],

  ['powerTTest needs a finite delta, got Infinity', () => powerTTest({ delta: Infinity, sd: 1 }, 5)],
  ['powerTTest needs an sd above 0, got 0', () => powerTTest({ delta: 1, sd: 0 }, 5)],
  ['powerTTest needs an sd above 0, got Infinity', () => powerTTest({ delta: 1, sd: Infinity }, 5)],
  ['powerTTest needs an alpha between 0 and 1, got 0', () => powerTTest({ ...design, alpha: 0 }, 5)],
  ['powerTTest needs an alpha between 0 and 1, got 1', () => powerTTest({ ...design, alpha: 1 }, 5)],
  ['powerTTest needs groups of 1 or more, 3 together, got 1, 1', () => powerTTest(design, 1)],
  ['powerTTest needs groups of 1 or more, 3 together, got 0.5, 9', () => powerTTest(design, 0.5, 9)],
  ['powerTTest needs groups of 1 or more, 3 together, got 9, 0.5', () => powerTTest(design, 9, 0.5)],
  ['sampleSizeTTest needs a delta other than 0, got 0', () => sampleSizeTTest({ delta: 0, sd: 1 })],
  ['sampleSizeTTest needs a power between alpha and 1, got 0.05', () => sampleSizeTTest(design, 0.05)],
  ['sampleSizeTTest needs a power between alpha and 1, got 1', () => sampleSizeTTest(design, 1)],
  [
    'sampleSizeTTest needs a difference that 1e12 values can show, got 1e-8',
    () => sampleSizeTTest({ delta: 1e-8, sd: 1 }),
  ],

  ['createRandom needs a whole number up to 2^53 in size as seed, got 0.5', () => createRandom(0.5)],
  ['fork needs a whole number up to 2^53 in size as label, got 0.5', () => random.fork(0.5)],
  ['integer needs a whole number from 1 to 2^32, got 0', () => random.integer(0)],
  ['integer needs a whole number from 1 to 2^32, got 4294967297', () => random.integer(2 ** 32 + 1)],
  ['gamma needs a shape above 0, got 0', () => random.gamma(0)],
  ['gamma needs a shape above 0, got Infinity', () => random.gamma(Infinity)],
  ['sampleTruncatedNormal needs sd above 0, got 0', () => sampleTruncatedNormal(random, 0, 0, 1, 2)],
  ['sampleTruncatedNormal needs sd above 0, got Infinity', () => sampleTruncatedNormal(random, 0, Infinity, 1, 2)],
  ['sampleTruncatedNormal needs a finite mean, got NaN', () => sampleTruncatedNormal(random, NaN, 1, 1, 2)],
  [
    'sampleTruncatedNormal needs low at most high, and something between them, got 2, 1',
    () => sampleTruncatedNormal(random, 0, 1, 2, 1),
  ],
  [
    'sampleTruncatedNormal needs low at most high, and something between them, got Infinity, Infinity',
    () => sampleTruncatedNormal(random, 0, 1, Infinity, Infinity),
  ],
  [
    'sampleTruncatedNormal needs low at most high, and something between them, got -Infinity, -Infinity',
    () => sampleTruncatedNormal(random, 0, 1, -Infinity, -Infinity),
  ],

  ['yorkLine needs at least 2 x, got 1', () => yorkLine([1], [1], [1], [1])],
  ['yorkLine needs at least 1 x, got 0', () => yorkLine([], [], [], [], { slope: 1 })],
  ['yorkLine needs at least 3 y, got 2', () => yorkLine([1, 2, 3], [1, 2], ones, ones)],
  ['yorkLine needs finite numbers as x, got NaN at index 0', () => yorkLine([NaN, 2], [1, 2], [1, 1], [1, 1])],
  ['yorkLine needs lists of 2 values each, got 3', () => yorkLine([1, 2], ones, [1, 1], [1, 1])],
  ['yorkLine needs lists of 2 values each, got 1', () => yorkLine([1, 2], [1, 2], [1], [1, 1])],
  ['yorkLine needs lists of 2 values each, got 3', () => yorkLine([1, 2], [1, 2], [1, 1], ones)],
  [
    'yorkLine needs lists of 2 values each, got 1',
    () => yorkLine([1, 2], [1, 2], [1, 1], [1, 1], { correlation: [0] }),
  ],
  ['yorkLine needs weights above 0, got 0, 1', () => yorkLine([1, 2], [1, 2], [0, 1], [1, 1])],
  ['yorkLine needs weights above 0, got 1, 0', () => yorkLine([1, 2], [1, 2], [1, 1], [1, 0])],
  [
    'yorkLine needs an error in x or y of every point, got Infinity, Infinity',
    () => yorkLine([1, 2], [1, 2], [1, Infinity], [1, Infinity]),
  ],
  [
    'yorkLine needs correlations between -1 and 1, got 1',
    () => yorkLine([1, 2], [1, 2], [1, 1], [1, 1], { correlation: 1 }),
  ],
  [
    'yorkLine needs correlations between -1 and 1, got -1',
    () => yorkLine([1, 2], [1, 2], [1, 1], [1, 1], { correlation: [0, -1] }),
  ],
  ['yorkLine needs a finite slope, got Infinity', () => yorkLine([1, 2], [1, 2], [1, 1], [1, 1], { slope: Infinity })],
  ['yorkLine needs x values that differ, got one x for all points', () => yorkLine([1, 1], [1, 2], [1, 1], [1, 1])],
];

describe('what is refused, and what is said', () => {
  it.each(refusals)('%s', (message, call) => {
    expect(call).toThrow(new RangeError(message));
  });
});

describe('what lies on the border of what is refused', () => {
  it('is taken by the distributions', () => {
    expect([chiSquaredCdf(0, 2), chiSquaredUpperTail(0, 2)]).toEqual([0, 1]);
    expect([chiSquaredCdf(Infinity, 2), chiSquaredUpperTail(Infinity, 2)]).toEqual([1, 0]);
    expect([fCdf(0, 2, 3), fUpperTail(0, 2, 3), fCdf(Infinity, 2, 3), fUpperTail(Infinity, 2, 3)]).toEqual([
      0, 1, 1, 0,
    ]);
    expect(regularisedBeta(0, 1, 2, 3)).toEqual({ lower: 0, upper: 1 });
    expect(regularisedBeta(1, 0, 2, 3)).toEqual({ lower: 1, upper: 0 });
    expect(regularisedGamma(2, 0)).toEqual({ lower: 0, upper: 1 });
    expect(regularisedGamma(2, Infinity)).toEqual({ lower: 1, upper: 0 });
  });

  it('is taken where it can be answered', () => {
    expect([...benjaminiHochberg([0, 1]), ...holm([0, 1])]).toEqual([0, 1, 0, 1]);
    expect(grubbs([1, 2, 4]).index).toBe(2);
    expect(generalizedEsd([1, 2, 4], 1).steps.length).toBe(1);
    expect(kendallInterval(2, 0)).toEqual({ low: -1, high: 1 });
    expect(effectiveSampleSize([[1, 2, 3, 4]])).toBeGreaterThan(0);
    expect(mannWhitney([1], [2])).toEqual({ u: 0, p: 1, pLess: 0.5, pGreater: 1, exact: true });
    expect(smallestMannWhitneyP(1, 1)).toBe(1);
    expect(powerTTest(design, 1, 2)).toBeGreaterThan(0.05);
    expect(powerTTest(design, 2, 1)).toBe(powerTTest(design, 1, 2));
    expect(welchFromSummaries({ mean: 1, sd: 0, n: 2 }, { mean: 1, sd: 0, n: 2 }).p).toBe(1);
    expect(oneWayAnovaFromSummaries([{ mean: 1, sd: 0, n: 1 }, one]).dfWithin).toBe(2);
    expect(random.integer(2 ** 32)).toBeLessThan(2 ** 32);
    expect(adjustedRandIndex([1], ['a'])).toBe(1);
  });
});
