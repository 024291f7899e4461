import type { PlanRow } from '../model/index.js';
import { readResults } from '../output/read-results.js';
import { plan as planFields } from '../output/tables/plan.js';
import { writeTable } from '../output/write-table.js';
import { plan as planOf } from '../planning/index.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { planText } from './plan-text.js';
import { complain, print } from './print.js';
import { tablePath } from './table-path.js';
import { safe, styleFor } from './terminal.js';

/** Options of `bedorder plan`, as the command line gives them. */
export interface PlanCommandOptions {
  readonly dates?: string;
  readonly out?: string;
  readonly json?: boolean;
}

/** Most dates that may be planned for. */
const MOST_DATES = 20;

/** `bedorder plan`: what to collect or date next, and what it would settle. Reads results.json only. */
export async function plan(results: string, options: PlanCommandOptions): Promise<ExitStatus> {
  const dates = options.dates === undefined ? 3 : Number(options.dates);
  if (!(Number.isInteger(dates) && dates >= 0 && dates <= MOST_DATES)) {
    complain(
      `--dates ${safe(String(options.dates))}: a whole number from 0 to ${MOST_DATES} was wanted; 3 is the default.`,
    );
    return EXIT.unusable;
  }
  const found = planOf(readResults(results), { dates });
  const path = options.out ?? tablePath(results, 'plan');
  writeTable(path, planFields, found.rows satisfies readonly PlanRow[]);
  print(options.json ? JSON.stringify(found, null, 2) : planText(found, path, styleFor(process.stdout)));
  return EXIT.done;
}
