import { type BedEntry, type BedRegister, PLACE_KINDS } from './bed-register.js';
import type { ProblemList } from './problem-list.js';
import type { RowReader } from './row-reader.js';
import type { Cell } from './table.js';

/** The columns of a table that give places. */
export type PlaceColumns = readonly { readonly kind: (typeof PLACE_KINDS)[number]; readonly column: number }[];

/** The place columns that a table has. */
export function placeColumns(at: (key: string) => number): PlaceColumns {
  return PLACE_KINDS.map((kind) => ({ kind, column: at(kind) })).filter(({ column }) => column >= 0);
}

/** Reads the place in a row and enters it for the bed; null where the bed itself could not be read. */
export function readPlace(
  columns: PlaceColumns,
  cells: readonly Cell[],
  row: number,
  entry: BedEntry | null,
  reader: RowReader,
  beds: BedRegister,
  problems: ProblemList,
): void {
  let given: string | null = null;
  for (const { kind, column } of columns) {
    const value = reader.number(cells, row, column);
    if (value === null) continue;
    if (given !== null) {
      problems.error(
        'two kinds in a row',
        reader.place(row, column),
        `The row gives ${given} and ${kind} as well. Give one kind of place for a whole section.`,
      );
    } else if (kind === 'depth_m' && value < 0) {
      problems.error(
        'negative depth',
        reader.place(row, column),
        `depth_m is ${value}; a depth is counted downwards from the surface and is not below 0. Leave the minus sign out, or give height_m in its place.`,
      );
    } else if (entry !== null) beds.setPlace(entry, kind, value, () => reader.place(row, column) as PlacedAt);
    given ??= kind;
  }
}

type PlacedAt = { readonly file: string; readonly line: number; readonly column: string };
