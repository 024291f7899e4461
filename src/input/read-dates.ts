import { type DatesResult, datesFromBytes } from './dates-table.js';
import { createProblemList } from './problem-list.js';
import { readFileBytes } from './read-file.js';

/** Reads a dates table from disk, with all its problems. */
export async function readDates(path: string, sheet?: string): Promise<DatesResult> {
  const problems = createProblemList();
  const source = await readFileBytes(path, problems);
  if (source === null) return { dates: null, input: null, problems: problems.list() };
  return datesFromBytes(source, sheet, problems);
}
