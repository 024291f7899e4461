import { basename, dirname, join, resolve } from 'node:path';

/**
 * Where a table about a results folder goes when the user names no file: beside the folder, under its name.
 *
 * @param results Results folder, or its results.json, as the user gave it.
 * @example
 * tablePath('out/bedorder-results', 'plan') // => 'out/bedorder-results-plan.csv'
 */
export function tablePath(results: string, table: string): string {
  const folder = basename(results) === 'results.json' ? dirname(results) : results;
  // the folder's own name, also when it is given as `.`
  const name = basename(resolve(folder));
  const named = basename(folder) === name ? folder.replace(/[/\\]+$/, '') : resolve(folder);
  return join(dirname(named), `${name}-${table}.csv`);
}
