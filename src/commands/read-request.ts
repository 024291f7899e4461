import type { InputFile, Problem, Survey } from '../model/index.js';
import { EXIT, type ExitStatus } from './exit-status.js';
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

/** What is wrong with options or input, when they can't be used. */
export type Refusal = { readonly options: readonly string[] } | { readonly problems: readonly Problem[] };

/**
 * Reads options, settings and survey.
 *
 * @param ready Told of the request before the survey is read; may throw.
 * @returns What was read, or everything that is wrong with it.
 */
export async function readRequest(
  shells: string,
  commandLine: RawOptions,
  ready: (request: RunRequest) => void = () => {},
): Promise<ReadRequest | Refusal> {
  const settings = await settingsOf(commandLine.settings);
  if (!('values' in settings)) return settings;
  const { request, problems } = runRequest(shells, commandLine, settings.values, settings.path);
  if (problems.length > 0) return { options: problems };
  ready(request);
  const { readSurvey } = await import('../input/index.js');
  const read = await readSurvey(request.paths);
  if (read.survey === null) return { problems: read.problems };
  const survey = settings.input ? { ...read.survey, inputs: [...read.survey.inputs, settings.input] } : read.survey;
  const unfit = optionsAgainstSurvey(survey, request.options);
  return unfit.length > 0 ? { options: unfit } : { request, survey };
}

interface SettingsRead {
  readonly values: RawOptions;
  readonly path: string;
  readonly input: InputFile | null;
}

async function settingsOf(path: unknown): Promise<SettingsRead | Refusal> {
  if (typeof path !== 'string') return { values: {}, path: '', input: null };
  const { readSettings } = await import('../input/index.js');
  const { settings, input, problems } = await readSettings(path);
  return settings === null ? { problems } : { values: settings as unknown as RawOptions, path, input: input ?? null };
}

/** Prints everything that is wrong on standard error. */
export function tellRefusal(refusal: Refusal): ExitStatus {
  if ('options' in refusal) {
    for (const problem of refusal.options) complain(safe(problem));
    const count = counted(refusal.options.length, 'option');
    complain(`${count} can't be used; nothing was written. See \`bedorder run --help\`.`);
  } else {
    const style = styleFor(process.stderr);
    for (const problem of refusal.problems) complain(problemText(problem, style));
    complain(`The survey can't be used: ${problemCount(refusal.problems)}; nothing was written.`);
  }
  return EXIT.unusable;
}
