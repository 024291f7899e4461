import { copyFileSync, existsSync, mkdirSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { inWords, refused } from '../output/folder/output-error.js';
import type { ExitStatus } from './exit-status.js';
import { complain } from './print.js';
import { run } from './run.js';
import type { RawOptions } from './run-request.js';

/** The default folder of the example survey. */
export const DEFAULT_DEMO = 'bedorder-demo';

/** The files of the example that are parts of a survey, with the option that takes each. */
const PARTS = { 'beds.csv': 'beds', 'relations.csv': 'relations', 'aliases.csv': 'aliases' } as const;

/**
 * `bedorder demo`: writes the example survey of an invented coast into a folder, and runs it there. Files that are
 * there already are left as they are when they are the example's, and refused when they are not.
 */
export async function demo(folder: string, commandLine: RawOptions): Promise<ExitStatus> {
  const source = fileURLToPath(new URL('../../examples/coast', import.meta.url));
  const names = writeExample(source, folder);
  if (commandLine.quiet !== true)
    complain(`The example survey of an invented coast is in ${folder}: ${names.join(', ')}.`);
  const parts = Object.entries(PARTS)
    .filter(([name]) => names.includes(name))
    .map(([name, option]) => [option, join(folder, name)]);
  const out = join(folder, 'bedorder-results');
  return run(join(folder, 'shells.csv'), { ...Object.fromEntries(parts), out, ...commandLine });
}

function writeExample(source: string, folder: string): string[] {
  const names = readdirSync(source).sort();
  try {
    mkdirSync(folder, { recursive: true });
    const others = names.filter(
      (name) => existsSync(join(folder, name)) && !same(join(source, name), join(folder, name)),
    );
    if (others.length > 0) {
      throw refused(`${folder} holds files of yours by the same names: ${others.join(', ')}. Give another folder.`);
    }
    for (const name of names) if (!existsSync(join(folder, name))) copyFileSync(join(source, name), join(folder, name));
  } catch (error) {
    throw inWords(error, folder);
  }
  return names;
}

function same(a: string, b: string): boolean {
  return readFileSync(a).equals(readFileSync(b));
}
