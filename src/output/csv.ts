import { numberText } from './number-text.js';
import type { AnyFields, AnyShape } from './shape.js';

/** Significant digits of a number in a table. */
export const TABLE_DIGITS = 6;

/** One column of a CSV file: its header, what it holds, and how it is taken from a row. */
export interface CsvColumn<Row> {
  readonly header: string;
  readonly shape: AnyShape;
  readonly value: (row: Row) => unknown;
}

/**
 * A CSV file (RFC 4180, UTF-8, lines ended by LF) in pieces of some ten thousand characters, so that a table of a
 * million rows never stands in memory as one string.
 *
 * @throws Error naming table, column and row when a number is not finite where the column allows no unknown value.
 */
export function* csvPieces<Row>(name: string, columns: readonly CsvColumn<Row>[], rows: Iterable<Row>) {
  const cells = columns.map(({ shape }) => cellWriter(shape));
  let piece = `${columns.map((column) => textCell(column.header)).join(',')}\n`;
  let line = 1;
  for (const row of rows) {
    line++;
    for (let i = 0; i < columns.length; i++) {
      const { header, value } = columns[i];
      if (i > 0) piece += ',';
      try {
        piece += cells[i](value(row));
      } catch (error) {
        throw new Error(`${name}, line ${line}, column ${header}: ${(error as Error).message}`);
      }
    }
    piece += '\n';
    if (piece.length > 50_000) {
      yield piece;
      piece = '';
    }
  }
  yield piece;
}

/** Cells of one column; the same text often stands in row after row. */
function cellWriter(shape: AnyShape): (value: unknown) => string {
  let last: unknown;
  let cell = '';
  return (value) => {
    if (typeof value !== 'string') return csvCell(shape, value);
    if (value !== last) {
      last = value;
      cell = textCell(value);
    }
    return cell;
  };
}

/** Columns that take each field of a row as it is. */
export function plainColumns(fields: AnyFields): CsvColumn<Readonly<Record<string, unknown>>>[] {
  return Object.entries(fields).map(([header, shape]) => ({ header, shape, value: (row) => row[header] }));
}

/**
 * One cell: booleans as true and false, lists joined by `;`, numbers with at most 6 significant digits, unknown empty.
 *
 * @example
 * csvCell({ type: 'number', description: '' }, -0.12) // => '-0.12'
 * csvCell({ type: 'text', description: '' }, '=1+1') // => "'=1+1"
 * csvCell({ type: 'boolean', description: '' }, true) // => 'true'
 */
export function csvCell(shape: AnyShape, value: unknown): string {
  if (value === null || value === undefined) return '';
  switch (typeof value) {
    case 'number':
      // what can't be known is written as unknown where the column allows it
      if (shape.nullable && !Number.isFinite(value)) return '';
      return numberText(value, shape.type === 'integer' ? 15 : TABLE_DIGITS);
    case 'boolean':
      return value ? 'true' : 'false';
    case 'string':
      return textCell(value);
    default:
      if (Array.isArray(value)) return quoted(value.map((item) => disarmed(String(item))).join(';'));
      throw new Error(`a ${shape.type} was wanted, ${typeof value} came`);
  }
}

/**
 * Free text as a cell: escaped where a spreadsheet would take it for a formula, quoted where CSV asks for it.
 *
 * @example
 * textCell('Low cliff, north') // => '"Low cliff, north"'
 */
export function textCell(text: string): string {
  return quoted(disarmed(text));
}

// Texts such as -3 or +2.5 are numbers to a spreadsheet, and do no harm. The full-width signs are read as the plain
// ones by some spreadsheets. Leading apostrophes count, so that what was escaped can be told from what was not.
const FORMULA = /^'*[=+\-@\t\r\n\uFF1D\uFF0B\uFF0D\uFF20]/;
const NUMBER = /^[+-]\d+(?:\.\d+)?(?:[eE][+-]?\d+)?$/;

function disarmed(text: string): string {
  return FORMULA.test(text) && !NUMBER.test(text) ? `'${text}` : text;
}

const QUOTED = /[",\r\n]/;

function quoted(text: string): string {
  return QUOTED.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
