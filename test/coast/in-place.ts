import { surveyFromBytes } from '../../src/input/survey-from-bytes.js';
import { DEFAULT_OPTIONS, type Findings, type Host, type RunOptions, type Survey } from '../../src/model/index.js';
import { analyse } from '../../src/pipeline.js';
import { runTask } from '../../src/tasks.js';

const host: Host = { map: async (tasks) => tasks.map(runTask), progress: () => {} };

/** The whole way of the data without worker threads; few repeats, for speed. */
export const analyseInPlace = (survey: Survey, options: Partial<RunOptions> = {}): Promise<Findings> =>
  analyse(survey, { ...DEFAULT_OPTIONS, simulations: 99, ...options }, host);

const bytes = (file: string, text: string) => ({ file, bytes: new TextEncoder().encode(text) });

/** A survey from the text of its tables. */
export async function surveyOfTables(tables: {
  readonly shells: string;
  readonly beds?: string;
  readonly relations?: string;
  readonly standards?: string;
}): Promise<Survey> {
  const { survey, problems } = await surveyFromBytes(
    Object.fromEntries(
      Object.entries(tables).map(([role, text]) => [role, bytes(`${role}.csv`, text)]),
    ) as unknown as Parameters<typeof surveyFromBytes>[0],
  );
  if (survey === null) throw new Error(problems.map((problem) => problem.message).join('\n'));
  return survey;
}
