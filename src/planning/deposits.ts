import type { BedOnClock, ClockInView } from './bed-on-clock.js';
import type { KnownOrder } from './known-order.js';

/**
 * A clock with the beds that the field states to be as old joined into one deposit each, as the order joins them: its
 * mean is that of all their shells.
 */
export function withDeposits(view: ClockInView, known: KnownOrder): ClockInView {
  const groups: BedOnClock[][] = [];
  for (const bed of view.beds) {
    const at = known.indexOf.get(bed.key)!;
    const group = groups.find(([first]) => known.asOld(known.indexOf.get(first.key)!, at));
    if (group) group.push(bed);
    else groups.push([bed]);
  }
  return { ...view, beds: groups.map((beds) => (beds.length === 1 ? beds[0] : joined(beds, view.scatter))) };
}

function joined(beds: readonly BedOnClock[], scatter: number): BedOnClock {
  const shells = beds.reduce((sum, bed) => sum + bed.shells, 0);
  const fewest = beds.reduce((least, bed) => (bed.shells < least.shells ? bed : least));
  const sections = new Map<string, number>();
  for (const bed of beds) {
    for (const [section, share] of bed.sections) {
      sections.set(section, (sections.get(section) ?? 0) + (share * bed.shells) / shells);
    }
  }
  return {
    key: fewest.key,
    members: beds.flatMap((bed) => bed.members),
    sections,
    shells,
    mean: beds.reduce((sum, bed) => sum + bed.mean * bed.shells, 0) / shells,
    shellVariance: (scatter * scatter) / shells,
    otherVariance: beds.reduce((sum, bed) => sum + bed.otherVariance * (bed.shells / shells) ** 2, 0),
    row: fewest.row,
  };
}
