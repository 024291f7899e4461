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
  readonly sheet: boolean;
  readonly mayHoldCommas: boolean;
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
