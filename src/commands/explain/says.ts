import type { Evidence, Findings } from '../../model/index.js';
import { assumedScatter } from '../../planning/index.js';

/** A part of an explanation: a heading and its sentences. */
export interface Passage {
  readonly heading: string;
  readonly sentences: readonly string[];
}

/** A passage, or nothing where there are no sentences. */
export function passage(heading: string, sentences: readonly string[]): Passage[] {
  return sentences.length === 0 ? [] : [{ heading, sentences }];
}

/** The evidence that the run held about something on one clock. */
export function evidenceOf(
  findings: Findings,
  clock: string,
  about: Evidence['about'],
  name: string,
): readonly string[] {
  return findings.evidence
    .filter((row) => row.clock === clock && row.about === about && row.name === name)
    .flatMap(({ sentences }) => sentences);
}

/** Said last, where the errors of a clock rest on a scatter that was assumed. */
export function assumedPassage(findings: Findings): Passage[] {
  return passage(
    'What it rests on',
    assumedScatter(findings).map(
      ({ clock, scatter }) =>
        `On ${clock} a scatter of ${scatter} between shells of one bed is assumed, and every error and probability rests on it.`,
    ),
  );
}

/** `section/bed` of a row. */
export function bedKey(row: { readonly section: string; readonly bed: string }): string {
  return `${row.section}/${row.bed}`;
}
