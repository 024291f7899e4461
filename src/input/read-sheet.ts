import { readSheet as readXlsxSheet } from 'read-excel-file/universal';
import type { ProblemList } from './problem-list.js';
import type { FileBytes } from './read-table.js';
import { type Cell, isBlank, printText, type RawRows, type RowPrint } from './table.js';
import { lookOverWorkbook } from './workbook-parts.js';

/**
 * The rows of one sheet of an .xlsx workbook.
 *
 * @param sheet name of the sheet, or its number from 1; the first when absent
 * @returns null when it can't be read; why is in `problems`
 */
export async function readSheet(
  source: FileBytes,
  sheet: string | undefined,
  problems: ProblemList,
): Promise<RawRows | null> {
  const { file, bytes } = source;
  try {
    const facts = await lookOverWorkbook(bytes, sheet);
    if ('refused' in facts) {
      problems.error('sheet', { file }, facts.refused);
      return null;
    }
    const buffer = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength) as ArrayBuffer;
    const data = await readXlsxSheet(buffer, facts.number, { trim: false });
    const kept: number[] = [];
    const rows: Cell[][] = [];
    const failed = new Map<number, { column: number; text: string }[]>();
    for (const { row, ...cell } of facts.failed) failed.set(row, [...(failed.get(row) ?? []), cell]);
    data.forEach((row, index) => {
      const cells = row.map(toCell);
      for (const { column, text } of failed.get(index) ?? []) {
        while (cells.length < column) cells.push('');
        cells[column] = text;
      }
      if (cells.every(isBlank)) return;
      kept.push(index + 1);
      rows.push(cells);
    });
    const print: RowPrint = { a: 0, b: 0 };
    return {
      length: rows.length,
      line: (row) => kept[row],
      cells: (row) => rows[row],
      print: (row) => {
        const text = rows[row].join('\u0000');
        return printText(text, 0, text.length, print);
      },
      faulty: false,
      merged: facts.merged,
      sheet: true,
      mayHoldCommas: true,
    };
  } catch (error) {
    const at = error instanceof Error ? /row (\d+), col (\d+)/.exec(error.message) : null;
    problems.error(
      'sheet',
      { file, line: at === null ? null : Number(at[1]) },
      `The file can't be read as an .xlsx workbook${at === null ? '' : `: a cell of row ${at[1]} is damaged`}. Open it in a spreadsheet and save it anew as .xlsx or CSV.`,
    );
    return null;
  }
}

function toCell(value: unknown): Cell {
  if (value === null || value === undefined) return '';
  if (typeof value === 'number' || typeof value === 'string' || value instanceof Date) return value;
  return String(value).toUpperCase();
}
