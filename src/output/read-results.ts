import { existsSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';
import type { Findings } from '../model/index.js';
import { VERSION } from '../version.js';
import { FINDINGS_FIELDS } from './findings-fields.js';
import { isLocked } from './folder/lock.js';
import { codeOf, refused } from './folder/output-error.js';
import { type Places, placesOf } from './folder/places.js';
import { recoverFolder } from './folder/recover.js';
import { misfitOf } from './misfit.js';

/**
 * Reads the findings of an earlier run. What a killed run left is put right first.
 *
 * @param folder Results folder, or its results.json.
 * @throws OutputError, with what to do, when there are none, they are broken, or another major version wrote them.
 */
export function readResults(folder: string): Findings {
  const path = locate(folder);
  const findings = parse(path, readText(path, folder));
  const major = (version: string) => version.split('.')[0];
  if (major(findings.version) !== major(VERSION)) {
    throw refused(
      `${path} was written by bedorder ${findings.version}, and this is ${VERSION}. ` +
        'Run the survey again with this version, or use the version that wrote it.',
    );
  }
  for (const [name, shape] of Object.entries(FINDINGS_FIELDS)) {
    const value = (findings as unknown as Record<string, unknown>)[name];
    if (value === undefined) throw refused(`${path} is broken: ${name} is missing. Run the survey again.`);
    const misfit = misfitOf(shape, value, name);
    if (misfit !== null) {
      throw refused(
        `${path} is broken: ${misfit.wanted} was wanted in ${misfit.where}, ${misfit.came} came. Run the survey again.`,
      );
    }
  }
  return findings;
}

function locate(folder: string): string {
  if (isFile(folder)) return folder;
  const path = join(folder, 'results.json');
  try {
    const places = placesOf(folder);
    recoverFolder(places);
    awaitMove(path, places);
  } catch {
    // what can't be put right is told of below, by what is missing
  }
  return path;
}

function isFile(path: string): boolean {
  try {
    return statSync(path).isFile();
  } catch {
    // what is not there, or can't be looked at, is told of when it is read
    return false;
  }
}

// while a living run moves its results into place, for a moment none are there
function awaitMove(path: string, places: Places): void {
  const clock = new Int32Array(new SharedArrayBuffer(4));
  for (let tries = 0; tries < 20 && !existsSync(path) && existsSync(places.old) && isLocked(places); tries++) {
    Atomics.wait(clock, 0, 0, 10);
  }
}

function readText(path: string, folder: string): string {
  try {
    return readFileSync(path, 'utf8');
  } catch (error) {
    if (codeOf(error) === 'ENOENT' || codeOf(error) === 'ENOTDIR') {
      throw refused(`${folder} holds no results (${path} is not there). Give the folder that \`bedorder run\` wrote.`);
    }
    throw refused(`${path} can't be read (${codeOf(error) || (error as Error).message}).`);
  }
}

function parse(path: string, text: string): Findings {
  let parsed: unknown;
  try {
    parsed = JSON.parse(text);
  } catch (error) {
    throw refused(`${path} is broken: ${(error as Error).message}. Run the survey again.`);
  }
  const findings = parsed as Findings | null;
  if (findings?.program !== 'bedorder' || typeof findings.version !== 'string') {
    throw refused(`${path} was not written by bedorder. Give the folder that \`bedorder run\` wrote.`);
  }
  return findings;
}
