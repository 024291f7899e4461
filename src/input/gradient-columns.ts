import { type DecimalSign, readNumber, tidyNumber } from './read-number.js';
import { isBlank, type Table } from './table.js';

const NUMBER_LIKE = /^[+-]?(?:\d+[.,]?\d*|[.,]\d+)(?:[eE][+-]?\d{1,4})?$/;

/** Parts the columns without a known name into those that hold numbers only, for `--gradient`, and the others. */
export function sortUnknown(table: Table, unknown: readonly number[]): { numeric: number[]; other: number[] } {
  const filled = new Map(unknown.map((index) => [index, 0]));
  const text = new Set<number>(unknown.filter((index) => table.header[index] === ''));
  for (let row = 0; row < table.length; row += 1) {
    const cells = table.cells(row);
    for (const index of unknown) {
      const cell = cells[index];
      if (isBlank(cell) || text.has(index)) continue;
      filled.set(index, filled.get(index)! + 1);
      if (typeof cell !== 'number' && (typeof cell !== 'string' || !NUMBER_LIKE.test(tidyNumber(cell))))
        text.add(index);
    }
  }
  const isNumeric = (index: number) => !text.has(index) && filled.get(index)! > 0;
  return { numeric: unknown.filter(isNumeric), other: unknown.filter((index) => !isNumeric(index)) };
}

/** Whether any cell of some columns has decimals. */
export function decimalsIn(table: Table, columns: readonly number[]): boolean {
  for (let row = 0; row < table.length; row += 1) {
    const cells = table.cells(row);
    if (columns.some((index) => typeof cells[index] === 'string' && /\d[.,]\d/.test(cells[index] as string)))
      return true;
  }
  return false;
}

/** The columns of which every filled cell is a number with the file's decimal sign. */
export function readableColumns(table: Table, columns: readonly number[], sign: DecimalSign): number[] {
  const left = new Set(columns);
  for (let row = 0; row < table.length && left.size > 0; row += 1) {
    const cells = table.cells(row);
    for (const index of left) {
      const cell = cells[index];
      if (typeof cell === 'string' && !isBlank(cell) && Number.isNaN(readNumber(tidyNumber(cell), sign)))
        left.delete(index);
    }
  }
  return [...left];
}
