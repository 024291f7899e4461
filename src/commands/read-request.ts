import type { InputFile, Problem, Survey } from '../model/index.js';
import { complain } from './print.js';
import { problemCount, problemText } from './problem-text.js';
import { type RawOptions, type RunRequest, runRequest } from './run-request.js';
import { optionsAgainstSurvey } from './survey-fit.js';
import { counted, safe, styleFor } from './terminal.js';

/** A survey that may be used, with what is asked of it. */
export interface ReadRequest {
  readonly request: RunRequest;
  readonly survey: Survey;
}

/**
 * Reads options, settings and survey. Everything that is wrong with them is printed on standard error.
 *
 * @returns null when they can't be used.
 */
export async function readRequest(
  shells: string,
  commandLine: RawOptions,
  ready: (request: RunRequest) => void = () => {},
): Promise<ReadRequest | null> {
  const settings = await settingsOf(commandLine.settings);
  if (settings === null) return null;
  const { request, problems } = runRequest(shells, commandLine, settings.values, settings.path);
  if (problems.length > 0) return refuseOptions(problems);
  ready(request);
  const { readSurvey } = await import('../input/index.js');
  const read = await readSurvey(request.paths);
  if (read.survey === null) return refuseInput(read.problems);
  const survey = settings.input ? { ...read.survey, inputs: [...read.survey.inputs, settings.input] } : read.survey;
  const unfit = optionsAgainstSurvey(survey, request.options);
  return unfit.length > 0 ? refuseOptions(unfit) : { request, survey };
}

interface SettingsRead {
  readonly values: RawOptions;
  readonly path: string;
  readonly input: InputFile | null;
}

async function settingsOf(path: unknown): Promise<SettingsRead | null> {
  if (typeof path !== 'string') return { values: {}, path: '', input: null };
  const { readSettings } = await import('../input/index.js');
  const { settings, input, problems } = await readSettings(path);
  if (settings === null) return refuseInput(problems);
  return { values: settings as unknown as RawOptions, path, input: input ?? null };
}

function refuseOptions(problems: readonly string[]): null {
  for (const problem of problems) complain(safe(problem));
  complain(`${counted(problems.length, 'option')} can't be used; nothing was written. See \`bedorder run --help\`.`);
  return null;
}

function refuseInput(problems: readonly Problem[]): null {
  const style = styleFor(process.stderr);
  for (const problem of problems) complain(problemText(problem, style));
  complain(`The survey can't be used: ${problemCount(problems)}; nothing was written.`);
  return null;
}
