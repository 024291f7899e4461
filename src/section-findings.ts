import { testingDf } from './beds/index.js';
import type { BedSite, SectionRow } from './model/index.js';
import { heightOf } from './order/index.js';
import type { Settled } from './passes.js';
import type { Random } from './statistics/index.js';
import { checkSections } from './superposition/index.js';

/** Each section of a clock against its superposition. */
export function sectionRows(
  { last }: Settled,
  sites: ReadonlyMap<string, BedSite>,
  alpha: number,
  simulations: number,
  random: Random,
): SectionRow[] {
  const { data, relations } = last;
  const sections = new Map<string, { rank: number; mean: number; se: number }[]>();
  for (const bed of data.beds) {
    const place = sites.get(bed.key)?.place;
    const list = sections.get(bed.section) ?? [];
    sections.set(bed.section, list);
    if (bed.n > 0 && place != null) list.push({ rank: heightOf(place), mean: bed.mean, se: bed.se });
  }
  const lowerIn = new Map<string, number>();
  for (const { lower } of relations) {
    const section = sites.get(lower)?.section;
    if (section !== undefined) lowerIn.set(section, (lowerIn.get(section) ?? 0) + 1);
  }
  const checks = checkSections(
    [...sections].map(([section, beds]) => ({ section, beds })),
    random,
    { alpha, df: testingDf(data.scatter), simulations },
  );
  return checks.map(({ section, beds, statistic, p_order, verdict }) => ({
    clock: data.clock.name,
    section,
    beds,
    relations: lowerIn.get(section) ?? 0,
    statistic,
    p_order,
    verdict,
  }));
}
