import type { AminoAcidShare } from '../model/index.js';
import { type FisherIndex, indexResolution } from './fisher-index.js';

/** Share of the index's resolution that is lost without an amino acid which carries it. */
export const CARRIES = 0.2;

/** Share of the index's resolution under which an amino acid's loss would hardly be noticed. */
export const HARDLY = 0.02;

/**
 * Says of each amino acid of an index what it brings (design 7.10). Resolution is the variance between beds over that of
 * a shell within its bed, along the index. An amino acid
 *
 * - `carries the resolution` when the index without it would lose 20 % of its resolution or more, or when by itself it
 *   resolves at least 80 % as well as the index;
 * - `adds noise` when its weight is 0, or when the index without it would lose less than 2 % and it resolves by itself less
 *   than half as well as the average amino acid of the index;
 * - `helps` otherwise.
 *
 * Without enough shells to weigh amino acids (basis `equal weights`) all that resolve anything are said to help.
 * @param index of {@link fisherIndex}
 * @param clock name of the index's clock
 */
export function aminoAcidShares(index: FisherIndex, clock: string): AminoAcidShare[] {
  const whole = indexResolution(index);
  const mean = index.shares.reduce((sum, share) => sum + share.resolution, 0) / index.shares.length;
  return index.shares.map(({ amino_acid, weight, resolution }, at) => {
    const lost = whole > 0 ? 1 - indexResolution(index, at) / whole : 0;
    return { clock, amino_acid, weight, resolution, verdict: verdictOf() };

    function verdictOf(): AminoAcidShare['verdict'] {
      if (index.basis === 'equal weights') return resolution > 0 ? 'helps' : 'adds noise';
      if (!(weight > 0) || !(resolution > 0)) return 'adds noise';
      if (lost >= CARRIES || resolution >= 0.8 * whole) return 'carries the resolution';
      return lost < HARDLY && resolution < mean / 2 ? 'adds noise' : 'helps';
    }
  });
}
