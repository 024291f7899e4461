import { readSheet as readXlsxSheet, SheetNotFoundError } from 'read-excel-file/universal';
import type { ProblemList } from './problem-list.js';
import type { FileBytes } from './read-table.js';
import { type Cell, isBlank, type RawRows } from './table.js';

/**
 * The rows of one sheet of an .xlsx workbook.
 *
 * @param sheet name of the sheet, or its number from 1; the first when absent
 */
export async function readSheet(
  source: FileBytes,
  sheet: string | undefined,
  problems: ProblemList,
): Promise<RawRows | null> {
  const { file, bytes } = source;
  try {
    const buffer = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength) as ArrayBuffer;
    const data = await readXlsxSheet(buffer, sheet === undefined ? 1 : sheet, { trim: false });
    const kept: number[] = [];
    const rows: Cell[][] = [];
    data.forEach((row, index) => {
      const cells = row.map(toCell);
      if (cells.every(isBlank)) return;
      kept.push(index + 1);
      rows.push(cells);
    });
    return {
      length: rows.length,
      line: (row) => kept[row],
      cells: (row) => rows[row],
      sheet: true,
      mayHoldCommas: true,
    };
  } catch (error) {
    const reason = error instanceof SheetNotFoundError ? `${error.message}. Name one of them with --sheet.` : null;
    problems.error(
      'sheet',
      { file },
      reason ??
        "The file can't be read as an .xlsx workbook. Open it in a spreadsheet and save it anew as .xlsx or CSV.",
    );
    return null;
  }
}

function toCell(value: unknown): Cell {
  if (value === null || value === undefined) return '';
  if (typeof value === 'number' || typeof value === 'string' || value instanceof Date) return value;
  return String(value).toUpperCase();
}
