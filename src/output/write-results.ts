import { createHash } from 'node:crypto';
import { closeSync, mkdirSync, openSync, writeSync } from 'node:fs';
import { dirname, join } from 'node:path';
import type { Findings } from '../model/index.js';
import { type CsvColumn, writeCsv } from './csv.js';
import { dataPackage, type WrittenFile } from './data-package.js';
import { MARKER } from './folder/inspect.js';
import { geoJson } from './geojson.js';
import { writeResultsJson } from './results-json.js';
import { tableColumns } from './table-columns.js';
import { TABLES, type Table } from './tables/index.js';
import { TextOut } from './text-out.js';

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
    content: (out: TextOut) => void,
    columns?: readonly CsvColumn<never>[],
  ) => {
    files.push({ path, title, ...writeFile(join(folder, path), content), columns });
    await new Promise(setImmediate);
  };
  for (const table of TABLES) {
    const columns = tableColumns(table, findings);
    const rows = findings[table.name] as readonly never[];
    const path = `${table.name}.csv`;
    await write(path, titleOf(table, findings), (out) => writeCsv<never>(out, path, columns, rows), columns);
  }
  await write('results.json', 'Everything that was found, for programs', (out) => writeResultsJson(out, findings));
  await write('deposits.geojson', 'Beds with coordinates, for a map', (out) => out.text(geoJson(findings)));
  await write('report.html', 'The report', (out) => out.text(drawings.report));
  for (const { name, svg } of drawings.figures) {
    await write(`figures/${name}.svg`, `Figure: ${name.replaceAll('-', ' ')}`, (out) => out.text(svg));
  }
  writeFile(join(folder, MARKER), (out) => out.text(dataPackage(files)));
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

function writeFile(path: string, content: (out: TextOut) => void): { readonly bytes: number; readonly sha256: string } {
  mkdirSync(dirname(path), { recursive: true });
  const hash = createHash('sha256');
  const file = openSync(path, 'wx');
  let bytes = 0;
  const out = new TextOut((part) => {
    hash.update(part);
    for (let done = 0; done < part.length; ) done += writeSync(file, part, done);
    bytes += part.length;
  });
  try {
    content(out);
    out.flush();
  } finally {
    closeSync(file);
  }
  return { bytes, sha256: hash.digest('hex') };
}
