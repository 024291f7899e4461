import { DEFAULT_OPTIONS, type ScreeningLimits, type ScreeningMark, type Shell } from '../model/index.js';
import { discordantRatios } from './discordant-ratios.js';
import { freeBelowTotal } from './free-below-total.js';
import { highSerine } from './high-serine.js';
import { lowYield } from './low-yield.js';
import { pairCurvesByGroup } from './pair-curves.js';
import { rateOrder } from './rate-order.js';
import { replicatesDisagree } from './replicates-disagree.js';
import type { ScreeningRule } from './rule.js';

/** The rules for shells, in the order in which their marks are told. */
export const SCREENING_RULES: readonly ScreeningRule[] = [
  highSerine,
  discordantRatios,
  rateOrder,
  freeBelowTotal,
  replicatesDisagree,
  lowYield,
];

/**
 * All marks of all rules on the shells of a run (design 7.2), by shell and then in the order of {@link
 * SCREENING_RULES}. A shell gets a mark at most once a rule. Marks set nothing aside here; see `screenedOut`.
 *
 * @param shells All shells of the run, of any taxa and fractions.
 * @param limits Limits of the rules; the defaults of the design when absent.
 */
export function screenShells(
  shells: readonly Shell[],
  limits: ScreeningLimits = DEFAULT_OPTIONS.screening,
): ScreeningMark[] {
  const curves = pairCurvesByGroup(shells);
  const marks = SCREENING_RULES.flatMap((rule) => rule(shells, limits, curves));
  return marks
    .map((mark, order) => ({ mark, order }))
    .sort((a, b) => a.mark.shell - b.mark.shell || a.order - b.order)
    .map(({ mark }) => mark);
}
