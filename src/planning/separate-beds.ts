import type { Findings, PlanRow } from '../model/index.js';
import { type BedOnClock, bedKey, type ClockInView } from './bed-on-clock.js';
import { blankRow, type PlanSettings } from './plan-settings.js';
import { dealInWords, gapInWords, pairsInWords, percentInWords } from './plan-words.js';
import { shellsNeeded } from './shells-needed.js';
import { type UnresolvedPairs, varianceWith } from './unresolved-pairs.js';

/**
 * Neighbours in the order that are not resolved, and the shells that would resolve them. Those whose shells settle most
 * in the whole order, for each shell, come first; then those for which nothing is promised.
 */
export function separateBeds(
  findings: Findings,
  view: ClockInView,
  pairs: UnresolvedPairs,
  settings: PlanSettings,
): PlanRow[] {
  const order = findings.order.filter((row) => row.clock === view.clock);
  const bedOf = new Map(view.beds.map((bed) => [bed.key, bed]));
  const rows: { row: PlanRow; worth: number }[] = [];
  for (let at = 0; at + 1 < order.length; at++) {
    const [older, younger] = [bedOf.get(bedKey(order[at])), bedOf.get(bedKey(order[at + 1]))];
    // beds of one rank are stated to be as old
    if (order[at].resolved !== false || order[at].rank === order[at + 1].rank || !older || !younger) continue;
    const pair = pairs.of(older).find(({ b }) => b === younger);
    if (!pair) continue;
    const row = neighbours(view, older, younger, settings, (more) => ({
      chance: pairs.chance(pair, more),
      gained: pairs.gained(more),
    }));
    rows.push({ row, worth: row.total === null ? -1 : (row.pairs_gained ?? 0) / row.total });
  }
  rows.sort((a, b) => b.worth - a.worth);
  return rows.map(({ row }, at) => ({ ...row, rank: at + 1 }));
}

function neighbours(
  view: ClockInView,
  older: BedOnClock,
  younger: BedOnClock,
  settings: PlanSettings,
  worth: (more: ReadonlyMap<BedOnClock, number>) => { chance: number; gained: number },
): PlanRow {
  const gap = older.mean - younger.mean;
  const gapError = Math.sqrt(varianceWith(older, 0) + varianceWith(younger, 0));
  const spreadVariance = view.spreadVariance(older, younger);
  const needed =
    gap > 0
      ? shellsNeeded(
          {
            gap,
            scatter: view.scatter,
            shells: [older.shells, younger.shells],
            fixedVariance: older.otherVariance + younger.otherVariance,
            spreadVariance,
            df: view.df,
          },
          settings,
        )
      : null;
  const measured = `gap ${gapInWords(gap, gapError)}`;
  const tied = Math.abs(gap) <= gapError ? '; the gap is within its error, so they may truly be as old' : '';
  const base = {
    ...blankRow(view.clock, 'separate beds'),
    beds: [older.key, younger.key],
    gap,
    gap_error: gapError,
  };
  if (needed === null || needed.more[0] + needed.more[1] === 0) {
    const why =
      gap <= 0
        ? 'what is known of other beds puts the first before the second; the ratios of these two alone do not'
        : needed !== null
          ? 'their ratios alone would resolve them, but other relations pull on the order'
          : spreadVariance > 0 && Math.abs(gap) < 1.7 * Math.sqrt(spreadVariance)
            ? `${measured} is no more than beds of one age differ between sections`
            : `${measured} would need over ${settings.most} shells in a bed`;
    const settles = `No number of shells is promised to split ${older.key} and ${younger.key}: ${why}${tied}.`;
    return { ...base, settles };
  }
  const { chance, gained } = worth(
    new Map([
      [older, needed.more[0]],
      [younger, needed.more[1]],
    ]),
  );
  const settles =
    `${dealInWords(base.beds, needed.more)}: whether ${older.key} is older than ${younger.key}, with ` +
    `${percentInWords(needed.power)} power if the ${measured} holds (chance from here ${percentInWords(chance)})${tied}. ` +
    `Over the whole order, ${pairsInWords(gained)} expected to be newly resolved.`;
  return {
    ...base,
    shells: needed.more,
    total: needed.more[0] + needed.more[1],
    power: needed.power,
    chance,
    pairs_gained: gained,
    settles,
  };
}
