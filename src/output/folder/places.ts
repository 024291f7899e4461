import { existsSync, lstatSync, realpathSync, statSync } from 'node:fs';
import { basename, dirname, join, parse, relative, resolve } from 'node:path';
import { inWords, refused } from './output-error.js';

/** Where the results go, and the hidden places beside them that a run uses on its way. */
export interface Places {
  /** Path as the user gave it, for messages. */
  readonly given: string;
  /** Absolute path of the results folder, symbolic links resolved. */
  readonly target: string;
  /** Where new results are built. */
  readonly fresh: string;
  /** Where old results wait while new ones are moved into place. */
  readonly old: string;
  /** Held by the run that writes to the target. */
  readonly lock: string;
}

/**
 * The places for one results folder. A symbolic link to a folder is followed, so that the folder it leads to is
 * replaced and the link stays.
 *
 * @throws OutputError for a link that leads nowhere, a file, a root folder, or the working folder and those above it
 * (which can't be moved aside under the feet of the user's shell).
 */
export function placesOf(given: string): Places {
  if (given.trim() === '' || given.includes('\0'))
    throw refused('--out wants the name of a folder; an empty name came.');
  const target = followedInWords(given);
  if (parse(target).root === target) throw refused(`--out ${given} is the root folder. Give a folder inside it.`);
  if (!relative(target, process.cwd()).startsWith('..') && sameRoot(target, process.cwd())) {
    throw refused(`--out ${given} is the folder you are in, or one above it. Give the name of a new folder.`);
  }
  const beside = (ending: string) => join(dirname(target), `.${basename(target)}.bedorder-${ending}`);
  return { given, target, fresh: beside('new'), old: beside('old'), lock: beside('lock') };
}

function followedInWords(given: string): string {
  try {
    return followed(given, resolve(given));
  } catch (error) {
    throw inWords(error, given);
  }
}

function followed(given: string, path: string): string {
  const link = lstatSync(path, { throwIfNoEntry: false });
  if (link?.isSymbolicLink() && !existsSync(path)) {
    throw refused(`--out ${given} is a symbolic link that leads nowhere. Remove it, or give another folder.`);
  }
  if (link && !statSync(path).isDirectory()) throw refused(`--out ${given} is a file. Give the name of a folder.`);
  if (link) return realpathSync(path);
  // the folder is still to be made: links on the way to it are followed all the same
  const parent = dirname(path);
  return existsSync(parent) ? join(realpathSync(parent), basename(path)) : path;
}

function sameRoot(a: string, b: string): boolean {
  return parse(a).root.toLowerCase() === parse(b).root.toLowerCase();
}
