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
  const cells = new Map<string, string[]>();
  const cellOf = (clock: string, zone: string | null, section: string): string =>
    JSON.stringify([clock, zone, section]);
  for (const { clock, zone, section, bed } of beds) {
    const cell = cellOf(clock, zone, section);
    const names = cells.get(cell);
    if (names === undefined) cells.set(cell, [bed]);
    else names.push(bed);
  }
  return [...zones].reverse().map(({ clock, zone }) => ({
    clock,
    zone,
    sections: Object.fromEntries(sections.map((section) => [section, cells.get(cellOf(clock, zone, section)) ?? []])),
  }));
}
