import type { RelationRecord } from '../model/index.js';
import type { BedEntry, BedRegister } from './bed-register.js';
import type { ProblemList } from './problem-list.js';

/**
 * Checks the places of the beds within their sections: one kind a section (else an error); warnings for a bed without a
 * place among others, for beds at one place, and for a survey without any place. A relation with another bed of the section
 * is as good as a place.
 */
export function checkPlaces(
  beds: BedRegister,
  relations: readonly RelationRecord[],
  shellsFile: string,
  problems: ProblemList,
): void {
  const sections = beds.sections();
  const related = relatedWithin(beds, relations);
  const several = [...sections.values()].some((ofSection) => ofSection.size > 1);
  if (several && related.size === 0 && beds.all().every((entry) => entry.place === null)) {
    problems.warning(
      'no places',
      { file: shellsFile },
      'No table gives the places of beds in their sections, so superposition is not known. Add level (counted upwards), height_m or depth_m, here or in a beds table.',
    );
    return;
  }
  for (const [section, ofSection] of sections) {
    if (ofSection.size < 2) continue;
    const placed = new Map<number, BedEntry>();
    let first: BedEntry | null = null;
    for (const entry of ofSection.values()) {
      const { place, placedAt } = entry;
      if (place === null || placedAt === null) {
        if (related.has(entry)) continue;
        problems.warning(
          'no place',
          entry.first,
          `Bed ${section}/${entry.bed} has no place in its section: it is neither above nor below the other beds. Give its level, height_m or depth_m, or state a relation.`,
        );
        continue;
      }
      first ??= entry;
      if (place.kind !== first.place!.kind) {
        problems.error(
          'two kinds',
          placedAt,
          `Section ${section} has places of two kinds: ${first.place!.kind} (bed ${first.bed}, ${lineOf(first)}) and ${place.kind} (bed ${entry.bed}). Give one kind for the whole section.`,
        );
        continue;
      }
      const twin = placed.get(place.value);
      if (twin === undefined) placed.set(place.value, entry);
      else {
        problems.warning(
          'same place',
          placedAt,
          `Beds ${twin.bed} and ${entry.bed} of section ${section} both have ${place.kind} ${place.value} (${lineOf(twin)}): neither is above the other. Correct it if one is.`,
        );
      }
    }
  }
}

/** Beds that a relation ties to another bed of their own section. */
function relatedWithin(beds: BedRegister, relations: readonly RelationRecord[]): Set<BedEntry> {
  const related = new Set<BedEntry>();
  if (relations.length === 0) return related;
  const byKey = new Map(beds.all().map((entry) => [`${entry.section}/${entry.bed}`, entry]));
  for (const { lower, upper } of relations) {
    const [below, above] = [byKey.get(lower), byKey.get(upper)];
    if (below === undefined || above === undefined || below.section !== above.section) continue;
    related.add(below).add(above);
  }
  return related;
}

function lineOf(entry: BedEntry): string {
  return entry.placedAt === null ? '' : `${entry.placedAt.file}, line ${entry.placedAt.line}`;
}
