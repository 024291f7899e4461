import type { Findings, PlanRow } from '../model/index.js';
import { bedsToDate } from './beds-to-date.js';
import { boundedBy } from './bracketing.js';
import type { KnownOrder } from './known-order.js';
import { blankRow } from './plan-settings.js';
import { joinedInWords } from './plan-words.js';
import { type Soundness, soundnessOf } from './soundness.js';

/**
 * Which beds to date so that the most others are bracketed, a line for every budget from 1 up. A bed is bracketed when one
 * dated bed is known to be older than it and another to be younger ({@link knownOrder}); one that is stated to be as old as a dated bed does not count. The beds of a larger budget need
 * not hold those of a smaller one.
 *
 * @param reversed beds in a relation that is reversed after setting aside
 * @param budget most dates
 */
export function dateBeds(
  findings: Findings,
  known: KnownOrder,
  reversed: ReadonlySet<string>,
  budget: number,
): PlanRow[] {
  const sound = soundnessOf(findings, reversed);
  const soundness = known.beds.map((key) => sound.get(key)?.score ?? 0);
  const rows: PlanRow[] = [];
  let before = 0;
  for (let count = 1; count <= Math.min(budget, known.beds.length); count++) {
    const found = bedsToDate(known, count, { soundness });
    const others = known.beds.length - count;
    const names = found.beds.map((bed) => known.beds[bed]);
    const oneSided = found.bounded - found.bracketed;
    const what =
      count === 1
        ? `Dating ${names[0]} bounds ${found.bounded} of the ${others} other beds on one side, the most that one date can; one date brackets none.`
        : `Dating ${joinedInWords(names)} brackets ${found.bracketed} of the ${others} other beds between an older and a younger date, and bounds ${oneSided} more on one side. ${found.proven ? `No other ${count} beds bracket more.` : `No ${count} beds can bracket more than ${found.most}.`}`;
    const nothingMore =
      count > 2 && found.bracketed <= before ? [`That is no more than ${count - 1} dates bracket.`] : [];
    before = found.bracketed;
    rows.push({
      ...blankRow(null, 'date beds'),
      rank: count,
      beds: names,
      beds_bracketed: found.bracketed,
      proven_best: found.proven,
      settles: [what, ...nothingMore, ...doubtful(known, found.beds, sound)].join(' '),
    });
    // more dates than bracket anything new are no plan
    if (found.bounded === 0) break;
  }
  return rows;
}

/** What speaks against a named bed, and the soundest bed to take in its place. */
function doubtful(known: KnownOrder, chosen: readonly number[], sound: ReadonlyMap<string, Soundness>): string[] {
  return chosen.flatMap((bed, at) => {
    const key = known.beds[bed];
    const { doubts } = sound.get(key) ?? { doubts: ['has no mean of its own'] };
    if (doubts.length === 0) return [];
    let best = -1;
    let bestCount = { bracketed: -1, bounded: -1 };
    for (let other = 0; other < known.beds.length; other++) {
      const its = sound.get(known.beds[other]);
      if (chosen.includes(other) || !its || its.doubts.length > 0) continue;
      const counted = boundedBy(known, chosen.with(at, other));
      if (
        counted.bracketed > bestCount.bracketed ||
        (counted.bracketed === bestCount.bracketed && counted.bounded > bestCount.bounded)
      ) {
        [best, bestCount] = [other, counted];
      }
    }
    const instead =
      best === -1
        ? ''
        : `; ${known.beds[best]} in its place ${chosen.length === 1 ? `bounds ${bestCount.bounded}` : `brackets ${bestCount.bracketed}`}`;
    return [`But ${key} ${joinedInWords(doubts)}${instead}.`];
  });
}
