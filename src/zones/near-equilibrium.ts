import type { AminoAcid, Clock } from '../model/index.js';

/** Ratio above which racemization is close to its end: 1.1 for A/I, whose equilibrium is near 1.3, and 0.9 for the others. */
export const nearEquilibriumRatio = (aminoAcid: AminoAcid): number => (aminoAcid === 'Ile' ? 1.1 : 0.9);

/**
 * Log ratio of a clock above which zones are hardly resolvable, since ratios near equilibrium hardly grow any more
 * (design 7.3). On an index it is the value at which all its amino acids stand at their own limits: as long as amino acids
 * that carry weight are short of theirs, they lift the limit out of reach and the index still tells ages apart.
 * @example
 * equilibriumLimit({ name: 'Patella THAA Ile', taxon: 'Patella', fraction: 'THAA', amino_acids: ['Ile'], weights: [1], main: true }) // => 0.09531018
 */
export function equilibriumLimit(clock: Clock): number {
  return clock.amino_acids.reduce((sum, code, at) => sum + clock.weights[at] * Math.log(nearEquilibriumRatio(code)), 0);
}

/**
 * Whether a mean log ratio lies so near equilibrium that the order is lost.
 * @param logMean of a zone or a bed on the clock
 */
export function isNearEquilibrium(clock: Clock, logMean: number): boolean {
  return logMean > equilibriumLimit(clock);
}
