import type { PlanRow } from '../model/index.js';
import type { ClockInView } from './bed-on-clock.js';
import { blankRow } from './plan-settings.js';
import { pairsInWords, shellsInWords } from './plan-words.js';
import type { UnresolvedPairs } from './unresolved-pairs.js';

/** Sizes of a further collection from one bed. */
export const FURTHER_SHELLS = [3, 5, 10] as const;

/**
 * The beds from which 3, 5 or 10 more shells are expected to resolve the most pairs of the order, the best for 5 first.
 *
 * @param limit Most beds named.
 */
export function strengthenBeds(view: ClockInView, pairs: UnresolvedPairs, limit: number): PlanRow[] {
  const beds = view.beds
    .map((bed) => ({ bed, gains: FURTHER_SHELLS.map((count) => pairs.gained(new Map([[bed, count]]))) }))
    .filter(({ gains }) => gains[1] >= 0.05)
    .sort((a, b) => b.gains[1] - a.gains[1])
    .slice(0, limit);
  return beds.flatMap(({ bed, gains }, at) =>
    FURTHER_SHELLS.map((count, size): PlanRow => {
      const open = pairs.of(bed).length;
      return {
        ...blankRow(view.clock, 'strengthen bed'),
        rank: at + 1,
        beds: [bed.key],
        shells: [count],
        total: count,
        pairs_gained: gains[size],
        settles: `${shellsInWords(count)} from ${bed.key} (now ${bed.shells}): ${pairsInWords(gains[size])} of the ${open} unresolved ones it stands in expected to be resolved.`,
      };
    }),
  );
}
