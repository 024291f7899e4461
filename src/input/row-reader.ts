import { cleanName } from './clean-name.js';
import { LIMITS } from './limits.js';
import type { ProblemList } from './problem-list.js';
import { type DecimalSign, readNumber, tidyNumber, whyNoNumber } from './read-number.js';
import { type Cell, isBlank, type Table } from './table.js';

/** Reads the cells of a table's rows as names and numbers, and notes what is wrong with them. */
export interface RowReader {
  /** Calls `visit` for every row of the right width; other rows are problems. Stops after far too many errors. */
  readonly forEachRow: (visit: (cells: readonly Cell[], row: number) => unknown) => void;
  /** The cleaned text of a cell; empty where the column is absent (-1), the cell blank or refused. */
  readonly name: (cells: readonly Cell[], row: number, column: number) => string;
  /** As `name`, but an empty cell is a problem. */
  readonly neededName: (cells: readonly Cell[], row: number, column: number, what: string) => string;
  /** The number in a cell; null where the column is absent, the cell blank or refused. */
  readonly number: (cells: readonly Cell[], row: number, column: number) => number | null;
  /** Where a cell stands, for a problem. */
  readonly place: (row: number, column?: number) => { file: string; line: number; column: string | null };
}

/** Names met again and again are cleaned once and kept once. */
const KEPT_NAMES = 50_000;

/** Makes the reader of one table whose decimal sign is settled. */
export function createRowReader(table: Table, sign: DecimalSign, problems: ProblemList): RowReader {
  const names = new Map<string, string>();
  const width = table.header.length;
  const lastRaw: string[] = new Array(width).fill('');
  const lastName: string[] = new Array(width).fill('');

  const place = (row: number, column?: number) => ({
    file: table.file,
    line: table.line(row),
    column: column === undefined || column < 0 ? null : table.header[column],
  });
  /** `"text"`, with the cell's name where a sheet has one; long text is cut. */
  const quote = (text: string, row: number, column: number): string => {
    const shown = `"${text.length > 60 ? `${text.slice(0, 60)}…` : text}"`;
    return table.cellName === null ? shown : `${shown} (cell ${table.cellName(row, column)})`;
  };
  const tooLong = (text: string, row: number, column: number): boolean => {
    if (text.length <= LIMITS.cellCharacters) return false;
    problems.error(
      'long cell',
      place(row, column),
      `The cell holds ${text.length} characters; at most ${LIMITS.cellCharacters} are read. Look for a quotation mark that is not closed, or shorten the text.`,
    );
    return true;
  };

  const name = (cells: readonly Cell[], row: number, column: number): string => {
    if (column < 0) return '';
    const cell = cells[column];
    if (typeof cell === 'string') {
      if (cell === lastRaw[column]) return lastName[column];
      const known = names.get(cell);
      if (known !== undefined) {
        lastRaw[column] = cell;
        lastName[column] = known;
        return known;
      }
      if (tooLong(cell, row, column)) return '';
      const cleaned = cleanName(cell);
      if (cleaned === null) {
        problems.error(
          'control characters',
          place(row, column),
          `The cell holds characters that can't be shown. Type the text anew, or save the file as UTF-8.`,
        );
        return '';
      }
      if (names.size < KEPT_NAMES) names.set(cell, cleaned);
      return cleaned;
    }
    if (cell instanceof Date) {
      problems.error(
        'date',
        place(row, column),
        `Cell ${table.cellName?.(row, column) ?? ''} is a date or a time. Format the column as text and type the name anew.`,
      );
      return '';
    }
    return cell === undefined ? '' : String(cell);
  };

  const neededName = (cells: readonly Cell[], row: number, column: number, what: string): string => {
    if (!isBlank(cells[column])) return name(cells, row, column);
    const where = table.cellName === null ? 'The cell' : `Cell ${table.cellName(row, column)}`;
    problems.error(
      `no ${what}`,
      place(row, column),
      `${where} is empty; every row needs the ${what}. Where cells were merged, or the name was written only once for several rows, write it in every row.`,
    );
    return '';
  };

  const number = (cells: readonly Cell[], row: number, column: number): number | null => {
    if (column < 0) return null;
    const cell = cells[column];
    if (cell === undefined || cell === '') return null;
    if (typeof cell === 'number') {
      if (Number.isFinite(cell)) return cell;
      problems.error('number', place(row, column), `${quote(String(cell), row, column)} is no finite number.`);
      return null;
    }
    if (cell instanceof Date) {
      problems.error(
        'date',
        place(row, column),
        `Cell ${table.cellName?.(row, column) ?? ''} is a date or a time, which a spreadsheet makes of a number it misreads. Go back to the ` +
          "laboratory's file, format the column as number before pasting, and save again.",
      );
      return null;
    }
    const text = tidyNumber(cell);
    if (text === '') return null;
    const value = readNumber(text, sign);
    if (Number.isNaN(value)) {
      if (!tooLong(text, row, column)) {
        problems.error('number', place(row, column), `${quote(text, row, column)} ${whyNoNumber(text, sign)}.`);
      }
      return null;
    }
    return value;
  };

  const forEachRow: RowReader['forEachRow'] = (visit) => {
    const before = problems.errorCount();
    for (let row = 0; row < table.length; row += 1) {
      if (problems.errorCount() - before > LIMITS.errors) {
        problems.error(
          'stopped',
          place(row),
          `Reading stopped here: there are too many errors. Mend those listed and check again.`,
        );
        return;
      }
      const cells = table.cells(row);
      if (cells.length !== width) {
        const more = cells.length > width;
        problems.error(
          'ragged',
          place(row),
          `The row has ${cells.length} cells where the header has ${width}. ` +
            (more
              ? 'Look for a delimiter within a name or a decimal comma in a table separated by commas, and quote that cell.'
              : 'Look for a missing delimiter, or a line that was broken in two.'),
        );
        continue;
      }
      visit(cells, row);
    }
  };

  return { forEachRow, name, neededName, number, place };
}
