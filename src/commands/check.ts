import type { Survey } from '../model/index.js';
import { EXIT, type ExitStatus } from './exit-status.js';
import { complain, print } from './print.js';
import { problemText } from './problem-text.js';
import { readRequest, tellRefusal } from './read-request.js';
import type { RawOptions } from './run-request.js';
import { surveyCounts } from './survey-counts.js';
import { counted, styleFor } from './terminal.js';

/** `bedorder check`: reads and validates only; every problem is listed, nothing is written. */
export async function check(shells: string, commandLine: RawOptions): Promise<ExitStatus> {
  const read = await readRequest(shells, commandLine);
  if (!('survey' in read)) return tellRefusal(read);
  const { request, survey } = read;
  if (request.json) {
    print(JSON.stringify({ usable: true, ...surveyCounts(survey), problems: survey.problems }, null, 2));
    return EXIT.done;
  }
  const style = styleFor(process.stderr);
  for (const problem of survey.problems) complain(problemText(problem, style));
  if (!request.quiet) print(verdict(survey));
  return EXIT.done;
}

function verdict(survey: Survey): string {
  const { analyses, beds, sections, taxa } = surveyCounts(survey);
  const what =
    `${counted(analyses, 'analysis', 'analyses')} of ${counted(taxa.length, 'taxon', 'taxa')} in ` +
    `${counted(beds, 'bed')} of ${counted(sections, 'section')}`;
  const warnings = survey.problems.length;
  return warnings === 0
    ? `The survey can be used: ${what}, no problems.`
    : `The survey can be used: ${what}, ${counted(warnings, 'warning')}.`;
}
