/** The planning room: what to collect or date next, and incoming dates against the order. Works from Findings alone. */

// What it rests on
export { assumedScatter } from './assumed-scatter.js';
export { type BedsToDate, type BedsToDateOptions, bedsToDate } from './beds-to-date.js';
export { type Bounded, boundedBy, type OlderAndYounger } from './bracketing.js';
export { compareDates, type DateComparison, type DatedAge } from './compare-dates.js';
export { type FewestToDoubt, fewestToDoubt } from './fewest-to-doubt.js';
// Dates against the order
export { type JudgeDatesOptions, judgeDates } from './judge-dates.js';
export { type KnownOrder, knownOrder } from './known-order.js';
// The plan
export { type PlanOptions, plan } from './plan.js';
export { MOST_BEDS_PLANNED, planOfRun } from './plan-of-run.js';
export { chanceFromHere, type PairDesign, type PresentPair, type ResolvingRule, resolvingPower } from './power.js';
export { type ShellsNeeded, type ShellsNeededOptions, shellsInEach, shellsNeeded } from './shells-needed.js';
