import type { AdjacentZonesRow, Findings, PlanRow } from '../model/index.js';
import { normalCdf, studentTQuantile } from '../statistics/index.js';
import { smallestRankP, TOUCHING_OVERLAP } from '../zones/adjacent-zones.js';
import type { BedOnClock, ClockInView } from './bed-on-clock.js';
import { blankRow, type PlanSettings } from './plan-settings.js';
import { dealInWords, gapInWords, percentInWords, shellsInWords } from './plan-words.js';
import { varianceWith } from './unresolved-pairs.js';

/** Shells of a bed that the plan would add to a zone. */
const SHELLS_OF_A_NEW_BED = 5;
/** Most new beds a zone that the plan promises anything of. */
const MOST_NEW_BEDS = 20;

/**
 * Neighbouring zones that are not shown to be distinct, and the shells from their beds that would show it: enough for a
 * comparison of ranks to reach alpha at all, and for the means to differ at alpha by bed-level errors and by the two
 * standard deviations that an overlap of 0.3173 asks for, as the zones are tested (design 7.4). Where more shells from the
 * same beds can't do it, new beds are asked for; where the shells themselves overlap too much, nothing is promised.
 */
export function separateZones(findings: Findings, view: ClockInView, settings: PlanSettings): PlanRow[] {
  const rows = findings.adjacent_zones
    .filter((row) => row.clock === view.clock && row.verdict !== 'distinct')
    .map((row) =>
      neighbours(view, row, settings, findings.clocks.find(({ clock }) => clock === view.clock)?.spread ?? 0),
    );
  return rows
    .sort((a, b) => (a.total ?? Number.POSITIVE_INFINITY) - (b.total ?? Number.POSITIVE_INFINITY))
    .map((row, at) => ({ ...row, rank: at + 1 }));
}

function neighbours(view: ClockInView, row: AdjacentZonesRow, settings: PlanSettings, spread: number): PlanRow {
  const of = (zone: string) => view.beds.filter((bed) => bed.row.zone === zone);
  const sides = [of(row.older), of(row.younger)] as const;
  const gap = row.difference;
  const names = `${row.older} and ${row.younger}`;
  const variance = (deal: ReadonlyMap<BedOnClock, number>, newBeds: number) =>
    sides.reduce((sum, beds) => {
      let information = newBeds / (spread ** 2 + view.scatter ** 2 / SHELLS_OF_A_NEW_BED);
      for (const bed of beds) information += 1 / (spread ** 2 + varianceWith(bed, deal.get(bed) ?? 0));
      return sum + 1 / information;
    }, 0);
  const now = variance(new Map(), 0);
  const base = {
    ...blankRow(view.clock, 'separate zones'),
    beds: sides.flat().map((bed) => bed.key),
    gap,
    gap_error: Math.sqrt(now),
  };
  const nothing = (why: string): PlanRow => ({
    ...base,
    settles: `No number of shells is promised to part ${names}: ${why}.`,
  });
  if (sides[0].length === 0 || sides[1].length === 0) return nothing('one of them has no bed of its own');
  if (row.overlap > TOUCHING_OVERLAP) {
    return nothing(
      `their shells overlap by ${row.overlap.toFixed(2)}, more than ${TOUCHING_OVERLAP.toFixed(2)}, and more shells don't lessen that; an amino acid of higher resolution may`,
    );
  }
  const apart = 2 * Math.hypot(view.scatter, spread);
  const power = (v: number, df: number) =>
    normalCdf(
      (Math.abs(gap) - Math.max(apart, studentTQuantile(1 - settings.alpha / 2, df) * Math.sqrt(v))) / Math.sqrt(v),
    );
  const bedDf = Math.max(1, sides[0].length + sides[1].length - 2);
  const df = (more: number, newBeds: number) => (spread > 0 ? bedDf + 2 * newBeds : view.df + more);
  const counts = sides.map((beds) => beds.reduce((sum, bed) => sum + bed.shells, 0));

  const deal = new Map<BedOnClock, number>();
  const dealt: [number, number] = [0, 0];
  for (let total = 0; total <= 2 * settings.most; total++) {
    const ranked = smallestRankP(counts[0] + dealt[0], counts[1] + dealt[1]) <= settings.alpha;
    const reached = power(variance(deal, 0), df(total, 0));
    if (ranked && reached >= settings.power) {
      const shells = base.beds.map((key) => [...deal].find(([bed]) => bed.key === key)?.[1] ?? 0);
      const settles =
        total === 0
          ? `${names}: the present shells would part them with ${percentInWords(reached)} power if the gap ${gapInWords(gap, Math.sqrt(now))} holds; look again at the overlap.`
          : `${dealInWords(base.beds, shells)}: whether ${names} are distinct, with ${percentInWords(reached)} power if the gap ${gapInWords(gap, Math.sqrt(now))} holds.`;
      return { ...base, shells, total, power: reached, settles };
    }
    const next = bestForOneShell(
      sides,
      deal,
      spread,
      ranked ? null : counts[0] + dealt[0] <= counts[1] + dealt[1] ? 0 : 1,
    );
    deal.set(next.bed, (deal.get(next.bed) ?? 0) + 1);
    dealt[next.side] += 1;
  }
  for (let beds = 1; beds <= MOST_NEW_BEDS; beds++) {
    const reached = power(variance(new Map(), beds), df(0, beds));
    if (reached < settings.power) continue;
    const count = `${beds} new ${beds === 1 ? 'bed' : 'beds'}`;
    return {
      ...base,
      power: reached,
      settles: `${count} of each of ${names}, ${shellsInWords(SHELLS_OF_A_NEW_BED).replace('more ', '')} each: whether they are distinct, with ${percentInWords(reached)} power. More shells from the present beds would not do: beds of one zone differ too much.`,
    };
  }
  return nothing(`the gap ${gapInWords(gap, Math.sqrt(now))} is too small beside its error and the spread of shells`);
}

/** The bed, of one side or either, where one more shell lessens the error of its zone's mean the most. */
function bestForOneShell(
  sides: readonly (readonly BedOnClock[])[],
  deal: ReadonlyMap<BedOnClock, number>,
  spread: number,
  only: number | null,
): { bed: BedOnClock; side: number } {
  let best = { bed: sides[0][0], side: 0 };
  let gain = -1;
  sides.forEach((beds, side) => {
    if (only !== null && side !== only) return;
    const information = (changed: BedOnClock | null) =>
      beds.reduce(
        (sum, bed) => sum + 1 / (spread ** 2 + varianceWith(bed, (deal.get(bed) ?? 0) + (bed === changed ? 1 : 0))),
        0,
      );
    const now = 1 / information(null);
    for (const bed of beds) {
      const its = now - 1 / information(bed);
      if (its > gain + 1e-15) [best, gain] = [{ bed, side }, its];
    }
  });
  return best;
}
