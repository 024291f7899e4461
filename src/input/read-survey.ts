import { createProblemList } from './problem-list.js';
import { readFileBytes } from './read-file.js';
import { type SurveyResult, surveyFromBytes } from './survey-from-bytes.js';

/** Paths of the tables of a survey. */
export interface SurveyFiles {
  readonly shells: string;
  readonly beds?: string;
  readonly relations?: string;
  readonly standards?: string;
  readonly aliases?: string;
  /** Sheet of the .xlsx files, by name or number from 1; the first when absent. */
  readonly sheet?: string;
}

/**
 * Reads the tables of a survey from disk. All problems of all files are collected; a survey is given only when none of
 * them is an error.
 */
export async function readSurvey(files: SurveyFiles): Promise<SurveyResult> {
  const problems = createProblemList();
  const open = (path: string | undefined) => (path === undefined ? undefined : readFileBytes(path, problems));
  const shells = await open(files.shells);
  return surveyFromBytes(
    {
      shells: shells ?? null,
      beds: (await open(files.beds)) ?? undefined,
      relations: (await open(files.relations)) ?? undefined,
      standards: (await open(files.standards)) ?? undefined,
      aliases: (await open(files.aliases)) ?? undefined,
      sheet: files.sheet,
    },
    problems,
  );
}
