// All rules together

export { discordantRatios } from './discordant-ratios.js';
export { freeBelowTotal } from './free-below-total.js';
// The rules, in the order in which they run
export { highSerine } from './high-serine.js';
export { lowYield } from './low-yield.js';
export { type PairCurve, type PairPoint, pairCurves } from './pair-curves.js';
export { rateOrder } from './rate-order.js';
export { replicatesDisagree } from './replicates-disagree.js';
export { type RobustCurve, robustCurve } from './robust-curve.js';
// What the rules are made of
export type { ScreeningRule } from './rule.js';
export { type BedScreeningMark, type BedToScreen, screenBeds } from './screen-beds.js';
export { SCREENING_RULES, screenShells } from './screen-shells.js';
export { screenedOut } from './screened-out.js';
