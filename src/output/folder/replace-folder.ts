import { mkdirSync, renameSync, rmdirSync, statSync } from 'node:fs';
import { dirname } from 'node:path';
import { inspectFolder } from './inspect.js';
import { takeLock } from './lock.js';
import { inWords, refused } from './output-error.js';
import type { Places } from './places.js';
import { removeResults, settle } from './recover.js';

/** Hold on a results folder: what a run does with it. */
export interface FolderHold {
  /**
   * Builds new results with `build` (which is given an empty folder and must write the marker last) and moves them
   * into place. After a kill at any moment either the old or the new results are there whole, or are put back by
   * {@link settle}. `reached` is told of every step; tests stop there.
   */
  readonly replace: (build: (folder: string) => Promise<void>, reached?: (step: Step) => void) => Promise<void>;
  /** Removes what was begun and gives the lock back; may be called at any time, and twice. */
  readonly release: () => void;
}

/** The moments between which a kill can fall. */
export type Step = 'building' | 'built' | 'old aside' | 'new in place' | 'old removed';

/**
 * Makes sure that results may be written, and holds the folder until they are: takes the lock, puts right what a
 * killed run left, and refuses a folder that is not ours.
 *
 * @throws OutputError with what is in the way.
 */
export function holdFolder(places: Places): FolderHold {
  const parent = dirname(places.target);
  let made: string | undefined;
  let unlock: () => void = () => {};
  try {
    made = mkdirSync(parent, { recursive: true });
    unlock = takeLock(places);
    settle(places);
    refuseForeign(places);
  } catch (error) {
    unlock();
    removeEmpty(made, parent);
    throw inWords(error, places.given);
  }
  let open = true;
  const release = () => {
    if (!open) return;
    open = false;
    try {
      settle(places);
    } finally {
      unlock();
      removeEmpty(made, parent);
    }
  };
  const replace: FolderHold['replace'] = async (build, reached = () => {}) => {
    try {
      mkdirSync(places.fresh);
      reached('building');
      await build(places.fresh);
      reached('built');
      // looked at again: somebody may have put a file there meanwhile
      refuseForeign(places);
      moveIntoPlace(places, reached);
    } catch (error) {
      throw inWords(error, places.given);
    }
  };
  return { replace, release };
}

function moveIntoPlace({ target, fresh, old }: Places, reached: (step: Step) => void): void {
  const replaced = statSync(target, { throwIfNoEntry: false }) !== undefined;
  if (replaced) renameSync(target, old);
  reached('old aside');
  renameSync(fresh, target);
  reached('new in place');
  if (replaced) removeResults(old);
  reached('old removed');
}

/** Refuses a target that holds anything but results of ours as they were written. */
export function refuseForeign({ target, given }: Places): void {
  const state = inspectedInWords(target, given);
  if (state.kind !== 'foreign') return;
  const shown = state.names.slice(0, 8).map((name) => `  ${name}`);
  const more = state.names.length > 8 ? [`  … and ${state.names.length - 8} more`] : [];
  throw refused(
    [`${given} is left as it is, since ${state.why}:`, ...shown, ...more].join('\n') +
      '\nMove them elsewhere, or give another folder with --out.',
  );
}

function inspectedInWords(target: string, given: string): ReturnType<typeof inspectFolder> {
  try {
    return inspectFolder(target);
  } catch (error) {
    throw inWords(error, given);
  }
}

// folders made on the way to a target that was never written are taken back
function removeEmpty(made: string | undefined, parent: string): void {
  if (made === undefined) return;
  for (let folder = parent; folder.startsWith(made); folder = dirname(folder)) {
    try {
      rmdirSync(folder);
    } catch {
      return;
    }
  }
}
