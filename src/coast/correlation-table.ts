import type { BedRow, CorrelationRow, ZoneRow } from '../model/index.js';

/**
 * The correlation table: for each zone of a clock, oldest first, the beds of that zone in every section, sections in
 * coast order, beds of one section in the order of `beds`.
 */
export function correlationTable(
  zones: readonly Pick<ZoneRow, 'clock' | 'zone'>[],
  beds: readonly Pick<BedRow, 'clock' | 'section' | 'bed' | 'zone'>[],
  sections: readonly string[],
): CorrelationRow[] {
  return [...zones].reverse().map(({ clock, zone }) => ({
    clock,
    zone,
    sections: Object.fromEntries(
      sections.map((section) => [
        section,
        beds.filter((bed) => bed.clock === clock && bed.zone === zone && bed.section === section).map((bed) => bed.bed),
      ]),
    ),
  }));
}
