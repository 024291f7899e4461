import type { CellRange } from './workbook-parts.js';

/** One cell: text as written, or what an .xlsx cell holds. */
export type Cell = string | number | Date;

/**
 * A table with its header found. Rows are split when asked for, so that a file of a million rows is held once, as text.
 * Blank rows are not in it; `line` gives the physical line (or the row of the sheet).
 */
export interface Table {
  readonly file: string;
  /** Header cells as written, trimmed. */
  readonly header: readonly string[];
  readonly headerLine: number;
  /** Number of rows below the header. */
  readonly length: number;
  readonly line: (row: number) => number;
  /** The cells of a row; may be more or fewer than the header's. */
  readonly cells: (row: number) => readonly Cell[];
  /** Two numbers from the text of a row; rows that differ nearly always differ in them. */
  readonly print: (row: number) => RowPrint;
  /** Name of a cell in a sheet, such as `B7`; null for a text file, where line and column say it. */
  readonly cellName: ((row: number, column: number) => string) | null;
  /** Whether any cell may hold a comma: false spares a pass over the numbers. */
  readonly mayHoldCommas: boolean;
}

/** Rows as they stand in the file, before the header is looked for. */
export interface RawRows {
  readonly length: number;
  readonly line: (row: number) => number;
  readonly cells: (row: number) => readonly Cell[];
  readonly print: (row: number) => RowPrint;
  /** Whether the rows already had problems that may hide the header. */
  readonly faulty: boolean;
  /** Merged cells of a sheet; none in a text file. */
  readonly merged: readonly CellRange[];
  readonly sheet: boolean;
  readonly mayHoldCommas: boolean;
}

/** A hash of a row in two parts of 32 bits. The object is used again for the next row. */
export interface RowPrint {
  a: number;
  b: number;
}

/** Puts the hash of `text` from `start` to `end` into `print` (two multiplicative hashes side by side). */
export function printText(text: string, start: number, end: number, print: RowPrint): RowPrint {
  let a = 17;
  let b = 31;
  for (let i = start; i < end; i += 1) {
    const code = text.charCodeAt(i);
    a = (Math.imul(a, 31) + code) | 0;
    b = (Math.imul(b, 16_777_619) ^ code) | 0;
  }
  print.a = a;
  print.b = b;
  return print;
}

/** Whether a cell holds nothing but white space. */
export function isBlank(cell: Cell | undefined): boolean {
  return cell === undefined || (typeof cell === 'string' && cell.trim() === '');
}

/** Letters of a sheet's column: 0 is A, 26 is AA. */
export function columnLetters(column: number): string {
  let letters = '';
  for (let rest = column + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  }
  return letters;
}
