import { nearestName } from './edit-distance.js';
import type { ProblemList } from './problem-list.js';
import { squash } from './squash.js';
import { isBlank, type Table } from './table.js';

/** Which column holds what: key of the column to its index. */
export interface ColumnMatch {
  /** Index of a key's column, -1 where the table has none. */
  readonly at: (key: string) => number;
  /** All keys found, in order of the columns. */
  readonly found: readonly (readonly [key: string, index: number])[];
  /** Indices of the columns that are not known. */
  readonly unknown: readonly number[];
}

/**
 * Matches headers to keys. Two columns with one meaning are an error.
 *
 * @param keyOf the key of a header, or null when it is not known
 */
export function matchColumns(
  table: Table,
  keyOf: (header: string) => string | null,
  problems: ProblemList,
): ColumnMatch {
  const indices = new Map<string, number>();
  const unknown: number[] = [];
  table.header.forEach((header, index) => {
    const key = keyOf(header);
    if (key === null) {
      unknown.push(index);
      return;
    }
    const first = indices.get(key);
    if (first !== undefined) {
      problems.error(
        'column twice',
        { file: table.file, line: table.headerLine, column: header },
        `The columns "${table.header[first]}" (number ${first + 1}) and "${header}" (number ${index + 1}) mean the same. Leave one out, or rename it.`,
      );
      return;
    }
    indices.set(key, index);
  });
  return { at: (key) => indices.get(key) ?? -1, found: [...indices], unknown };
}

/** One warning that lists the columns that are not known, with the known name each may stand for. */
export function warnOfUnknownColumns(
  table: Table,
  unknown: readonly number[],
  known: readonly string[],
  hintOf: (header: string) => string | null,
  problems: ProblemList,
): void {
  const nameless = columnsWithData(
    table,
    unknown.filter((index) => table.header[index] === ''),
  );
  const filled = unknown.filter((index) => table.header[index] !== '' || nameless.has(index));
  if (filled.length === 0) return;
  const listed = filled.slice(0, 30).map((index) => {
    const header = table.header[index];
    if (header === '') return `column ${index + 1} (without a name)`;
    const hint = hintOf(header);
    if (hint !== null) return `"${header}" (${hint})`;
    const near = squash(header).length < 4 ? null : nearestName(header, known);
    return near === null ? `"${header}"` : `"${header}" (did you mean ${near}?)`;
  });
  const more = filled.length > listed.length ? ` and ${filled.length - listed.length} more` : '';
  problems.warning(
    'unknown columns',
    { file: table.file, line: table.headerLine },
    `${filled.length === 1 ? 'One column is' : `${filled.length} columns are`} not known and not read: ${listed.join(', ')}${more}.`,
  );
}

/** Which of some columns hold anything at all, in one pass. */
function columnsWithData(table: Table, columns: readonly number[]): ReadonlySet<number> {
  const found = new Set<number>();
  for (let row = 0; row < table.length && found.size < columns.length; row += 1) {
    const cells = table.cells(row);
    for (const index of columns) if (!isBlank(cells[index])) found.add(index);
  }
  return found;
}
