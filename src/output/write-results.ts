import { createHash } from 'node:crypto';
import { closeSync, mkdirSync, openSync, writeSync } from 'node:fs';
import { dirname, join } from 'node:path';
import type { Findings } from '../model/index.js';
import { type CsvColumn, csvPieces } from './csv.js';
import { dataPackage, type WrittenFile } from './data-package.js';
import { MARKER } from './folder/inspect.js';
import { geoJson } from './geojson.js';
import { resultsPieces } from './results-json.js';
import { tableColumns } from './table-columns.js';
import { TABLES, type Table } from './tables/index.js';

/** What is drawn of the findings elsewhere, and only stored here. */
export interface Drawings {
  /** The page, report.html. */
  readonly report: string;
  /** The figures; `name` without `.svg`. */
  readonly figures: readonly { readonly name: string; readonly svg: string }[];
}

/**
 * Writes every file of the results into an empty folder; datapackage.json, which lists the others, comes last.
 * Between files the program may hear of signals.
 *
 * @returns The files in the order in which datapackage.json lists them.
 */
export async function writeResults(findings: Findings, drawings: Drawings, folder: string): Promise<WrittenFile[]> {
  const files: WrittenFile[] = [];
  const write = async (
    path: string,
    title: string,
    pieces: Iterable<string>,
    columns?: readonly CsvColumn<never>[],
  ) => {
    files.push({ path, title, ...writePieces(join(folder, path), pieces), columns });
    await new Promise(setImmediate);
  };
  for (const table of TABLES) {
    const columns = tableColumns(table, findings);
    const rows = findings[table.name] as readonly never[];
    const path = `${table.name}.csv`;
    await write(path, titleOf(table, findings), csvPieces<never>(path, columns, rows), columns);
  }
  await write('results.json', 'Everything that was found, for programs', resultsPieces(findings));
  await write('deposits.geojson', 'Beds with coordinates, for a map', [geoJson(findings)]);
  await write('report.html', 'The report', [drawings.report]);
  for (const { name, svg } of drawings.figures) {
    await write(`figures/${name}.svg`, `Figure: ${name.replaceAll('-', ' ')}`, [svg]);
  }
  writePieces(join(folder, MARKER), [dataPackage(files)]);
  return files;
}

/** What a table is, and the clocks on which its errors rest on a scatter that was assumed. */
function titleOf({ description, scatterless }: Table, { clocks, beds }: Findings): string {
  if (scatterless) return description;
  const assumed = clocks.filter(({ clock }) =>
    beds.some((bed) => bed.clock === clock && bed.marks.includes('assumed scatter')),
  );
  if (assumed.length === 0) return description;
  const names = assumed.map(({ clock, scatter }) => `${scatter} on ${clock}`).join(', ');
  return `${description}. Every error in it rests on a scatter that was assumed: ${names}`;
}

/** Bytes of a piece of usual length; one buffer serves all pieces of a file. */
const ROOM = 200_000;

function writePieces(path: string, pieces: Iterable<string>): { readonly bytes: number; readonly sha256: string } {
  mkdirSync(dirname(path), { recursive: true });
  const hash = createHash('sha256');
  const file = openSync(path, 'wx');
  let room = Buffer.allocUnsafe(ROOM);
  let bytes = 0;
  try {
    for (const piece of pieces) {
      // three bytes are the most that a UTF-16 unit takes
      if (3 * piece.length > room.length) room = Buffer.allocUnsafe(3 * piece.length);
      const part = room.subarray(0, room.write(piece, 'utf8'));
      hash.update(part);
      for (let done = 0; done < part.length; ) done += writeSync(file, part, done);
      bytes += part.length;
    }
  } finally {
    closeSync(file);
  }
  return { bytes, sha256: hash.digest('hex') };
}
