// Numbers at random

export { createRandom, type Random } from './random.js';
export { sampleTruncatedNormal } from './truncated-normal.js';

// Distributions

export { chiSquaredCdf, chiSquaredQuantile, chiSquaredUpperTail } from './chi-squared.js';
export { fCdf, fUpperTail } from './f-distribution.js';
export { noncentralT } from './noncentral-t.js';
export { logNormalDensity, normalCdf, normalQuantile } from './normal.js';
export { studentTCdf, studentTQuantile } from './student-t.js';

// Describing a sample

export type { Numbers } from './check.js';
export { median, medianOfSorted, quantile, quantileOfSorted } from './quantile.js';
export { midranks } from './ranks.js';
export { medianAbsoluteDeviation, robustSd } from './robust-sd.js';
export { type Summary, summarise } from './summary.js';

// Comparing groups

export { type JonckheereTerpstra, jonckheereTerpstra } from './jonckheere-terpstra.js';
export { type MannWhitney, mannWhitney, smallestMannWhitneyP } from './mann-whitney.js';
export { type OneWayAnova, oneWayAnova, oneWayAnovaFromSummaries } from './one-way-anova.js';
export { type PowerDesign, powerTTest, sampleSizeTTest } from './power-t-test.js';
export { type VarianceComponents, varianceComponents } from './variance-components.js';
export { type Welch, type WelchOptions, welchFromSummaries, welchTTest } from './welch.js';

// Many tests at once

export { benjaminiHochberg, holm } from './adjusted-p.js';

// Outliers

export { type EsdStep, type GeneralizedEsd, generalizedEsd } from './generalized-esd.js';
export { type Grubbs, type GrubbsOptions, grubbs } from './grubbs.js';

// Groupings and their overlap

export { adjustedRandIndex } from './adjusted-rand.js';
export { equalDensityCut, overlapOfNormals } from './overlap-of-normals.js';

// Orders and lines

export { emptyPools, isotonicRegression, type Pools, poolAdjacent } from './isotonic-regression.js';
export { kendallInterval } from './kendall-interval.js';
export { type KendallOptions, type KendallTauB, kendallTauB } from './kendall-tau.js';
export { type YorkLine, type YorkOptions, yorkLine } from './york-line.js';

// Networks

export { type Arcs, maximumFlow } from './maximum-flow.js';
export { type MinimumCut, minimumCut } from './minimum-cut.js';

// Judging chains of draws

export { type ChainOptions, effectiveSampleSize } from './effective-sample-size.js';
export { splitRHat } from './split-r-hat.js';

// Rates of reaction

export { rateIncreasePerDegree } from './arrhenius.js';

// Fingerprints of files

export { sha256Bytes } from './sha256.js';
