import { readDates } from '../input/read-dates.js';
import { readResults } from '../output/read-results.js';
import { dates as dateFields } from '../output/tables/dates.js';
import { writeTable } from '../output/write-table.js';
import { judgeDates } from '../planning/index.js';
import { datesText } from './dates-text.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { complain, print } from './print.js';
import { problemCount, problemText } from './problem-text.js';
import { tablePath } from './table-path.js';
import { styleFor } from './terminal.js';

/** Options of `bedorder dates`, as the command line gives them. */
export interface DatesCommandOptions {
  readonly out?: string;
  readonly sheet?: string;
  readonly json?: boolean;
}

/** `bedorder dates`: do these independent dates agree with the order. Reads results.json and the dates table. */
export async function dates(results: string, table: string, options: DatesCommandOptions): Promise<ExitStatus> {
  const findings = readResults(results);
  const read = await readDates(table, options.sheet);
  const style = styleFor(process.stderr);
  for (const problem of read.problems) complain(problemText(problem, style));
  if (read.dates === null) {
    complain(`The dates can't be used: ${problemCount(read.problems)}. Nothing was written.`);
    return EXIT.unusable;
  }
  const judgement = judgeDates(findings, read.dates);
  const path = options.out ?? tablePath(results, 'dates');
  writeTable(path, dateFields, judgement.pairs, [table]);
  print(options.json ? JSON.stringify(judgement, null, 2) : datesText(judgement, path, styleFor(process.stdout)));
  return EXIT.done;
}
