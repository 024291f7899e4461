import type { ShellMark, ShellReading } from '../model/index.js';

/** Marks that say of themselves that the amino acids disagree. */
const DISAGREEMENT: readonly ShellMark[] = ['discordant ratios', 'rate order'];

/**
 * The reading of a shell from the table of the design (7.9).
 *
 * @param direction Whether its ratio is too `high`, too `low`, or `within` error of its bed.
 * @param agree Whether its amino acids agree; null where that is not known (one amino acid, or too few shells to tell).
 * @param marks Screening marks of the shell.
 * @returns The reading. High serine is a sign of young amino acids also where the ratio itself is within error.
 * A high ratio whose amino acids agree, but with another screening mark, stays `reworked or altered`: the clean
 * screening that reworking asks for is missing.
 * @example
 * readingOfShell('high', true, []) // => 'reworked from an older deposit'
 * readingOfShell('high', null, []) // => 'reworked or altered'
 * readingOfShell('low', true, ['high serine']) // => 'contaminated by younger amino acids'
 */
export function readingOfShell(
  direction: 'high' | 'low' | 'within',
  agree: boolean | null,
  marks: readonly ShellMark[],
): ShellReading {
  const disagree = agree === false || marks.some((mark) => DISAGREEMENT.includes(mark));
  if (direction === 'high') {
    if (disagree) return 'altered';
    return agree === true && marks.length === 0 ? 'reworked from an older deposit' : 'reworked or altered';
  }
  if (marks.includes('high serine')) return 'contaminated by younger amino acids';
  if (direction === 'within') return 'none';
  if (disagree) return 'contaminated by younger amino acids';
  return agree === true && marks.length === 0 ? 'intruded from a younger deposit' : 'intruded or contaminated';
}
