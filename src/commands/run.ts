import type { Findings } from '../model/index.js';
import type { FolderHold } from '../output/folder/replace-folder.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { onSignal } from './on-signal.js';
import { complain, print } from './print.js';
import { problemText } from './problem-text.js';
import { progressBar } from './progress.js';
import { type ReadRequest, readRequest } from './read-request.js';
import type { RawOptions, RunRequest } from './run-request.js';
import { counted, styleFor } from './terminal.js';

/** `bedorder run`: zones, orders and checks a survey, and writes the results folder. */
export async function run(shells: string, commandLine: RawOptions): Promise<ExitStatus> {
  const { holdFolder, placesOf, refuseForeign } = await import('./results-folder.js');
  // what stands in the way of the results is told before a long reading
  const read = await readRequest(shells, commandLine, ({ out }) => refuseForeign(placesOf(out)));
  if (!read) return EXIT.unusable;
  const { request } = read;
  const hold = holdFolder(placesOf(request.out));
  const forget = onSignal(hold.release);
  try {
    const findings = await analyseAndWrite(read, hold);
    await tellWhatWasFound(findings, request);
    const reversed = findings.relations.some(({ verdict_after }) => verdict_after === 'reversed');
    return request.strict && reversed ? EXIT.reversed : EXIT.done;
  } finally {
    hold.release();
    forget();
  }
}

async function analyseAndWrite({ request, survey }: ReadRequest, hold: FolderHold): Promise<Findings> {
  const { analyse } = await import('../pipeline.js');
  const { createWorkerHost } = await import('./worker-host.js');
  const bar = await progressBar(!request.quiet);
  const host = createWorkerHost(bar.show);
  try {
    const findings = await analyse(survey, request.options, host);
    bar.show('drawing', 1);
    const { drawFigures } = await import('../figures/index.js');
    const { renderReport } = await import('../report/index.js');
    const drawings = { report: renderReport(findings), figures: drawFigures(findings) };
    bar.show('writing', 1);
    const { writeResults } = await import('../output/write-results.js');
    await hold.replace(async (folder) => void (await writeResults(findings, drawings, folder)));
    return findings;
  } finally {
    bar.stop();
    await host.close();
  }
}

/** Warnings shown by a run; all of them stand in problems.csv. */
const WARNINGS_SHOWN = 10;

async function tellWhatWasFound(findings: Findings, request: RunRequest): Promise<void> {
  const { summaryJson, summaryText } = await import('./summary/index.js');
  if (request.json) print(summaryJson(findings, request.out));
  if (request.quiet) return;
  const style = styleFor(process.stderr);
  for (const problem of findings.problems.slice(0, WARNINGS_SHOWN)) complain(problemText(problem, style));
  const more = findings.problems.length - WARNINGS_SHOWN;
  if (more > 0)
    complain(`… and ${counted(more, 'more warning', 'more warnings')}; all are in ${request.out}/problems.csv.`);
  if (!request.json) print(summaryText(findings, request.out, styleFor(process.stdout)));
}
