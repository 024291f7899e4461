import { chooseDelimiter } from './choose-delimiter.js';
import { decodeText } from './decode-text.js';
import { findHeader } from './find-header.js';
import { LIMITS } from './limits.js';
import type { ProblemList } from './problem-list.js';
import { splitCells, splitRecords } from './split-records.js';
import { printText, type RawRows, type RowPrint, type Table } from './table.js';

/** A file in memory: its name without folders, and its bytes. */
export interface FileBytes {
  readonly file: string;
  readonly bytes: Uint8Array;
}

/** What kind of table is looked for. */
export interface TableKind {
  /** Whether a header is one that this table may have. */
  readonly isKnown: (header: string) => boolean;
  /** The needed columns in words, for messages. */
  readonly wanted: string;
  /** Sheet of an .xlsx, by name or number from 1; the first when absent. */
  readonly sheet?: string;
}

/**
 * Reads a table from the bytes of a CSV, TSV, semicolon-separated or .xlsx file: finds encoding, delimiter and header.
 *
 * @returns null when the file can't be used; why is in `problems`
 */
export async function readTable(source: FileBytes, kind: TableKind, problems: ProblemList): Promise<Table | null> {
  const { file, bytes } = source;
  if (bytes.length > LIMITS.fileBytes) {
    problems.error(
      'size',
      { file },
      `The file has ${Math.ceil(bytes.length / 1048576)} MB; at most ${LIMITS.fileBytes / 1048576} MB are read. Leave out columns that are not needed, or split the survey by taxon or by coast.`,
    );
    return null;
  }
  const rows = isZip(bytes) ? await readSheetRows(source, kind.sheet, problems) : readTextRows(source, kind, problems);
  if (rows === null) return null;
  const table = findHeader(rows, file, kind.isKnown, kind.wanted, problems);
  if (table !== null) refuseMerged(rows, table, kind, problems);
  return table;
}

/** Merged cells below the header hold their value only once: the other rows would read as empty. */
function refuseMerged(rows: RawRows, table: Table, kind: TableKind, problems: ProblemList): void {
  for (const range of rows.merged) {
    if (range.bottom + 1 <= table.headerLine) continue;
    const column = table.header.findIndex((header, i) => i >= range.left && i <= range.right && kind.isKnown(header));
    if (column < 0) continue;
    problems.error(
      'merged cells',
      { file: table.file, line: Math.max(range.top + 1, table.headerLine + 1), column: table.header[column] },
      `The cells ${range.name} are merged, so only the first holds a value. Unmerge them and write the value in every row.`,
    );
  }
}

function readTextRows(source: FileBytes, kind: TableKind, problems: ProblemList): RawRows | null {
  const decoded = decodeText(source.bytes);
  if ('refused' in decoded) {
    problems.error('binary', { file: source.file }, decoded.refused);
    return null;
  }
  const text = decoded.text.charCodeAt(0) === 0xfeff ? decoded.text.slice(1) : decoded.text;
  const delimiter = chooseDelimiter(text, kind.isKnown);
  const records = splitRecords(text, delimiter);
  for (const fault of records.faults) problems.error('quotes', { file: source.file, line: fault.line }, fault.message);
  if (records.starts.length === 0 && records.faults.length > 0) return null;
  const quoted = records.text.includes('"');
  const print: RowPrint = { a: 0, b: 0 };
  return {
    length: records.starts.length,
    line: (row) => records.lines[row],
    cells: (row) => {
      const record = records.text.slice(records.starts[row], records.ends[row]);
      return quoted ? splitCells(record, delimiter) : record.split(delimiter);
    },
    print: (row) => printText(records.text, records.starts[row], records.ends[row], print),
    faulty: records.faults.length > 0,
    merged: [],
    sheet: false,
    mayHoldCommas: (delimiter !== ',' || quoted) && records.text.includes(','),
  };
}

function isZip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x50 && bytes[1] === 0x4b && bytes[2] === 0x03 && bytes[3] === 0x04;
}

/** The reader of .xlsx is loaded only when it is needed: it is large. */
async function readSheetRows(
  source: FileBytes,
  sheet: string | undefined,
  problems: ProblemList,
): Promise<RawRows | null> {
  const { readSheet } = await import('./read-sheet.js');
  return readSheet(source, sheet, problems);
}
