// Numbers at random

// Many tests at once
export { benjaminiHochberg, holm } from './adjusted-p.js';
// Groupings and their overlap
export { adjustedRandIndex } from './adjusted-rand.js';
// Input
export type { Numbers } from './check.js';
export { chiSquaredCdf, chiSquaredQuantile, chiSquaredUpperTail } from './chi-squared.js';
// Judging chains of draws
export { type ChainOptions, effectiveSampleSize } from './effective-sample-size.js';
export { fCdf, fUpperTail } from './f-distribution.js';
// Under an order
export { isotonicRegression } from './isotonic-regression.js';
// Comparing groups
export { type MannWhitney, mannWhitney, smallestMannWhitneyP } from './mann-whitney.js';
// Networks
export { type Arcs, maximumFlow } from './maximum-flow.js';
export { type MinimumCut, minimumCut } from './minimum-cut.js';
// Distributions
export { logNormalDensity, normalCdf, normalQuantile } from './normal.js';
export { overlapOfNormals } from './overlap-of-normals.js';
// Describing a sample
export { median, quantile, quantileOfSorted } from './quantile.js';
export { createRandom, type Random } from './random.js';
export { midranks } from './ranks.js';
export { medianAbsoluteDeviation, robustSd } from './robust-sd.js';
export { splitRHat } from './split-r-hat.js';
export { studentTCdf, studentTQuantile } from './student-t.js';
export { sampleTruncatedNormal } from './truncated-normal.js';
