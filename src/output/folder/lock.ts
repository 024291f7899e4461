import { lstatSync, readFileSync, readlinkSync, renameSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { hostname } from 'node:os';
import { codeOf, refused } from './output-error.js';
import type { Places } from './places.js';

/**
 * Takes the lock of a results folder, or says who holds it. A lock left by a run that is no longer alive is taken over.
 * The lock names process and machine; it lies beside the results, is never part of them, and goes when they are done.
 *
 * @returns A function that gives the lock back.
 * @throws OutputError when another run holds it; system errors as they come.
 */
export function takeLock({ lock, given }: Places): () => void {
  const mine = `${process.pid} ${hostname()}`;
  for (let attempt = 0; attempt < 5; attempt++) {
    try {
      createLock(lock, mine);
      return () => {
        if (readLock(lock) === mine) rmSync(lock, { force: true });
      };
    } catch (error) {
      if (codeOf(error) !== 'EEXIST') throw error;
    }
    const theirs = readLock(lock);
    if (theirs !== null && isHeld(lock, theirs)) throw busy(given, lock, theirs);
    if (theirs !== null) removeStale(lock, theirs);
  }
  throw busy(given, lock, '');
}

// A symbolic link that leads nowhere is made at once with what it says, so a kill leaves no empty lock. Where a file
// system knows no links, a file does.
function createLock(lock: string, mine: string): void {
  try {
    symlinkSync(mine, lock);
  } catch (error) {
    if (!['EPERM', 'ENOSYS', 'ENOTSUP', 'EOPNOTSUPP', 'EINVAL'].includes(codeOf(error))) throw error;
    writeFileSync(lock, mine, { flag: 'wx' });
  }
}

/** Whether a living run holds the lock. */
export function isLocked({ lock }: Places): boolean {
  const theirs = readLock(lock);
  return theirs !== null && isHeld(lock, theirs);
}

function busy(given: string, lock: string, theirs: string) {
  const [pid, host] = theirs.trim().split(' ');
  const who = pid ? ` (process ${pid}${host === hostname() ? '' : ` on ${host}`})` : '';
  return refused(
    `Another run is writing to ${given}${who}. Wait until it is done, or give another folder with --out. ` +
      `If no other run is alive, remove ${lock}.`,
  );
}

function readLock(lock: string): string | null {
  try {
    return lstatSync(lock).isSymbolicLink() ? readlinkSync(lock) : readFileSync(lock, 'utf8');
  } catch {
    return null;
  }
}

function isHeld(lock: string, theirs: string): boolean {
  const [pid, host] = theirs.trim().split(' ');
  if (!pid || !host) return Date.now() - (lstatSync(lock, { throwIfNoEntry: false })?.mtimeMs ?? 0) < 5000;
  // of a run on another machine nothing can be known from here
  if (host !== hostname()) return true;
  try {
    process.kill(Number(pid), 0);
    return true;
  } catch (error) {
    return codeOf(error) === 'EPERM';
  }
}

// Moved aside first: of two runs that both see a stale lock only one gets it, and neither removes the other's new one.
function removeStale(lock: string, theirs: string) {
  const aside = `${lock}.${process.pid}`;
  try {
    renameSync(lock, aside);
  } catch {
    return;
  }
  if (readLock(aside) === theirs) rmSync(aside, { force: true });
  else renameSync(aside, lock);
}
