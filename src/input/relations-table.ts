import type { RelationBasis, RelationRecord } from '../model/index.js';
import { nearestName } from './edit-distance.js';
import { matchColumns, warnOfUnknownColumns } from './match-columns.js';
import { ownValue } from './own-value.js';
import type { ProblemList } from './problem-list.js';
import { createRowReader } from './row-reader.js';
import { squash } from './squash.js';
import type { Table } from './table.js';

const BASES: Readonly<Record<string, RelationBasis>> = {
  superposition: 'superposition',
  crosscutting: 'cross-cutting',
  inset: 'inset',
  staircase: 'staircase',
  inclusion: 'inclusion',
  marker: 'marker',
};
const KINDS: Readonly<Record<string, 'older' | 'same'>> = { older: 'older', same: 'same' };
const CERTAINTIES: Readonly<Record<string, 'certain' | 'probable'>> = { certain: 'certain', probable: 'probable' };
const COLUMNS = ['lower', 'upper', 'basis', 'kind', 'certainty'] as const;

/** Key of a header of the relations table. */
export function relationsKey(header: string): string | null {
  const plain = squash(header);
  return (COLUMNS as readonly string[]).includes(plain) ? plain : null;
}

/**
 * Reads the relations table. Beds are named `section/bed`; a name is looked up among the beds of the shells and beds
 * tables as a whole, so section and bed names may hold a slash themselves.
 *
 * @param names all beds as `section/bed`
 */
export function readRelations(table: Table, names: ReadonlySet<string>, problems: ProblemList): RelationRecord[] {
  const match = matchColumns(table, relationsKey, problems);
  const { at } = match;
  warnOfUnknownColumns(table, match.unknown, COLUMNS, () => null, problems);
  for (const needed of ['lower', 'upper']) {
    if (at(needed) < 0) {
      problems.error(
        `no ${needed} column`,
        { file: table.file, line: table.headerLine },
        `The relations table has no column "${needed}". Wanted are lower and upper, each naming a bed as section/bed.`,
      );
    }
  }
  if (at('lower') < 0 || at('upper') < 0) return [];
  const reader = createRowReader(table, 'point', problems);
  const relations: RelationRecord[] = [];
  const seen = new Map<string, number>();
  const lookUp = createBedLookUp(names);

  reader.forEachRow((cells, row) => {
    const bedIn = (column: string): string | null => {
      const written = reader.neededName(cells, row, at(column), `${column} bed`);
      if (written === '') return null;
      const found = lookUp(written);
      if (found.bed === null) problems.error('unknown bed', reader.place(row, at(column)), found.message);
      return found.bed;
    };
    const word = <T extends string>(column: string, words: Readonly<Record<string, T>>, otherwise: T): T => {
      const written = reader.name(cells, row, at(column));
      if (written === '') return otherwise;
      const known = ownValue(words, squash(written));
      if (known !== null) return known;
      problems.error(
        column,
        reader.place(row, at(column)),
        `"${written}" is no ${column} of a relation. Wanted is one of: ${Object.values(words).join(', ')}.`,
      );
      return otherwise;
    };
    const lower = bedIn('lower');
    const upper = bedIn('upper');
    const kind = word('kind', KINDS, 'older');
    const basis = word('basis', BASES, kind === 'same' ? 'marker' : 'superposition');
    const certainty = word('certainty', CERTAINTIES, 'certain');
    if (lower === null || upper === null) return;
    if (lower === upper) {
      problems.error(
        'relation to itself',
        reader.place(row),
        `The relation names ${lower} as lower and as upper. Name two beds.`,
      );
      return;
    }
    const key = JSON.stringify(kind === 'same' ? [kind, ...[lower, upper].sort()] : [kind, lower, upper]);
    const first = seen.get(key);
    if (first !== undefined) {
      problems.warning(
        'relation twice',
        reader.place(row),
        `The relation of ${lower} to ${upper} also stands on line ${first}. Delete one, unless they rest on different evidence.`,
      );
    } else seen.set(key, table.line(row));
    relations.push({ lower, upper, basis, kind, certainty, row: { file: table.file, line: table.line(row) } });
  });
  return relations;
}

/** Finds a bed by what a person wrote as `section/bed`: as it stands, or with spaces about the slash left out. */
export function createBedLookUp(
  names: ReadonlySet<string>,
): (written: string) => { bed: string | null; message: string } {
  const loose = new Map<string, string>();
  for (const name of names) loose.set(squash(name), name);
  return (written) => {
    if (names.has(written)) return { bed: written, message: '' };
    const tight = written.replace(/\s*\/\s*/g, '/');
    if (names.has(tight)) return { bed: tight, message: '' };
    const near = loose.get(squash(written)) ?? (names.size <= 20_000 ? nearestName(written, names) : null);
    const advice =
      near !== null
        ? `Did you mean "${near}"?`
        : written.includes('/')
          ? 'Spell it as in the shells table, or add the bed to the beds table.'
          : 'Wanted is section/bed, with a slash between.';
    return { bed: null, message: `"${written}" is no bed of the shells or the beds table. ${advice}` };
  };
}
