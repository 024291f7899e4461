import { writeNumber } from './number-text.js';
import type { AnyFields, AnyShape } from './shape.js';
import { type TextOut, textOf } from './text-out.js';

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
  const last = columns.map((): LastCell => ({ value: '', cell: '' }));
  out.text(`${columns.map((column) => textCell(column.header)).join(',')}\n`);
  let line = 1;
  for (const row of rows) {
    line++;
    let i = 0;
    try {
      for (; i < columns.length; i++) {
        if (i > 0) out.ascii(COMMA);
        const { shape, value: take } = columns[i];
        const value = take(row);
        if (typeof value === 'string') writeText(out, last[i], value);
        else writeCell(out, shape, value);
      }
    } catch (error) {
      throw new Error(`${name}, line ${line}, column ${columns[i].header}: ${(error as Error).message}`);
    }
    out.ascii(LINE_END);
  }
}

const COMMA = 44;
const LINE_END = 10;

/** The last text of a column and its cell: the same text often stands in row after row. */
interface LastCell {
  value: string;
  cell: string;
}

function writeText(out: TextOut, last: LastCell, value: string): void {
  if (value !== last.value) {
    last.value = value;
    last.cell = textCell(value);
  }
  out.text(last.cell);
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
export const csvCell = (shape: AnyShape, value: unknown): string => textOf((out) => writeCell(out, shape, value));

/** Writes {@link csvCell}. */
function writeCell(out: TextOut, shape: AnyShape, value: unknown): void {
  if (value === null || value === undefined) return;
  switch (typeof value) {
    case 'number':
      // what can't be known is written as unknown where the column allows it
      if (shape.nullable && !Number.isFinite(value)) return;
      writeNumber(out, value, shape.type === 'integer' ? 15 : TABLE_DIGITS);
      break;
    case 'boolean':
      out.text(value ? 'true' : 'false');
      break;
    case 'string':
      out.text(textCell(value));
      break;
    default:
      if (!Array.isArray(value)) throw new Error(`a ${shape.type} was wanted, ${typeof value} came`);
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
