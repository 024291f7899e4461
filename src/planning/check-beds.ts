import type { Findings, PlanRow, RelationRow } from '../model/index.js';
import type { BedOnClock, ClockInView } from './bed-on-clock.js';
import { blankRow, type PlanSettings } from './plan-settings.js';
import { joinedInWords, pairsInWords, shellsInWords } from './plan-words.js';
import { resolvingPower } from './power.js';

import { shellsForBothGroups } from './two-groups.js';
import type { UnresolvedPairs } from './unresolved-pairs.js';

/** Relations of a clock that are reversed after setting aside. */
export function reversedRelations(findings: Findings, clock: string): RelationRow[] {
  return findings.relations.filter((row) => row.clock === clock && row.verdict_after === 'reversed');
}

/**
 * The reversed and mixed beds that deserve new shells first: those in the most reversed relations, then those of mixed
 * age, then those whose shells settle most in the whole order. Of two beds in one reversed relation, the one that also
 * stands in others, or rests on fewer shells, comes first.
 */
export function checkBeds(
  findings: Findings,
  view: ClockInView,
  pairs: UnresolvedPairs,
  settings: PlanSettings,
): PlanRow[] {
  const reversed = reversedRelations(findings, view.clock);
  const bedOf = new Map(view.beds.map((bed) => [bed.key, bed]));
  const candidates = view.beds
    .map((bed) => ({
      bed,
      against: reversed.filter((row) => row.lower === bed.key || row.upper === bed.key),
      mixed: bed.row.marks.includes('mixed age'),
    }))
    .filter(({ against, mixed }) => against.length > 0 || mixed)
    .map((candidate) => ({ ...candidate, ...request(findings, view, candidate, bedOf, settings) }))
    .map((candidate) => ({ ...candidate, gained: pairs.gained(new Map([[candidate.bed, candidate.shells]])) }));
  candidates.sort(
    (a, b) =>
      b.against.length - a.against.length ||
      Number(b.mixed) - Number(a.mixed) ||
      a.bed.shells - b.bed.shells ||
      b.gained - a.gained,
  );
  return candidates.map(
    ({ bed, shells, why, gained }, at): PlanRow => ({
      ...blankRow(view.clock, 'check bed'),
      rank: at + 1,
      beds: [bed.key],
      shells: [shells],
      total: shells,
      pairs_gained: gained,
      settles: `${shellsInWords(shells)} from ${bed.key} (now ${bed.shells}), from another place in the bed: ${why}.${gained < 0.05 ? '' : ` Over the whole order, ${pairsInWords(gained)} expected to be newly resolved.`}`,
    }),
  );
}

/** How many shells, and what they would settle. */
function request(
  findings: Findings,
  view: ClockInView,
  { bed, against, mixed }: { bed: BedOnClock; against: readonly RelationRow[]; mixed: boolean },
  bedOf: ReadonlyMap<string, BedOnClock>,
  settings: PlanSettings,
): { shells: number; why: string } {
  const parts: string[] = [];
  const fewest = findings.options.screening.shells_a_bed;
  // never under what makes a bed more than provisional: a second collection must stand by itself
  let shells = Math.min(fewest, settings.most);
  if (against.length > 0) {
    const others = against.map((row) => (row.lower === bed.key ? row.upper : row.lower));
    const relations = against.length === 1 ? 'relation' : 'relations';
    parts.push(
      `whether its reversed ${relations} to ${joinedInWords(others)} ${against.length === 1 ? 'rests' : 'rest'} on these shells or on the bed`,
    );
    for (const name of others) shells = Math.max(shells, confirming(view, bed, bedOf.get(name), settings));
  }
  if (mixed) {
    const both = shellsForBothGroups(findings, view, bed, settings.power, settings.most);
    shells = Math.max(shells, both);
    parts.push('whether it holds shells of two ages, with three or more of either');
  }
  return { shells, why: parts.join(', and ') };
}

/** More shells of this bed alone that would show a reversal as large as measured again; 0 where none up to the limit do. */
function confirming(view: ClockInView, bed: BedOnClock, other: BedOnClock | undefined, settings: PlanSettings): number {
  if (!other) return 0;
  const gap = bed.mean - other.mean;
  for (let more = 1; bed.shells + more <= settings.most; more++) {
    // the new shells by themselves against the other bed
    const design = {
      gap,
      scatter: view.scatter,
      shells: [more, other.shells] as const,
      fixedVariance: bed.otherVariance + other.otherVariance,
      spreadVariance: view.spreadVariance(bed, other),
      df: view.df + more,
    };
    if (resolvingPower(design, settings) >= settings.power) return more;
  }
  return 0;
}
