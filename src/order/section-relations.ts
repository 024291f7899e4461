import type { BedPlace, RelationRecord } from '../model/index.js';

/** A bed and its place in its section. */
export interface PlacedBed {
  /** `section/bed`. */
  readonly key: string;
  readonly section: string;
  readonly place: BedPlace | null;
}

/** Height in a section whatever the kind of place: deeper is lower. */
export function heightOf(place: BedPlace): number {
  return place.kind === 'depth_m' ? -place.value : place.value;
}

/**
 * Superposition within sections from the beds' places: every bed is older than the beds at the next higher place of its
 * section. Beds at one place are not ordered; beds without a place take no part. Relations between beds further apart
 * follow from these.
 * @returns certain relations with basis `superposition`, lowest first in each section
 * @example
 * sectionRelations([]).length // => 0
 */
export function sectionRelations(beds: readonly PlacedBed[]): RelationRecord[] {
  const sections = new Map<string, PlacedBed[]>();
  for (const bed of beds) {
    if (bed.place === null) continue;
    const group = sections.get(bed.section);
    if (group === undefined) sections.set(bed.section, [bed]);
    else group.push(bed);
  }
  const relations: RelationRecord[] = [];
  for (const group of sections.values()) {
    const levels = new Map<number, string[]>();
    for (const bed of group) {
      const height = heightOf(bed.place!);
      levels.set(height, [...(levels.get(height) ?? []), bed.key]);
    }
    const heights = [...levels.keys()].sort((a, b) => a - b);
    for (let at = 0; at + 1 < heights.length; at++) {
      for (const lower of levels.get(heights[at])!) {
        for (const upper of levels.get(heights[at + 1])!) {
          relations.push({ lower, upper, basis: 'superposition', kind: 'older', certainty: 'certain', row: null });
        }
      }
    }
  }
  return relations;
}
