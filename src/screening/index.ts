// All rules together, in the order in which they run

export { type BedScreeningMark, type BedToScreen, screenBeds } from './screen-beds.js';
export { SCREENING_RULES, screenShells } from './screen-shells.js';
export { screenedOut } from './screened-out.js';

// The rules one by one

export { discordantRatios } from './discordant-ratios.js';
export { freeBelowTotal } from './free-below-total.js';
export { highSerine } from './high-serine.js';
export { lowYield } from './low-yield.js';
export { rateOrder } from './rate-order.js';
export { replicatesDisagree } from './replicates-disagree.js';

// What the rules are made of

export { countRatios } from './count-ratios.js';
export { type PairCurve, type PairPoint, pairCurves } from './pair-curves.js';
export { type RobustCurve, robustCurve } from './robust-curve.js';
export type { ScreeningRule } from './rule.js';
