import type { Findings, PlanRow } from '../model/index.js';
import { type BedOnClock, bedKey, type ClockInView } from './bed-on-clock.js';
import { blankRow, type PlanSettings } from './plan-settings.js';
import { dealInWords, gapInWords, joinedInWords, pairsInWords, percentInWords } from './plan-words.js';
import { shellsNeeded } from './shells-needed.js';
import { spreadAfter } from './spread-after.js';
import { type UnresolvedPair, type UnresolvedPairs, varianceWith } from './unresolved-pairs.js';

/** Standard errors by which the gap in the order falls short of the measured one before it is used instead. */
const PULLED = 0.3;

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
  const depositOf = new Map(view.beds.flatMap((bed) => bed.members.map((key) => [key, bed] as const)));
  const rows: { row: PlanRow; worth: number }[] = [];
  for (let at = 0; at + 1 < order.length; at++) {
    const [older, younger] = [depositOf.get(bedKey(order[at])), depositOf.get(bedKey(order[at + 1]))];
    // beds of one rank are stated to be as old
    if (order[at].resolved !== false || order[at].rank === order[at + 1].rank || !older || !younger) continue;
    const pair = pairs.of(older).find(({ b }) => b === younger);
    if (!pair) continue;
    const row = neighbours(view, pair, settings, (more, spreadVariance) => ({
      chance: pairs.chance(pair, more, spreadVariance),
      gained: pairs.gained(more),
    }));
    rows.push({ row, worth: row.total === null ? -1 : (row.pairs_gained ?? 0) / row.total });
  }
  rows.sort((a, b) => b.worth - a.worth);
  return rows.map(({ row }, at) => ({ ...row, rank: at + 1 }));
}

function neighbours(
  view: ClockInView,
  { a: older, b: younger, gap: inOrder }: UnresolvedPair,
  settings: PlanSettings,
  worth: (more: ReadonlyMap<BedOnClock, number>, spreadVariance: number) => { chance: number; gained: number },
): PlanRow {
  const gap = older.mean - younger.mean;
  const gapError = Math.sqrt(varianceWith(older, 0) + varianceWith(younger, 0));
  const spreadVariance = view.spreadVariance(older, younger);
  // other beds can pull the two together in the order: then no more is promised than that smaller gap allows
  const pulled = inOrder < gap - PULLED * Math.sqrt(gapError ** 2 + spreadVariance);
  const used = pulled ? inOrder : gap;
  const spread2 = spreadAfter(view, [older, younger]);
  const spreadVarianceAfter = (more: readonly [number, number]) => view.spreadVariance(older, younger, spread2(more));
  const needed =
    used > 0
      ? shellsNeeded(
          {
            gap: used,
            scatter: view.scatter,
            shells: [older.shells, younger.shells],
            fixedVariance: older.otherVariance + younger.otherVariance,
            spreadVariance,
            df: view.df,
          },
          { ...settings, spreadVarianceAfter },
        )
      : null;
  const measured = `gap ${gapInWords(gap, gapError)}${pulled ? `, in the order ${used.toFixed(3)},` : ''}`;
  const tied = Math.abs(gap) <= gapError ? '; the gap is within its error, so they may truly be as old' : '';
  const base = {
    ...blankRow(view.clock, 'separate beds'),
    beds: [older.key, younger.key],
    gap,
    gap_error: gapError,
  };
  if (needed === null || needed.more[0] + needed.more[1] === 0) {
    // what would be left between beds of one age after a great many shells
    const hidden = spreadVarianceAfter([settings.most, settings.most]);
    const why =
      gap <= 0
        ? 'other beds put the first before the second; the ratios of these two alone do not'
        : used <= 0
          ? `what is known of other beds leaves nothing of the gap ${gapInWords(gap, gapError)} in the order`
          : needed !== null
            ? 'their ratios alone would resolve them, but other beds pull on the order'
            : hidden > 0 && used < 1.7 * Math.sqrt(hidden)
              ? `the ${measured} is no more than beds of one age differ between sections`
              : `the ${measured} would need over ${settings.most} shells in a bed`;
    const settles = `No number of shells is promised to split ${named(older)} and ${named(younger)}: ${why}${tied}.`;
    return { ...base, settles };
  }
  const { chance, gained } = worth(
    new Map([
      [older, needed.more[0]],
      [younger, needed.more[1]],
    ]),
    spreadVarianceAfter(needed.more),
  );
  const settles =
    `${dealInWords(base.beds, needed.more)}: whether ${named(older)} is older than ${named(younger)}, with ` +
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

/** A deposit by its bed with the fewest shells, and the beds stated to be as old. */
function named({ key, members }: BedOnClock): string {
  const others = members.filter((member) => member !== key);
  return others.length === 0 ? key : `${key} (as old as ${joinedInWords(others)})`;
}
