import { readdirSync, renameSync, rmdirSync, statSync, unlinkSync } from 'node:fs';
import { join } from 'node:path';
import { filesIn, inspectFolder, listedFiles, MARKER } from './inspect.js';
import { isLocked } from './lock.js';
import { refused } from './output-error.js';
import type { Places } from './places.js';

/**
 * Puts a results folder right after a run that was killed, whenever that was: afterwards either the old or the new
 * results stand there whole, and nothing is left beside them. Does nothing when a living run is at work there, and
 * costs three look-ups when there is nothing to do.
 *
 * How the cases come about (see replace-folder.ts): new results are built beside the target; their datapackage.json
 * is written last; the old results are moved aside; the new ones are moved into place; the old ones are removed.
 */
export function recoverFolder(places: Places): void {
  if (!isThere(places.fresh) && !isThere(places.old)) return;
  if (isLocked(places)) return;
  settle(places);
}

/** The same, for the run that holds the lock itself. */
export function settle(places: Places): void {
  const { target, fresh, old } = places;
  if (isThere(old)) {
    if (!isThere(target)) {
      // killed between the two moves: go forward where the new results are whole, else back
      renameSync(inspectFolder(fresh).kind === 'ours' ? fresh : old, target);
    } else if (inspectFolder(target).kind !== 'ours') {
      throw refused(
        `${places.given} is not what bedorder left there, and earlier results wait in ${old}. ` +
          `Move ${places.given} elsewhere and run again: the earlier results are then put back.`,
      );
    }
  }
  if (isThere(old)) removeResults(old);
  if (isThere(fresh)) removeResults(fresh);
}

function isThere(path: string): boolean {
  return statSync(path, { throwIfNoEntry: false }) !== undefined;
}

// All that a run may have begun to write: figures may be any SVG in their own folder.
const OUR_NAMES =
  /^(?:[a-z_]+\.csv|results\.json|deposits\.geojson|datapackage\.json|report\.html|figures\/[\w.-]+\.svg)$/;

/**
 * Removes a folder of results, or what was built of it: only files that are listed or named as ours are. The marker
 * goes first, so that a kill half-way leaves no folder that claims to be whole.
 */
export function removeResults(folder: string): void {
  const listed = new Set((listedFiles(folder) ?? []).map(({ path }) => path));
  const ours = filesIn(folder).filter((name) => listed.has(name) || OUR_NAMES.test(name) || isDropping(name));
  for (const name of ours.sort((a, b) => Number(b === MARKER) - Number(a === MARKER))) unlinkSync(join(folder, name));
  for (const inner of readdirSync(folder, { withFileTypes: true })) {
    if (inner.isDirectory() && readdirSync(join(folder, inner.name)).length === 0) rmdirSync(join(folder, inner.name));
  }
  if (readdirSync(folder).length > 0) {
    throw refused(`${folder} holds files that bedorder did not write. Move them elsewhere and run again.`);
  }
  rmdirSync(folder);
}

function isDropping(name: string): boolean {
  return /(?:^|\/)(?:\.DS_Store|Thumbs\.db|desktop\.ini|\.directory)$/.test(name);
}
