// Numbers at random

// Many tests at once
export { benjaminiHochberg, holm } from './adjusted-p.js';
// Groupings and their overlap
export { adjustedRandIndex } from './adjusted-rand.js';
// Rates of reaction
export { rateIncreasePerDegree } from './arrhenius.js';
// Describing a sample
export type { Numbers } from './check.js';
export { chiSquaredCdf, chiSquaredQuantile, chiSquaredUpperTail } from './chi-squared.js';
// Judging chains of draws
export { type ChainOptions, effectiveSampleSize } from './effective-sample-size.js';
export { fCdf, fUpperTail } from './f-distribution.js';
export { type EsdStep, type GeneralizedEsd, generalizedEsd } from './generalized-esd.js';
// Outliers
export { type Grubbs, type GrubbsOptions, grubbs } from './grubbs.js';
// Orders and lines
export { isotonicRegression } from './isotonic-regression.js';
export { type JonckheereTerpstra, jonckheereTerpstra } from './jonckheere-terpstra.js';
export { kendallInterval } from './kendall-interval.js';
export { type KendallOptions, type KendallTauB, kendallTauB } from './kendall-tau.js';
export { type MannWhitney, mannWhitney, smallestMannWhitneyP } from './mann-whitney.js';
// Networks
export { type Arcs, maximumFlow } from './maximum-flow.js';
export { type MinimumCut, minimumCut } from './minimum-cut.js';
export { noncentralT } from './noncentral-t.js';
// Distributions
export { logNormalDensity, normalCdf, normalQuantile } from './normal.js';
export { type OneWayAnova, oneWayAnova, oneWayAnovaFromSummaries } from './one-way-anova.js';
export { equalDensityCut, overlapOfNormals } from './overlap-of-normals.js';
export { type PowerDesign, powerTTest, sampleSizeTTest } from './power-t-test.js';
export { median, quantile, quantileOfSorted } from './quantile.js';
export { createRandom, type Random } from './random.js';
export { midranks } from './ranks.js';
export { medianAbsoluteDeviation, robustSd } from './robust-sd.js';
export { splitRHat } from './split-r-hat.js';
export { studentTCdf, studentTQuantile } from './student-t.js';
export { type Summary, summarise } from './summary.js';
export { sampleTruncatedNormal } from './truncated-normal.js';
export { type VarianceComponents, varianceComponents } from './variance-components.js';
// Comparing groups
export { type Welch, type WelchOptions, welchFromSummaries, welchTTest } from './welch.js';
export { type YorkLine, type YorkOptions, yorkLine } from './york-line.js';
