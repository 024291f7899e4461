import { createHash } from 'node:crypto';
import { closeSync, openSync, readdirSync, readFileSync, readSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { PACKAGE_NAME } from '../data-package.js';

/** What stands in a folder, as far as replacing it goes. */
export type FolderState =
  | { readonly kind: 'absent' | 'empty' }
  /** Our results, whole and unchanged. */
  | { readonly kind: 'ours'; readonly files: readonly string[] }
  /** Something else: why it is not ours, and the names that are to blame. */
  | { readonly kind: 'foreign'; readonly why: string; readonly names: readonly string[] };

/** The file that is written last, and lists all others with size and hash. */
export const MARKER = 'datapackage.json';

// Left by file browsers that only looked; never anybody's work.
const DROPPINGS = new Set(['.DS_Store', 'Thumbs.db', 'desktop.ini', '.directory']);

/**
 * Looks at a folder without touching it. It is ours when datapackage.json is our own, every file it lists is there
 * with the bytes that were written, and nothing else is there.
 */
export function inspectFolder(folder: string): FolderState {
  const found = statSync(folder, { throwIfNoEntry: false });
  if (!found) return { kind: 'absent' };
  const names = filesIn(folder);
  const rest = names.filter((name) => !DROPPINGS.has(name.slice(name.lastIndexOf('/') + 1)));
  if (rest.length === 0 && names.length === 0) return { kind: 'empty' };
  const listed = listedFiles(folder);
  if (!listed) return { kind: 'foreign', why: 'it holds files that bedorder did not write', names: rest };
  const known = new Set([MARKER, ...listed.map(({ path }) => path)]);
  const strange = rest.filter((name) => !known.has(name));
  if (strange.length > 0) {
    return { kind: 'foreign', why: 'it holds files that bedorder did not write', names: strange };
  }
  const changed = listed.filter((file) => !unchanged(folder, file)).map(({ path }) => path);
  if (changed.length > 0) {
    return { kind: 'foreign', why: 'files in it were changed after bedorder wrote them', names: changed };
  }
  return { kind: 'ours', files: names };
}

/** Paths of all that is in a folder, `/` between their parts; folders that are empty and links end with themselves. */
export function filesIn(folder: string, inside = ''): string[] {
  const names: string[] = [];
  for (const entry of readdirSync(join(folder, inside), { withFileTypes: true })) {
    const path = inside === '' ? entry.name : `${inside}/${entry.name}`;
    const deeper = entry.isDirectory() ? filesIn(folder, path) : [];
    names.push(...(deeper.length > 0 ? deeper : [entry.isDirectory() ? `${path}/` : path]));
  }
  return names.sort();
}

interface ListedFile {
  readonly path: string;
  readonly bytes: number;
  readonly hash: string;
}

/** The files that our own datapackage.json lists; null where there is none, or it is not ours. */
export function listedFiles(folder: string): readonly ListedFile[] | null {
  try {
    const parsed = JSON.parse(readFileSync(join(folder, MARKER), 'utf8'));
    if (parsed?.name !== PACKAGE_NAME || !Array.isArray(parsed.resources)) return null;
    return parsed.resources.map(({ path, bytes, hash }: ListedFile) => ({ path, bytes, hash }));
  } catch {
    return null;
  }
}

function unchanged(folder: string, { path, bytes, hash }: ListedFile): boolean {
  try {
    const file = join(folder, path);
    if (statSync(file).size !== bytes) return false;
    return `sha256:${sha256Of(file)}` === hash;
  } catch {
    return false;
  }
}

// in pieces: results of a million shells have files of half a gigabyte
function sha256Of(path: string): string {
  const hash = createHash('sha256');
  const piece = Buffer.allocUnsafe(1 << 20);
  const file = openSync(path, 'r');
  try {
    for (let read = readSync(file, piece); read > 0; read = readSync(file, piece)) hash.update(piece.subarray(0, read));
  } finally {
    closeSync(file);
  }
  return hash.digest('hex');
}
