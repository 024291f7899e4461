import type { BedPlace, RowPlace } from '../model/index.js';
import { LIMITS } from './limits.js';
import type { ProblemList } from './problem-list.js';

/** Kinds of place in a section, as their columns are named. */
export const PLACE_KINDS = ['level', 'height_m', 'depth_m'] as const;

/** What is known of one bed while the tables are read. */
export interface BedEntry {
  readonly section: string;
  readonly bed: string;
  /** Where the bed was named first. */
  readonly first: RowPlace;
  place: BedPlace | null;
  /** Where the place was given first. */
  placedAt: (RowPlace & { readonly column: string }) | null;
  /** Shells a taxon, as far as they matter: 0, 1, or 2 for more. */
  readonly shells: Map<string, { count: number; only: string; line: number }>;
}

/** All beds met so far, in order of appearance. */
export interface BedRegister {
  /** The bed, entered when it is new. */
  readonly enter: (section: string, bed: string, row: () => RowPlace) => BedEntry;
  readonly find: (section: string, bed: string) => BedEntry | null;
  readonly all: () => readonly BedEntry[];
  /** The beds of each section, in order of appearance. */
  readonly sections: () => ReadonlyMap<string, ReadonlyMap<string, BedEntry>>;
  /** Notes a bed's place; a second, different one is an error. */
  readonly setPlace: (
    entry: BedEntry,
    kind: BedPlace['kind'],
    value: number,
    place: () => RowPlace & { readonly column: string },
  ) => void;
}

/** Makes an empty register. */
export function createBedRegister(problems: ProblemList): BedRegister {
  const sections = new Map<string, Map<string, BedEntry>>();
  const all: BedEntry[] = [];
  return {
    enter: (section, bed, row) => {
      let beds = sections.get(section);
      if (beds === undefined) {
        beds = new Map();
        sections.set(section, beds);
      }
      let entry = beds.get(bed);
      if (entry === undefined) {
        if (all.length === LIMITS.beds) {
          problems.stop(
            'beds',
            row(),
            `The survey has more than ${LIMITS.beds} beds. Look for bed names that number the rows, or split the survey.`,
          );
        }
        entry = { section, bed, first: row(), place: null, placedAt: null, shells: new Map() };
        beds.set(bed, entry);
        all.push(entry);
      }
      return entry;
    },
    find: (section, bed) => sections.get(section)?.get(bed) ?? null,
    all: () => all,
    sections: () => sections,
    setPlace: (entry, kind, value, place) => {
      const { place: known, placedAt } = entry;
      if (known === null || placedAt === null) {
        entry.place = { kind, value };
        entry.placedAt = place();
        return;
      }
      if (known.kind === kind && known.value === value) return;
      const at = place();
      const where = placedAt.file === at.file ? `line ${placedAt.line}` : `${placedAt.file}, line ${placedAt.line}`;
      problems.error(
        'two places',
        at,
        `Bed ${entry.section}/${entry.bed} has two places: ${known.kind} ${known.value} (${where}) and ${kind} ${value}. ` +
          'A bed has one place in its section: give the same one in every row, or name two beds.',
      );
    },
  };
}
