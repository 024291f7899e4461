import { LIMITS } from './limits.js';
import { type ZipEntry, zipEntries, zipText } from './zip-archive.js';

/** Cells that were merged: rows and columns from 0, both ends included. */
export interface CellRange {
  readonly name: string;
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

/** One sheet, looked over before its cells are read. */
export interface SheetFacts {
  /** Number of the sheet in the workbook, from 1. */
  readonly number: number;
  readonly merged: readonly CellRange[];
  /** Cells whose formula failed, such as `#DIV/0!`: the reader of the cells would give them as empty. */
  readonly failed: readonly { readonly row: number; readonly column: number; readonly text: string }[];
}

/** Cells that a sheet may span: reading fills the gaps between them. */
const MOST_CELLS = 40_000_000;

/**
 * Looks over an .xlsx workbook before it is read: finds the sheet, its merged cells, and refuses what would fill memory
 * (an archive that unpacks to too much, a lone cell far out in the sheet).
 *
 * @param sheet name of the sheet, or its number from 1; the first when absent
 * @throws Error when the archive is damaged
 */
export async function lookOverWorkbook(
  bytes: Uint8Array,
  sheet: string | undefined,
): Promise<SheetFacts | { readonly refused: string }> {
  const entries = zipEntries(bytes);
  const find = (name: string) => entries?.find((entry) => entry.name === name);
  const workbook = find('xl/workbook.xml');
  const links = find('xl/_rels/workbook.xml.rels');
  if (entries === null || workbook === undefined || links === undefined) {
    if (find('content.xml') !== undefined) {
      return { refused: 'This is an OpenDocument file. Save the table as .xlsx or CSV and give that file.' };
    }
    return { refused: 'This is a zip archive, but no .xlsx workbook. Wanted is a table as CSV, TSV or .xlsx.' };
  }
  const unpacked = entries.reduce((sum, entry) => sum + entry.size, 0);
  if (!(unpacked <= LIMITS.unpackedBytes)) {
    return {
      refused: `The workbook unpacks to ${Math.ceil(unpacked / 1_048_576)} MB; at most ${LIMITS.unpackedBytes / 1_048_576} MB are read. Save the sheet as CSV.`,
    };
  }
  const sheets = tags(await zipText(bytes, workbook), 'sheet').filter((tag) => tag.name !== undefined);
  const names = sheets.map((tag) => tag.name);
  const at = sheet === undefined ? 0 : sheetAt(names, sheet);
  if (at < 0 || at >= names.length) {
    return {
      refused: `The workbook has no sheet "${sheet ?? 1}". Its sheets are: ${names.map((name) => `"${name}"`).join(', ')}. Name one with --sheet.`,
    };
  }
  const id = sheets[at]['r:id'] ?? sheets[at].id;
  const target = tags(await zipText(bytes, links), 'Relationship').find((tag) => tag.Id === id)?.Target ?? '';
  const entry = find(target.startsWith('/') ? target.slice(1) : `xl/${target}`);
  if (entry === undefined) return { refused: `The sheet "${names[at]}" is missing from the workbook. Save it anew.` };
  return lookOverSheet(bytes, entry, at + 1);
}

async function lookOverSheet(
  bytes: Uint8Array,
  entry: ZipEntry,
  number: number,
): Promise<SheetFacts | { readonly refused: string }> {
  const xml = await zipText(bytes, entry);
  let rows = 0;
  let columns = 0;
  for (const match of xml.matchAll(/<(?:\w+:)?row\b[^>]*?\sr="(\d+)"/g)) rows = Math.max(rows, Number(match[1]));
  // Cells without content (`<c … />`) may be formatted far to the right; they are not read.
  for (const match of xml.matchAll(/<(?:\w+:)?c\b[^>]*?\sr="([A-Z]{1,4})(\d+)"[^>/]*>/g)) {
    columns = Math.max(columns, columnNumber(match[1]));
    rows = Math.max(rows, Number(match[2]));
  }
  if (!(rows <= 1_048_576 && columns <= 16_384 && rows * columns <= MOST_CELLS)) {
    return {
      refused: `The sheet spans ${rows} rows and ${columns} columns, more than can be read. Delete what stands far below or to the right of the table, or save the table as CSV.`,
    };
  }
  const merged: CellRange[] = [];
  for (const match of xml.matchAll(/<(?:\w+:)?mergeCell\b[^>]*?\sref="([A-Z]{1,4})(\d+):([A-Z]{1,4})(\d+)"/g)) {
    merged.push({
      name: `${match[1]}${match[2]}:${match[3]}${match[4]}`,
      top: Number(match[2]) - 1,
      bottom: Number(match[4]) - 1,
      left: columnNumber(match[1]) - 1,
      right: columnNumber(match[3]) - 1,
    });
  }
  const failed = [];
  const failures = /<(?:\w+:)?c\b(?=[^>]*?\st="e")[^>]*?\sr="([A-Z]{1,4})(\d+)"[^>/]*>(.*?)<\/(?:\w+:)?c>/gs;
  for (const [, letters, row, content] of xml.matchAll(failures)) {
    const value = /<(?:\w+:)?v>([^<]*)</.exec(content)?.[1] ?? '';
    failed.push({ row: Number(row) - 1, column: columnNumber(letters) - 1, text: value || '#VALUE!' });
  }
  return { number, merged, failed };
}

function sheetAt(names: readonly string[], sheet: string): number {
  const wanted = sheet.trim();
  const exact = names.indexOf(wanted);
  if (exact >= 0) return exact;
  const loose = names.findIndex((name) => name.trim().toLowerCase() === wanted.toLowerCase());
  return loose >= 0 || !/^\d+$/.test(wanted) ? loose : Number(wanted) - 1;
}

function columnNumber(letters: string): number {
  let number = 0;
  for (const letter of letters) number = number * 26 + letter.charCodeAt(0) - 64;
  return number;
}

/** Attributes of every tag of one name. */
function tags(xml: string, name: string): Record<string, string>[] {
  return [...xml.matchAll(new RegExp(`<(?:\\w+:)?${name}\\s([^>]*)>`, 'g'))].map((tag) =>
    Object.fromEntries(
      [...tag[1].matchAll(/([\w:]+)\s*=\s*(?:"([^"]*)"|'([^']*)')/g)].map((pair) => [
        pair[1],
        unescapeXml(pair[2] ?? pair[3]),
      ]),
    ),
  );
}

function unescapeXml(text: string): string {
  return text.replace(/&(lt|gt|quot|apos|amp|#\d+|#x[0-9a-f]+);/gi, (whole, code: string) => {
    const named: Record<string, string> = { lt: '<', gt: '>', quot: '"', apos: "'", amp: '&' };
    if (!code.startsWith('#')) return named[code.toLowerCase()] ?? whole;
    const point = /^#x/i.test(code) ? Number.parseInt(code.slice(2), 16) : Number(code.slice(1));
    return point <= 0x10ffff ? String.fromCodePoint(point) : whole;
  });
}
