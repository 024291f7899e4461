import { readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { basename, dirname, relative, resolve } from 'node:path';
import { plainColumns, writeCsv } from './csv.js';
import { listedFiles } from './folder/inspect.js';
import { codeOf, inWords, refused } from './folder/output-error.js';
import type { AnyFields } from './shape.js';
import { textOf } from './text-out.js';

/**
 * Writes one table to a CSV file of its own, whole or not at all. A file that is there is replaced only if it is an
 * earlier table of the same columns; nothing is written into a results folder, which would then no longer be known as
 * untouched.
 *
 * @param path The file, as the user gave it.
 * @param fields The columns.
 * @param keep Files that must never be replaced, such as the input.
 * @throws OutputError, with what to do, when the file can't be written or is somebody else's.
 */
export function writeTable(
  path: string,
  fields: AnyFields,
  rows: readonly object[],
  keep: readonly string[] = [],
): void {
  const target = resolve(path);
  const text = textOf((out) =>
    writeCsv(out, basename(path), plainColumns(fields), rows as readonly Record<string, unknown>[]),
  );
  if (keep.some((file) => resolve(file) === target)) {
    throw refused(`${path} is the input, and is not written over. Give another file with --out.`);
  }
  const results = enclosingResults(dirname(target));
  if (results !== null) {
    throw refused(
      `${path} lies in the results folder ${relative('.', results) || '.'}, where bedorder keeps only what a run wrote. ` +
        'Give a file elsewhere with --out.',
    );
  }
  const header = text.slice(0, text.indexOf('\n') + 1);
  try {
    if (!readFileSync(target, 'utf8').startsWith(header)) {
      throw refused(`${path} is there and is no earlier table of this kind. Give another file with --out.`);
    }
  } catch (error) {
    if (codeOf(error) !== 'ENOENT')
      throw codeOf(error) === 'EISDIR' ? refused(`${path} is a folder.`) : inWords(error, path);
  }
  const draft = `${target}.${process.pid}.part`;
  try {
    writeFileSync(draft, text, { flag: 'wx' });
    renameSync(draft, target);
  } catch (error) {
    rmSync(draft, { force: true });
    if (codeOf(error) === 'ENOENT') throw refused(`The folder of ${path} is not there. Give another file with --out.`);
    throw inWords(error, path);
  }
}

/** The results folder that a folder is, or lies in; null for none. */
function enclosingResults(folder: string): string | null {
  for (let at = folder; ; at = dirname(at)) {
    if (listedFiles(at) !== null) return at;
    if (dirname(at) === at) return null;
  }
}
