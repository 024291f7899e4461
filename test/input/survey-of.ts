import { type SurveyResult, surveyFromBytes } from '../../src/input/index.js';
import type { Analysis, Problem, Survey } from '../../src/model/index.js';

/** Tables as text. */
export interface Texts {
  readonly shells: string;
  readonly beds?: string;
  readonly relations?: string;
  readonly standards?: string;
  readonly aliases?: string;
}

/** Bytes of a text in UTF-8. */
export function utf8(text: string): Uint8Array {
  return new TextEncoder().encode(text);
}

/** Reads tables given as text; the files are called after their part. */
export function readTexts(texts: Texts): Promise<SurveyResult> {
  const file = (part: keyof Texts) => {
    const text = texts[part];
    return text === undefined ? undefined : { file: `${part}.csv`, bytes: utf8(text) };
  };
  return surveyFromBytes({
    shells: file('shells')!,
    beds: file('beds'),
    relations: file('relations'),
    standards: file('standards'),
    aliases: file('aliases'),
  });
}

/** The survey of tables that are sound. */
export async function surveyOf(texts: Texts): Promise<Survey> {
  const { survey, problems } = await readTexts(texts);
  if (survey === null) throw new Error(`refused: ${JSON.stringify(problems)}`);
  return survey;
}

/** The analyses of a sound shells table. */
export async function analysesOf(shells: string): Promise<readonly Analysis[]> {
  return (await surveyOf({ shells })).analyses;
}

/** The errors of tables, which must be refused. */
export async function errorsOf(texts: Texts): Promise<Problem[]> {
  const { survey, problems } = await readTexts(texts);
  const errors = problems.filter((problem) => problem.severity === 'error');
  if ((survey === null) !== errors.length > 0) throw new Error('a survey is given exactly when there is no error');
  return errors;
}

/** The warnings of tables that match a word. */
export async function warningsOf(texts: Texts, about: RegExp): Promise<Problem[]> {
  const { problems } = await readTexts(texts);
  return problems.filter((problem) => problem.severity === 'warning' && about.test(problem.message));
}
