import { LIMITS } from './limits.js';
import type { ProblemList } from './problem-list.js';
import { type Cell, columnLetters, type RawRows, type Table } from './table.js';

/**
 * Finds the header among the first rows: the one with the most known column names. Rows above it are warned of.
 * A table without any known header is refused.
 *
 * @param isKnown whether a header is one that the table may have
 * @returns the table below its header, or null when it was refused
 */
export function findHeader(
  rows: RawRows,
  file: string,
  isKnown: (header: string) => boolean,
  wanted: string,
  problems: ProblemList,
): Table | null {
  if (rows.length === 0) {
    problems.error(
      'empty',
      { file, line: null },
      `The ${rows.sheet ? 'sheet is empty (another is read with --sheet)' : 'file is empty'}. Wanted is a table with a header: ${wanted}.`,
    );
    return null;
  }
  let at = -1;
  let best = 0;
  for (let row = 0; row < Math.min(rows.length, LIMITS.headerSearch); row += 1) {
    const known = rows.cells(row).filter((cell) => typeof cell === 'string' && isKnown(cell)).length;
    if (known > best) {
      best = known;
      at = row;
    }
  }
  if (at < 0) {
    if (rows.faulty) return null;
    problems.error(
      'no header',
      { file, line: rows.line(0) },
      `No header was found: none of the first ${LIMITS.headerSearch} rows names a column that is known here. ` +
        `Wanted is one row with the column names above the data: ${wanted}.`,
    );
    return null;
  }
  const header = headerCells(rows.cells(at));
  const headerLine = rows.line(at);
  if (header.length > LIMITS.columns) {
    problems.error(
      'columns',
      { file, line: headerLine },
      `The table has ${header.length} columns; at most ${LIMITS.columns} are read. Leave out the columns that are not needed.`,
    );
    return null;
  }
  if (rows.length - at - 1 > LIMITS.rows) {
    problems.error(
      'rows',
      { file, line: rows.line(at + 1 + LIMITS.rows) },
      `The table has ${rows.length - at - 1} rows; at most ${LIMITS.rows} are read. Split the survey by taxon or by coast.`,
    );
    return null;
  }
  if (at > 0) {
    const lines =
      rows.line(0) === rows.line(at - 1)
        ? `Line ${rows.line(0)} stands`
        : `Lines ${rows.line(0)} to ${rows.line(at - 1)} stand`;
    problems.warning(
      'title',
      { file, line: rows.line(0) },
      `${lines} above the header, which was found on line ${headerLine}, and is not read. Check that no data are lost; better, delete what is above the header.`,
    );
  }
  if (rows.length === at + 1) {
    problems.error(
      'header only',
      { file, line: headerLine },
      'The table has a header and no rows below it. Add the data.',
    );
    return null;
  }
  return {
    file,
    header,
    headerLine,
    length: rows.length - at - 1,
    line: (row) => rows.line(at + 1 + row),
    cells: (row) => rows.cells(at + 1 + row),
    print: (row) => rows.print(at + 1 + row),
    cellName: rows.sheet ? (row, column) => `${columnLetters(column)}${rows.line(at + 1 + row)}` : null,
    mayHoldCommas: rows.mayHoldCommas,
  };
}

/** Headers without white space around them; empty ones stay, so that a row must be exactly as wide. */
function headerCells(cells: readonly Cell[]): string[] {
  return cells.map((cell) => (cell instanceof Date ? 'a date' : String(cell).replace(/\s+/g, ' ').trim()));
}
