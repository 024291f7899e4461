import type { AminoAcid, ScreeningMark, ShellReading } from '../model/index.js';
import type { Agreement } from './amino-acid-agreement.js';
import type { OwnBedResidual } from './own-bed-residuals.js';
import type { ZoneMatch } from './zone-match.js';

/** All that is known of one shell when its reading is written. */
export interface ShellCase {
  readonly ratio: number;
  readonly own: OwnBedResidual;
  readonly tested: number;
  readonly direction: 'high' | 'low' | 'within';
  readonly reading: ShellReading;
  readonly agreement: Agreement | null;
  readonly agree: boolean | null;
  readonly aminoAcids: readonly AminoAcid[];
  readonly marks: readonly ScreeningMark[];
  readonly match: ZoneMatch | null;
  /** Whether zones were given at all. */
  readonly zoned: boolean;
  readonly ownZone: string | null;
  /** Key of a bed on the right side in superposition whose mean the ratio fits. */
  readonly sourceBed: string | null;
  /** Shells of upper beds that are higher than it, and of lower beds that are lower, by more than the limit. */
  readonly asLower: number;
  readonly asUpper: number;
  readonly cut: 'all' | 'some' | 'none';
  /** Its conflicts are those of its bed: half of the bed or more is in the cut, or the bed means are reversed too. */
  readonly wholeBed: boolean;
  /** So many of its bed stand apart that the bed itself is in doubt. */
  readonly crowded: boolean;
}

/**
 * The evidence for and against a shell in sentences with numbers, most important first; none for a shell against
 * which nothing speaks.
 */
export function shellEvidence(shell: ShellCase): string[] {
  const { marks, own, cut, asLower, asUpper, direction } = shell;
  if (marks.length === 0 && direction === 'within' && asLower + asUpper === 0) return [];
  const sentences = [againstOwnBed(shell), ...marks.map(({ evidence }) => `Screening: ${evidence}.`)];
  if (direction !== 'within' || shell.reading !== 'none') {
    sentences.push(amongAminoAcids(shell));
    const source = possibleSource(shell);
    if (source !== null && direction !== 'within') sentences.push(source);
  }
  if (asLower > 0) sentences.push(`It is lower than ${shellsOf(asLower)} of beds above it by more than chance allows.`);
  if (asUpper > 0)
    sentences.push(`It is higher than ${shellsOf(asUpper)} of beds below it by more than chance allows.`);
  if (cut !== 'none') sentences.push(inTheCut(shell));
  else if (asLower + asUpper > 0) {
    sentences.push(
      'No least costly set of shells that would remove all conflicts holds it: other shells are to blame.',
    );
  }
  if (own.others === 1)
    sentences.push('Its bed has one other shell only, so the bed cannot tell which of the two is the odd one.');
  if (own.others === 0)
    sentences.push('It has no other sound shell beside it, so its own bed cannot say whether it belongs.');
  if (shell.crowded) {
    sentences.push(
      'More than a third of the shells of this bed stand apart, so the bed may be of mixed age and none is set aside for its ratio alone.',
    );
  }
  return sentences;
}

function againstOwnBed({ own, ratio, tested }: ShellCase): string {
  if (own.residual === null || own.p === null || own.t === null) return `Its ratio is ${number(ratio)}.`;
  const size = Math.abs(100 * Math.expm1(own.residual));
  const side = own.residual > 0 ? 'above' : 'below';
  const others = own.others === 1 ? 'the one other sound shell' : `the mean of the ${own.others} other sound shells`;
  const adjusted = own.adjusted === null ? '' : `; adjusted for ${tested} shells ${probability(own.adjusted)}`;
  return `Its ratio of ${number(ratio)} lies ${number(size)} % ${side} ${others} of its bed (${number(Math.abs(own.t))} standard errors, ${probability(own.p)}${adjusted}).`;
}

function amongAminoAcids({ agreement, agree, aminoAcids, reading }: ShellCase): string {
  if (agreement === null || agree === null) {
    const high = reading === 'reworked or altered' || reading === 'altered';
    const why =
      aminoAcids.length < 2
        ? 'With one amino acid measured,'
        : 'With amino acids missing on it, or too few complete shells to learn from,';
    return `${why} ${high ? 'reworking and alteration' : 'intrusion and contamination'} can't be told apart.`;
  }
  const { deviations, p } = agreement;
  const count = deviations.filter((off) => !Number.isNaN(off)).length;
  if (agree) return `Its ${count} amino acids tell the same extent of racemization (${probability(p)}).`;
  const size = (a: number) => (Number.isNaN(deviations[a]) ? -1 : Math.abs(deviations[a]));
  const worst = deviations.reduce((far, _, a) => (size(a) > size(far) ? a : far), 0);
  const side = deviations[worst] > 0 ? 'high' : 'low';
  return `Its ${count} amino acids disagree (${probability(p)}): ${aminoAcids[worst]} stands out, too ${side} by ${number(size(worst))} standard deviations for the rest.`;
}

function possibleSource({ match, zoned, ownZone, sourceBed, direction, agree }: ShellCase): string | null {
  if (agree === false || !zoned) return sourceBed === null ? null : fitsBed(sourceBed, direction);
  if (match === null)
    return `Its ratio fits no zone: ${direction === 'high' ? 'an older' : 'a younger'} deposit that the survey does not hold, or something else.`;
  const bed = sourceBed === null ? '' : ` ${fitsBed(sourceBed, direction)}`;
  if (match.zone.name === ownZone)
    return `Its ratio still fits ${ownZone}, the zone of its own bed (probability ${number(match.probability)}).${bed}`;
  return `Its ratio fits ${match.zone.name} (probability ${number(match.probability)})${ownZone === null ? '' : `, not ${ownZone}, the zone of its bed`}.${bed}`;
}

const fitsBed = (bed: string, direction: string): string =>
  `It would fit in ${bed}, which lies ${direction === 'high' ? 'below' : 'above'} its bed.`;

function inTheCut({ cut, wholeBed }: ShellCase): string {
  if (wholeBed)
    return 'Its bed as a whole contradicts superposition: that is a matter of the bed or of the relation, not of this shell.';
  if (cut === 'all') return 'Every least costly set of shells that would remove all conflicts holds it.';
  return 'Some, but not all, of the least costly sets of shells that would remove all conflicts hold it: another shell could be to blame instead.';
}

const shellsOf = (count: number): string => (count === 1 ? '1 shell' : `${count} shells`);
const number = (value: number): string => String(Number(value.toPrecision(3)));
const probability = (p: number): string => (p < 1e-6 ? 'p under 0.000001' : `p = ${Number(p.toPrecision(2))}`);
