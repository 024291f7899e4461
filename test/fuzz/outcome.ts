import { runRequest } from '../../src/commands/run-request.js';
import { summaryJson, summaryText } from '../../src/commands/summary/index.js';
import { optionsAgainstSurvey } from '../../src/commands/survey-fit.js';
import { styleOf } from '../../src/commands/terminal.js';
import { drawFigures } from '../../src/figures/index.js';
import { datesFromBytes, surveyFromBytes } from '../../src/input/index.js';
import { settingsFromBytes } from '../../src/input/settings.js';
import type { Findings, Host, Problem } from '../../src/model/index.js';
import { analyse } from '../../src/pipeline.js';
import { judgeDates, plan } from '../../src/planning/index.js';
import { renderReport } from '../../src/report/index.js';
import { runTask } from '../../src/tasks.js';
import { faultsOfFindings, faultsOfText } from './faults.js';
import type { Part, SurveyFiles } from './survey-files.js';

/** What came of a try: refused with messages, or done. Anything else is thrown. */
export type Outcome =
  | { readonly kind: 'refused'; readonly messages: readonly string[] }
  | { readonly kind: 'done'; readonly findings: Findings };

const HOST: Host = { map: async (tasks) => tasks.map(runTask), progress: () => {} };

/** Most repeats of a bootstrap in a try: the code is the same for few. */
const FEW = 9;

/**
 * Does in memory all that `check`, `run`, `plan` and `dates` do with these files, figures and page included.
 * @throws Error when there is a crash, or a fault in what was found
 */
export async function outcomeOf(files: SurveyFiles): Promise<Outcome> {
  const file = (part: Part) => (files[part] ? { file: `${part}.csv`, bytes: files[part] } : undefined);
  const settings = files.settings
    ? await settingsFromBytes({ file: 'settings.yaml', bytes: files.settings })
    : { settings: {}, problems: [] };
  if (settings.settings === null) return refused(settings.problems);
  const wanted = runRequest('shells.csv', {}, { ...settings.settings, out: 'results' }, 'settings.yaml');
  if (wanted.problems.length > 0) return refusedFor(wanted.problems);
  const read = await surveyFromBytes({
    shells: file('shells')!,
    beds: file('beds'),
    relations: file('relations'),
    standards: file('standards'),
    aliases: file('aliases'),
  });
  if (read.survey === null) return refused(read.problems);
  const unfit = optionsAgainstSurvey(read.survey, wanted.request.options);
  if (unfit.length > 0) return refusedFor(unfit);
  const options = { ...wanted.request.options, simulations: Math.min(FEW, wanted.request.options.simulations) };
  const findings = await analyse(read.survey, options, HOST);
  const figures = drawFigures(findings);
  const shown = [
    ...figures.map(({ name, svg }) => [`figure ${name}`, svg]),
    ['summary', summaryText(findings, 'results', styleOf(false))],
    ['summary as JSON', summaryJson(findings, 'results')],
    ['plan', JSON.stringify(plan(findings, { dates: 2 }))],
  ];
  renderReport(findings, figures);
  const dates = files.dates ? await datesFromBytes(file('dates')!) : { dates: null, problems: [] };
  if (dates.dates !== null) shown.push(['dates', JSON.stringify(judgeDates(findings, dates.dates))]);
  else if (files.dates) refused(dates.problems);
  const faults = [...faultsOfFindings(findings), ...shown.flatMap(([name, text]) => faultsOfText(name, text))];
  if (faults.length > 0) throw new Error(faults.slice(0, 5).join('\n'));
  return { kind: 'done', findings };
}

function refused(problems: readonly Problem[]): Outcome {
  const errors = problems.filter((problem) => problem.severity === 'error');
  return refusedFor(errors.map((problem) => problem.message));
}

function refusedFor(messages: readonly string[]): Outcome {
  if (messages.length === 0) throw new Error('refused without a word');
  const faults = messages.flatMap((message) => [
    ...(message.trim().length < 10 ? [`a message that says nothing: ${message}`] : []),
    ...faultsOfText('message', message),
    ...(/something went wrong|TypeError|is not a function|Cannot read/.test(message) ? [message] : []),
  ]);
  if (faults.length > 0) throw new Error(faults.join('\n'));
  return { kind: 'refused', messages };
}
