import { LikeLast } from './like-last.js';
import { writeNumber } from './number-text.js';
import type { AnyFields, AnyShape } from './shape.js';
import { type TextOut, textOf, utf8 } from './text-out.js';

/** Significant digits of a number in a table. */
export const TABLE_DIGITS = 6;

/** One column of a CSV file: its header, what it holds, and how it is taken from a row. */
export interface CsvColumn<Row> {
  readonly header: string;
  readonly shape: AnyShape;
  readonly value: (row: Row) => unknown;
}

/**
 * Writes a CSV file (RFC 4180, UTF-8, lines ended by LF).
 *
 * @throws Error naming table, column and row when a number is not finite where the column allows no unknown value.
 */
export function writeCsv<Row>(
  out: TextOut,
  name: string,
  columns: readonly CsvColumn<Row>[],
  rows: Iterable<Row>,
): void {
  out.text(`${columns.map((column) => textCell(column.header)).join(',')}\n`);
  const cells = columns.map(({ shape }) => cellOf(shape));
  const leads = columns.map((_, i) => utf8(i === 0 ? '' : ','));
  const likeLast = new LikeLast(out, leads, utf8('\n'));
  let line = 1;
  for (const row of rows) {
    line++;
    likeLast.begin();
    let i = 0;
    try {
      for (; i < columns.length; i++) {
        const value = columns[i].value(row);
        if (!likeLast.same(i, value)) writeCell(out, cells[i], value);
      }
    } catch (error) {
      throw new Error(`${name}, line ${line}, column ${columns[i].header}: ${(error as Error).message}`);
    }
    likeLast.end();
  }
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
export const csvCell = (shape: AnyShape, value: unknown): string =>
  textOf((out) => writeCell(out, cellOf(shape), value));

/** What a cell's shape says of its writing; of one form for all shapes, which makes a million cells quick. */
interface Cell {
  readonly type: AnyShape['type'];
  readonly nullable: boolean;
  /** Most significant digits of a number. */
  readonly digits: number;
}

const cellOf = ({ type, nullable }: AnyShape): Cell => ({
  type,
  nullable: nullable === true,
  digits: type === 'integer' ? 15 : TABLE_DIGITS,
});

/** Writes {@link csvCell}. */
function writeCell(out: TextOut, { type, nullable, digits }: Cell, value: unknown): void {
  if (value === null || value === undefined) return;
  switch (typeof value) {
    case 'number':
      // what can't be known is written as unknown where the column allows it
      if (nullable && !Number.isFinite(value)) return;
      writeNumber(out, value, digits);
      break;
    case 'boolean':
      out.text(value ? 'true' : 'false');
      break;
    case 'string':
      out.text(textCell(value));
      break;
    default:
      if (!Array.isArray(value)) throw new Error(`a ${type} was wanted, ${typeof value} came`);
      if (value.length > 0) out.text(quoted(value.map((item) => disarmed(String(item))).join(';')));
  }
}

/**
 * Free text as a cell: escaped where a spreadsheet would take it for a formula, quoted where CSV asks for it.
 *
 * @example
 * textCell('Low cliff, north') // => '"Low cliff, north"'
 */
export function textCell(text: string): string {
  return HARMLESS.test(text) ? text : quoted(disarmed(text));
}

// most texts, told at once
const HARMLESS = /^[A-Za-z0-9](?:[A-Za-z0-9 .:;/_-]*)$/;

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
