import { LIMITS } from './limits.js';
import { createProblemList } from './problem-list.js';
import { readFileBytes } from './read-file.js';
import type { SettingsResult } from './settings.js';

/**
 * Reads a settings file (YAML): every option of the command line under its own name, and the limits of screening.
 * An unknown option is an error with the option that may be meant.
 */
export async function readSettings(path: string): Promise<SettingsResult> {
  const problems = createProblemList();
  const source = await readFileBytes(path, problems, LIMITS.settingsBytes);
  if (source === null) return { settings: null, input: null, problems: problems.list() };
  // YAML and validation are loaded only when there are settings: they cost a tenth of a second.
  const { settingsFromBytes } = await import('./settings.js');
  return settingsFromBytes(source, problems);
}
